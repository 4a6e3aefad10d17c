import type { BenchNumbers, RegionRule } from "../../../shared-types/bench";
import type { Electrode, Setup } from "../../../shared-types/setup";
import { FREEBOARD, LEAST_PROUD, type Limit, POWER, sourceOf, TILT_READING_SHARE, WARMING, wetHandsLimit } from "../findings/limits";
import { meterRanges } from "./meter-and-probe";
import { WATER_DENSITY_KG_PER_M3, WATER_SPECIFIC_HEAT_J_PER_KG_K } from "./physical-constants";
import { isSaltSolution } from "./water-conductivity";
import { leastDepthForTiltMm } from "./water-geometry";

/**
 * The rules of the depth–voltage chart, each as a bound that follows from one solved field by scaling: on a level tray current
 * and conductance grow as the depth, power as depth times volts squared, and the field's shape stays.
 */

/** A rule that holds the supply's volts down; the bound depends on the depth. */
export interface VoltsCeiling {
  readonly rule: RegionRule;
  readonly label: string;
  readonly source: string;
  readonly voltsAt: (depthMm: number) => number;
}

/** A rule that bounds the depth, whatever the volts. */
export interface DepthBound {
  readonly rule: RegionRule;
  readonly label: string;
  readonly source: string;
  readonly side: "at least" | "at most";
  readonly depthMm: number;
}

/** Volts at which the median field moves the last digit within a millimetre: one run for each of the meter's ranges. */
export interface ReadableVolts {
  readonly label: string;
  readonly source: string;
  readonly runs: readonly (readonly [number, number])[];
}

export type SolvedBench = Omit<BenchNumbers, "region">;

/** What one volt of the supply drives at the present depth: A per V and W per V². */
function perVolt(setup: Setup, bench: SolvedBench): { readonly currentA: number; readonly powerW: number } {
  const { circuit } = bench;
  const total = circuit.currentA.value;
  if (circuit.effectiveResistanceOhm === null || total <= 0) return { currentA: 0, powerW: 0 };
  const currentA = circuit.volts / setup.supply.volts / circuit.effectiveResistanceOhm;
  return { currentA, powerW: (circuit.powerW.value / total ** 2) * currentA ** 2 };
}

const quotient = (limit: number, load: number): number => (load > 0 ? limit / load : Infinity);

/** @returns the rules that hold the volts down. */
export function voltsCeilings(setup: Setup, bench: SolvedBench): readonly VoltsCeiling[] {
  const { depthMm } = setup.water;
  const one = perVolt(setup, bench);
  const seconds = setup.session.minutes * 60;
  const volumeL = (depth: number): number =>
    Math.max(0, bench.water.volumePerTrayL.value + (bench.water.surfaceMm2.value * (depth - depthMm)) / 1e6);
  const heatJPerK = (depth: number): number => (volumeL(depth) / 1000) * WATER_DENSITY_KG_PER_M3 * WATER_SPECIFIC_HEAT_J_PER_KG_K;
  const touch = wetHandsLimit(setup.supply.waveform, isSaltSolution(setup.water.salt));
  // A supply that stands above the limit with nothing connected is not made safe by turning it down on paper.
  const unloadedTooHigh = (setup.supply.openCircuitVolts ?? 0) > touch.value;
  const of = (limit: Limit, rule: RegionRule, label: string, voltsAt: (depth: number) => number): VoltsCeiling => ({
    rule,
    label,
    source: sourceOf(limit),
    voltsAt,
  });
  return [
    {
      rule: "supply-current",
      label: `supply gives ${setup.supply.currentLimitA} A`,
      source: "the supply's own current limit",
      voltsAt: (depth) => quotient(setup.supply.currentLimitA, one.currentA * (depth / depthMm)),
    },
    of(POWER, "power", `${POWER.value} W into the water`, (depth) => Math.sqrt(quotient(POWER.value, one.powerW * (depth / depthMm)))),
    of(WARMING, "heating", `${WARMING.value} K warmer by the end`, (depth) =>
      Math.sqrt(quotient(WARMING.value * heatJPerK(depth), one.powerW * (depth / depthMm) * seconds)),
    ),
    of(touch, "wet-hands", `wet hands: ${touch.value} ${touch.unit}`, () => (unloadedTooHigh ? 0 : touch.value)),
  ];
}

/** @returns the rules that bound the depth. */
export function depthBounds(setup: Setup, bench: SolvedBench): readonly DepthBound[] {
  const { depthMm } = setup.water;
  const { geometry } = bench;
  const proud = geometry.parts.reduce((least, part) => Math.min(least, part.proudMm), Infinity);
  return [
    {
      rule: "tilt-tolerance",
      label: `${geometry.tiltDeg}° of tilt goes unnoticed`,
      source: sourceOf(TILT_READING_SHARE),
      side: "at least",
      depthMm: leastDepthForTiltMm(geometry.tiltBaseMm, TILT_READING_SHARE.value),
    },
    {
      rule: "electrode-height",
      label: "parts stand clear of the water",
      source: sourceOf(LEAST_PROUD),
      side: "at most",
      depthMm: depthMm + proud - LEAST_PROUD.value,
    },
    {
      rule: "freeboard",
      label: `${FREEBOARD.value} mm of freeboard`,
      source: sourceOf(FREEBOARD),
      side: "at most",
      depthMm: depthMm + geometry.freeboardMm - FREEBOARD.value,
    },
  ];
}

/** @returns the volts up to `highestVolts` at which the field can be read, or null where no water can be reached. */
export function readableVolts(setup: Setup, bench: SolvedBench, highestVolts: number): ReadableVolts | null {
  const { medianFieldMvPerMm } = bench.meter;
  if (medianFieldMvPerMm === null) return null;
  const perVoltMvPerMm = medianFieldMvPerMm / setup.supply.volts;
  const taps = setup.parts.filter((part): part is Electrode => part.role === "electrode").map((part) => part.tap);
  const highestTap = Math.max(...taps);
  const runs: (readonly [number, number])[] = [];
  let from = 0;
  if (perVoltMvPerMm > 0 && highestTap > 0) {
    for (const range of meterRanges(setup.meter.counts, setup.supply.waveform, highestVolts * highestTap)) {
      const to = range.highestVolts / highestTap;
      const least = Math.max(from, (range.digitVolts * 1000) / perVoltMvPerMm);
      if (least < to) {
        const last = runs[runs.length - 1];
        if (last !== undefined && last[1] === least) runs[runs.length - 1] = [last[0], to];
        else runs.push([least, to]);
      }
      from = to;
    }
  }
  return { label: "a millimetre moves the last digit", source: "one digit of the meter per millimetre (a margin of ours)", runs };
}
