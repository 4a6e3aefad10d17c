/**
 * One cycle on the finest level, a 5-point network, in single precision. Down: red nodes from zero, black nodes, and the
 * residual of the red ones (the black ones have none); up: the coarse correction of the red nodes, black nodes, red nodes.
 * Black nodes have no source: they are eliminated from the system (system.ts), so nothing of them needs to be kept.
 */
import { at, gatherRow, Level, PADDING, plus, scatterRow, take, takePlanes } from "./memory";
import { advanceRow, roundRow } from "./system";

/** Red planes (even, even) and (odd, odd). */
export let source: usize = 0;
export let solution: usize = 0;
/** Residual of the nodes (odd, odd); of the nodes (even, even) one row. */
export let residual: usize = 0;
let residualRow: usize = 0;
/** Two rows each of the two black planes. */
let black: usize = 0;

export function takeFivePoint(level: Level): void {
  level.east = takePlanes(level, 4, 4);
  level.north = takePlanes(level, 4, 4);
  level.inverse = takePlanes(level, 4, 4);
  // What ties the nodes to conductors is needed while the hierarchy is built, the red vectors afterwards.
  level.excess = takePlanes(level, 4, 4);
  source = level.excess;
  solution = level.excess + 2 * level.plane;
  residual = takePlanes(level, 1, 4);
  residualRow = take(level.row) + 4 * PADDING;
  black = take(5 * level.row) + 4 * PADDING;
}

/** Red nodes of row J from zero. */
@inline
function redFromZero(level: Level, J: i32): void {
  for (let k: usize = 0; k < 2; k++) {
    const o = <usize>J * level.row;
    const inverse = level.inverse + 3 * k * level.plane + o;
    const s = source + k * level.plane + o;
    const x = solution + k * level.plane + o;
    const span = level.span;
    for (let i: usize = 0; i < span; i += 16) v128.store(x + i, f32x4.mul(at(inverse + i), at(s + i)));
  }
}

function blackOddEven(level: Level, J: i32, into: usize): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const inverse = level.inverse + p + o;
  const e00 = level.east + o;
  const e10 = level.east + p + o;
  const n10 = level.north + p + o;
  const n11Down = level.north + 3 * p + o - level.row;
  const x00 = solution + o;
  const x11 = solution + p + o;
  const x11Down = x11 - level.row;
  const span = level.span;
  for (let i: usize = 0; i < span; i += 16) {
    const sum = plus(f32x4.mul(at(e00 + i), at(x00 + i)), at(e10 + i), v128.load(x00 + i, 4));
    const other = plus(f32x4.mul(at(n11Down + i), at(x11Down + i)), at(n10 + i), at(x11 + i));
    v128.store(into + i, f32x4.mul(at(inverse + i), f32x4.add(sum, other)));
  }
}

function blackEvenOdd(level: Level, J: i32, into: usize): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const inverse = level.inverse + 2 * p + o;
  const e11West = level.east + 3 * p + o - 4;
  const e01 = level.east + 2 * p + o;
  const n00 = level.north + o;
  const n01 = level.north + 2 * p + o;
  const x11West = solution + p + o - 4;
  const x00 = solution + o;
  const x00Up = x00 + level.row;
  const span = level.span;
  for (let i: usize = 0; i < span; i += 16) {
    const sum = plus(f32x4.mul(at(e11West + i), at(x11West + i)), at(e01 + i), v128.load(x11West + i, 4));
    const other = plus(f32x4.mul(at(n00 + i), at(x00 + i)), at(n01 + i), at(x00Up + i));
    v128.store(into + i, f32x4.mul(at(inverse + i), f32x4.add(sum, other)));
  }
}

/** What flows into the nodes (even, even) at offset i from their black neighbours. */
@inline
function flowEvenEven(e10West: usize, e00: usize, n00: usize, n01Down: usize, y10West: usize, y01: usize, y01Down: usize, i: usize): v128 {
  const sum = plus(f32x4.mul(at(e10West + i), at(y10West + i)), at(e00 + i), v128.load(y10West + i, 4));
  return f32x4.add(sum, plus(f32x4.mul(at(n00 + i), at(y01 + i)), at(n01Down + i), at(y01Down + i)));
}

