import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { gapMm, reachBeyondWallMm, wallGapMm } from "../../../../renderer/engine/geometry/clearance";
import { lengthOf, pointAlong } from "../../../../renderer/engine/geometry/outline";
import { type OutlinedShape, outlined, overlaps } from "../../../../renderer/engine/geometry/overlap";
import { signedDistance } from "../../../../renderer/engine/geometry/signed-distance";
import { depthFromWallMm } from "../../../../renderer/engine/geometry/tray-outline";
import type { PlacedShape, Shape, Tray } from "../../../../shared-types/setup";
import { radians } from "../../../../shared-types/units";
import { placedWithin } from "./random-shapes";

const at = (shape: Shape, xMm: number, yMm: number, turnDeg = 0): OutlinedShape => outlined({ id: "part", xMm, yMm, turnDeg, shape });
const disc = (diameterMm: number): Shape => ({ kind: "disc", diameterMm });
const bar = (lengthMm: number, widthMm: number): Shape => ({ kind: "bar", lengthMm, widthMm });
const ring: Shape = { kind: "ring", outerMm: 60, innerMm: 54 };
const pair = fc.tuple(placedWithin(40), placedWithin(40));
const runs = { numRuns: 300, seed: 20 };

const STEP_MM = 0.25;
const samplesOf = (shape: OutlinedShape): (readonly [number, number])[] =>
  shape.loops.flat().flatMap((piece) => {
    const count = Math.ceil(lengthOf(piece) / STEP_MM);
    return Array.from({ length: count + 1 }, (_, index) => pointAlong(piece, index / count));
  });

const moved = (placed: PlacedShape, turnDeg: number, dx: number, dy: number): PlacedShape => {
  const c = Math.cos(radians(turnDeg));
  const s = Math.sin(radians(turnDeg));
  return {
    ...placed,
    xMm: c * placed.xMm - s * placed.yMm + dx,
    yMm: s * placed.xMm + c * placed.yMm + dy,
    turnDeg: placed.turnDeg + turnDeg,
  };
};

describe("the gap between two parts", () => {
  it("is the distance of the centres less both radii for two discs", () => {
    expect(gapMm(at(disc(20), 0, 0), at(disc(30), 40, 30))).toBeCloseTo(25, 12);
  });

  it("is measured from a bar's face to a disc in front of it, and from its corner to a disc off its end", () => {
    expect(gapMm(at(bar(100, 10), 0, 0), at(disc(20), 12, 40))).toBeCloseTo(25, 12);
    expect(gapMm(at(bar(100, 10), 0, 0), at(disc(20), 53, 9))).toBe(0);
    expect(gapMm(at(bar(100, 10), 0, 0), at(disc(2), 53, 9))).toBeCloseTo(4, 12);
  });

  it("is the water's width for a disc in the middle of a ring", () => {
    expect(gapMm(at(disc(20), 150, 100), at(ring, 150, 100))).toBeCloseTo(17, 12);
    expect(overlaps(at(disc(20), 150, 100), at(ring, 150, 100))).toBe(false);
  });

  it("is found across the mouth of an open ring", () => {
    const arc: Shape = { kind: "arc", outerMm: 60, innerMm: 50, sweepDeg: 180 };
    expect(gapMm(at(arc, 0, 0), at(disc(4), -20, 0))).toBeCloseTo(Math.hypot(20, 25) - 2, 12);
  });

  it("is nothing, without an overlap, for bars that lie against each other", () => {
    const first = at(bar(40, 10), 0, 0, 90);
    const second = at(bar(40, 10), 10, 7, 90);
    expect(gapMm(first, second)).toBeCloseTo(0, 9);
    expect(overlaps(first, second)).toBe(false);
  });

  it("is the same from either side, and stays when both are turned and shifted together", () => {
    fc.assert(
      fc.property(pair, fc.integer({ min: -180, max: 180 }), fc.integer({ min: -500, max: 500 }), ([a, b], turnDeg, shift) => {
        const gap = gapMm(outlined(a), outlined(b));
        expect(gapMm(outlined(b), outlined(a))).toBeCloseTo(gap, 9);
        expect(gapMm(outlined(moved(a, turnDeg, shift, -2 * shift)), outlined(moved(b, turnDeg, shift, -2 * shift)))).toBeCloseTo(gap, 7);
      }),
      runs,
    );
  });

  it("agrees with distances between closely sampled outlines", () => {
    fc.assert(
      fc.property(pair, ([a, b]) => {
        const first = outlined(a);
        const second = outlined(b);
        const ofSecond = samplesOf(second);
        let sampled = Infinity;
        for (const [x, y] of samplesOf(first)) for (const [u, v] of ofSecond) sampled = Math.min(sampled, Math.hypot(x - u, y - v));
        const gap = gapMm(first, second);
        if (overlaps(first, second)) {
          expect(gap).toBe(0);
        } else {
          expect(gap).toBeLessThanOrEqual(sampled + 1e-9);
          expect(gap).toBeGreaterThanOrEqual(sampled - STEP_MM);
        }
      }),
      { numRuns: 60, seed: 21 },
    );
  });
});

