import type { Place } from "./rounded-place";

/** An improvement smaller than this (mm) is not worth another order: small moves of a part must not renumber a plan. */
const WORTHWHILE_MM = 1;
/** What a level must save (mm) to be followed against its usual sense. */
const SENSE_MM = 2;

const distance = ([ax, ay]: Place, [bx, by]: Place): number => Math.hypot(ax - bx, ay - by);

/** 2-opt on an open way: turns a piece of it round while that makes the way shorter. */
function untangled(places: readonly Place[]): Place[] {
  const way = [...places];
  for (let improved = true; improved; ) {
    improved = false;
    for (let from = 0; from < way.length - 1; from++) {
      for (let to = from + 1; to < way.length; to++) {
        const before = (from > 0 ? distance(way[from - 1], way[from]) : 0) + (to + 1 < way.length ? distance(way[to], way[to + 1]) : 0);
        const after = (from > 0 ? distance(way[from - 1], way[to]) : 0) + (to + 1 < way.length ? distance(way[from], way[to + 1]) : 0);
        if (after > before - WORTHWHILE_MM) continue;
        way.splice(from, to - from + 1, ...way.slice(from, to + 1).reverse());
        improved = true;
      }
    }
  }
  return way;
}

/** The ways in which one level can be followed: to and fro, and round a loop from any of its points. */
function waysOf(stretches: readonly { readonly closed: boolean; readonly places: readonly Place[] }[]): readonly (readonly Place[])[] {
  const all = stretches.flatMap(({ places }) => places);
  if (all.length < 2) return [all];
  const loop = stretches.length === 1 && stretches[0].closed;
  const ways = loop ? all.map((_, start) => [...all.slice(start), ...all.slice(0, start)]) : [stretches.length > 1 ? untangled(all) : all];
  return ways.flatMap((way) => [way, loop ? [way[0], ...way.slice(1).reverse()] : [...way].reverse()]);
}

/**
 * An order that a hand can follow: level after level, each along its line, to and fro so that the next level begins where
 * the last one ended; the shortest such way by dynamic programming over the levels.
 * @param levels for each level its stretches with their places.
 * @returns the places of each level in visiting order.
 */
export function visitingOrder(
  levels: readonly (readonly { readonly closed: boolean; readonly places: readonly Place[] }[])[],
): readonly (readonly Place[])[] {
  const order: (readonly Place[])[] = levels.map(() => []);
  const filled = levels.map(waysOf).flatMap((ways, level) => (ways[0].length > 0 ? [{ level, ways }] : []));
  if (filled.length === 0) return order;
  let costs: readonly number[] = filled[0].ways.map((_, way) => (way === 0 ? 0 : SENSE_MM));
  const cameFrom: number[][] = [];
  for (let index = 1; index < filled.length; index++) {
    const ends = filled[index - 1].ways.map((way) => way[way.length - 1]);
    const from: number[] = [];
    const next = filled[index].ways.map((way, which) => {
      let best = 0;
      let least = Infinity;
      ends.forEach((end, before) => {
        const cost = costs[before] + distance(end, way[0]);
        // Equal ways stay as they are: rounding must not choose between them.
        if (cost < least - 1e-6) {
          least = cost;
          best = before;
        }
      });
      from[which] = best;
      return least;
    });
    costs = next;
    cameFrom.push(from);
  }
  let way = costs.indexOf(Math.min(...costs));
  for (let index = filled.length - 1; index >= 0; index--) {
    order[filled[index].level] = filled[index].ways[way];
    if (index > 0) way = cameFrom[index - 1][way];
  }
  return order;
}
