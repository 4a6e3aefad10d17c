import type { Tray } from "../../../shared-types/setup";
import { traySizeMm } from "../../engine/geometry/tray-outline";
import { texts } from "../../texts/texts";
import type { CanvasTheme } from "../theme";
import { toScreen, type View } from "../view";
import { WALL_MM } from "./bench";
import type { Pen } from "./pen";

/** Two rules lie on the bench along the tray, at the left and below; where that place is out of sight they slide to the stage's edge. */

const RULE_PX = 26;
const GAP_PX = 8;
/** Room for the name and unit at a rule's far end. */
const NAME_PX = 48;
const STEPS_MM = [1, 2, 5, 10, 20, 50, 100, 200, 500, 1000];

/** The smallest step (mm) that looks at least so wide. */
const stepFor = (scale: number, leastPx: number): number => STEPS_MM.find((step) => step * scale >= leastPx) ?? 1000;

interface Marks {
  readonly smallMm: number;
  readonly middleMm: number;
  readonly numberMm: number;
}

function marksFor(scale: number): Marks {
  const smallMm = stepFor(scale, 4);
  const numberMm = stepFor(scale, 44);
  return { smallMm, middleMm: Math.min(5 * smallMm, numberMm), numberMm };
}

const isMultiple = (mm: number, of: number): boolean => Math.abs(mm / of - Math.round(mm / of)) < 1e-6;

/** Calls `mark` for every mark of a rule that is in sight. */
function everyMark(
  sizeMm: number,
  fromMm: number,
  toMm: number,
  marks: Marks,
  mark: (mm: number, tickPx: number, numbered: boolean) => void,
): void {
  const first = Math.max(0, Math.ceil(fromMm / marks.smallMm));
  const last = Math.floor(Math.min(sizeMm, toMm) / marks.smallMm + 1e-9);
  for (let count = first; count <= last; count++) {
    const mm = count * marks.smallMm;
    const numbered = isMultiple(mm, marks.numberMm);
    mark(mm, numbered ? 11 : isMultiple(mm, marks.middleMm) ? 8 : 5, numbered);
  }
}

function body(pen: Pen, theme: CanvasTheme, x: number, y: number, width: number, height: number): void {
  pen.fillStyle = theme.rule;
  pen.fillRect(x, y, width, height);
  pen.strokeStyle = theme.wallEdge;
  pen.lineWidth = 1;
  pen.strokeRect(Math.round(x) + 0.5, Math.round(y) + 0.5, Math.round(width) - 1, Math.round(height) - 1);
}

/** Upper edge of the rule along x and right edge of the one along y, px, and whether one has slid from its place on the bench. */
function placesOf(view: View): { readonly ruleTop: number; readonly ruleRight: number; readonly slid: boolean } {
  const off = WALL_MM * view.scale + GAP_PX;
  const [left, bottom] = toScreen(view, 0, 0);
  const ruleTop = Math.min(bottom + off, view.heightPx - RULE_PX);
  const ruleRight = Math.max(left - off, RULE_PX);
  return { ruleTop, ruleRight, slid: ruleTop < bottom + off || ruleRight > left - off };
}

/** @returns whether the rules lie over the tray, because their own place is out of sight; else they lie below whatever is on the bench. */
export const rulesLieOver = (view: View): boolean => placesOf(view).slid;

/** Paints both rules, in mm from the tray's origin. */
export function paintRules(pen: Pen, tray: Tray, view: View, theme: CanvasTheme): void {
  const [lengthMm, widthMm] = traySizeMm(tray);
  const { scale, widthPx, heightPx } = view;
  const marks = marksFor(scale);
  const { ruleTop, ruleRight } = placesOf(view);
  const [left, bottom] = toScreen(view, 0, 0);
  const [right, top] = toScreen(view, lengthMm, widthMm);
  pen.font = `11px ${theme.font}`;
  pen.textBaseline = "middle";

  body(pen, theme, left - 1, ruleTop, right - left + 2, RULE_PX);
  body(pen, theme, ruleRight - RULE_PX, top - 1, RULE_PX, bottom - top + 2);
  pen.fillStyle = theme.ruleInk;
  pen.strokeStyle = theme.ruleInk;
  pen.beginPath();
  pen.textAlign = "center";
  everyMark(lengthMm, -left / scale, (widthPx - left) / scale, marks, (mm, tick, numbered) => {
    const x = Math.round(left + mm * scale) + 0.5;
    pen.moveTo(x, ruleTop);
    pen.lineTo(x, ruleTop + tick);
    if (numbered && x < right - NAME_PX) pen.fillText(String(mm), x, ruleTop + 18);
  });
  everyMark(widthMm, (bottom - heightPx) / scale, bottom / scale, marks, (mm, tick, numbered) => {
    const y = Math.round(bottom - mm * scale) + 0.5;
    pen.moveTo(ruleRight, y);
    pen.lineTo(ruleRight - tick, y);
    if (!numbered || y < top + NAME_PX) return;
    pen.save();
    pen.translate(ruleRight - 18, y);
    pen.rotate(-Math.PI / 2);
    pen.fillText(String(mm), 0, 0);
    pen.restore();
  });
  pen.lineWidth = 1;
  pen.stroke();
  pen.textAlign = "right";
  pen.fillText(texts.canvas.rules.x, right - 2, ruleTop + 18);
  pen.save();
  pen.translate(ruleRight - 18, top + 2);
  pen.rotate(-Math.PI / 2);
  pen.fillText(texts.canvas.rules.y, 0, 0);
  pen.restore();
  paintCorner(pen, ruleTop, ruleRight, left, bottom, theme);
}

/** Where both rules have slid to the stage's edges, the corner belongs to neither. */
function paintCorner(pen: Pen, ruleTop: number, ruleRight: number, left: number, bottom: number, theme: CanvasTheme): void {
  if (ruleTop > bottom || ruleRight < left) return;
  body(pen, theme, ruleRight - RULE_PX, ruleTop, RULE_PX, RULE_PX);
}

/** The origin: a ring with a cross, as on a drawing. */
export function paintOrigin(pen: Pen, view: View, theme: CanvasTheme): void {
  const [x, y] = toScreen(view, 0, 0);
  pen.strokeStyle = theme.ink;
  pen.fillStyle = theme.halo;
  pen.lineWidth = 1.25;
  pen.beginPath();
  pen.arc(x, y, 5, 0, 2 * Math.PI);
  pen.fill();
  pen.stroke();
  pen.beginPath();
  pen.moveTo(x - 8, y);
  pen.lineTo(x + 8, y);
  pen.moveTo(x, y - 8);
  pen.lineTo(x, y + 8);
  pen.stroke();
}
