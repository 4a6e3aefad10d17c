import { conjugateGradient, type SolveRecord, type SystemVector } from "./conjugate-gradient";
import type { Network } from "./discretise";
import { type Border, type Level, makeLevel, padded } from "./level";
import { buildHierarchy } from "./multigrid";

/**
 * The field of every electrode at 1 V with the others at 0 V and the floating conductors at zero net current.
 * Any volts and taps follow by adding these up (the equation is linear).
 */
export interface UnitPotentials {
  /** For each electrode the potential at every node (row-major); 0 at nodes that are not in the network. */
  readonly potentials: readonly Float64Array[];
  /** For each electrode the potential of every floating conductor. */
  readonly floating: readonly Float64Array[];
  /** Currents per volt (mm of depth): row-major, symmetric, rows add up to zero. */
  readonly conductanceMm: Float64Array;
  readonly unknowns: number;
  readonly record: SolveRecord;
}

/** The error energy at which a solve ends, as a share of the field's power (its root). */
export const FINE_TOLERANCE = 1e-9;
/** The same while a part moves: still a hundredth of what the grid itself gets wrong. */
export const LIVE_TOLERANCE = 1e-6;

function finestLevel(network: Network): Level {
  const { grid, active, east, north, contacts, bridges, layout } = network;
  const { columns, rows } = grid;
  const stride = columns + 2;
  const size = stride * (rows + 2);
  const links = {
    centre: new Float64Array(size),
    east: new Float64Array(size),
    north: new Float64Array(size),
    northEast: null,
    northWest: null,
  };
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      const node = row * columns + column;
      const n = padded(stride, column, row);
      links.east[n] = east[node];
      links.north[n] = north[node];
      links.centre[n] += east[node] + north[node];
      if (east[node] > 0) links.centre[n + 1] += east[node];
      if (north[node] > 0) links.centre[n + stride] += north[node];
    }
  }
  const at = (node: number): number => padded(stride, node % columns, Math.floor(node / columns));
  for (const contact of contacts)
    contact.nodes.forEach((node, k) => {
      links.centre[at(node)] += contact.conductances[k];
    });
  for (let node = 0; node < active.length; node++) if (active[node] === 0) links.centre[at(node)] = 1;
  const first = layout.electrodeCount;
  const count = layout.conductors.length - first;
  const borders = contacts
    .slice(first)
    .map((contact): Border => ({ nodes: Int32Array.from(contact.nodes, at), conductances: Float64Array.from(contact.conductances) }));
  const floating = new Float64Array(count * count);
  borders.forEach((border, f) => {
    for (const conductance of border.conductances) floating[f * count + f] += conductance;
  });
  for (const { bodyA, bodyB, conductanceMm } of bridges) {
    const a = bodyA - first;
    const b = bodyB - first;
    if (a >= 0) floating[a * count + a] += conductanceMm;
    if (b >= 0) floating[b * count + b] += conductanceMm;
    if (a >= 0 && b >= 0) {
      floating[a * count + b] -= conductanceMm;
      floating[b * count + a] -= conductanceMm;
    }
  }
  // A floating conductor that nothing ties down must not divide by zero; its potential is reported as undetermined.
  for (let f = 0; f < count; f++) if (!(floating[f * count + f] > 0)) floating[f * count + f] = 1;
  return makeLevel(columns, rows, links, borders, floating);
}

/** What drives the unknowns when electrode `electrode` stands at 1 V. */
function driveOf(network: Network, level: Level, electrode: number): SystemVector {
  const { grid, contacts, bridges, layout } = network;
  const drive: SystemVector = { grid: new Float64Array(level.centre.length), floating: new Float64Array(level.borders.length) };
  const contact = contacts[electrode];
  contact.nodes.forEach((node, k) => {
    drive.grid[padded(level.stride, node % grid.columns, Math.floor(node / grid.columns))] = contact.conductances[k];
  });
  for (const { bodyA, bodyB, conductanceMm } of bridges) {
    const other = bodyA === electrode ? bodyB : bodyB === electrode ? bodyA : -1;
    if (other >= layout.electrodeCount) drive.floating[other - layout.electrodeCount] += conductanceMm;
  }
  return drive;
}

