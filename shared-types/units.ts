/** Conversions between the units of the file (mm, µS/cm, °) and SI, each written once. */

export const MM_PER_M = 1000;

/** @returns conductivity in S/m for one in µS/cm (1 µS/cm = 1e-4 S/m). */
export const conductivitySPerM = (conductivityUsPerCm: number): number => conductivityUsPerCm * 1e-4;

/** @returns metres for millimetres. */
export const metres = (lengthMm: number): number => lengthMm / MM_PER_M;

/** @returns radians for degrees. */
export const radians = (angleDeg: number): number => (angleDeg * Math.PI) / 180;

/** @returns degrees for radians. */
export const degrees = (angleRad: number): number => (angleRad * 180) / Math.PI;
