import { trimmed } from "../../document/number-text";
import { texts } from "../../texts/texts";
import type { Gap } from "../gaps";
import type { EqualGap, Guide } from "../guides";
import type { CanvasTheme } from "../theme";
import { toScreen, type View } from "../view";
import { type Pen, traceBox } from "./pen";

/** A guide reaches beyond what it joins, px. */
const BEYOND_PX = 12;

/** Lines on which edges and middles meet. */
export function paintGuides(pen: Pen, guides: readonly Guide[], view: View, theme: CanvasTheme): void {
  pen.save();
  pen.strokeStyle = theme.accent;
  pen.lineWidth = 1.25;
  pen.setLineDash([2, 3]);
  pen.beginPath();
  for (const { axis, atMm, fromMm, toMm } of guides) {
    const [x0, y0] = axis === "x" ? toScreen(view, atMm, fromMm) : toScreen(view, fromMm, atMm);
    const [x1, y1] = axis === "x" ? toScreen(view, atMm, toMm) : toScreen(view, toMm, atMm);
    const [dx, dy] = axis === "x" ? [0, BEYOND_PX] : [-BEYOND_PX, 0];
    pen.moveTo(x0 + dx, y0 + dy);
    pen.lineTo(x1 - dx, y1 - dy);
  }
  pen.stroke();
  pen.restore();
}

/** A length between two places, with its number: how a gap and a tape are drawn. */
export function paintLength(
  pen: Pen,
  from: readonly [number, number],
  to: readonly [number, number],
  text: string,
  theme: CanvasTheme,
): void {
  const length = Math.hypot(to[0] - from[0], to[1] - from[1]);
  if (length < 1) return;
  const [ux, uy] = [(to[0] - from[0]) / length, (to[1] - from[1]) / length];
  pen.save();
  for (const [width, colour] of [
    [4, theme.halo],
    [1.5, theme.accent],
  ] as const) {
    pen.strokeStyle = colour;
    pen.lineWidth = width;
    pen.beginPath();
    pen.moveTo(...from);
    pen.lineTo(...to);
    for (const [x, y] of [from, to]) {
      pen.moveTo(x - 5 * uy, y + 5 * ux);
      pen.lineTo(x + 5 * uy, y - 5 * ux);
    }
    pen.stroke();
  }
  pen.font = `600 12px ${theme.font}`;
  pen.textAlign = "center";
  pen.textBaseline = "middle";
  const width = pen.measureText(text).width + 10;
  // On a short length the number stands beside it, not on it.
  const aside = length < width + 8 ? 16 : 0;
  const [x, y] = [
    (from[0] + to[0]) / 2 + Math.abs(uy) * (aside + (aside > 0 ? width / 2 - 8 : 0)),
    (from[1] + to[1]) / 2 - Math.abs(ux) * aside,
  ];
  traceBox(pen, x - width / 2, y - 9, width, 18, 4);
  pen.fillStyle = theme.accent;
  pen.fill();
  pen.fillStyle = theme.halo;
  pen.fillText(text, x, y + 0.5);
  pen.restore();
}

/** Equal gaps of a row, each with the sign and its millimetres. */
export function paintEqualGaps(pen: Pen, gaps: readonly EqualGap[], view: View, theme: CanvasTheme): void {
  for (const { axis, fromMm, toMm, atMm } of gaps) {
    const [from, to] =
      axis === "x"
        ? [toScreen(view, fromMm, atMm), toScreen(view, toMm, atMm)]
        : [toScreen(view, atMm, fromMm), toScreen(view, atMm, toMm)];
    paintLength(pen, from, to, texts.canvas.hand.equalGap(trimmed(toMm - fromMm, 2)), theme);
  }
}

/** Clear gaps to neighbours and wall while a part moves. */
export function paintGaps(pen: Pen, gaps: readonly Gap[], view: View, theme: CanvasTheme): void {
  for (const { from, to, gapMm } of gaps)
    paintLength(pen, toScreen(view, ...from), toScreen(view, ...to), texts.canvas.hand.gap(trimmed(gapMm, 1)), theme);
}
