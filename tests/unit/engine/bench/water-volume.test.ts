import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { waterNumbers } from "../../../../renderer/engine/bench/water";
import { waterExtent } from "../../../../renderer/engine/bench/water-volume";
import { covers } from "../../../../renderer/engine/geometry/signed-distance";
import { depthFromWallMm, traySizeMm } from "../../../../renderer/engine/geometry/tray-outline";
import { waterDepthMm } from "../../../../renderer/engine/geometry/water-depth";
import type { Setup } from "../../../../shared-types/setup";
import { channel } from "./trays";

/** Water over a very fine grid of columns: the plain way, to compare with. */
function byColumns(setup: Setup, stepMm: number): number {
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  let volume = 0;
  for (let x = stepMm / 2; x < lengthMm; x += stepMm) {
    for (let y = stepMm / 2; y < widthMm; y += stepMm) {
      if (depthFromWallMm(setup.tray, x, y) < 0) continue;
      const part = setup.parts.find((one) => covers(one, x, y));
      volume += Math.max(0, waterDepthMm(setup, x, y) - (part?.heightMm ?? 0)) * stepMm ** 2;
    }
  }
  return volume;
}

describe("the tray's water", () => {
  it("is length × width × depth less the parts that stand in it", () => {
    const { volumeMm3, surfaceMm2, dryBedMm2 } = waterExtent(channel());
    expect(volumeMm3.value).toBeCloseTo((260 * 200 - 2 * 200 * 10) * 12, 4);
    expect(surfaceMm2.value).toBeCloseTo(260 * 200 - 2 * 200 * 10, 5);
    expect(dryBedMm2).toBe(0);
  });

  it("is given in litres, for one tray and for the class: 576 cm³ are 0.576 L", () => {
    const { volumePerTrayL, volumeAllTraysL } = waterNumbers(channel({ session: { trays: 12 } }));
    expect(volumePerTrayL.value).toBeCloseTo(0.576, 9);
    expect(volumeAllTraysL.value).toBeCloseTo(12 * 0.576, 8);
  });

  it("in a round tray with a ring and a disc is the circles' exact area", () => {
    const setup = channel({
      tray: { shape: "circle", diameterMm: 200, lengthMm: undefined, widthMm: undefined },
      parts: [
        { id: "R", role: "electrode", tap: 0, xMm: 100, yMm: 100, shape: { kind: "ring", outerMm: 180, innerMm: 170 } },
        { id: "D", role: "electrode", tap: 1, xMm: 110, yMm: 95, shape: { kind: "disc", diameterMm: 30 } },
      ],
    });
    const exact = (Math.PI / 4) * (200 ** 2 - 180 ** 2 + 170 ** 2 - 30 ** 2) * 12;
    expect(Math.abs(waterExtent(setup).volumeMm3.value / exact - 1)).toBeLessThan(1e-9);
    // A tilt that turns about the centre of a round tray moves water from side to side; the scan lines must find that too.
    const tilted = waterExtent({ ...setup, water: { ...setup.water, tiltXDeg: 1e-7 } });
    expect(Math.abs(tilted.volumeMm3.value / exact - 1)).toBeLessThan(1e-6);
  });

  it("loses a slab's thickness over the slab, also where the slab reaches beyond the wall", () => {
    const slab = { id: "S", xMm: 250, yMm: 100, thicknessMm: 4, shape: { kind: "bar", lengthMm: 40, widthMm: 60 } };
    const { volumeMm3 } = waterExtent(channel({ water: { slabs: [slab] }, parts: [] }));
    expect(volumeMm3.value).toBeCloseTo(260 * 200 * 12 - 30 * 60 * 4, 3);
  });

  it("in a wedge that runs dry at the middle is a triangle's", () => {
    // Depth rises from 0 at the centre line to 130 mm·tan 3° at the deep wall.
    const tiltXDeg = 3;
    const setup = channel({ water: { depthMm: 0.5, tiltXDeg }, parts: [] });
    const slope = Math.tan((tiltXDeg * Math.PI) / 180);
    const wetMm = 130 + 0.5 / slope;
    const { volumeMm3, dryBedMm2, surfaceMm2 } = waterExtent(setup);
    expect(volumeMm3.value).toBeCloseTo((wetMm * wetMm * slope * 200) / 2, 4);
    expect(surfaceMm2.value).toBeCloseTo(wetMm * 200, 5);
    expect(dryBedMm2).toBeCloseTo((260 - wetMm) * 200, 5);
  });

  it("stands over a part that is shorter than the water", () => {
    const low = { id: "L", role: "insulator", xMm: 130, yMm: 100, heightMm: 5, shape: { kind: "bar", lengthMm: 50, widthMm: 20 } };
    expect(waterExtent(channel({ parts: [low] })).volumeMm3.value).toBeCloseTo(260 * 200 * 12 - 50 * 20 * 5, 3);
  });

  it("of any tray agrees with counting fine columns, and its error is honest", () => {
    const angle = fc.double({ min: -180, max: 180, noNaN: true });
    fc.assert(
      fc.property(
        fc.record({
          turnDeg: angle,
          xMm: fc.double({ min: 20, max: 240, noNaN: true }),
          tiltXDeg: fc.double({ min: -4, max: 4, noNaN: true }),
          tiltYDeg: fc.double({ min: -4, max: 4, noNaN: true }),
        }),
        ({ turnDeg, xMm, tiltXDeg, tiltYDeg }) => {
          const setup = channel({
            water: {
              tiltXDeg,
              tiltYDeg,
              slabs: [{ id: "S", xMm: 130, yMm: 60, turnDeg, thicknessMm: 5, shape: { kind: "disc", diameterMm: 90 } }],
            },
            parts: [
              { id: "A", role: "floating", xMm, yMm: 80, turnDeg, shape: { kind: "frame", lengthMm: 90, widthMm: 50, wallMm: 8 } },
              { id: "B", role: "floating", xMm: 130, yMm: 160, turnDeg, shape: { kind: "arc", outerMm: 60, innerMm: 40, sweepDeg: 200 } },
            ],
          });
          const { volumeMm3 } = waterExtent(setup);
          expect(Math.abs(volumeMm3.value / byColumns(setup, 0.5) - 1)).toBeLessThan(0.002);
          expect(volumeMm3.error / volumeMm3.value).toBeLessThan(0.002);
        },
      ),
      { numRuns: 15 },
    );
  });

  it("grows with depth by the free surface", () => {
    fc.assert(
      fc.property(fc.double({ min: 1, max: 20, noNaN: true }), (depthMm) => {
        const less = waterExtent(channel({ water: { depthMm } }));
        const more = waterExtent(channel({ water: { depthMm: depthMm + 1 } }));
        expect(more.volumeMm3.value - less.volumeMm3.value).toBeCloseTo(less.surfaceMm2.value, 3);
      }),
      { numRuns: 20 },
    );
  });
});
