import type { Equipotential, Quality } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import type { PotentialField } from "../field/potential-field";
import { type HoldsWater, openWaterOf } from "../geometry/open-water";
import { runsOf, type SideRun, stretchesOf } from "./grid-stretches";
import { carriedOn } from "./line-ends";
import { type SideCrossings, sideCrossings } from "./side-crossings";

/**
 * Equipotentials by marching squares of our own. d3-contour draws the outlines of areas above a level: it knows no cells
 * without a value, so that lines would close along insulators and walls, and none of metal at the level itself.
 */

/** Metal this near to a level (share of the span) counts as being at it; far above the noise of a solved field, far below a digit. */
const PLATEAU_SHARE = 3e-6;

function lengthMmOf(places: readonly number[]): number {
  let length = 0;
  for (let index = 2; index < places.length; index += 2)
    length += Math.hypot(places[index] - places[index - 2], places[index + 1] - places[index - 1]);
  return length;
}

/** The places of a run, without those that coincide with the one before. */
function placesOf({ sides, closed }: SideRun, level: number, crossings: SideCrossings, leastMm: number): number[] {
  const places: number[] = [];
  for (const side of sides) {
    const [x, y] = crossings.place(side, level);
    const last = places.length - 2;
    if (last < 0 || Math.hypot(x - places[last], y - places[last + 1]) > leastMm) places.push(x, y);
  }
  if (closed) places.push(places[0], places[1]);
  return places;
}

function carryBothEndsOn(places: number[], field: PotentialField, holdsWater: HoldsWater, reachMm: number): number[] {
  const end = carriedOn(places, field, holdsWater, reachMm);
  const reversed: number[] = [];
  for (let index = places.length - 2; index >= 0; index -= 2) reversed.push(places[index], places[index + 1]);
  const start = carriedOn(reversed, field, holdsWater, reachMm);
  return [...(start ?? []), ...places, ...(end ?? [])];
}

/**
 * The lines of equal potential in the water. They end at insulators, at the wall and at the waterline, close round
 * conductors and are not drawn inside them.
 * @param levels volts, in any order; a level outside the span gets no path.
 * @param quality `live` interpolates between grid nodes; otherwise every place is found with readings of the field.
 * @returns one entry a level, in the order of `levels`; paths shorter than a cell of the grid are left out.
 */
export function equipotentialsOf(
  field: PotentialField,
  setup: Setup,
  levels: readonly number[],
  quality: Quality,
): readonly Equipotential[] {
  const { picture, spanV } = field;
  const ascending = Float64Array.from(levels).sort();
  const stretches = stretchesOf(picture, ascending, PLATEAU_SHARE * (spanV[1] - spanV[0]));
  const crossings = sideCrossings(field, setup, quality !== "live");
  const holdsWater = openWaterOf(setup);
  const cellMm = Math.max(picture.pitchXMm, picture.pitchYMm);
  const reachMm = 1.6 * Math.hypot(picture.pitchXMm, picture.pitchYMm);
  const lines = Array.from(ascending, (volts, index): Equipotential => {
    const paths: Float64Array[] = [];
    for (const run of runsOf(stretches[index], crossings.passable)) {
      const places = placesOf(run, volts, crossings, 1e-3 * cellMm);
      const whole = run.closed ? places : carryBothEndsOn(places, field, holdsWater, reachMm);
      if (lengthMmOf(whole) >= cellMm) paths.push(Float64Array.from(whole));
    }
    return { volts, paths };
  });
  return levels.map((volts) => lines[ascending.indexOf(volts)]);
}
