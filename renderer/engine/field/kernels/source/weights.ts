/**
 * What a coarser level gives to the nodes between its own (operator-dependent, black-box multigrid: J. E. Dendy,
 * J. Comput. Phys. 48 (1982) 366). A node on a coarse row or column takes from its two coarse neighbours, all links across
 * folded into them; a node in the middle of four takes what makes its own current vanish.
 *
 * Beside the shares stand their misses: by how much they fail to add up to 1. Away from conductors a miss is exactly 0, and the
 * coarse ties are made of misses alone, so that rounding never ties open water to earth.
 */
import { at, LEAST_MM, Level, plus } from "./memory";

/** A node whose ties or negative links all but cancel the rest would get shares without bound: they are held to 1 / this. */
export const LEAST_REST: f32 = 0.3;

/** Shares of two neighbours with summed conductances a and b, and their miss; `excess` is what ties the node elsewhere. */
@inline
function shareOut(a: v128, b: v128, excess: v128, toA: usize, toB: usize, toMiss: usize): void {
  const both = f32x4.add(a, b);
  const links = f32x4.add(f32x4.abs(a), f32x4.abs(b));
  const rest = f32x4.max(f32x4.add(both, excess), f32x4.mul(links, f32x4.splat(LEAST_REST)));
  const linked = f32x4.gt(links, f32x4.splat(LEAST_MM));
  const one = f32x4.splat(1);
  const inverse = v128.and(f32x4.div(one, v128.bitselect(rest, one, linked)), linked);
  v128.store(toA, f32x4.mul(a, inverse));
  v128.store(toB, f32x4.mul(b, inverse));
  v128.store(toMiss, v128.bitselect(f32x4.mul(f32x4.sub(both, rest), inverse), f32x4.splat(-1), linked));
}

/** Nodes (odd, even) of row J: shares of the coarse nodes west and east of them. */
@inline
function rowShares(level: Level, J: i32, nine: bool): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const r = level.row;
  const e00 = level.east + o;
  const e10 = level.east + p + o;
  const excess = level.excess + p + o;
  const nw10 = level.northWest + p + o;
  const ne10 = level.northEast + p + o;
  const ne01Down = level.northEast + 2 * p + o - r;
  const nw01Down = level.northWest + 2 * p + o - r;
  const span = level.span;
  for (let i: usize = 0; i < span; i += 16) {
    let west = at(e00 + i);
    let east = at(e10 + i);
    if (nine) {
      west = f32x4.add(west, f32x4.add(at(nw10 + i), at(ne01Down + i)));
      east = f32x4.add(east, f32x4.add(at(ne10 + i), v128.load(nw01Down + i, 4)));
    }
    shareOut(west, east, at(excess + i), level.rowWest + o + i, level.rowEast + o + i, level.rowMiss + o + i);
  }
}

/** Nodes (even, odd) of row J: shares of the coarse nodes south and north of them. */
@inline
function columnShares(level: Level, J: i32, nine: bool): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const n00 = level.north + o;
  const n01 = level.north + 2 * p + o;
  const excess = level.excess + 2 * p + o;
  const nw10 = level.northWest + p + o;
  const ne10West = level.northEast + p + o - 4;
  const ne01 = level.northEast + 2 * p + o;
  const nw01 = level.northWest + 2 * p + o;
  const span = level.span;
  for (let i: usize = 0; i < span; i += 16) {
    let south = at(n00 + i);
    let north = at(n01 + i);
    if (nine) {
      south = f32x4.add(south, f32x4.add(at(nw10 + i), at(ne10West + i)));
      north = f32x4.add(north, f32x4.add(at(ne01 + i), at(nw01 + i)));
    }
    shareOut(south, north, at(excess + i), level.columnSouth + o + i, level.columnNorth + o + i, level.columnMiss + o + i);
  }
}

/** Nodes (odd, odd) of row J: shares of the four coarse nodes round them. */
@inline
function centreShares(level: Level, J: i32, nine: bool): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const r = level.row;
  const e01 = level.east + 2 * p + o;
  const e11 = level.east + 3 * p + o;
  const n10 = level.north + p + o;
  const n11 = level.north + 3 * p + o;
  const ne00 = level.northEast + o;
  const nw00 = level.northWest + o;
  const ne11 = level.northEast + 3 * p + o;
  const nw11 = level.northWest + 3 * p + o;
  const inverse = level.inverse + 3 * p + o;
  const excess = level.excess + 3 * p + o;
  const columnSouth = level.columnSouth + o;
  const columnNorth = level.columnNorth + o;
  const columnMiss = level.columnMiss + o;
  const rowWest = level.rowWest + o;
  const rowEast = level.rowEast + o;
  const rowMiss = level.rowMiss + o;
  const span = level.span;
  for (let i: usize = 0; i < span; i += 16) {
    const west = at(e01 + i);
    const east = at(e11 + i);
    const south = at(n10 + i);
    const north = at(n11 + i);
    const inv = at(inverse + i);
    let southWest = plus(f32x4.mul(west, at(columnSouth + i)), south, at(rowWest + i));
    let southEast = plus(f32x4.mul(east, v128.load(columnSouth + i, 4)), south, at(rowEast + i));
    let northWest = plus(f32x4.mul(west, at(columnNorth + i)), north, at(rowWest + r + i));
    let northEast = plus(f32x4.mul(east, v128.load(columnNorth + i, 4)), north, at(rowEast + r + i));
    if (nine) {
      southWest = f32x4.add(southWest, at(ne00 + i));
      southEast = f32x4.add(southEast, v128.load(nw00 + i, 4));
      northWest = f32x4.add(northWest, at(nw11 + i));
      northEast = f32x4.add(northEast, at(ne11 + i));
    }
    v128.store(level.southWest + o + i, f32x4.mul(inv, southWest));
    v128.store(level.southEast + o + i, f32x4.mul(inv, southEast));
    v128.store(level.shareNorthWest + o + i, f32x4.mul(inv, northWest));
    v128.store(level.shareNorthEast + o + i, f32x4.mul(inv, northEast));
    let miss = plus(f32x4.mul(west, at(columnMiss + i)), east, v128.load(columnMiss + i, 4));
    miss = plus(plus(miss, south, at(rowMiss + i)), north, at(rowMiss + r + i));
    v128.store(level.centreMiss + o + i, f32x4.mul(inv, f32x4.sub(miss, at(excess + i))));
  }
}

export function fiveRowShares(level: Level, J: i32): void {
  rowShares(level, J, false);
}

export function fiveOtherShares(level: Level, J: i32): void {
  columnShares(level, J, false);
  centreShares(level, J, false);
}

export function nineRowShares(level: Level, J: i32): void {
  rowShares(level, J, true);
}

export function nineOtherShares(level: Level, J: i32): void {
  columnShares(level, J, true);
  centreShares(level, J, true);
}
