import { z } from "zod";

/**
 * What a probe read in a real tray, kept in the setup file under its own versioned key. Readings are about a layout and no part
 * of it: they leave the setup's id as it is, and each run keeps the id of the layout that it was taken on.
 */

const between = (low: number, high: number) => {
  const error = `${low} to ${high}`;
  return z.number({ error }).min(low, { error }).max(high, { error });
};
const placeMm = between(-10_000, 10_000);
/** More than any supply of a setup gives (1000 V). */
export const MOST_READ_VOLTS = 2000;
const volts = between(-MOST_READ_VOLTS, MOST_READ_VOLTS);

const readingSchema = z.strictObject({
  /** The point's number when it was read; the place is what counts, since numbers may change with the plan. */
  n: z.number({ error: "a whole number from 1 to 100000" }).int().min(1).max(100_000),
  xMm: placeMm,
  yMm: placeMm,
  volts,
});
const foundSchema = z.strictObject({ volts, xMm: placeMm, yMm: placeMm });
const runSchema = z.strictObject({
  id: z.string().min(1).max(40),
  name: z.string().max(80).default(""),
  takenBy: z.string().max(200).default(""),
  /** As it is to be printed; an ISO 8601 day where the program writes it. */
  takenOn: z.string().max(40).default(""),
  /** Id of the layout that the run was begun on. */
  setupId: z.string().max(40).default(""),
  /** In the order in which they were taken. */
  readings: z.array(readingSchema).max(20_000).default([]),
  /** Places at which a potential was looked for and found. */
  found: z.array(foundSchema).max(20_000).default([]),
});

/** The key `readings` of a setup file; its version is its own. */
export const readingsSchema = z
  .strictObject({ version: z.literal(1), runs: z.array(runSchema).max(200).default([]) })
  .superRefine(({ runs }, context) => {
    const seen = new Set<string>();
    runs.forEach(({ id }, index) => {
      if (seen.has(id)) {
        context.addIssue({ code: "custom", path: ["runs", index, "id"], message: `is "${id}", allowed: an id that no other run has` });
      }
      seen.add(id);
    });
  });

type Frozen<T> = T extends object ? { readonly [Key in keyof T]: Frozen<T[Key]> } : T;
/** One session at one tray. */
export type ReadingRun = Frozen<z.output<typeof runSchema>>;
export type Reading = ReadingRun["readings"][number];
export type FoundPlace = ReadingRun["found"][number];

/** Places nearer than this, mm, are the same point: points are rounded to 0.5 mm. */
const SAME_PLACE_MM = 0.05;

/** @returns whether two places are the same point. */
export const samePlace = (a: { readonly xMm: number; readonly yMm: number }, b: { readonly xMm: number; readonly yMm: number }): boolean =>
  Math.hypot(a.xMm - b.xMm, a.yMm - b.yMm) < SAME_PLACE_MM;

/** `pass` within the band, `doubtful` a little outside, `fail` well outside. */
export type Verdict = "pass" | "doubtful" | "fail";

/** A reading beside what was predicted for its point. */
export interface JudgedReading {
  readonly n: number;
  readonly xMm: number;
  readonly yMm: number;
  readonly expectedVolts: number;
  /** k = 2 half-width, V. */
  readonly bandVolts: number;
  readonly readVolts: number;
  /** Read less expected, V. */
  readonly residualVolts: number;
  /** The residual in half-widths of the band; 1 is its edge. */
  readonly inBands: number;
  readonly verdict: Verdict;
}

/** A found place beside the predicted line of that potential. */
export interface JudgedPlace {
  readonly volts: number;
  readonly xMm: number;
  readonly yMm: number;
  /** Distance from the line, mm; positive on the side of higher potential. Null where no line of that potential is drawn. */
  readonly distanceMm: number | null;
  /** The nearest place of the line, mm. */
  readonly nearestMm: readonly [number, number] | null;
  /** k = 2 half-width, mm. */
  readonly bandMm: number | null;
  readonly verdict: Verdict | null;
}

