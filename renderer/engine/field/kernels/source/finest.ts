/** Brings the network to the finest level: sorts its links into planes, adds up centres, and carries potentials in and out. */
import { at, Level } from "./memory";
import { blackEvenOdd, blackInverse, blackOddEven, blackRows, centre, east, north, plane, row, solution } from "./system";

/** Sorts one row of the network's links into the planes of its columns' parity, in double and single precision. */
function splitRow(from: usize, columns: i32, even: usize, odd: usize, even4: usize, odd4: usize): void {
  const whole = <usize>(columns >> 3) << 5;
  for (let i: usize = 0; i < whole; i += 32) {
    const a = v128.load(from + 2 * i);
    const b = v128.load(from + 2 * i, 16);
    const c = v128.load(from + 2 * i, 32);
    const d = v128.load(from + 2 * i, 48);
    const evenLow = v128.shuffle<f64>(a, b, 0, 2);
    const evenHigh = v128.shuffle<f64>(c, d, 0, 2);
    const oddLow = v128.shuffle<f64>(a, b, 1, 3);
    const oddHigh = v128.shuffle<f64>(c, d, 1, 3);
    v128.store(even + i, evenLow);
    v128.store(even + i, evenHigh, 16);
    v128.store(odd + i, oddLow);
    v128.store(odd + i, oddHigh, 16);
    const half = i >> 1;
    v128.store(even4 + half, v128.shuffle<f32>(f32x4.demote_f64x2_zero(evenLow), f32x4.demote_f64x2_zero(evenHigh), 0, 1, 4, 5));
    v128.store(odd4 + half, v128.shuffle<f32>(f32x4.demote_f64x2_zero(oddLow), f32x4.demote_f64x2_zero(oddHigh), 0, 1, 4, 5));
  }
  for (let column = (columns >> 3) << 3; column < columns; column++) {
    const value = load<f64>(from + (<usize>column << 3));
    const place = <usize>(column >> 1);
    store<f64>((column & 1 ? odd : even) + (place << 3), value);
    store<f32>((column & 1 ? odd4 : even4) + (place << 2), <f32>value);
  }
}

/** Sorts the links of the network (row-major, `columns` × `rows`) into planes. */
export function splitLinks(level: Level, eastIn: usize, northIn: usize): void {
  for (let y = 0; y < level.rows; y++) {
    const parity = <usize>(2 * (y & 1));
    const o = <usize>(y >> 1) * row;
    const o4 = <usize>(y >> 1) * level.row;
    const from = <usize>(y * level.columns) << 3;
    const even = parity * plane + o;
    const even4 = parity * level.plane + o4;
    splitRow(eastIn + from, level.columns, east + even, east + even + plane, level.east + even4, level.east + even4 + level.plane);
    splitRow(northIn + from, level.columns, north + even, north + even + plane, level.north + even4, level.north + even4 + level.plane);
  }
}

/** 1 / value where it is above zero, else 0. */
@inline
function inverseOf(value: v128): v128 {
  const linked = f64x2.gt(value, f64x2.splat(0));
  const one = f64x2.splat(1);
  return v128.and(f64x2.div(one, v128.bitselect(value, one, linked)), linked);
}

/** Centres of plane k from the links alone; ties to conductors come afterwards by `tieNode`. */
@inline
function addUpPlane(level: Level, k: usize, into: usize, inverts: bool): void {
  const odd = k & 1;
  const upper = k >> 1;
  const west = (k ^ 1) * plane - (odd ? 0 : 8);
  const down = (k ^ 2) * plane - (upper ? 0 : row);
  for (let J = 0; J < level.height; J++) {
    const o = <usize>J * row;
    const o4 = k * level.plane + <usize>J * level.row;
    for (let i: usize = 0; i < 2 * level.span; i += 32) {
      const n = o + i;
      const low = f64x2.add(
        f64x2.add(at(east + k * plane + n), at(east + west + n)),
        f64x2.add(at(north + k * plane + n), at(north + down + n)),
      );
      const high = f64x2.add(
        f64x2.add(v128.load(east + k * plane + n, 16), v128.load(east + west + n, 16)),
        f64x2.add(v128.load(north + k * plane + n, 16), v128.load(north + down + n, 16)),
      );
      const lowInverse = inverseOf(low);
      const highInverse = inverseOf(high);
      v128.store(into + n, inverts ? lowInverse : low);
      v128.store(into + n, inverts ? highInverse : high, 16);
      const four = v128.shuffle<f32>(f32x4.demote_f64x2_zero(lowInverse), f32x4.demote_f64x2_zero(highInverse), 0, 1, 4, 5);
      v128.store(level.inverse + o4 + (i >> 1), four);
      v128.store(level.excess + o4 + (i >> 1), f32x4.splat(0));
    }
  }
}

