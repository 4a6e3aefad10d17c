/**
 * The Galerkin product: what the finer network conducts between two coarse basis functions. With the shares of weights.ts no
 * current enters a node in the middle of four, so that only five of a basis function's nine nodes count.
 */
import { at, LEAST_MM, Level, plus, scatterRow } from "./memory";
import { fiveOtherShares, fiveRowShares, nineOtherShares, nineRowShares } from "./weights";

/** What the misses of row J make flow into its nodes (odd, even) and (even, odd): the coarse ties come from it. */
@inline
function missFlows(level: Level, J: i32, nine: bool): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const r = level.row;
  const span = level.span;
  const rowMiss = level.rowMiss + o;
  const columnMiss = level.columnMiss + o;
  const centreMiss = level.centreMiss + o;
  for (let i: usize = 0; i < span; i += 16) {
    const miss = at(rowMiss + i);
    const excess = at(level.excess + p + o + i);
    const north = at(level.north + p + o + i);
    const south = at(level.north + 3 * p + o - r + i);
    let rest = f32x4.add(f32x4.add(at(level.east + o + i), at(level.east + p + o + i)), excess);
    let flow = plus(excess, north, f32x4.sub(miss, at(centreMiss + i)));
    flow = plus(flow, south, f32x4.sub(miss, at(centreMiss - r + i)));
    if (nine) {
      const nw = at(level.northWest + p + o + i);
      const ne = at(level.northEast + p + o + i);
      const sw = at(level.northEast + 2 * p + o - r + i);
      const se = v128.load(level.northWest + 2 * p + o - r + i, 4);
      rest = f32x4.add(rest, f32x4.add(f32x4.add(nw, ne), f32x4.add(sw, se)));
      let across = plus(f32x4.mul(nw, at(columnMiss + i)), ne, v128.load(columnMiss + i, 4));
      across = plus(plus(across, sw, at(columnMiss - r + i)), se, v128.load(columnMiss - r + i, 4));
      flow = f32x4.sub(flow, across);
    }
    v128.store(level.rowFlow + o + i, plus(flow, rest, miss));
  }
  for (let i: usize = 0; i < span; i += 16) {
    const miss = at(columnMiss + i);
    const excess = at(level.excess + 2 * p + o + i);
    const east = at(level.east + 2 * p + o + i);
    const west = at(level.east + 3 * p + o - 4 + i);
    let rest = f32x4.add(f32x4.add(at(level.north + o + i), at(level.north + 2 * p + o + i)), excess);
    let flow = plus(excess, east, f32x4.sub(miss, at(centreMiss + i)));
    flow = plus(flow, west, f32x4.sub(miss, at(centreMiss - 4 + i)));
    if (nine) {
      const se = at(level.northWest + p + o + i);
      const sw = at(level.northEast + p + o - 4 + i);
      const ne = at(level.northEast + 2 * p + o + i);
      const nw = at(level.northWest + 2 * p + o + i);
      rest = f32x4.add(rest, f32x4.add(f32x4.add(nw, ne), f32x4.add(sw, se)));
      let across = plus(f32x4.mul(se, at(rowMiss + i)), sw, at(rowMiss - 4 + i));
      across = plus(plus(across, ne, at(rowMiss + r + i)), nw, at(rowMiss + r - 4 + i));
      flow = f32x4.sub(flow, across);
    }
    v128.store(level.columnFlow + o + i, plus(flow, rest, miss));
  }
}

/** Addresses of row J of a coarse array. */
@inline
function coarseRow(array: usize, coarse: Level, J: i32): usize {
  return array + <usize>(2 * (J & 1)) * coarse.plane + <usize>(J >> 1) * coarse.row;
}

