import type { Bounded } from "../../../shared-types/plan";

/** Numbers for people: so many digits as they mean, decimal sign by the reader's locale, a thin space between thousands. */

/** @returns a number with so many significant digits. */
export function shownNumber(value: number, digits = 3): string {
  if (!Number.isFinite(value)) return "–";
  const text = new Intl.NumberFormat(undefined, { maximumSignificantDigits: digits, useGrouping: Math.abs(value) >= 10_000 }).format(value);
  return text.replace("-", "−");
}

const MOST_DIGITS = 6;

/** @returns a number with as many digits as its bound supports, six at most. */
export function shownBounded({ value, error }: Bounded): string {
  if (value === 0 || error <= 0) return shownNumber(value, MOST_DIGITS);
  const supported = Math.floor(Math.log10(Math.abs(value))) - Math.floor(Math.log10(error));
  return shownNumber(value, Math.min(MOST_DIGITS, Math.max(1, supported)));
}

/** Powers of a thousand round one, with their prefixes. */
const PREFIXES: readonly (readonly [number, string])[] = [
  [1e6, "M"],
  [1e3, "k"],
  [1, ""],
  [1e-3, "m"],
  [1e-6, "µ"],
];

/** @returns value and unit with the prefix that leaves one to three digits before the decimal sign: 4.03 mA, 1.49 kΩ. */
export function withPrefix(value: number, unit: string, digits = 3): string {
  if (value === 0) return `0 ${unit}`;
  // What rounds up to a thousand belongs to the next prefix.
  const size = Math.abs(Number(value.toPrecision(digits)));
  const [scale, prefix] = PREFIXES.find(([least]) => size >= least) ?? PREFIXES[PREFIXES.length - 1];
  return `${shownNumber(value / scale, digits)} ${prefix}${unit}`;
}

/** @returns a share as a percentage. */
export const percentText = (share: number, digits = 2): string => `${shownNumber(share * 100, digits)} %`;
