/**
 * The field round the square end of a straight strip, exactly: the strip fills Re z > 0, -thickness < Im z < 0 at potential 0.
 * z = (t/π)·[ζ·√(ζ² - 1) - arcosh ζ] carries the upper half plane of ζ to the water round it (Schwarz–Christoffel, both
 * corners at once); the potential is Im ζ.
 */

const MOST_STEPS = 30;
/** Within this distance (in t/π) of the corner the map is z ∝ (ζ − 1)^(3/2) to leading order, and its inverse a good first guess. */
const NEAR_CORNER = 1.5;

/**
 * Finds ζ for a z in the quadrant beside and before the near corner by Newton's method. Real and imaginary parts are carried as plain
 * numbers: this runs for every node round every strip's end while a part is dragged, and pairs of numbers would cost three times as much.
 * @returns Im ζ
 */
function imaginaryZeta(x: number, y: number): number {
  const size = Math.sqrt(x * x + y * y);
  let re: number;
  let im: number;
  if (size < NEAR_CORNER) {
    let angle = Math.atan2(y, x);
    if (angle < -1e-12) angle += 2 * Math.PI;
    const length = ((3 * size) / (4 * Math.SQRT2)) ** (2 / 3);
    re = 1 + length * Math.cos((2 / 3) * angle);
    im = length * Math.sin((2 / 3) * angle);
  } else {
    // Far from the end z is nearly ζ² - ln(2ζ) - 1/2.
    const away = Math.sqrt(x * x + (y + Math.PI / 2) ** 2);
    const guessRe = Math.sqrt(Math.max(0, (away + x) / 2));
    const guessIm = Math.sqrt(Math.max(0, (away - x) / 2));
    const farX = x + 0.5 + Math.log(2 * Math.sqrt(guessRe * guessRe + guessIm * guessIm));
    const farY = Math.max(0, y + Math.atan2(guessIm, guessRe));
    const far = Math.sqrt(farX * farX + farY * farY);
    re = Math.sqrt(Math.max(0, (far + farX) / 2));
    im = Math.sqrt(Math.max(0, (far - farX) / 2));
  }
  for (let step = 0; step < MOST_STEPS; step++) {
    re = Math.max(0, re);
    im = Math.max(0, im);
    // √(ζ² - 1), in the closed right upper quadrant.
    const squareRe = re * re - im * im - 1;
    const squareIm = 2 * re * im;
    const squareSize = Math.sqrt(squareRe * squareRe + squareIm * squareIm);
    const rootRe = Math.sqrt(Math.max(0, (squareSize + squareRe) / 2));
    const rootIm = Math.sqrt(Math.max(0, (squareSize - squareRe) / 2));
    const slopeSquare = 4 * (rootRe * rootRe + rootIm * rootIm);
    if (slopeSquare < 1e-24) break;
    const sumRe = re + rootRe;
    const sumIm = im + rootIm;
    const errorRe = re * rootRe - im * rootIm - Math.log(sumRe * sumRe + sumIm * sumIm) / 2 - x;
    const errorIm = re * rootIm + im * rootRe - Math.atan2(sumIm, sumRe) - y;
    const moveRe = (2 * (errorRe * rootRe + errorIm * rootIm)) / slopeSquare;
    const moveIm = (2 * (errorIm * rootRe - errorRe * rootIm)) / slopeSquare;
    const length = Math.sqrt(moveRe * moveRe + moveIm * moveIm);
    // Near the corner the slope vanishes and a full step would overshoot.
    const fromCorner = Math.sqrt((re - 1) * (re - 1) + im * im);
    const damp = Math.min(1, (0.5 * Math.max(1e-3, fromCorner)) / Math.max(1e-300, length));
    re -= damp * moveRe;
    im -= damp * moveIm;
    if (length < 1e-13 * (1 + Math.sqrt(re * re + im * im))) break;
  }
  return Math.max(0, im);
}

/**
 * Potential (arbitrary positive scale) in the water round a strip's end.
 * @param ahead how far the point lies beyond the end along the strip's axis, any length unit (negative: beside the strip).
 * @param aside distance from the strip's axis, same unit.
 * @param thickness of the strip, same unit.
 * @returns Im ζ > 0 in the water; 0 on the metal and inside it.
 */
export function stripEndPotential(ahead: number, aside: number, thickness: number): number {
  const off = Math.abs(aside);
  if (ahead <= 0 && off <= thickness / 2) return 0;
  const scale = Math.PI / thickness;
  // Corner of the near side at the origin, strip to the right: the upper half of the mirror-symmetric picture.
  return imaginaryZeta(-ahead * scale, (off - thickness / 2) * scale);
}
