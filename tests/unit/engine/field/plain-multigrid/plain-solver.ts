import type { Network } from "../../../../../renderer/engine/field/discretise";
import { finished } from "../../../../reference/solved";
import { conjugateGradient, type SolveRecord, type SystemVector } from "./conjugate-gradient";
import { type Border, type Level, makeLevel, padded } from "./level";
import { buildHierarchy } from "./multigrid";

/** @returns the network as the finest level of a hierarchy. */
export function finestLevel(network: Network): Level {
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

/** The potentials at every node, row-major: as the program's own solver gives them. */
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

export interface PlainSolution {
  readonly potentials: Float64Array;
  readonly floating: Float64Array;
  readonly record: SolveRecord;
}

/**
 * The reference that the program's own solver is held against: the same multigrid written plainly in double precision, all
 * nodes and floating conductors relaxed alike.
 * @returns the field of one electrode at 1 V with the others at 0 V and the floating conductors at zero net current.
 */
export function solvePlainly(network: Network, electrode: number, tolerance: number): PlainSolution {
  const level = finestLevel(network);
  const hierarchy = finished(buildHierarchy(level));
  const { solution, record } = finished(conjugateGradient(hierarchy, driveOf(network, level, electrode), tolerance, null));
  return { potentials: unpadded(network, level, solution, electrode), floating: solution.floating, record };
}
