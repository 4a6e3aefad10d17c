import type { RemedyEdit } from "../../../shared-types/plan";
import type { Edit } from "../../document/edit";

/** @returns an edit that sets depth and volts together: one move of the chart's dot is one step. Held keys join into one. */
export function moveDot(depthMm: number, volts: number, joins?: string): Edit {
  return {
    name: "depth and voltage",
    label: `set ${depthMm} mm and ${volts} V`,
    apply: (setup) =>
      setup.water.depthMm === depthMm && setup.supply.volts === volts
        ? setup
        : { ...setup, water: { ...setup.water, depthMm }, supply: { ...setup.supply, volts } },
    ...(joins === undefined ? {} : { joins }),
  };
}

/** What a remedy's button says, by the key that it sets. */
const REMEDY_WORDS: Readonly<Record<string, (value: string) => string>> = {
  "supply.volts": (value) => `Set ${value} V`,
  "supply.frequencyHz": (value) => `Set ${value} Hz`,
  "supply.waveform": (value) => `Use ${value.toUpperCase()}`,
  "supply.source": (value) => `The source is ${value}`,
  "water.depthMm": (value) => `Fill to ${value} mm`,
  "tray.baseMaterial": (value) => `The tray is of ${value}`,
};

/** @returns the words on the button that applies a remedy, such as "Set 6 V". */
export function remedyWords({ path, value }: RemedyEdit): string {
  const text = String(value);
  const words = REMEDY_WORDS[path];
  if (words !== undefined) return words(text);
  if (path.endsWith(".heightMm")) return `Make it ${text} mm high`;
  if (path.endsWith(".tap"))
    return text === "0" ? "Wire to the negative lead" : text === "1" ? "Wire to the positive lead" : `Wire to tap ${text}`;
  return `Set ${path} to ${text}`;
}
