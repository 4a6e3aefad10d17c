import { describe, expect, it } from "vitest";
import { createPlanner } from "../../../../renderer/engine/plan";
import { EXAMPLES } from "../../../../renderer/examples/all-examples";
import type { Plan } from "../../../../shared-types/plan";
import type { Setup } from "../../../../shared-types/setup";

/** What an example may be told: that it needs tiles, that its bed is meant to be so, that its surfaces take a little. */
const EXPECTED: ReadonlySet<string> = new Set([
  "template-tiles",
  "bed-dry",
  "depth-step",
  "too-shallow-for-tilt",
  "interface-loss",
  "too-few-points",
  "level-unreachable",
]);
const planner = createPlanner();

async function planOf(setup: Setup): Promise<Plan> {
  const outcome = await planner.plan(setup, "live");
  if (!outcome.ok) throw new Error(outcome.refusal.message);
  return outcome.plan;
}

describe.each(EXAMPLES.map((example) => [example.title, example] as const))("the example “%s”", (_title, { setup }) => {
  it("can be set up as it stands, and its suggestion as well", async () => {
    const plan = await planOf(setup);
    expect(plan.findings.map((finding) => finding.code).filter((code) => !EXPECTED.has(code))).toEqual([]);
    const { suggestion, clash } = plan.bench.region;
    expect(clash).toBeNull();
    expect(suggestion).not.toBeNull();
    if (suggestion === null) return;
    const [depthMm, volts] = suggestion;
    const moved = await planOf({ ...setup, water: { ...setup.water, depthMm }, supply: { ...setup.supply, volts } });
    expect(moved.findings.filter((finding) => finding.severity === "stop")).toEqual([]);
  });

  it("states the same current in plan, circuit and balance of electrodes", async () => {
    const { currentA, powerW, bench } = await planOf(setup);
    const { circuit } = bench;
    expect(circuit.currentA.value / currentA.value).toBeCloseTo(1, 9);
    expect(circuit.powerW.value / powerW).toBeCloseTo(1, 9);
    const balance = circuit.electrodes.reduce((sum, electrode) => sum + electrode.currentA, 0);
    expect(Math.abs(balance)).toBeLessThan(1e-6 * currentA.value);
    for (const electrode of circuit.electrodes) {
      expect(electrode.largestCurrentDensityAPerM2).toBeGreaterThanOrEqual(electrode.meanCurrentDensityAPerM2 * 0.9);
    }
  });
});
