import type { BenchNumbers } from "../../../shared-types/bench";
import type { FieldReading, ProbePlan, ProbePoint } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import { readingWithInterfaceVolts } from "./interface";

/** Half a step, as a share of the span, over which the reading's slope is taken. */
const STEP_SHARE = 1e-4;

type Loss = Pick<BenchNumbers, "interface" | "circuit">;

/** What the loss at the surfaces makes of a reading and of its change with place; null where the setup does not ask for it. */
interface Shown {
  readonly volts: (volts: number) => number;
  readonly slopeAt: (volts: number) => number;
}

function shownWithInterface(setup: Setup, [low, high]: readonly [number, number], loss: Loss): Shown | null {
  if (!setup.interface.inReadings || high <= low) return null;
  const shown = (volts: number): number => low + readingWithInterfaceVolts(loss.interface, loss.circuit, (volts - low) / (high - low));
  const step = STEP_SHARE * (high - low);
  return { volts: shown, slopeAt: (volts) => (shown(volts + step) - shown(volts - step)) / (2 * step) };
}

/**
 * The probe plan with the readings that the meter will really show when volts are lost at the electrodes' surfaces. Places stay:
 * the lines of the field are where they are, only their volts shrink. An estimate, as the loss is.
 * @returns the plan unchanged where the setup does not ask for it.
 */
export function probingWithInterface(setup: Setup, probing: ProbePlan, loss: Loss): ProbePlan {
  const shown = shownWithInterface(setup, probing.spanV, loss);
  if (shown === null) return probing;
  const adjusted = (point: ProbePoint): ProbePoint => {
    const slope = shown.slopeAt(point.volts);
    return {
      ...point,
      volts: shown.volts(point.volts),
      voltsError: point.voltsError * slope,
      voltsPerMm: point.voltsPerMm * slope,
    };
  };
  return {
    spanV: probing.spanV,
    levels: probing.levels.map((level) => ({ ...level, volts: shown.volts(level.volts), points: level.points.map(adjusted) })),
    checks: probing.checks.map(adjusted),
  };
}

/**
 * The same for readings at any place: what pointer and command tell is what the probe plan tells there. Only the metal of an
 * electrode stands before the loss.
 * @returns the readings unchanged where the setup does not ask for it; the field in the water stays what it is.
 */
export function readingsWithInterface(
  setup: Setup,
  readings: readonly FieldReading[],
  spanV: readonly [number, number],
  loss: Loss,
): readonly FieldReading[] {
  const shown = shownWithInterface(setup, spanV, loss);
  if (shown === null) return readings;
  const electrodes = new Set<string | null>(setup.parts.flatMap(({ id, role }) => (role === "electrode" ? [id] : [])));
  return readings.map((reading) =>
    reading.volts === null || electrodes.has(reading.inside)
      ? reading
      : { ...reading, volts: shown.volts(reading.volts), voltsError: reading.voltsError * shown.slopeAt(reading.volts) },
  );
}
