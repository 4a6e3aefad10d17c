import type { Bounded, FieldReading, Finding, Plan, ProbePoint } from "../../shared-types/plan";

/** What the headless command prints: the contract's keys, numbers with the digits that their bound is worth. */

/** Decimals that are given beyond the first figure of a bound: rounding then adds less than a thousandth of it. */
const FIGURES_BEYOND_BOUND = 3;
/** More figures than this a double does not hold. */
const MOST_FIGURES = 17;

/** @returns the number with the figures that its bound is worth; null for what is no number. */
function worth(value: number | null, error: number): number | null {
  if (value === null || !Number.isFinite(value)) return null;
  if (!(error > 0 && error < Infinity) || value === 0) return value + 0;
  const decimals = FIGURES_BEYOND_BOUND - Math.floor(Math.log10(error));
  const figures = Math.floor(Math.log10(Math.abs(value))) + 1 + decimals;
  if (figures < 1) return 0;
  return figures >= MOST_FIGURES ? value : Number(value.toPrecision(figures));
}

/** @returns a bound rounded up to three figures; null for what is no number. */
function bound(error: number): number | null {
  if (!Number.isFinite(error)) return null;
  const rounded = Number(error.toPrecision(3));
  return rounded >= error ? rounded : Number((error * 1.005).toPrecision(3));
}

const boundedOf = (bounded: Bounded | null): { value: number | null; error: number | null } =>
  bounded === null ? { value: null, error: null } : { value: worth(bounded.value, bounded.error), error: bound(bounded.error) };

function placeOf({ xMm, yMm, inside, volts, voltsError, fieldVPerM, directionDeg }: FieldReading): object {
  if (volts === null) return { xMm, yMm, inside, volts, voltsError: null, fieldVPerM: null, directionDeg: null };
  // A field that would not tell over a whole metre is rounding, and its direction means nothing.
  const isCalm = fieldVPerM < voltsError;
  return {
    xMm,
    yMm,
    inside,
    volts: worth(volts, voltsError),
    voltsError: bound(voltsError),
    fieldVPerM: isCalm ? 0 : Number(fieldVPerM.toPrecision(7)),
    directionDeg: isCalm ? 0 : Number(directionDeg.toFixed(4)),
  };
}

/** @returns the report of `solve`. */
export function solveReport(plan: Plan, readings: readonly FieldReading[]): object {
  const resistance = boundedOf(plan.resistanceOhm);
  const shape = boundedOf(plan.shapeFactor);
  const current = boundedOf(plan.currentA);
  const { pitchMm, unknowns, iterations, relativeResidual, elapsedMs } = plan.numerics;
  return {
    setupId: plan.setupId,
    quality: plan.quality,
    numerics: { pitchMm, unknowns, iterations, relativeResidual: bound(relativeResidual), elapsedMs: Math.round(elapsedMs) },
    resistanceOhm: resistance.value,
    resistanceErrorOhm: resistance.error,
    currentA: current.value,
    currentErrorA: current.error,
    shapeFactor: shape.value,
    shapeFactorError: shape.error,
    conductors: plan.conductors.map((conductor) => ({
      id: conductor.id,
      role: conductor.role,
      volts: worth(conductor.volts, conductor.voltsError),
      voltsError: Number.isFinite(conductor.volts) ? bound(conductor.voltsError) : null,
      currentA: worth(conductor.currentA, conductor.currentErrorA),
      currentErrorA: bound(conductor.currentErrorA),
    })),
    at: readings.map(placeOf),
  };
}

const pointOf = ({ n, xMm, yMm, inside, volts, voltsError, voltsPerMm, bandV }: ProbePoint, withInside: boolean): object => ({
  n,
  xMm,
  yMm,
  ...(withInside ? { inside } : {}),
  volts: worth(volts, voltsError),
  voltsError: bound(voltsError),
  voltsPerMm: Number(voltsPerMm.toPrecision(5)),
  bandV: Number(bandV.toPrecision(4)),
});

/** @returns the report of `probes`. */
export function probesReport({ setupId, probing }: Plan): object {
  return {
    setupId,
    spanV: probing.spanV,
    levels: probing.levels.map(({ volts, note, points }) => ({ volts, note, points: points.map((point) => pointOf(point, false)) })),
    checks: probing.checks.map((point) => pointOf(point, true)),
  };
}

/** @returns the report of `check`. */
export function checkReport(setupId: string, findings: readonly Finding[]) {
  const count = (severity: Finding["severity"]): number => findings.filter((finding) => finding.severity === severity).length;
  return {
    setupId,
    counts: { stop: count("stop"), caution: count("caution"), note: count("note") },
    findings: findings.map(({ code, severity, partIds, message, measured, limit, source, remedy }) => ({
      code,
      severity,
      partIds,
      message,
      measured,
      limit,
      source,
      remedy,
    })),
  };
}