/** The ties of the coarse nodes of row J. */
@inline
function ties(level: Level, coarse: Level, J: i32, nine: bool): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const r = level.row;
  const span = level.span;
  const into = coarseRow(coarse.excess, coarse, J);
  const rowMiss = level.rowMiss + o;
  const columnMiss = level.columnMiss + o;
  const centreMiss = level.centreMiss + o;
  for (let i: usize = 0; i < span; i += 16) {
    let out = plus(f32x4.mul(at(level.east + o + i), at(rowMiss + i)), at(level.east + p + o - 4 + i), at(rowMiss - 4 + i));
    out = plus(out, at(level.north + o + i), at(columnMiss + i));
    out = plus(out, at(level.north + 2 * p + o - r + i), at(columnMiss - r + i));
    if (nine) {
      out = plus(out, at(level.northEast + o + i), at(centreMiss + i));
      out = plus(out, at(level.northWest + o + i), at(centreMiss - 4 + i));
      out = plus(out, at(level.northEast + 3 * p + o - r - 4 + i), at(centreMiss - r - 4 + i));
      out = plus(out, at(level.northWest + 3 * p + o - r + i), at(centreMiss - r + i));
    }
    let sum = f32x4.sub(at(level.excess + o + i), out);
    sum = plus(sum, at(level.rowWest + o + i), at(level.rowFlow + o + i));
    sum = plus(sum, at(level.rowEast + o - 4 + i), at(level.rowFlow + o - 4 + i));
    sum = plus(sum, at(level.columnSouth + o + i), at(level.columnFlow + o + i));
    sum = plus(sum, at(level.columnNorth + o - r + i), at(level.columnFlow + o - r + i));
    scatterRow(into, into + coarse.plane, i, sum);
  }
}

/** The links to the east of the coarse nodes of row J. */
@inline
function eastLinks(level: Level, coarse: Level, J: i32, nine: bool): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const r = level.row;
  const span = level.span;
  const into = coarseRow(coarse.east, coarse, J);
  const southEast = level.southEast + o;
  const northEastDown = level.shareNorthEast + o - r;
  for (let i: usize = 0; i < span; i += 16) {
    const se = at(southEast + i);
    const ne = at(northEastDown + i);
    const rw = at(level.rowWest + o + i);
    const re = at(level.rowEast + o + i);
    const direct = at(level.east + o + i);
    const eastward = at(level.east + p + o + i);
    // The current that node (odd, even) sends to the eastern coarse node's potential.
    let rest = f32x4.add(f32x4.add(direct, eastward), at(level.excess + p + o + i));
    let toEast = eastward;
    let flow = f32x4.mul(at(level.north + p + o + i), f32x4.sub(re, se));
    flow = plus(flow, at(level.north + 3 * p + o - r + i), f32x4.sub(re, ne));
    let sum = f32x4.mul(direct, re);
    const e01 = at(level.east + 2 * p + o + i);
    const e01Down = at(level.east + 2 * p + o - r + i);
    let north = f32x4.mul(e01, se);
    let south = f32x4.mul(e01Down, ne);
    if (nine) {
      const diagonalNE = at(level.northEast + p + o + i);
      const diagonalNW = at(level.northWest + p + o + i);
      const diagonalSW = at(level.northEast + 2 * p + o - r + i);
      const diagonalSE = v128.load(level.northWest + 2 * p + o - r + i, 4);
      rest = f32x4.add(rest, f32x4.add(f32x4.add(diagonalNE, diagonalNW), f32x4.add(diagonalSE, diagonalSW)));
      toEast = f32x4.add(toEast, f32x4.add(diagonalNE, diagonalSE));
      const one = f32x4.splat(1);
      flow = plus(flow, diagonalNE, f32x4.sub(one, v128.load(level.columnSouth + o + i, 4)));
      flow = plus(flow, diagonalSE, f32x4.sub(one, v128.load(level.columnNorth + o - r + i, 4)));
      sum = plus(sum, at(level.northEast + o + i), se);
      sum = plus(sum, at(level.northWest + 3 * p + o - r + i), ne);
      north = plus(north, diagonalNW, re);
      south = plus(south, diagonalSW, re);
    }
    flow = f32x4.add(flow, f32x4.sub(f32x4.mul(rest, re), toEast));
    sum = f32x4.sub(sum, f32x4.mul(rw, flow));
    sum = plus(sum, at(level.columnSouth + o + i), north);
    sum = plus(sum, at(level.columnNorth + o - r + i), south);
    scatterRow(into, into + coarse.plane, i, sum);
  }
}

