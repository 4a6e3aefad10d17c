import type { WaterKind, WaterNumbers } from "../../../shared-types/bench";
import type { Bounded } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import { conductivitySPerM } from "../../../shared-types/units";
import { saltDose } from "./salt-to-add";
import {
  changePerKelvin,
  conductivityAtTemperatureSPerM,
  isSaltSolution,
  NATURAL_WATER_RANGE_C,
  SALT_SOLUTION_RANGE_C,
} from "./water-conductivity";
import { depthRangeMm } from "./water-geometry";
import { waterExtent } from "./water-volume";

const MM3_PER_LITRE = 1e6;

/** Upper ends of the kinds of water, µS/cm at 25 °C: distilled 0.5–5, tap 50–800, drinking water up to 2790 (EU), sea about 50 000. */
export const DISTILLED_BELOW_US_PER_CM = 10;
export const TAP_ABOVE_US_PER_CM = 50;
export const DRINKING_LIMIT_US_PER_CM = 2790;
export const BRINE_ABOVE_US_PER_CM = 20_000;

/** @returns what sort of water a conductivity (µS/cm at 25 °C) speaks of. */
export function waterKind(conductivityUsPerCm: number): WaterKind {
  if (conductivityUsPerCm < DISTILLED_BELOW_US_PER_CM) return "distilled";
  if (conductivityUsPerCm < TAP_ABOVE_US_PER_CM) return "low";
  if (conductivityUsPerCm <= DRINKING_LIMIT_US_PER_CM) return "tap";
  return conductivityUsPerCm <= BRINE_ABOVE_US_PER_CM ? "salty" : "brine";
}

const scaled = (bound: Bounded, factor: number): Bounded => ({ value: bound.value * factor, error: bound.error * factor });

/** @returns everything about the water itself: conductivity, volume, depths, salt. */
export function waterNumbers(setup: Setup): WaterNumbers {
  const { conductivityUsPerCm, salt, temperatureC, targetConductivityUsPerCm } = setup.water;
  const { trays } = setup.session;
  const extent = waterExtent(setup);
  const volume = scaled(extent.volumeMm3, 1 / MM3_PER_LITRE);
  const [coolest, warmest] = isSaltSolution(salt) ? SALT_SOLUTION_RANGE_C : NATURAL_WATER_RANGE_C;
  const [shallowestMm, deepestMm] = depthRangeMm(setup);
  return {
    kind: waterKind(conductivityUsPerCm),
    conductivityAt25SPerM: conductivitySPerM(conductivityUsPerCm),
    conductivitySPerM: conductivityAtTemperatureSPerM(setup),
    temperatureRule: isSaltSolution(salt) ? "salt solution" : "natural water",
    withinTemperatureRange: temperatureC >= coolest && temperatureC <= warmest,
    changePerKelvin: changePerKelvin(salt, temperatureC),
    surfaceMm2: extent.surfaceMm2,
    dryBedMm2: extent.dryBedMm2,
    volumePerTrayL: volume,
    volumeAllTraysL: scaled(volume, trays),
    shallowestMm,
    deepestMm,
    saltFromPure: saltDose(0, conductivityUsPerCm, volume.value, trays),
    saltToTarget:
      targetConductivityUsPerCm === undefined || targetConductivityUsPerCm <= conductivityUsPerCm
        ? null
        : saltDose(conductivityUsPerCm, targetConductivityUsPerCm, volume.value, trays),
  };
}