export function addUpCentres(level: Level): void {
  addUpPlane(level, 0, centre, false);
  addUpPlane(level, 1, blackInverse, true);
  addUpPlane(level, 2, blackInverse + plane, true);
  addUpPlane(level, 3, centre + plane, false);
}

/** Whether a node is black: its column and row are of different parity. */
@inline
export function isBlack(column: i32, y: i32): bool {
  return ((column ^ y) & 1) !== 0;
}

/** Bytes from a vector's first plane to a node, for red nodes in red vectors and for black nodes in the black inverse. */
@inline
export function placeInColour(column: i32, y: i32): usize {
  const second = isBlack(column, y) ? y & 1 : column & 1;
  return <usize>second * plane + <usize>(y >> 1) * row + (<usize>(column >> 1) << 3);
}

/** Bytes from the first of four planes of double precision to a node. */
@inline
export function placeInFour(column: i32, y: i32): usize {
  return <usize>(2 * (y & 1) + (column & 1)) * plane + <usize>(y >> 1) * row + (<usize>(column >> 1) << 3);
}

/** Ties a node to a conductor. */
export function tieToConductor(level: Level, column: i32, y: i32, conductance: f64): void {
  const o = placeInColour(column, y);
  let whole: f64;
  if (isBlack(column, y)) {
    const before = load<f64>(blackInverse + o);
    whole = (before > 0 ? 1 / before : 0) + conductance;
    store<f64>(blackInverse + o, 1 / whole);
  } else {
    whole = load<f64>(centre + o) + conductance;
    store<f64>(centre + o, whole);
  }
  const o4 = placeInFour(column, y);
  const single = <usize>(2 * (y & 1) + (column & 1)) * level.plane + <usize>(y >> 1) * level.row + (<usize>(column >> 1) << 2);
  store<f32>(level.inverse + single, <f32>(1 / whole));
  store<f32>(level.excess + single, load<f32>(level.excess + single) + <f32>conductance);
}

/** Sorts row-major potentials into a red vector: a first guess. */
export function readPotentials(level: Level, from: usize, into: usize): void {
  for (let y = 0; y < level.rows; y++) {
    const line = from + (<usize>(y * level.columns) << 3);
    const o = into + <usize>(y & 1) * plane + <usize>(y >> 1) * row;
    for (let column = y & 1; column < level.columns; column += 2)
      store<f64>(o + (<usize>(column >> 1) << 3), load<f64>(line + (<usize>column << 3)));
  }
}

/** Writes two planes' rows into one: `even` and `odd` columns alternate. */
function interleave(even: usize, odd: usize, columns: i32, into: usize): void {
  const whole = <usize>(columns >> 2) << 4;
  for (let i: usize = 0; i < whole; i += 16) {
    const a = at(even + i);
    const b = at(odd + i);
    v128.store(into + 2 * i, v128.shuffle<f64>(a, b, 0, 2));
    v128.store(into + 2 * i, v128.shuffle<f64>(a, b, 1, 3), 16);
  }
  for (let column = (columns >> 2) << 2; column < columns; column++)
    store<f64>(into + (<usize>column << 3), load<f64>((column & 1 ? odd : even) + (<usize>(column >> 1) << 3)));
}

/** Writes all potentials row by row: red ones as they are, black ones from their red neighbours (their ties apart). */
export function writePotentials(level: Level, into: usize): void {
  for (let y = 0; y < level.rows; y++) {
    const J = y >> 1;
    const line = into + (<usize>(y * level.columns) << 3);
    const o = <usize>J * row;
    if (y & 1) {
      blackEvenOdd(J, solution, blackRows);
      interleave(blackRows, solution + plane + o, level.columns, line);
    } else {
      blackOddEven(J, solution, blackRows);
      interleave(solution + o, blackRows, level.columns, line);
    }
  }
}

/** Spreads a current that enters a black node over its red neighbours, as elimination does: into a red vector. */
export function spreadFromBlack(column: i32, y: i32, current: f64, into: usize): void {
  const o = <usize>(y >> 1) * row + (<usize>(column >> 1) << 3);
  const share = current * load<f64>(blackInverse + placeInColour(column, y));
  if (y & 1) {
    add(into + plane + o - 8, load<f64>(east + 3 * plane + o - 8) * share);
    add(into + plane + o, load<f64>(east + 2 * plane + o) * share);
    add(into + o, load<f64>(north + o) * share);
    add(into + o + row, load<f64>(north + 2 * plane + o) * share);
  } else {
    add(into + o, load<f64>(east + o) * share);
    add(into + o + 8, load<f64>(east + plane + o) * share);
    add(into + plane + o - row, load<f64>(north + 3 * plane + o - row) * share);
    add(into + plane + o, load<f64>(north + plane + o) * share);
  }
}

/** Adds to a number in memory. */
@inline
export function add(address: usize, value: f64): void {
  store<f64>(address, load<f64>(address) + value);
}
