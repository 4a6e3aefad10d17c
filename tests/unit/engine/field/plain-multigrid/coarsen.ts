import type { Interpolation } from "./interpolation";
import { type Border, type Level, makeLevel } from "./level";

/** The nine shares that a coarse node has in the fine nodes around it, row by row from the south-west. */
function sharesOf(p: Interpolation, N: number, coarseStride: number, shares: Float64Array): void {
  const south = N - coarseStride;
  shares[0] = p.northEast[south - 1];
  shares[1] = p.columnNorth[south];
  shares[2] = p.northWest[south];
  shares[3] = p.rowEast[N - 1];
  shares[4] = 1;
  shares[5] = p.rowWest[N];
  shares[6] = p.southEast[N - 1];
  shares[7] = p.columnSouth[N];
  shares[8] = p.southWest[N];
}

/** Galerkin product on the grid: each coarse link is what the fine network conducts between two coarse basis functions. */
function coarseLinks(
  fine: Level,
  p: Interpolation,
  coarseColumns: number,
  coarseRows: number,
): Pick<Level, "centre" | "east" | "north" | "northEast" | "northWest"> {
  const { columns, rows, stride, centre, east, north, northEast, northWest } = fine;
  const coarseStride = coarseColumns + 2;
  const size = coarseStride * (coarseRows + 2);
  const result = {
    centre: new Float64Array(size),
    east: new Float64Array(size),
    north: new Float64Array(size),
    northEast: new Float64Array(size),
    northWest: new Float64Array(size),
  };
  const shares = new Float64Array(9);
  const other = new Float64Array(9);
  /** A·(basis function) on the 5 × 5 fine nodes around the coarse node. */
  const flow = new Float64Array(25);
  const dot = (offsetColumn: number, offsetRow: number): number => {
    let sum = 0;
    for (let b = 0; b < 3; b++) {
      const line = (b + offsetRow + 1) * 5 + offsetColumn + 1;
      if (b + offsetRow + 1 < 0 || b + offsetRow + 1 > 4) continue;
      for (let a = 0; a < 3; a++) {
        const place = a + offsetColumn + 1;
        if (place >= 0 && place <= 4) sum += other[b * 3 + a] * flow[line + a];
      }
    }
    return sum;
  };
  for (let J = 0; J < coarseRows; J++) {
    for (let I = 0; I < coarseColumns; I++) {
      const N = (J + 1) * coarseStride + I + 1;
      const middle = (2 * J + 1) * stride + 2 * I + 1;
      sharesOf(p, N, coarseStride, shares);
      flow.fill(0);
      for (let b = -1; b <= 1; b++) {
        if (2 * J + b < 0 || 2 * J + b >= rows) continue;
        for (let a = -1; a <= 1; a++) {
          if (2 * I + a < 0 || 2 * I + a >= columns) continue;
          const share = shares[(b + 1) * 3 + a + 1];
          if (share === 0) continue;
          const n = middle + b * stride + a;
          const f = (b + 2) * 5 + a + 2;
          flow[f] += centre[n] * share;
          flow[f + 1] -= east[n] * share;
          flow[f - 1] -= east[n - 1] * share;
          flow[f + 5] -= north[n] * share;
          flow[f - 5] -= north[n - stride] * share;
          if (northEast === null || northWest === null) continue;
          flow[f + 6] -= northEast[n] * share;
          flow[f - 6] -= northEast[n - stride - 1] * share;
          flow[f + 4] -= northWest[n] * share;
          flow[f - 4] -= northWest[n - stride + 1] * share;
        }
      }
      other.set(shares);
      const own = dot(0, 0);
      result.centre[N] = own > 0 ? own : 1;
      if (I + 1 < coarseColumns) {
        sharesOf(p, N + 1, coarseStride, other);
        result.east[N] = -dot(2, 0);
      }
      if (J + 1 < coarseRows) {
        sharesOf(p, N + coarseStride, coarseStride, other);
        result.north[N] = -dot(0, 2);
        if (I + 1 < coarseColumns) {
          sharesOf(p, N + coarseStride + 1, coarseStride, other);
          result.northEast[N] = -dot(2, 2);
        }
        if (I > 0) {
          sharesOf(p, N + coarseStride - 1, coarseStride, other);
          result.northWest[N] = -dot(-2, 2);
        }
      }
    }
  }
  return result;
}

