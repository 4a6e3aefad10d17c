import { parseArgs } from "node:util";
import { QUALITIES, type Quality } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import { boundsOnRandomSetups } from "./bounds-on-random-setups";
import { EXACT_CASES } from "./exact-cases";
import { REFERENCE_CASES, type ReferenceCase } from "./reference-cases";
import { shapeFactorOf, solved, soundSetup } from "./solved";

/**
 * `npm run accuracy`: every case with an answer from outside this program, a row a case. Errors and bounds of the value are
 * shares of it, those at points are shares of the voltage span.
 */

interface Row {
  readonly id: string;
  readonly quality: Quality;
  readonly quantity: "S" | "I/σh";
  readonly value: number;
  readonly reference: number;
  /** What the reference itself may be off. */
  readonly referenceUncertainty: number;
  readonly error: number;
  readonly ownBound: number;
  /** The worst of the case's points and floating conductors. */
  readonly points: { readonly count: number; readonly error: number; readonly ownBound: number; readonly covered: number };
  readonly pitchMm: number;
  readonly unknowns: number;
  readonly elapsedMs: number;
}

interface Case {
  readonly id: string;
  readonly setup: Setup;
  /** Null where the electrodes sit at more than two potentials: the largest current stands for it. */
  readonly shapeFactor: number | null;
  readonly uncertainty: number;
  readonly conductors: NonNullable<ReferenceCase["expected"]["conductors"]>;
  readonly at: readonly (readonly [number, number, number])[];
  readonly voltsUncertainty: number;
}

const fromFile = ({ id, setup, expected }: ReferenceCase): Case => ({
  id,
  setup: soundSetup(setup),
  shapeFactor: expected.shapeFactor ?? null,
  uncertainty: expected.shapeFactorUncertainty ?? expected.currentUncertainty ?? 0,
  conductors: expected.conductors ?? [],
  at: expected.at ?? [],
  voltsUncertainty: expected.voltsUncertainty ?? 0,
});

const CASES: readonly Case[] = [
  ...REFERENCE_CASES.map(fromFile),
  ...EXACT_CASES.map(({ id, setup, shapeFactor, leftOut, at }): Case => {
    return { id, setup, shapeFactor, uncertainty: leftOut * shapeFactor, conductors: [], at, voltsUncertainty: 0 };
  }),
];

function rowOf(one: Case, quality: Quality): Row {
  const started = performance.now();
  const field = solved(one.setup, quality);
  const elapsedMs = performance.now() - started;
  const span = field.spanV[1] - field.spanV[0];
  const currents = one.conductors.map(({ currentPerSigmaH }) => currentPerSigmaH).filter((current) => current > 0);
  const reference = one.shapeFactor ?? currents.reduce((sum, current) => sum + current, 0);
  const value = one.shapeFactor === null ? field.totalFlux.value / one.setup.water.depthMm : shapeFactorOf(one.setup, field);
  const places = [
    ...one.at.map(([x, y, volts]) => ({ volts, got: field.read(x, y) })),
    ...one.conductors.flatMap(({ id, volts }) => {
      const got = field.conductors.find((conductor) => conductor.id === id);
      return got?.role === "floating" ? [{ volts, got }] : [];
    }),
  ].map(({ volts, got }) => ({ error: Math.abs((got.volts ?? Number.NaN) - volts), bound: got.voltsError }));
  return {
    id: one.id,
    quality,
    quantity: one.shapeFactor === null ? "I/σh" : "S",
    value,
    reference,
    referenceUncertainty: one.uncertainty / reference,
    error: value / reference - 1,
    ownBound: field.totalFlux.error / field.totalFlux.value,
    points: {
      count: places.length,
      error: Math.max(0, ...places.map(({ error }) => error)) / span,
      ownBound: Math.max(0, ...places.map(({ bound }) => bound)) / span,
      covered: places.filter(({ error, bound }) => error <= bound + one.voltsUncertainty + 1e-9).length,
    },
    pitchMm: field.numerics.pitchMm,
    unknowns: field.numerics.unknowns,
    elapsedMs: Math.round(elapsedMs),
  };
}

const small = (value: number): string => (value === 0 ? "0" : value.toExponential(1));

const COLUMNS: readonly (readonly [heading: string, cell: (row: Row) => string])[] = [
  ["case", ({ id }) => id],
  ["quality", ({ quality }) => quality],
  ["", ({ quantity }) => quantity],
  ["value", ({ value }) => value.toPrecision(9)],
  ["reference", ({ reference }) => reference.toPrecision(9)],
  ["± of it", ({ referenceUncertainty }) => small(referenceUncertainty)],
  ["error", ({ error }) => small(error)],
  ["own bound", ({ ownBound }) => small(ownBound)],
  ["points", ({ points }) => `${points.covered}/${points.count}`],
  ["error", ({ points }) => (points.count === 0 ? "" : small(points.error))],
  ["own bound", ({ points }) => (points.count === 0 ? "" : small(points.ownBound))],
  ["pitch mm", ({ pitchMm }) => pitchMm.toFixed(3)],
  ["ms", ({ elapsedMs }) => String(elapsedMs)],
];

function tableOf(rows: readonly Row[]): string {
  const cells = [COLUMNS.map(([heading]) => heading), ...rows.map((row) => COLUMNS.map(([, cell]) => cell(row)))];
  const widths = COLUMNS.map((_, column) => Math.max(...cells.map((line) => (line[column] ?? "").length)));
  return cells
    .map((line) =>
      line.map((cell, column) => (column < 2 ? cell.padEnd(widths[column] ?? 0) : cell.padStart(widths[column] ?? 0))).join("  "),
    )
    .join("\n");
}

const { values } = parseArgs({
  options: { json: { type: "boolean" }, quality: { type: "string", default: "live,print" }, bounds: { type: "string" } },
});
const qualities = QUALITIES.filter((quality) => values.quality.split(",").includes(quality));
if (qualities.length === 0) throw new RangeError(`--quality is "${values.quality}", allowed: ${QUALITIES.join(", ")}, divided by commas`);
const write = (text: string) => process.stdout.write(`${text}\n`);

if (values.bounds !== undefined) {
  const count = Number(values.bounds);
  if (!Number.isInteger(count) || count < 1)
    throw new RangeError(`--bounds is "${values.bounds}", allowed: a whole number of setups from 1`);
  const report = boundsOnRandomSetups(count);
  write(values.json ? JSON.stringify(report, null, 2) : report.inWords);
} else {
  // The first solve also warms the engine up, so that the times compare.
  rowOf(CASES[0] as Case, "live");
  const rows = CASES.flatMap((one) => qualities.map((quality) => rowOf(one, quality)));
  write(
    values.json
      ? JSON.stringify(rows, null, 2)
      : `${tableOf(rows)}\n\nS: shape factor 1/(σhR); I/σh: sum of the currents leaving, V. Errors and bounds of a value are shares of it, at points shares of the span.`,
  );
}