/** The links to the north of the coarse nodes of row J. */
@inline
function northLinks(level: Level, coarse: Level, J: i32, nine: bool): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const r = level.row;
  const span = level.span;
  const into = coarseRow(coarse.north, coarse, J);
  for (let i: usize = 0; i < span; i += 16) {
    const nw = at(level.shareNorthWest + o + i);
    const ne = at(level.shareNorthEast + o - 4 + i);
    const cs = at(level.columnSouth + o + i);
    const cn = at(level.columnNorth + o + i);
    const direct = at(level.north + o + i);
    const northward = at(level.north + 2 * p + o + i);
    // The current that node (even, odd) sends to the northern coarse node's potential.
    let rest = f32x4.add(f32x4.add(direct, northward), at(level.excess + 2 * p + o + i));
    let toNorth = northward;
    let flow = f32x4.mul(at(level.east + 2 * p + o + i), f32x4.sub(cn, nw));
    flow = plus(flow, at(level.east + 3 * p + o - 4 + i), f32x4.sub(cn, ne));
    let sum = f32x4.mul(direct, cn);
    let east = f32x4.mul(at(level.north + p + o + i), nw);
    let west = f32x4.mul(at(level.north + p + o - 4 + i), ne);
    if (nine) {
      const diagonalNE = at(level.northEast + 2 * p + o + i);
      const diagonalNW = at(level.northWest + 2 * p + o + i);
      const diagonalSE = at(level.northWest + p + o + i);
      const diagonalSW = at(level.northEast + p + o - 4 + i);
      rest = f32x4.add(rest, f32x4.add(f32x4.add(diagonalNE, diagonalNW), f32x4.add(diagonalSE, diagonalSW)));
      toNorth = f32x4.add(toNorth, f32x4.add(diagonalNE, diagonalNW));
      const one = f32x4.splat(1);
      flow = plus(flow, diagonalNE, f32x4.sub(one, at(level.rowWest + o + r + i)));
      flow = plus(flow, diagonalNW, f32x4.sub(one, at(level.rowEast + o + r - 4 + i)));
      sum = plus(sum, at(level.northEast + o + i), nw);
      sum = plus(sum, at(level.northWest + o + i), ne);
      east = plus(east, diagonalSE, cn);
      west = plus(west, diagonalSW, cn);
    }
    flow = f32x4.add(flow, f32x4.sub(f32x4.mul(rest, cn), toNorth));
    sum = f32x4.sub(sum, f32x4.mul(cs, flow));
    sum = plus(sum, at(level.rowWest + o + i), east);
    sum = plus(sum, at(level.rowEast + o - 4 + i), west);
    scatterRow(into, into + coarse.plane, i, sum);
  }
}

/** The diagonal links of the coarse nodes of row J. */
@inline
function diagonalLinks(level: Level, coarse: Level, J: i32, nine: bool): void {
  const o = <usize>J * level.row;
  const p = level.plane;
  const r = level.row;
  const span = level.span;
  const intoEast = coarseRow(coarse.northEast, coarse, J);
  const intoWest = coarseRow(coarse.northWest, coarse, J);
  for (let i: usize = 0; i < span; i += 16) {
    const ne = at(level.shareNorthEast + o + i);
    const nw = at(level.shareNorthWest + o - 4 + i);
    const cs = at(level.columnSouth + o + i);
    const rw = at(level.rowWest + o + i);
    const re = at(level.rowEast + o - 4 + i);
    let east = f32x4.mul(rw, f32x4.mul(at(level.north + p + o + i), ne));
    let west = f32x4.mul(re, f32x4.mul(at(level.north + p + o - 4 + i), nw));
    let acrossEast = f32x4.mul(at(level.east + 2 * p + o + i), ne);
    let acrossWest = f32x4.mul(at(level.east + 3 * p + o - 4 + i), nw);
    if (nine) {
      east = plus(east, at(level.northEast + o + i), ne);
      west = plus(west, at(level.northWest + o + i), nw);
      east = plus(east, f32x4.mul(rw, at(level.northEast + p + o + i)), v128.load(level.columnNorth + o + i, 4));
      west = plus(west, f32x4.mul(re, at(level.northWest + p + o - 4 + i)), at(level.columnNorth + o - 4 + i));
      acrossEast = plus(acrossEast, at(level.northEast + 2 * p + o + i), at(level.rowEast + o + r + i));
      acrossWest = plus(acrossWest, at(level.northWest + 2 * p + o + i), at(level.rowWest + o + r - 4 + i));
    }
    scatterRow(intoEast, intoEast + coarse.plane, i, plus(east, cs, acrossEast));
    scatterRow(intoWest, intoWest + coarse.plane, i, plus(west, cs, acrossWest));
  }
}

