import type { Setup } from "../../../shared-types/setup";
import type { Cause, ExpectedReading, PlaceSensitivities, PointBand, RankedCause, ToleranceResult } from "../../../shared-types/tolerance";
import { radians } from "../../../shared-types/units";
import { placeSensitivities } from "./place-sensitivities";
import type { SensitivityField } from "./sensitivity-field";
import { type BandBench, interfaceLimitVolts, meterLimitVolts, shownVolts, tolerancesOf } from "./stated-limits";

/** Coverage factor for about 95 % (JCGM 100:2008, 6.3.3). */
export const COVERAGE = 2;
/**
 * Standard uncertainty of a limit ± a: a/√3 where no more is known (rectangular, JCGM 100:2008, 4.3.7), a/2 where ± a holds
 * about 95 % of a normal distribution (4.3.4 has 1.96; the bound is no better known than that).
 */
const DIVISOR: Readonly<Record<Cause["distribution"], number>> = { rectangular: Math.sqrt(3), normal: 2 };

/** A step, as a share of the span or of the water's resistance, over which a slope is taken. */
const STEP = 1e-4;

export type PlainCause = Omit<Cause, "standardVolts" | "share">;

const cause = (
  key: Cause["key"],
  unit: Cause["unit"],
  sensitivityVPerUnit: number,
  halfWidth: number,
  partId: string | null = null,
): PlainCause => ({ key, partId, unit, sensitivityVPerUnit, halfWidth, distribution: key === "engine" ? "normal" : "rectangular" });

/** The potential in the water that belongs to a reading: the same, unless readings allow for the loss at the surfaces. */
export function fieldVoltsOf(setup: Setup, sensitivities: PlaceSensitivities): number {
  const taps = new Map(setup.parts.map((part) => [part.id, part.role === "electrode" ? part.tap * setup.supply.volts : 0]));
  return sensitivities.electrodes.reduce((sum, { partId, voltsPerVolt }) => sum + voltsPerVolt * (taps.get(partId) ?? 0), 0);
}

/** All causes at one place with their sensitivities: what the bands, and the draws that check them, are made of. */
export function causesAt(setup: Setup, bench: BandBench, place: PlaceSensitivities, reading: ExpectedReading): readonly PlainCause[] {
  const limits = tolerancesOf(setup);
  const { volts, voltsPerMm, directionDeg } = reading;
  const spanV = spanOf(setup);
  const span = spanV[1] - spanV[0];
  const allowed = setup.interface.inReadings && span > 0;
  const fieldVolts = fieldVoltsOf(setup, place);
  const step = STEP * span;
  // What a change in the water makes at the meter.
  const slope = allowed ? (shownVolts(bench, spanV, fieldVolts + step) - shownVolts(bench, spanV, fieldVolts - step)) / (2 * step) : 1;
  const perResistance = allowed
    ? (shownVolts(bench, spanV, fieldVolts, "typical", 1 + STEP) - shownVolts(bench, spanV, fieldVolts, "typical", 1 - STEP)) / (2 * STEP)
    : 0;
  const angle = radians(directionDeg);
  const { placementMm } = setup.probing;
  const parts = place.parts.flatMap(({ partId, alongXVPerMm, alongYVPerMm, turnVPerDeg }) => [
    cause("part-x", "mm", slope * alongXVPerMm, limits.partPlacementMm, partId),
    cause("part-y", "mm", slope * alongYVPerMm, limits.partPlacementMm, partId),
    ...(turnVPerDeg === 0 ? [] : [cause("part-turn", "deg", slope * turnVPerDeg, limits.partTurnDeg, partId)]),
  ]);
  return [
    cause("supply", "percent", volts / 100, limits.supplyPercent),
    cause("meter", "V", 1, meterLimitVolts(setup, bench, volts)),
    // The field points down the potential.
    cause("probe-x", "mm", -voltsPerMm * Math.cos(angle), placementMm),
    cause("probe-y", "mm", -voltsPerMm * Math.sin(angle), placementMm),
    ...parts,
    cause("depth", "mm", slope * place.depthVPerMm, limits.depthMm),
    cause("tilt-x", "deg", slope * place.tiltXVPerDeg, limits.tiltDeg),
    cause("tilt-y", "deg", slope * place.tiltYVPerDeg, limits.tiltDeg),
    // The field itself hangs on no uniform conductivity; the loss at the surfaces does, through the water's resistance.
    cause("conductivity", "percent", -perResistance / 100, limits.conductivityPercent),
    cause("temperature", "K", -perResistance * bench.water.changePerKelvin, limits.temperatureK),
    cause("interface", "V", 1, span > 0 ? interfaceLimitVolts(setup, bench, spanV, fieldVolts) : 0),
    cause("loading", "percent", -volts / 100, 100 * bench.meter.loadingShare),
    cause("engine", "V", 1, reading.voltsError),
  ];
}

