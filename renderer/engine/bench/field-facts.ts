import type { Bounded } from "../../../shared-types/plan";
import type { PotentialField } from "../field/potential-field";

/** What the bench needs to know of a solved field; a `PotentialField` with its resistance and shape factor fits. */
export interface FieldFacts extends Pick<PotentialField, "spanV" | "conductors" | "picture"> {
  /** Between the lowest and the highest tap; null where the electrodes sit at more than two potentials. */
  readonly resistanceOhm: Bounded | null;
  readonly shapeFactor: Bounded | null;
  /** Ids of electrodes that nothing joins to an electrode at another tap. */
  readonly cutOff: readonly string[];
  /** Ids of floating conductors whose potential is undetermined, and whether some water's is too. */
  readonly undetermined: { readonly ids: readonly string[]; readonly water: boolean };
}
