import type { DrawTask } from "../engine/tolerance/draws";

/** What the window asks of a drawing worker: these draws of a task. */
export interface DrawRequest {
  readonly task: DrawTask;
  readonly first: number;
  readonly count: number;
}

/** A row of readings as soon as its draw is solved, or a fault of ours. */
export type DrawAnswer = { readonly draw: number; readonly row: Float64Array } | { readonly fault: string };
