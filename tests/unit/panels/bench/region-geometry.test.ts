import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { benchOf } from "../../../../renderer/engine/bench/bench";
import {
  allowsSetting,
  axisTicks,
  boundAt,
  breaks,
  type ChartFrame,
  chartEnds,
  depthOfX,
  regionPath,
  roundEnd,
  voltsOfY,
  xOfDepth,
  yOfVolts,
} from "../../../../renderer/panels/bench/region-geometry";
import { channel, channelFacts } from "../../engine/bench/trays";

const regionFor = (change: Parameters<typeof channel>[0] = {}) => {
  const setup = channel(change);
  return benchOf(setup, channelFacts(setup)).region;
};
const FRAME: ChartFrame = { left: 40, top: 10, width: 300, height: 200, depthEndMm: 40, voltsEnd: 15 };

describe("the chart's plane", () => {
  it("puts a setting where the pointer finds it again", () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 40, noNaN: true }), fc.double({ min: 0, max: 15, noNaN: true }), (depthMm, volts) => {
        expect(depthOfX(FRAME, xOfDepth(FRAME, depthMm))).toBeCloseTo(depthMm, 9);
        expect(voltsOfY(FRAME, yOfVolts(FRAME, volts))).toBeCloseTo(volts, 9);
      }),
    );
  });

  it("ends on round values above what it must show", () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 1000, noNaN: true }), (value) => {
        const end = roundEnd(value);
        expect(end).toBeGreaterThanOrEqual(value * (1 - 1e-9));
        expect(end).toBeLessThanOrEqual(value * 1.51);
        expect(axisTicks(end, 5).at(-1)).toBeLessThanOrEqual(end * (1 + 1e-9));
        expect(axisTicks(end, 5).length).toBeGreaterThan(2);
      }),
    );
  });

  it("shows the whole region and the present setting", () => {
    const region = regionFor();
    const { depthEndMm, voltsEnd } = chartEnds(region, [12, 20]);
    expect(depthEndMm).toBeGreaterThan(23);
    expect(voltsEnd).toBeGreaterThan(20);
  });

  it("agrees with the engine on what is allowed, for any setting", () => {
    const changes = fc.constantFrom<Parameters<typeof channel>[0]>({}, { meter: { counts: 400 } }, { supply: { currentLimitA: 0.006 } });
    fc.assert(
      fc.property(
        changes,
        fc.double({ min: 1, max: 39, noNaN: true }),
        fc.double({ min: 0.05, max: 20, noNaN: true }),
        (change, depthMm, volts) => {
          const region = regionFor({ ...change, water: { depthMm }, supply: { ...(change?.supply as object), volts } });
          // Between two columns a curved edge runs straight: settings within 1 % of an edge may differ.
          const near = [0.99, 1.01].map((share) => allowsSetting(region, depthMm, volts * share));
          if (near[0] === near[1]) expect(allowsSetting(region, depthMm, volts)).toBe(region.presentAllowed);
        },
      ),
      { numRuns: 200 },
    );
  });

  it("says which rules a setting breaks", () => {
    const region = regionFor();
    const broken = (depthMm: number, volts: number) =>
      region.boundaries.filter((one) => breaks(one, depthMm, volts)).map((one) => one.rule);
    expect(broken(12, 6)).toEqual([]);
    expect(broken(12, 13)).toEqual(["wet-hands"]);
    expect(broken(6, 13)).toEqual(["wet-hands", "tilt-tolerance"]);
    expect(broken(35, 6)).toEqual(["electrode-height", "freeboard"]);
    const wetHands = region.boundaries.find((one) => one.rule === "wet-hands");
    expect(wetHands === undefined ? null : boundAt(wetHands, 17)).toBe(12);
  });

  it("draws the region as closed bands, and nothing where it is empty", () => {
    expect(regionPath(FRAME, regionFor())).toMatch(/^M.*Z$/);
    expect(regionPath(FRAME, { ...regionFor(), columns: [] })).toBe("");
  });
});
