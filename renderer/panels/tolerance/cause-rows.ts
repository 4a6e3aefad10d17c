import type { Part } from "../../../shared-types/setup";
import type { CauseKey, CauseUnit, RankedCause } from "../../../shared-types/tolerance";
import { trimmed } from "../../document/number-text";
import { texts } from "../../texts/texts";

const words = texts.probe.tolerance;

type Family = keyof typeof words.causes;

/** What a person takes for one cause: both directions of one placing. */
const FAMILY: Readonly<Record<CauseKey, Family>> = {
  supply: "supply",
  meter: "meter",
  "probe-x": "probe",
  "probe-y": "probe",
  "part-x": "part-place",
  "part-y": "part-place",
  "part-turn": "part-turn",
  depth: "depth",
  "tilt-x": "tilt",
  "tilt-y": "tilt",
  conductivity: "conductivity",
  temperature: "temperature",
  interface: "interface",
  loading: "loading",
  engine: "engine",
};

/** One bar: its share (0 to 1) and its words. */
export interface CauseRow {
  readonly key: string;
  readonly share: number;
  readonly text: string;
}

/** Below this share a cause is counted among the rest. */
const WORTH_A_BAR = 0.01;

const percentOf = (share: number): string => trimmed(100 * share, share < 0.1 ? 1 : 0);

function amountOf(halfWidth: number, unit: CauseUnit): string {
  const decimals = halfWidth >= 0.1 ? 2 : 4;
  return `${trimmed(halfWidth, decimals)} ${words.units[unit]}`;
}

/**
 * @returns the causes as bars, the largest first, both directions of one placing as one; below `most` bars the rest in one line.
 * @param causes of one point or of the whole tray.
 */
export function causeRows(
  causes: readonly Pick<RankedCause, "key" | "partId" | "unit" | "halfWidth" | "share">[],
  parts: readonly Pick<Part, "id" | "name">[],
  most: number,
): readonly CauseRow[] {
  const families = new Map<string, { family: Family; partId: string | null; unit: CauseUnit; halfWidth: number; share: number }>();
  for (const { key, partId, unit, halfWidth, share } of causes) {
    const family = FAMILY[key];
    const id = `${family} ${partId ?? ""}`;
    const before = families.get(id);
    families.set(id, { family, partId, unit, halfWidth: Math.max(halfWidth, before?.halfWidth ?? 0), share: share + (before?.share ?? 0) });
  }
  const nameOf = (partId: string | null): string => parts.find(({ id }) => id === partId)?.name || (partId ?? "");
  const sorted = [...families].sort(([, a], [, b]) => b.share - a.share);
  const shown = sorted.filter(([, { share }]) => share >= WORTH_A_BAR).slice(0, most);
  const rows = shown.map(([key, { family, partId, unit, halfWidth, share }]): CauseRow => {
    return { key, share, text: words.row(amountOf(halfWidth, unit), words.causes[family](nameOf(partId)), percentOf(share)) };
  });
  const rest = 1 - shown.reduce((sum, [, { share }]) => sum + share, 0);
  return rest < 0.001 || rows.length === 0 ? rows : [...rows, { key: "rest", share: rest, text: words.rest(percentOf(rest)) }];
}
