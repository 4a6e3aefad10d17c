import { describe, expect, it } from "vitest";
import { createPlanner } from "../../../../renderer/engine/plan";
import { drawnPoints } from "../../../../renderer/engine/tolerance/drawn-points";
import { drawTrays } from "../../../../renderer/engine/tolerance/draws";
import { EXAMPLES } from "../../../../renderer/examples/all-examples";
import type { Setup } from "../../../../shared-types/setup";
import type { PointBand } from "../../../../shared-types/tolerance";

async function taskOf(setup: Setup) {
  const planner = createPlanner();
  const outcome = await planner.plan(setup, "live");
  if (!outcome.ok) throw new Error(outcome.refusal.message);
  const { plan } = outcome;
  const probing = await planner.bands(setup, plan);
  const readings = [...probing.levels.flatMap(({ points }) => points), ...probing.checks];
  return { task: { setup, bench: plan.bench, readings, seed: 7 }, bands: probing.tolerance?.points ?? [] };
}

const rowsOf = (task: Parameters<typeof drawTrays>[0], first: number, count: number): Float64Array[] =>
  [...drawTrays(task, first, count)].filter((row) => row !== null);

describe("trays drawn within their tolerances", () => {
  it("come out the same whoever draws them, and others with another start", async () => {
    const { task } = await taskOf(EXAMPLES[0].setup);
    const whole = rowsOf(task, 0, 4);
    expect(rowsOf(task, 2, 2)).toEqual(whole.slice(2));
    expect(rowsOf({ ...task, seed: 8 }, 0, 1)[0]).not.toEqual(whole[0]);
  }, 60_000);

  it("read the plan itself when nothing can be off", async () => {
    const sure: Setup = {
      ...EXAMPLES[1].setup,
      meter: { ...EXAMPLES[1].setup.meter, accuracyPercent: 0, accuracyDigits: 0 },
      probing: { ...EXAMPLES[1].setup.probing, placementMm: 0 },
      tolerances: {
        supplyPercent: 0,
        partPlacementMm: 0,
        partTurnDeg: 0,
        depthMm: 0,
        tiltDeg: 0,
        conductivityPercent: 0,
        temperatureK: 0,
      },
    };
    const { task } = await taskOf(sure);
    const exact = {
      ...task,
      readings: task.readings.map((reading) => ({ ...reading, voltsError: 0 })),
      bench: { ...task.bench, meter: { ...task.bench.meter, loadingShare: 0 } },
    };
    const surfaces = task.bench.interface;
    if (surfaces.waveform !== "ac") throw new Error("the example is on AC");
    const none = { low: 0, typical: 0, high: 0 };
    const withoutLoss = { ...exact.bench, interface: { ...surfaces, reactanceOhm: none, reactanceLeavingOhm: none } };
    const [row] = rowsOf({ ...exact, bench: withoutLoss }, 0, 1);
    row.forEach((volts, index) => {
      expect(volts).toBeCloseTo(exact.readings[index].volts, 5);
    });
  }, 60_000);

  it("spread as the linear bands say, over the tray within a tenth", async () => {
    const { task, bands } = await taskOf(EXAMPLES[1].setup);
    const drawn = drawnPoints(rowsOf(task, 0, 200), bands);
    const mean = drawn.reduce((sum, { departure }) => sum + departure, 0) / drawn.length;
    expect(Math.abs(mean)).toBeLessThan(0.1);
    // 200 draws know a standard deviation to 5 %: no point may be off by the tenth and three of those.
    for (const { departure } of drawn) expect(Math.abs(departure)).toBeLessThan(0.25);
  }, 120_000);
});

describe("what is said of the draws", () => {
  const band = { standardVolts: 1 } as PointBand;
  const rows = (values: readonly number[]): Float64Array[] => values.map((value) => Float64Array.of(value));
  const even = (half: number, count: number): number[] => Array.from({ length: count }, (_, n) => half * ((2 * n) / (count - 1) - 1));

  it("mean, deviation and 95 % interval of an even spread", () => {
    const [point] = drawnPoints(rows(even(Math.sqrt(3), 2001)), [band]);
    expect(point.meanVolts).toBeCloseTo(0, 9);
    expect(point.standardVolts).toBeCloseTo(1, 2);
    expect(point.highVolts).toBeCloseTo(0.95 * Math.sqrt(3), 3);
    expect(point.reason).toBeNull();
  });

  it("a departure is put down to few draws only while so few could make it", () => {
    expect(drawnPoints(rows(even(1.15 * Math.sqrt(3), 200)), [band])[0].reason).toBe("few-draws");
    expect(drawnPoints(rows(even(1.15 * Math.sqrt(3), 5000)), [band])[0].reason).toBe("curved");
  });
});