/** What flows into the nodes (odd, odd) at offset i from their black neighbours. */
@inline
function flowOddOdd(e01: usize, e11: usize, n10: usize, n11: usize, y10: usize, y10Up: usize, y01: usize, i: usize): v128 {
  const sum = plus(f32x4.mul(at(e01 + i), at(y01 + i)), at(e11 + i), v128.load(y01 + i, 4));
  return f32x4.add(sum, plus(f32x4.mul(at(n10 + i), at(y10 + i)), at(n11 + i), at(y10Up + i)));
}

/** Residual of the nodes (odd, odd) of row J, then the restriction of all residuals round row J. */
function residualAndRestrict(level: Level, coarse: Level, J: i32, y10: usize, y10Up: usize, y01: usize, y01Down: usize): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const r = level.row;
  const span = level.span;
  const e01 = level.east + 2 * p + o;
  const e11 = level.east + 3 * p + o;
  const n10 = level.north + p + o;
  const n11 = level.north + 3 * p + o;
  const r11 = residual + o;
  for (let i: usize = 0; i < span; i += 16) v128.store(r11 + i, flowOddOdd(e01, e11, n10, n11, y10, y10Up, y01, i));
  const e10West = level.east + p + o - 4;
  const e00 = level.east + o;
  const n00 = level.north + o;
  const n01Down = level.north + 2 * p + o - r;
  const even = coarse.source + <usize>(2 * (J & 1)) * coarse.plane + <usize>(J >> 1) * coarse.row;
  const odd = even + coarse.plane;
  const northEast = level.shareNorthEast + o - r - 4;
  const northWest = level.shareNorthWest + o - r;
  const southEast = level.southEast + o - 4;
  const southWest = level.southWest + o;
  const r11West = r11 - 4;
  const r11Down = r11West - r;
  for (let i: usize = 0; i < span; i += 16) {
    let sum = flowEvenEven(e10West, e00, n00, n01Down, y10 - 4, y01, y01Down, i);
    sum = plus(sum, at(northEast + i), at(r11Down + i));
    let other = f32x4.mul(at(northWest + i), v128.load(r11Down + i, 4));
    sum = plus(sum, at(southEast + i), at(r11West + i));
    other = plus(other, at(southWest + i), v128.load(r11West + i, 4));
    scatterRow(even, odd, i, f32x4.add(sum, other));
  }
}

/** Down, after the gradients' step has been taken (when `advances`; else from the residual as it is). */
export function fivePointDown(level: Level, coarse: Level, advances: bool, step: f64): void {
  const height = level.height;
  const steps = f64x2.splat(step);
  const r = level.row;
  if (advances) advanceRow(0, steps, source, level.plane);
  else roundRow(0, source, level.plane);
  redFromZero(level, 0);
  blackOddEven(level, 0, black);
  memory.fill(black + 3 * r, 0, level.span);
  for (let J = 0; J < height; J++) {
    const y10 = black + <usize>(J & 1) * r;
    const y10Up = black + <usize>((J + 1) & 1) * r;
    const y01 = black + <usize>(2 + (J & 1)) * r;
    const y01Down = black + <usize>(2 + ((J + 1) & 1)) * r;
    if (J + 1 < height) {
      if (advances) advanceRow(J + 1, steps, source, level.plane);
      else roundRow(J + 1, source, level.plane);
      redFromZero(level, J + 1);
      blackOddEven(level, J + 1, y10Up);
    } else memory.fill(y10Up, 0, level.span);
    blackEvenOdd(level, J, y01);
    residualAndRestrict(level, coarse, J, y10, y10Up, y01, y01Down);
  }
}

