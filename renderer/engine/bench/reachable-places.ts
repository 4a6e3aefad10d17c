import type { Setup } from "../../../shared-types/setup";
import { boundsOf, outlineOf } from "../geometry/outline";
import { signedDistance } from "../geometry/signed-distance";
import { depthFromWallMm, traySizeMm } from "../geometry/tray-outline";
import { waterDepthMm } from "../geometry/water-depth";

/** How many places are looked at across the whole tray: enough for a median, few enough for every drag. */
const PLACES = 180;

/** @returns an even grid of places (mm) where there is water and the probe keeps its clearance from walls and parts. */
export function reachablePlacesMm(setup: Setup): readonly (readonly [number, number])[] {
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  const stepMm = Math.sqrt((lengthMm * widthMm) / PLACES);
  const columns = Math.max(1, Math.round(lengthMm / stepMm));
  const rows = Math.max(1, Math.round(widthMm / stepMm));
  const { wallClearanceMm, partClearanceMm } = setup.probing;
  const parts = setup.parts.map((part) => {
    const loops = outlineOf(part);
    return { part, loops, box: boundsOf(loops) };
  });
  const places: (readonly [number, number])[] = [];
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      const x = ((column + 0.5) * lengthMm) / columns;
      const y = ((row + 0.5) * widthMm) / rows;
      if (depthFromWallMm(setup.tray, x, y) < wallClearanceMm || waterDepthMm(setup, x, y) <= 0) continue;
      const clear = parts.every(({ part, loops, box: [left, bottom, right, top] }) => {
        const far = x < left - partClearanceMm || x > right + partClearanceMm || y < bottom - partClearanceMm || y > top + partClearanceMm;
        return far || signedDistance(part, x, y, loops) >= partClearanceMm;
      });
      if (clear) places.push([x, y]);
    }
  }
  return places;
}
