import type { Setup } from "../../../shared-types/setup";
import { digitVolts } from "../bench/meter-and-probe";

/** Coverage factor for about 95 % (JCGM 100:2008, 6.3.3). */
const COVERAGE = 2;
/** Standard uncertainty of a limit ± a of which no more is known: a/√3 (JCGM 100:2008, 4.3.7). */
const rectangular = (limit: number): number => limit / Math.sqrt(3);

/** @returns the k = 2 half-width (V) of the band round an expected reading. */
export type ToleranceBand = (volts: number, voltsPerMm: number) => number;

/**
 * The band that meter accuracy and probe placement leave, their variances added (JCGM 100:2008, 5.1.2).
 * Meter: ± (percent of the reading + digits), the digits on one range for the whole plan: the smallest that shows the highest
 * potential, since a class leaves the range switch alone. Placement: ± `placementMm` in x and in y independently, through
 * the field; together (Ex² + Ey²)·a²/3.
 * @param highestVolts largest magnitude that is to be read.
 */
export function toleranceBand(setup: Setup, highestVolts: number): ToleranceBand {
  const { counts, accuracyPercent, accuracyDigits } = setup.meter;
  const digit = digitVolts(counts, setup.supply.waveform, highestVolts);
  return (volts, voltsPerMm) => {
    const meter = rectangular((Math.abs(volts) * accuracyPercent) / 100 + accuracyDigits * digit);
    const placement = rectangular(voltsPerMm * setup.probing.placementMm);
    return COVERAGE * Math.hypot(meter, placement);
  };
}
