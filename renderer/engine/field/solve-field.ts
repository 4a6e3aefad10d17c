import type { Quality } from "../../../shared-types/plan";
import { discretise } from "./discretise";
import { type FittedNetwork, fitContacts } from "./fit";
import { type Grid, gridOfPitch, halved } from "./grid";
import type { FieldLayout } from "./layout";
import { pitchOf } from "./pitch";
import { type ReadingMap, readingMap } from "./reading";
import { createSolverMemory, type SolverMemory } from "./solver-memory";
import { FINE_TOLERANCE, LIVE_TOLERANCE, type SolveOptions, solveUnitPotentials, type UnitPotentials } from "./unit-potentials";

/** One grid with everything that was solved on it. */
export interface SolvedGrid {
  readonly network: FittedNetwork;
  readonly units: UnitPotentials;
  readonly map: ReadingMap;
}

/** A solved geometry: good for any volts, taps and conductivity. */
export interface FieldSolution {
  readonly layout: FieldLayout;
  readonly quality: Quality;
  readonly fine: SolvedGrid;
  /** The same at twice the pitch: the difference is what the error bounds are made of. */
  readonly coarse: SolvedGrid;
}

function* solveGrid(layout: FieldLayout, grid: Grid, options: SolveOptions): Generator<void, SolvedGrid> {
  const plain = yield* discretise(layout, grid);
  yield;
  const network = yield* fitContacts(plain);
  yield;
  const units = yield* solveUnitPotentials(network, options);
  return { network, units, map: readingMap(network) };
}

/**
 * Solves a layout on the grid of a quality and on the next coarser one.
 * The layout needs at least one electrode, and no two conductors may overlap (the caller checks).
 * Yields every few milliseconds so that a caller can stop or pause it.
 * @param onProgress told the share of the work done, 0 to 1.
 * @param memory kept by a caller who solves again and again, as while a part is dragged.
 */
export function* solveField(
  layout: FieldLayout,
  quality: Quality,
  onProgress: (share: number) => void = () => {},
  memory: SolverMemory = createSolverMemory(),
): Generator<void, FieldSolution> {
  const { tray } = layout.setup;
  const grid = gridOfPitch(tray, pitchOf(layout, quality));
  const live = quality === "live";
  const options = { tolerance: live ? LIVE_TOLERANCE : FINE_TOLERANCE, memory, followsOn: live };
  const coarse = yield* solveGrid(layout, halved(grid), { ...options, onSolved: (share) => onProgress(0.2 * share) });
  const fine = yield* solveGrid(layout, grid, { ...options, onSolved: (share) => onProgress(0.2 + 0.8 * share) });
  return { layout, quality, fine, coarse };
}
