import type { Equipotential, FieldPicture, Plan, ProbePoint } from "../../../shared-types/plan";
import type { FoundPlace, JudgedPlace } from "../../../shared-types/readings";
import { verdictOf } from "./verdict";

/** Places at which a potential was found, against the predicted line of that potential. */

/** What judging needs of a plan. */
export type PlanToJudge = Pick<Plan, "probing" | "equipotentials" | "picture" | "spanV">;

/** Potentials nearer than this share of the span are the same line: a class writes 0.75 for 0.7500001. */
const SAME_LEVEL_SHARE = 1e-4;

/** The nearest place of a line to (x, y) mm. */
function nearestOn(
  line: Equipotential,
  x: number,
  y: number,
): { readonly place: readonly [number, number]; readonly distanceMm: number } | null {
  let best: { place: readonly [number, number]; distanceMm: number } | null = null;
  for (const path of line.paths) {
    for (let at = 0; at + 3 < path.length; at += 2) {
      const [x0, y0, x1, y1] = [path[at], path[at + 1], path[at + 2], path[at + 3]];
      const squared = (x1 - x0) ** 2 + (y1 - y0) ** 2;
      const share = squared === 0 ? 0 : Math.min(1, Math.max(0, ((x - x0) * (x1 - x0) + (y - y0) * (y1 - y0)) / squared));
      const place = [x0 + share * (x1 - x0), y0 + share * (y1 - y0)] as const;
      const distanceMm = Math.hypot(place[0] - x, place[1] - y);
      if (best === null || distanceMm < best.distanceMm) best = { place, distanceMm };
    }
  }
  return best;
}

/** Potential of the node nearest to a place, V; NaN outside. */
function voltsNear({ columns, rows, pitchXMm, pitchYMm, volts }: FieldPicture, x: number, y: number): number {
  const [column, row] = [Math.round(x / pitchXMm), Math.round(y / pitchYMm)];
  return column < 0 || row < 0 || column >= columns || row >= rows ? Number.NaN : (volts[row * columns + column] as number);
}

/** The probe point whose band stands for a place: the nearest of that level. */
function pointBeside(points: readonly ProbePoint[], x: number, y: number): ProbePoint | null {
  const graded = points.filter(({ voltsPerMm }) => voltsPerMm > 0);
  return graded.reduce<ProbePoint | null>(
    (best, one) => (best === null || Math.hypot(one.xMm - x, one.yMm - y) < Math.hypot(best.xMm - x, best.yMm - y) ? one : best),
    null,
  );
}

/**
 * @returns a judge of found places. Distance is to the nearest place of the line as it is drawn; the band in mm is the band in volts of the
 * level's nearest probe point, divided by the gradient there, so that both verdicts rest on the same uncertainties.
 */
export function placeJudge(plan: PlanToJudge): (found: FoundPlace) => JudgedPlace {
  const tolerance = SAME_LEVEL_SHARE * (plan.spanV[1] - plan.spanV[0]);
  return (found) => {
    const { volts, xMm, yMm } = found;
    const unknown = { volts, xMm, yMm, distanceMm: null, nearestMm: null, bandMm: null, verdict: null };
    const line = plan.equipotentials.find((one) => Math.abs(one.volts - volts) <= tolerance);
    const nearest = line === undefined ? null : nearestOn(line, xMm, yMm);
    const level = plan.probing.levels.find((one) => Math.abs(one.volts - volts) <= tolerance);
    if (nearest === null || level === undefined) return unknown;
    const point = pointBeside(level.points, ...nearest.place);
    if (point === null) return unknown;
    const bandMm = point.bandV / point.voltsPerMm;
    const higher = voltsNear(plan.picture, xMm, yMm) >= volts;
    const distanceMm = higher ? nearest.distanceMm : -nearest.distanceMm;
    return { volts, xMm, yMm, distanceMm, nearestMm: nearest.place, bandMm, verdict: verdictOf(distanceMm / bandMm) };
  };
}
