/**
 * One cycle on a coarse level: a symmetric 9-point network, relaxed in four colours by Gauss–Seidel.
 * Down, from zero: (even, even), (odd, odd), (odd, even), (even, odd); up in the reverse order, so that the cycle is symmetric.
 * A node relaxed last has no residual, and a node relaxed first need not be interpolated: both are left out.
 */
import { at, gatherRow, Level, plus, scatterRow } from "./memory";

/** Nodes (even, even) of row J from zero. */
@inline
function first(level: Level, J: i32): void {
  const o = <usize>J * level.row;
  const inverse = level.inverse + o;
  const source = level.source + o;
  const x = level.solution + o;
  for (let i: usize = 0; i < level.span; i += 16) v128.store(x + i, f32x4.mul(at(inverse + i), at(source + i)));
}

/** Flow into the nodes (odd, odd) of a row from their diagonal neighbours, at offset i. */
@inline
function diagonalToOddOdd(ne00: usize, nw00: usize, ne11: usize, nw11: usize, x00: usize, x00Up: usize, i: usize, sum: v128): v128 {
  sum = plus(sum, at(ne00 + i), at(x00 + i));
  sum = plus(sum, v128.load(nw00 + i, 4), v128.load(x00 + i, 4));
  sum = plus(sum, at(nw11 + i), at(x00Up + i));
  return plus(sum, at(ne11 + i), v128.load(x00Up + i, 4));
}

/** Nodes (odd, odd) of row J from zero: only the diagonal neighbours are known yet. */
function second(level: Level, J: i32): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const inverse = level.inverse + 3 * p + o;
  const source = level.source + 3 * p + o;
  const x = level.solution + 3 * p + o;
  const ne00 = level.northEast + o;
  const nw00 = level.northWest + o;
  const ne11 = level.northEast + 3 * p + o;
  const nw11 = level.northWest + 3 * p + o;
  const x00 = level.solution + o;
  const x00Up = x00 + level.row;
  const span = level.span;
  for (let i: usize = 0; i < span; i += 16)
    v128.store(x + i, f32x4.mul(at(inverse + i), diagonalToOddOdd(ne00, nw00, ne11, nw11, x00, x00Up, i, at(source + i))));
}

/** Nodes (odd, even) of row J from zero: their diagonal neighbours are not known yet. */
function third(level: Level, J: i32): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const inverse = level.inverse + p + o;
  const source = level.source + p + o;
  const x = level.solution + p + o;
  const e00 = level.east + o;
  const e10 = level.east + p + o;
  const n10 = level.north + p + o;
  const n11Down = level.north + 3 * p + o - level.row;
  const x00 = level.solution + o;
  const x11 = level.solution + 3 * p + o;
  const x11Down = x11 - level.row;
  const span = level.span;
  for (let i: usize = 0; i < span; i += 16) {
    let sum = plus(at(source + i), at(e00 + i), at(x00 + i));
    sum = plus(sum, at(e10 + i), v128.load(x00 + i, 4));
    sum = plus(sum, at(n11Down + i), at(x11Down + i));
    sum = plus(sum, at(n10 + i), at(x11 + i));
    v128.store(x + i, f32x4.mul(at(inverse + i), sum));
  }
}

