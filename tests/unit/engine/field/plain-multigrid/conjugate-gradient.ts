import { applyLevel } from "./level";
import { cycle, type Hierarchy } from "./multigrid";

/** A right-hand side or a solution: padded grid values and one value for each floating conductor. */
export interface SystemVector {
  readonly grid: Float64Array;
  readonly floating: Float64Array;
}

export interface SolveRecord {
  readonly iterations: number;
  /** Error energy over first energy, as a root: the size of the error relative to the field, measured by the power. */
  readonly relativeResidual: number;
}

const dot = (a: SystemVector, b: SystemVector): number => {
  let sum = 0;
  for (let n = 0; n < a.grid.length; n++) sum += a.grid[n] * b.grid[n];
  for (let f = 0; f < a.floating.length; f++) sum += a.floating[f] * b.floating[f];
  return sum;
};

/** y += factor · x */
function add(y: SystemVector, factor: number, x: SystemVector): void {
  for (let n = 0; n < y.grid.length; n++) y.grid[n] += factor * x.grid[n];
  for (let f = 0; f < y.floating.length; f++) y.floating[f] += factor * x.floating[f];
}

const emptyLike = (one: SystemVector): SystemVector => ({
  grid: new Float64Array(one.grid.length),
  floating: new Float64Array(one.floating.length),
});

/** Tries at most this often; a network of 1000 : 1 contrasts needs about 30 iterations. */
const MOST_ITERATIONS = 200;

/**
 * Conjugate gradients preconditioned by one V-cycle (Hestenes & Stiefel 1952; O. Tatebe 1993 for the combination).
 * @param tolerance stops when the error, measured by its power, is this share of the field's.
 * @param start a first guess, or null to start from zero; overwritten with the solution.
 * @returns the solution, its residual, and how it went. Yields now and then so that a caller can stop or pause it.
 */
export function* conjugateGradient(
  hierarchy: Hierarchy,
  source: SystemVector,
  tolerance: number,
  start: SystemVector | null,
): Generator<void, { solution: SystemVector; residual: SystemVector; record: SolveRecord }> {
  const finest = hierarchy.levels[0];
  const solution = start ?? emptyLike(source);
  const residual: SystemVector = { grid: Float64Array.from(source.grid), floating: Float64Array.from(source.floating) };
  const image = emptyLike(source);
  const precondition = function* (): Generator<void, SystemVector> {
    finest.source.set(residual.grid);
    finest.floatingSource.set(residual.floating);
    yield* cycle(hierarchy);
    return { grid: finest.solution, floating: finest.floatingSolution };
  };
  let reference = 0;
  if (start !== null) {
    reference = dot(residual, yield* precondition());
    applyLevel(finest, solution.grid, solution.floating, image.grid, image.floating);
    add(residual, -1, image);
  }
  const direction = emptyLike(source);
  let energy = 0;
  let iterations = 0;
  for (; iterations < MOST_ITERATIONS; iterations++) {
    const step = yield* precondition();
    const next = dot(residual, step);
    if (iterations === 0 && start === null) reference = next;
    if (!(next > tolerance * tolerance * reference)) {
      energy = next;
      break;
    }
    const ratio = iterations === 0 ? 0 : next / energy;
    energy = next;
    for (let n = 0; n < direction.grid.length; n++) direction.grid[n] = step.grid[n] + ratio * direction.grid[n];
    for (let f = 0; f < direction.floating.length; f++) direction.floating[f] = step.floating[f] + ratio * direction.floating[f];
    yield;
    applyLevel(finest, direction.grid, direction.floating, image.grid, image.floating);
    const length = energy / dot(direction, image);
    add(solution, length, direction);
    add(residual, -length, image);
    yield;
  }
  return { solution, residual, record: { iterations, relativeResidual: reference > 0 ? Math.sqrt(Math.max(0, energy) / reference) : 0 } };
}
