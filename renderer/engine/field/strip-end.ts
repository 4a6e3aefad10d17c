/**
 * The field round the square end of a straight strip, exactly: the strip fills Re z > 0, -thickness < Im z < 0 at potential 0.
 * z = (t/π)·[ζ·√(ζ² - 1) - arcosh ζ] carries the upper half plane of ζ to the water round it (Schwarz–Christoffel, both
 * corners at once); the potential is Im ζ.
 */

type Complex = readonly [number, number];

const times = ([a, b]: Complex, [c, d]: Complex): Complex => [a * c - b * d, a * d + b * c];
const over = ([a, b]: Complex, [c, d]: Complex): Complex => {
  const square = c * c + d * d;
  return [(a * c + b * d) / square, (b * c - a * d) / square];
};
/** Square root in the closed upper half plane's right part (real part ≥ 0). */
const root = ([a, b]: Complex): Complex => {
  const size = Math.hypot(a, b);
  const re = Math.sqrt(Math.max(0, (size + a) / 2));
  const im = Math.sqrt(Math.max(0, (size - a) / 2));
  return [re, b < 0 ? -im : im];
};
const power = ([a, b]: Complex, exponent: number, angle: number): Complex => {
  const size = Math.hypot(a, b) ** exponent;
  return [size * Math.cos(exponent * angle), size * Math.sin(exponent * angle)];
};

/** π·z/t for a ζ in the first quadrant, and dz/dζ·π/t. */
function mapped(zeta: Complex): { value: Complex; slope: Complex } {
  const square = times(zeta, zeta);
  const below = root([square[0] - 1, square[1]]);
  const product = times(zeta, below);
  const sum: Complex = [zeta[0] + below[0], zeta[1] + below[1]];
  const log: Complex = [Math.log(Math.hypot(sum[0], sum[1])), Math.atan2(sum[1], sum[0])];
  return { value: [product[0] - log[0], product[1] - log[1]], slope: [2 * below[0], 2 * below[1]] };
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
  const z: Complex = [-ahead * scale, (off - thickness / 2) * scale];
  const size = Math.hypot(z[0], z[1]);
  let zeta: Complex;
  if (size < 1.5) {
    let angle = Math.atan2(z[1], z[0]);
    if (angle < -1e-12) angle += 2 * Math.PI;
    const [re, im] = power([(3 * z[0]) / (4 * Math.SQRT2), (3 * z[1]) / (4 * Math.SQRT2)], 2 / 3, angle);
    zeta = [1 + re, im];
  } else {
    const from: Complex = [z[0], z[1] + Math.PI / 2];
    zeta = root(from);
    const log: Complex = [Math.log(2 * Math.hypot(zeta[0], zeta[1])), Math.atan2(zeta[1], zeta[0])];
    zeta = root([z[0] + 0.5 + log[0], Math.max(0, z[1] + log[1])]);
  }
  for (let step = 0; step < 30; step++) {
    zeta = [Math.max(0, zeta[0]), Math.max(0, zeta[1])];
    const { value, slope } = mapped(zeta);
    const error: Complex = [value[0] - z[0], value[1] - z[1]];
    if (Math.hypot(slope[0], slope[1]) < 1e-12) break;
    const move = over(error, slope);
    const length = Math.hypot(move[0], move[1]);
    // Near the corner the slope vanishes and a full step would overshoot.
    const damp = Math.min(1, (0.5 * Math.max(1e-3, Math.hypot(zeta[0] - 1, zeta[1]))) / Math.max(1e-300, length));
    zeta = [zeta[0] - damp * move[0], zeta[1] - damp * move[1]];
    if (length < 1e-13 * (1 + Math.hypot(zeta[0], zeta[1]))) break;
  }
  return Math.max(0, zeta[1]);
}
