import type { Plan } from "../../shared-types/plan";
import type { Part, Setup } from "../../shared-types/setup";
import { outlinedThing } from "./hit";
import { trimmed } from "./number-text";
import type { PixelBox } from "./point-numbers";
import { toScreen, type View } from "./view";

/** The small sign beside a conductor: which lead it is on and its volts, or that it floats. */
export interface Tag {
  readonly partId: string;
  /** "+" for the live or positive lead, "−" for the common or negative one, null for a tap between them or a floating part. */
  readonly sign: "+" | "−" | null;
  readonly text: string;
  readonly dashed: boolean;
  readonly box: PixelBox;
}

export const TAG_HEIGHT_PX = 20;
const SIGN_PX = 18;
const PADDING_PX = 6;
const GAP_PX = 6;

function signOf(part: Part): Tag["sign"] {
  if (part.role !== "electrode") return null;
  return part.tap === 0 ? "−" : part.tap === 1 ? "+" : null;
}

function textOf(part: Part, setup: Setup, plan: Plan | null): string {
  if (part.role === "electrode") return `${trimmed(part.tap * setup.supply.volts, 3)} V`;
  const reading = plan?.conductors.find(({ id }) => id === part.id);
  return reading === undefined ? "floats" : `floats ${trimmed(reading.volts, 2)} V`;
}

/**
 * Places the tags: above a part, or below it where the tray's top edge is near or `below` says so (a handle needs the place).
 * @param plan the newest plan, for the potential that a floating part takes; null while there is none for this setup.
 * @param widthOf how wide a text is, px.
 */
export function placeTags(
  setup: Setup,
  plan: Plan | null,
  view: View,
  widthOf: (text: string) => number,
  below: ReadonlySet<string>,
): readonly Tag[] {
  return setup.parts.flatMap((part): readonly Tag[] => {
    if (part.role === "insulator") return [];
    const sign = signOf(part);
    const text = textOf(part, setup, plan);
    const width = widthOf(text) + 2 * PADDING_PX + (sign === null ? 0 : SIGN_PX - PADDING_PX / 2);
    const [left, bottom, right, top] = outlinedThing(part).box;
    const [middle, upper] = toScreen(view, (left + right) / 2, top);
    const [, lower] = toScreen(view, 0, bottom);
    const under = below.has(part.id) || upper - TAG_HEIGHT_PX - GAP_PX < 4;
    const y = under ? lower + GAP_PX : upper - TAG_HEIGHT_PX - GAP_PX;
    const x = Math.round(middle - width / 2);
    return [
      { partId: part.id, sign, text, dashed: part.role === "floating", box: [x, Math.round(y), x + width, Math.round(y) + TAG_HEIGHT_PX] },
    ];
  });
}