@inline
function coarsenRows(level: Level, coarse: Level, nine: bool): void {
  const height = level.height;
  if (nine) nineRowShares(level, 0);
  else fiveRowShares(level, 0);
  for (let J = 0; J <= height; J++) {
    if (J + 1 < height) {
      if (nine) nineRowShares(level, J + 1);
      else fiveRowShares(level, J + 1);
    }
    if (J < height) {
      if (nine) nineOtherShares(level, J);
      else fiveOtherShares(level, J);
      missFlows(level, J, nine);
      eastLinks(level, coarse, J, nine);
      northLinks(level, coarse, J, nine);
      diagonalLinks(level, coarse, J, nine);
      ties(level, coarse, J, nine);
    }
  }
}

/** A centre that negative links or ties all but cancel is held to this share of the links, as rounding would have its say in it. */
const LEAST_CENTRE: f32 = 0.02;

/** The inverses of the centres of a coarse level: its links and ties added up. */
function invertCentres(level: Level): void {
  const r = level.row;
  const p = level.plane;
  const span = level.span;
  for (let k: usize = 0; k < 4; k++) {
    const odd = k & 1;
    const north = k >> 1;
    // The neighbour to the west stands in the other plane, one place back for even columns; likewise for the others.
    const west = (k ^ 1) * p - (odd ? 0 : 4);
    const down = (k ^ 2) * p - (north ? 0 : r);
    const downWest = (k ^ 3) * p - (odd ? 0 : 4) - (north ? 0 : r);
    const downEast = (k ^ 3) * p + (odd ? 4 : 0) - (north ? 0 : r);
    for (let J = 0; J < level.height; J++) {
      const o = <usize>J * r;
      for (let i = o; i < o + span; i += 16) {
        let links = f32x4.add(f32x4.abs(at(level.east + k * p + i)), f32x4.abs(at(level.east + west + i)));
        let sum = f32x4.add(at(level.east + k * p + i), at(level.east + west + i));
        links = f32x4.add(links, f32x4.add(f32x4.abs(at(level.north + k * p + i)), f32x4.abs(at(level.north + down + i))));
        sum = f32x4.add(sum, f32x4.add(at(level.north + k * p + i), at(level.north + down + i)));
        links = f32x4.add(links, f32x4.add(f32x4.abs(at(level.northEast + k * p + i)), f32x4.abs(at(level.northEast + downWest + i))));
        sum = f32x4.add(sum, f32x4.add(at(level.northEast + k * p + i), at(level.northEast + downWest + i)));
        links = f32x4.add(links, f32x4.add(f32x4.abs(at(level.northWest + k * p + i)), f32x4.abs(at(level.northWest + downEast + i))));
        sum = f32x4.add(sum, f32x4.add(at(level.northWest + k * p + i), at(level.northWest + downEast + i)));
        sum = f32x4.max(f32x4.add(sum, at(level.excess + k * p + i)), f32x4.mul(links, f32x4.splat(LEAST_CENTRE)));
        const linked = f32x4.gt(sum, f32x4.splat(LEAST_MM));
        const one = f32x4.splat(1);
        v128.store(level.inverse + k * p + i, v128.and(f32x4.div(one, v128.bitselect(sum, one, linked)), linked));
      }
    }
  }
}

/** Builds the links of the level below a 5-point one. */
export function coarsenFivePoint(level: Level, coarse: Level): void {
  coarsenRows(level, coarse, false);
  invertCentres(coarse);
}

/** Builds the links of the level below a 9-point one. */
export function coarsenNinePoint(level: Level, coarse: Level): void {
  coarsenRows(level, coarse, true);
  invertCentres(coarse);
}