/** Adds the coarser level's solution, interpolated, to the red nodes. */
export function fivePointProlong(level: Level, coarse: Level): void {
  for (let J = 0; J < level.height; J++) {
    const o = <usize>J * level.row;
    const even = coarse.solution + <usize>(2 * (J & 1)) * coarse.plane + <usize>(J >> 1) * coarse.row;
    const odd = even + coarse.plane;
    const evenUp = coarse.solution + <usize>(2 * ((J + 1) & 1)) * coarse.plane + <usize>((J + 1) >> 1) * coarse.row;
    const oddUp = evenUp + coarse.plane;
    const x00 = solution + o;
    const x11 = x00 + level.plane;
    const southWest = level.southWest + o;
    const southEast = level.southEast + o;
    const northWest = level.shareNorthWest + o;
    const northEast = level.shareNorthEast + o;
    const span = level.span;
    let here = gatherRow(even, odd, 0);
    let up = gatherRow(evenUp, oddUp, 0);
    for (let i: usize = 0; i < span; i += 16) {
      const next = gatherRow(even, odd, i + 16);
      const nextUp = gatherRow(evenUp, oddUp, i + 16);
      v128.store(x00 + i, f32x4.add(at(x00 + i), here));
      let sum = plus(plus(at(x11 + i), at(southWest + i), here), at(southEast + i), v128.shuffle<f32>(here, next, 1, 2, 3, 4));
      sum = plus(plus(sum, at(northWest + i), up), at(northEast + i), v128.shuffle<f32>(up, nextUp, 1, 2, 3, 4));
      v128.store(x11 + i, sum);
      here = next;
      up = nextUp;
    }
  }
}

/** Adds the products of four pairs to a sum in double precision. */
@inline
function dotInto(sum: v128, a: v128, b: v128): v128 {
  const product = f32x4.mul(a, b);
  const high = v128.shuffle<f32>(product, product, 2, 3, 2, 3);
  return f64x2.add(sum, f64x2.add(f64x2.promote_low_f32x4(product), f64x2.promote_low_f32x4(high)));
}

/** Relaxes the red nodes of row J; @returns the sum with their products of source and solution. */
@inline
function relaxRed(level: Level, J: i32, y10: usize, y10Up: usize, y01: usize, y01Down: usize, sum: v128): v128 {
  const o = <usize>J * level.row;
  const p = level.plane;
  const span = level.span;
  const e10West = level.east + p + o - 4;
  const e00 = level.east + o;
  const n00 = level.north + o;
  const n01Down = level.north + 2 * p + o - level.row;
  const inverse00 = level.inverse + o;
  const s00 = source + o;
  const x00 = solution + o;
  for (let i: usize = 0; i < span; i += 16) {
    const s = at(s00 + i);
    const flow = flowEvenEven(e10West, e00, n00, n01Down, y10 - 4, y01, y01Down, i);
    const value = f32x4.mul(at(inverse00 + i), f32x4.add(s, flow));
    v128.store(x00 + i, value);
    sum = dotInto(sum, s, value);
  }
  const e01 = level.east + 2 * p + o;
  const e11 = level.east + 3 * p + o;
  const n10 = level.north + p + o;
  const n11 = level.north + 3 * p + o;
  const inverse11 = level.inverse + 3 * p + o;
  const s11 = source + p + o;
  const x11 = solution + p + o;
  for (let i: usize = 0; i < span; i += 16) {
    const s = at(s11 + i);
    const flow = flowOddOdd(e01, e11, n10, n11, y10, y10Up, y01, i);
    const value = f32x4.mul(at(inverse11 + i), f32x4.add(s, flow));
    v128.store(x11 + i, value);
    sum = dotInto(sum, s, value);
  }
  return sum;
}

/** Up: relaxes black, then red. @returns source · solution over the red nodes. */
export function fivePointUp(level: Level): f64 {
  const height = level.height;
  const r = level.row;
  let sum = f64x2.splat(0);
  blackOddEven(level, 0, black);
  memory.fill(black + 3 * r, 0, level.span);
  for (let J = 0; J < height; J++) {
    const y10 = black + <usize>(J & 1) * r;
    const y10Up = black + <usize>((J + 1) & 1) * r;
    const y01 = black + <usize>(2 + (J & 1)) * r;
    const y01Down = black + <usize>(2 + ((J + 1) & 1)) * r;
    if (J + 1 < height) blackOddEven(level, J + 1, y10Up);
    else memory.fill(y10Up, 0, level.span);
    blackEvenOdd(level, J, y01);
    sum = relaxRed(level, J, y10, y10Up, y01, y01Down, sum);
  }
  return f64x2.extract_lane(sum, 0) + f64x2.extract_lane(sum, 1);
}
