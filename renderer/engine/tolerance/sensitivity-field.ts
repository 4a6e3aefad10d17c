import { OWNER_WATER } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import { createSolverMemory } from "../field/solver-memory";
import { geometryFindings } from "../findings/all-findings";
import { covers } from "../geometry/signed-distance";
import { type Perturbation, perturbationsOf } from "./perturbations";
import { fromFirstSolve, solveUnitField, type UnitField } from "./unit-field";

/**
 * How the field per volt of each electrode changes with everything that can move it, on a grid over the tray. It belongs to a
 * geometry; any volts and taps follow by adding up (the equation is linear).
 */
export interface SensitivityField {
  readonly perturbations: readonly Perturbation[];
  /** Ids of the electrodes, in the order of all lists per electrode. */
  readonly electrodes: readonly string[];
  /** Potential at a place (mm) per volt of each electrode. */
  readonly unitsAt: (xMm: number, yMm: number) => readonly number[];
  /** For each perturbation, in its order, the change of that per mm or degree; 0 where the parts leave no room to try it. */
  readonly changesAt: (xMm: number, yMm: number) => readonly (readonly number[])[];
}

/** Values at the grid's nodes for all electrodes but the last (whose share is what is left of a constant), and on the conductors. */
interface NodeValues {
  readonly nodes: readonly Float32Array[];
  readonly bodies: readonly Float64Array[];
}

function bodyVolts({ units, network }: UnitField, electrode: number): Float64Array {
  const count = network.layout.electrodeCount;
  return Float64Array.from(network.layout.conductors, (_, body) =>
    body < count ? Number(body === electrode) : units.floating[electrode][body - count],
  );
}

function valuesOf(field: UnitField): NodeValues {
  const electrodes = Array.from({ length: field.network.layout.electrodeCount - 1 }, (_, index) => index);
  return {
    nodes: electrodes.map((electrode) => Float32Array.from(field.units.potentials[electrode])),
    bodies: electrodes.map((electrode) => bodyVolts(field, electrode)),
  };
}

/** (above − below)/width at every node; NaN where one of the two has no potential. */
function differenceOf(above: UnitField, below: UnitField, width: number): NodeValues {
  const known = ({ network }: UnitField, node: number): boolean => network.active[node] === 1 || network.ownership.body[node] >= 0;
  const electrodes = Array.from({ length: above.network.layout.electrodeCount - 1 }, (_, index) => index);
  return {
    nodes: electrodes.map((electrode) => {
      const [a, b] = [above.units.potentials[electrode], below.units.potentials[electrode]];
      return Float32Array.from(a, (value, node) => (known(above, node) && known(below, node) ? (value - b[node]) / width : Number.NaN));
    }),
    bodies: electrodes.map((electrode) => {
      const [a, b] = [bodyVolts(above, electrode), bodyVolts(below, electrode)];
      return a.map((value, body) => (value - b[body]) / width);
    }),
  };
}

/** A setup that the planner would refuse for its geometry has no field to compare with. */
const isSound = (setup: Setup): boolean => !geometryFindings(setup).some(({ code }) => code === "overlap" || code === "short-circuit");

/** The ends of a step that the parts leave room for: both, or one of them and the plan itself. */
function endsOf(setup: Setup, { applied, step }: Perturbation): readonly number[] {
  return [step, -step].filter((amount) => isSound(applied(setup, amount)));
}

/**
 * Solves the tray once as planned and twice for every perturbation, all on one grid and from the planned field as first guess, so that
 * the grid's own error is the same in all and leaves their differences: central differences, (φ(+h) − φ(−h))/2h, or one-sided ones
 * where a neighbour is in the way (JCGM 100:2008, 5.1.4, note 2: sensitivities may be found by varying one input at a time).
 * Yields every few milliseconds.
 * @param onProgress told the share of the work done, 0 to 1.
 */
export function* solveSensitivities(setup: Setup, onProgress: (share: number) => void = () => {}): Generator<void, SensitivityField> {
  const memory = fromFirstSolve(createSolverMemory());
  const planned = yield* solveUnitField(setup, memory);
  const base = valuesOf(planned);
  const perturbations = perturbationsOf(setup);
  const changes: (NodeValues | null)[] = [];
  for (const [index, perturbation] of perturbations.entries()) {
    const ends = endsOf(setup, perturbation);
    const fields: UnitField[] = [];
    for (const amount of ends) fields.push(yield* solveUnitField(perturbation.applied(setup, amount), memory));
    const other = fields.length === 2 ? fields[1] : planned;
    const width = fields.length === 2 ? ends[0] - ends[1] : ends[0];
    changes.push(fields.length === 0 ? null : differenceOf(fields[0], other, width));
    onProgress((index + 1) / perturbations.length);
    yield;
  }
  return fieldOf(setup, planned, base, perturbations, changes);
}

/** Weighs the four nodes round a place; those without a value are left out. NaN where none has one. */
function interpolated(values: Float32Array, nodes: readonly number[], weights: readonly number[]): number {
  let sum = 0;
  let weight = 0;
  nodes.forEach((node, index) => {
    const value = values[node];
    if (Number.isNaN(value)) return;
    sum += weights[index] * value;
    weight += weights[index];
  });
  return weight === 0 ? Number.NaN : sum / weight;
}

function fieldOf(
  setup: Setup,
  { network }: UnitField,
  base: NodeValues,
  perturbations: readonly Perturbation[],
  changes: readonly (NodeValues | null)[],
): SensitivityField {
  const { layout, grid, ownership, active } = network;
  const { columns, rows, pitchXMm, pitchYMm } = grid;
  const { conductors, electrodeCount } = layout;
  const isWater = (node: number): boolean => ownership.owner[node] === OWNER_WATER && active[node] === 1;

  /** Values of all but the last electrode at a place. */
  function at({ nodes: maps, bodies }: NodeValues, xMm: number, yMm: number): readonly number[] {
    const body = conductors.findIndex(({ placed }) => covers(placed, xMm, yMm));
    if (body >= 0) return bodies.map((values) => values[body]);
    const column = Math.min(columns - 2, Math.max(0, Math.floor(xMm / pitchXMm)));
    const row = Math.min(rows - 2, Math.max(0, Math.floor(yMm / pitchYMm)));
    const [u, v] = [xMm / pitchXMm - column, yMm / pitchYMm - row];
    const corner = row * columns + column;
    const around = [corner, corner + 1, corner + columns, corner + columns + 1];
    const weights = [(1 - u) * (1 - v), u * (1 - v), (1 - u) * v, u * v];
    // Beside metal the change jumps: the water's own nodes speak for the water, if there are any.
    const water = around.map((node, index) => (isWater(node) ? weights[index] : 0));
    const inWater = water.some((weight) => weight > 0.05);
    return maps.map((map) => {
      const value = interpolated(map, around, inWater ? water : weights);
      return Number.isFinite(value) ? value : 0;
    });
  }

  const withLast = (values: readonly number[], sum: number): readonly number[] => [
    ...values,
    values.reduce((rest, value) => rest - value, sum),
  ];
  const nothing = Array.from({ length: electrodeCount }, () => 0);
  return {
    perturbations,
    electrodes: conductors.slice(0, electrodeCount).map(({ index }) => setup.parts[index].id),
    unitsAt: (xMm, yMm) => withLast(at(base, xMm, yMm), 1),
    changesAt: (xMm, yMm) => changes.map((change) => (change === null ? nothing : withLast(at(change, xMm, yMm), 0))),
  };
}
