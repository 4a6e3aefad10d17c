import type { Quality } from "../../../shared-types/plan";
import { gapMm } from "../geometry/clearance";
import { pitchFor } from "./grid";
import type { FieldLayout } from "./layout";

/**
 * Across the narrowest gap between two parts there are to be this many links: the field there changes over the gap's width, and
 * the grid's error goes like (pitch / gap)² (measured on random setups: 1e-4 of the current at 7 links, 2e-5 at 14).
 */
const LINKS_ACROSS_GAP = 14;
/** A narrow gap makes the pitch smaller, down to this share: three times as many nodes. */
const LEAST_SHARE = 1 / Math.sqrt(3);

/**
 * @returns the pitch (mm) at which a layout is solved in a quality: the tray's, or a smaller one where parts stand close together
 * and time allows (not while a part moves). Parts that touch ask for nothing: no pitch would do.
 */
export function pitchOf({ conductors, insulators, setup }: FieldLayout, quality: Quality): number {
  const pitch = pitchFor(setup.tray, quality);
  if (quality !== "print") return pitch;
  const solids = [...conductors, ...insulators].map(({ placed, loops, bounds }) => ({ placed, loops, box: bounds }));
  const narrow = LINKS_ACROSS_GAP * pitch;
  let least = narrow;
  solids.forEach((a, index) => {
    for (const b of solids.slice(index + 1)) {
      const gap = gapMm(a, b);
      if (gap > 0) least = Math.min(least, gap);
    }
  });
  return Math.max(LEAST_SHARE * pitch, least / LINKS_ACROSS_GAP);
}
