import type { Setup } from "../../../shared-types/setup";
import { radians } from "../../../shared-types/units";
import { outlined } from "../geometry/overlap";
import { signedDistance } from "../geometry/signed-distance";
import { depthFromWallMm } from "../geometry/tray-outline";
import { bedDepthMm, waterDepthMm } from "../geometry/water-depth";

/** Where the probe can go. */
export interface Reach {
  /**
   * @param spareMm clearance asked for on top of the setup's.
   * @returns what the probe would come too near to at a place (mm), in words, or null when it is clear of everything.
   */
  readonly hindrance: (xMm: number, yMm: number, spareMm: number) => string | null;
}

/** Directions in which the water round a place is looked at where slabs may stand out of it. */
const COMPASS = Array.from({ length: 24 }, (_, index) => [Math.cos((index * Math.PI) / 12), Math.sin((index * Math.PI) / 12)] as const);

/** @returns a part's name for a person: its own, or its id. */
export const nameOf = (part: { readonly id: string; readonly name: string }): string => (part.name === "" ? `part ${part.id}` : part.name);

/**
 * The probe is clear where the edge of its tip keeps `wallClearanceMm` from the wall and the waterline and
 * `partClearanceMm` from every part.
 */
export function reachOf(setup: Setup): Reach {
  const { wallClearanceMm, partClearanceMm, probeTipMm } = setup.probing;
  const tipMm = probeTipMm / 2;
  const parts = setup.parts.map((part) => ({ ...outlined(part), name: nameOf(part) }));
  const { tiltXDeg, tiltYDeg, slabs } = setup.water;
  const fall = Math.hypot(Math.tan(radians(tiltXDeg)), Math.tan(radians(tiltYDeg)));

  const nearDry = (x: number, y: number, clearMm: number): boolean => {
    if (fall > 0 && bedDepthMm(setup, x, y) < clearMm * fall) return true;
    return (
      slabs.length > 0 &&
      (waterDepthMm(setup, x, y) <= 0 || COMPASS.some(([c, s]) => waterDepthMm(setup, x + clearMm * c, y + clearMm * s) <= 0))
    );
  };

  return {
    hindrance: (x, y, spareMm) => {
      const fromWallMm = wallClearanceMm + tipMm + spareMm;
      const fromPartMm = partClearanceMm + tipMm + spareMm;
      if (depthFromWallMm(setup.tray, x, y) < fromWallMm) return "the wall";
      for (const { placed, loops, box, name } of parts) {
        const far = x < box[0] - fromPartMm || x > box[2] + fromPartMm || y < box[1] - fromPartMm || y > box[3] + fromPartMm;
        if (!far && signedDistance(placed, x, y, loops) < fromPartMm) return name;
      }
      return nearDry(x, y, fromWallMm) ? "the waterline" : null;
    },
  };
}
