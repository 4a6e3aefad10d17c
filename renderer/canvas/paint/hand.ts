import type { Finding } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import { thingById } from "../../document/edit";
import type { Handle } from "../handles";
import { outlinedThing } from "../hit";
import type { Tag } from "../tags";
import { TAG_HEIGHT_PX } from "../tags";
import type { CanvasTheme } from "../theme";
import { toScreen, type View } from "../view";
import { type Pen, trace, traceBox } from "./pen";

/** @returns the font of tags. */
export const tagFont = (theme: CanvasTheme): string => `600 12px ${theme.font}`;

/** Tags of conductors: sign in a disc, volts; floating ones dashed. */
export function paintTags(pen: Pen, tags: readonly Tag[], theme: CanvasTheme): void {
  pen.save();
  pen.font = tagFont(theme);
  pen.textBaseline = "middle";
  for (const { box, sign, text, dashed } of tags) {
    const [left, top, right, bottom] = box;
    const middle = (top + bottom) / 2;
    traceBox(pen, left + 0.5, top + 0.5, right - left - 1, bottom - top - 1, dashed ? 3 : TAG_HEIGHT_PX / 2);
    pen.fillStyle = theme.tag;
    pen.fill();
    pen.strokeStyle = sign === "+" ? theme.positive : theme.tagInk;
    pen.lineWidth = 1.25;
    pen.setLineDash(dashed ? [4, 3] : []);
    pen.stroke();
    pen.setLineDash([]);
    let textLeft = left + 6;
    if (sign !== null) {
      const x = left + TAG_HEIGHT_PX / 2;
      pen.fillStyle = sign === "+" ? theme.positive : theme.common;
      pen.beginPath();
      pen.arc(x, middle, TAG_HEIGHT_PX / 2 - 3, 0, 2 * Math.PI);
      pen.fill();
      // Drawn, not written: a sign must look the same in every font.
      pen.strokeStyle = theme.tag;
      pen.lineWidth = 2;
      pen.beginPath();
      pen.moveTo(x - 3.5, middle);
      pen.lineTo(x + 3.5, middle);
      if (sign === "+") {
        pen.moveTo(x, middle - 3.5);
        pen.lineTo(x, middle + 3.5);
      }
      pen.stroke();
      textLeft = left + TAG_HEIGHT_PX;
    }
    pen.fillStyle = theme.tagInk;
    pen.textAlign = "left";
    pen.fillText(text, textLeft, middle + 0.5);
  }
  pen.restore();
}

function outline(pen: Pen, setup: Setup, id: string, view: View): boolean {
  const thing = thingById(setup, id);
  if (thing === undefined) return false;
  pen.beginPath();
  trace(pen, outlinedThing(thing).loops, view);
  return true;
}

export interface Emphasis {
  readonly selection: readonly string[];
  /** The thing under the pointer. */
  readonly hovered: string | null;
  readonly findings: readonly Finding[];
}

/** The edges of selected things, of the one under the pointer, and of those that something is wrong with. */
export function paintEmphasis(pen: Pen, setup: Setup, view: View, theme: CanvasTheme, { selection, hovered, findings }: Emphasis): void {
  pen.save();
  pen.lineJoin = "round";
  for (const id of new Set(findings.filter(({ severity }) => severity === "stop").flatMap(({ partIds }) => partIds))) {
    if (!outline(pen, setup, id, view)) continue;
    pen.strokeStyle = theme.halo;
    pen.lineWidth = 4;
    pen.stroke();
    pen.strokeStyle = theme.stop;
    pen.lineWidth = 2.5;
    pen.setLineDash([7, 4]);
    pen.stroke();
    pen.setLineDash([]);
  }
  if (hovered !== null && !selection.includes(hovered) && outline(pen, setup, hovered, view)) {
    pen.strokeStyle = theme.accent;
    pen.lineWidth = 2;
    pen.stroke();
  }
  for (const id of selection) {
    if (!outline(pen, setup, id, view)) continue;
    pen.strokeStyle = theme.halo;
    pen.lineWidth = 5;
    pen.stroke();
    pen.strokeStyle = theme.accent;
    pen.lineWidth = 2.5;
    const held = thingById(setup, id);
    // A locked part's edge is broken, and a lock stands on it.
    pen.setLineDash(held?.locked === true ? [3, 4] : []);
    pen.stroke();
    pen.setLineDash([]);
    if (held?.locked === true) paintLock(pen, toScreen(view, held.xMm, held.yMm), theme);
  }
  pen.restore();
}

/** A padlock in a disc. */
function paintLock(pen: Pen, [x, y]: readonly [number, number], theme: CanvasTheme): void {
  pen.save();
  pen.translate(x, y);
  pen.beginPath();
  pen.arc(0, 0, 10, 0, 2 * Math.PI);
  pen.fillStyle = theme.tag;
  pen.fill();
  pen.strokeStyle = theme.accent;
  pen.lineWidth = 1.5;
  pen.stroke();
  pen.fillStyle = theme.tagInk;
  pen.fillRect(-4.5, -1, 9, 6.5);
  pen.strokeStyle = theme.tagInk;
  pen.beginPath();
  pen.arc(0, -1.5, 2.8, Math.PI, 0);
  pen.stroke();
  pen.restore();
}

/** Handles: squares that change a size, a disc on a stem that turns. */
export function paintHandles(pen: Pen, handles: readonly Handle[], view: View, theme: CanvasTheme, active: Handle["kind"] | null): void {
  pen.save();
  pen.strokeStyle = theme.accent;
  pen.lineWidth = 1.5;
  for (const handle of handles) {
    const [x, y] = toScreen(view, handle.shownXMm, handle.shownYMm);
    pen.fillStyle = handle.kind === active ? theme.accent : theme.halo;
    if (handle.kind === "turn") {
      const angle = ((handle.alongDeg + 90) * Math.PI) / 180;
      pen.beginPath();
      pen.moveTo(x - 7 * Math.cos(angle), y + 7 * Math.sin(angle));
      pen.lineTo(x - 28 * Math.cos(angle), y + 28 * Math.sin(angle));
      pen.stroke();
      pen.beginPath();
      pen.arc(x, y, 7, 0, 2 * Math.PI);
      pen.fill();
      pen.stroke();
      pen.beginPath();
      pen.arc(x, y, 3.2, -2.6, 1.6);
      pen.strokeStyle = handle.kind === active ? theme.halo : theme.accent;
      pen.stroke();
      pen.strokeStyle = theme.accent;
      continue;
    }
    pen.save();
    pen.translate(x, y);
    pen.rotate((-handle.alongDeg * Math.PI) / 180);
    pen.beginPath();
    pen.rect(-4.5, -4.5, 9, 9);
    pen.fill();
    pen.stroke();
    pen.restore();
  }
  pen.restore();
}

/** The frame that a hand pulls up to select, between two places on the stage (px). */
export function paintFrame(pen: Pen, from: readonly [number, number], to: readonly [number, number], theme: CanvasTheme): void {
  const [left, top] = [Math.min(from[0], to[0]), Math.min(from[1], to[1])];
  const [width, height] = [Math.abs(from[0] - to[0]), Math.abs(from[1] - to[1])];
  pen.save();
  pen.fillStyle = theme.accent;
  pen.globalAlpha = 0.12;
  pen.fillRect(left, top, width, height);
  pen.globalAlpha = 1;
  pen.strokeStyle = theme.accent;
  pen.lineWidth = 1.25;
  pen.setLineDash([5, 3]);
  pen.strokeRect(left, top, width, height);
  pen.restore();
}
