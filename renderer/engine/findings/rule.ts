import type { BenchNumbers } from "../../../shared-types/bench";
import type { Finding, ProbePlan } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import type { FieldFacts } from "../bench/field-facts";

/** What a rule that needs the solved field may look at. */
export interface Findable {
  readonly setup: Setup;
  readonly bench: BenchNumbers;
  readonly field: FieldFacts;
  readonly probing: ProbePlan;
}

/** A rule that needs no field. One rule may find several things, or none. */
export type SetupRule = (setup: Setup) => readonly Finding[];
/** A rule that reads the solved field, the bench numbers or the probe plan. */
export type PlanRule = (found: Findable) => readonly Finding[];
