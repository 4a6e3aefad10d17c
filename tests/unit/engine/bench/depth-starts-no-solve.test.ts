import { describe, expect, it } from "vitest";
import { createPlanner } from "../../../../renderer/engine/plan";
import type { Plan, Quality } from "../../../../shared-types/plan";
import type { Setup } from "../../../../shared-types/setup";
import { channel } from "./trays";

/** Plans a setup and says whether a field was solved for it: only a solve reports progress. */
async function planned(
  planner: ReturnType<typeof createPlanner>,
  setup: Setup,
  quality: Quality = "live",
): Promise<{ readonly plan: Plan; readonly solved: boolean }> {
  let solved = false;
  const outcome = await planner.plan(setup, quality, { onProgress: () => (solved = true) });
  if (!outcome.ok) throw new Error(outcome.refusal.message);
  return { plan: outcome.plan, solved };
}

describe("depth and volts on a level tray", () => {
  it("start no solve, and give what a solve of their own gives", async () => {
    const planner = createPlanner();
    expect((await planned(planner, channel())).solved).toBe(true);
    const deeper = channel({ water: { depthMm: 19 }, supply: { volts: 9 } });
    const scaled = await planned(planner, deeper);
    const fresh = await planned(createPlanner(), deeper);
    expect(scaled.solved).toBe(false);
    expect(fresh.solved).toBe(true);
    expect(scaled.plan.resistanceOhm?.value).toBeCloseTo(fresh.plan.resistanceOhm?.value ?? 0, 6);
    expect(scaled.plan.shapeFactor?.value).toBeCloseTo(fresh.plan.shapeFactor?.value ?? 0, 9);
    expect(scaled.plan.currentA.value).toBeCloseTo(fresh.plan.currentA.value, 12);
    expect(scaled.plan.bench.circuit.largestCurrentDensityAPerM2).toBeCloseTo(fresh.plan.bench.circuit.largestCurrentDensityAPerM2, 6);
    expect(scaled.plan.bench.region.suggestion).toEqual(fresh.plan.bench.region.suggestion);
  });

  it("are dragged on the field that is there, be it the careful one", async () => {
    const planner = createPlanner();
    await planned(planner, channel(), "print");
    const dragged = await planned(planner, channel({ water: { depthMm: 8 }, supply: { volts: 3 } }));
    expect(dragged.solved).toBe(false);
    expect(dragged.plan.quality).toBe("print");
  });

  it("of a tilted tray do: another depth bends the field", async () => {
    const planner = createPlanner();
    await planned(planner, channel({ water: { tiltXDeg: 1 } }));
    expect((await planned(planner, channel({ water: { tiltXDeg: 1, depthMm: 14 } }))).solved).toBe(true);
  });
});
