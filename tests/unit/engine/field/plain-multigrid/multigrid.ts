import { coarsen } from "./coarsen";
import { type Interpolation, interpolationTo } from "./interpolation";
import { applyLevel, type Level } from "./level";

/** Grids of at most this many nodes are solved directly. */
const COARSEST_NODES = 120;

/** A hierarchy of ever coarser networks with the interpolations between them, and the factor of the coarsest. */
export interface Hierarchy {
  readonly levels: readonly Level[];
  readonly interpolations: readonly Interpolation[];
  /** Lower Cholesky factor of the coarsest system (its nodes, then the floating conductors), row-major. */
  readonly factor: Float64Array;
}

/** Nodes of a level at which computing may pause: below it a step takes well under a millisecond. */
const PAUSE_NODES = 20_000;

function coarsestFactor(level: Level): Float64Array {
  const nodes = level.columns * level.rows;
  const count = nodes + level.borders.length;
  const factor = new Float64Array(count * count);
  const unit = new Float64Array(level.centre.length);
  const floatingUnit = new Float64Array(level.borders.length);
  const image = new Float64Array(level.centre.length);
  const floatingImage = new Float64Array(level.borders.length);
  for (let column = 0; column < count; column++) {
    unit.fill(0);
    floatingUnit.fill(0);
    if (column < nodes) unit[place(level, column)] = 1;
    else floatingUnit[column - nodes] = 1;
    applyLevel(level, unit, floatingUnit, image, floatingImage);
    for (let row = 0; row < nodes; row++) factor[row * count + column] = image[place(level, row)];
    for (let f = 0; f < floatingImage.length; f++) factor[(nodes + f) * count + column] = floatingImage[f];
  }
  for (let j = 0; j < count; j++) {
    for (let i = j; i < count; i++) {
      let sum = factor[i * count + j];
      for (let k = 0; k < j; k++) sum -= factor[i * count + k] * factor[j * count + k];
      // A floor under the pivots keeps a floating conductor that nothing ties down from dividing by zero.
      factor[i * count + j] = i === j ? Math.sqrt(Math.max(sum, 1e-14)) : sum / factor[j * count + j];
    }
  }
  return factor;
}

const place = (level: Level, index: number): number => (Math.floor(index / level.columns) + 1) * level.stride + (index % level.columns) + 1;

function solveCoarsest(level: Level, factor: Float64Array): void {
  const nodes = level.columns * level.rows;
  const count = nodes + level.borders.length;
  const x = new Float64Array(count);
  for (let i = 0; i < nodes; i++) x[i] = level.source[place(level, i)];
  x.set(level.floatingSource, nodes);
  for (let i = 0; i < count; i++) {
    for (let k = 0; k < i; k++) x[i] -= factor[i * count + k] * x[k];
    x[i] /= factor[i * count + i];
  }
  for (let i = count - 1; i >= 0; i--) {
    for (let k = i + 1; k < count; k++) x[i] -= factor[k * count + i] * x[k];
    x[i] /= factor[i * count + i];
  }
  for (let i = 0; i < nodes; i++) level.solution[place(level, i)] = x[i];
  level.floatingSolution.set(x.subarray(nodes));
}

/** Builds the hierarchy down from the finest network. Yields now and then so that a caller can stop or pause it. */
export function* buildHierarchy(finest: Level): Generator<void, Hierarchy> {
  const levels = [finest];
  const interpolations: Interpolation[] = [];
  for (let level = finest; level.columns * level.rows > COARSEST_NODES; ) {
    const interpolation = interpolationTo(level);
    yield;
    const next = coarsen(level, interpolation);
    yield;
    interpolations.push(interpolation);
    levels.push(next);
    level = next;
  }
  return { levels, interpolations, factor: coarsestFactor(levels[levels.length - 1]) };
}

/** Colours in which no two nodes are neighbours: (column, row) parities; the first two are one colour of a 5-point network. */
const COLOURS: readonly (readonly [number, number])[] = [
  [0, 0],
  [1, 1],
  [1, 0],
  [0, 1],
];

/** One Gauss–Seidel pass over the nodes of one colour. */
function relaxColour(level: Level, [columnParity, rowParity]: readonly [number, number]): void {
  const { columns, rows, stride, inverse, east, north, northEast, northWest, solution: x, source } = level;
  for (let row = rowParity; row < rows; row += 2) {
    const first = (row + 1) * stride + 1;
    const end = first + columns;
    if (northEast === null || northWest === null) {
      for (let n = first + columnParity; n < end; n += 2) {
        x[n] =
          inverse[n] *
          (source[n] + east[n] * x[n + 1] + east[n - 1] * x[n - 1] + north[n] * x[n + stride] + north[n - stride] * x[n - stride]);
      }
    } else {
      for (let n = first + columnParity; n < end; n += 2) {
        const up = n + stride;
        const down = n - stride;
        x[n] =
          inverse[n] *
          (source[n] +
            east[n] * x[n + 1] +
            east[n - 1] * x[n - 1] +
            north[n] * x[up] +
            north[down] * x[down] +
            northEast[n] * x[up + 1] +
            northEast[down - 1] * x[down - 1] +
            northWest[n] * x[up - 1] +
            northWest[down + 1] * x[down + 1]);
      }
    }
  }
}

