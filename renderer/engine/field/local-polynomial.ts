/**
 * Weighted least-squares polynomial through scattered values round a centre: value and slope there.
 * With `count` < 3 a constant, < 6 a plane, < 8 a quadratic (dx² and dy² apart), else a quadratic with the two cubic
 * harmonics, which carry what a potential does beyond second order.
 */
export interface ScatteredValues {
  count: number;
  /** Offsets from the centre in units of the pitch, and values. */
  readonly dx: Float64Array;
  readonly dy: Float64Array;
  readonly value: Float64Array;
}

/** @returns room for `most` values. */
export function scatteredValues(most: number): ScatteredValues {
  return { count: 0, dx: new Float64Array(most), dy: new Float64Array(most), value: new Float64Array(most) };
}

const termsFor = (count: number): number => (count >= 12 ? 8 : count >= 8 ? 6 : count >= 4 ? 3 : 1);

/** @returns [value, slope per pitch along x, along y] at the centre; null without any value. */
export function fitAtCentre(values: ScatteredValues): readonly [number, number, number] | null {
  if (values.count === 0) return null;
  for (let terms = termsFor(values.count); ; terms = terms > 6 ? 6 : terms > 3 ? 3 : 1) {
    const fitted = solveTerms(values, terms);
    if (fitted !== null) return fitted;
    if (terms === 1) return null;
  }
}

function solveTerms({ count, dx, dy, value }: ScatteredValues, terms: number): readonly [number, number, number] | null {
  const matrix = new Float64Array(terms * (terms + 1));
  const row = new Float64Array(terms);
  const width = terms + 1;
  for (let k = 0; k < count; k++) {
    const x = dx[k];
    const y = dy[k];
    const square = x * x + y * y;
    const weight = 1 / (0.1 + square * square);
    row[0] = 1;
    if (terms >= 3) {
      row[1] = x;
      row[2] = y;
    }
    if (terms >= 6) {
      row[3] = x * x;
      row[4] = x * y;
      row[5] = y * y;
    }
    if (terms >= 8) {
      row[6] = x * (x * x - 3 * y * y);
      row[7] = y * (3 * x * x - y * y);
    }
    for (let a = 0; a < terms; a++) {
      for (let b = a; b < terms; b++) matrix[a * width + b] += weight * row[a] * row[b];
      matrix[a * width + terms] += weight * row[a] * value[k];
    }
  }
  for (let a = 0; a < terms; a++) for (let b = 0; b < a; b++) matrix[a * width + b] = matrix[b * width + a];
  const solution = eliminate(matrix, terms);
  return solution === null ? null : [solution[0], terms >= 3 ? solution[1] : 0, terms >= 3 ? solution[2] : 0];
}

/** Gaussian elimination with pivoting; null where the points do not determine the polynomial. */
function eliminate(matrix: Float64Array, terms: number): Float64Array | null {
  const width = terms + 1;
  let largest = 0;
  for (let a = 0; a < terms; a++) largest = Math.max(largest, matrix[a * width + a]);
  for (let a = 0; a < terms; a++) {
    let pivot = a;
    for (let b = a + 1; b < terms; b++) if (Math.abs(matrix[b * width + a]) > Math.abs(matrix[pivot * width + a])) pivot = b;
    if (Math.abs(matrix[pivot * width + a]) < 1e-7 * largest) return null;
    for (let c = a; c < width; c++) {
      const held = matrix[a * width + c];
      matrix[a * width + c] = matrix[pivot * width + c];
      matrix[pivot * width + c] = held;
    }
    for (let b = a + 1; b < terms; b++) {
      const factor = matrix[b * width + a] / matrix[a * width + a];
      for (let c = a; c < width; c++) matrix[b * width + c] -= factor * matrix[a * width + c];
    }
  }
  const solution = new Float64Array(terms);
  for (let a = terms - 1; a >= 0; a--) {
    let sum = matrix[a * width + terms];
    for (let c = a + 1; c < terms; c++) sum -= matrix[a * width + c] * solution[c];
    solution[a] = sum / matrix[a * width + a];
  }
  return solution;
}
