import type { BenchNumbers } from "../../../shared-types/bench";
import { DEFAULT_TOLERANCES, type Setup, type Tolerances } from "../../../shared-types/setup";
import { readingWithInterfaceVolts } from "../bench/interface";

/** @returns the tolerances that the setup states, or the defaults where it states none. */
export const tolerancesOf = (setup: Setup): Tolerances => setup.tolerances ?? DEFAULT_TOLERANCES;

/** What of the bench a tolerance needs. */
export type BandBench = Pick<BenchNumbers, "interface" | "circuit" | "meter" | "water">;

/** The meter's limits of error: ± (percent of the reading + digits) on the range that holds the whole span, V. */
export function meterLimitVolts({ meter }: Setup, { meter: numbers }: BandBench, volts: number): number {
  return (Math.abs(volts) * meter.accuracyPercent) / 100 + meter.accuracyDigits * numbers.digitVolts;
}

type End = "low" | "typical" | "high";

/** The surfaces as estimated at one end of what published values spread over. */
function surfacesAt({ interface: numbers }: BandBench, end: End): BandBench["interface"] {
  if (numbers.waveform === "dc") return { ...numbers, waterVolts: { ...numbers.waterVolts, typical: numbers.waterVolts[end] } };
  const { reactanceOhm, reactanceLeavingOhm } = numbers;
  return {
    ...numbers,
    reactanceOhm: { ...reactanceOhm, typical: reactanceOhm[end] },
    reactanceLeavingOhm: { ...reactanceLeavingOhm, typical: reactanceLeavingOhm[end] },
  };
}

/**
 * What the meter shows where the field alone would give `fieldVolts`, when volts are lost at the electrodes' surfaces.
 * @param end of the estimate; @param resistanceFactor what the water's resistance is multiplied by.
 */
export function shownVolts(
  bench: BandBench,
  [low, high]: readonly [number, number],
  fieldVolts: number,
  end: End = "typical",
  resistanceFactor = 1,
): number {
  const { circuit } = bench;
  const { effectiveResistanceOhm } = circuit;
  const resistance = effectiveResistanceOhm === null ? null : effectiveResistanceOhm * resistanceFactor;
  const normalised = (fieldVolts - low) / (high - low);
  return low + readingWithInterfaceVolts(surfacesAt(bench, end), { ...circuit, effectiveResistanceOhm: resistance }, normalised);
}

/**
 * The farthest that the loss at the surfaces can bring a reading from the printed one, V: the printed one allows for the typical loss or,
 * where the setup does not ask for it, for none.
 */
export function interfaceLimitVolts(setup: Setup, bench: BandBench, spanV: readonly [number, number], fieldVolts: number): number {
  const printed = setup.interface.inReadings ? shownVolts(bench, spanV, fieldVolts) : fieldVolts;
  return Math.max(...(["low", "typical", "high"] as const).map((end) => Math.abs(shownVolts(bench, spanV, fieldVolts, end) - printed)));
}