/** Moves the ties to floating conductors into (sign +1) or out of (sign -1) the source of the grid nodes. */
function tieSource(level: Level, sign: 1 | -1): void {
  level.borders.forEach(({ nodes, conductances }, f) => {
    const volts = sign * level.floatingSolution[f];
    if (volts !== 0) for (let k = 0; k < nodes.length; k++) level.source[nodes[k]] += conductances[k] * volts;
  });
}

/** Gives each floating conductor in turn the potential at which its own current vanishes. */
function relaxFloating(level: Level, order: readonly number[]): void {
  const count = level.borders.length;
  for (const f of order) {
    const { nodes, conductances } = level.borders[f];
    let sum = level.floatingSource[f];
    for (let k = 0; k < nodes.length; k++) sum += conductances[k] * level.solution[nodes[k]];
    for (let g = 0; g < count; g++) if (g !== f) sum -= level.floating[f * count + g] * level.floatingSolution[g];
    level.floatingSolution[f] = sum / level.floating[f * count + f];
  }
}

function restrict(fine: Level, p: Interpolation, coarse: Level): void {
  const { stride, residual: r } = fine;
  const { source } = coarse;
  const cs = coarse.stride;
  for (let J = 0; J < coarse.rows; J++) {
    for (let I = 0; I < coarse.columns; I++) {
      const N = (J + 1) * cs + I + 1;
      const n = (2 * J + 1) * stride + 2 * I + 1;
      source[N] =
        r[n] +
        p.rowEast[N - 1] * r[n - 1] +
        p.rowWest[N] * r[n + 1] +
        p.columnNorth[N - cs] * r[n - stride] +
        p.columnSouth[N] * r[n + stride] +
        p.northEast[N - cs - 1] * r[n - stride - 1] +
        p.northWest[N - cs] * r[n - stride + 1] +
        p.southEast[N - 1] * r[n + stride - 1] +
        p.southWest[N] * r[n + stride + 1];
    }
  }
}

function prolong(coarse: Level, p: Interpolation, fine: Level): void {
  const { stride, solution: x } = fine;
  const { solution: c } = coarse;
  const cs = coarse.stride;
  for (let J = 0; J < coarse.rows; J++) {
    for (let I = 0; I < coarse.columns; I++) {
      const N = (J + 1) * cs + I + 1;
      const n = (2 * J + 1) * stride + 2 * I + 1;
      x[n] += c[N];
      const oddColumn = 2 * I + 1 < fine.columns;
      const oddRow = 2 * J + 1 < fine.rows;
      if (oddColumn) x[n + 1] += p.rowWest[N] * c[N] + p.rowEast[N] * c[N + 1];
      if (oddRow) x[n + stride] += p.columnSouth[N] * c[N] + p.columnNorth[N] * c[N + cs];
      if (oddColumn && oddRow) {
        x[n + stride + 1] +=
          p.southWest[N] * c[N] + p.southEast[N] * c[N + 1] + p.northWest[N] * c[N + cs] + p.northEast[N] * c[N + cs + 1];
      }
    }
  }
}

/** One symmetric V-cycle from zero for `source` on level `depth`; the answer is left in that level's `solution`. */
export function* cycle(hierarchy: Hierarchy, depth = 0): Generator<void, void> {
  const { levels, interpolations, factor } = hierarchy;
  const level = levels[depth];
  if (depth === levels.length - 1) {
    solveCoarsest(level, factor);
    return;
  }
  const large = level.columns * level.rows > PAUSE_NODES;
  const order = level.borders.map((_, f) => f);
  level.solution.fill(0);
  level.floatingSolution.fill(0);
  for (const colour of COLOURS) relaxColour(level, colour);
  if (large) yield;
  relaxFloating(level, order);
  const { residual } = level;
  const floatingResidual = new Float64Array(order.length);
  applyLevel(level, level.solution, level.floatingSolution, residual, floatingResidual);
  for (let n = 0; n < residual.length; n++) residual[n] = level.source[n] - residual[n];
  if (large) yield;
  const p = interpolations[depth];
  const coarse = levels[depth + 1];
  restrict(level, p, coarse);
  for (const f of order) {
    let sum = level.floatingSource[f] - floatingResidual[f];
    const { nodes, shares } = p.floatingShares[f];
    for (let k = 0; k < nodes.length; k++) sum += shares[k] * residual[nodes[k]];
    coarse.floatingSource[f] = sum;
  }
  if (large) yield;
  yield* cycle(hierarchy, depth + 1);
  prolong(coarse, p, level);
  for (const f of order) {
    const { nodes, shares } = p.floatingShares[f];
    const volts = coarse.floatingSolution[f];
    for (let k = 0; k < nodes.length; k++) level.solution[nodes[k]] += shares[k] * volts;
    level.floatingSolution[f] += volts;
  }
  if (large) yield;
  relaxFloating(level, [...order].reverse());
  tieSource(level, 1);
  for (const colour of [...COLOURS].reverse()) relaxColour(level, colour);
  tieSource(level, -1);
  if (large) yield;
}
