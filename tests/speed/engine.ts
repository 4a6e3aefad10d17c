import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { parseArgs } from "node:util";
import { conjugateGradient } from "../../renderer/engine/field/conjugate-gradient";
import { discretise } from "../../renderer/engine/field/discretise";
import { type FittedNetwork, fitContacts } from "../../renderer/engine/field/fit";
import { gridOfPitch } from "../../renderer/engine/field/grid";
import { type Kernels, startKernels } from "../../renderer/engine/field/kernels/kernels";
import { fieldLayout } from "../../renderer/engine/field/layout";
import { loadNetwork } from "../../renderer/engine/field/load-network";
import { barsAndLooseParts, barsAndLooseRing } from "../reference/networks";
import { askPeer, type PeerAnswer } from "../reference/peer";
import { finished } from "../reference/solved";

/**
 * `npm run speed -- --engine`: the field's solver on one core, two bars and a loose ring, in units of one residual evaluation on the same
 * grid by the same kernels. Options: `--json`, `--peer` (a sparse direct solver of SciPy on the very matrix, in the same run).
 * Figures are medians of repeats; limits are told, never asserted.
 */

const SIZES = [25_000, 60_000, 100_000, 240_000, 1_000_000];
const TOLERANCE = 1e-8;
/** Repeats: as many as fit into this time, within these bounds. */
const BUDGET_MS = 1500;
const FEWEST = 3;
const MOST = 25;

interface Row {
  readonly unknowns: number;
  readonly looseParts: number;
  readonly discretiseMs: number;
  /** Hierarchy from a network: what belongs to the solver's set-up. */
  readonly setUpMs: number;
  readonly setUpNsPerUnknown: number;
  readonly solveMs: number;
  readonly solveNsPerUnknown: number;
  readonly iterations: number;
  readonly relativeResidual: number;
  readonly residualEvaluationMs: number;
  /** Set-up and first unit potential, and each further one, in residual evaluations. */
  readonly firstInEvaluations: number;
  readonly furtherInEvaluations: number;
  readonly memoryBytesPerUnknown: number;
  readonly peer: PeerAnswer | null;
}

const median = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[values.length >> 1] ?? Number.NaN;

/** Median time of a call in ms. */
function timed(call: () => void): number {
  const times: number[] = [];
  const until = performance.now() + BUDGET_MS;
  while (times.length < FEWEST || (times.length < MOST && performance.now() < until)) {
    const started = performance.now();
    call();
    times.push(performance.now() - started);
  }
  return median(times);
}

const unknownsOf = ({ active, layout }: FittedNetwork): number =>
  active.reduce((sum, one) => sum + one, 0) + layout.conductors.length - layout.electrodeCount;

function solveOnce(kernels: Kernels) {
  kernels.beginSolve(0, false);
  const record = finished(conjugateGradient(kernels, TOLERANCE, false, false));
  kernels.finish(0);
  return record;
}

function measure(nodes: number, looseParts: number, folder: string | null): Row {
  const setup = looseParts === 1 ? barsAndLooseRing() : barsAndLooseParts(looseParts);
  const pitchMm = Math.sqrt((300 * 200) / nodes);
  const build = (): FittedNetwork => finished(fitContacts(finished(discretise(fieldLayout(setup), gridOfPitch(setup.tray, pitchMm)))));
  const network = build();
  const kernels = startKernels();
  const setUpMs = timed(() => finished(loadNetwork(kernels, network)));
  const record = solveOnce(kernels);
  const solveMs = timed(() => solveOnce(kernels));
  const residualEvaluationMs = timed(() => kernels.multiply());
  const unknowns = unknownsOf(network);
  return {
    unknowns,
    looseParts,
    discretiseMs: timed(build),
    setUpMs,
    setUpNsPerUnknown: (1e6 * setUpMs) / unknowns,
    solveMs,
    solveNsPerUnknown: (1e6 * solveMs) / unknowns,
    ...record,
    residualEvaluationMs,
    firstInEvaluations: (setUpMs + solveMs) / residualEvaluationMs,
    furtherInEvaluations: solveMs / residualEvaluationMs,
    memoryBytesPerUnknown: kernels.memory.buffer.byteLength / unknowns,
    peer: folder === null ? null : askPeer(network, folder),
  };
}

