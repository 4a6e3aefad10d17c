import { radians } from "../../../shared-types/units";
import type { PotentialField } from "../field/potential-field";
import type { HoldsWater } from "../geometry/open-water";

/** How finely a place on the water's edge is found, mm. */
const EDGE_MM = 1e-3;

/**
 * Where a straight way leaves the water.
 * @returns the last place in the water (mm), or null when the whole way is wet.
 */
export function leavesWaterAt(
  x: number,
  y: number,
  alongX: number,
  alongY: number,
  reachMm: number,
  holdsWater: HoldsWater,
): readonly [number, number] | null {
  const stepMm = reachMm / 16;
  let wet = 0;
  for (let dry = stepMm; dry <= reachMm + 1e-9; dry += stepMm) {
    if (holdsWater(x + dry * alongX, y + dry * alongY)) {
      wet = dry;
      continue;
    }
    let far = dry;
    while (far - wet > EDGE_MM) {
      const middle = (wet + far) / 2;
      if (holdsWater(x + middle * alongX, y + middle * alongY)) wet = middle;
      else far = middle;
    }
    return [x + wet * alongX, y + wet * alongY];
  }
  return null;
}

/**
 * Carries the end of an open equipotential on to the edge of the water (an insulator, the wall, the waterline, metal),
 * which the grid misses by up to a cell: along the line's direction there, square to the field.
 * @param places x, y pairs in mm; the end is the last one.
 * @param reachMm how far to look.
 * @returns the place to add, or null when the end lies in open water or is at the edge already.
 */
export function carriedOn(
  places: readonly number[],
  field: PotentialField,
  holdsWater: HoldsWater,
  reachMm: number,
): readonly [number, number] | null {
  const x = places[places.length - 2];
  const y = places[places.length - 1];
  let back = places.length - 4;
  while (back > 0 && Math.hypot(x - places[back], y - places[back + 1]) < 0.5 * reachMm) back -= 2;
  if (back < 0) return null;
  const { volts, inside, fieldVPerM, directionDeg } = field.read(x, y);
  let alongX = x - places[back];
  let alongY = y - places[back + 1];
  const length = Math.hypot(alongX, alongY);
  if (length === 0) return null;
  if (volts !== null && inside === null && fieldVPerM > 0) {
    const angle = radians(directionDeg) + Math.PI / 2;
    const onward = Math.cos(angle) * alongX + Math.sin(angle) * alongY >= 0 ? 1 : -1;
    alongX = onward * length * Math.cos(angle);
    alongY = onward * length * Math.sin(angle);
  }
  return leavesWaterAt(x, y, alongX / length, alongY / length, reachMm, holdsWater);
}
