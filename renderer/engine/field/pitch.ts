import type { Quality } from "../../../shared-types/plan";
import { gapMm } from "../geometry/clearance";
import { pitchFor } from "./grid";
import { type FieldLayout, wallThicknessMm } from "./layout";

/**
 * Across the narrowest gap between two parts there are to be this many links: the field there changes over the gap's width, and
 * the grid's error goes like (pitch / gap)² (measured on random setups: 1e-4 of the current at 7 links, 2e-5 at 14).
 */
const LINKS_ACROSS_GAP = 14;
/** A narrow gap makes the pitch smaller, down to this share: three times as many nodes. */
const LEAST_SHARE_FOR_GAP = 1 / Math.sqrt(3);
/**
 * An insulating plate thinner than two links is only roughly there (measured: 1e-3 of the current), one of three links is exact to
 * 1e-5. For it up to five times as many nodes are spent, if that makes it two links thick at least.
 */
const LINKS_THROUGH_PLATE = 3;
const FEWEST_THROUGH_PLATE = 2.1;
const LEAST_SHARE_FOR_PLATE = 0.45;

/**
 * @returns the pitch (mm) at which a layout is solved in a quality: the tray's, or a smaller one where parts stand close together or
 * insulating plates are thin, and time allows (not while a part moves). Parts that touch ask for nothing: no pitch would do.
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
  const forGap = Math.max(LEAST_SHARE_FOR_GAP * pitch, least / LINKS_ACROSS_GAP);
  const finest = LEAST_SHARE_FOR_PLATE * pitch;
  const forPlates = insulators
    .map(({ placed }) => wallThicknessMm(placed.shape))
    .filter((thickness) => thickness >= FEWEST_THROUGH_PLATE * finest)
    .map((thickness) => Math.max(finest, thickness / LINKS_THROUGH_PLATE));
  return Math.min(forGap, ...forPlates);
}
