import { OWNER_WATER } from "../../../shared-types/plan";
import { radians } from "../../../shared-types/units";
import type { PotentialField } from "../field/potential-field";
import type { HoldsWater } from "../geometry/open-water";

/** A place on the surface of a conductor (mm) and the unit vector from it into the water. */
export interface SurfacePlace {
  readonly x: number;
  readonly y: number;
  readonly outX: number;
  readonly outY: number;
}

/** @returns the field out of a conductor's surface, V/mm: positive where current leaves; 0 where there is no water. */
export type SurfaceField = (place: SurfacePlace, metalVolts: number) => number;

/** The field just off the surface, from readings. */
export function surfaceFieldFromReadings(field: PotentialField, holdsWater: HoldsWater, offMm: number): SurfaceField {
  return ({ x, y, outX, outY }) => {
    const offX = x + offMm * outX;
    const offY = y + offMm * outY;
    if (!holdsWater(offX, offY)) return 0;
    const { volts, fieldVPerM, directionDeg } = field.read(offX, offY);
    if (volts === null) return 0;
    const angle = radians(directionDeg);
    return (fieldVPerM / 1000) * (Math.cos(angle) * outX + Math.sin(angle) * outY);
  };
}

/** The fall of the potential over the first two cells of the picture, which is quick; from readings where these are not all water. */
export function surfaceFieldFromPicture(field: PotentialField, holdsWater: HoldsWater, offMm: number): SurfaceField {
  const { columns, rows, pitchXMm, pitchYMm, volts, owner } = field.picture;
  const careful = surfaceFieldFromReadings(field, holdsWater, offMm);
  const awayMm = 2 * Math.max(pitchXMm, pitchYMm);
  return (place, metalVolts) => {
    const x = (place.x + awayMm * place.outX) / pitchXMm;
    const y = (place.y + awayMm * place.outY) / pitchYMm;
    if (!(x >= 0 && y >= 0 && x <= columns - 1 && y <= rows - 1)) return careful(place, metalVolts);
    const column = Math.min(columns - 2, Math.floor(x));
    const row = Math.min(rows - 2, Math.floor(y));
    const a = row * columns + column;
    const d = a + columns;
    if (owner[a] !== OWNER_WATER || owner[a + 1] !== OWNER_WATER || owner[d] !== OWNER_WATER || owner[d + 1] !== OWNER_WATER) {
      return careful(place, metalVolts);
    }
    // Thin metal of another part, or a wall, may stand between: then the surface itself has no water off it.
    if (!holdsWater(place.x + offMm * place.outX, place.y + offMm * place.outY)) return 0;
    const [u, v] = [x - column, y - row];
    const there = (1 - v) * ((1 - u) * volts[a] + u * volts[a + 1]) + v * ((1 - u) * volts[d] + u * volts[d + 1]);
    return (metalVolts - there) / awayMm;
  };
}
