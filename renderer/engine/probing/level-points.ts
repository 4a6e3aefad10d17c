import type { Equipotential } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import { radians } from "../../../shared-types/units";
import type { PotentialField } from "../field/potential-field";
import { traySizeMm } from "../geometry/tray-outline";
import type { Reach } from "./reach";
import { FARTHEST_ROUNDING_MM, type Place, roundedPlace } from "./rounded-place";
import { spreadPlaces } from "./spread";
import { clearStretches, type Stretch } from "./stretches";
import { type TakenPlaces, takenPlaces } from "./taken-places";

/** The places found on one level, before they are numbered. */
export interface LevelPlaces {
  readonly stretches: readonly { readonly closed: boolean; readonly places: readonly Place[] }[];
  /** Why there are fewer than asked for, else null. */
  readonly note: string | null;
}

/** A place on a traced line is at most this far from the true one, mm; farther corrections would be of another line. */
const FARTHEST_CORRECTION_MM = 0.2;

/**
 * How far apart (mm) two points must be for the probe to tell them apart: its tip's diameter, and twice the placement
 * limit, beyond which two placements cannot overlap; at least 1 mm, the grid of the paper.
 */
export function leastDistanceMm(setup: Setup): number {
  return Math.max(1, setup.probing.probeTipMm, 2 * setup.probing.placementMm);
}

/** The place on the level next to a place on its traced line (one step of Newton's method along the field). */
function onLevel([x, y]: Place, volts: number, field: PotentialField): Place {
  const reading = field.read(x, y);
  if (reading.volts === null || reading.inside !== null || reading.fieldVPerM === 0) return [x, y];
  const downhill = ((reading.volts - volts) / reading.fieldVPerM) * 1000;
  if (Math.abs(downhill) > FARTHEST_CORRECTION_MM) return [x, y];
  const angle = radians(reading.directionDeg);
  return [x + downhill * Math.cos(angle), y + downhill * Math.sin(angle)];
}

/** @returns whether any two of the places are nearer than `leastMm`. */
function anyTooClose(places: readonly Place[], leastMm: number): boolean {
  const before = takenPlaces(leastMm);
  return places.some((place) => {
    if (before.anyWithin(place, leastMm)) return true;
    before.add(place);
    return false;
  });
}

const asked = (count: number): string => (count === 1 ? "1 point" : `${count} points`);

function noteOf(
  found: number,
  wanted: number,
  reachableMm: number,
  leastMm: number,
  hindrances: ReadonlyMap<string, number>,
): string | null {
  if (found === wanted) return null;
  const most = [...hindrances].sort((a, b) => b[1] - a[1])[0];
  const why = most === undefined ? "" : `; the rest is too near to ${most[0]}`;
  if (found === 0)
    return most === undefined
      ? "No point: no line of this level runs through the water."
      : `No point: all of this line is too near to ${most[0]}.`;
  return `Only ${found} of ${asked(wanted)}: the probe reaches ${reachableMm.toFixed(1)} mm of this line and points must be ${leastMm} mm apart${why}.`;
}

/**
 * Chooses the places of one level: spread evenly by length over the part of its line that the probe can reach, each rounded
 * to 0.5 mm without coming too near to anything.
 * @param others places of other levels, which the new ones keep away from; asked about up to `leastDistanceMm` + rounding.
 */
export function levelPlaces(setup: Setup, field: PotentialField, line: Equipotential, reach: Reach, others: TakenPlaces): LevelPlaces {
  const leastMm = leastDistanceMm(setup);
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  const wanted = setup.probing.pointsPerLevel;
  const hindrances = new Map<string, number>();
  const isClear = (place: Place): boolean => {
    // Room for the rounding, so that it can break no clearance.
    const hindrance = others.anyWithin(place, leastMm + FARTHEST_ROUNDING_MM)
      ? "the points of the next level"
      : reach.hindrance(place[0], place[1], FARTHEST_ROUNDING_MM);
    if (hindrance !== null) hindrances.set(hindrance, (hindrances.get(hindrance) ?? 0) + 1);
    return hindrance === null;
  };
  const stretches: Stretch[] = line.paths.flatMap((path) => clearStretches(path, isClear, [lengthMm / 2, widthMm / 2]));
  const reachableMm = stretches.reduce((sum, stretch) => sum + stretch.lengthMm, 0);
  const fits = ([x, y]: Place): boolean => reach.hindrance(x, y, 0) === null && !others.anyWithin([x, y], leastMm);
  const placed = (place: Place): Place => {
    const corrected = roundedPlace(setup.tray, onLevel(place, line.volts, field));
    return fits(corrected) ? corrected : roundedPlace(setup.tray, place);
  };
  const most = reachableMm === 0 ? 0 : Math.min(wanted, Math.max(1, Math.floor(reachableMm / leastMm)));
  // Among many points a few fewer hardly show, and trying every count would be slow.
  for (let count = most; count > 0; count -= Math.max(1, Math.floor(count / 20))) {
    const chosen = spreadPlaces(stretches, count).map(({ closed, places }) => ({ closed, places: places.map(placed) }));
    if (
      anyTooClose(
        chosen.flatMap(({ places }) => places),
        leastMm,
      )
    )
      continue;
    return { stretches: chosen, note: noteOf(count, wanted, reachableMm, leastMm, hindrances) };
  }
  return { stretches: [], note: noteOf(0, wanted, 0, leastMm, hindrances) };
}
