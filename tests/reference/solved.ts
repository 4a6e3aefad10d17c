import { conductivityAtTemperatureSPerM } from "../../renderer/engine/bench/water-conductivity";
import { fieldLayout } from "../../renderer/engine/field/layout";
import { solveField } from "../../renderer/engine/field/solve-field";
import { type SuperposedField, superposerOf } from "../../renderer/engine/field/superposition";
import { parseSetup } from "../../shared-types/parse-setup";
import type { Quality } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";

/** @returns the result of a computation that is driven without pause. */
export function finished<Value>(steps: Generator<void, Value>): Value {
  for (;;) {
    const step = steps.next();
    if (step.done === true) return step.value;
  }
}

/** @returns the setup of a test, validated; a fault of the test throws. */
export function soundSetup(data: unknown): Setup {
  const parsed = parseSetup(data);
  if (!parsed.ok) throw new Error(parsed.problems.map(({ message }) => message).join("; "));
  return parsed.value;
}

/** @returns the field of a setup at a quality. */
export function solved(setup: Setup, quality: Quality): SuperposedField {
  return superposerOf(finished(solveField(fieldLayout(setup), quality)))(setup, conductivityAtTemperatureSPerM(setup));
}

/** @returns the shape factor of a field between two potentials: flux over volts and depth at the tray's centre. */
export function shapeFactorOf(setup: Setup, field: SuperposedField): number {
  return field.totalFlux.value / ((field.spanV[1] - field.spanV[0]) * setup.water.depthMm);
}

export interface PartialSetup {
  readonly tray?: object;
  readonly water?: object;
  readonly supply?: object;
  readonly interface?: object;
  readonly parts: readonly object[];
}

/** @returns a setup of the tests: a 300 mm × 200 mm tray with 10 mm of water at 500 µS/cm and 6 V, overridden where said. */
export function trayWith({ tray, water, supply, parts, interface: surfaces }: PartialSetup): Setup {
  return soundSetup({
    format: "fieldtray.setup",
    version: 1,
    tray: tray ?? { shape: "rectangle", lengthMm: 300, widthMm: 200 },
    water: { depthMm: 10, conductivityUsPerCm: 500, ...water },
    supply: { waveform: "ac", volts: 6, ...supply },
    ...(surfaces === undefined ? {} : { interface: surfaces }),
    parts,
  });
}
