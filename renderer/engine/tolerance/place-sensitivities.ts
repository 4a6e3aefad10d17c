import type { Setup } from "../../../shared-types/setup";
import type { PartSensitivity, PlaceSensitivities } from "../../../shared-types/tolerance";
import type { SensitivityField } from "./sensitivity-field";

/** The electrodes' potentials by their order in a sensitivity field, V. */
export function electrodeVolts(setup: Setup, electrodes: readonly string[]): readonly number[] {
  const taps = new Map(setup.parts.map((part) => [part.id, part.role === "electrode" ? part.tap : 0]));
  return electrodes.map((id) => setup.supply.volts * (taps.get(id) ?? 0));
}

const weighted = (values: readonly number[], weights: readonly number[]): number =>
  values.reduce((sum, value, index) => sum + value * weights[index], 0);

/**
 * How the potential at a place of the water or metal changes, with its sign, when a part is displaced or turned, the bed tilts, the
 * water deepens, or an electrode's potential changes.
 * @param field of this setup's geometry; volts and taps are the setup's own.
 */
export function placeSensitivities(setup: Setup, field: SensitivityField, xMm: number, yMm: number): PlaceSensitivities {
  const volts = electrodeVolts(setup, field.electrodes);
  const changes = field.changesAt(xMm, yMm).map((change) => weighted(change, volts));
  const of = (key: string, partId: string | null): number => {
    const index = field.perturbations.findIndex((one) => one.key === key && one.partId === partId);
    return index < 0 ? 0 : changes[index];
  };
  const units = field.unitsAt(xMm, yMm);
  return {
    xMm,
    yMm,
    parts: setup.parts.map(
      ({ id }): PartSensitivity => ({
        partId: id,
        alongXVPerMm: of("part-x", id),
        alongYVPerMm: of("part-y", id),
        turnVPerDeg: of("part-turn", id),
      }),
    ),
    tiltXVPerDeg: of("tilt-x", null),
    tiltYVPerDeg: of("tilt-y", null),
    depthVPerMm: of("depth", null),
    electrodes: field.electrodes.map((partId, index) => ({ partId, voltsPerVolt: units[index] })),
  };
}
