import type { Plan } from "../../../shared-types/plan";
import type { Tray } from "../../../shared-types/setup";
import { trayOutline } from "../../engine/geometry/tray-outline";
import { type ColourScale, colourAt } from "../colour-scale";
import type { PlacedLabel } from "../line-labels";
import type { CanvasTheme } from "../theme";
import { toScreen, type View } from "../view";
import { type Pen, trace, tracePath, writeLifted } from "./pen";

/** How strongly a field is shown that no longer belongs to the setup: it greys out until there is one again. */
const OUT_OF_DATE = 0.3;

/** What of the field is to be seen. */
export interface FieldParts {
  readonly picture: boolean;
  readonly equipotentials: boolean;
  readonly fieldLines: boolean;
}

/** The potential in colours, clipped to the inside of the wall. */
export function paintPicture(pen: Pen, plan: Plan, image: CanvasImageSource, tray: Tray, view: View, outOfDate: boolean): void {
  const { columns, rows, pitchXMm, pitchYMm } = plan.picture;
  const [left, top] = toScreen(view, -pitchXMm / 2, (rows - 0.5) * pitchYMm);
  pen.save();
  pen.beginPath();
  trace(pen, [trayOutline(tray)], view);
  pen.clip();
  pen.globalAlpha = outOfDate ? OUT_OF_DATE : 1;
  pen.imageSmoothingEnabled = true;
  pen.imageSmoothingQuality = "high";
  pen.drawImage(image, left, top, columns * pitchXMm * view.scale, rows * pitchYMm * view.scale);
  pen.restore();
}

/** A small arrow head half way along a field line: from high to low potential. */
function paintArrow(pen: Pen, path: Float64Array, view: View): void {
  const middle = 2 * Math.floor(path.length / 4);
  if (middle < 2) return;
  const [x0, y0] = toScreen(view, path[middle - 2] as number, path[middle - 1] as number);
  const [x1, y1] = toScreen(view, path[middle] as number, path[middle + 1] as number);
  const angle = Math.atan2(y1 - y0, x1 - x0);
  pen.save();
  pen.translate(x1, y1);
  pen.rotate(angle);
  pen.beginPath();
  pen.moveTo(3.5, 0);
  pen.lineTo(-3.5, 3);
  pen.lineTo(-3.5, -3);
  pen.fill();
  pen.restore();
}

/** Field lines, thinner than equipotentials. */
export function paintFieldLines(pen: Pen, plan: Plan, view: View, theme: CanvasTheme, outOfDate: boolean): void {
  pen.save();
  pen.globalAlpha = outOfDate ? OUT_OF_DATE : 0.6;
  pen.strokeStyle = theme.ink;
  pen.fillStyle = theme.ink;
  pen.lineWidth = 0.7;
  pen.beginPath();
  for (const line of plan.fieldLines) tracePath(pen, line, view);
  pen.stroke();
  for (const line of plan.fieldLines) paintArrow(pen, line, view);
  pen.restore();
}

/** Equipotentials with their labels along the line. A label's halo has the colour that its own potential has in the picture. */
export function paintEquipotentials(
  pen: Pen,
  plan: Plan,
  labels: readonly PlacedLabel[],
  view: View,
  theme: CanvasTheme,
  scale: ColourScale | null,
  outOfDate: boolean,
): void {
  pen.save();
  pen.globalAlpha = outOfDate ? OUT_OF_DATE : 1;
  pen.strokeStyle = theme.ink;
  pen.lineWidth = 1.1;
  pen.lineJoin = "round";
  pen.beginPath();
  for (const { paths } of plan.equipotentials) for (const path of paths) tracePath(pen, path, view);
  pen.stroke();
  pen.font = labelFont(theme);
  pen.textAlign = "center";
  pen.textBaseline = "middle";
  const [low, high] = plan.spanV;
  // A label is a statement; a field that is out of date states nothing.
  for (const { text, volts, x, y, angleRad } of outOfDate ? [] : labels) {
    pen.save();
    pen.translate(x, y);
    pen.rotate(angleRad);
    writeLifted(pen, text, 0, 0.5, theme.ink, scale === null ? theme.halo : colourAt(scale, (volts - low) / (high - low)), 6);
    pen.restore();
  }
  pen.restore();
}

/** @returns the font of labels along lines. */
export const labelFont = (theme: CanvasTheme): string => `500 12px ${theme.font}`;