/** Slope of log(set-up and solve) against log(unknowns), by least squares. */
function exponentOf(rows: readonly Row[]): number {
  const points = rows.map(({ unknowns, setUpMs, solveMs }) => [Math.log(unknowns), Math.log(setUpMs + solveMs)] as const);
  const meanX = points.reduce((sum, [x]) => sum + x, 0) / points.length;
  const meanY = points.reduce((sum, [, y]) => sum + y, 0) / points.length;
  const top = points.reduce((sum, [x, y]) => sum + (x - meanX) * (y - meanY), 0);
  return top / points.reduce((sum, [x]) => sum + (x - meanX) ** 2, 0);
}

/** The goals of the project, beside which the figures are printed. Times hold on a quiet machine only; ratios hold on any. */
const LIMITS = {
  firstInEvaluations: 60,
  furtherInEvaluations: 30,
  iterations: 10,
  setUpNsPerUnknown: 30,
  memoryBytesPerUnknown: 400,
  exponent: 1.05,
  solveMs: { 60000: 4, 240000: 18, 1000000: 80 },
};

function tableOf(rows: readonly Row[], exponent: number): string {
  const head = [
    "unknowns",
    "loose",
    "discretise ms",
    "set-up ms",
    "ns each",
    "solve ms",
    "ns each",
    "iterations",
    "evaluation ms",
    "first",
    "further",
    "bytes each",
  ];
  const lines = rows.map((row) =>
    [
      row.unknowns,
      row.looseParts,
      row.discretiseMs.toFixed(1),
      row.setUpMs.toFixed(2),
      row.setUpNsPerUnknown.toFixed(1),
      row.solveMs.toFixed(2),
      row.solveNsPerUnknown.toFixed(1),
      row.iterations,
      row.residualEvaluationMs.toFixed(3),
      row.firstInEvaluations.toFixed(1),
      row.furtherInEvaluations.toFixed(1),
      row.memoryBytesPerUnknown.toFixed(0),
    ].map(String),
  );
  const widths = head.map((title, column) => Math.max(title.length, ...lines.map((line) => line[column].length)));
  const line = (cells: readonly string[]): string => cells.map((cell, column) => cell.padStart(widths[column])).join("  ");
  const peers = rows.flatMap(({ unknowns, solveMs, setUpMs, peer }) => {
    if (peer === null) return [];
    if ("missing" in peer) return [`${unknowns} unknowns: ${peer.missing}`];
    const times = ((peer.factoriseMs + peer.solveMs) / (setUpMs + solveMs)).toFixed(0);
    return [
      `${unknowns} unknowns: ${peer.name} factorises in ${peer.factoriseMs.toFixed(0)} ms and solves in ${peer.solveMs.toFixed(0)} ms: ${times} times as long; potentials differ by ${peer.largestDifference.toExponential(1)} V per volt`,
    ];
  });
  return [
    line(head),
    ...lines.map(line),
    "",
    `time against unknowns: exponent ${exponent.toFixed(3)} (goal at most ${LIMITS.exponent})`,
    `first, further: set-up with first unit potential, and each further one, in residual evaluations (goals ${LIMITS.firstInEvaluations}, ${LIMITS.furtherInEvaluations})`,
    `solved to ${TOLERANCE} of the field's power (root); goals: ${LIMITS.iterations} iterations, ${LIMITS.setUpNsPerUnknown} ns of set-up and ${LIMITS.memoryBytesPerUnknown} bytes an unknown, solves of ${Object.entries(
      LIMITS.solveMs,
    )
      .map(([nodes, ms]) => `${nodes} in ${ms} ms`)
      .join(", ")}`,
    ...peers,
  ].join("\n");
}

const { values } = parseArgs({
  options: { json: { type: "boolean" }, peer: { type: "boolean" } },
});
const folder = values.peer === true ? mkdtempSync(join(tmpdir(), "fieldtray-peer-")) : null;
try {
  const rows = SIZES.map((nodes) => measure(nodes, 1, nodes <= 240_000 ? folder : null));
  const crowded = [0, 3, 12].map((count) => measure(60_000, count, null));
  const exponent = exponentOf(rows);
  console.log(
    values.json === true ? JSON.stringify({ rows, crowded, exponent, limits: LIMITS }, null, 2) : tableOf([...rows, ...crowded], exponent),
  );
} finally {
  if (folder !== null) rmSync(folder, { recursive: true, force: true });
}
