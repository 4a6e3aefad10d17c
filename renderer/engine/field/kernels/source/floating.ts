/**
 * Floating conductors are unknowns of their own on every level: a border column C of ties to nodes, and a small matrix D among
 * themselves. To the finer level each gives shares Q at the nodes beside it, so that water at its potential stays at it:
 * C' = Pᵀ(C − A·Q), D' = D − Qᵀ(C − A·Q) − CᵀQ, with A the links of the level and P its interpolation.
 */
import { LEAST_MM, Level, place, take, takeNext } from "./memory";
import { LEAST_REST } from "./weights";

/** The nodes that a floating conductor is tied to, and those to which it gives a share: lists of records. */
@unmanaged
export class Border {
  ties: usize;
  tieCount: i32;
  shares: usize;
  shareCount: i32;
  /** The columns and rows of the grid that the ties lie in. */
  left: i32;
  right: i32;
  bottom: i32;
  top: i32;
}

/** Bytes of a record: place in the level's planes of single precision, row << 16 | column, value. */
export const RECORD: usize = 16;
/** Nodes from a tie that a share may touch. */
const REACH: i32 = 4;

export let count: i32 = 0;

/** Padded fields of the finest grid's size, zero between uses: shares, what is left of the ties, coarse ties. */
let shareField: usize = 0;
let leftField: usize = 0;
let coarseField: usize = 0;
let stride: i32 = 0;
let coarseStride: i32 = 0;

@inline
export function borderOf(level: Level, f: i32): Border {
  return changetype<Border>(level.borders + <usize>f * offsetof<Border>());
}

/** Gives a level room for the columns and potentials of `floaters` conductors. */
export function takeFloating(level: Level, floaters: i32): void {
  count = floaters;
  level.borders = take(<usize>floaters * offsetof<Border>());
  level.floating = take(<usize>(floaters * floaters) << 3);
  level.floatingSource = take(<usize>floaters << 3);
  level.floatingSolution = take(<usize>floaters << 3);
}

/** The fields that building the columns works in. They must hold zeros, and hold zeros again afterwards. */
export function useFields(columns: i32, shares: usize, left: usize, coarse: usize): void {
  stride = columns + 2;
  coarseStride = (columns >> 1) + 3;
  shareField = shares;
  leftField = left;
  coarseField = coarse;
}

@inline
function fieldAt(field: usize, x: i32, y: i32): usize {
  return field + (<usize>((y + 1) * stride + x + 1) << 3);
}

@inline
function coarseAt(x: i32, y: i32): usize {
  return coarseField + (<usize>((y + 1) * coarseStride + x + 1) << 3);
}

@inline
export function valueOf(record: usize): f64 {
  return load<f64>(record, 8);
}

@inline
function xOf(record: usize): i32 {
  return <i32>(load<u32>(record, 4) & 0xffff);
}

@inline
function yOf(record: usize): i32 {
  return <i32>(load<u32>(record, 4) >> 16);
}

function put(level: Level, x: i32, y: i32, value: f64): void {
  const record = takeNext(RECORD);
  store<u32>(record, <u32>place(level, x, y));
  store<u32>(record, <u32>((y << 16) | x), 4);
  store<f64>(record, value, 8);
}

/** Begins the list of ties of conductor f: they follow by `putTie` before anything else is put anywhere. */
export function beginTies(level: Level, f: i32): void {
  const border = borderOf(level, f);
  border.ties = take(0);
  border.tieCount = 0;
  border.left = i32.MAX_VALUE;
  border.right = -1;
  border.bottom = i32.MAX_VALUE;
  border.top = -1;
}

export function putTie(level: Level, f: i32, x: i32, y: i32, conductance: f64): void {
  const border = borderOf(level, f);
  put(level, x, y, conductance);
  border.tieCount++;
  border.left = min(border.left, x);
  border.right = max(border.right, x);
  border.bottom = min(border.bottom, y);
  border.top = max(border.top, y);
}

@inline
function link(level: Level, group: usize, x: i32, y: i32): f64 {
  return group === 0 ? 0 : <f64>load<f32>(group + place(level, x, y));
}