/** Relaxes the nodes (even, odd) of row J. */
function relaxEvenOdd(level: Level, J: i32): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const r = level.row;
  const inverse = level.inverse + 2 * p + o;
  const source = level.source + 2 * p + o;
  const x = level.solution + 2 * p + o;
  const e11West = level.east + 3 * p + o - 4;
  const e01 = level.east + 2 * p + o;
  const n00 = level.north + o;
  const n01 = level.north + 2 * p + o;
  const ne01 = level.northEast + 2 * p + o;
  const nw01 = level.northWest + 2 * p + o;
  const nw10 = level.northWest + p + o;
  const ne10West = level.northEast + p + o - 4;
  const x00 = level.solution + o;
  const x10West = level.solution + p + o - 4;
  const x11West = level.solution + 3 * p + o - 4;
  const span = level.span;
  for (let i: usize = 0; i < span; i += 16) {
    let sum = plus(at(source + i), at(e11West + i), at(x11West + i));
    let other = f32x4.mul(at(e01 + i), v128.load(x11West + i, 4));
    sum = plus(sum, at(n00 + i), at(x00 + i));
    other = plus(other, at(n01 + i), at(x00 + r + i));
    sum = plus(sum, at(nw10 + i), v128.load(x10West + i, 4));
    other = plus(other, at(ne10West + i), at(x10West + i));
    sum = plus(sum, at(ne01 + i), v128.load(x10West + r + i, 4));
    other = plus(other, at(nw01 + i), at(x10West + r + i));
    v128.store(x + i, f32x4.mul(at(inverse + i), f32x4.add(sum, other)));
  }
}

/** Relaxes the nodes (odd, even) of row J. */
function relaxOddEven(level: Level, J: i32): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const r = level.row;
  const inverse = level.inverse + p + o;
  const source = level.source + p + o;
  const x = level.solution + p + o;
  const e00 = level.east + o;
  const e10 = level.east + p + o;
  const n10 = level.north + p + o;
  const n11Down = level.north + 3 * p + o - r;
  const nw10 = level.northWest + p + o;
  const ne10 = level.northEast + p + o;
  const ne01Down = level.northEast + 2 * p + o - r;
  const nw01Down = level.northWest + 2 * p + o - r;
  const x00 = level.solution + o;
  const x01Down = level.solution + 2 * p + o - r;
  const x11Down = level.solution + 3 * p + o - r;
  const span = level.span;
  for (let i: usize = 0; i < span; i += 16) {
    let sum = plus(at(source + i), at(e00 + i), at(x00 + i));
    let other = f32x4.mul(at(e10 + i), v128.load(x00 + i, 4));
    sum = plus(sum, at(n11Down + i), at(x11Down + i));
    other = plus(other, at(n10 + i), at(x11Down + r + i));
    sum = plus(sum, at(nw10 + i), at(x01Down + r + i));
    other = plus(other, at(ne10 + i), v128.load(x01Down + r + i, 4));
    sum = plus(sum, at(ne01Down + i), at(x01Down + i));
    other = plus(other, v128.load(nw01Down + i, 4), v128.load(x01Down + i, 4));
    v128.store(x + i, f32x4.mul(at(inverse + i), f32x4.add(sum, other)));
  }
}

/** Relaxes the nodes (odd, odd) of row J. */
function relaxOddOdd(level: Level, J: i32): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const r = level.row;
  const inverse = level.inverse + 3 * p + o;
  const source = level.source + 3 * p + o;
  const x = level.solution + 3 * p + o;
  const e01 = level.east + 2 * p + o;
  const e11 = level.east + 3 * p + o;
  const n10 = level.north + p + o;
  const n11 = level.north + 3 * p + o;
  const ne00 = level.northEast + o;
  const nw00 = level.northWest + o;
  const ne11 = level.northEast + 3 * p + o;
  const nw11 = level.northWest + 3 * p + o;
  const x00 = level.solution + o;
  const x01 = level.solution + 2 * p + o;
  const x10 = level.solution + p + o;
  const span = level.span;
  for (let i: usize = 0; i < span; i += 16) {
    let sum = plus(at(source + i), at(e01 + i), at(x01 + i));
    let other = f32x4.mul(at(e11 + i), v128.load(x01 + i, 4));
    sum = plus(sum, at(n10 + i), at(x10 + i));
    other = plus(other, at(n11 + i), at(x10 + r + i));
    sum = diagonalToOddOdd(ne00, nw00, ne11, nw11, x00, x00 + r, i, sum);
    v128.store(x + i, f32x4.mul(at(inverse + i), f32x4.add(sum, other)));
  }
}

