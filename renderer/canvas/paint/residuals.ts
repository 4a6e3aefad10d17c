import type { JudgedRun, Verdict } from "../../../shared-types/readings";
import { fixed } from "../../document/number-text";
import { texts } from "../../texts/texts";
import { createCrowd } from "../point-numbers";
import type { CanvasTheme } from "../theme";
import { toScreen, type View } from "../view";
import { type Pen, writeLifted } from "./pen";

/** How far readings lie from what was expected: a bar at each point, up for more and down for less, as long as half-widths of the band. */

/** Length of one half-width, px; bars end at the most that is drawn, with an arrow's head. */
const BAND_PX = 14;
const MOST_BANDS = 3;
const WIDTH_PX = 4;
/** Off the point's ring, so that both are seen. */
const SIDE_PX = 9;

const colourOf = (verdict: Verdict, theme: CanvasTheme): string =>
  ({ pass: theme.note, doubtful: theme.caution, fail: theme.stop })[verdict];

/** One bar beside (x, y) px with a tick at the band's edge. Within the band it is hollow, in doubt half filled, beyond it full. */
function paintBar(pen: Pen, x: number, y: number, inBands: number, verdict: Verdict, theme: CanvasTheme): void {
  const up = inBands >= 0 ? -1 : 1;
  const length = Math.max(1.5, Math.min(MOST_BANDS, Math.abs(inBands)) * BAND_PX);
  const colour = colourOf(verdict, theme);
  pen.fillStyle = theme.halo;
  pen.fillRect(x - WIDTH_PX / 2 - 1.5, Math.min(y, y + up * length) - 1.5, WIDTH_PX + 3, length + 3);
  pen.fillStyle = colour;
  pen.strokeStyle = colour;
  pen.lineWidth = 1.5;
  if (verdict === "fail") pen.fillRect(x - WIDTH_PX / 2, Math.min(y, y + up * length), WIDTH_PX, length);
  if (verdict === "doubtful") pen.fillRect(x - WIDTH_PX / 2, Math.min(y, y + up * length), WIDTH_PX / 2, length);
  pen.strokeRect(x - WIDTH_PX / 2, Math.min(y, y + up * length), WIDTH_PX, length);
  pen.strokeStyle = theme.ink;
  pen.lineWidth = 1;
  pen.beginPath();
  pen.moveTo(x - WIDTH_PX, y);
  pen.lineTo(x + WIDTH_PX, y);
  if (length > BAND_PX) {
    pen.moveTo(x - WIDTH_PX, y + up * BAND_PX);
    pen.lineTo(x + WIDTH_PX, y + up * BAND_PX);
  }
  pen.stroke();
  if (Math.abs(inBands) > MOST_BANDS) {
    const end = y + up * (length + 6);
    pen.fillStyle = colour;
    pen.beginPath();
    pen.moveTo(x - WIDTH_PX, y + up * length);
    pen.lineTo(x + WIDTH_PX, y + up * length);
    pen.lineTo(x, end);
    pen.fill();
  }
}

/** Paints a judged run: bars at the points, and for found places a cross with the way to the predicted line. */
export function paintResiduals(pen: Pen, run: JudgedRun, view: View, theme: CanvasTheme): void {
  const words = texts.readings;
  pen.save();
  pen.font = `600 11px ${theme.font}`;
  pen.textAlign = "left";
  pen.textBaseline = "middle";
  for (const { xMm, yMm, inBands, verdict } of run.readings) {
    const [x, y] = toScreen(view, xMm, yMm);
    paintBar(pen, x - SIDE_PX, y, inBands, verdict, theme);
  }
  for (const { xMm, yMm, nearestMm, verdict } of run.places) {
    const [x, y] = toScreen(view, xMm, yMm);
    for (const [width, colour] of [
      [4, theme.halo],
      [1.8, verdict === null ? theme.ink : colourOf(verdict, theme)],
    ] as const) {
      pen.strokeStyle = colour;
      pen.lineWidth = width;
      pen.beginPath();
      pen.moveTo(x - 5, y - 5);
      pen.lineTo(x + 5, y + 5);
      pen.moveTo(x - 5, y + 5);
      pen.lineTo(x + 5, y - 5);
      if (nearestMm !== null) {
        pen.moveTo(x, y);
        pen.lineTo(...toScreen(view, ...nearestMm));
      }
      pen.stroke();
    }
  }
  // Words last, so that no bar covers them, the worst first: what finds no room beside another is in the table.
  const labels = [
    ...run.readings.flatMap(({ xMm, yMm, inBands, verdict, residualVolts }) =>
      verdict === "pass" ? [] : [{ xMm, yMm, inBands, verdict, value: residualVolts, text: words.volts(fixed(residualVolts, 2)) }],
    ),
    ...run.places.flatMap(({ xMm, yMm, distanceMm, bandMm, verdict }) =>
      distanceMm === null || bandMm === null || verdict === null
        ? []
        : [{ xMm, yMm, inBands: distanceMm / bandMm, verdict, value: distanceMm, text: words.mm(fixed(distanceMm, 1)) }],
    ),
  ].sort((one, other) => Math.abs(other.inBands) - Math.abs(one.inBands));
  const crowd = createCrowd();
  for (const { xMm, yMm, inBands, verdict, value, text } of labels) {
    const [x, y] = toScreen(view, xMm, yMm);
    const whole = `${words.signs[verdict]} ${value > 0 ? "+" : ""}${text}`;
    const [left, middle] = [x + 7, y + (inBands >= 0 ? -13 : 13)];
    const box = [left, middle - 7, left + pen.measureText(whole).width, middle + 7] as const;
    if (crowd.meets(box)) continue;
    crowd.add(box);
    writeLifted(pen, whole, left, middle, theme.ink, theme.halo, 3);
  }
  pen.restore();
}
