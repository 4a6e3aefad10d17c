import type { SaltDose } from "../../../shared-types/bench";
import { conductivitySPerM } from "../../../shared-types/units";
import { SODIUM_CHLORIDE_G_PER_MOL } from "./physical-constants";

/** Largest concentration of the published table, mol/L. */
export const LARGEST_TABULATED_MOL_PER_LITRE = 0.1;

/**
 * Molar conductivity of NaCl at 25 °C, S cm²/mol. Our fit to the table of the CRC Handbook, within 0.09 % up to 0.1 mol/L
 * (126.39 at infinite dilution, 106.69 at 0.1 mol/L); beyond, an extrapolation.
 */
export function molarConductivity(molPerLitre: number): number {
  const root = Math.sqrt(molPerLitre);
  return 126.39 - (89.14 * root) / (1 + 1.343 * root);
}

/** @returns conductivity of an NaCl solution at 25 °C, S/m: κ = 0.1·Λ·c, with Λ in S cm²/mol and c in mol/L. */
export function saltConductivitySPerM(molPerLitre: number): number {
  return 0.1 * molarConductivity(molPerLitre) * molPerLitre;
}

/** @returns the NaCl concentration (mol/L) that conducts so well at 25 °C; the inverse of `saltConductivitySPerM`. */
export function saltConcentrationMolPerLitre(conductivityAt25SPerM: number): number {
  let low = 0;
  let high = 10;
  for (let step = 0; step < 80; step++) {
    const middle = (low + high) / 2;
    if (saltConductivitySPerM(middle) < conductivityAt25SPerM) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/**
 * Salt that raises a water's conductivity. The water is taken as the NaCl solution that conducts equally, which is how the mass
 * stays right for water that already holds salt; for tap water it is a good start, to be confirmed by the conductivity meter.
 * @returns the dose; zero where the target is not higher.
 */
export function saltDose(fromUsPerCm: number, toUsPerCm: number, litresPerTray: number, trays: number): SaltDose {
  const from = saltConcentrationMolPerLitre(conductivitySPerM(fromUsPerCm));
  const to = saltConcentrationMolPerLitre(conductivitySPerM(toUsPerCm));
  const molPerLitre = Math.max(0, to - from);
  const perTrayG = molPerLitre * SODIUM_CHLORIDE_G_PER_MOL * litresPerTray;
  return {
    fromUsPerCm,
    toUsPerCm,
    molPerLitre,
    perTrayG,
    allTraysG: perTrayG * trays,
    withinData: Math.max(from, to) <= LARGEST_TABULATED_MOL_PER_LITRE,
  };
}