/** Lowest and highest electrode potential, V. */
function spanOf({ parts, supply }: Setup): readonly [number, number] {
  const taps = parts.flatMap((part) => (part.role === "electrode" ? [part.tap] : []));
  return [supply.volts * Math.min(...taps), supply.volts * Math.max(...taps)];
}

/** Adds the variances of independent causes (JCGM 100:2008, 5.1.2, equation 10) and sorts them by their share. */
export function combined(plain: readonly PlainCause[]): Pick<PointBand, "causes" | "standardVolts" | "bandV"> {
  const standards = plain.map(
    ({ sensitivityVPerUnit, halfWidth, distribution }) => (Math.abs(sensitivityVPerUnit) * halfWidth) / DIVISOR[distribution],
  );
  const variance = standards.reduce((sum, standard) => sum + standard * standard, 0);
  const causes = plain
    .map((one, index): Cause => {
      const standardVolts = standards[index];
      return { ...one, standardVolts, share: variance === 0 ? 0 : (standardVolts * standardVolts) / variance };
    })
    .sort((a, b) => b.share - a.share);
  const standardVolts = Math.sqrt(variance);
  return { causes, standardVolts, bandV: COVERAGE * standardVolts };
}

/** The causes over the whole tray: each one's share of the variances of all points together. Largest first. */
export function rankingOf(points: readonly PointBand[]): readonly RankedCause[] {
  const rows = new Map<string, { first: Cause; halfWidths: number; variance: number; count: number }>();
  let total = 0;
  for (const { causes } of points) {
    for (const one of causes) {
      const key = `${one.key} ${one.partId ?? ""}`;
      const row = rows.get(key) ?? { first: one, halfWidths: 0, variance: 0, count: 0 };
      const variance = one.standardVolts ** 2;
      rows.set(key, { ...row, halfWidths: row.halfWidths + one.halfWidth, variance: row.variance + variance, count: row.count + 1 });
      total += variance;
    }
  }
  return [...rows.values()]
    .map(({ first, halfWidths, variance, count }): RankedCause => {
      const { key, partId, unit } = first;
      return { key, partId, unit, halfWidth: halfWidths / count, share: total === 0 ? 0 : variance / total };
    })
    .sort((a, b) => b.share - a.share);
}

/**
 * The tolerance band of every expected reading, and which causes matter most. Law of propagation of uncertainty, JCGM 100:2008, 5.1.2:
 * u² = Σ (cᵢ·uᵢ)², the sensitivities cᵢ from perturbed solves, the causes taken as independent; band = 2u.
 * @param bench the plan's bench; @param field the sensitivities of this setup's geometry.
 */
export function pointBands(setup: Setup, bench: BandBench, field: SensitivityField, readings: readonly ExpectedReading[]): ToleranceResult {
  const points = readings.map((reading): PointBand => {
    const { xMm, yMm, volts } = reading;
    const place = placeSensitivities(setup, field, xMm, yMm);
    return { xMm, yMm, volts, ...combined(causesAt(setup, bench, place, reading)) };
  });
  return { points, ranking: rankingOf(points) };
}
