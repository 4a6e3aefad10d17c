import type { CircuitNumbers, ElectrodeCurrent } from "../../../shared-types/bench";
import type { Electrode, Setup } from "../../../shared-types/setup";
import type { FieldFacts } from "./field-facts";
import { wettedFaceMm2 } from "./wetted-face";

const MM2_PER_M2 = 1e6;

/** @returns the volts between the lowest and the highest tap, at the terminals. */
export function terminalSpanVolts(setup: Setup): number {
  const taps = setup.parts.filter((part): part is Electrode => part.role === "electrode").map((part) => part.tap);
  return taps.length === 0 ? 0 : setup.supply.volts * (Math.max(...taps) - Math.min(...taps));
}

/**
 * Resistance, current and power of the tray: Ohm's law, and Σ V·I over the electrodes where there are more than two. The volts
 * lost at the surfaces are left out, so that current and power are upper bounds.
 */
export function circuitNumbers(setup: Setup, facts: FieldFacts): CircuitNumbers {
  const wired = facts.conductors.filter((conductor) => conductor.role === "electrode");
  const leaving = wired.filter((electrode) => electrode.currentA > 0);
  const total = leaving.reduce((sum, electrode) => sum + electrode.currentA, 0);
  const totalError = leaving.reduce((sum, electrode) => sum + electrode.currentErrorA, 0);
  const power = wired.reduce((sum, electrode) => sum + electrode.volts * electrode.currentA, 0);
  const span = facts.spanV[1] - facts.spanV[0];
  const electrodes = wired.map((electrode): ElectrodeCurrent => {
    const part = setup.parts.find((candidate) => candidate.id === electrode.id);
    const wettedAreaMm2 = part === undefined ? 0 : wettedFaceMm2(setup, part);
    return {
      id: electrode.id,
      volts: electrode.volts,
      currentA: electrode.currentA,
      shareOfTotal: total > 0 ? electrode.currentA / total : 0,
      wettedAreaMm2,
      meanCurrentDensityAPerM2: wettedAreaMm2 > 0 ? (Math.abs(electrode.currentA) * MM2_PER_M2) / wettedAreaMm2 : 0,
      largestCurrentDensityAPerM2: electrode.largestCurrentDensityAPerM2,
    };
  });
  return {
    volts: terminalSpanVolts(setup),
    resistanceOhm: facts.resistanceOhm,
    shapeFactor: facts.shapeFactor,
    effectiveResistanceOhm: total > 0 && span > 0 ? span / total : null,
    currentA: { value: total, error: totalError },
    powerW: { value: power, error: totalError * span },
    currentLimitA: setup.supply.currentLimitA,
    shareOfLimit: total / setup.supply.currentLimitA,
    electrodes,
    largestCurrentDensityAPerM2: electrodes.reduce((most, electrode) => Math.max(most, electrode.largestCurrentDensityAPerM2), 0),
  };
}
