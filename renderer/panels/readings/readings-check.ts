import type { Plan, ProbePlan, ProbePoint } from "../../../shared-types/plan";
import type { Diagnosis, JudgedRun, ReadingRun, ReadTable } from "../../../shared-types/readings";
import type { Setup } from "../../../shared-types/setup";
import { runsOf } from "../../document/commands/readings";

/** What the Readings desk asks of those who know the engine. */
export interface ReadingsCheck {
  /** The plan's points in the order of their numbers. */
  readonly pointsOf: (probing: ProbePlan) => readonly ProbePoint[];
  readonly judge: (run: ReadingRun, plan: Plan) => JudgedRun;
  readonly readTable: (text: string, points: readonly ProbePoint[], from?: number) => ReadTable;
  readonly readingsCsv: (run: JudgedRun) => string;
  readonly foundPlacesCsv: (run: JudgedRun) => string;
  /** Which fault explains a run; null when it was stopped. */
  readonly diagnose: (
    setup: Setup,
    plan: Plan,
    run: JudgedRun,
    onProgress: (share: number) => void,
    signal: AbortSignal,
  ) => Promise<Diagnosis | null>;
}

/** @returns the run on show: the chosen one, else the newest; null where there is none. */
export function shownRun(setup: Setup, chosen: string | null): ReadingRun | null {
  const runs = runsOf(setup);
  return runs.find(({ id }) => id === chosen) ?? runs.at(-1) ?? null;
}

/** @returns today as a run keeps it, YYYY-MM-DD. */
export function todayIso(now: Date): string {
  const two = (value: number): string => String(value).padStart(2, "0");
  return `${now.getFullYear()}-${two(now.getMonth() + 1)}-${two(now.getDate())}`;
}

/** Digits that the meter shows on the range in use. */
export const decimalsOf = (digitVolts: number): number => Math.max(0, Math.ceil(-Math.log10(digitVolts) - 1e-9));
