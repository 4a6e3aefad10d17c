import type { Setup } from "../../../shared-types/setup";
import { discretise } from "../field/discretise";
import { type FittedNetwork, fitContacts } from "../field/fit";
import { gridOfPitch, pitchFor } from "../field/grid";
import { fieldLayout } from "../field/layout";
import type { SolverMemory } from "../field/solver-memory";
import { LIVE_TOLERANCE, solveUnitPotentials, type UnitPotentials } from "../field/unit-potentials";

/** The field of a setup per volt of each electrode, on the pitch of a live picture: one grid, for differences, not for bounds. */
export interface UnitField {
  readonly network: FittedNetwork;
  readonly units: UnitPotentials;
}

/** A share of LIVE_TOLERANCE: what is wanted here is the small difference of two such fields. */
const TOLERANCE = LIVE_TOLERANCE / 10;

/**
 * Solves one setup on the common grid of a tray's tolerance study. Yields every few milliseconds.
 * @param memory hands out first guesses: fields of the same tray with its parts hardly moved.
 */
export function* solveUnitField(setup: Setup, memory: SolverMemory): Generator<void, UnitField> {
  const plain = yield* discretise(fieldLayout(setup), gridOfPitch(setup.tray, pitchFor(setup.tray, "live")));
  yield;
  const network = yield* fitContacts(plain);
  yield;
  const units = yield* solveUnitPotentials(network, { tolerance: TOLERANCE, memory, followsOn: true });
  return { network, units };
}

/** @returns the memory such that every solve starts from the first that was solved with it: results then hang on no order. */
export function fromFirstSolve(memory: SolverMemory): SolverMemory {
  let first = true;
  return {
    ...memory,
    remember: (columns, rows, guesses) => {
      if (first) memory.remember(columns, rows, guesses);
      first = false;
    },
  };
}
