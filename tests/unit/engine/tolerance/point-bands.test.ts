import { describe, expect, it } from "vitest";
import { createPlanner } from "../../../../renderer/engine/plan";
import { combined, type PlainCause, pointBands } from "../../../../renderer/engine/tolerance/point-bands";
import { twoBars } from "../../../../renderer/examples/two-bars";
import type { Setup } from "../../../../shared-types/setup";

const cause = (sensitivityVPerUnit: number, halfWidth: number): PlainCause => ({
  key: "probe-x",
  partId: null,
  unit: "mm",
  sensitivityVPerUnit,
  halfWidth,
  distribution: "rectangular",
});

async function banded(setup: Setup) {
  const planner = createPlanner();
  const outcome = await planner.plan(setup, "live");
  if (!outcome.ok) throw new Error(outcome.refusal.message);
  const { plan } = outcome;
  const points = [...plan.probing.levels.flatMap((level) => level.points), ...plan.probing.checks];
  return { plan, points, result: pointBands(setup, plan.bench, await planner.sensitivities(setup), points) };
}

describe("the band of a point", () => {
  it("adds variances of limits, each its square over three, and doubles the root", () => {
    const { standardVolts, bandV, causes } = combined([cause(-0.03, 0.5), cause(0.04, 0.5)]);
    expect(standardVolts).toBeCloseTo(0.025 / Math.sqrt(3), 12);
    expect(bandV).toBeCloseTo(0.05 / Math.sqrt(3), 12);
    expect(causes.map(({ share }) => share)).toEqual([expect.closeTo(0.64, 12), expect.closeTo(0.36, 12)]);
  });

  it("is none where nothing can be off", () => {
    expect(combined([cause(0.03, 0)]).bandV).toBe(0);
  });

  it("holds at least what meter and probe leave, and every cause has its share", async () => {
    const { plan, points, result } = await banded(twoBars.setup);
    expect(result.points).toHaveLength(points.length);
    result.points.forEach((point, index) => {
      expect(point.bandV).toBeGreaterThan(points[index].bandV);
      expect(point.bandV).toBeLessThan(0.1 * plan.spanV[1]);
      expect(point.causes.reduce((sum, { share }) => sum + share, 0)).toBeCloseTo(1, 9);
    });
    expect(result.ranking.reduce((sum, { share }) => sum + share, 0)).toBeCloseTo(1, 9);
    expect(result.ranking[0].share).toBeGreaterThanOrEqual(result.ranking[1].share);
    expect(new Set(result.ranking.map(({ key }) => key))).toContain("tilt-x");
  }, 30_000);

  it("knows the depth of an evenly deep tray for no cause, and a sloppy hand for the first", async () => {
    const sloppy = { ...twoBars.setup, probing: { ...twoBars.setup.probing, placementMm: 4 } };
    const { result } = await banded(sloppy);
    expect(result.ranking.find(({ key }) => key === "depth")?.share).toBe(0);
    expect(["probe-x", "probe-y"]).toContain(result.ranking[0].key);
  }, 30_000);

  it("takes the water's conductivity into account only where readings allow for the loss at the surfaces", async () => {
    const allowing = { ...twoBars.setup, interface: { ...twoBars.setup.interface, inReadings: true } };
    const shareOf = (result: { readonly ranking: readonly { readonly key: string; readonly share: number }[] }): number =>
      result.ranking.find(({ key }) => key === "conductivity")?.share ?? Number.NaN;
    expect(shareOf((await banded(twoBars.setup)).result)).toBe(0);
    expect(shareOf((await banded(allowing)).result)).toBeGreaterThan(0);
  }, 30_000);
});