/** All that a node conducts, from its links and ties: not from its inverse, which is zero where little is left of a node. */
function centreOf(level: Level, x: i32, y: i32): f64 {
  let sum = link(level, level.excess, x, y);
  sum += link(level, level.east, x, y) + link(level, level.east, x - 1, y);
  sum += link(level, level.north, x, y) + link(level, level.north, x, y - 1);
  sum += link(level, level.northEast, x, y) + link(level, level.northEast, x - 1, y - 1);
  return sum + link(level, level.northWest, x, y) + link(level, level.northWest, x + 1, y - 1);
}

/** Share of a conductor at a node on a coarse row (odd, even) or column (even, odd): as in weights.ts. */
function lineShare(level: Level, x: i32, y: i32, tie: f64): f64 {
  const onRow = (x & 1) !== 0;
  const southWest = link(level, level.northEast, x - 1, y - 1);
  const northEast = link(level, level.northEast, x, y);
  const northWest = link(level, level.northWest, x, y);
  const southEast = link(level, level.northWest, x + 1, y - 1);
  const a = onRow ? link(level, level.east, x - 1, y) + southWest + northWest : link(level, level.north, x, y - 1) + southWest + southEast;
  const b = onRow ? link(level, level.east, x, y) + northEast + southEast : link(level, level.north, x, y) + northEast + northWest;
  const links = abs(a) + abs(b);
  if (!(links > LEAST_MM)) return 0;
  const rest = max(a + b + link(level, level.excess, x, y), LEAST_REST * links);
  return tie / rest;
}

/** Puts the share at a node in the middle of four, if there is one and it is not there yet. */
function putCentreShare(level: Level, border: Border, x: i32, y: i32): void {
  const there = fieldAt(shareField, x, y);
  if (load<f64>(there) !== 0) return;
  let flow = load<f64>(fieldAt(leftField, x, y));
  flow += link(level, level.east, x - 1, y) * load<f64>(there - 8) + link(level, level.east, x, y) * load<f64>(there + 8);
  flow += link(level, level.north, x, y - 1) * load<f64>(fieldAt(shareField, x, y - 1));
  flow += link(level, level.north, x, y) * load<f64>(fieldAt(shareField, x, y + 1));
  const share = flow * link(level, level.inverse, x, y);
  if (share === 0) return;
  store<f64>(there, share);
  put(level, x, y, share);
  border.shareCount++;
}

/** Works out the shares of conductor f; its ties are expected in `leftField`. */
function buildShares(level: Level, f: i32): void {
  const border = borderOf(level, f);
  border.shares = take(0);
  border.shareCount = 0;
  const end = border.ties + <usize>border.tieCount * RECORD;
  for (let tie = border.ties; tie < end; tie += RECORD) {
    const x = xOf(tie);
    const y = yOf(tie);
    if (((x ^ y) & 1) === 0) continue;
    const share = lineShare(level, x, y, valueOf(tie));
    if (share === 0) continue;
    store<f64>(fieldAt(shareField, x, y), share);
    put(level, x, y, share);
    border.shareCount++;
  }
  for (let tie = border.ties; tie < end; tie += RECORD) if (xOf(tie) & yOf(tie) & 1) putCentreShare(level, border, xOf(tie), yOf(tie));
  const lines = border.shares + <usize>border.shareCount * RECORD;
  for (let share = border.shares; share < lines; share += RECORD) {
    const x = xOf(share);
    const y = yOf(share);
    if (x & y & 1) continue;
    if (x & 1) {
      putCentreShare(level, border, x, y - 1);
      putCentreShare(level, border, x, y + 1);
    } else {
      putCentreShare(level, border, x - 1, y);
      putCentreShare(level, border, x + 1, y);
    }
  }
}

function scatter(records: usize, length: i32, field: usize): void {
  const end = records + <usize>length * RECORD;
  for (let record = records; record < end; record += RECORD) store<f64>(fieldAt(field, xOf(record), yOf(record)), valueOf(record));
}

function clear(records: usize, length: i32, field: usize): void {
  const end = records + <usize>length * RECORD;
  for (let record = records; record < end; record += RECORD) store<f64>(fieldAt(field, xOf(record), yOf(record)), 0);
}

@inline
function addAt(field: usize, x: i32, y: i32, value: f64): void {
  const there = fieldAt(field, x, y);
  store<f64>(there, load<f64>(there) + value);
}

