import type { JudgedReading } from "../../../shared-types/readings";

/** Faults of the hand that writes: one reading off, digits or points changed over. */

/** A changed-over reading explains itself when it then lies within this many half-widths of what is expected. */
const EXPLAINED_WITHIN_BANDS = 1.25;

/** @returns the reading that lies farthest off, and by how much χ² falls without it. */
export function worstReading(residuals: readonly number[]): { readonly index: number; readonly gain: number } {
  const index = residuals.reduce((worst, one, at) => (Math.abs(one) > Math.abs(residuals[worst]) ? at : worst), 0);
  return { index, gain: residuals[index] ** 2 };
}

/**
 * @param digitVolts one digit of the meter, V.
 * @returns the volts that two neighbouring digits changed over would give, where that lies where the point should read; else null.
 */
export function swappedDigits({ readVolts, expectedVolts, bandVolts }: JudgedReading, digitVolts: number): number | null {
  if (!(digitVolts > 0) || Math.abs(readVolts - expectedVolts) <= bandVolts) return null;
  const digits = [...String(Math.round(Math.abs(readVolts) / digitVolts))];
  const steps = Math.ceil(-Math.log10(digitVolts) - 1e-9);
  while (digits.length <= steps) digits.unshift("0");
  let best: number | null = null;
  for (let at = 0; at + 1 < digits.length; at++) {
    const swapped = [...digits];
    [swapped[at], swapped[at + 1]] = [digits[at + 1], digits[at]];
    const volts = Math.sign(readVolts) * Number((Number(swapped.join("")) * digitVolts).toPrecision(12));
    const off = Math.abs(volts - expectedVolts);
    if (off <= EXPLAINED_WITHIN_BANDS * bandVolts && (best === null || off < Math.abs(best - expectedVolts))) best = volts;
  }
  return best;
}

/**
 * @param deviations standard uncertainties of the readings, V. @returns the two readings whose exchange lets χ² fall most, and by how much.
 */
export function swappedPoints(
  readings: readonly JudgedReading[],
  deviations: readonly number[],
): { readonly indices: readonly [number, number]; readonly gain: number } {
  const squared = (value: number, at: number): number => ((value - readings[at].expectedVolts) / deviations[at]) ** 2;
  let best = { indices: [0, 1] as readonly [number, number], gain: Number.NEGATIVE_INFINITY };
  for (let a = 0; a < readings.length; a++) {
    for (let b = a + 1; b < readings.length; b++) {
      const [first, second] = [readings[a].readVolts, readings[b].readVolts];
      const gain = squared(first, a) + squared(second, b) - squared(second, a) - squared(first, b);
      if (gain > best.gain) best = { indices: [a, b], gain };
    }
  }
  return best;
}
