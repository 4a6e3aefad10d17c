import type { Setup } from "../../../shared-types/setup";
import { radians } from "../../../shared-types/units";
import { covers } from "./signed-distance";
import { traySizeMm } from "./tray-outline";

/**
 * Depth of the water over the bed, slabs not counted: linear across a tilted tray, given at its centre.
 * @returns mm; zero or less where the bed is dry.
 */
export function bedDepthMm(setup: Setup, xMm: number, yMm: number): number {
  const { depthMm, tiltXDeg, tiltYDeg } = setup.water;
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  return depthMm + (xMm - lengthMm / 2) * Math.tan(radians(tiltXDeg)) + (yMm - widthMm / 2) * Math.tan(radians(tiltYDeg));
}

/**
 * Depth of the water over whatever lies below it: the bed, or the slabs there (plates that overlap are stacked).
 * @returns mm; zero or less where it is dry.
 */
export function waterDepthMm(setup: Setup, xMm: number, yMm: number): number {
  let depth = bedDepthMm(setup, xMm, yMm);
  for (const slab of setup.water.slabs) if (covers(slab, xMm, yMm)) depth -= slab.thicknessMm;
  return depth;
}
