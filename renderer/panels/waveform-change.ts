import type { Supply } from "../../shared-types/setup";

/** What an AC supply is taken to give before it is told. */
const MAINS_HZ = 50;

/** @returns the change to another waveform; AC needs a frequency, which a DC supply may not have had. */
export const waveformChange = ({ frequencyHz }: Supply, waveform: Supply["waveform"]): Partial<Supply> =>
  waveform === "ac" && frequencyHz <= 0 ? { waveform, frequencyHz: MAINS_HZ } : { waveform };
