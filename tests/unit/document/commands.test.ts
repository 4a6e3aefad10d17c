import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { addSlab, applyRemedy, changeSupply, changeTray } from "../../../renderer/document/commands/bench";
import { addPart, duplicateThings, freePlaceMm, removeThings, setRole, setTap } from "../../../renderer/document/commands/parts";
import { alignThings, distributeThings, mirrorThings, moveThings, turnThings } from "../../../renderer/document/commands/placing";
import { FIRST_SHAPES, readShelfPart, shelfPartText } from "../../../renderer/document/shelf-part";
import { outlined, overlaps } from "../../../renderer/engine/geometry/overlap";
import { covers } from "../../../renderer/engine/geometry/signed-distance";
import type { PlacedShape, Shape, ShapeKind } from "../../../shared-types/setup";
import { boxOf, looseRing, openDocument, part, TRAY_BOX } from "./fixtures";

const kinds = Object.keys(FIRST_SHAPES) as ShapeKind[];

describe("a part from the shelf", () => {
  it("is the electrode that the tray still lacks, at the lead that is free; later ones float", () => {
    const document = openDocument();
    document.run(removeThings(looseRing, ["A", "B", "C"]));
    for (let count = 0; count < 3; count++)
      document.run(addPart(document.getState().setup, { shape: FIRST_SHAPES.disc }, 50 + 60 * count, 100));
    expect(document.getState().setup.parts).toMatchObject([
      { id: "A", role: "electrode", tap: 0 },
      { id: "B", role: "electrode", tap: 1 },
      { id: "C", role: "floating" },
    ]);
  });

  it.each(kinds)("put down by key lies clear of everything: %s", (kind) => {
    const shape = FIRST_SHAPES[kind];
    const [xMm, yMm] = freePlaceMm(looseRing, shape, boxOf, TRAY_BOX);
    const placed = outlined({ id: "new", xMm, yMm, turnDeg: 0, shape });
    expect(looseRing.parts.filter((other) => overlaps(placed, outlined(other)))).toEqual([]);
    expect(placed.box[0]).toBeGreaterThanOrEqual(0);
    expect(placed.box[3]).toBeLessThanOrEqual(200);
  });

  it("survives the way from the shelf to the tray as text, and nothing else does", () => {
    const bar = { shape: FIRST_SHAPES.bar, role: "insulator", material: "acrylic" } as const;
    expect(readShelfPart(shelfPartText(bar))).toEqual(bar);
    for (const text of ["", "null", "[]", "{}", '{"shape":{"kind":"spiral"}}', "a picture"]) expect(readShelfPart(text)).toBeNull();
  });
});

describe("roles and wiring", () => {
  it("a floating part made an electrode takes the free lead, and an electrode made an insulator loses its lead", () => {
    const document = openDocument();
    document.run(setRole(looseRing, ["A"], "insulator"));
    expect("tap" in part(document, "A")).toBe(false);
    document.run(setRole(document.getState().setup, ["C"], "electrode"));
    expect(part(document, "C")).toMatchObject({ role: "electrode", tap: 0 });
  });

  it("wires electrodes alone", () => {
    const document = openDocument();
    document.run(setTap(looseRing, ["A", "B", "C"], 0.5));
    expect(document.getState().setup.parts.map((one) => ("tap" in one ? one.tap : null))).toEqual([0.5, 0.5, null]);
  });
});

