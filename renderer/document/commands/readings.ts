import type { FoundPlace, Reading, ReadingRun } from "../../../shared-types/readings";
import { samePlace } from "../../../shared-types/readings";
import type { Setup } from "../../../shared-types/setup";
import { setupId } from "../../../shared-types/setup-id";
import { texts } from "../../texts/texts";
import type { Edit } from "../edit";

/** Edits of the readings: runs, what was read at the points, and places that were found. */

const words = texts.document.steps.readings;

/** @returns the runs of a setup, none where nothing was measured. */
export const runsOf = (setup: Setup): readonly ReadingRun[] => setup.readings?.runs ?? [];

const withRuns = (setup: Setup, runs: readonly ReadingRun[]): Setup => {
  const { readings: _, ...layout } = setup;
  return runs.length === 0 ? layout : { ...layout, readings: { version: 1, runs } };
};

const changed = (setup: Setup, id: string, change: (run: ReadingRun) => ReadingRun): Setup =>
  withRuns(
    setup,
    runsOf(setup).map((run) => (run.id === id ? change(run) : run)),
  );

/** @returns the smallest `run-1`, `run-2` … that no run has. */
export function freshRunId(setup: Setup): string {
  const taken = new Set(runsOf(setup).map(({ id }) => id));
  for (let number = 1; ; number++) if (!taken.has(`run-${number}`)) return `run-${number}`;
}

/** A run that holds nothing yet, on the setup's present layout. */
const emptyRun = (setup: Setup, id: string, name: string, takenOn: string): ReadingRun => ({
  id,
  name,
  takenBy: runsOf(setup).at(-1)?.takenBy ?? "",
  takenOn,
  setupId: setupId(setup),
  readings: [],
  found: [],
});

/**
 * @param takenOn the day as it is to be printed; the document reads no clock.
 * @returns a further run, empty.
 */
export const addRun = (id: string, name: string, takenOn: string): Edit => ({
  name: "readings-add-run",
  label: words.addRun(name),
  apply: (setup) => withRuns(setup, [...runsOf(setup), emptyRun(setup, id, name, takenOn)]),
});

/** @returns the run without it; without the last one the setup has no readings at all. */
export const removeRun = (id: string, name: string): Edit => ({
  name: "readings-remove-run",
  label: words.removeRun(name),
  apply: (setup) =>
    withRuns(
      setup,
      runsOf(setup).filter((run) => run.id !== id),
    ),
});

/** @returns the run's name, and who took it when. */
export const describeRun = (id: string, change: Partial<Pick<ReadingRun, "name" | "takenBy" | "takenOn">>): Edit => ({
  name: "readings-describe-run",
  label: change.name === undefined ? words.describeRun : words.renameRun(change.name),
  apply: (setup) => changed(setup, id, (run) => ({ ...run, ...change })),
});

/** A reading taken again keeps its turn in the order. */
function withReading(run: ReadingRun, reading: Reading): ReadingRun {
  const known = run.readings.some((one) => samePlace(one, reading));
  const readings = known ? run.readings.map((one) => (samePlace(one, reading) ? reading : one)) : [...run.readings, reading];
  return { ...run, readings };
}

const holds = (setup: Setup, id: string, reading: Reading): boolean =>
  runsOf(setup)
    .find((run) => run.id === id)
    ?.readings.some((one) => samePlace(one, reading) && one.volts === reading.volts && one.n === reading.n) ?? false;

/** @returns one reading entered, or entered anew. */
export const enterReading = (id: string, reading: Reading): Edit => ({
  name: "readings-enter",
  label: words.enter(reading.n),
  apply: (setup) => (holds(setup, id, reading) ? setup : changed(setup, id, (run) => withReading(run, reading))),
});

/** @returns the reading at a place taken back. */
export const clearReading = (id: string, place: Pick<Reading, "n" | "xMm" | "yMm">): Edit => ({
  name: "readings-clear",
  label: words.clear(place.n),
  apply: (setup) =>
    runsOf(setup).some((run) => run.id === id && run.readings.some((one) => samePlace(one, place)))
      ? changed(setup, id, (run) => ({ ...run, readings: run.readings.filter((one) => !samePlace(one, place)) }))
      : setup,
});

/** @returns readings and found places of a table taken over, as one step. */
export const takeReadings = (id: string, readings: readonly Reading[], found: readonly FoundPlace[]): Edit => ({
  name: "readings-take",
  label: words.take(readings.length + found.length),
  apply: (setup) =>
    changed(setup, id, (run) => {
      const taken = readings.reduce(withReading, run);
      return { ...taken, found: [...taken.found, ...found] };
    }),
});

/** @returns a found place less, by its place in the list. */
export const removeFound = (id: string, index: number): Edit => ({
  name: "readings-remove-found",
  label: words.removeFound,
  apply: (setup) => changed(setup, id, (run) => ({ ...run, found: run.found.filter((_, at) => at !== index) })),
});

/** @returns everything that a run holds taken back; the run stays. */
export const clearRun = (id: string, name: string): Edit => ({
  name: "readings-clear-run",
  label: words.clearRun(name),
  apply: (setup) => changed(setup, id, (run) => ({ ...run, readings: [], found: [] })),
});
