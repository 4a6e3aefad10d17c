import type { Verdict } from "../../../shared-types/readings";

/** Standard uncertainties in the half-width of a printed band (JCGM 100:2008, 6.3.3: k = 2, about 95 %). */
export const COVERAGE = 2;
/** Beyond this many half-widths, three standard uncertainties, a value fails; up to it, it is doubtful (common practice, no source). */
export const FAIL_BEYOND_BANDS = 1.5;

/** @returns what a value is worth that lies `inBands` half-widths of its band from where it should. */
export function verdictOf(inBands: number): Verdict {
  const off = Math.abs(inBands);
  return off <= 1 ? "pass" : off <= FAIL_BEYOND_BANDS ? "doubtful" : "fail";
}
