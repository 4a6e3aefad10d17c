import type { Setup } from "../../../shared-types/setup";
import { conductivitySPerM } from "../../../shared-types/units";

/** Rise of the conductivity of NaCl solutions per kelvin, as a share of the value at 25 °C. Published, about 25 °C. */
export const SALT_RISE_PER_KELVIN = 0.021;
/** Where ISO 7888 (EN 27888) tabulates natural water, °C. */
export const NATURAL_WATER_RANGE_C: readonly [number, number] = [0, 35];
/** Where the one coefficient of salt solutions is a fair description, °C: our own choice, a straight line about 25 °C. */
export const SALT_SOLUTION_RANGE_C: readonly [number, number] = [10, 40];

export const isSaltSolution = (salt: string): boolean => salt !== "none";

/**
 * Natural water: conductivity at a temperature as a share of that at 25 °C, 1/f₂₅ of ISO 7888 (EN 27888).
 * Our fit to the published table, within 0.05 % from 0 to 35 °C; beyond, an extrapolation.
 */
export function naturalWaterShare(temperatureC: number): number {
  const d = temperatureC - 25;
  return 1 + 0.021063 * d + 6.6555e-5 * d ** 2 - 4.037e-7 * d ** 3;
}

/** Salt solutions: conductivity at a temperature as a share of that at 25 °C, by the 2.1 %/K of NaCl. */
export function saltSolutionShare(temperatureC: number): number {
  return 1 + SALT_RISE_PER_KELVIN * (temperatureC - 25);
}

/** @returns conductivity at a temperature as a share of that at 25 °C, by the rule for this salt ("none": natural water). */
export function shareAtTemperature(salt: string, temperatureC: number): number {
  return isSaltSolution(salt) ? saltSolutionShare(temperatureC) : naturalWaterShare(temperatureC);
}

/**
 * What carries the current: the file states conductivity as a meter shows it, referred to 25 °C.
 * @returns conductivity at the water's own temperature, S/m; at 25 °C exactly the stated value.
 */
export function conductivityAtTemperatureSPerM(setup: Setup): number {
  const { conductivityUsPerCm, salt, temperatureC } = setup.water;
  return conductivitySPerM(conductivityUsPerCm) * shareAtTemperature(salt, temperatureC);
}

/** @returns relative change of conductivity per kelvin at the water's temperature (0.02 = 2 %/K). */
export function changePerKelvin(salt: string, temperatureC: number): number {
  const step = 0.01;
  const rise = shareAtTemperature(salt, temperatureC + step) - shareAtTemperature(salt, temperatureC - step);
  return rise / (2 * step) / shareAtTemperature(salt, temperatureC);
}
