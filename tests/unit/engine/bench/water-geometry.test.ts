import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  depthRangeMm,
  leastDepthForTiltMm,
  parallaxMm,
  tiltReadingShare,
  waterGeometry,
} from "../../../../renderer/engine/bench/water-geometry";
import { channel } from "./trays";

/** Share of the span at the middle of a channel whose depth runs as 1 + δx from −1 to 1, by adding up resistances. */
function middleByAdding(delta: number): number {
  const count = 20_000;
  let half = 0;
  let whole = 0;
  for (let index = 0; index < count; index++) {
    const slice = 1 / (1 + delta * ((2 * index + 1) / count - 1));
    whole += slice;
    if (index < count / 2) half += slice;
  }
  return half / whole - 0.5;
}

describe("geometry of the water", () => {
  it("10 mm of water over 5 mm of acrylic shift a mark by 1.90 mm at 10° and 3.83 mm at 20° (Snell; indices 1.333 and 1.49 published)", () => {
    const setup = channel({ water: { depthMm: 10 } });
    expect(parallaxMm(setup, 10)).toBeCloseTo(1.9, 2);
    expect(parallaxMm(setup, 20)).toBeCloseTo(3.83, 2);
  });

  it("looking straight down shifts nothing, looking flatter shifts more", () => {
    const setup = channel();
    expect(parallaxMm(setup, 0)).toBe(0);
    fc.assert(
      fc.property(fc.double({ min: 0.1, max: 60, noNaN: true }), (angleDeg) => {
        expect(parallaxMm(setup, angleDeg + 1)).toBeGreaterThan(parallaxMm(setup, angleDeg));
      }),
    );
  });

  it("a tilt moves the middle's reading as the logarithm of the depth, checked against adding up slices", () => {
    for (const delta of [0.02, 0.1, 0.4, 0.9]) expect(tiltReadingShare(delta)).toBeCloseTo(middleByAdding(delta), 5);
    expect(tiltReadingShare(0.02)).toBeCloseTo(0.02 / 4, 5);
    expect(tiltReadingShare(1.5)).toBe(0.5);
  });

  it("0.2° across 200 mm of 12 mm water changes the depth by 2.9 % and readings by a quarter of that share of the span", () => {
    const { tiltBaseMm, tiltDepthShare, tiltReadingShare: share } = waterGeometry(channel());
    expect(tiltBaseMm).toBe(200);
    expect(tiltDepthShare).toBeCloseTo((Math.tan((0.2 * Math.PI) / 180) * 100) / 12, 9);
    expect(share).toBeCloseTo(tiltDepthShare / 4, 4);
  });

  it("the least depth for a tilt is where its shift is exactly what was allowed", () => {
    const depthMm = leastDepthForTiltMm(180, 0.01);
    expect(tiltReadingShare((Math.tan((0.2 * Math.PI) / 180) * 90) / depthMm)).toBeCloseTo(0.01, 9);
  });

  it("freeboard is measured at the deepest side of a tilted tray", () => {
    expect(waterGeometry(channel()).freeboardMm).toBe(28);
    const { freeboardMm } = waterGeometry(channel({ water: { tiltXDeg: 1 } }));
    expect(freeboardMm).toBeCloseTo(28 - 130 * Math.tan(Math.PI / 180), 9);
    expect(depthRangeMm(channel({ water: { tiltXDeg: 20 } }))[0]).toBe(0);
  });

  it("an electrode of 24 mm in 12 mm of water stands half immersed (common practice, no source)", () => {
    const [bar] = waterGeometry(channel()).parts;
    expect(bar).toEqual({ id: "A", depthMm: 12, proudMm: 12, immersedShare: 0.5 });
  });

  it("a part on the deep side of a tilted tray stands deeper", () => {
    const [shallow, deep] = waterGeometry(channel({ water: { tiltXDeg: 1 } })).parts;
    expect(deep.depthMm).toBeGreaterThan(12);
    expect(shallow.depthMm).toBeLessThan(12);
  });
});
