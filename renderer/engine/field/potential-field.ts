import type { ConductorReading, FieldPicture, FieldReading, Numerics } from "../../../shared-types/plan";

/**
 * A solved field at given volts and taps: what line tracing, the probe plan, the bench and the findings read.
 * Immutable; made by superposition, so that another voltage is another cheap `PotentialField` of the same solution.
 */
export interface PotentialField {
  readonly numerics: Numerics;
  /** Lowest and highest electrode potential, V. */
  readonly spanV: readonly [number, number];
  readonly picture: FieldPicture;
  readonly conductors: readonly ConductorReading[];
  /** The field at a place of the tray (mm), to the full accuracy of the solution. Never throws; outside the tray `volts` is null. */
  readonly read: (xMm: number, yMm: number) => FieldReading;
}
