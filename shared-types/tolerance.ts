/**
 * What a reading may be off by and why, after JCGM 100:2008 (GUM). Pure data: made by `engine/tolerance`, shown by the probe plan
 * and its sheets, read by whoever judges readings.
 */

/** What a reading depends on beside the plan. The three of parts come once for every part that they can move. */
export const CAUSE_KEYS = [
  "supply",
  "meter",
  "probe-x",
  "probe-y",
  "part-x",
  "part-y",
  "part-turn",
  "depth",
  "tilt-x",
  "tilt-y",
  "conductivity",
  "temperature",
  "interface",
  "loading",
  "engine",
] as const;
export type CauseKey = (typeof CAUSE_KEYS)[number];

/** The unit in which a cause is stated: its half width is in it, its sensitivity in V per such unit. */
export type CauseUnit = "V" | "mm" | "deg" | "percent" | "K";

/** One cause of uncertainty at one point. */
export interface Cause {
  readonly key: CauseKey;
  /** The part that it moves; null where it is not about a part. */
  readonly partId: string | null;
  readonly unit: CauseUnit;
  /** V per unit, with its sign: how the reading changes when the cause grows. */
  readonly sensitivityVPerUnit: number;
  /** Half the width of what the cause may be off by, in its unit. */
  readonly halfWidth: number;
  /** `rectangular`: no more is known than ± the half width; `normal`: the half width holds 95 %. */
  readonly distribution: "rectangular" | "normal";
  readonly standardVolts: number;
  /** Of the point's variance, 0 to 1. */
  readonly share: number;
}

/** The tolerance of one expected reading. */
export interface PointBand {
  readonly xMm: number;
  readonly yMm: number;
  readonly volts: number;
  /** Largest share first. */
  readonly causes: readonly Cause[];
  /** Combined standard uncertainty, V. */
  readonly standardVolts: number;
  /** k = 2 half width, V. */
  readonly bandV: number;
}

/** One cause over the whole tray. */
export interface RankedCause {
  readonly key: CauseKey;
  readonly partId: string | null;
  readonly unit: CauseUnit;
  /** As stated; where it differs from point to point (meter, engine) the mean. */
  readonly halfWidth: number;
  /** Of the variances of all points together, 0 to 1. */
  readonly share: number;
}

/** How a part that can move changes the reading at one place, V per mm and V per degree (counter-clockwise). */
export interface PartSensitivity {
  readonly partId: string;
  readonly alongXVPerMm: number;
  readonly alongYVPerMm: number;
  readonly turnVPerDeg: number;
}

/** How the reading at one place changes with everything that moves the field. Signed. */
export interface PlaceSensitivities {
  readonly xMm: number;
  readonly yMm: number;
  readonly parts: readonly PartSensitivity[];
  /** V per degree by which the bed goes deeper towards +x (+y), the depth at the tray's centre kept. */
  readonly tiltXVPerDeg: number;
  readonly tiltYVPerDeg: number;
  readonly depthVPerMm: number;
  /** Volts here per volt at one electrode with the others held: adds up to 1. */
  readonly electrodes: readonly { readonly partId: string; readonly voltsPerVolt: number }[];
}

/** A place with what is expected there: what a tolerance is worked out from. */
export interface ExpectedReading {
  readonly xMm: number;
  readonly yMm: number;
  readonly inside: string | null;
  readonly volts: number;
  readonly voltsError: number;
  readonly voltsPerMm: number;
  /** Direction of the field (from high to low potential), degrees counter-clockwise from +x. */
  readonly directionDeg: number;
}

/** The tolerance of a list of points. */
export interface ToleranceResult {
  readonly points: readonly PointBand[];
  readonly ranking: readonly RankedCause[];
}

/** What many trays built within the stated tolerances would read at one point (JCGM 101:2008). */
export interface DrawnPoint {
  readonly meanVolts: number;
  readonly standardVolts: number;
  /** The probabilistically symmetric 95 % interval, V. */
  readonly lowVolts: number;
  readonly highVolts: number;
  /** How far twice the drawn standard uncertainty lies from the linear band, as a share of the band. */
  readonly departure: number;
  /** Why it departs by more than a tenth: too few draws to tell, or a reading that does not follow its causes in a straight line. */
  readonly reason: "few-draws" | "curved" | null;
}

export interface DrawnBands {
  readonly draws: number;
  readonly seed: number;
  readonly elapsedMs: number;
  /** In the order of the points that were handed in. */
  readonly points: readonly DrawnPoint[];
}

/** Fewest and most draws that are offered. */
export const DRAW_COUNTS = [200, 5000] as const;
