import type { Kernels } from "./kernels/kernels";

export interface SolveRecord {
  readonly iterations: number;
  /** Error energy over first energy, as a root: the size of the error relative to the field, measured by the power. */
  readonly relativeResidual: number;
}

/** Tries at most this often; a network of 1000 : 1 contrasts needs about 30 iterations. */
const MOST_ITERATIONS = 200;

/**
 * Conjugate gradients preconditioned by one multigrid V-cycle (Hestenes & Stiefel 1952; O. Tatebe 1993 for the combination),
 * on kernels that hold a network and in which a solve has begun. The gradients run in double precision, the cycle in single.
 * @param tolerance stops when the error, measured by its power, is this share of the field's.
 * @param guessed whether a first guess lies in the direction.
 * @returns how it went; the solution is left in the kernels. Yields between its steps (`pauses`) or between iterations.
 */
export function* conjugateGradient(kernels: Kernels, tolerance: number, guessed: boolean, pauses: boolean): Generator<void, SolveRecord> {
  function* precondition(advances: boolean, step: number): Generator<void, number> {
    kernels.descend(advances, step);
    if (pauses) yield;
    kernels.cycleBelow();
    if (pauses) yield;
    const energy = kernels.ascend();
    yield;
    if (!Number.isFinite(energy)) throw new Error("the network's conductances are not finite: the field cannot be solved");
    return energy;
  }
  // The power of a guess near the solution is the field's own to second order in the guess's error.
  let reference = guessed ? kernels.residualTimesDirection() : 0;
  if (guessed) kernels.multiply();
  let energy = yield* precondition(guessed, 1);
  if (!(reference > 0)) reference = energy;
  let ratio = 0;
  let iterations = 0;
  while (energy > tolerance * tolerance * reference && iterations < MOST_ITERATIONS) {
    const length = energy / kernels.turn(ratio);
    if (pauses) yield;
    const next = yield* precondition(true, length);
    ratio = next / energy;
    energy = next;
    iterations++;
  }
  return { iterations, relativeResidual: reference > 0 ? Math.sqrt(Math.max(0, energy) / reference) : 0 };
}
