/**
 * The limits that the findings measure against: each once, with its source and how well that source stands.
 * - confirmed: read in a published text (often a secondary copy)
 * - weak, from memory: shown with 'check the current edition'
 * - derived: follows from a formula of the bench, stated there
 * - practice: common practice, no source
 * - ours: a margin that we chose, and say so
 */
export type Standing = "confirmed" | "weak" | "from memory" | "derived" | "practice" | "ours";

export interface Limit {
  readonly value: number;
  readonly unit: string;
  readonly source: string;
  readonly standing: Standing;
}

const limit = (value: number, unit: string, source: string, standing: Standing): Limit => ({ value, unit, source, standing });

/** @returns the source as it is printed: weak ones ask for the current edition, our own say that they are ours. */
export function sourceOf(of: Pick<Limit, "source" | "standing">): string {
  switch (of.standing) {
    case "weak":
    case "from memory":
      return `${of.source}; check the current edition`;
    case "practice":
      return `${of.source} (common practice, no source)`;
    case "ours":
      return `${of.source} (a margin of ours)`;
    case "derived":
      return `${of.source} (derived)`;
    case "confirmed":
      return of.source;
  }
}

const TOUCH = "IEC 60364-4-41 cl. 414.4.5 (as in BS 7671 reg. 414.4.5)";
export const WET_HANDS_AC = limit(12, "V AC", TOUCH, "confirmed");
export const WET_HANDS_DC = limit(30, "V DC", TOUCH, "confirmed");
export const DRY_AC = limit(25, "V AC", TOUCH, "confirmed");
export const DRY_DC = limit(60, "V DC", TOUCH, "confirmed");
/** For salt water, which halves the skin's resistance: the stricter limit for large wet contact. */
const LARGE_WET_CONTACT = "IEC 60204-1 cl. 6.4.1, large wet contact, taken for salt water";
export const SALT_HANDS_AC = limit(6, "V AC", LARGE_WET_CONTACT, "confirmed");
export const SALT_HANDS_DC = limit(15, "V DC", LARGE_WET_CONTACT, "confirmed");
/** How much more than its stated voltage an unloaded transformer may give: a '12 V' one stands at 13 to 16 V. */
export const UNLOADED_RISE = limit(4 / 3, "times", "small transformers without load, 13 to 16 V for 12 V", "from memory");
export const SAFETY_SOURCE = { source: "IEC 61558-2-6 (safety isolating transformer) or a battery", standing: "confirmed" } as const;

export const HYDROGEN_FLAMMABLE = limit(4, "vol %", "lower flammable limit of hydrogen in air", "confirmed");
export const HYDROGEN_CAUTION = limit(1, "vol %", "a quarter of hydrogen's flammable limit", "ours");
export const CHLORINE_CEILING = limit(0.5, "ppm", "NIOSH ceiling for chlorine, 15 min", "confirmed");

export const WARMING = limit(1, "K", "1 K changes the current by about 2 %", "ours");
export const POWER = limit(10, "W", "heat that a shallow tray sheds unnoticed", "ours");
export const INTERFACE_SHARE = limit(0.02, "of the volts", "share lost at the electrodes' surfaces", "ours");
export const LOADING_SHARE = limit(0.01, "of the reading", "loading of the probe by the meter", "ours");
export const DIGITS_PER_MM = limit(1, "digit per mm", "a millimetre must move the last digit", "ours");
export const TILT_READING_SHARE = limit(0.01, "of the span", "shift of readings by an unnoticed tilt of 0.2°", "ours");
export const FREEBOARD = limit(10, "mm", "wall above the water, against spilling", "practice");
export const LEAST_PROUD = limit(1, "mm", "metal above the water, since water climbs a face by about a millimetre", "ours");
export const IMMERSION = { source: "electrodes stand about half immersed", standing: "practice" } as const;
/** Within this band double layers lose little and the meter's and the leads' capacitance takes little. */
export const ADVISABLE_LOW_HZ = limit(40, "Hz", "below it the electrodes' surfaces take more and more", "ours");
export const ADVISABLE_HIGH_HZ = limit(1000, "Hz", "above it meters and leads lose accuracy", "ours");
export const NEEDLESS_CONDUCTIVITY = limit(2790, "µS/cm", "drinking-water limit of the EU (2790 µS/cm at 25 °C)", "confirmed");
export const DISTILLED = limit(10, "µS/cm", "distilled water conducts 0.5 to 5 µS/cm", "confirmed");
/** What one A4 sheet (ISO 216) shows of a tray at full size, along x and y, mm: upright, then across. A test of the sheets holds them to the paper. */
export const A4_FREE_MM: readonly (readonly [number, number])[] = [
  [185, 248],
  [272, 161],
];
/** How far a part may reach beyond the wall before it counts as outside, mm: rounding, not steel. */
export const OUTSIDE_TOLERANCE_MM = limit(0.01, "mm", "rounding of drawn sizes", "ours");

/** The sentence that closes every finding about safety. */
export const SAFETY_SENTENCE = "Local codes and a competent person decide.";

/** @returns the touch-voltage limit for wet hands in this water, on AC or DC. */
export function wetHandsLimit(waveform: "ac" | "dc", saltWater: boolean): Limit {
  if (saltWater) return waveform === "ac" ? SALT_HANDS_AC : SALT_HANDS_DC;
  return waveform === "ac" ? WET_HANDS_AC : WET_HANDS_DC;
}

/** @returns the touch-voltage limit for dry hands. */
export const dryHandsLimit = (waveform: "ac" | "dc"): Limit => (waveform === "ac" ? DRY_AC : DRY_DC);
