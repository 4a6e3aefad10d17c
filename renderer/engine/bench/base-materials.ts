/** What the tray's base is made of: how it bends light, and whether it conducts. */

/** Refractive index of water near 20 °C for visible light (published). */
export const WATER_REFRACTIVE_INDEX = 1.333;

interface BaseMaterial {
  readonly words: readonly string[];
  readonly refractiveIndex: number;
  readonly conducts: boolean;
}

const KNOWN: readonly BaseMaterial[] = [
  { words: ["acrylic", "pmma"], refractiveIndex: 1.49, conducts: false }, // published
  { words: ["glass"], refractiveIndex: 1.52, conducts: false }, // from memory
  { words: ["polycarbonate"], refractiveIndex: 1.585, conducts: false }, // from memory
  { words: ["steel", "brass", "copper", "alumin", "zinc", "metal"], refractiveIndex: 1.5, conducts: true },
];
/** For a base that we do not know: between acrylic and glass. */
const UNKNOWN: BaseMaterial = { words: [], refractiveIndex: 1.5, conducts: false };

const known = (material: string): BaseMaterial => {
  const word = material.toLowerCase();
  return KNOWN.find((entry) => entry.words.some((name) => word.includes(name))) ?? UNKNOWN;
};

export const refractiveIndex = (material: string): number => known(material).refractiveIndex;
/** @returns whether a tray of this material would carry the current itself. */
export const baseConducts = (material: string): boolean => known(material).conducts;
