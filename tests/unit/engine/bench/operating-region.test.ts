import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { benchOf } from "../../../../renderer/engine/bench/bench";
import { findingsOf } from "../../../../renderer/engine/findings/all-findings";
import type { ProbePlan } from "../../../../shared-types/plan";
import { channel, channelFacts } from "./trays";

type Change = Parameters<typeof channel>[0];
const benchFor = (change: Change = {}) => {
  const setup = channel(change);
  return benchOf(setup, channelFacts(setup));
};
const regionFor = (change: Change = {}) => benchFor(change).region;
const NO_PROBING: ProbePlan = { spanV: [0, 6], levels: [], checks: [] };

/** The findings that the chart speaks of. */
const CHART_CODES: ReadonlySet<string> = new Set([
  "current-above-limit",
  "water-warms",
  "volts-above-wet-hands",
  "volts-above-dry",
  "gradient-unreadable",
  "too-shallow-for-tilt",
  "electrode-too-short",
  "freeboard",
  "water-spills",
]);

describe("the depth–voltage region", () => {
  it("names every rule that draws an edge", () => {
    expect(new Set(regionFor().boundaries.map((boundary) => boundary.rule))).toEqual(
      new Set(["supply-current", "power", "heating", "wet-hands", "readable-gradient", "tilt-tolerance", "electrode-height", "freeboard"]),
    );
  });

  it("is scaled from one field: the same region from any depth and any volts that were solved", () => {
    const reference = regionFor();
    for (const [depthMm, volts] of [
      [8, 2.5],
      [20, 11],
      [4, 0.7],
    ]) {
      const region = regionFor({ water: { depthMm }, supply: { volts } });
      expect(region.suggestion).toEqual(reference.suggestion);
      region.columns.forEach((column, index) => {
        expect(column.depthMm).toBeCloseTo(reference.columns[index].depthMm, 6);
        column.volts.forEach(([from, to], run) => {
          expect(from).toBeCloseTo(reference.columns[index].volts[run][0], 6);
          expect(to).toBeCloseTo(reference.columns[index].volts[run][1], 6);
        });
      });
    }
  });

  it("allows a setting exactly where its rules find nothing", () => {
    const supplies = fc.constantFrom<Change>(
      {},
      { supply: { currentLimitA: 0.006 } },
      { water: { conductivityUsPerCm: 20_000, salt: "sodium-chloride" }, supply: { currentLimitA: 5 } },
      { meter: { counts: 400 } },
      { session: { minutes: 600 }, water: { conductivityUsPerCm: 3000 } },
      { supply: { waveform: "dc" } },
    );
    fc.assert(
      fc.property(
        supplies,
        fc.double({ min: 1, max: 39, noNaN: true }),
        fc.double({ min: 0.05, max: 40, noNaN: true }),
        (change, depthMm, volts) => {
          const base = { ...change, water: { ...(change?.water as object), depthMm }, supply: { ...(change?.supply as object), volts } };
          const setup = channel(base);
          const facts = channelFacts(setup);
          const bench = benchOf(setup, facts);
          const found = findingsOf(setup, bench, facts, NO_PROBING).filter((finding) => CHART_CODES.has(finding.code));
          expect(bench.region.presentAllowed).toBe(found.length === 0);
        },
      ),
      { numRuns: 300 },
    );
  });

  it("suggests a setting of its own inside, on round numbers", () => {
    const { suggestion } = regionFor();
    expect(suggestion).not.toBeNull();
    const [depthMm, volts] = suggestion ?? [0, 0];
    expect(regionFor({ water: { depthMm }, supply: { volts } }).presentAllowed).toBe(true);
    expect(depthMm * 2).toBe(Math.round(depthMm * 2));
    expect(volts * 2).toBe(Math.round(volts * 2));
  });

  it("ends at 12 V AC and 30 V DC (IEC 60364-4-41 cl. 414.4.5), and at 6 V AC with salt (IEC 60204-1 cl. 6.4.1)", () => {
    const highest = (change: Change): number =>
      Math.max(...regionFor(change).columns.flatMap((column) => column.volts.map((run) => run[1])));
    expect(highest({})).toBe(12);
    expect(highest({ supply: { waveform: "dc" } })).toBe(30);
    expect(highest({ water: { salt: "sodium-chloride" } })).toBe(6);
  });

  it("the current's edge falls as one over the depth, the power's as one over its root, the heating's stays level", () => {
    const { boundaries } = regionFor();
    const voltsAt = (rule: string, index: number): number => boundaries.find((boundary) => boundary.rule === rule)?.path[index][1] ?? 0;
    // Points 19 and 79 lie at a quarter of the range and at its end.
    expect(voltsAt("supply-current", 19) / voltsAt("supply-current", 79)).toBeCloseTo(4, 6);
    expect(voltsAt("power", 19) / voltsAt("power", 79)).toBeCloseTo(2, 6);
    expect(voltsAt("heating", 19) / voltsAt("heating", 79)).toBeCloseTo(1, 6);
  });

  it("shows the volts just above a change of the meter's range where a millimetre does not move the last digit", () => {
    // 400 counts: from 4 V on a digit is 0.1 V, which the channel's 6.25 mV per mm and volt reach at 16 V.
    const { unreadableVolts } = regionFor({ meter: { counts: 400 } });
    expect(unreadableVolts.some(([low, high]) => low < 5 && high > 14)).toBe(true);
  });

  it("that is empty says which two rules collide and what opens it: water too shallow for its tilt and too deep for its parts", () => {
    const setup = channel();
    const low = { ...setup, parts: setup.parts.map((part) => ({ ...part, heightMm: 6 })) };
    const { columns, suggestion, clash } = benchOf(low, channelFacts(low)).region;
    expect(columns).toEqual([]);
    expect(suggestion).toBeNull();
    expect(clash?.rules).toEqual(["tilt-tolerance", "electrode-height"]);
    expect(clash?.opensWith).toContain("mm taller");
  });

  it("that is empty for want of current names the supply and the gradient", () => {
    const { clash } = regionFor({ supply: { currentLimitA: 0.0001 }, meter: { counts: 200 } });
    expect(clash?.rules).toEqual(["supply-current", "readable-gradient"]);
    expect(clash?.message).toMatch(/supply gives 0.0001 A/);
  });

  it("is empty where the supply stands above the limit with nothing connected", () => {
    expect(regionFor({ supply: { openCircuitVolts: 15 } }).clash?.rules).toEqual(["wet-hands", "readable-gradient"]);
  });

  it("says that it is an estimate where the water is tilted or holds slabs", () => {
    expect(regionFor().exact).toBe(true);
    expect(regionFor({ water: { tiltXDeg: 0.5 } }).exact).toBe(false);
  });
});
