import type {
  Bounded,
  Equipotential,
  FieldLine,
  FieldReading,
  Finding,
  Plan,
  PlanOutcome,
  PlanRefusal,
  ProbePlan,
  Quality,
} from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import { setupId } from "../../shared-types/setup-id";
import { MM_PER_M } from "../../shared-types/units";
import { benchOf, lossesOf } from "./bench/bench";
import type { FieldFacts } from "./bench/field-facts";
import { probingWithInterface, readingsWithInterface } from "./bench/probing-with-interface";
import { conductivityAtTemperatureSPerM } from "./bench/water-conductivity";
import { drive, type Pace } from "./field/drive";
import { fieldLayout, geometryKey } from "./field/layout";
import { solveField } from "./field/solve-field";
import { createSolverMemory } from "./field/solver-memory";
import { type SuperposedField, type Superposer, superposerOf } from "./field/superposition";
import { findingsOf, geometryFindings } from "./findings/all-findings";
import { noCurrentPath } from "./findings/current-paths";
import { equipotentialsOf } from "./lines/equipotentials";
import { fieldLinesOf } from "./lines/field-lines";
import { evenLevels } from "./probing/levels";
import { planProbes } from "./probing/plan-probes";
import { type SensitivityField, solveSensitivities } from "./tolerance/sensitivity-field";
import { withBands } from "./tolerance/with-bands";

/** How a caller watches a plan being made and stops it. */
export interface PlanOptions extends Pace {
  readonly onProgress?: (share: number) => void;
}

/** Makes plans and keeps the newest solved fields, so that volts, taps and probing settings start no solve. */
export interface Planner {
  readonly plan: (setup: Setup, quality: Quality, options?: PlanOptions) => Promise<PlanOutcome>;
  /** Readings from the best field solved for this setup's geometry; null when there is none. */
  readonly sample: (setup: Setup, placesMm: readonly (readonly [number, number])[]) => readonly FieldReading[] | null;
  /** The plan's points with the whole of their tolerance. Solves the sensitivities where they are not at hand. */
  readonly bands: (setup: Setup, plan: Pick<Plan, "probing" | "bench">, options?: PlanOptions) => Promise<ProbePlan>;
  /**
   * How the field of this setup's geometry changes with everything that can move it: solved anew or, for one of the newest
   * geometries, remembered. The setup must be one that `plan` does not refuse. Rejects when `signal` is aborted.
   */
  readonly sensitivities: (setup: Setup, options?: PlanOptions) => Promise<SensitivityField>;
}

/** Findings that leave no field to speak of. */
const REFUSING_CODES: ReadonlySet<string> = new Set(["overlap", "short-circuit", "no-potential-difference"]);
/** Field lines that the electrodes send out together. */
const FIELD_LINES = 24;
/** Qualities that may answer, best first: a finer field at hand serves a drag too, so that turning a knob starts no solve. */
const SERVING: Readonly<Record<Quality, readonly Quality[]>> = { live: ["print", "live"], print: ["print"], reference: ["reference"] };
/** Solved geometries kept: enough for undo and redo to be instant. */
const KEPT_SOLUTIONS = 4;
/** Sensitivities kept: of the present geometry and the one before. */
const KEPT_SENSITIVITIES = 2;

function refusalOf(findings: readonly Finding[]): PlanRefusal | null {
  const blocking = findings.find(({ code }) => REFUSING_CODES.has(code));
  if (blocking === undefined) return null;
  return { code: blocking.code, message: blocking.message, partIds: blocking.partIds, findings };
}

/** Resistance and shape factor between the two potentials in use; null where there are more than two. */
function twoPoleOf(
  setup: Setup,
  field: SuperposedField,
  conductivitySPerM: number,
): { resistanceOhm: Bounded; shapeFactor: Bounded } | null {
  const potentials = new Set(setup.parts.flatMap((part) => (part.role === "electrode" ? [part.tap] : [])));
  if (potentials.size !== 2) return null;
  const volts = field.spanV[1] - field.spanV[0];
  const { value: flux, error } = field.totalFlux;
  const resistance = (volts * MM_PER_M) / (conductivitySPerM * flux);
  const shape = flux / (volts * setup.water.depthMm);
  const share = error / flux;
  return { resistanceOhm: { value: resistance, error: resistance * share }, shapeFactor: { value: shape, error: shape * share } };
}

/** A solved geometry with the lines drawn last: their places depend on taps and levels, not on volts. */
interface Solved {
  readonly superposed: Superposer;
  lines: {
    readonly key: string;
    readonly volts: number;
    readonly equipotentials: readonly Equipotential[];
    readonly fieldLines: readonly FieldLine[];
  } | null;
}

function linesOf(solved: Solved, setup: Setup, field: SuperposedField, quality: Quality): Pick<Plan, "equipotentials" | "fieldLines"> {
  const { volts } = setup.supply;
  const { levels: count } = setup.probing;
  const key = `${count} ${setup.parts.map((part) => (part.role === "electrode" ? part.tap : "")).join(" ")}`;
  if (solved.lines?.key !== key) {
    solved.lines = {
      key,
      volts,
      equipotentials: equipotentialsOf(field, setup, evenLevels(field.spanV, count), quality),
      fieldLines: fieldLinesOf(field, setup, FIELD_LINES, quality),
    };
  }
  const scale = volts / solved.lines.volts;
  return {
    equipotentials: solved.lines.equipotentials.map((line) => ({ ...line, volts: scale * line.volts })),
    fieldLines: solved.lines.fieldLines,
  };
}

