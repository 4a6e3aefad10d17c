import type { CircuitNumbers, Estimate, HeatNumbers, WaterNumbers } from "../../../shared-types/bench";
import type { Setup } from "../../../shared-types/setup";
import { metres } from "../../../shared-types/units";
import { WATER_DENSITY_KG_PER_M3, WATER_EVAPORATION_J_PER_KG, WATER_SPECIFIC_HEAT_J_PER_KG_K } from "./physical-constants";
import { shareAtTemperature } from "./water-conductivity";

const SECONDS_PER_HOUR = 3600;
/** Heat that a shallow tray loses by evaporation in a room at 22 °C and 50 % humidity, W/m²: derived, an estimate. */
const EVAPORATION_W_PER_M2: Estimate = { low: 60, typical: 90, high: 120 };

/** @returns rise of temperature in K per hour when all power stays in the water: P/(ρ c V). */
export function riseKPerHour(powerW: number, volumeL: number): number {
  const massKg = (volumeL / 1000) * WATER_DENSITY_KG_PER_M3;
  return massKg > 0 ? (powerW * SECONDS_PER_HOUR) / (massKg * WATER_SPECIFIC_HEAT_J_PER_KG_K) : 0;
}

/** @returns relative change of conductivity when the water warms by `riseK`. */
export function conductivityDrift(salt: string, temperatureC: number, riseK: number): number {
  return shareAtTemperature(salt, temperatureC + riseK) / shareAtTemperature(salt, temperatureC) - 1;
}

/** @returns heating over the session and the drift that it brings, and what evaporation takes meanwhile. */
export function heatNumbers(setup: Setup, circuit: CircuitNumbers, water: WaterNumbers): HeatNumbers {
  const hours = setup.session.minutes / 60;
  const perHour = riseKPerHour(circuit.powerW.value, water.volumePerTrayL.value);
  const rise = perHour * hours;
  const drift = conductivityDrift(setup.water.salt, setup.water.temperatureC, rise);
  const each = (of: (wattsPerM2: number) => number): Estimate => ({
    low: of(EVAPORATION_W_PER_M2.low),
    typical: of(EVAPORATION_W_PER_M2.typical),
    high: of(EVAPORATION_W_PER_M2.high),
  });
  const seconds = hours * SECONDS_PER_HOUR;
  const perAreaKg = WATER_DENSITY_KG_PER_M3 * metres(setup.water.depthMm);
  return {
    riseKPerHour: perHour,
    riseOverSessionK: rise,
    conductivityDrift: drift,
    // At fixed volts the current follows the conductivity.
    currentDrift: drift,
    evaporationMm: each((watts) => ((watts * seconds) / (WATER_EVAPORATION_J_PER_KG * WATER_DENSITY_KG_PER_M3)) * 1000),
    evaporationCoolingKPerHour: each((watts) => (watts * SECONDS_PER_HOUR) / (perAreaKg * WATER_SPECIFIC_HEAT_J_PER_KG_K)),
  };
}
