import type { Plan } from "../../shared-types/plan";
import type { Part, Setup } from "../../shared-types/setup";
import { radians } from "../../shared-types/units";
import { trimmed } from "../document/number-text";
import { covers } from "../engine/geometry/signed-distance";
import { texts } from "../texts/texts";
import { outlinedThing } from "./hit";
import { type Crowd, createCrowd, type PixelBox } from "./point-numbers";
import { toScreen, toTray, type View } from "./view";

const words = texts.canvas.tags;

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
/** Further off while the handles of a selected part are shown, px. */
const HANDLES_PX = 14;

function signOf(part: Part): Tag["sign"] {
  if (part.role !== "electrode") return null;
  return part.tap === 0 ? "−" : part.tap === 1 ? "+" : null;
}

/** What a tag may say, the best first, shorter ones for where it finds no room. The dashed edge alone says that a part floats. */
function textsOf(part: Part, setup: Setup, plan: Plan | null): readonly string[] {
  if (part.role === "electrode") return [words.volts(trimmed(part.tap * setup.supply.volts, 3))];
  const reading = plan?.conductors.find(({ id }) => id === part.id);
  if (reading === undefined) return [words.floats];
  const volts = trimmed(reading.volts, 2);
  return [words.floatsAt(volts), words.volts(volts)];
}

/** Room that a tag inside a part leaves to the part's edge, px. */
const INSIDE_PX = 5;

/** From a bar's middle to its ends, the upper one first, then to its long sides: direction on the tray and distance, mm. */
function barSides({ turnDeg, shape }: Part): readonly (readonly [dx: number, dy: number, reachMm: number])[] {
  if (shape.kind !== "bar") return [];
  const [c, s] = [Math.cos(radians(turnDeg)), Math.sin(radians(turnDeg))];
  const end = s > -1e-9 ? 1 : -1;
  const side = c > -1e-9 ? 1 : -1;
  const [half, across] = [shape.lengthMm / 2, shape.widthMm / 2];
  return [
    [end * c, end * s, half],
    [-end * c, -end * s, half],
    [-side * s, side * c, across],
    [side * s, -side * c, across],
  ];
}

/** Places for a tag of this width, the best first: on the metal itself where it is broad enough, else beside the part. */
function* placesOf(part: Part, view: View, width: number, selected: boolean): Generator<PixelBox> {
  const [leftMm, bottomMm, rightMm, topMm] = outlinedThing(part).box;
  const [left, top] = toScreen(view, leftMm, topMm);
  const [right, bottom] = toScreen(view, rightMm, bottomMm);
  const boxAt = (x: number, y: number): PixelBox => {
    const [tagLeft, tagTop] = [Math.round(x - width / 2), Math.round(y - TAG_HEIGHT_PX / 2)];
    return [tagLeft, tagTop, tagLeft + width, tagTop + TAG_HEIGHT_PX];
  };
  const [x, y] = [(left + right) / 2, (top + bottom) / 2];
  const off = GAP_PX + TAG_HEIGHT_PX / 2 + (selected ? HANDLES_PX : 0);
  const inside = boxAt(x, y);
  const corners = [
    [inside[0] - INSIDE_PX, inside[1] - INSIDE_PX],
    [inside[2] + INSIDE_PX, inside[1] - INSIDE_PX],
    [inside[0] - INSIDE_PX, inside[3] + INSIDE_PX],
    [inside[2] + INSIDE_PX, inside[3] + INSIDE_PX],
  ] as const;
  const solid = part.shape.kind === "bar" || part.shape.kind === "disc" || part.shape.kind === "polygon";
  if (solid && corners.every((corner) => covers(part, ...toTray(view, ...corner)))) yield inside;
  if (part.shape.kind === "bar") {
    for (const [dx, dy, reachMm] of barSides(part)) {
      const reach = reachMm * view.scale + GAP_PX + (selected ? HANDLES_PX : 0) + (Math.abs(dx) * width + Math.abs(dy) * TAG_HEIGHT_PX) / 2;
      const box = boxAt(x + dx * reach, y - dy * reach);
      if (box[1] > 4) yield box;
    }
    return;
  }
  if (top - off - TAG_HEIGHT_PX / 2 > 4) yield boxAt(x, top - off);
  yield boxAt(x, bottom + off);
  yield boxAt(left - GAP_PX - (selected ? HANDLES_PX : 0) - width / 2, y);
  yield boxAt(right + GAP_PX + (selected ? HANDLES_PX : 0) + width / 2, y);
}

/** Whether a tag's box (px) would lie on a part, told by its corners, the middles of its sides and its own middle. */
function liesOn(part: Part, [left, top, right, bottom]: PixelBox, view: View): boolean {
  const [boxLeft, boxBottom, boxRight, boxTop] = outlinedThing(part).box;
  const [tagLeft, tagTop] = toTray(view, left, top);
  const [tagRight, tagBottom] = toTray(view, right, bottom);
  if (tagLeft > boxRight || tagRight < boxLeft || tagBottom > boxTop || tagTop < boxBottom) return false;
  const across = [tagLeft, (tagLeft + tagRight) / 2, tagRight];
  return [tagBottom, (tagBottom + tagTop) / 2, tagTop].some((y) => across.some((x) => covers(part, x, y)));
}

/**
 * Places the tags so that they hide no probe point, no other part and no other tag, and stand clear of the handles of what is
 * selected. In a crowd a floating part's tag gets shorter, then stays away; an electrode's is always there.
 * @param plan the newest plan, for the potential that a floating part takes; null while there is none for this setup.
 * @param widthOf how wide a text is, px.
 * @param points the rings and numbers of probe points.
 */
export function placeTags(
  setup: Setup,
  plan: Plan | null,
  view: View,
  widthOf: (text: string) => number,
  selection: ReadonlySet<string>,
  points: Crowd,
): readonly Tag[] {
  const placed = createCrowd();
  const conductors = setup.parts.filter(({ role }) => role !== "insulator");
  // Electrodes choose first: their tags say how the tray is wired.
  const inTurn = [...conductors.filter(({ role }) => role === "electrode"), ...conductors.filter(({ role }) => role === "floating")];
  return inTurn.flatMap((part): readonly Tag[] => {
    const sign = signOf(part);
    const free = (box: PixelBox): boolean =>
      !points.meets(box) && !placed.meets(box) && !setup.parts.some((other) => other !== part && liesOn(other, box, view));
    const choices = textsOf(part, setup, plan).flatMap((text) => {
      const width = Math.ceil(widthOf(text)) + 2 * PADDING_PX + (sign === null ? 0 : SIGN_PX - PADDING_PX / 2);
      return [...placesOf(part, view, width, selection.has(part.id))].map((box) => ({ text, box }));
    });
    const wanted = part.role === "electrode" || selection.has(part.id);
    const choice = choices.find(({ box }) => free(box)) ?? (wanted ? choices[0] : undefined);
    if (choice === undefined) return [];
    placed.add(choice.box);
    return [{ partId: part.id, sign, dashed: part.role === "floating", ...choice }];
  });
}
