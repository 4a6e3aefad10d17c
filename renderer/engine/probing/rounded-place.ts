import type { Tray } from "../../../shared-types/setup";
import { traySizeMm } from "../geometry/tray-outline";

/** A place in the tray, mm. */
export type Place = readonly [number, number];

/** Probe places are multiples of this, so that they can be found on millimetre paper. */
export const ROUNDING_MM = 0.5;
/** A coordinate this near to halfway between two multiples goes towards the tray's middle: mirrored layouts get mirrored points. */
const HALFWAY_MM = 0.004;
/** The farthest that rounding moves a place, mm (0.36). */
export const FARTHEST_ROUNDING_MM = Math.SQRT2 * (ROUNDING_MM / 2 + HALFWAY_MM);

function rounded(coordinateMm: number, middleMm: number): number {
  const below = Math.floor(coordinateMm / ROUNDING_MM) * ROUNDING_MM;
  const beyond = coordinateMm - below - ROUNDING_MM / 2;
  const up = Math.abs(beyond) < HALFWAY_MM ? below + ROUNDING_MM / 2 < middleMm : beyond > 0;
  return up ? below + ROUNDING_MM : below;
}

/** @returns the place rounded to 0.5 mm in both directions. */
export function roundedPlace(tray: Tray, [xMm, yMm]: Place): Place {
  const [lengthMm, widthMm] = traySizeMm(tray);
  return [rounded(xMm, lengthMm / 2), rounded(yMm, widthMm / 2)];
}
