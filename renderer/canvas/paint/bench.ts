import type { Setup, Tray } from "../../../shared-types/setup";
import { outlineOf } from "../../engine/geometry/outline";
import { trayOutline, traySizeMm } from "../../engine/geometry/tray-outline";
import type { CanvasTheme } from "../theme";
import { toScreen, type View } from "../view";
import { type Pen, trace } from "./pen";

/** The wall's thickness as drawn, mm. The file gives inner sizes alone: only the inner edge is to scale. */
export const WALL_MM = 4;

/** The outside of the wall as a path: the inside widened by its thickness. */
function traceOutside(pen: Pen, tray: Tray, view: View): void {
  const [lengthMm, widthMm] = traySizeMm(tray);
  const wall = WALL_MM * view.scale;
  const [left, bottom] = toScreen(view, 0, 0);
  pen.beginPath();
  if (tray.shape === "circle") {
    const radius = (tray.diameterMm / 2) * view.scale;
    pen.arc(left + radius, bottom - radius, radius + wall, 0, 2 * Math.PI);
  } else {
    const top = bottom - widthMm * view.scale;
    pen.roundRect(left - wall, top - wall, lengthMm * view.scale + 2 * wall, widthMm * view.scale + 2 * wall, wall);
  }
}

/** The table, the tray's wall and bed, the water as far as it reaches, and the slabs on the bed. */
export function paintBench(pen: Pen, setup: Setup, view: View, theme: CanvasTheme): void {
  pen.fillStyle = theme.bench;
  pen.fillRect(0, 0, view.widthPx, view.heightPx);

  traceOutside(pen, setup.tray, view);
  pen.save();
  pen.shadowColor = theme.dark ? "rgba(0, 0, 0, 0.6)" : "rgba(40, 40, 30, 0.28)";
  pen.shadowBlur = 14;
  pen.shadowOffsetY = 4;
  pen.fillStyle = theme.wall;
  pen.fill();
  pen.restore();
  pen.strokeStyle = theme.wallEdge;
  pen.lineWidth = 1;
  pen.stroke();

  pen.beginPath();
  trace(pen, [trayOutline(setup.tray)], view);
  pen.fillStyle = theme.base;
  pen.fill();
  pen.save();
  pen.clip();
  pen.fillStyle = theme.water;
  paintWater(pen, setup, view);
  pen.restore();
}

/** Water covers the bed on the deep side of the waterline, a straight line where the tray is tilted. */
function paintWater(pen: Pen, { tray, water }: Setup, view: View): void {
  const slopeX = Math.tan((water.tiltXDeg * Math.PI) / 180);
  const slopeY = Math.tan((water.tiltYDeg * Math.PI) / 180);
  const slope = Math.hypot(slopeX, slopeY);
  const [lengthMm, widthMm] = traySizeMm(tray);
  if (slope === 0) {
    pen.fillRect(0, 0, view.widthPx, view.heightPx);
    return;
  }
  // From the tray's middle the bed falls dry at this distance against the slope.
  const [alongX, alongY] = [slopeX / slope, slopeY / slope];
  const shoreMm = -water.depthMm / slope;
  const farMm = 2 * Math.hypot(lengthMm, widthMm);
  const corner = (along: number, across: number) =>
    toScreen(view, lengthMm / 2 + along * alongX - across * alongY, widthMm / 2 + along * alongY + across * alongX);
  pen.beginPath();
  for (const [x, y] of [corner(shoreMm, -farMm), corner(farMm, -farMm), corner(farMm, farMm), corner(shoreMm, farMm)]) pen.lineTo(x, y);
  pen.fill();
}

/** The slabs on the bed, seen through the water: their edges matter, since the depth steps there. */
export function paintSlabs(pen: Pen, setup: Setup, view: View, theme: CanvasTheme): void {
  for (const slab of setup.water.slabs) {
    pen.beginPath();
    trace(pen, outlineOf(slab), view);
    pen.fillStyle = theme.slab;
    pen.fill("evenodd");
    pen.strokeStyle = theme.slabEdge;
    pen.lineWidth = 1.25;
    pen.setLineDash([9, 3, 2, 3]);
    pen.stroke();
    pen.setLineDash([]);
  }
}

/** The inner edge of the wall, over the field. */
export function paintWallEdge(pen: Pen, tray: Tray, view: View, theme: CanvasTheme): void {
  pen.beginPath();
  trace(pen, [trayOutline(tray)], view);
  pen.strokeStyle = theme.wallEdge;
  pen.lineWidth = 1.5;
  pen.stroke();
}