/** Takes A·(shares of conductor f) from what is in `leftField`. */
function subtractFlows(level: Level, border: Border): void {
  const end = border.shares + <usize>border.shareCount * RECORD;
  for (let share = border.shares; share < end; share += RECORD) {
    const x = xOf(share);
    const y = yOf(share);
    const value = valueOf(share);
    addAt(leftField, x, y, -value * centreOf(level, x, y));
    addAt(leftField, x + 1, y, link(level, level.east, x, y) * value);
    addAt(leftField, x - 1, y, link(level, level.east, x - 1, y) * value);
    addAt(leftField, x, y + 1, link(level, level.north, x, y) * value);
    addAt(leftField, x, y - 1, link(level, level.north, x, y - 1) * value);
    if (level.northEast === 0) continue;
    addAt(leftField, x + 1, y + 1, link(level, level.northEast, x, y) * value);
    addAt(leftField, x - 1, y - 1, link(level, level.northEast, x - 1, y - 1) * value);
    addAt(leftField, x - 1, y + 1, link(level, level.northWest, x, y) * value);
    addAt(leftField, x + 1, y - 1, link(level, level.northWest, x + 1, y - 1) * value);
  }
}

@inline
function share(level: Level, array: usize, X: i32, Y: i32): f64 {
  return <f64>load<f32>(array + <usize>Y * level.row + (<usize>X << 2));
}

/** Puts a value that is left at a node into the coarse field, and its coarse node into the list. */
function putCoarse(level: Level, coarse: Level, f: i32, X: i32, Y: i32, value: f64): void {
  if (value === 0 || X < 0 || Y < 0 || X >= coarse.columns || Y >= coarse.rows) return;
  const there = coarseAt(X, Y);
  if (load<f64>(there) === 0) putTie(coarse, f, X, Y, 0);
  store<f64>(there, load<f64>(there) + value);
}

/** Moves what is left at node (x, y) to the coarse nodes that give to it (transposed interpolation). */
function restrictLeft(level: Level, coarse: Level, f: i32, x: i32, y: i32): void {
  const there = fieldAt(leftField, x, y);
  const left = load<f64>(there);
  if (left === 0) return;
  store<f64>(there, 0);
  // Nothing is left in the middle of four: its share makes its own current vanish.
  if (x & y & 1) return;
  const X = x >> 1;
  const Y = y >> 1;
  if (((x | y) & 1) === 0) putCoarse(level, coarse, f, X, Y, left);
  else if (x & 1) {
    putCoarse(level, coarse, f, X, Y, left * share(level, level.rowWest, X, Y));
    putCoarse(level, coarse, f, X + 1, Y, left * share(level, level.rowEast, X, Y));
  } else {
    putCoarse(level, coarse, f, X, Y, left * share(level, level.columnSouth, X, Y));
    putCoarse(level, coarse, f, X, Y + 1, left * share(level, level.columnNorth, X, Y));
  }
}

/** Restricts all that is left of conductor f and makes the coarse ties of it. */
function buildCoarseTies(level: Level, coarse: Level, f: i32): void {
  const border = borderOf(level, f);
  beginTies(coarse, f);
  const tiesEnd = border.ties + <usize>border.tieCount * RECORD;
  for (let tie = border.ties; tie < tiesEnd; tie += RECORD) restrictLeft(level, coarse, f, xOf(tie), yOf(tie));
  const sharesEnd = border.shares + <usize>border.shareCount * RECORD;
  for (let record = border.shares; record < sharesEnd; record += RECORD) {
    for (let b = -1; b <= 1; b++) for (let a = -1; a <= 1; a++) restrictLeft(level, coarse, f, xOf(record) + a, yOf(record) + b);
  }
  const made = borderOf(coarse, f);
  const end = made.ties + <usize>made.tieCount * RECORD;
  for (let tie = made.ties; tie < end; tie += RECORD) {
    const there = coarseAt(xOf(tie), yOf(tie));
    store<f64>(tie, load<f64>(there), 8);
    store<f64>(there, 0);
  }
}

@inline
function mayMeet(a: Border, b: Border): bool {
  return a.left <= b.right + REACH && b.left <= a.right + REACH && a.bottom <= b.top + REACH && b.bottom <= a.top + REACH;
}

