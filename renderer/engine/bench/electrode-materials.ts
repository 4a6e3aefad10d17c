import type { Estimate } from "../../../shared-types/bench";

/**
 * Electrode metals: double layer, volts lost on DC, and what dissolves. Published values spread widely, so that each carries a
 * low and a high end; none replaces a reading of the user's own.
 */
export interface ElectrodeMaterial {
  readonly name: string;
  /** Double-layer capacitance, µF/cm². */
  readonly doubleLayerUfPerCm2: Estimate;
  /** DC: volts lost at both electrodes together. */
  readonly electrodeDropVolts: Estimate;
  /** As an anode it dissolves (by Faraday's law with this molar mass, g/mol, and valency); null: it does not. */
  readonly dissolves: { readonly gPerMol: number; readonly electrons: number } | null;
  /** Why not to use it even on AC, or null. */
  readonly unsuitable: string | null;
}

/** Bare metals: 20 µF/cm² as the careful value, 5 to 50 the published range ("about 30" in a weak source). */
const BARE: Estimate = { low: 5, typical: 20, high: 50 };
/** Where the anode dissolves 0.8–1.3 V, where gas forms 1.5–2.5 V (both from memory); water's reversible 1.23 V is published. */
const DISSOLVING: Estimate = { low: 0.8, typical: 1.05, high: 1.3 };
const GASSING: Estimate = { low: 1.5, typical: 2, high: 2.5 };
const EITHER: Estimate = { low: 0.8, typical: 2, high: 2.5 };

const metal = (name: string, gPerMol: number, electrons: number, unsuitable: string | null = null): ElectrodeMaterial => ({
  name,
  doubleLayerUfPerCm2: BARE,
  electrodeDropVolts: DISSOLVING,
  dissolves: { gPerMol, electrons },
  unsuitable,
});

const inert = (name: string, doubleLayerUfPerCm2: Estimate): ElectrodeMaterial => ({
  name,
  doubleLayerUfPerCm2,
  electrodeDropVolts: GASSING,
  dissolves: null,
  unsuitable: null,
});

/** Looked up by the first word that the material's name contains; molar masses are IUPAC atomic weights. */
const TABLE: readonly (readonly [string, ElectrodeMaterial])[] = [
  ["stainless", inert("stainless steel", { low: 10, typical: 20, high: 40 })], // passive; from memory
  ["graphite", inert("graphite", { low: 3, typical: 20, high: 70 })], // from memory
  ["carbon", inert("carbon", { low: 3, typical: 20, high: 70 })],
  ["gold", inert("gold", { low: 4, typical: 6, high: 8 })], // polished gold 6 ± 2, published
  ["platin", inert("platinum", BARE)],
  ["titanium", inert("titanium", BARE)],
  ["brass", metal("brass", 64.2, 2)], // 63 % copper, 37 % zinc
  ["bronze", metal("bronze", 63.55, 2)],
  ["copper", metal("copper", 63.546, 2)],
  ["nickel", metal("nickel", 58.693, 2)],
  ["steel", metal("steel", 55.845, 2)],
  ["iron", metal("iron", 55.845, 2)],
  ["silver", metal("silver", 107.868, 1)],
  ["tin", metal("tin", 118.71, 2)],
  ["zinc", metal("zinc", 65.38, 2, "it corrodes in plain water and its skin adds resistance")],
  ["alumin", metal("aluminium", 26.982, 3, "its oxide skin adds a resistance that drifts and rectifies")],
  ["lead", metal("lead", 207.2, 2, "it is poisonous and gets onto hands and into the drain")],
  ["cadmium", metal("cadmium", 112.414, 2, "it is poisonous and gets onto hands and into the drain")],
];

/** What is assumed of a metal that is not in the table. */
const UNKNOWN: ElectrodeMaterial = {
  name: "unknown",
  doubleLayerUfPerCm2: BARE,
  electrodeDropVolts: EITHER,
  dissolves: null,
  unsuitable: null,
};

/** @returns what is known of a material by its name, and whether it is known at all. */
export function electrodeMaterial(material: string): { readonly known: boolean; readonly material: ElectrodeMaterial } {
  const word = material.toLowerCase();
  const entry = TABLE.find(([name]) => word.includes(name));
  return { known: entry !== undefined, material: entry === undefined ? UNKNOWN : entry[1] };
}
