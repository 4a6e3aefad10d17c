import { LARGEST_TABULATED_MOL_PER_LITRE, saltDose } from "../bench/salt-to-add";
import { DISTILLED_BELOW_US_PER_CM } from "../bench/water";
import { isSaltSolution, NATURAL_WATER_RANGE_C, SALT_SOLUTION_RANGE_C } from "../bench/water-conductivity";
import { DISTILLED, NEEDLESS_CONDUCTIVITY } from "./limits";
import type { SetupRule } from "./rule";
import { finding, shown } from "./wording";

/** Water too pure to read in, or so salty that current is wasted. */
export const waterKindFits: SetupRule = (setup) => {
  const { conductivityUsPerCm } = setup.water;
  const measured = `${shown(conductivityUsPerCm, 4)} µS/cm`;
  if (conductivityUsPerCm < DISTILLED_BELOW_US_PER_CM) {
    return [
      finding({
        code: "water-distilled",
        severity: "caution",
        about: "water.conductivityUsPerCm",
        message: `Water of ${measured} is nearly distilled: readings float and follow every breath of carbon dioxide.`,
        measured,
        limit: DISTILLED,
        remedy: "Use tap water, or add a pinch of salt and measure the conductivity again.",
      }),
    ];
  }
  if (conductivityUsPerCm > NEEDLESS_CONDUCTIVITY.value) {
    return [
      finding({
        code: "water-brine",
        severity: "note",
        about: "water.conductivityUsPerCm",
        message: `Water of ${measured} is salty: it draws needless current and the electrodes' surfaces take more of the volts.`,
        measured,
        limit: NEEDLESS_CONDUCTIVITY,
        remedy: "Use tap water, or dilute it.",
      }),
    ];
  }
  return [];
};

/** A temperature outside the range of the published correction. */
export const waterTemperature: SetupRule = (setup) => {
  const { temperatureC, salt } = setup.water;
  const [low, high] = isSaltSolution(salt) ? SALT_SOLUTION_RANGE_C : NATURAL_WATER_RANGE_C;
  if (temperatureC >= low && temperatureC <= high) return [];
  return [
    finding({
      code: "temperature-beyond-table",
      severity: "note",
      about: "water.temperatureC",
      message: `At ${shown(temperatureC)} °C the conductivity is carried beyond the published correction; current and resistance are rougher for it.`,
      measured: `${shown(temperatureC)} °C`,
      limit: {
        text: `${low} to ${high} °C`,
        source: isSaltSolution(salt) ? "2.1 %/K about 25 °C for NaCl" : "ISO 7888 (EN 27888)",
      },
      remedy: "Let the water come to the temperature of the room and measure it.",
    }),
  ];
};

/** A dose of salt beyond the published data. */
export const saltBeyondData: SetupRule = (setup) => {
  const { targetConductivityUsPerCm: target, conductivityUsPerCm } = setup.water;
  if (target === undefined || target <= conductivityUsPerCm) return [];
  const dose = saltDose(conductivityUsPerCm, target, 1, 1);
  if (dose.withinData) return [];
  return [
    finding({
      code: "salt-beyond-data",
      severity: "note",
      about: "water.targetConductivityUsPerCm",
      message: `${shown(target, 4)} µS/cm asks for more salt than the published data cover; the dose is a rough guide.`,
      measured: `${shown(target, 4)} µS/cm`,
      limit: { text: `${LARGEST_TABULATED_MOL_PER_LITRE} mol/L of NaCl`, source: "CRC Handbook, molar conductivity of NaCl at 25 °C" },
      remedy: "Add half of it, stir, and measure before adding more.",
    }),
  ];
};