/** A·q for one sparse column of the fine grid (only links; q given as nodes and values). */
function spread(fine: Level, nodes: Int32Array, values: Float64Array, into: Map<number, number>, sign: number): void {
  const { stride, centre, east, north, northEast, northWest } = fine;
  const add = (n: number, value: number): void => {
    if (value !== 0) into.set(n, (into.get(n) ?? 0) + sign * value);
  };
  for (let k = 0; k < nodes.length; k++) {
    const n = nodes[k];
    const q = values[k];
    add(n, centre[n] * q);
    add(n + 1, -east[n] * q);
    add(n - 1, -east[n - 1] * q);
    add(n + stride, -north[n] * q);
    add(n - stride, -north[n - stride] * q);
    if (northEast === null || northWest === null) continue;
    add(n + stride + 1, -northEast[n] * q);
    add(n - stride - 1, -northEast[n - stride - 1] * q);
    add(n + stride - 1, -northWest[n] * q);
    add(n - stride + 1, -northWest[n - stride + 1] * q);
  }
}

/** Adds the restriction (transposed interpolation) of a sparse fine vector to a sparse coarse one. */
function restrictSparse(fine: Level, p: Interpolation, coarseStride: number, from: ReadonlyMap<number, number>): Border {
  const sums = new Map<number, number>();
  const add = (N: number, value: number): void => {
    if (value !== 0) sums.set(N, (sums.get(N) ?? 0) + value);
  };
  for (const [n, value] of from) {
    const column = (n % fine.stride) - 1;
    const row = Math.floor(n / fine.stride) - 1;
    const N = ((row >> 1) + 1) * coarseStride + (column >> 1) + 1;
    if ((column & 1) === 0 && (row & 1) === 0) add(N, value);
    else if ((row & 1) === 0) {
      add(N, p.rowWest[N] * value);
      add(N + 1, p.rowEast[N] * value);
    } else if ((column & 1) === 0) {
      add(N, p.columnSouth[N] * value);
      add(N + coarseStride, p.columnNorth[N] * value);
    } else {
      add(N, p.southWest[N] * value);
      add(N + 1, p.southEast[N] * value);
      add(N + coarseStride, p.northWest[N] * value);
      add(N + coarseStride + 1, p.northEast[N] * value);
    }
  }
  const nodes = [...sums.keys()].sort((a, b) => a - b);
  return { nodes: Int32Array.from(nodes), conductances: Float64Array.from(nodes, (N) => sums.get(N) ?? 0) };
}

/** @returns the next coarser level: the Galerkin product of the whole system, floating conductors included. */
export function coarsen(fine: Level, p: Interpolation): Level {
  const coarseColumns = (fine.columns + 1) >> 1;
  const coarseRows = (fine.rows + 1) >> 1;
  const links = coarseLinks(fine, p, coarseColumns, coarseRows);
  const count = fine.borders.length;
  const floating = Float64Array.from(fine.floating);
  const borders: Border[] = [];
  for (let f = 0; f < count; f++) {
    const { nodes, shares } = p.floatingShares[f];
    const left = new Map<number, number>();
    fine.borders[f].nodes.forEach((n, k) => {
      left.set(n, fine.borders[f].conductances[k]);
    });
    spread(fine, nodes, shares, left, -1);
    borders.push(restrictSparse(fine, p, coarseColumns + 2, left));
    // D' = D - Qᵀ(C - A Q) - Cᵀ Q
    for (let g = 0; g < count; g++) {
      const ofG = p.floatingShares[g];
      for (let k = 0; k < ofG.nodes.length; k++) floating[g * count + f] -= ofG.shares[k] * (left.get(ofG.nodes[k]) ?? 0);
      const tie = new Map<number, number>();
      fine.borders[g].nodes.forEach((n, k) => {
        tie.set(n, fine.borders[g].conductances[k]);
      });
      for (let k = 0; k < nodes.length; k++) floating[g * count + f] -= (tie.get(nodes[k]) ?? 0) * shares[k];
    }
  }
  return makeLevel(coarseColumns, coarseRows, links, borders, floating);
}
