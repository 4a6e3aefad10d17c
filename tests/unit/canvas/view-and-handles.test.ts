import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { draggedHandle, handlesOf } from "../../../renderer/canvas/handles";
import { boxOfThing, thingAt, thingsWithin } from "../../../renderer/canvas/hit";
import { createTrayView, MARGIN_PX, toScreen, toTray, viewOf } from "../../../renderer/canvas/view";
import { FIRST_SHAPES } from "../../../renderer/document/shelf-part";
import type { PlacedShape, ShapeKind } from "../../../shared-types/setup";
import { looseRing } from "../document/fixtures";

const opened = () => {
  const view = createTrayView(looseRing.tray);
  view.setSize(1280, 740);
  return view;
};

describe("the view", () => {
  it("shows the whole tray with room for its rules, whatever the window", () => {
    fc.assert(
      fc.property(fc.integer({ min: 300, max: 4000 }), fc.integer({ min: 250, max: 2400 }), (width, height) => {
        const tray = createTrayView(looseRing.tray);
        tray.setSize(width, height);
        const view = viewOf(tray.getState());
        const [left, bottom] = toScreen(view, 0, 0);
        const [right, top] = toScreen(view, 300, 200);
        expect(left).toBeGreaterThanOrEqual(MARGIN_PX.left - 1e-6);
        expect(top).toBeGreaterThanOrEqual(MARGIN_PX.top - 1e-6);
        expect(right).toBeLessThanOrEqual(width - MARGIN_PX.right + 1e-6);
        expect(bottom).toBeLessThanOrEqual(height - MARGIN_PX.bottom + 1e-6);
      }),
    );
  });

  it("zooms about the place under the pointer", () => {
    const tray = opened();
    const at = [700, 300] as const;
    const before = toTray(viewOf(tray.getState()), ...at);
    tray.zoomBy(3, at);
    const after = toTray(viewOf(tray.getState()), ...at);
    expect(after[0]).toBeCloseTo(before[0], 6);
    expect(after[1]).toBeCloseTo(before[1], 6);
  });

  it("never loses the tray from sight, and comes back to all of it", () => {
    const tray = opened();
    const start = tray.getState().scale;
    tray.zoomBy(10);
    tray.panBy(1e6, -1e6);
    const [x, y] = toTray(viewOf(tray.getState()), 640, 370);
    expect([x >= 0, x <= 300, y >= 0, y <= 200]).toEqual([true, true, true, true]);
    tray.fit();
    expect(tray.getState().scale).toBe(start);
  });

  it("keeps what the user zoomed to when the window changes size", () => {
    const tray = opened();
    tray.zoomBy(2);
    const { scale, middleMm } = tray.getState();
    tray.setSize(900, 600);
    expect(tray.getState()).toMatchObject({ scale, middleMm });
  });
});

