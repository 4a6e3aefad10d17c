import type { Equipotential, ProbePlan, ProbePoint } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import type { PotentialField } from "../field/potential-field";
import { checkPlaces } from "./check-places";
import { leastDistanceMm, levelPlaces } from "./level-points";
import { evenLevels } from "./levels";
import { reachOf } from "./reach";
import { FARTHEST_ROUNDING_MM, type Place } from "./rounded-place";
import { takenPlaces } from "./taken-places";
import { toleranceBand } from "./tolerance-band";
import { visitingOrder } from "./visiting-order";

/** The order in which levels choose their places: from the middle outwards, so that mirrored levels have equal say. */
function fromMiddle(count: number): number[] {
  const middle = (count - 1) / 2;
  return Array.from({ length: count }, (_, index) => index).sort((a, b) => Math.abs(a - middle) - Math.abs(b - middle) || a - b);
}

/**
 * The probe plan: on every level points spread evenly by length over what the probe can reach of its line, numbered so that a
 * hand goes to and fro over the tray, and after them check points on loose conductors and in the water they enclose.
 * Places are rounded to 0.5 mm; what is expected there is read from the field at the rounded place.
 * @param equipotentials lines of the field at `evenLevels(field.spanV, setup.probing.levels)`.
 */
export function planProbes(setup: Setup, field: PotentialField, equipotentials: readonly Equipotential[]): ProbePlan {
  const { spanV } = field;
  const volts = evenLevels(spanV, setup.probing.levels);
  const reach = reachOf(setup);
  const bandAt = toleranceBand(setup, Math.max(Math.abs(spanV[0]), Math.abs(spanV[1])));

  const found = volts.map((): ReturnType<typeof levelPlaces> => ({ stretches: [], note: null }));
  const taken = takenPlaces(leastDistanceMm(setup) + FARTHEST_ROUNDING_MM);
  for (const level of fromMiddle(volts.length)) {
    const line = equipotentials.find((each) => Math.abs(each.volts - volts[level]) <= 1e-9 * (spanV[1] - spanV[0]));
    found[level] = levelPlaces(setup, field, line ?? { volts: volts[level], paths: [] }, reach, taken);
    for (const place of found[level].stretches.flatMap(({ places }) => places)) taken.add(place);
  }

  let number = 0;
  const pointAt = ([xMm, yMm]: Place): ProbePoint[] => {
    const { inside, volts: expected, voltsError, fieldVPerM, directionDeg } = field.read(xMm, yMm);
    if (expected === null) return [];
    number++;
    const voltsPerMm = fieldVPerM / 1000;
    return [{ n: number, xMm, yMm, inside, volts: expected, voltsError, voltsPerMm, directionDeg, bandV: bandAt(expected, voltsPerMm) }];
  };
  const order = visitingOrder(found.map(({ stretches }) => stretches));
  const levels = volts.map((level, index) => ({ volts: level, note: found[index].note, points: order[index].flatMap(pointAt) }));
  return { spanV, levels, checks: checkPlaces(setup).flatMap(pointAt) };
}