/** A field with what follows from it between two potentials. */
function factsOf(setup: Setup, field: SuperposedField, conductivitySPerM: number): FieldFacts & SuperposedField {
  const twoPole = twoPoleOf(setup, field, conductivitySPerM);
  return { ...field, resistanceOhm: twoPole?.resistanceOhm ?? null, shapeFactor: twoPole?.shapeFactor ?? null };
}

function planOf(setup: Setup, solved: Solved, quality: Quality, elapsedMs: number): Plan {
  const conductivitySPerM = conductivityAtTemperatureSPerM(setup);
  const field = solved.superposed(setup, conductivitySPerM);
  const amperesPerFlux = conductivitySPerM / MM_PER_M;
  const currentA = { value: field.totalFlux.value * amperesPerFlux, error: field.totalFlux.error * amperesPerFlux };
  const { equipotentials, fieldLines } = linesOf(solved, setup, field, quality);
  const fieldProbing = planProbes(setup, field, equipotentials);
  const facts = factsOf(setup, field, conductivitySPerM);
  const bench = benchOf(setup, facts);
  const probing = probingWithInterface(setup, fieldProbing, bench);
  return {
    setupId: setupId(setup),
    quality,
    numerics: { ...field.numerics, elapsedMs },
    spanV: field.spanV,
    resistanceOhm: facts.resistanceOhm,
    shapeFactor: facts.shapeFactor,
    currentA,
    powerW: field.conductors.reduce((sum, { volts, currentA: amperes }) => sum + volts * amperes, 0),
    conductors: field.conductors,
    picture: field.picture,
    equipotentials,
    fieldLines,
    probing,
    bench,
    findings: findingsOf(setup, bench, facts, probing),
  };
}

const electrodeCount = (setup: Setup): number => setup.parts.filter(({ role }) => role === "electrode").length;

/** An even depth leaves the potentials alone but not what a tilt does to them. */
const sensitivityKey = (setup: Setup): string => `${geometryKey(setup)} ${setup.water.depthMm}`;

/** @returns a planner with an empty memory. */
export function createPlanner(): Planner {
  const kept = new Map<string, Solved>();
  const memory = createSolverMemory();
  const sensitive = new Map<string, SensitivityField>();

  function keep(key: string, solved: Solved): void {
    kept.delete(key);
    kept.set(key, solved);
    for (const oldest of kept.keys()) {
      if (kept.size <= KEPT_SOLUTIONS) break;
      kept.delete(oldest);
    }
  }

  async function plan(setup: Setup, quality: Quality, options: PlanOptions = {}): Promise<PlanOutcome> {
    const refusal = refusalOf(geometryFindings(setup));
    if (refusal !== null) return { ok: false, refusal };
    const geometry = geometryKey(setup);
    const serving = SERVING[quality].find((one) => kept.has(`${one} ${geometry}`)) ?? quality;
    const key = `${serving} ${geometry}`;
    const started = options.now?.() ?? 0;
    const solved = kept.get(key) ?? {
      superposed: superposerOf(await drive(solveField(fieldLayout(setup), serving, options.onProgress, memory), options)),
      lines: null,
    };
    keep(key, solved);
    if (solved.superposed(setup, conductivityAtTemperatureSPerM(setup)).cutOff.length === electrodeCount(setup)) {
      const found = noCurrentPath(setup);
      const { code, message, partIds } = found;
      return { ok: false, refusal: { code, message, partIds, findings: [found, ...geometryFindings(setup)] } };
    }
    const plan = planOf(setup, solved, serving, (options.now?.() ?? 0) - started);
    const known = sensitive.get(sensitivityKey(setup));
    return { ok: true, plan: known === undefined ? plan : { ...plan, probing: withBands(setup, plan, known) } };
  }

  function sample(setup: Setup, placesMm: readonly (readonly [number, number])[]): readonly FieldReading[] | null {
    const geometry = geometryKey(setup);
    const solved = (["reference", "print", "live"] as const)
      .map((quality) => kept.get(`${quality} ${geometry}`))
      .find((one) => one !== undefined);
    if (solved === undefined) return null;
    const conductivitySPerM = conductivityAtTemperatureSPerM(setup);
    const field = solved.superposed(setup, conductivitySPerM);
    const readings = placesMm.map(([xMm, yMm]) => field.read(xMm, yMm));
    if (!setup.interface.inReadings) return readings;
    return readingsWithInterface(setup, readings, field.spanV, lossesOf(setup, factsOf(setup, field, conductivitySPerM)));
  }

  async function sensitivities(setup: Setup, options: PlanOptions = {}): Promise<SensitivityField> {
    const key = sensitivityKey(setup);
    const field = sensitive.get(key) ?? (await drive(solveSensitivities(setup, options.onProgress), options));
    sensitive.delete(key);
    sensitive.set(key, field);
    for (const oldest of sensitive.keys()) {
      if (sensitive.size <= KEPT_SENSITIVITIES) break;
      sensitive.delete(oldest);
    }
    return field;
  }

  return {
    plan,
    sample,
    sensitivities,
    bands: async (setup, planned, options) => withBands(setup, planned, await sensitivities(setup, options)),
  };
}

/**
 * The only door of the engine: everything that follows from a setup.
 * @returns the plan, or why a valid setup has none. Rejects with the signal's reason when `signal` is aborted.
 */
export function planSetup(setup: Setup, quality: Quality, options: PlanOptions = {}): Promise<PlanOutcome> {
  return createPlanner().plan(setup, quality, options);
}