/** Conductance between two electrodes without any unknown between them (row-major): own ties on the diagonal, bridges off it. */
function directConductance(network: Network): Float64Array {
  const count = network.layout.electrodeCount;
  const direct = new Float64Array(count * count);
  for (let e = 0; e < count; e++) for (const conductance of network.contacts[e].conductances) direct[e * count + e] += conductance;
  for (const { bodyA, bodyB, conductanceMm } of network.bridges) {
    if (bodyA < count) direct[bodyA * count + bodyA] += conductanceMm;
    if (bodyB < count) direct[bodyB * count + bodyB] += conductanceMm;
    if (bodyA < count && bodyB < count) {
      direct[bodyA * count + bodyB] -= conductanceMm;
      direct[bodyB * count + bodyA] -= conductanceMm;
    }
  }
  return direct;
}

function unpadded(network: Network, level: Level, solution: SystemVector, electrode: number): Float64Array {
  const { columns, rows } = network.grid;
  const values = new Float64Array(columns * rows);
  for (let row = 0; row < rows; row++) {
    const from = padded(level.stride, 0, row);
    values.set(solution.grid.subarray(from, from + columns), row * columns);
  }
  const { body } = network.ownership;
  for (let node = 0; node < values.length; node++) {
    if (body[node] < 0) continue;
    const floating = body[node] - network.layout.electrodeCount;
    values[node] = floating >= 0 ? solution.floating[floating] : body[node] === electrode ? 1 : 0;
  }
  return values;
}

/**
 * Solves the unit potentials of all electrodes; the last one follows from the others, because together they make 1 V everywhere.
 * Yields now and then so that a caller can stop or pause it.
 * @param tolerance see FINE_TOLERANCE.
 * @param onSolved told the share of the work done, 0 to 1.
 */
export function* solveUnitPotentials(
  network: Network,
  tolerance: number,
  onSolved: (share: number) => void = () => {},
): Generator<void, UnitPotentials> {
  const level = finestLevel(network);
  const hierarchy = yield* buildHierarchy(level);
  const count = network.layout.electrodeCount;
  const drives = network.contacts.slice(0, count).map((_, electrode) => driveOf(network, level, electrode));
  const solutions: SystemVector[] = [];
  const residuals: SystemVector[] = [];
  let record: SolveRecord = { iterations: 0, relativeResidual: 0 };
  for (let electrode = 0; electrode + 1 < count; electrode++) {
    const solved = yield* conjugateGradient(hierarchy, drives[electrode], tolerance, null);
    solutions.push(solved.solution);
    residuals.push(solved.residual);
    record = {
      iterations: Math.max(record.iterations, solved.record.iterations),
      relativeResidual: Math.max(record.relativeResidual, solved.record.relativeResidual),
    };
    onSolved((electrode + 1) / (count - 1));
  }
  const conductanceMm = new Float64Array(count * count);
  const direct = directConductance(network);
  const product = (a: SystemVector, b: SystemVector): number => {
    let sum = 0;
    for (let n = 0; n < a.grid.length; n++) sum += a.grid[n] * b.grid[n];
    for (let f = 0; f < a.floating.length; f++) sum += a.floating[f] * b.floating[f];
    return sum;
  };
  for (let e = 0; e + 1 < count; e++) {
    for (let f = 0; f <= e; f++) {
      // The power of the two fields in each other: its error is of second order in the solver's.
      const mutual = direct[e * count + f] - product(drives[e], solutions[f]) - product(solutions[e], residuals[f]);
      conductanceMm[e * count + f] = mutual;
      conductanceMm[f * count + e] = mutual;
    }
  }
  const last = count - 1;
  for (let e = 0; e < last; e++) {
    let sum = 0;
    for (let f = 0; f < last; f++) sum += conductanceMm[e * count + f];
    conductanceMm[e * count + last] = -sum;
    conductanceMm[last * count + e] = -sum;
    conductanceMm[last * count + last] += sum;
  }
  const potentials = solutions.map((solution, electrode) => unpadded(network, level, solution, electrode));
  const floating = solutions.map((solution) => solution.floating);
  const rest = Float64Array.from(network.active, (isActive, node) => (isActive === 1 || network.ownership.body[node] >= 0 ? 1 : 0));
  for (const potential of potentials) for (let node = 0; node < rest.length; node++) rest[node] -= potential[node];
  const restFloating = new Float64Array(level.borders.length).fill(1);
  for (const shares of floating) for (let f = 0; f < restFloating.length; f++) restFloating[f] -= shares[f];
  let unknowns = level.borders.length;
  for (const isActive of network.active) unknowns += isActive;
  return { potentials: [...potentials, rest], floating: [...floating, restFloating], conductanceMm, unknowns, record };
}
