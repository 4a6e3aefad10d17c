import type { OperatingRegion, RegionBoundary, RegionClash, RegionColumn, RegionRule } from "../../../shared-types/bench";
import type { Setup } from "../../../shared-types/setup";
import {
  type DepthBound,
  depthBounds,
  type ReadableVolts,
  readableVolts,
  type SolvedBench,
  type VoltsCeiling,
  voltsCeilings,
} from "./region-rules";

const COLUMNS = 61;
const PATH_POINTS = 80;
const LEAST_DEPTH_MM = 0.5;
const MOST_DEPTH_MM = 200;
const LEAST_VOLTS = 0.001;

interface Rules {
  readonly ceilings: readonly VoltsCeiling[];
  readonly depths: readonly DepthBound[];
  readonly readable: ReadableVolts | null;
}

const lowestCeiling = (rules: Rules, depthMm: number): VoltsCeiling =>
  rules.ceilings.reduce((lowest, one) => (one.voltsAt(depthMm) < lowest.voltsAt(depthMm) ? one : lowest));

const tightest = (rules: Rules, side: DepthBound["side"]): DepthBound =>
  rules.depths
    .filter((one) => one.side === side)
    .reduce((tight, one) => ((side === "at least" ? one.depthMm > tight.depthMm : one.depthMm < tight.depthMm) ? one : tight));

function runsAt(rules: Rules, depthMm: number): readonly (readonly [number, number])[] {
  const ceiling = lowestCeiling(rules, depthMm).voltsAt(depthMm);
  const runs = rules.readable === null ? ([[LEAST_VOLTS, Infinity]] as const) : rules.readable.runs;
  return runs.filter(([from]) => from <= ceiling).map(([from, to]): readonly [number, number] => [from, Math.min(to, ceiling)]);
}

function allowed(rules: Rules, depthMm: number, volts: number): boolean {
  if (depthMm < tightest(rules, "at least").depthMm || depthMm > tightest(rules, "at most").depthMm) return false;
  return runsAt(rules, depthMm).some(([from, to]) => volts >= from && volts <= to);
}

function columnsOf(rules: Rules): readonly RegionColumn[] {
  const from = Math.max(LEAST_DEPTH_MM, tightest(rules, "at least").depthMm);
  const to = Math.min(MOST_DEPTH_MM, tightest(rules, "at most").depthMm);
  if (from > to) return [];
  return Array.from({ length: COLUMNS }, (_, index) => {
    const depthMm = from + ((to - from) * index) / (COLUMNS - 1);
    return { depthMm, volts: runsAt(rules, depthMm) };
  }).filter((column) => column.volts.length > 0);
}

/** The middle of the region, on round numbers as far as they stay inside it. */
function suggestionIn(rules: Rules, columns: readonly RegionColumn[]): readonly [number, number] | null {
  let weight = 0;
  let depth = 0;
  let volts = 0;
  for (const column of columns) {
    for (const [from, to] of column.volts) {
      const length = to - from + 1e-9;
      weight += length;
      depth += length * column.depthMm;
      volts += (length * (from + to)) / 2;
    }
  }
  if (weight === 0) return null;
  const centre: readonly [number, number] = [depth / weight, volts / weight];
  const round = (value: number, step: number): number => Number((Math.round(value / step) * step).toFixed(6));
  for (const [depthStep, voltStep] of [
    [0.5, 0.5],
    [0.5, 0.1],
    [0.1, 0.05],
    [0.05, 0.01],
    [0.01, 0.001],
  ]) {
    const candidate: readonly [number, number] = [round(centre[0], depthStep), round(centre[1], voltStep)];
    if (allowed(rules, ...candidate)) return candidate;
  }
  // A bent or split region need not hold its centre: take the middle of the longest run.
  let best: { readonly length: number; readonly place: readonly [number, number] } = { length: -1, place: centre };
  for (const column of columns) {
    for (const [from, to] of column.volts) {
      if (to - from > best.length) best = { length: to - from, place: [column.depthMm, (from + to) / 2] };
    }
  }
  return best.place;
}

function boundariesOf(rules: Rules, depthEnd: number, voltsEnd: number): readonly RegionBoundary[] {
  const depthAt = (index: number): number => (depthEnd * (index + 1)) / PATH_POINTS;
  const ceilings = rules.ceilings.map(
    ({ rule, label, source, voltsAt }): RegionBoundary => ({
      rule,
      label,
      source,
      forbids: "above",
      path: Array.from({ length: PATH_POINTS }, (_, index) => [depthAt(index), voltsAt(depthAt(index))] as const).filter(([, volts]) =>
        Number.isFinite(volts),
      ),
    }),
  );
  const depths = rules.depths.map(
    ({ rule, label, source, side, depthMm }): RegionBoundary => ({
      rule,
      label,
      source,
      forbids: side === "at least" ? "shallower" : "deeper",
      path: [
        [depthMm, 0],
        [depthMm, voltsEnd],
      ],
    }),
  );
  const { readable } = rules;
  const readableFrom = readable?.runs[0]?.[0] ?? voltsEnd;
  const gradient: readonly RegionBoundary[] =
    readable === null
      ? []
      : [
          {
            rule: "readable-gradient",
            label: readable.label,
            source: readable.source,
            forbids: "below",
            path: [
              [0, readableFrom],
              [depthEnd, readableFrom],
            ],
          },
        ];
  return [...ceilings, ...gradient, ...depths].filter((boundary) => boundary.path.length > 1);
}

