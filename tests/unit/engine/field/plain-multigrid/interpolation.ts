import type { Level } from "./level";

/**
 * Weights that carry a coarse grid's values to the finer one (operator-dependent, black-box multigrid: J. E. Dendy,
 * J. Comput. Phys. 48 (1982) 366). Coarse node (I, J) lies on fine node (2I, 2J). Arrays have the coarse level's padding.
 */
export interface Interpolation {
  /** Fine node (2I + 1, 2J): shares of coarse (I, J) and (I + 1, J). */
  readonly rowWest: Float64Array;
  readonly rowEast: Float64Array;
  /** Fine node (2I, 2J + 1): shares of coarse (I, J) and (I, J + 1). */
  readonly columnSouth: Float64Array;
  readonly columnNorth: Float64Array;
  /** Fine node (2I + 1, 2J + 1): shares of its four coarse neighbours. */
  readonly southWest: Float64Array;
  readonly southEast: Float64Array;
  readonly northWest: Float64Array;
  readonly northEast: Float64Array;
  /** Share of each floating conductor at the fine nodes next to it (so that equal potentials stay equal). */
  readonly floatingShares: readonly { readonly nodes: Int32Array; readonly shares: Float64Array }[];
}

const safely = (numerator: number, denominator: number, scale: number): number =>
  denominator > 1e-9 * scale ? numerator / denominator : 0;

/** @returns the interpolation to `fine` from the grid of every other node. */
export function interpolationTo(fine: Level): Interpolation {
  const { columns, rows, stride, centre, east, north, borders } = fine;
  const coarseColumns = (columns + 1) >> 1;
  const coarseRows = (rows + 1) >> 1;
  const coarseStride = coarseColumns + 2;
  const size = coarseStride * (coarseRows + 2);
  const make = (): Float64Array => new Float64Array(size);
  const result = {
    rowWest: make(),
    rowEast: make(),
    columnSouth: make(),
    columnNorth: make(),
    southWest: make(),
    southEast: make(),
    northWest: make(),
    northEast: make(),
  };
  const { rowWest, rowEast, columnSouth, columnNorth, southWest, southEast, northWest, northEast } = result;
  const ne = fine.northEast;
  const nw = fine.northWest;
  for (let J = 0; J < coarseRows; J++) {
    for (let I = 0; I < coarseColumns; I++) {
      const N = (J + 1) * coarseStride + I + 1;
      const corner = (2 * J + 1) * stride + 2 * I + 1;
      if (2 * I + 1 < columns) {
        const n = corner + 1;
        let west = east[n - 1];
        let eastward = east[n];
        if (ne !== null && nw !== null) {
          west += nw[n] + ne[n - stride - 1];
          eastward += ne[n] + nw[n - stride + 1];
        }
        const rest = centre[n] - north[n] - north[n - stride];
        rowWest[N] = safely(west, rest, centre[n]);
        rowEast[N] = safely(eastward, rest, centre[n]);
      }
      if (2 * J + 1 < rows) {
        const n = corner + stride;
        let south = north[n - stride];
        let northward = north[n];
        if (ne !== null && nw !== null) {
          south += ne[n - stride - 1] + nw[n - stride + 1];
          northward += ne[n] + nw[n];
        }
        const rest = centre[n] - east[n] - east[n - 1];
        columnSouth[N] = safely(south, rest, centre[n]);
        columnNorth[N] = safely(northward, rest, centre[n]);
      }
    }
  }
  for (let J = 0; 2 * J + 1 < rows; J++) {
    for (let I = 0; 2 * I + 1 < columns; I++) {
      const N = (J + 1) * coarseStride + I + 1;
      const n = (2 * J + 2) * stride + 2 * I + 2;
      const inv = centre[n] > 0 ? 1 / centre[n] : 0;
      const w = east[n - 1];
      const e = east[n];
      const s = north[n - stride];
      const t = north[n];
      southWest[N] = inv * (w * columnSouth[N] + s * rowWest[N] + (ne === null ? 0 : ne[n - stride - 1]));
      southEast[N] = inv * (e * columnSouth[N + 1] + s * rowEast[N] + (nw === null ? 0 : nw[n - stride + 1]));
      northWest[N] = inv * (w * columnNorth[N] + t * rowWest[N + coarseStride] + (nw === null ? 0 : nw[n]));
      northEast[N] = inv * (e * columnNorth[N + 1] + t * rowEast[N + coarseStride] + (ne === null ? 0 : ne[n]));
    }
  }
  return { ...result, floatingShares: borders.map((border) => floatingShares(fine, border.nodes, border.conductances)) };
}

function floatingShares(fine: Level, nodes: Int32Array, conductances: Float64Array): { nodes: Int32Array; shares: Float64Array } {
  const { stride, centre, east, north } = fine;
  const shares = new Map<number, number>();
  const parity = (n: number): number => (((n % stride) - 1) & 1) + 2 * ((Math.floor(n / stride) - 1) & 1);
  const tie = new Map<number, number>();
  for (let k = 0; k < nodes.length; k++) tie.set(nodes[k], conductances[k]);
  for (const [n, conductance] of tie) {
    const kind = parity(n);
    if (kind === 1) shares.set(n, safely(conductance, centre[n] - north[n] - north[n - stride], centre[n]));
    else if (kind === 2) shares.set(n, safely(conductance, centre[n] - east[n] - east[n - 1], centre[n]));
  }
  // Centre nodes take from the nodes on the coarse lines, so they come last; a neighbour's share reaches them too.
  const centres = new Set<number>();
  for (const n of tie.keys()) if (parity(n) === 3) centres.add(n);
  for (const n of [...shares.keys()])
    for (const m of [n - 1, n + 1, n - stride, n + stride]) if (parity(m) === 3 && centre[m] > 0) centres.add(m);
  for (const n of centres) {
    const through =
      east[n - 1] * (shares.get(n - 1) ?? 0) +
      east[n] * (shares.get(n + 1) ?? 0) +
      north[n - stride] * (shares.get(n - stride) ?? 0) +
      north[n] * (shares.get(n + stride) ?? 0);
    const share = ((tie.get(n) ?? 0) + through) / centre[n];
    if (share !== 0) shares.set(n, share);
  }
  const sorted = [...shares.keys()].sort((a, b) => a - b);
  return { nodes: Int32Array.from(sorted), shares: Float64Array.from(sorted, (n) => shares.get(n) ?? 0) };
}
