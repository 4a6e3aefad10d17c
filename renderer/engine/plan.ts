import type { FieldReading, PlanOutcome, Quality } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";

/** How a caller watches a plan being made and stops it. */
export interface PlanOptions {
  readonly onProgress?: (fraction: number) => void;
  readonly signal?: AbortSignal;
  /** Lets the caller's other work run; awaited every few milliseconds of computing. Absent: the plan is made in one go. */
  readonly breathe?: () => Promise<void>;
  /** A clock in ms for `numerics.elapsedMs`; absent: 0 is reported. */
  readonly now?: () => number;
}

/** Makes plans and keeps the newest solved fields, so that volts, taps and probing settings start no solve. */
export interface Planner {
  readonly plan: (setup: Setup, quality: Quality, options?: PlanOptions) => Promise<PlanOutcome>;
  /** Readings from the newest field of this setup's geometry; null when none was planned. */
  readonly sample: (setup: Setup, placesMm: readonly (readonly [number, number])[]) => readonly FieldReading[] | null;
}

/** @returns a planner with an empty memory. */
export function createPlanner(): Planner {
  return {
    plan: async () => ({ ok: false, refusal: { code: "not-built", message: "the field engine is not built yet", partIds: [], findings: [] } }),
    sample: () => null,
  };
}

/**
 * The only door of the engine: everything that follows from a setup.
 * @returns the plan, or why a valid setup has none. Rejects with an `AbortError` when `signal` is aborted.
 */
export function planSetup(setup: Setup, quality: Quality, options: PlanOptions = {}): Promise<PlanOutcome> {
  return createPlanner().plan(setup, quality, options);
}
