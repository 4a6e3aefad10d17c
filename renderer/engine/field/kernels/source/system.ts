/**
 * The finest grid in double precision, for the conjugate gradients. It is a 5-point network, so that its nodes fall into two
 * colours: red (even, even) and (odd, odd), black the others. Black potentials follow from the red ones; the gradients run on
 * the red ones alone (reduced system, half the unknowns), with one border column for each floating conductor.
 */
import { at, Level, PADDING, take, takePlanes } from "./memory";

export let east: usize = 0;
export let north: usize = 0;
/** Centres of the red planes (even, even) and (odd, odd). */
export let centre: usize = 0;
/** 1 over the centre of the black planes (odd, even) and (even, odd). */
export let blackInverse: usize = 0;
/** Vectors: two red planes each. */
export let solution: usize = 0;
export let residual: usize = 0;
export let direction: usize = 0;
export let image: usize = 0;
/** Two rows each of the two black planes, on their way. */
export let blackRows: usize = 0;
/** Bytes of a plane, of a row, and of a row's computed part. */
export let plane: usize = 0;
export let row: usize = 0;
let span: usize = 0;

export function takeSystem(level: Level): void {
  plane = 2 * level.plane;
  row = 2 * level.row;
  span = 2 * level.span;
  east = takePlanes(level, 4, 8);
  north = takePlanes(level, 4, 8);
  centre = takePlanes(level, 2, 8);
  blackInverse = takePlanes(level, 2, 8);
  solution = takePlanes(level, 2, 8);
  residual = takePlanes(level, 2, 8);
  direction = takePlanes(level, 2, 8);
  image = takePlanes(level, 2, 8);
  blackRows = take(5 * row) + 8 * PADDING;
}

@inline
function plus2(sum: v128, a: v128, b: v128): v128 {
  return f64x2.add(sum, f64x2.mul(a, b));
}

/** The start of the memory of two red planes, and its length: padding included, it may be gone through in one go. */
@inline
export function wholeOf(vector: usize): usize {
  return vector - row - 8 * PADDING;
}

@inline
export function wholeLength(): usize {
  return 2 * plane;
}

/** Black (odd, even) nodes of row J: from the red vector into `into`. */
export function blackOddEven(J: i32, red: usize, into: usize): void {
  const o = <usize>J * row;
  const inverse = blackInverse + o;
  const e00 = east + o;
  const e10 = east + plane + o;
  const n10 = north + plane + o;
  const n11Down = north + 3 * plane + o - row;
  const x00 = red + o;
  const x11 = red + plane + o;
  const x11Down = x11 - row;
  const end = span;
  for (let i: usize = 0; i < end; i += 16) {
    const sum = plus2(f64x2.mul(at(e00 + i), at(x00 + i)), at(e10 + i), v128.load(x00 + i, 8));
    const other = plus2(f64x2.mul(at(n11Down + i), at(x11Down + i)), at(n10 + i), at(x11 + i));
    v128.store(into + i, f64x2.mul(at(inverse + i), f64x2.add(sum, other)));
  }
}

/** Black (even, odd) nodes of row J. */
export function blackEvenOdd(J: i32, red: usize, into: usize): void {
  const o = <usize>J * row;
  const inverse = blackInverse + plane + o;
  const e11West = east + 3 * plane + o - 8;
  const e01 = east + 2 * plane + o;
  const n00 = north + o;
  const n01 = north + 2 * plane + o;
  const x11West = red + plane + o - 8;
  const x00 = red + o;
  const x00Up = x00 + row;
  const end = span;
  for (let i: usize = 0; i < end; i += 16) {
    const sum = plus2(f64x2.mul(at(e11West + i), at(x11West + i)), at(e01 + i), v128.load(x11West + i, 8));
    const other = plus2(f64x2.mul(at(n00 + i), at(x00 + i)), at(n01 + i), at(x00Up + i));
    v128.store(into + i, f64x2.mul(at(inverse + i), f64x2.add(sum, other)));
  }
}

/** Red nodes (even, even) of row J of A·red, and their share of the product with `red`. */
@inline
function imageEvenEven(J: i32, y10: usize, y01: usize, y01Down: usize, sum: v128): v128 {
  const o = <usize>J * row;
  const c = centre + o;
  const x = direction + o;
  const into = image + o;
  const e10West = east + plane + o - 8;
  const e00 = east + o;
  const n00 = north + o;
  const n01Down = north + 2 * plane + o - row;
  const y10West = y10 - 8;
  const end = span;
  for (let i: usize = 0; i < end; i += 16) {
    const value = at(x + i);
    let flow = plus2(f64x2.mul(at(e10West + i), at(y10West + i)), at(e00 + i), v128.load(y10West + i, 8));
    const other = plus2(f64x2.mul(at(n00 + i), at(y01 + i)), at(n01Down + i), at(y01Down + i));
    flow = f64x2.sub(f64x2.mul(at(c + i), value), f64x2.add(flow, other));
    v128.store(into + i, flow);
    sum = plus2(sum, flow, value);
  }
  return sum;
}

