import type { CircuitNumbers, MeterNumbers } from "../../../shared-types/bench";
import { type FieldPicture, OWNER_WATER } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import { metres } from "../../../shared-types/units";
import type { FieldFacts } from "./field-facts";
import { reachablePlacesMm } from "./reachable-places";
import { conductivityAtTemperatureSPerM } from "./water-conductivity";

/** The lowest range of a handheld meter, V (common practice, no source): AC ranges begin higher. */
const LOWEST_RANGE_VOLTS = { ac: 2, dc: 0.2 } as const;

/** One range of a meter: what one digit is worth, and the highest voltage that it shows. */
export interface MeterRange {
  readonly digitVolts: number;
  readonly highestVolts: number;
}

/**
 * The ranges of a meter, decades apart, lowest first, up to the one that shows `volts`.
 * A meter of 2000 counts shows 1999 digits at most.
 */
export function meterRanges(counts: number, waveform: "ac" | "dc", volts: number): readonly MeterRange[] {
  const ranges: MeterRange[] = [];
  let exponent = Math.ceil(Math.log10(LOWEST_RANGE_VOLTS[waveform] / counts) - 1e-9);
  do {
    const digit = 10 ** exponent;
    ranges.push({ digitVolts: digit, highestVolts: (counts - 1) * digit });
    exponent += 1;
  } while (ranges[ranges.length - 1].highestVolts < volts * (1 - 1e-12));
  return ranges;
}

/** @returns one digit (V) on the smallest range of such a meter that shows `volts`. */
export function digitVolts(counts: number, waveform: "ac" | "dc", volts: number): number {
  const ranges = meterRanges(counts, waveform, volts);
  return ranges[ranges.length - 1].digitVolts;
}

/**
 * Resistance of the water at the probe's tip, ohm: a disc that touches the surface, 1/(4σa) with its radius a (Holm's spreading
 * resistance of one side). A rounded tip dips and has less, 1/(2πσa).
 */
export function tipResistanceOhm(conductivitySPerM: number, tipDiameterMm: number): number {
  return 1 / (4 * conductivitySPerM * metres(tipDiameterMm / 2));
}

/** Magnitude of the meter's input, ohm: its resistance beside its capacitance; at 0 Hz the resistance alone. */
export function inputImpedanceOhm(inputMegohm: number, inputPicofarad: number, frequencyHz: number): number {
  const resistance = inputMegohm * 1e6;
  return resistance / Math.hypot(1, 2 * Math.PI * frequencyHz * inputPicofarad * 1e-12 * resistance);
}

/**
 * Share of a reading that loading takes: 1 − |Z/(Z + R)|, with Z the meter's input and R the source.
 * At 0 Hz this is R/(R + R_in).
 */
export function loadingShare(sourceOhm: number, inputMegohm: number, inputPicofarad: number, frequencyHz: number): number {
  const real = 1 + sourceOhm / (inputMegohm * 1e6);
  const imaginary = 2 * Math.PI * frequencyHz * inputPicofarad * 1e-12 * sourceOhm;
  return 1 - 1 / Math.hypot(real, imaginary);
}

/**
 * The field at the picture's node nearest to a place, mV/mm, by central differences: good enough for a median and far quicker
 * than a careful reading. Null next to parts, walls and dry bed.
 */
function pictureFieldMvPerMm(picture: FieldPicture, xMm: number, yMm: number): number | null {
  const { columns, rows, pitchXMm, pitchYMm, volts, owner } = picture;
  const column = Math.round(xMm / pitchXMm);
  const row = Math.round(yMm / pitchYMm);
  if (column < 1 || row < 1 || column > columns - 2 || row > rows - 2) return null;
  const node = row * columns + column;
  if ([node, node - 1, node + 1, node - columns, node + columns].some((one) => owner[one] !== OWNER_WATER)) return null;
  const alongX = (volts[node + 1] - volts[node - 1]) / (2 * pitchXMm);
  const alongY = (volts[node + columns] - volts[node - columns]) / (2 * pitchYMm);
  return Math.hypot(alongX, alongY) * 1000;
}

/**
 * The field below which a given share of the equipotentials' length lies. Lines at even steps lie the denser the stronger the
 * field, so that a place counts in proportion to its field (coarea formula); water at one potential holds no line and counts nothing.
 */
function fieldAlongLines(sorted: readonly number[], share: number): number | null {
  const total = sorted.reduce((sum, field) => sum + field, 0);
  let passed = 0;
  for (const field of sorted) {
    passed += field;
    if (passed >= share * total) return field;
  }
  return null;
}

/** @returns loading, range, digit, frequency and the field against the digit. */
export function meterNumbers(setup: Setup, facts: FieldFacts, circuit: CircuitNumbers): MeterNumbers {
  const { meter, supply, probing } = setup;
  const frequencyHz = supply.waveform === "ac" ? supply.frequencyHz : 0;
  const tip = tipResistanceOhm(conductivityAtTemperatureSPerM(setup), probing.probeTipMm);
  // A place midway divides the tray's resistance evenly; its two halves lie side by side for the meter: R/2 ∥ R/2.
  const tray = (circuit.effectiveResistanceOhm ?? 0) / 4;
  const highest = Math.max(Math.abs(facts.spanV[0]), Math.abs(facts.spanV[1]));
  const digit = digitVolts(meter.counts, supply.waveform, highest);
  const fields = reachablePlacesMm(setup)
    .map(([x, y]) => pictureFieldMvPerMm(facts.picture, x, y))
    .filter((field) => field !== null)
    .sort((a, b) => a - b);
  const median = fieldAlongLines(fields, 0.5);
  return {
    tipResistanceOhm: tip,
    trayResistanceOhm: tray,
    inputImpedanceOhm: inputImpedanceOhm(meter.inputMegohm, meter.inputPicofarad, frequencyHz),
    loadingShare: loadingShare(tip + tray, meter.inputMegohm, meter.inputPicofarad, frequencyHz),
    rangeVolts: digit * meter.counts,
    digitVolts: digit,
    accuracyVolts: (highest * meter.accuracyPercent) / 100 + meter.accuracyDigits * digit,
    frequencyHz,
    acLowHz: meter.acLowHz,
    acHighHz: meter.acHighHz,
    frequencyWithinMeter: frequencyHz === 0 || (frequencyHz >= meter.acLowHz && frequencyHz <= meter.acHighHz),
    medianFieldMvPerMm: median,
    weakFieldMvPerMm: fieldAlongLines(fields, 0.1),
    digitsPerMm: median === null ? null : median / (digit * 1000),
  };
}
