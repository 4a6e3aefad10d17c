import type { RemedyEdit } from "../../../shared-types/plan";
import type { Edit } from "../../document/edit";
import { texts } from "../../texts/texts";

/** @returns an edit that sets depth and volts together: one move of the chart's dot is one step. Held keys join into one. */
export function moveDot(depthMm: number, volts: number, joins?: string): Edit {
  return {
    name: "depth and voltage",
    label: texts.bench.chart.dotStep(depthMm, volts),
    apply: (setup) =>
      setup.water.depthMm === depthMm && setup.supply.volts === volts
        ? setup
        : { ...setup, water: { ...setup.water, depthMm }, supply: { ...setup.supply, volts } },
    ...(joins === undefined ? {} : { joins }),
  };
}

const words = texts.bench.remedies;

/** What a remedy's button says, by the key that it sets. */
const REMEDY_WORDS: Readonly<Record<string, (value: string) => string>> = {
  "supply.volts": words.volts,
  "supply.frequencyHz": words.hertz,
  "supply.waveform": words.waveform,
  "supply.source": words.source,
  "water.depthMm": words.depth,
  "tray.baseMaterial": words.base,
};

/** @returns the words on the button that applies a remedy, such as "Set 6 V". */
export function remedyWords({ path, value }: RemedyEdit): string {
  const text = String(value);
  const known = REMEDY_WORDS[path];
  if (known !== undefined) return known(text);
  if (path.endsWith(".heightMm")) return words.height(text);
  if (path.endsWith(".tap")) return text === "0" ? words.negative : text === "1" ? words.positive : words.tap(text);
  return words.other(path, text);
}
