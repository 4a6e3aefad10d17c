import type { Plan, ProbePlan, ProbePoint } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import { pointBands } from "./point-bands";
import type { SensitivityField } from "./sensitivity-field";

/**
 * The probe plan with the whole tolerance of every point in place of the quick band that meter and placement alone leave.
 * `tolerance.points` follow the levels' points in their order, then the checks.
 */
export function withBands(setup: Setup, plan: Pick<Plan, "probing" | "bench">, field: SensitivityField): ProbePlan {
  const { spanV, levels, checks } = plan.probing;
  const all = [...levels.flatMap(({ points }) => points), ...checks];
  const tolerance = pointBands(setup, plan.bench, field, all);
  const bandOf = new Map(all.map((point, index) => [point, tolerance.points[index].bandV]));
  const banded = (point: ProbePoint): ProbePoint => ({ ...point, bandV: bandOf.get(point) ?? point.bandV });
  return {
    spanV,
    levels: levels.map((level) => ({ ...level, points: level.points.map(banded) })),
    checks: checks.map(banded),
    tolerance,
  };
}
