import { parseSetup } from "../../shared-types/parse-setup";
import type { Setup } from "../../shared-types/setup";

/** What is known of an example's field from outside this program. */
export interface KnownAnswer {
  /** Where the values come from, for a reader who wants to check them. */
  readonly source: string;
  /** S = 1/(σ·h·R) and the share by which it may be missed at print quality; null with more than two potentials. */
  readonly shapeFactor: { readonly value: number; readonly within: number } | null;
  /** Current that leaves each electrode over σ·h, V, where it is known. */
  readonly currents: readonly { readonly id: string; readonly voltsPerSigmaDepth: number }[];
  /** Potentials of loose conductors. */
  readonly conductors: readonly { readonly id: string; readonly volts: number }[];
  /** Potentials at places in the water. */
  readonly places: readonly { readonly xMm: number; readonly yMm: number; readonly volts: number }[];
  /** Share of the span by which a potential may be missed at print quality. */
  readonly voltsWithin: number;
}

/** A ready setup from the physics prep room of Saltmarsh College, with its known answer. */
export interface Example {
  readonly id: string;
  readonly title: string;
  /** One sentence: what it shows. */
  readonly purpose: string;
  readonly setup: Setup;
  readonly known: KnownAnswer;
}

/** The tray, water, supply and meter that most examples share: what stands on the prep room's shelf. */
const PREP_ROOM = {
  format: "fieldtray.setup",
  version: 1,
  tray: { shape: "rectangle", lengthMm: 300, widthMm: 200, wallHeightMm: 40, baseMm: 3, baseMaterial: "acrylic" },
  water: { depthMm: 12, conductivityUsPerCm: 500, temperatureC: 21, salt: "none" },
  supply: { waveform: "ac", frequencyHz: 50, volts: 6, currentLimitA: 1, source: "safety-isolated" },
  meter: { inputMegohm: 10, counts: 2000, accuracyPercent: 1, accuracyDigits: 3 },
};

/** What an example gives itself; the rest is the prep room's. */
interface OwnPart {
  readonly title: string;
  readonly notes: string;
  readonly parts: readonly object[];
  readonly tray?: object;
  readonly water?: object;
  readonly probing?: object;
}

/**
 * @param own what differs from the prep room's tray, water, supply and meter.
 * @returns the validated setup of an example; a wrong one is a fault of ours and throws.
 */
export function exampleSetup(own: OwnPart): Setup {
  const parsed = parseSetup({ ...PREP_ROOM, ...own, tray: own.tray ?? PREP_ROOM.tray, water: { ...PREP_ROOM.water, ...own.water } });
  if (!parsed.ok) throw new Error(`the example "${own.title}" is no setup: ${parsed.problems.map(({ message }) => message).join("; ")}`);
  return parsed.value;
}

/** The prep room's round tray: a ring lies just inside its wall. */
export const ROUND_TRAY = { shape: "circle", diameterMm: 190, wallHeightMm: 40, baseMm: 3, baseMaterial: "acrylic" };

/** The pair of bars that several examples share: 100 mm long, 160 mm of water between them (a usual distance; common practice, no source). */
export const BAR_PAIR: readonly object[] = [
  {
    id: "A",
    name: "Left bar",
    role: "electrode",
    tap: 0,
    xMm: 65,
    yMm: 100,
    turnDeg: 90,
    shape: { kind: "bar", lengthMm: 100, widthMm: 10 },
  },
  {
    id: "B",
    name: "Right bar",
    role: "electrode",
    tap: 1,
    xMm: 235,
    yMm: 100,
    turnDeg: 90,
    shape: { kind: "bar", lengthMm: 100, widthMm: 10 },
  },
];
