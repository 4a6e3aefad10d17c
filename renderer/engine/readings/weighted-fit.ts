import type { FittedValue } from "../../../shared-types/readings";

/** Weighted least squares with at most two parameters (normal equations; JCGM 100:2008, H.3, for the uncertainties of the fit). */

export interface Fit {
  readonly values: readonly FittedValue[];
  /** χ² of what is left. */
  readonly chiSquared: number;
}

/** Below this share of what independent columns would have, two patterns are one and nothing can be fitted. */
const DEGENERATE = 1e-9;

const dot = (a: readonly number[], b: readonly number[]): number => a.reduce((sum, one, index) => sum + one * b[index], 0);

/**
 * @param residuals in standard uncertainties. @param patterns one or two columns: what a unit of each parameter does to each reading, in
 * standard uncertainties too.
 * @returns the fit, or null where a pattern is nothing or two are the same.
 */
export function weightedFit(residuals: readonly number[], patterns: readonly (readonly number[])[]): Fit | null {
  const [a, b] = patterns;
  const total = dot(residuals, residuals);
  const aa = dot(a, a);
  const ar = dot(a, residuals);
  if (!(aa > 0)) return null;
  if (b === undefined) {
    return { values: [{ value: ar / aa, uncertainty: 1 / Math.sqrt(aa) }], chiSquared: Math.max(0, total - (ar * ar) / aa) };
  }
  const [bb, ab, br] = [dot(b, b), dot(a, b), dot(b, residuals)];
  const determinant = aa * bb - ab * ab;
  if (!(determinant > DEGENERATE * aa * bb)) return null;
  const values = [(ar * bb - br * ab) / determinant, (br * aa - ar * ab) / determinant];
  return {
    values: [
      { value: values[0], uncertainty: Math.sqrt(bb / determinant) },
      { value: values[1], uncertainty: Math.sqrt(aa / determinant) },
    ],
    chiSquared: Math.max(0, total - values[0] * ar - values[1] * br),
  };
}

/** @returns the cosine between two patterns without their sign, 1 where one reading after another answers to both alike. */
export const likeness = (a: readonly number[], b: readonly number[]): number => {
  const lengths = Math.sqrt(dot(a, a) * dot(b, b));
  return lengths > 0 ? Math.abs(dot(a, b)) / lengths : 0;
};
