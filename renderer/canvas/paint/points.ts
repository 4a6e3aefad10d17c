import type { PlacedPoint } from "../point-numbers";
import { RING_PX } from "../point-numbers";
import type { CanvasTheme } from "../theme";
import type { Pen } from "./pen";
import { writeLifted } from "./pen";

/** @returns the font of point numbers. */
export const numberFont = (theme: CanvasTheme): string => `600 11px ${theme.font}`;

/** Probe points: a ring with a dot at the place and its number beside it. `marked` are drawn filled (selected in a list). */
export function paintPoints(pen: Pen, points: readonly PlacedPoint[], theme: CanvasTheme, marked: ReadonlySet<number>): void {
  pen.save();
  pen.lineWidth = 1.4;
  for (const { point, x, y } of points) {
    const chosen = marked.has(point.n);
    pen.beginPath();
    pen.arc(x, y, chosen ? RING_PX + 2 : RING_PX, 0, 2 * Math.PI);
    pen.fillStyle = chosen ? theme.accent : theme.halo;
    pen.fill();
    pen.strokeStyle = theme.ink;
    pen.stroke();
    pen.beginPath();
    pen.arc(x, y, 1.2, 0, 2 * Math.PI);
    pen.fillStyle = chosen ? theme.halo : theme.ink;
    pen.fill();
  }
  pen.font = numberFont(theme);
  pen.textAlign = "center";
  pen.textBaseline = "middle";
  for (const { point, number } of points) {
    if (number === null) continue;
    writeLifted(pen, String(point.n), (number[0] + number[2]) / 2, (number[1] + number[3]) / 2 + 0.5, theme.ink, theme.halo, 3);
  }
  pen.restore();
}
