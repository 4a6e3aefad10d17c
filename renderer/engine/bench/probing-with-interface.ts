import type { BenchNumbers } from "../../../shared-types/bench";
import type { ProbePlan, ProbePoint } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import { readingWithInterfaceVolts } from "./interface";

/** Half a step, as a share of the span, over which the reading's slope is taken. */
const STEP_SHARE = 1e-4;

/**
 * The probe plan with the readings that the meter will really show when volts are lost at the electrodes' surfaces. Places stay:
 * the lines of the field are where they are, only their volts shrink. An estimate, as the loss is.
 * @returns the plan unchanged where the setup does not ask for it.
 */
export function probingWithInterface(setup: Setup, probing: ProbePlan, bench: Pick<BenchNumbers, "interface" | "circuit">): ProbePlan {
  const [low, high] = probing.spanV;
  if (!setup.interface.inReadings || high <= low) return probing;
  const shown = (volts: number): number => low + readingWithInterfaceVolts(bench.interface, bench.circuit, (volts - low) / (high - low));
  const slopeAt = (volts: number): number => {
    const step = STEP_SHARE * (high - low);
    return (shown(volts + step) - shown(volts - step)) / (2 * step);
  };
  const adjusted = (point: ProbePoint): ProbePoint => {
    const slope = slopeAt(point.volts);
    return { ...point, volts: shown(point.volts), voltsError: point.voltsError * slope, voltsPerMm: point.voltsPerMm * slope };
  };
  return {
    spanV: probing.spanV,
    levels: probing.levels.map((level) => ({ ...level, volts: shown(level.volts), points: level.points.map(adjusted) })),
    checks: probing.checks.map(adjusted),
  };
}