/** What conductors g and f conduct to each other through the shares: taken from D. */
function throughShares(g: Border): f64 {
  let sum: f64 = 0;
  const sharesEnd = g.shares + <usize>g.shareCount * RECORD;
  for (let record = g.shares; record < sharesEnd; record += RECORD) {
    sum += valueOf(record) * load<f64>(fieldAt(leftField, xOf(record), yOf(record)));
  }
  const tiesEnd = g.ties + <usize>g.tieCount * RECORD;
  for (let tie = g.ties; tie < tiesEnd; tie += RECORD) sum += valueOf(tie) * load<f64>(fieldAt(shareField, xOf(tie), yOf(tie)));
  return sum;
}

/** Builds the columns of the floating conductors on the next coarser level. */
export function coarsenFloating(level: Level, coarse: Level): void {
  for (let f = 0; f < count; f++) {
    const border = borderOf(level, f);
    scatter(border.ties, border.tieCount, leftField);
    buildShares(level, f);
    clear(border.ties, border.tieCount, leftField);
    clear(border.shares, border.shareCount, shareField);
  }
  for (let f = 0; f < count; f++) {
    const border = borderOf(level, f);
    scatter(border.ties, border.tieCount, leftField);
    scatter(border.shares, border.shareCount, shareField);
    subtractFlows(level, border);
    for (let g = f; g < count; g++) {
      const direct = load<f64>(level.floating + (<usize>(g * count + f) << 3));
      const other = borderOf(level, g);
      const value = direct - (mayMeet(border, other) ? throughShares(other) : 0);
      store<f64>(coarse.floating + (<usize>(g * count + f) << 3), value);
      store<f64>(coarse.floating + (<usize>(f * count + g) << 3), value);
    }
    clear(border.shares, border.shareCount, shareField);
    buildCoarseTies(level, coarse, f);
  }
}

/** Hands the currents of the floating conductors down to the coarser level; the level was relaxed with them at 0 V. */
export function floatingDown(level: Level, coarse: Level): void {
  for (let f = 0; f < count; f++) {
    const border = borderOf(level, f);
    let sum = load<f64>(level.floatingSource + (<usize>f << 3));
    const tiesEnd = border.ties + <usize>border.tieCount * RECORD;
    for (let tie = border.ties; tie < tiesEnd; tie += RECORD) sum += valueOf(tie) * <f64>load<f32>(level.solution + <usize>load<u32>(tie));
    store<f64>(coarse.floatingSource + (<usize>f << 3), sum + residualInShares(border, level.residual, level.residual - level.plane));
  }
}

/** Shares times residuals; nodes (even, odd) have none. The two addresses are those of the planes' starts less their numbers. */
export function residualInShares(border: Border, oddEven: usize, oddOdd: usize): f64 {
  let sum: f64 = 0;
  const end = border.shares + <usize>border.shareCount * RECORD;
  for (let record = border.shares; record < end; record += RECORD) {
    if ((xOf(record) & 1) === 0) continue;
    const plane = yOf(record) & 1 ? oddOdd : oddEven;
    if (plane !== 0) sum += valueOf(record) * <f64>load<f32>(plane + <usize>load<u32>(record));
  }
  return sum;
}

/** Adds the floating potentials' shares to the solution at the nodes in odd columns (0 as address: none there). */
export function addShares(border: Border, volts: f64, oddEven: usize, oddOdd: usize): void {
  const end = border.shares + <usize>border.shareCount * RECORD;
  for (let record = border.shares; record < end; record += RECORD) {
    if ((xOf(record) & 1) === 0) continue;
    const plane = yOf(record) & 1 ? oddOdd : oddEven;
    if (plane === 0) continue;
    const there = plane + <usize>load<u32>(record);
    store<f32>(there, load<f32>(there) + <f32>(valueOf(record) * volts));
  }
}

/** Brings the floating potentials up from the coarser level: into the solution by their shares, into the source by their ties. */
export function floatingUp(level: Level, coarse: Level): void {
  for (let f = 0; f < count; f++) {
    const border = borderOf(level, f);
    const volts = load<f64>(coarse.floatingSolution + (<usize>f << 3));
    store<f64>(level.floatingSolution + (<usize>f << 3), volts);
    addShares(border, volts, level.solution, level.solution);
    const end = border.ties + <usize>border.tieCount * RECORD;
    for (let tie = border.ties; tie < end; tie += RECORD) {
      const there = level.source + <usize>load<u32>(tie);
      store<f32>(there, load<f32>(there) + <f32>(valueOf(tie) * volts));
    }
  }
}
