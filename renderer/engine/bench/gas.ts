import type { AnodeLoss, CircuitNumbers, GasNumbers } from "../../../shared-types/bench";
import type { Setup } from "../../../shared-types/setup";
import { HYDROGEN_FLAMMABLE } from "../findings/limits";
import { electrodeMaterial } from "./electrode-materials";
import { ATMOSPHERE_PA, FARADAY_C_PER_MOL, GAS_CONSTANT_J_PER_MOL_K, KELVIN_AT_0_C } from "./physical-constants";

/** Electrons for one molecule. */
export const ELECTRONS = { hydrogen: 2, oxygen: 4, chlorine: 2 } as const;
const ML_PER_M3 = 1e6;

/** @returns gas volume (mL) that a charge makes: Q/(zF)·RT/p at the given temperature and one atmosphere (Faraday, ideal gas). */
export function gasMl(chargeC: number, electrons: number, temperatureC: number): number {
  const mol = chargeC / (electrons * FARADAY_C_PER_MOL);
  return ((mol * GAS_CONSTANT_J_PER_MOL_K * (KELVIN_AT_0_C + temperatureC)) / ATMOSPHERE_PA) * ML_PER_M3;
}

/** @returns metal (g) that a charge dissolves: Q·M/(zF) (Faraday). */
export function metalLostG(chargeC: number, gPerMol: number, electrons: number): number {
  return (chargeC * gPerMol) / (electrons * FARADAY_C_PER_MOL);
}

/** @returns whether a salt by this name brings chloride into the water. */
export function holdsChloride(salt: string): boolean {
  return /chlor|nacl|kcl|mgcl|cacl|sea|table|rock|common|brine/i.test(salt);
}

/**
 * What direct current makes over one session. Upper bounds: the whole charge is counted for every product, and nothing escapes
 * from hood or room.
 * @returns null on AC, where the double layers carry the current.
 */
export function gasNumbers(setup: Setup, circuit: CircuitNumbers): GasNumbers | null {
  if (setup.supply.waveform === "ac") return null;
  const { minutes, trays, hoodLitres, roomCubicMetres } = setup.session;
  const { temperatureC, salt } = setup.water;
  const seconds = minutes * 60;
  const charge = circuit.currentA.value * seconds;
  const hydrogenMl = gasMl(charge, ELECTRONS.hydrogen, temperatureC);
  const chlorineMl = holdsChloride(salt) ? gasMl(charge, ELECTRONS.chlorine, temperatureC) : 0;
  const anodes = circuit.electrodes
    .filter((electrode) => electrode.currentA > 0)
    .map((electrode): AnodeLoss => {
      const material = setup.parts.find((part) => part.id === electrode.id)?.material ?? "";
      const { dissolves } = electrodeMaterial(material).material;
      const chargeC = electrode.currentA * seconds;
      const lostG = dissolves === null ? null : metalLostG(chargeC, dissolves.gPerMol, dissolves.electrons);
      return { id: electrode.id, material, chargeC, lostG };
    });
  return {
    chargePerTrayC: charge,
    hydrogenMl,
    oxygenMl: gasMl(charge, ELECTRONS.oxygen, temperatureC),
    chlorineMl,
    hoodLitres,
    hydrogenVolPercent: (hydrogenMl / 1000 / hoodLitres) * 100,
    hydrogenLimitVolPercent: HYDROGEN_FLAMMABLE.value,
    chlorineHoodPpm: (chlorineMl / 1000 / hoodLitres) * 1e6,
    chlorineRoomPpm: ((chlorineMl * trays) / ML_PER_M3 / roomCubicMetres) * 1e6,
    anodes,
  };
}
