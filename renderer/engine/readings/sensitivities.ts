import type { Electrode, Part, Setup } from "../../../shared-types/setup";

/** How each reading answers to each fault, from the solver itself: the tray is solved with the fault put in, a little either way. */

/** Volts at the places of a run in a changed tray, null inside insulators; null as a whole where that tray has no field. */
export type VoltsIn = (setup: Setup) => Promise<readonly (number | null)[] | null>;

export interface Sensitivity {
  readonly kind: "electrode" | "tilt-x" | "tilt-y" | "displaced";
  readonly partId: string | null;
  /** V per volt, V per degree, or V per mm along x and along y: one list a parameter, one value a place. */
  readonly perUnit: readonly (readonly number[])[];
}

export interface Sensitivities {
  readonly known: readonly Sensitivity[];
  readonly untried: readonly Pick<Sensitivity, "kind" | "partId">[];
}

/** Steps of the difference quotients: small against what is looked for, large against the solver's error. */
const STEP_DEG = 0.5;
const STEP_MM = 1;
const STEP_TAP = 0.05;

const tilted = (setup: Setup, key: "tiltXDeg" | "tiltYDeg", by: number): Setup => ({
  ...setup,
  water: { ...setup.water, [key]: setup.water[key] + by },
});
const moved = (setup: Setup, id: string, key: "xMm" | "yMm", by: number): Setup => ({
  ...setup,
  parts: setup.parts.map((part) => (part.id === id ? { ...part, [key]: part[key] + by } : part)),
});
const tapped = (setup: Setup, id: string, by: number): Setup => ({
  ...setup,
  parts: setup.parts.map((part) => (part.id === id && part.role === "electrode" ? { ...part, tap: part.tap + by } : part)),
});

const isElectrode = (part: Part): part is Electrode => part.role === "electrode";

/** (b − a)/step for every place; null where either is unknown or a place lost its water. */
function quotient(a: readonly (number | null)[] | null, b: readonly (number | null)[] | null, step: number): readonly number[] | null {
  if (a === null || b === null) return null;
  const values = a.map((low, index) => {
    const high = b[index] ?? null;
    return low === null || high === null ? Number.NaN : (high - low) / step;
  });
  return values.every(Number.isFinite) ? values : null;
}

/**
 * Solves the tray with every fault put in.
 * @param onProgress share that is done, 0 to 1. @param stopped asked before each solve; once it says yes nothing more is solved.
 * @returns the sensitivities, and which faults could not be tried; null when it was stopped.
 */
export async function sensitivitiesOf(
  setup: Setup,
  voltsIn: VoltsIn,
  onProgress: (share: number) => void,
  stopped: () => boolean,
): Promise<Sensitivities | null> {
  const here = await voltsIn(setup);
  /** Central where both neighbours have a field, one-sided where a part lies against another. */
  const along = async (change: (by: number) => Setup, step: number): Promise<readonly number[] | null> => {
    const [low, high] = [await voltsIn(change(-step)), await voltsIn(change(step))];
    return quotient(low, high, 2 * step) ?? quotient(here, high, step) ?? quotient(low, here, step);
  };
  const tasks: readonly (Pick<Sensitivity, "kind" | "partId"> & { readonly run: () => Promise<readonly (readonly number[] | null)[]> })[] =
    [
      ...setup.parts.filter(isElectrode).map(({ id, tap }) => ({
        kind: "electrode" as const,
        partId: id,
        run: async () => {
          const by = tap > 0.5 ? -STEP_TAP : STEP_TAP;
          return [quotient(here, await voltsIn(tapped(setup, id, by)), by * setup.supply.volts)];
        },
      })),
      { kind: "tilt-x", partId: null, run: async () => [await along((by) => tilted(setup, "tiltXDeg", by), STEP_DEG)] },
      { kind: "tilt-y", partId: null, run: async () => [await along((by) => tilted(setup, "tiltYDeg", by), STEP_DEG)] },
      ...setup.parts.map(({ id }) => ({
        kind: "displaced" as const,
        partId: id,
        run: async () => [
          await along((by) => moved(setup, id, "xMm", by), STEP_MM),
          await along((by) => moved(setup, id, "yMm", by), STEP_MM),
        ],
      })),
    ];
  const known: Sensitivity[] = [];
  const untried: Pick<Sensitivity, "kind" | "partId">[] = [];
  for (const [index, { kind, partId, run }] of tasks.entries()) {
    if (stopped()) return null;
    const perUnit = (await run()).filter((one) => one !== null);
    if (perUnit.length === (kind === "displaced" ? 2 : 1)) known.push({ kind, partId, perUnit });
    else untried.push({ kind, partId });
    onProgress((index + 1) / tasks.length);
  }
  return { known, untried };
}