describe("moving, turning, mirroring", () => {
  it("leaves the parts that were not touched the very same objects", () => {
    const after = moveThings(looseRing, ["A"], 5, 5).apply(looseRing);
    expect(after.parts[1]).toBe(looseRing.parts[1]);
    expect(after.water).toBe(looseRing.water);
  });

  it("keeps the distances between parts that are turned together", () => {
    const after = turnThings(looseRing, ["A", "B"], 30, boxOf).apply(looseRing);
    const [a, b] = after.parts;
    if (a === undefined || b === undefined) throw new Error("two parts expected");
    expect(Math.hypot(a.xMm - b.xMm, a.yMm - b.yMm)).toBeCloseTo(170, 1);
    expect([a.turnDeg, b.turnDeg]).toEqual([120, 120]);
  });

  const shapes: fc.Arbitrary<Shape> = fc.constantFrom<Shape>(...kinds.map((kind) => FIRST_SHAPES[kind]), {
    kind: "polygon",
    pointsMm: [
      [0, 0],
      [40, 5],
      [25, 30],
      [-10, 22],
    ],
  });

  it("mirrors any shape point by point", () => {
    fc.assert(
      fc.property(
        shapes,
        fc.integer({ min: 0, max: 359 }),
        fc.constantFrom("left-right" as const, "top-bottom" as const),
        fc.array(fc.tuple(fc.double({ min: -60, max: 60, noNaN: true }), fc.double({ min: -60, max: 60, noNaN: true })), { maxLength: 30 }),
        (shape, turnDeg, swap, places) => {
          const setup = { ...looseRing, parts: looseRing.parts.slice(0, 1).map((one) => ({ ...one, xMm: 150, yMm: 100, turnDeg, shape })) };
          const [before] = setup.parts;
          const [after] = mirrorThings(setup, ["A"], swap, boxOf).apply(setup).parts;
          if (before === undefined || after === undefined) throw new Error("a part expected");
          const box = boxOf(before);
          for (const [x, y] of places.map(([dx, dy]) => [150 + dx, 100 + dy] as const)) {
            const [mx, my] = swap === "left-right" ? [box[0] + box[2] - x, y] : [x, box[1] + box[3] - y];
            if (nearEdge(before, x, y)) continue;
            expect(covers(after, mx, my)).toBe(covers(before, x, y));
          }
        },
      ),
    );
  });

  /** Rounding of places to 0.01 mm leaves the edge itself undecided. */
  const nearEdge = (placed: PlacedShape, x: number, y: number): boolean =>
    [-0.03, 0, 0.03].some((dx) => [-0.03, 0, 0.03].some((dy) => covers(placed, x + dx, y + dy) !== covers(placed, x, y)));
});

describe("arranging", () => {
  it("aligns edges with edges, and a single part with the tray", () => {
    const after = alignThings(looseRing, ["A", "C"], "top", boxOf, TRAY_BOX).apply(looseRing);
    const tops = after.parts.filter(({ id }) => id !== "B").map((one) => boxOf(one)[3]);
    expect(tops[0]).toBeCloseTo(tops[1] ?? Number.NaN, 6);
    const alone = alignThings(looseRing, ["C"], "left", boxOf, TRAY_BOX).apply(looseRing);
    expect(boxOf(alone.parts[2] ?? looseRing.parts[0]!)[0]).toBeCloseTo(0, 6);
  });

  it("spaces parts with equal clear gaps, the outer two staying where they are", () => {
    const off = moveThings(looseRing, ["C"], -30, 0).apply(looseRing);
    const after = distributeThings(off, ["A", "B", "C"], "x", boxOf).apply(off);
    const [a, b, c] = after.parts.map(boxOf);
    if (a === undefined || b === undefined || c === undefined) throw new Error("three parts expected");
    expect(c[0] - a[2]).toBeCloseTo(b[0] - c[2], 2);
    expect(after.parts[0]?.xMm).toBe(looseRing.parts[0]?.xMm);
    expect(after.parts[1]?.xMm).toBe(looseRing.parts[1]?.xMm);
  });

  it("copies parts and slabs with ids and names of their own", () => {
    const document = openDocument();
    document.run(addSlab({ kind: "bar", lengthMm: 40, widthMm: 40 }, 4, 150, 50));
    document.run(duplicateThings(document.getState().setup, ["A", "C", "D"]));
    const { parts, water } = document.getState().setup;
    expect(new Set([...parts, ...water.slabs].map(({ id }) => id)).size).toBe(7);
    expect(new Set(parts.map(({ name }) => name)).size).toBe(5);
    expect(water.slabs[1]).toMatchObject({ thicknessMm: 4, xMm: 160, yMm: 40 });
  });
});

describe("the bench", () => {
  it("swaps a rectangular tray for a round one", () => {
    const document = openDocument();
    expect(document.run(changeTray({ shape: "circle", diameterMm: 250, wallHeightMm: 40, baseMm: 3, baseMaterial: "glass" })).ok).toBe(
      true,
    );
  });

  it("gives AC a frequency when it is switched to from DC at 0 Hz", () => {
    const document = openDocument();
    document.run(changeSupply({ waveform: "dc", frequencyHz: 0 }));
    document.run(changeSupply({ waveform: "ac" }));
    expect(document.getState().setup.supply).toMatchObject({ waveform: "ac", frequencyHz: 50 });
  });

  it("applies the remedy that a finding offers, and refuses one that would break the setup", () => {
    const document = openDocument();
    document.run(applyRemedy({ path: "parts[1].heightMm", value: 31 }));
    expect(part(document, "B").heightMm).toBe(31);
    document.run(applyRemedy({ path: "supply.volts", value: 4 }));
    expect(document.getState().setup.supply.volts).toBe(4);
    expect(document.run(applyRemedy({ path: "supply.nonsense", value: 4 })).ok).toBe(false);
  });
});
