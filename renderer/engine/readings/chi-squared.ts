/**
 * Chances under the normal and the χ² distribution. Method: W. H. Press et al., Numerical Recipes, 3rd ed. (2007), 6.2: the incomplete
 * gamma function by its series below a + 1 and by Lentz's continued fraction above.
 */

/** Lanczos's approximation of ln Γ(x), x > 0 (C. Lanczos, SIAM J. Numer. Anal. 1 (1964) 86; g = 5, six terms: error below 2e-10). */
function logGamma(x: number): number {
  const terms = [76.18009172947146, -86.50532032941678, 24.01409824083091, -1.231739572450155, 0.1208650973866179e-2, -0.5395239384953e-5];
  const sum = terms.reduce((total, term, index) => total + term / (x + 1 + index), 1.000000000190015);
  const shifted = x + 5.5;
  return (x + 0.5) * Math.log(shifted) - shifted + Math.log((Math.sqrt(2 * Math.PI) * sum) / x);
}

const SMALL = 1e-300;
const PRECISE = 1e-14;
const MOST_STEPS = 10_000;

/** Q(a, x) = Γ(a, x)/Γ(a). */
function upperGammaShare(a: number, x: number): number {
  if (x <= 0) return 1;
  const front = Math.exp(a * Math.log(x) - x - logGamma(a));
  if (x < a + 1) {
    let term = 1 / a;
    let sum = term;
    for (let n = 1; n < MOST_STEPS && term > sum * PRECISE; n++) {
      term *= x / (a + n);
      sum += term;
    }
    return Math.max(0, 1 - front * sum);
  }
  let b = x + 1 - a;
  let c = 1 / SMALL;
  let d = 1 / b;
  let fraction = d;
  for (let i = 1; i < MOST_STEPS; i++) {
    const an = -i * (i - a);
    b += 2;
    d = 1 / (Math.abs(an * d + b) < SMALL ? SMALL : an * d + b);
    c = Math.abs(b + an / c) < SMALL ? SMALL : b + an / c;
    fraction *= d * c;
    if (Math.abs(d * c - 1) < PRECISE) break;
  }
  return front * fraction;
}

/** @returns the chance of a χ² of at least `chiSquared` with so many degrees of freedom; 1 where there are none. */
export const chanceOfChiSquared = (chiSquared: number, degrees: number): number =>
  degrees <= 0 ? 1 : upperGammaShare(degrees / 2, chiSquared / 2);

/**
 * The chance that the largest of `count` independent normal values lies at least `deviations` standard deviations off, either way:
 * 1 − (1 − p)^count (Z. Šidák, J. Am. Stat. Assoc. 62 (1967) 626).
 */
export function chanceOfWorst(deviations: number, count: number): number {
  const one = chanceOfChiSquared(deviations * deviations, 1);
  return -Math.expm1(count * Math.log1p(-Math.min(one, 1 - 1e-16)));
}
