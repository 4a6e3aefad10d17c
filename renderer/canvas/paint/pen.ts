import type { Loop } from "../../engine/geometry/outline";
import type { View } from "../view";

/** The drawing surface: the stage's own context, in CSS pixels, y downwards. */
export type Pen = CanvasRenderingContext2D;

/** Adds loops of an outline (mm) to the pen's path, arcs as true arcs. Fill with "evenodd" or "nonzero": holes run the other way. */
export function trace(pen: Pen, loops: readonly Loop[], { scale, originX, originY }: View): void {
  for (const loop of loops) {
    loop.forEach((piece, index) => {
      if (piece.kind === "edge") {
        if (index === 0) pen.moveTo(originX + piece.x0 * scale, originY - piece.y0 * scale);
        pen.lineTo(originX + piece.x1 * scale, originY - piece.y1 * scale);
        return;
      }
      const { cx, cy, radius, startRad, sweepRad } = piece;
      if (index === 0)
        pen.moveTo(originX + (cx + radius * Math.cos(startRad)) * scale, originY - (cy + radius * Math.sin(startRad)) * scale);
      // The screen's y axis points down: angles change their sign and the sense of turning with them.
      pen.arc(originX + cx * scale, originY - cy * scale, radius * scale, -startRad, -(startRad + sweepRad), sweepRad > 0);
    });
    pen.closePath();
  }
}

/** Adds a run of points x, y, x, y … (mm) to the pen's path. */
export function tracePath(pen: Pen, path: Float64Array, { scale, originX, originY }: View): void {
  for (let index = 0; index + 1 < path.length; index += 2) {
    const x = originX + (path[index] as number) * scale;
    const y = originY - (path[index + 1] as number) * scale;
    if (index === 0) pen.moveTo(x, y);
    else pen.lineTo(x, y);
  }
}

/** Adds a box with round corners to the pen's path, px. */
export function traceBox(pen: Pen, x: number, y: number, width: number, height: number, radius: number): void {
  pen.beginPath();
  pen.roundRect(x, y, width, height, radius);
}

/** Writes text with a halo that lifts it off what lies below. */
export function writeLifted(pen: Pen, text: string, x: number, y: number, ink: string, halo: string, haloPx = 3): void {
  pen.lineJoin = "round";
  pen.lineWidth = haloPx;
  pen.strokeStyle = halo;
  pen.strokeText(text, x, y);
  pen.fillStyle = ink;
  pen.fillText(text, x, y);
}
