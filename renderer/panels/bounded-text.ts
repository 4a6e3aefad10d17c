import type { Bounded } from "../../shared-types/plan";
import { fixed } from "../document/number-text";
import { texts } from "../texts/texts";

const MOST_FIGURES = 6;
const FEWEST_FIGURES = 3;

/** As many figures as the bound supports, at least three and at most six. */
function figuresOf({ value, error }: Bounded): number {
  const supported = Math.floor(Math.log10(Math.abs(value) / Math.max(error, 1e-12 * Math.abs(value))));
  return Math.min(MOST_FIGURES, Math.max(FEWEST_FIGURES, supported));
}

const PREFIXES: readonly (readonly [from: number, factor: number, prefix: string])[] = [
  [1e6, 1e-6, "M"],
  [1e4, 1e-3, "k"],
  [1, 1, ""],
  [1e-3, 1e3, "m"],
  [0, 1e6, "µ"],
];

/** @returns a bounded number with a fitting prefix to its unit, such as "4.4379 mA"; "none flows" where it has no value. */
export function boundedText({ value, error }: Bounded, unit: string): string {
  const size = Math.abs(value);
  if (!Number.isFinite(size)) return texts.window.ledger.noneFlows;
  if (size === 0) return `0 ${unit}`;
  const [, factor, prefix] = PREFIXES.find(([from]) => size >= from) ?? PREFIXES[2];
  const shown = { value: value * factor, error: error * factor };
  const decimals = figuresOf(shown) - 1 - Math.floor(Math.log10(Math.abs(shown.value)));
  return `${fixed(shown.value, Math.min(MOST_FIGURES, Math.max(0, decimals)))} ${prefix}${unit}`;
}

/** @returns the bound as a share of its value in per cent, to one figure: "0.002"; "–" where there is no value. */
export function percentText({ value, error }: Bounded): string {
  const percent = (100 * error) / Math.abs(value);
  if (!Number.isFinite(percent)) return texts.window.ledger.nothing;
  if (percent === 0) return "0";
  return fixed(percent, Math.min(6, Math.max(0, -Math.floor(Math.log10(percent)))));
}
