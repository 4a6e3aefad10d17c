import type { FieldReading } from "../../../shared-types/plan";
import { radians } from "../../../shared-types/units";
import type { Pin, Section } from "../../document/closer-look";
import { fixed } from "../../document/number-text";
import { texts } from "../../texts/texts";
import type { CanvasTheme } from "../theme";
import { toScreen, type View } from "../view";
import { type Pen, traceBox } from "./pen";

/** A pin's head stands so far off its place, px. */
const HEAD_PX = 16;
const ARROW_PX = 22;
/** Weaker fields point nowhere that could be told. */
const LEAST_V_PER_M = 0.05;

/** The direction of the field at a pin: a short arrow from its place. */
function paintDirection(pen: Pen, [x, y]: readonly [number, number], directionDeg: number, theme: CanvasTheme): void {
  const angle = -radians(directionDeg);
  for (const [width, colour] of [
    [4, theme.halo],
    [1.75, theme.ink],
  ] as const) {
    pen.save();
    pen.translate(x, y);
    pen.rotate(angle);
    pen.strokeStyle = colour;
    pen.lineWidth = width;
    pen.lineJoin = "round";
    pen.beginPath();
    pen.moveTo(0, 0);
    pen.lineTo(ARROW_PX, 0);
    pen.moveTo(ARROW_PX - 6, -4);
    pen.lineTo(ARROW_PX, 0);
    pen.lineTo(ARROW_PX - 6, 4);
    pen.stroke();
    pen.restore();
  }
}

/** Pinned probes: a dot at the place, the field's direction, and a flag with the pin's number and its volts. */
export function paintPins(pen: Pen, pins: readonly Pin[], readings: readonly FieldReading[], view: View, theme: CanvasTheme): void {
  pen.save();
  pen.font = `600 12px ${theme.font}`;
  pen.textBaseline = "middle";
  pins.forEach(({ number, at }, index) => {
    const [x, y] = toScreen(view, ...at);
    const reading = readings[index];
    if (reading !== undefined && reading.volts !== null && reading.fieldVPerM > LEAST_V_PER_M)
      paintDirection(pen, [x, y], reading.directionDeg, theme);
    const text = texts.canvas.pin(number, reading === undefined || reading.volts === null ? null : fixed(reading.volts, 3));
    const width = pen.measureText(text).width + 12;
    const left = Math.min(x - 8, view.widthPx - width - 4);
    const top = y - HEAD_PX - 20;
    pen.strokeStyle = theme.ink;
    pen.lineWidth = 1.5;
    pen.beginPath();
    pen.moveTo(x, y);
    pen.lineTo(x, top + 20);
    pen.stroke();
    pen.beginPath();
    pen.arc(x, y, 3.5, 0, 2 * Math.PI);
    pen.fillStyle = theme.accent;
    pen.fill();
    pen.strokeStyle = theme.halo;
    pen.stroke();
    traceBox(pen, left, top, width, 20, 3);
    pen.fillStyle = theme.accent;
    pen.fill();
    pen.fillStyle = theme.halo;
    pen.fillText(text, left + 6, top + 10.5);
  });
  pen.restore();
}

/** The line of a section, its ends lettered A and B as on a drawing. */
export function paintSection(pen: Pen, { from, to }: Section, view: View, theme: CanvasTheme): void {
  const [a, b] = [toScreen(view, ...from), toScreen(view, ...to)];
  pen.save();
  for (const [width, colour] of [
    [5, theme.halo],
    [2, theme.accent],
  ] as const) {
    pen.strokeStyle = colour;
    pen.lineWidth = width;
    pen.setLineDash([12, 3, 3, 3]);
    pen.beginPath();
    pen.moveTo(...a);
    pen.lineTo(...b);
    pen.stroke();
  }
  pen.setLineDash([]);
  pen.font = `700 12px ${theme.font}`;
  pen.textAlign = "center";
  pen.textBaseline = "middle";
  for (const [[x, y], letter] of [
    [a, "A"],
    [b, "B"],
  ] as const) {
    pen.beginPath();
    pen.arc(x, y, 9, 0, 2 * Math.PI);
    pen.fillStyle = theme.accent;
    pen.fill();
    pen.fillStyle = theme.halo;
    pen.fillText(letter, x, y + 0.5);
  }
  pen.restore();
}
