/**
 * Cases with answers from outside this program. Exact ones name their formula; the others were computed with FreeFEM
 * (P2 elements on adapted meshes, an independent finite-element program), whose own uncertainty stands in the file.
 */
export interface ReferenceCase {
  readonly id: string;
  /** Where the answer comes from. */
  readonly how: string;
  readonly setup: unknown;
  readonly expected: {
    readonly shapeFactor?: number;
    readonly shapeFactorUncertainty?: number;
    readonly conductors?: readonly { readonly id: string; readonly volts: number; readonly currentPerSigmaH: number }[];
    readonly currentUncertainty?: number;
    /** x, y (mm) and volts. */
    readonly at?: readonly (readonly [number, number, number])[];
    readonly voltsUncertainty?: number;
  };
}

/** Every case of the folder `cases`, by name. */
export const REFERENCE_CASES: readonly ReferenceCase[] = Object.entries(
  import.meta.glob<ReferenceCase>("./cases/*.json", { eager: true, import: "default" }),
)
  .sort(([a], [b]) => (a < b ? -1 : 1))
  .map(([, one]) => one);
