import type { Setup } from "../../../shared-types/setup";
import { outlined } from "./overlap";
import { covers } from "./signed-distance";
import { depthFromWallMm } from "./tray-outline";
import { waterDepthMm } from "./water-depth";

/** Whether a place (mm) is open water: within the tray, over a wet bed, in no part. */
export type HoldsWater = (xMm: number, yMm: number) => boolean;

/** @returns the test for open water of a setup, quick enough to be asked thousands of times. */
export function openWaterOf(setup: Setup): HoldsWater {
  const parts = setup.parts.map(outlined);
  const { tiltXDeg, tiltYDeg, slabs } = setup.water;
  const alwaysWet = tiltXDeg === 0 && tiltYDeg === 0 && slabs.length === 0;
  return (x, y) => {
    if (depthFromWallMm(setup.tray, x, y) < 0) return false;
    for (const { placed, box } of parts) {
      if (x >= box[0] && x <= box[2] && y >= box[1] && y <= box[3] && covers(placed, x, y)) return false;
    }
    return alwaysWet || waterDepthMm(setup, x, y) > 0;
  };
}
