import type { FieldReading, Plan, PlanOutcome, ProbePlan, Quality } from "./plan";
import type { Setup } from "./setup";

/** What the window asks of the field worker. A newer `plan` request makes the older ones void. */
export type WorkerRequest =
  | { readonly kind: "plan"; readonly requestId: number; readonly setup: Setup; readonly quality: Quality }
  /** Readings at places in the tray, from the newest planned field of that very setup's geometry. */
  | {
      readonly kind: "sample";
      readonly requestId: number;
      readonly setup: Setup;
      readonly placesMm: readonly (readonly [number, number])[];
    }
  /** The probe plan with the whole tolerance of its points. Void as soon as another plan is asked for. */
  | { readonly kind: "bands"; readonly requestId: number; readonly setup: Setup; readonly plan: Pick<Plan, "probing" | "bench"> };

/** What the field worker answers. */
export type WorkerAnswer =
  | { readonly kind: "planned"; readonly requestId: number; readonly outcome: PlanOutcome }
  /** The request was overtaken by a newer one. */
  | { readonly kind: "abandoned"; readonly requestId: number }
  | { readonly kind: "progress"; readonly requestId: number; readonly fraction: number }
  | { readonly kind: "sampled"; readonly requestId: number; readonly readings: readonly FieldReading[] | null }
  | { readonly kind: "banded"; readonly requestId: number; readonly probing: ProbePlan }
  /** A fault of ours; the window restarts the worker when it repeats. */
  | { readonly kind: "fault"; readonly requestId: number; readonly message: string };