/** Nodes (even, even) of row J: what flows in from all neighbours, with the source and relaxed, or (`toResidual`) alone. */
@inline
function evenEven(level: Level, J: i32, toResidual: bool): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const r = level.row;
  const inverse = level.inverse + o;
  const source = level.source + o;
  const into = (toResidual ? level.residual : level.solution) + o;
  const e10West = level.east + p + o - 4;
  const e00 = level.east + o;
  const n00 = level.north + o;
  const n01Down = level.north + 2 * p + o - r;
  const ne00 = level.northEast + o;
  const nw00 = level.northWest + o;
  const ne11Down = level.northEast + 3 * p + o - r - 4;
  const nw11Down = level.northWest + 3 * p + o - r;
  const x10West = level.solution + p + o - 4;
  const x01Down = level.solution + 2 * p + o - r;
  const x11West = level.solution + 3 * p + o - r - 4;
  const span = level.span;
  for (let i: usize = 0; i < span; i += 16) {
    let sum = f32x4.mul(at(e10West + i), at(x10West + i));
    let other = f32x4.mul(at(e00 + i), v128.load(x10West + i, 4));
    sum = plus(sum, at(n01Down + i), at(x01Down + i));
    other = plus(other, at(n00 + i), at(x01Down + r + i));
    sum = plus(sum, at(ne11Down + i), at(x11West + i));
    other = plus(other, at(nw11Down + i), v128.load(x11West + i, 4));
    sum = plus(sum, at(nw00 + i), at(x11West + r + i));
    other = plus(other, at(ne00 + i), v128.load(x11West + r + i, 4));
    sum = f32x4.add(sum, other);
    v128.store(into + i, toResidual ? sum : f32x4.mul(at(inverse + i), f32x4.add(at(source + i), sum)));
  }
}

function relaxEvenEven(level: Level, J: i32): void {
  evenEven(level, J, false);
}

function residualEvenEven(level: Level, J: i32): void {
  evenEven(level, J, true);
}

/** What the nodes (even, odd), relaxed last, left to flow into the nodes (odd, even) of row J. */
function residualOddEven(level: Level, J: i32): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const r = level.row;
  const into = level.residual + p + o;
  const nw10 = level.northWest + p + o;
  const ne10 = level.northEast + p + o;
  const ne01Down = level.northEast + 2 * p + o - r;
  const nw01Down = level.northWest + 2 * p + o - r;
  const x01Down = level.solution + 2 * p + o - r;
  const span = level.span;
  for (let i: usize = 0; i < span; i += 16) {
    let sum = f32x4.mul(at(nw10 + i), at(x01Down + r + i));
    sum = plus(sum, at(ne10 + i), v128.load(x01Down + r + i, 4));
    sum = plus(sum, at(ne01Down + i), at(x01Down + i));
    v128.store(into + i, plus(sum, v128.load(nw01Down + i, 4), v128.load(x01Down + i, 4)));
  }
}

/** What the nodes relaxed after them left to flow into the nodes (odd, odd) of row J. */
function residualOddOdd(level: Level, J: i32): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const r = level.row;
  const into = level.residual + 2 * p + o;
  const e01 = level.east + 2 * p + o;
  const e11 = level.east + 3 * p + o;
  const n10 = level.north + p + o;
  const n11 = level.north + 3 * p + o;
  const x01 = level.solution + 2 * p + o;
  const x10 = level.solution + p + o;
  const span = level.span;
  for (let i: usize = 0; i < span; i += 16) {
    let sum = f32x4.mul(at(e01 + i), at(x01 + i));
    sum = plus(sum, at(e11 + i), v128.load(x01 + i, 4));
    sum = plus(sum, at(n10 + i), at(x10 + i));
    v128.store(into + i, plus(sum, at(n11 + i), at(x10 + r + i)));
  }
}