describe("an overlap", () => {
  it("is there when one part lies in the metal of another, or on top of an equal one", () => {
    expect(overlaps(at(disc(4), 10, 1), at(bar(60, 20), 0, 0))).toBe(true);
    expect(overlaps(at(bar(60, 20), 0, 0), at(disc(4), 10, 1))).toBe(true);
    expect(overlaps(at(ring, 3, 4), at(ring, 3, 4))).toBe(true);
    expect(overlaps(at(bar(60, 20), 0, 0), at(bar(60, 20), 0, 0, 180))).toBe(true);
  });

  it("is there when a bar crosses a ring, and not when it lies in the ring's water", () => {
    expect(overlaps(at(bar(80, 2), 0, 0), at(ring, 0, 0))).toBe(true);
    expect(overlaps(at(bar(50, 2), 0, 0), at(ring, 0, 0))).toBe(false);
  });

  it("is decided by a hundredth of a millimetre", () => {
    expect(overlaps(at(disc(20), 0, 0), at(disc(20), 20.01, 0))).toBe(false);
    expect(overlaps(at(disc(20), 0, 0), at(disc(20), 19.99, 0))).toBe(true);
    expect(overlaps(at(disc(53.99), 0, 0), at(ring, 0, 0))).toBe(false);
    expect(overlaps(at(disc(54.01), 0, 0), at(ring, 0, 0))).toBe(true);
  });

  it("is there exactly where both solids cover a common place", () => {
    fc.assert(
      fc.property(pair, ([a, b]) => {
        const first = outlined(a);
        const second = outlined(b);
        let deepest = -Infinity;
        for (let x = -100; x <= 100; x += 1) {
          for (let y = -100; y <= 100; y += 1) {
            const depth = Math.min(-signedDistance(a, x, y, first.loops), -signedDistance(b, x, y, second.loops));
            deepest = Math.max(deepest, depth);
          }
        }
        if (deepest > 0.001) expect(overlaps(first, second)).toBe(true);
        // The lattice can miss an overlap by at most half its diagonal.
        if (deepest < -Math.SQRT1_2) expect(overlaps(first, second)).toBe(false);
      }),
      { numRuns: 40, seed: 22 },
    );
  });
});

describe("the gap to the tray's wall", () => {
  const rectangle: Tray = { shape: "rectangle", lengthMm: 300, widthMm: 200, wallHeightMm: 40, baseMm: 3, baseMaterial: "acrylic" };
  const round: Tray = { shape: "circle", diameterMm: 250, wallHeightMm: 40, baseMm: 3, baseMaterial: "acrylic" };

  it("is nothing for a bar across the whole tray, which reaches beyond no wall", () => {
    expect(wallGapMm(at(bar(200, 10), 25, 100, 90), rectangle)).toBe(0);
    expect(reachBeyondWallMm(at(bar(200, 10), 25, 100, 90), rectangle)).toBe(0);
  });

  it("is negative by how far a part reaches out", () => {
    expect(wallGapMm(at(bar(100, 10), 47, 100), rectangle)).toBeCloseTo(-3, 12);
    expect(reachBeyondWallMm(at(disc(30), 125, 240), round)).toBeCloseTo(5, 12);
    expect(wallGapMm(at(disc(30), 125, 200), round)).toBeCloseTo(35, 12);
  });

  it("is the smallest distance from the wall along the outline", () => {
    fc.assert(
      fc.property(placedWithin(60), fc.constantFrom(rectangle, round), (placed, tray) => {
        const shape = outlined({ ...placed, xMm: placed.xMm + 125, yMm: placed.yMm + 100 });
        const sampled = Math.min(...samplesOf(shape).map(([x, y]) => depthFromWallMm(tray, x, y)));
        expect(wallGapMm(shape, tray)).toBeLessThanOrEqual(sampled + 1e-9);
        expect(wallGapMm(shape, tray)).toBeGreaterThanOrEqual(sampled - STEP_MM);
      }),
      runs,
    );
  });
});
