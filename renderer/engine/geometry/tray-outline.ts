import type { Tray } from "../../../shared-types/setup";
import type { Loop } from "./outline";

/** @returns [length, width] in mm of the box that just holds the tray's inside; its lower-left corner is the origin. */
export function traySizeMm(tray: Tray): readonly [number, number] {
  return tray.shape === "rectangle" ? [tray.lengthMm, tray.widthMm] : [tray.diameterMm, tray.diameterMm];
}

/** @returns the inside of the tray's wall as a counter-clockwise loop, mm. */
export function trayOutline(tray: Tray): Loop {
  if (tray.shape === "circle") {
    const radius = tray.diameterMm / 2;
    return [{ kind: "bow", cx: radius, cy: radius, radius, startRad: 0, sweepRad: 2 * Math.PI }];
  }
  const { lengthMm: l, widthMm: w } = tray;
  return [
    { kind: "edge", x0: 0, y0: 0, x1: l, y1: 0 },
    { kind: "edge", x0: l, y0: 0, x1: l, y1: w },
    { kind: "edge", x0: l, y0: w, x1: 0, y1: w },
    { kind: "edge", x0: 0, y0: w, x1: 0, y1: 0 },
  ];
}

/** @returns distance (mm) from a point to the tray's wall: positive inside the tray, negative outside. */
export function depthFromWallMm(tray: Tray, x: number, y: number): number {
  if (tray.shape === "circle") {
    const radius = tray.diameterMm / 2;
    return radius - Math.hypot(x - radius, y - radius);
  }
  return Math.min(x, tray.lengthMm - x, y, tray.widthMm - y);
}
