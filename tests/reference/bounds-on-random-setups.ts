import { randomPlaces, randomSetup } from "./random-setups";
import { solved } from "./solved";

/** The stated bounds against the true errors of `live`, taken as the difference from `reference`, two refinements finer. */
export interface BoundsReport {
  readonly setups: number;
  readonly places: number;
  readonly coveredPlaces: number;
  readonly currents: number;
  readonly coveredCurrents: number;
  /** Median of bound over true error at places: how many times too large the bound is. */
  readonly medianRatio: number;
  /** Share of the span: the median and the 95th percentile of the true error at places. */
  readonly medianError: number;
  readonly ninetyFifthError: number;
  readonly inWords: string;
}

const FIRST_SEED = 9000;

/** A place's error is not told from zero below this, V. */
const LEAST_ERROR = 1e-9;

/**
 * Solves `count` random setups that the program was not tuned to, of all shapes, roles, turns, tilts, slabs and trays.
 * @returns how often the bounds cover and how large they are.
 */
export function boundsOnRandomSetups(count: number): BoundsReport {
  let coveredPlaces = 0;
  let currents = 0;
  let coveredCurrents = 0;
  const ratios: number[] = [];
  const errors: number[] = [];
  for (let seed = FIRST_SEED; seed < FIRST_SEED + count; seed++) {
    const setup = randomSetup(seed, { insulators: seed % 2 === 0, slabs: seed % 4 === 1, tilt: seed % 3 === 0 });
    const rough = solved(setup, "live");
    const sharp = solved(setup, "reference");
    const span = sharp.spanV[1] - sharp.spanV[0];
    for (const conductor of rough.conductors) {
      const known = sharp.conductors.find(({ id }) => id === conductor.id);
      if (known === undefined || conductor.role === "floating") continue;
      currents++;
      // The finer result is not exact either.
      if (Math.abs(known.currentA - conductor.currentA) <= conductor.currentErrorA + 0.05 * known.currentErrorA) coveredCurrents++;
    }
    for (const [x, y] of randomPlaces(setup, seed, 60, 0.5)) {
      const here = rough.read(x, y);
      const there = sharp.read(x, y);
      if (here.volts === null || there.volts === null) continue;
      const error = Math.abs(here.volts - there.volts);
      if (error <= here.voltsError) coveredPlaces++;
      ratios.push(here.voltsError / Math.max(error, LEAST_ERROR));
      errors.push(error / span);
    }
  }
  const rank = (values: number[], share: number): number => values.sort((a, b) => a - b)[Math.floor(share * values.length)] ?? Number.NaN;
  const report = {
    setups: count,
    places: ratios.length,
    coveredPlaces,
    currents,
    coveredCurrents,
    medianRatio: rank(ratios, 0.5),
    medianError: rank(errors, 0.5),
    ninetyFifthError: rank(errors, 0.95),
  };
  return { ...report, inWords: inWords(report) };
}

function inWords(report: Omit<BoundsReport, "inWords">): string {
  const percent = (part: number, whole: number): string => `${((100 * part) / whole).toFixed(1)} %`;
  return [
    `${report.setups} random setups, live against reference`,
    `bounds cover ${report.coveredPlaces} of ${report.places} potentials (${percent(report.coveredPlaces, report.places)})`,
    `bounds cover ${report.coveredCurrents} of ${report.currents} currents (${percent(report.coveredCurrents, report.currents)})`,
    `bounds are in the median ${report.medianRatio.toFixed(1)} times the true error`,
    `true error of potentials: median ${report.medianError.toExponential(1)}, 95 % below ${report.ninetyFifthError.toExponential(1)} of the span`,
  ].join("\n");
}