/** The same of the red nodes (odd, odd). */
@inline
function imageOddOdd(J: i32, y10: usize, y10Up: usize, y01: usize, sum: v128): v128 {
  const o = <usize>J * row;
  const c = centre + plane + o;
  const x = direction + plane + o;
  const into = image + plane + o;
  const e01 = east + 2 * plane + o;
  const e11 = east + 3 * plane + o;
  const n10 = north + plane + o;
  const n11 = north + 3 * plane + o;
  const end = span;
  for (let i: usize = 0; i < end; i += 16) {
    const value = at(x + i);
    let flow = plus2(f64x2.mul(at(e01 + i), at(y01 + i)), at(e11 + i), v128.load(y01 + i, 8));
    const other = plus2(f64x2.mul(at(n10 + i), at(y10 + i)), at(n11 + i), at(y10Up + i));
    flow = f64x2.sub(f64x2.mul(at(c + i), value), f64x2.add(flow, other));
    v128.store(into + i, flow);
    sum = plus2(sum, flow, value);
  }
  return sum;
}

/** The next direction of the gradients in row J: z + ratio·direction. */
@inline
function directionRow(J: i32, z: usize, zPlane: usize, ratio: v128): void {
  for (let k: usize = 0; k < 2; k++) {
    const from = z + k * zPlane + <usize>J * (row >> 1);
    const p = direction + k * plane + <usize>J * row;
    const end = span;
    for (let i: usize = 0; i < end; i += 32) {
      const four = at(from + (i >> 1));
      const low = f64x2.promote_low_f32x4(four);
      const high = f64x2.promote_low_f32x4(v128.shuffle<f32>(four, four, 2, 3, 2, 3));
      v128.store(p + i, plus2(low, ratio, at(p + i)));
      v128.store(p + i, plus2(high, ratio, v128.load(p + i, 16)), 16);
    }
  }
}

/**
 * direction = z + ratio·direction (when `turns`) and image = A·direction on the red nodes, floating conductors apart.
 * @param z two red planes of single precision, `zPlane` bytes apart.
 * @returns direction · image.
 */
export function multiply(level: Level, turns: bool, z: usize, zPlane: usize, ratio: f64): f64 {
  const height = level.height;
  const factor = f64x2.splat(ratio);
  let sum = f64x2.splat(0);
  if (turns) directionRow(0, z, zPlane, factor);
  blackOddEven(0, direction, blackRows);
  memory.fill(blackRows + 3 * row, 0, span);
  for (let J = 0; J < height; J++) {
    const y10 = blackRows + <usize>(J & 1) * row;
    const y10Up = blackRows + <usize>((J + 1) & 1) * row;
    const y01 = blackRows + <usize>(2 + (J & 1)) * row;
    const y01Down = blackRows + <usize>(2 + ((J + 1) & 1)) * row;
    if (J + 1 < height) {
      if (turns) directionRow(J + 1, z, zPlane, factor);
      blackOddEven(J + 1, direction, y10Up);
    } else memory.fill(y10Up, 0, span);
    blackEvenOdd(J, direction, y01);
    sum = imageEvenEven(J, y10, y01, y01Down, sum);
    sum = imageOddOdd(J, y10, y10Up, y01, sum);
  }
  return f64x2.extract_lane(sum, 0) + f64x2.extract_lane(sum, 1);
}

/** solution += step·direction, residual −= step·image, and the residual in single precision, in row J. */
@inline
export function advanceRow(J: i32, step: v128, into: usize, intoPlane: usize): void {
  for (let k: usize = 0; k < 2; k++) {
    const o = k * plane + <usize>J * row;
    const x = solution + o;
    const p = direction + o;
    const r = residual + o;
    const q = image + o;
    const s = into + k * intoPlane + <usize>J * (row >> 1);
    const end = span;
    for (let i: usize = 0; i < end; i += 32) {
      v128.store(x + i, plus2(at(x + i), step, at(p + i)));
      v128.store(x + i, plus2(v128.load(x + i, 16), step, v128.load(p + i, 16)), 16);
      const low = f64x2.sub(at(r + i), f64x2.mul(step, at(q + i)));
      const high = f64x2.sub(v128.load(r + i, 16), f64x2.mul(step, v128.load(q + i, 16)));
      v128.store(r + i, low);
      v128.store(r + i, high, 16);
      v128.store(s + (i >> 1), v128.shuffle<f32>(f32x4.demote_f64x2_zero(low), f32x4.demote_f64x2_zero(high), 0, 1, 4, 5));
    }
  }
}

/** The residual of row J in single precision. */
@inline
export function roundRow(J: i32, into: usize, intoPlane: usize): void {
  for (let k: usize = 0; k < 2; k++) {
    const r = residual + k * plane + <usize>J * row;
    const s = into + k * intoPlane + <usize>J * (row >> 1);
    const end = span;
    for (let i: usize = 0; i < end; i += 32) {
      const low = f32x4.demote_f64x2_zero(at(r + i));
      const high = f32x4.demote_f64x2_zero(v128.load(r + i, 16));
      v128.store(s + (i >> 1), v128.shuffle<f32>(low, high, 0, 1, 4, 5));
    }
  }
}
