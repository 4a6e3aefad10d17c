import type { ProbePoint } from "../../../shared-types/plan";

/**
 * @returns whether a probe a whole millimetre off goes unseen at a point: the reading changes by less than the meter's last digit
 * (common practice, no source).
 * @param digitVolts one digit on the range in use, V.
 */
export const isFlat = ({ voltsPerMm }: Pick<ProbePoint, "voltsPerMm">, digitVolts: number): boolean => voltsPerMm < digitVolts;
