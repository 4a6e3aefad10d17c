import type { Place } from "./rounded-place";
import { orderAlong, placeAlong, type Stretch } from "./stretches";

/** Remainders that differ by less than this count as equal: of two halves of a line always the same one gets the odd point. */
const EQUAL_REMAINDER = 0.05;

/** How many of `count` points each stretch gets, in proportion to its length (largest remainders). */
function shares(stretches: readonly Stretch[], count: number): number[] {
  const total = stretches.reduce((sum, { lengthMm }) => sum + lengthMm, 0);
  const quotas = stretches.map(({ lengthMm }) => (count * lengthMm) / total);
  const given = quotas.map((quota) => Math.floor(quota + 1e-9));
  let left = count - given.reduce((sum, each) => sum + each, 0);
  const taken = new Set<number>();
  while (left > 0) {
    let best = -1;
    quotas.forEach((quota, index) => {
      if (taken.has(index)) return;
      if (best < 0 || quota - given[index] > quotas[best] - given[best] + EQUAL_REMAINDER) best = index;
    });
    if (best < 0) break;
    given[best]++;
    taken.add(best);
    left--;
  }
  return given;
}

/**
 * Points spread evenly by length over stretches of a line: each stands in the middle of an equal portion of its stretch;
 * on a loop the first stands at the loop's beginning.
 * @param stretches in the order in which they are to be visited.
 * @returns for each stretch that gets any its places, mm.
 */
export function spreadPlaces(
  stretches: readonly Stretch[],
  count: number,
): readonly { readonly closed: boolean; readonly places: readonly Place[] }[] {
  const ordered = [...stretches].sort((a, b) => orderAlong(a) - orderAlong(b));
  const given = shares(ordered, count);
  return ordered.flatMap((stretch, which) => {
    const portions = given[which];
    if (portions === 0) return [];
    const places = Array.from({ length: portions }, (_, index) =>
      placeAlong(stretch, ((index + (stretch.closed ? 0 : 0.5)) / portions) * stretch.lengthMm),
    );
    return [{ closed: stretch.closed, places }];
  });
}