/** Restricts the residuals round row J onto the coarser level (transposed interpolation). */
function restrictRow(level: Level, coarse: Level, J: i32): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const r = level.row;
  const into = coarse.source + <usize>(2 * (J & 1)) * coarse.plane + <usize>(J >> 1) * coarse.row;
  const odd = into + coarse.plane;
  const r00 = level.residual + o;
  const r10West = level.residual + p + o - 4;
  const r11West = level.residual + 2 * p + o - 4;
  const rowEast = level.rowEast + o - 4;
  const rowWest = level.rowWest + o;
  const northEast = level.shareNorthEast + o - r - 4;
  const northWest = level.shareNorthWest + o - r;
  const southEast = level.southEast + o - 4;
  const southWest = level.southWest + o;
  const span = level.span;
  for (let i: usize = 0; i < span; i += 16) {
    let sum = plus(at(r00 + i), at(rowEast + i), at(r10West + i));
    let other = f32x4.mul(at(rowWest + i), v128.load(r10West + i, 4));
    sum = plus(sum, at(northEast + i), at(r11West - r + i));
    other = plus(other, at(northWest + i), v128.load(r11West - r + i, 4));
    sum = plus(sum, at(southEast + i), at(r11West + i));
    other = plus(other, at(southWest + i), v128.load(r11West + i, 4));
    scatterRow(into, odd, i, f32x4.add(sum, other));
  }
}

/** Down: relaxes once from zero and restricts what is left. */
export function ninePointDown(level: Level, coarse: Level): void {
  const height = level.height;
  // Each colour follows the one that it needs by a row, so that all of it stays in the nearest cache.
  first(level, 0);
  for (let J = 0; J <= height; J++) {
    if (J + 1 < height) first(level, J + 1);
    if (J < height) {
      second(level, J);
      third(level, J);
    }
    if (J >= 1) {
      relaxEvenOdd(level, J - 1);
      residualOddEven(level, J - 1);
      residualEvenEven(level, J - 1);
      residualOddOdd(level, J - 1);
      restrictRow(level, coarse, J - 1);
    }
  }
}

/** Adds the coarser level's solution, interpolated, to the nodes of row J that are not relaxed first anyway. */
function prolongRow(level: Level, coarse: Level, J: i32): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const r = level.row;
  const even = coarse.solution + <usize>(2 * (J & 1)) * coarse.plane + <usize>(J >> 1) * coarse.row;
  const odd = even + coarse.plane;
  const evenUp = coarse.solution + <usize>(2 * ((J + 1) & 1)) * coarse.plane + <usize>((J + 1) >> 1) * coarse.row;
  const oddUp = evenUp + coarse.plane;
  const x00 = level.solution + o;
  const x10 = x00 + p;
  const x11 = x00 + 3 * p;
  const rowWest = level.rowWest + o;
  const rowEast = level.rowEast + o;
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
    const east = v128.shuffle<f32>(here, next, 1, 2, 3, 4);
    const eastUp = v128.shuffle<f32>(up, nextUp, 1, 2, 3, 4);
    v128.store(x00 + i, f32x4.add(at(x00 + i), here));
    v128.store(x10 + i, plus(plus(at(x10 + i), at(rowWest + i), here), at(rowEast + i), east));
    let sum = plus(plus(at(x11 + i), at(southWest + i), here), at(southEast + i), east);
    sum = plus(plus(sum, at(northWest + i), up), at(northEast + i), eastUp);
    v128.store(x11 + i, sum);
    here = next;
    up = nextUp;
  }
}

export function ninePointProlong(level: Level, coarse: Level): void {
  for (let J = 0; J < level.height; J++) prolongRow(level, coarse, J);
}

/** Up: relaxes once more, in the reverse order. */
export function ninePointUp(level: Level): void {
  const height = level.height;
  for (let J = 0; J <= height; J++) {
    if (J < height) {
      relaxEvenOdd(level, J);
      relaxOddEven(level, J);
    }
    if (J >= 1) {
      relaxOddOdd(level, J - 1);
      relaxEvenEven(level, J - 1);
    }
  }
}
