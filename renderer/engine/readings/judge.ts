import type { ProbePlan, ProbePoint } from "../../../shared-types/plan";
import {
  type JudgedPlace,
  type JudgedReading,
  type JudgedRun,
  type Reading,
  type ReadingRun,
  samePlace,
  type Verdict,
  type VerdictReason,
} from "../../../shared-types/readings";
import { chanceOfChiSquared, chanceOfWorst } from "./chi-squared";
import { type PlanToJudge, placeJudge } from "./found-places";
import { COVERAGE, verdictOf } from "./verdict";

/** A reading against the band of its point, and a whole tray against chance. */

/** A chance below this fails the tray (common practice, no source: one clean tray in a hundred). */
export const FAILING_CHANCE = 0.01;
/** A chance below this leaves the tray in doubt (common practice, no source: one clean tray in twenty). */
export const DOUBTFUL_CHANCE = 0.05;
/** Fewer than this share of the points read say little of the whole tray (ours, no source). */
const LEAST_SHARE_READ = 0.5;

/** Half-widths that a reading is off where there is no band at all: a reading cannot be off by more. */
const OFF_WITHOUT_BAND = 1e6;

/** @returns level points and checks of a plan, in the order of their numbers. */
export const pointsOf = (plan: ProbePlan): readonly ProbePoint[] =>
  [...plan.levels.flatMap(({ points }) => points), ...plan.checks].sort((a, b) => a.n - b.n);

/** @returns a reading beside its point. */
export function judgeReading(reading: Reading, point: ProbePoint): JudgedReading {
  const residualVolts = reading.volts - point.volts;
  const inBands = point.bandV > 0 ? residualVolts / point.bandV : Math.sign(residualVolts) * OFF_WITHOUT_BAND;
  return {
    n: point.n,
    xMm: point.xMm,
    yMm: point.yMm,
    expectedVolts: point.volts,
    bandVolts: point.bandV,
    readVolts: reading.volts,
    residualVolts,
    inBands,
    verdict: verdictOf(inBands),
  };
}

interface Judged {
  readonly n: number | null;
  readonly inBands: number;
  readonly verdict: Verdict;
}

function trayVerdict(values: readonly Judged[], chance: number, worst: number, enoughRead: boolean): [Verdict | null, VerdictReason] {
  if (values.length === 0) return [null, "none-read"];
  const chanceWorst = chanceOfWorst(COVERAGE * worst, values.length);
  if (chanceWorst < FAILING_CHANCE) return ["fail", "worst-point"];
  if (chance < FAILING_CHANCE) return ["fail", "chi-squared"];
  if (chanceWorst < DOUBTFUL_CHANCE) return ["doubtful", "worst-point"];
  if (chance < DOUBTFUL_CHANCE) return ["doubtful", "chi-squared"];
  if (!enoughRead) return ["doubtful", "few-read"];
  return ["pass", values.every(({ verdict }) => verdict === "pass") ? "as-predicted" : "some-outside"];
}

/**
 * Judges a run. The half-width of a band is two standard uncertainties, and readings are taken as independent; χ² is the sum of the
 * squared residuals in standard uncertainties (JCGM 100:2008 for the band; K. Pearson, Phil. Mag. 50 (1900) 157 for χ²).
 * Of many points one in twenty lies outside its band by chance alone, so that the tray is judged by χ² and by its worst point among so many.
 */
export function judgeRun(run: ReadingRun, plan: PlanToJudge): JudgedRun {
  const points = pointsOf(plan.probing);
  const readings: JudgedReading[] = [];
  const strays: Reading[] = [];
  for (const reading of run.readings) {
    const point = points.find((one) => samePlace(one, reading));
    if (point === undefined) strays.push(reading);
    else readings.push(judgeReading(reading, point));
  }
  const judgePlace = placeJudge(plan);
  const places: readonly JudgedPlace[] = run.found.map(judgePlace);
  const values: readonly Judged[] = [
    ...readings,
    ...places.flatMap(({ distanceMm, bandMm, verdict }) =>
      distanceMm === null || bandMm === null || verdict === null ? [] : [{ n: null, inBands: distanceMm / bandMm, verdict }],
    ),
  ];
  const chiSquared = values.reduce((sum, { inBands }) => sum + (COVERAGE * inBands) ** 2, 0);
  const chance = chanceOfChiSquared(chiSquared, values.length);
  const worst = values.reduce<Judged | null>(
    (most, one) => (most === null || Math.abs(one.inBands) > Math.abs(most.inBands) ? one : most),
    null,
  );
  const enoughRead = readings.length >= LEAST_SHARE_READ * points.length || places.length >= LEAST_SHARE_READ * points.length;
  const [verdict, reason] = trayVerdict(values, chance, Math.abs(worst?.inBands ?? 0), enoughRead);
  const count = (which: Verdict): number => values.filter((one) => one.verdict === which).length;
  return {
    readings,
    places,
    strays,
    planned: points.length,
    counts: { pass: count("pass"), doubtful: count("doubtful"), fail: count("fail") },
    chiSquared,
    degrees: values.length,
    chance,
    worst: worst === null ? null : { n: worst.n, inBands: worst.inBands },
    verdict,
    reason,
  };
}