describe("a handle", () => {
  const snap = { stepMm: 1, stepDeg: 5, aboutMiddle: false };
  const place = (kind: ShapeKind, turnDeg = 0): PlacedShape => ({ id: "A", xMm: 150, yMm: 100, turnDeg, shape: FIRST_SHAPES[kind] });
  const handle = (thing: PlacedShape, kind: string) => {
    const found = handlesOf(thing, 3).find((one) => one.kind === kind);
    if (found === undefined) throw new Error(`no handle ${kind}`);
    return found;
  };

  it.each(Object.keys(FIRST_SHAPES) as ShapeKind[])("left where it is changes nothing: %s", (shape) => {
    for (const turnDeg of [0, 90, 35]) {
      const thing = place(shape, turnDeg);
      for (const { kind, xMm, yMm } of handlesOf(thing, 3)) {
        const now = draggedHandle(thing, kind, [xMm, yMm], { ...snap, stepMm: 0, stepDeg: 0 });
        expect(now.xMm).toBeCloseTo(150, 2);
        expect(now.yMm).toBeCloseTo(100, 2);
        expect(now.turnDeg).toBeCloseTo(turnDeg, 2);
        for (const [key, value] of Object.entries(now.shape))
          if (typeof value === "number") expect(value).toBeCloseTo(thing.shape[key as "kind"] as unknown as number, 1);
      }
    }
  });

  it("pulls one end of a bar and leaves the other where it stands, however the bar is turned", () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 359 }), fc.integer({ min: -40, max: 60 }), (turnDeg, byMm) => {
        const bar = place("bar", turnDeg);
        const [c, s] = [Math.cos((turnDeg * Math.PI) / 180), Math.sin((turnDeg * Math.PI) / 180)];
        const end = handle(bar, "length+");
        const now = draggedHandle(bar, "length+", [end.xMm + byMm * c, end.yMm + byMm * s], snap);
        if (now.shape.kind !== "bar") throw new Error("a bar expected");
        expect(now.shape.lengthMm).toBe(100 + byMm);
        expect(now.xMm - (now.shape.lengthMm / 2) * c).toBeCloseTo(150 - 50 * c, 1);
        expect(now.yMm - (now.shape.lengthMm / 2) * s).toBeCloseTo(100 - 50 * s, 1);
      }),
    );
  });

  it("keeps the middle of a bar where it is while Shift asks for it", () => {
    const bar = place("bar");
    const now = draggedHandle(bar, "length+", [220, 100], { ...snap, aboutMiddle: true });
    expect(now).toMatchObject({ xMm: 150, yMm: 100, shape: { lengthMm: 140 } });
  });

  it("never makes a ring whose inside is as wide as its outside, nor a frame without water", () => {
    const ring = place("ring");
    expect(draggedHandle(ring, "outer", [155, 100], snap).shape).toMatchObject({ outerMm: 55, innerMm: 54 });
    expect(draggedHandle(ring, "inner", [150, 190], snap).shape).toMatchObject({ outerMm: 60, innerMm: 59 });
    const frame = draggedHandle(place("frame"), "wall", [150, 100], snap).shape;
    if (frame.kind !== "frame") throw new Error("a frame expected");
    expect(2 * frame.wallMm).toBeLessThan(60);
  });

  it("turns in steps of 5°, and opens an arc at its ends", () => {
    expect(draggedHandle(place("bar"), "turn", [150 - 50, 100 + 48], snap).turnDeg).toBe(45);
    const arc = draggedHandle(place("arc"), "sweep+", [150, 140], snap).shape;
    expect(arc).toMatchObject({ kind: "arc", sweepDeg: 180 });
  });

  it("stands clear of a narrow part, so that its middle can still be taken", () => {
    const thin: PlacedShape = { ...place("bar"), shape: { kind: "bar", lengthMm: 100, widthMm: 1 } };
    for (const { shownXMm, shownYMm } of handlesOf(thin, 3)) expect(Math.hypot(shownXMm - 150, shownYMm - 100) * 3).toBeGreaterThan(10);
  });
});

describe("what lies under a place", () => {
  it("is the metal of a ring, not the water inside it", () => {
    expect(thingAt(looseRing, [150 + 28.5, 100], 1)?.id).toBe("C");
    expect(thingAt(looseRing, [150, 100], 1)).toBeNull();
  });

  it("is a thin wire even a little beside it", () => {
    const wire = {
      ...looseRing,
      parts: looseRing.parts.map((part) => ({ ...part, shape: { kind: "bar", lengthMm: 100, widthMm: 0.5 } as const })),
    };
    expect(thingAt(wire, [67, 100], 3)?.id).toBe("A");
    expect(thingAt(wire, [67, 100], 1)).toBeNull();
  });

  it("is a part before the slab below it", () => {
    const slab = { id: "S", xMm: 150, yMm: 100, turnDeg: 0, thicknessMm: 3, shape: { kind: "bar", lengthMm: 280, widthMm: 180 } } as const;
    const both = { ...looseRing, water: { ...looseRing.water, slabs: [slab] } };
    expect(thingAt(both, [65, 100], 1)?.id).toBe("A");
    expect(thingAt(both, [150, 100], 1)?.id).toBe("S");
  });

  it("is framed when the frame holds all of it", () => {
    expect(thingsWithin(looseRing, [50, 40, 200, 160])).toEqual(["A", "C"]);
    expect(thingsWithin(looseRing, [140, 90, 160, 110])).toEqual([]);
    expect(boxOfThing(looseRing.parts[0]!)).toEqual([60, 50, 70, 150]);
  });
});