const OPENS_VOLTS: Partial<Record<RegionRule, string>> = {
  "supply-current": "a supply that gives more current, or water of lower conductivity",
  power: "water of lower conductivity, or shorter electrodes",
  heating: "a shorter session, or water of lower conductivity",
  "wet-hands": "a meter with more counts, electrodes closer together, or a supply that stays below the limit with nothing connected",
};

function clashOf(rules: Rules): RegionClash {
  const least = tightest(rules, "at least");
  const most = tightest(rules, "at most");
  if (least.depthMm > most.depthMm) {
    const missing = (least.depthMm - most.depthMm).toFixed(1);
    const taller = most.rule === "freeboard" ? `a wall ${missing} mm higher` : `parts ${missing} mm taller`;
    return {
      rules: [least.rule, most.rule],
      message: `“${least.label}” asks for at least ${least.depthMm.toFixed(1)} mm of water, “${most.label}” allows at most ${most.depthMm.toFixed(1)} mm.`,
      opensWith: `${taller}, or electrodes closer together.`,
    };
  }
  const generous = [least.depthMm, most.depthMm]
    .map((depthMm) => ({ depthMm, ceiling: lowestCeiling(rules, depthMm) }))
    .reduce((best, one) => (one.ceiling.voltsAt(one.depthMm) > best.ceiling.voltsAt(best.depthMm) ? one : best));
  const top = generous.ceiling.voltsAt(generous.depthMm);
  const needed = rules.readable?.runs[0]?.[0];
  return {
    rules: [generous.ceiling.rule, "readable-gradient"],
    message: `“${generous.ceiling.label}” allows at most ${top.toPrecision(3)} V, “${rules.readable?.label ?? "readable field"}” asks for ${needed === undefined ? "more than the meter shows" : `at least ${needed.toPrecision(3)} V`}.`,
    opensWith: `${OPENS_VOLTS[generous.ceiling.rule] ?? "another supply"}.`,
  };
}

/** @returns what the runs leave out of 0 … `end`. */
function between(runs: readonly (readonly [number, number])[], end: number): readonly (readonly [number, number])[] {
  const gaps: (readonly [number, number])[] = [];
  let from = 0;
  for (const [low, high] of runs) {
    if (low > from) gaps.push([from, Math.min(low, end)]);
    from = high;
  }
  if (from < end) gaps.push([from, end]);
  return gaps.filter(([low, high]) => high > low);
}

/**
 * The plane of depth and volts for the layout on the tray: what every rule allows, from one solved field and without another solve.
 * @returns boundaries, the allowed volts depth by depth, the middle of the region, or which two rules leave nothing between them.
 * Exact on a level tray without slabs; elsewhere an estimate away from the present depth.
 */
export function operatingRegion(setup: Setup, bench: SolvedBench): OperatingRegion {
  const { depthMm, tiltXDeg, tiltYDeg, slabs } = setup.water;
  const { volts } = setup.supply;
  const ceilings = voltsCeilings(setup, bench);
  const touch = ceilings.find((one) => one.rule === "wet-hands")?.voltsAt(depthMm) ?? 0;
  const depthEnd = Math.min(MOST_DEPTH_MM, Math.max(setup.tray.wallHeightMm, depthMm * 1.1));
  const voltsEnd = Math.max(touch * 1.25, volts * 1.15);
  const rules: Rules = { ceilings, depths: depthBounds(setup, bench), readable: readableVolts(setup, bench, voltsEnd) };
  const columns = columnsOf(rules);
  return {
    exact: tiltXDeg === 0 && tiltYDeg === 0 && slabs.length === 0,
    depthRangeMm: [0, depthEnd],
    voltsRange: [0, voltsEnd],
    boundaries: boundariesOf(rules, depthEnd, voltsEnd),
    unreadableVolts: between(rules.readable?.runs ?? [[0, voltsEnd]], voltsEnd),
    columns,
    present: [depthMm, volts],
    presentAllowed: allowed(rules, depthMm, volts),
    suggestion: suggestionIn(rules, columns),
    clash: columns.length === 0 ? clashOf(rules) : null,
  };
}
