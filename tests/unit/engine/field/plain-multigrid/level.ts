/**
 * One grid of the multigrid hierarchy: a symmetric 9-point network, padded by a ring of zeros so that loops need no edges.
 * Node (column, row) has index (row + 1)·stride + column + 1 with stride = columns + 2.
 * Links are stored once, as positive conductances: `east[n]` to n + 1, `north[n]` to n + stride,
 * `northEast[n]` to n + stride + 1, `northWest[n]` to n + stride - 1.
 */
export interface Level {
  readonly columns: number;
  readonly rows: number;
  readonly stride: number;
  /** Sum of all that a node is tied to (links and conductors); 1 at nodes that are not unknown. */
  readonly centre: Float64Array;
  readonly inverse: Float64Array;
  readonly east: Float64Array;
  readonly north: Float64Array;
  /** Diagonal links; null on the finest grid, which is a 5-point network. */
  readonly northEast: Float64Array | null;
  readonly northWest: Float64Array | null;
  /** Ties to each floating conductor (an unknown of its own on every level). */
  readonly borders: readonly Border[];
  /** Floating conductors among themselves: row-major square matrix, positive on the diagonal. */
  readonly floating: Float64Array;
  /** Work arrays of the cycle. */
  readonly solution: Float64Array;
  readonly source: Float64Array;
  readonly residual: Float64Array;
  readonly floatingSolution: Float64Array;
  readonly floatingSource: Float64Array;
}

/** The nodes that a floating conductor is tied to, and by how much. */
export interface Border {
  readonly nodes: Int32Array;
  readonly conductances: Float64Array;
}

/** @returns the padded index of a node. */
export const padded = (stride: number, column: number, row: number): number => (row + 1) * stride + column + 1;

/** Makes a level from its links; the work arrays start at zero. */
export function makeLevel(
  columns: number,
  rows: number,
  links: Pick<Level, "centre" | "east" | "north" | "northEast" | "northWest">,
  borders: readonly Border[],
  floating: Float64Array,
): Level {
  const size = (columns + 2) * (rows + 2);
  const inverse = new Float64Array(size);
  for (let n = 0; n < size; n++) inverse[n] = links.centre[n] > 0 ? 1 / links.centre[n] : 0;
  return {
    ...links,
    columns,
    rows,
    stride: columns + 2,
    inverse,
    borders,
    floating,
    solution: new Float64Array(size),
    source: new Float64Array(size),
    residual: new Float64Array(size),
    floatingSolution: new Float64Array(borders.length),
    floatingSource: new Float64Array(borders.length),
  };
}

/** result = A·x for the grid part, floating conductors at `floatingX`; padding stays zero. Returns nothing. */
export function applyLevel(
  level: Level,
  x: Float64Array,
  floatingX: Float64Array,
  result: Float64Array,
  floatingResult: Float64Array,
): void {
  const { columns, rows, stride, centre, east, north, northEast, northWest, borders, floating } = level;
  for (let row = 1; row <= rows; row++) {
    const first = row * stride + 1;
    const end = first + columns;
    if (northEast === null || northWest === null) {
      for (let n = first; n < end; n++) {
        result[n] =
          centre[n] * x[n] - east[n] * x[n + 1] - east[n - 1] * x[n - 1] - north[n] * x[n + stride] - north[n - stride] * x[n - stride];
      }
    } else {
      for (let n = first; n < end; n++) {
        const up = n + stride;
        const down = n - stride;
        result[n] =
          centre[n] * x[n] -
          east[n] * x[n + 1] -
          east[n - 1] * x[n - 1] -
          north[n] * x[up] -
          north[down] * x[down] -
          northEast[n] * x[up + 1] -
          northEast[down - 1] * x[down - 1] -
          northWest[n] * x[up - 1] -
          northWest[down + 1] * x[down + 1];
      }
    }
  }
  const count = borders.length;
  for (let f = 0; f < count; f++) {
    const { nodes, conductances } = borders[f];
    const volts = floatingX[f];
    let sum = 0;
    for (let k = 0; k < nodes.length; k++) {
      result[nodes[k]] -= conductances[k] * volts;
      sum -= conductances[k] * x[nodes[k]];
    }
    for (let g = 0; g < count; g++) sum += floating[f * count + g] * floatingX[g];
    floatingResult[f] = sum;
  }
}
