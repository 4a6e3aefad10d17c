import { radians } from "../../../shared-types/units";
import type { PotentialField } from "../field/potential-field";

/** @returns the unit vector from high to low potential at a place (mm), or null where there is no field. */
export type FieldDirection = (xMm: number, yMm: number) => readonly [number, number] | null;

/** @returns the field's direction from readings of the field. */
export function directionFromReadings(field: PotentialField, weakestVPerM: number): FieldDirection {
  return (x, y) => {
    const { volts, inside, fieldVPerM, directionDeg } = field.read(x, y);
    if (volts === null || inside !== null || fieldVPerM < weakestVPerM) return null;
    return [Math.cos(radians(directionDeg)), Math.sin(radians(directionDeg))];
  };
}

/**
 * @returns the field's direction from the slope between the four nodes round a place, in which metal has its own potential:
 * quick, and rough in the last cell before metal. From readings where a node has no potential.
 */
export function directionFromPicture(field: PotentialField, weakestVPerM: number): FieldDirection {
  const { columns, rows, pitchXMm, pitchYMm, volts } = field.picture;
  const careful = directionFromReadings(field, weakestVPerM);
  return (x, y) => {
    const column = Math.min(columns - 2, Math.max(0, Math.floor(x / pitchXMm)));
    const row = Math.min(rows - 2, Math.max(0, Math.floor(y / pitchYMm)));
    const a = row * columns + column;
    const d = a + columns;
    const u = x / pitchXMm - column;
    const v = y / pitchYMm - row;
    const alongX = ((1 - v) * (volts[a] - volts[a + 1]) + v * (volts[d] - volts[d + 1])) / pitchXMm;
    const alongY = ((1 - u) * (volts[a] - volts[d]) + u * (volts[a + 1] - volts[d + 1])) / pitchYMm;
    const strength = Math.hypot(alongX, alongY);
    // Not a number where a node has no potential, too weak where all four lie in metal.
    return strength * 1000 >= weakestVPerM ? [alongX / strength, alongY / strength] : careful(x, y);
  };
}
