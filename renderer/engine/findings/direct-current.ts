import { holdsChloride } from "../bench/gas";
import { CHLORINE_CEILING, sourceOf } from "./limits";
import type { SetupRule } from "./rule";
import { finding, shown } from "./wording";

/** A remedy that turns DC into AC; none where the file holds no frequency. */
const toAlternating = (frequencyHz: number) => (frequencyHz > 0 ? { path: "supply.waveform", value: "ac" } : null);

/** DC polarises the electrodes: readings shift as time passes. */
export const directCurrentPolarises: SetupRule = (setup) => {
  const { waveform, volts, frequencyHz } = setup.supply;
  if (waveform === "ac") return [];
  const measured = `${shown(volts)} V DC`;
  return [
    finding({
      code: "dc-polarises",
      severity: "caution",
      about: "supply.waveform",
      message: `${measured} polarises the electrodes: volts are lost at the metal, and the readings drift as time passes.`,
      measured,
      limit: { text: "AC is preferred", source: "AC keeps the electrodes from polarising (common practice, no source)" },
      remedy: "Use AC; where it must be DC, measure the drop beside each electrode and read quickly.",
      edit: toAlternating(frequencyHz),
    }),
  ];
};

/** DC through chloride makes chlorine. */
export const chlorideWithDirectCurrent: SetupRule = (setup) => {
  const { waveform, frequencyHz } = setup.supply;
  if (waveform === "ac" || !holdsChloride(setup.water.salt)) return [];
  return [
    finding({
      code: "chloride-dc",
      severity: "stop",
      about: "supply.waveform",
      message: `Direct current through water with ${setup.water.salt} makes chlorine at the positive electrode.`,
      measured: `DC with ${setup.water.salt}`,
      limit: { text: "no chloride on DC", source: `${sourceOf(CHLORINE_CEILING)}: ${CHLORINE_CEILING.value} ${CHLORINE_CEILING.unit}` },
      remedy: "Use AC, or a salt without chloride; never DC with chloride.",
      edit: toAlternating(frequencyHz),
      safety: true,
    }),
  ];
};
