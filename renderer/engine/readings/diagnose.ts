import type { Clearness, Diagnosis, Explanation, FaultKind, JudgedReading } from "../../../shared-types/readings";
import { chanceOfChiSquared } from "./chi-squared";
import { FAILING_CHANCE } from "./judge";
import type { Sensitivities } from "./sensitivities";
import { COVERAGE } from "./verdict";
import { likeness, weightedFit } from "./weighted-fit";
import { swappedDigits, swappedPoints, worstReading } from "./wrong-readings";

/**
 * Which single fault explains a run's residuals best. Every explanation is fitted by weighted least squares with the solver's own
 * sensitivities, and all are compared by a penalised likelihood: χ² + k·ln N + 2·ln M (+ 2·ln of the number of kinds).
 * k·ln N is the price of k fitted values (G. Schwarz, Ann. Statist. 6 (1978) 461, known variances); 2·ln M that of having chosen among M
 * explanations of the same kind, such as M parts or M readings (J. Chen, Z. Chen, Biometrika 95 (2008) 759, γ = 1). 'No fault' pays nothing.
 */

/** Differences of the criterion and what they are called (R. E. Kass, A. E. Raftery, J. Am. Stat. Assoc. 90 (1995) 773, section 3.2). */
const FAIR = 2;
const CLEAR = 6;
const VERY_CLEAR = 10;
/** Fewer readings than this tell no pattern from chance (ours, no source). */
export const LEAST_READINGS = 8;
/** Patterns as alike as this differ by less than any reading shows. */
const SAME_PATTERN = 0.999;

/** Kinds of fault that share the price of having looked for several: a tilt counts once, whichever its direction. */
const KINDS = 7;

interface Candidate extends Explanation {
  /** What the explanation does to the readings, in standard uncertainties; null where it changes single readings. */
  readonly pattern: readonly number[] | null;
}

const clearnessOf = (difference: number): Clearness =>
  difference < FAIR ? "hardly" : difference < CLEAR ? "fairly" : difference < VERY_CLEAR ? "clearly" : "very-clearly";

const published = ({ pattern: _, ...explanation }: Candidate): Explanation => explanation;

/**
 * @param readings in the order taken. @param sensitivities for the places of these very readings, in the same order.
 * @param digitVolts one digit of the meter, V: digits are changed over as they were read.
 * @param spanV lowest and highest electrode.
 * @returns the best explanation, the runner-up and how clearly they differ. A fault is named only where it beats 'no fault' fairly.
 */
export function diagnose(
  readings: readonly JudgedReading[],
  sensitivities: Sensitivities,
  digitVolts: number,
  spanV: readonly [number, number],
): Diagnosis {
  const { untried } = sensitivities;
  const nothing = { best: null, runnerUp: null, inseparable: [], clearness: "hardly", leavesChance: true } as const;
  const count = readings.length;
  if (count < LEAST_READINGS || readings.some(({ bandVolts }) => !(bandVolts > 0))) return { used: count, ...nothing, untried };
  const deviations = readings.map(({ bandVolts }) => bandVolts / COVERAGE);
  const residuals = readings.map(({ residualVolts }, index) => residualVolts / deviations[index]);
  const chiSquared = residuals.reduce((sum, one) => sum + one * one, 0);
  const scaled = (volts: readonly number[]): readonly number[] => volts.map((one, index) => one / deviations[index]);
  const price = (values: number, among: number): number => values * Math.log(count) + 2 * Math.log(among) + 2 * Math.log(KINDS);
  const bare = { partId: null, points: [], values: [], swappedDigitsVolts: null, pattern: null };
  const candidates: Candidate[] = [{ ...bare, kind: "none", chiSquared, criterion: chiSquared }];

  function fitted(kind: FaultKind, partId: string | null, perUnit: readonly (readonly number[])[], among: number): void {
    const columns = perUnit.map(scaled);
    const fit = weightedFit(residuals, columns);
    if (fit === null) return;
    const pattern = residuals.map((_, index) => columns.reduce((sum, column, k) => sum + column[index] * fit.values[k].value, 0));
    candidates.push({ ...bare, kind, partId, ...fit, criterion: fit.chiSquared + price(perUnit.length, among), pattern });
  }

  fitted("scale", null, [readings.map(({ expectedVolts }) => expectedVolts)], 1);
  const middle = (spanV[0] + spanV[1]) / 2;
  const span = spanV[1] - spanV[0];
  // Metal that polarises takes its share at both ends: with every reading taken, all draw nearer to the middle.
  const drift = readings.map(({ expectedVolts }, turn) => ((turn / (count - 1)) * (middle - expectedVolts)) / span);
  fitted("drift", null, [drift], 1);
  for (const { kind, partId, perUnit } of sensitivities.known) {
    const sameKind = sensitivities.known.filter((one) => one.kind === kind).length;
    fitted(kind, partId, perUnit, kind === "tilt-x" || kind === "tilt-y" ? 2 : sameKind);
  }
  const wrong = worstReading(residuals);
  candidates.push({
    ...bare,
    kind: "wrong-reading",
    points: [readings[wrong.index].n],
    values: [{ value: readings[wrong.index].residualVolts, uncertainty: deviations[wrong.index] }],
    swappedDigitsVolts: swappedDigits(readings[wrong.index], digitVolts),
    chiSquared: chiSquared - wrong.gain,
    criterion: chiSquared - wrong.gain + price(1, count),
  });
  const swapped = swappedPoints(readings, deviations);
  candidates.push({
    ...bare,
    kind: "swapped-points",
    points: swapped.indices.map((index) => readings[index].n),
    chiSquared: chiSquared - swapped.gain,
    criterion: chiSquared - swapped.gain + price(0, (count * (count - 1)) / 2),
  });

  candidates.sort((a, b) => a.criterion - b.criterion);
  const none = candidates.find(({ kind }) => kind === "none") as Candidate;
  // Never more than the data supports: what hardly beats 'no fault' is not named.
  const best = none.criterion - candidates[0].criterion < FAIR ? none : candidates[0];
  const isSame = (one: Candidate): boolean =>
    best.pattern !== null && one.pattern !== null && likeness(best.pattern, one.pattern) > SAME_PATTERN && best.kind !== one.kind;
  const others = candidates.filter((one) => one !== best);
  const runnerUp = others.find((one) => !isSame(one)) ?? null;
  const difference = runnerUp === null ? VERY_CLEAR : Math.abs(runnerUp.criterion - best.criterion);
  return {
    used: count,
    best: published(best),
    runnerUp: runnerUp === null ? null : published(runnerUp),
    inseparable: others.filter(isSame).map(published),
    clearness: clearnessOf(difference),
    leavesChance: chanceOfChiSquared(best.chiSquared, count - best.values.length) >= FAILING_CHANCE,
    untried,
  };
}
