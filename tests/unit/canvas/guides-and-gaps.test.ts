import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { gapBetween, gapsAround } from "../../../renderer/canvas/gaps";
import { snappedMove } from "../../../renderer/canvas/guides";
import { boxOfThing } from "../../../renderer/canvas/hit";
import { moveToGap } from "../../../renderer/document/commands/gap";
import { moveThings } from "../../../renderer/document/commands/placing";
import { createDocument } from "../../../renderer/document/document";
import type { BoxMm } from "../../../renderer/document/edit";
import { FIRST_SHAPES } from "../../../renderer/document/shelf-part";
import { outlineOf } from "../../../renderer/engine/geometry/outline";
import { distanceToOutline } from "../../../renderer/engine/geometry/signed-distance";
import type { Part, Setup } from "../../../shared-types/setup";
import { looseRing, part, TRAY_BOX } from "../document/fixtures";

const only = (setup: Setup, id: string): Part => {
  const found = setup.parts.find((one) => one.id === id);
  if (found === undefined) throw new Error(`no part ${id}`);
  return found;
};

describe("snapping while a part moves", () => {
  const others = ["A", "B"].map((id) => boxOfThing(only(looseRing, id)));
  const ring = boxOfThing(only(looseRing, "C"));
  const move = (byX: number, byY: number, reachMm = 0.9) => snappedMove(ring, [150, 100], [byX, byY], others, TRAY_BOX, 1, reachMm);

  it("takes whole millimetres where no line is near", () => {
    expect(move(-23.3, 14.4)).toMatchObject({ byXMm: -23, byYMm: 14, guides: [] });
  });

  it("holds to edges and middles of other parts and of the tray, and shows the line", () => {
    const { byXMm, byYMm, guides } = move(0.6, 20.4);
    expect([byXMm, byYMm]).toEqual([expect.closeTo(0, 9), expect.closeTo(20, 9)]);
    expect(guides.some(({ axis, atMm }) => axis === "x" && Math.abs(atMm - 150) < 1e-6)).toBe(true);
    expect(guides.some(({ axis, atMm }) => axis === "y" && Math.abs(atMm - 150) < 1e-6)).toBe(true);
  });

  it("holds where the gaps to both neighbours are equal, off the grid too", () => {
    const shifted = [others[0]!, [231.4, 50, 241.4, 150] as const];
    const { byXMm } = snappedMove(ring, [150, 100], [0.5, 31], shifted, TRAY_BOX, 1, 0.9);
    expect(180 + byXMm).toBeCloseTo(231.4 - (120 + byXMm - 70), 6);
  });

  it("snaps to no line out of reach, so that every millimetre can be had", () => {
    expect(move(1, 0)).toMatchObject({ byXMm: 1 });
    expect(move(0.6, 33, -1)).toMatchObject({ byXMm: 1, byYMm: 33 });
  });
});

describe("the clear gap", () => {
  it("between the bars is what a ruler would show", () => {
    expect(gapBetween(only(looseRing, "A"), only(looseRing, "B"))).toBeCloseTo(160, 9);
  });

  it("is shown to the nearest neighbours and the wall, not to a part behind another", () => {
    const gaps = gapsAround(only(looseRing, "A"), looseRing);
    expect(gaps.map(({ gapMm }) => gapMm)).toEqual([50, 50].map((gap) => expect.closeTo(gap, 9)));
    const without = { ...looseRing, parts: looseRing.parts.slice(0, 2) };
    expect(gapsAround(only(without, "A"), without)[0]?.gapMm).toBeCloseTo(160, 9);
  });

  it("is drawn between places that lie on both outlines and that far apart", () => {
    const kinds = Object.values(FIRST_SHAPES);
    fc.assert(
      fc.property(
        fc.constantFrom(...kinds),
        fc.constantFrom(...kinds),
        fc.integer({ min: 0, max: 359 }),
        fc.integer({ min: 0, max: 359 }),
        fc.integer({ min: 100, max: 140 }),
        (first, second, turnA, turnB, apart) => {
          const setup: Setup = {
            ...looseRing,
            parts: [
              { ...only(looseRing, "A"), xMm: 80, yMm: 100, turnDeg: turnA, shape: first },
              { ...only(looseRing, "B"), xMm: 80 + apart, yMm: 110, turnDeg: turnB, shape: second },
            ],
          };
          const gap = gapsAround(only(setup, "A"), setup).find(({ to }) => distanceToOutline(outlineOf(only(setup, "B")), ...to) < 1e-6);
          if (gap === undefined) return;
          expect(distanceToOutline(outlineOf(only(setup, "A")), ...gap.from)).toBeLessThan(1e-6);
          expect(Math.hypot(gap.to[0] - gap.from[0], gap.to[1] - gap.from[1])).toBeCloseTo(gap.gapMm, 2);
        },
      ),
    );
  });

  it("can be asked for exactly: the part moves, the other stays", () => {
    const document = createDocument(looseRing);
    document.run(moveToGap(looseRing, "B", "A", 140, gapBetween));
    expect(gapBetween(part(document, "A"), part(document, "B"))).toBeCloseTo(140, 2);
    expect(part(document, "A")).toBe(looseRing.parts[0]);
    expect(part(document, "B")).toMatchObject({ xMm: 215, yMm: 100 });
  });

  it("is reached from an overlap too, along the line between the middles", () => {
    const over = moveThings(looseRing, ["C"], 80, 5).apply(looseRing);
    const document = createDocument(over);
    document.run(moveToGap(over, "C", "B", 12, gapBetween));
    expect(gapBetween(part(document, "C"), part(document, "B"))).toBeCloseTo(12, 1);
    expect(part(document, "C").xMm).toBeLessThan(235);
  });
});

describe("equal gaps in a row", () => {
  const bar = (left: number): BoxMm => [left, 80, left + 10, 120];
  const tray: BoxMm = [0, 0, 300, 200];
  const moved = (to: number, others: readonly BoxMm[]) => snappedMove(bar(0), [5, 100], [to, 0], others, tray, 1, 0.9);

  it("are drawn on both sides of a part between two others, once it has snapped to the middle", () => {
    const { byXMm, equalGaps } = moved(94.6, [bar(40), bar(149)]);
    expect(byXMm).toBeCloseTo(94.5, 6);
    expect(equalGaps.map(({ fromMm, toMm, atMm }) => [fromMm, toMm, atMm])).toEqual([
      [50, 94.5, 100],
      [104.5, 149, 100],
    ]);
  });

  it("repeat the gap between two neighbours beyond them", () => {
    const { byXMm, equalGaps } = moved(100.3, [bar(40), bar(70)]);
    expect(byXMm).toBeCloseTo(100, 6);
    expect(equalGaps.map(({ fromMm, toMm }) => toMm - fromMm)).toEqual([20, 20]);
  });

  it("are not told where gaps differ, nor of parts that are not in the row", () => {
    expect(moved(97, [bar(40), bar(149)]).equalGaps).toEqual([]);
    expect(moved(94.6, [bar(40), [149, 150, 159, 190]]).equalGaps).toEqual([]);
  });
});
