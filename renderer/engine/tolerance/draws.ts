import type { Setup } from "../../../shared-types/setup";
import type { ExpectedReading } from "../../../shared-types/tolerance";
import { type ReadingMap, readerOf, readingMap } from "../field/reading";
import { createSolverMemory } from "../field/solver-memory";
import { geometryFindings } from "../findings/all-findings";
import { covers } from "../geometry/signed-distance";
import { type Chance, chanceOf } from "./chance";
import { type Perturbation, perturbationsOf } from "./perturbations";
import { electrodeVolts } from "./place-sensitivities";
import { type BandBench, interfaceLimitVolts, meterLimitVolts, shownVolts, tolerancesOf } from "./stated-limits";
import { fromFirstSolve, solveUnitField, type UnitField } from "./unit-field";

/** What a run of draws is about. */
export interface DrawTask {
  readonly setup: Setup;
  readonly bench: BandBench;
  readonly readings: readonly ExpectedReading[];
  readonly seed: number;
}

/** Trays whose parts would overlap cannot be built: so often another one is drawn, then the parts are left where they are planned. */
const MOST_TRIES = 20;

type FieldAt = (xMm: number, yMm: number) => number | null;

/** The potential at any place of a tray; null where there is none. */
function readable({ network, units }: UnitField, setup: Setup, map: ReadingMap): FieldAt {
  const { layout, grid } = network;
  const volts = electrodeVolts(
    setup,
    layout.conductors.slice(0, layout.electrodeCount).map(({ index }) => setup.parts[index].id),
  );
  const potentials = new Float64Array(grid.columns * grid.rows);
  units.potentials.forEach((unit, electrode) => {
    if (volts[electrode] === 0) return;
    for (let node = 0; node < potentials.length; node++) potentials[node] += volts[electrode] * unit[node];
  });
  const floating = layout.conductors
    .slice(layout.electrodeCount)
    .map((_, body) => units.floating.reduce((sum, shares, electrode) => sum + shares[body] * volts[electrode], 0));
  const bodyVolts = [...volts, ...floating];
  const reader = readerOf(network, map, potentials, bodyVolts);
  return (xMm, yMm) => {
    const body = layout.conductors.findIndex(({ placed }) => covers(placed, xMm, yMm));
    const value = body >= 0 ? bodyVolts[body] : reader.at(xMm, yMm)?.volts;
    return value === undefined || !Number.isFinite(value) ? null : value;
  };
}

const isSound = (setup: Setup): boolean => !geometryFindings(setup).some(({ code }) => code === "overlap" || code === "short-circuit");

/** A tray as it may come out within the stated tolerances. */
function drawnTray(setup: Setup, perturbations: readonly Perturbation[], chance: Chance): Setup {
  const limits = tolerancesOf(setup);
  const widths: Readonly<Record<Perturbation["key"], number>> = {
    "part-x": limits.partPlacementMm,
    "part-y": limits.partPlacementMm,
    "part-turn": limits.partTurnDeg,
    depth: limits.depthMm,
    "tilt-x": limits.tiltDeg,
    "tilt-y": limits.tiltDeg,
  };
  for (let tried = 0; tried < MOST_TRIES; tried++) {
    const tray = perturbations.reduce((one, { applied, key }) => applied(one, widths[key] * chance.rectangular()), setup);
    if (isSound(tray)) return tray;
  }
  return setup;
}

/** What the meter shows at every point of one drawn tray, V. */
function drawnReadings(task: DrawTask, plannedAt: FieldAt, drawnAt: FieldAt, chance: Chance): Float64Array {
  const { setup, bench, readings } = task;
  const limits = tolerancesOf(setup);
  const taps = setup.parts.flatMap((part) => (part.role === "electrode" ? [part.tap * setup.supply.volts] : []));
  const spanV = [Math.min(...taps), Math.max(...taps)] as const;
  // One supply, one water and one state of the surfaces for the whole tray; meter and hand anew at every point.
  const supply = 1 + (limits.supplyPercent / 100) * chance.rectangular();
  const conductivity = 1 + (limits.conductivityPercent / 100) * chance.rectangular();
  const warmth = 1 + bench.water.changePerKelvin * limits.temperatureK * chance.rectangular();
  const resistanceFactor = 1 / (conductivity * warmth);
  const surfaces = chance.rectangular();
  const loading = 1 - bench.meter.loadingShare * chance.rectangular();
  const shown = (field: number, factor: number): number =>
    setup.interface.inReadings ? shownVolts(bench, spanV, field, "typical", factor) : field;
  return Float64Array.from(readings, ({ xMm, yMm, volts, voltsError }) => {
    const planned = plannedAt(xMm, yMm) ?? volts;
    const { placementMm } = setup.probing;
    const drawn = drawnAt(xMm + placementMm * chance.rectangular(), yMm + placementMm * chance.rectangular()) ?? planned;
    const moved = volts + shown(drawn, resistanceFactor) - shown(planned, 1);
    const meter = meterLimitVolts(setup, bench, volts) * chance.rectangular();
    const lost = interfaceLimitVolts(setup, bench, spanV, planned) * surfaces;
    return moved * supply * loading + meter + lost + (voltsError / 2) * chance.normal();
  });
}

/**
 * Trays drawn within the stated tolerances, each solved whole, and what the meter would show at every point: propagation of
 * distributions, JCGM 101:2008, 7.2 to 7.4. All are solved on one grid and differ from the plan by their difference from the
 * planned tray on that same grid, so that the grid's own error cancels. Yields a row of readings (V) a draw, and null in between.
 * @param first number of the first draw; a draw comes out the same whoever computes it.
 */
export function* drawTrays(task: DrawTask, first: number, count: number): Generator<Float64Array | null, void> {
  const { setup, seed } = task;
  const memory = fromFirstSolve(createSolverMemory());
  const perturbations = perturbationsOf(setup);
  const planned = yield* quietly(solveUnitField(setup, memory));
  const plannedAt = readable(planned, setup, readingMap(planned.network));
  for (let draw = first; draw < first + count; draw++) {
    const chance = chanceOf(seed, draw);
    const tray = drawnTray(setup, perturbations, chance);
    const field = yield* quietly(solveUnitField(tray, memory));
    yield drawnReadings(task, plannedAt, readable(field, tray, readingMap(field.network)), chance);
  }
}

function* quietly<Value>(steps: Generator<void, Value>): Generator<null, Value> {
  for (;;) {
    const step = steps.next();
    if (step.done === true) return step.value;
    yield null;
  }
}
