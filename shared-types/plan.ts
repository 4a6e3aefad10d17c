import type { BenchNumbers } from "./bench";
import type { PartRole } from "./setup";
import type { ToleranceResult } from "./tolerance";

/** How carefully a field is solved: while dragging, on release and for paper, and for checking the program itself. */
export type Quality = "live" | "print" | "reference";
export const QUALITIES: readonly Quality[] = ["live", "print", "reference"];

/** A number that carries the program's own bound (about 95 %) on its numerical error, in the same unit. */
export interface Bounded {
  readonly value: number;
  readonly error: number;
}

/** How the field was computed. */
export interface Numerics {
  readonly pitchMm: number;
  readonly unknowns: number;
  readonly iterations: number;
  readonly relativeResidual: number;
  readonly elapsedMs: number;
}

export interface ConductorReading {
  readonly id: string;
  readonly role: Exclude<PartRole, "insulator">;
  readonly volts: number;
  /** 0 for electrodes, whose potential is given. */
  readonly voltsError: number;
  /** Positive: leaves the part into the water. 0 for floating conductors. */
  readonly currentA: number;
  readonly currentErrorA: number;
  /** Largest current density on the wetted face, A/m². */
  readonly largestCurrentDensityAPerM2: number;
}

/** The field at one place. `volts` is null inside insulators, where the bed is dry and outside the tray. */
export interface FieldReading {
  readonly xMm: number;
  readonly yMm: number;
  /** Id of the part that the place lies in, else null (the water inside a ring is water). */
  readonly inside: string | null;
  readonly volts: number | null;
  readonly voltsError: number;
  readonly fieldVPerM: number;
  /** Direction of the field (from high to low potential), degrees counter-clockwise from +x. */
  readonly directionDeg: number;
}

/** Owners of picture nodes that belong to no part. */
export const OWNER_WATER = -1;
export const OWNER_NOTHING = -2;

/**
 * The potential on a regular grid, for colouring and line tracing. Node (column, row) lies at
 * (column·pitchXMm, row·pitchYMm) from the tray's origin; index = row·columns + column.
 */
export interface FieldPicture {
  readonly columns: number;
  readonly rows: number;
  readonly pitchXMm: number;
  readonly pitchYMm: number;
  /** Volts; NaN where there is neither water nor metal. */
  readonly volts: Float32Array;
  /** Index of the part in `setup.parts` that covers the node, OWNER_WATER, or OWNER_NOTHING (dry, outside). */
  readonly owner: Int16Array;
}

/** One line of equal potential: each path is x, y, x, y, … in mm; a closed path repeats its first point. */
export interface Equipotential {
  readonly volts: number;
  readonly paths: readonly Float64Array[];
}

/** A field line from the higher to the lower potential: x, y, x, y, … in mm. */
export type FieldLine = Float64Array;

/** A place for the probe, rounded to 0.5 mm, with what the meter should read exactly there. */
export interface ProbePoint {
  /** Number on paper, 1, 2, 3 … in visiting order. */
  readonly n: number;
  readonly xMm: number;
  readonly yMm: number;
  readonly inside: string | null;
  readonly volts: number;
  readonly voltsError: number;
  readonly voltsPerMm: number;
  readonly directionDeg: number;
  /** k = 2 half-width of the tolerance band, V. */
  readonly bandV: number;
}

export interface ProbeLevel {
  /** The even step, V. */
  readonly volts: number;
  /** Why there are fewer points than asked for, else null. */
  readonly note: string | null;
  readonly points: readonly ProbePoint[];
}

export interface ProbePlan {
  readonly spanV: readonly [number, number];
  readonly levels: readonly ProbeLevel[];
  /** Points that check floating conductors: on the metal and in the water they enclose. */
  readonly checks: readonly ProbePoint[];
  /** The causes behind every band: points of the levels in order, then the checks. Absent: the bands hold meter and placement alone. */
  readonly tolerance?: ToleranceResult;
}

export type Severity = "stop" | "caution" | "note";

/** A remedy that can be applied by a button: the key of the setup and the value to give it. */
export interface RemedyEdit {
  /** Dotted path in the setup, such as `supply.volts` or `parts[2].heightMm`. */
  readonly path: string;
  readonly value: number | string;
}

/** What a rule found: the same object on screen, on paper and in `check`. */
export interface Finding {
  readonly code: string;
  readonly severity: Severity;
  readonly partIds: readonly string[];
  /** Dotted path of the setting that it is about, or null. */
  readonly about: string | null;
  readonly message: string;
  readonly measured: string;
  readonly limit: string;
  readonly source: string;
  readonly remedy: string;
  readonly edit: RemedyEdit | null;
}

/** Everything that follows from a setup: what canvas, panels, sheets and the headless command show. */
export interface Plan {
  readonly setupId: string;
  readonly quality: Quality;
  readonly numerics: Numerics;
  /** Lowest and highest electrode potential, V. */
  readonly spanV: readonly [number, number];
  /** Between lowest and highest tap; null where the electrodes sit at more than two potentials. */
  readonly resistanceOhm: Bounded | null;
  /** 1/(σ·h·R), h the depth at the tray's centre; null as above. */
  readonly shapeFactor: Bounded | null;
  /** Sum of the currents that leave the electrodes into the water. */
  readonly currentA: Bounded;
  readonly powerW: number;
  readonly conductors: readonly ConductorReading[];
  readonly picture: FieldPicture;
  readonly equipotentials: readonly Equipotential[];
  readonly fieldLines: readonly FieldLine[];
  readonly probing: ProbePlan;
  readonly bench: BenchNumbers;
  readonly findings: readonly Finding[];
}

/** Why a valid setup has no plan (exit code 3): in words, with the parts that it is about. */
export interface PlanRefusal {
  readonly code: string;
  readonly message: string;
  readonly partIds: readonly string[];
  /** The findings that need no field, so that the screen can show what is wrong where it is. */
  readonly findings: readonly Finding[];
}

export type PlanOutcome = { readonly ok: true; readonly plan: Plan } | { readonly ok: false; readonly refusal: PlanRefusal };