/** Why a tray gets its verdict. */
export type VerdictReason = "as-predicted" | "none-read" | "few-read" | "worst-point" | "chi-squared" | "some-outside";

/** All readings of a run against the plan. */
export interface JudgedRun {
  readonly readings: readonly JudgedReading[];
  readonly places: readonly JudgedPlace[];
  /** Readings whose place is no point of the plan any more. */
  readonly strays: readonly Reading[];
  /** Points of the plan, and how many of them were read. */
  readonly planned: number;
  readonly counts: Readonly<Record<Verdict, number>>;
  /** Σ (residual ÷ standard uncertainty)²; as many degrees of freedom as values judged. */
  readonly chiSquared: number;
  readonly degrees: number;
  /** Chance of a χ² at least this large where all is as predicted. */
  readonly chance: number;
  /** The value farthest outside, in half-widths: a reading by its point's number, or a found place. */
  readonly worst: { readonly n: number | null; readonly inBands: number } | null;
  /** Null where nothing was read. */
  readonly verdict: Verdict | null;
  readonly reason: VerdictReason;
}

/** Why a row of a table was not taken. */
export type RowFault =
  | "no-volts"
  | "not-a-number"
  | "no-such-point"
  | "no-such-place"
  | "out-of-range"
  | "twice"
  | "ambiguous"
  | "columns"
  | "open-quote";

export interface WrongRow {
  /** Line of the text on which the row begins, from 1. */
  readonly line: number;
  readonly fault: RowFault;
  readonly text: string;
}

/** What a table of readings gave. */
export interface ReadTable {
  readonly readings: readonly Reading[];
  readonly found: readonly FoundPlace[];
  readonly wrong: readonly WrongRow[];
  /** Rows with an empty reading: nothing was read there. */
  readonly blank: number;
}

/** What can have gone wrong with a tray: the explanations that a diagnosis compares. */
export type FaultKind = "none" | "scale" | "electrode" | "tilt-x" | "tilt-y" | "displaced" | "wrong-reading" | "swapped-points" | "drift";

/** A fitted size of a fault with its standard uncertainty, in the same unit. */
export interface FittedValue {
  readonly value: number;
  readonly uncertainty: number;
}

/** One explanation of a run's residuals, fitted. */
export interface Explanation {
  readonly kind: FaultKind;
  /** Of `electrode` and `displaced`. */
  readonly partId: string | null;
  /** Numbers of the points of `wrong-reading` and `swapped-points`. */
  readonly points: readonly number[];
  /**
   * `scale`: share of every reading; `electrode`: V by which its potential in the water is off; `tilt-…`: further degrees; `displaced`:
   * mm along x and y; `wrong-reading`: V; `drift`: V lost at both electrodes together from the first reading to the last.
   */
  readonly values: readonly FittedValue[];
  /** What the reading would be with two neighbouring digits changed over, V, where that explains it. */
  readonly swappedDigitsVolts: number | null;
  /** χ² of what the explanation leaves. */
  readonly chiSquared: number;
  /** The penalised likelihood: smaller is better. */
  readonly criterion: number;
}

/** How clearly two explanations differ. */
export type Clearness = "hardly" | "fairly" | "clearly" | "very-clearly";

export interface Diagnosis {
  /** Readings that were used. */
  readonly used: number;
  /** Null where there are too few readings to tell anything. */
  readonly best: Explanation | null;
  readonly runnerUp: Explanation | null;
  /** Explanations that would leave the very same residuals as the best: no reading at these points can tell them apart. */
  readonly inseparable: readonly Explanation[];
  readonly clearness: Clearness;
  /** Whether what the best leaves is no more than chance. */
  readonly leavesChance: boolean;
  /** Explanations that could not be tried, since the tray with that fault has no field. */
  readonly untried: readonly { readonly kind: FaultKind; readonly partId: string | null }[];
}
