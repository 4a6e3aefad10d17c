/**
 * The memory of one solver: arrays are laid out one behind the other and stay where they are while the grid stays the same.
 *
 * Every grid is kept as four planes, by the parity of a node's column and row (plane = 2·(row & 1) + (column & 1)), so that
 * each step of the multigrid reads and writes at unit stride. Node (column, row) stands in its plane at (column >> 1, row >> 1).
 * A row of a plane begins with four elements of padding and ends on a multiple of four; a row of padding lies below and above.
 * Padding holds zeros for good: no loop needs edges, and what the lanes beyond a row's end compute is zero as well.
 */

export const PADDING: usize = 4;

let top: usize = 0;
/** End of the memory that was ever handed out: beyond it all is still zero. */
let highest: usize = 0;

/** Starts to lay out afresh; all memory handed out so far is zeroed. */
export function clearMemory(): void {
  const start = (__heap_base + 63) & ~63;
  if (highest > start) memory.fill(start, 0, highest - start);
  top = start;
}

function reserve(address: usize, bytes: usize): usize {
  top = address + bytes;
  const pages = <i32>((top + 0xffff) >> 16) - memory.size();
  if (pages > 0 && memory.grow(pages) < 0) unreachable();
  if (top > highest) highest = top;
  return address;
}

/** @returns the address of `bytes` of memory, on a cache line of its own; it holds zeros after `clearMemory`. */
export function take(bytes: usize): usize {
  return reserve((top + 63) & ~63, bytes);
}

/** @returns the address of `bytes` of memory right behind what was taken last: for the records of a list. */
export function takeNext(bytes: usize): usize {
  return reserve(top, bytes);
}

/** @returns where the next array will be put: whatever was put there later can be given up by `giveBack`. */
export function mark(): usize {
  return top;
}

export function giveBack(to: usize): void {
  top = to;
}

/**
 * Conductances (mm of depth) below this count as none on the coarser levels: what is left of a node beside metal, whose smallness
 * would be squared from level to level until single precision cannot hold it.
 */
export const LEAST_MM: f32 = 1e-6;

/** One grid: its planes, links and work arrays. All links are positive conductances and are kept once, with their first node. */
@unmanaged
export class Level {
  columns: i32;
  rows: i32;
  /** Rows of a plane, and bytes of a row's computed part and of a whole row in single precision. */
  height: i32;
  span: usize;
  row: usize;
  /** Bytes from one plane to the next. */
  plane: usize;
  /** Links to the next column, the next row, and the two nodes diagonally in the next row. Four planes each. */
  east: usize;
  north: usize;
  northEast: usize;
  northWest: usize;
  /** What ties a node to conductors: its centre less its links. Four planes. */
  excess: usize;
  /** 1 over the centre; 0 where there is no unknown. Four planes. */
  inverse: usize;
  source: usize;
  solution: usize;
  /** Residuals of the nodes (even, even), (odd, even) and (odd, odd): three planes. */
  residual: usize;
  /** What the coarser nodes west, east, … give to the nodes between them; one plane each, by coarse column and row. */
  rowWest: usize;
  rowEast: usize;
  columnSouth: usize;
  columnNorth: usize;
  southWest: usize;
  southEast: usize;
  shareNorthWest: usize;
  shareNorthEast: usize;
  /** By how much such shares miss adding up to 1, and what that makes flow there. */
  rowMiss: usize;
  columnMiss: usize;
  centreMiss: usize;
  rowFlow: usize;
  columnFlow: usize;
  /** Floating conductors: see floating.ts. */
  borders: usize;
  floating: usize;
  floatingSource: usize;
  floatingSolution: usize;
}

/** Bytes of a plane with its padding. */
@inline
export function planeBytes(level: Level, size: usize): usize {
  return (<usize>(level.height + 2) * (level.row >> 2) + 2 * PADDING) * size;
}

/** @returns the address of node (0, 0) in the first of `count` planes of elements of `size` bytes. */
export function takePlanes(level: Level, count: usize, size: usize): usize {
  return take(count * planeBytes(level, size)) + ((level.row >> 2) + PADDING) * size;
}

/** @returns a level of the given size without arrays. */
export function makeLevel(columns: i32, rows: i32): Level {
  const level = changetype<Level>(take(offsetof<Level>()));
  level.columns = columns;
  level.rows = rows;
  level.height = (rows + 1) >> 1;
  const width = <usize>((columns + 1) >> 1);
  level.span = ((width + 3) & ~3) << 2;
  level.row = level.span + (PADDING << 2);
  level.plane = planeBytes(level, 4);
  return level;
}

/** The arrays that the interpolation from the next coarser grid needs. */
export function takeWeights(level: Level): void {
  level.rowWest = takePlanes(level, 1, 4);
  level.rowEast = takePlanes(level, 1, 4);
  level.columnSouth = takePlanes(level, 1, 4);
  level.columnNorth = takePlanes(level, 1, 4);
  level.southWest = takePlanes(level, 1, 4);
  level.southEast = takePlanes(level, 1, 4);
  level.shareNorthWest = takePlanes(level, 1, 4);
  level.shareNorthEast = takePlanes(level, 1, 4);
  level.rowMiss = takePlanes(level, 1, 4);
  level.columnMiss = takePlanes(level, 1, 4);
  level.centreMiss = takePlanes(level, 1, 4);
  level.rowFlow = takePlanes(level, 1, 4);
  level.columnFlow = takePlanes(level, 1, 4);
}

/** The arrays of a coarse 9-point level. */
export function takeNinePoint(level: Level): void {
  level.east = takePlanes(level, 4, 4);
  level.north = takePlanes(level, 4, 4);
  level.northEast = takePlanes(level, 4, 4);
  level.northWest = takePlanes(level, 4, 4);
  level.excess = takePlanes(level, 4, 4);
  level.inverse = takePlanes(level, 4, 4);
  level.source = takePlanes(level, 4, 4);
  level.solution = takePlanes(level, 4, 4);
  level.residual = takePlanes(level, 3, 4);
}

/** @returns the bytes from a level's plane to a node in any array of single precision. */
@inline
export function place(level: Level, column: i32, row: i32): usize {
  return <usize>(2 * (row & 1) + (column & 1)) * level.plane + <usize>(row >> 1) * level.row + (<usize>(column >> 1) << 2);
}

/** Loads four, or two, numbers. */
@inline
export function at(address: usize): v128 {
  return v128.load(address);
}

/** sum + a·b of single precision. */
@inline
export function plus(sum: v128, a: v128, b: v128): v128 {
  return f32x4.add(sum, f32x4.mul(a, b));
}

/** Stores four neighbouring coarse values (at `offset` bytes into a row as the finer level sees it) into the coarse planes. */
@inline
export function scatterRow(even: usize, odd: usize, offset: usize, values: v128): void {
  const sorted = v128.shuffle<f32>(values, values, 0, 2, 1, 3);
  v128.store_lane<u64>(even + (offset >> 1), sorted, 0);
  v128.store_lane<u64>(odd + (offset >> 1), sorted, 1);
}

/** Loads four neighbouring coarse values out of the coarse planes. */
@inline
export function gatherRow(even: usize, odd: usize, offset: usize): v128 {
  const a = v128.load_zero<u64>(even + (offset >> 1));
  const b = v128.load_zero<u64>(odd + (offset >> 1));
  return v128.shuffle<f32>(a, b, 0, 4, 1, 5);
}
