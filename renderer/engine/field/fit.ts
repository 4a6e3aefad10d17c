import { distanceToOutline } from "../geometry/signed-distance";
import type { Contact, Network } from "./discretise";
import { type LocalField, type LocalPotential, localFieldOf } from "./local-field";

/**
 * Replaces the conductances between a conductor and the nodes next to it by those with which the conductor's own local
 * potential satisfies the discrete equations exactly. Only the network's contacts change, so it stays symmetric; what the
 * plain scheme gets wrong at curved surfaces, corners and tips is then taken out at its source. Derived here; compare the
 * exponentially fitted schemes of D. N. de G. Allen & R. V. Southwell, Q. J. Mech. Appl. Math. 8 (1955) 129.
 */

/** Nodes looked at between two chances to pause: well under ten milliseconds. */
const PAUSE_EVERY = 500;
/** Fitted conductances beyond these multiples of the plain one mean that the local potential does not apply. */
const LEAST_OF_PLAIN = 0.05;
const MOST_OF_PLAIN = 20;
/** A node this near to the metal (share of the pitch) has next to its potential, whatever the plain scheme saw of it. */
const AT_METAL = 0.25;
/** What a corner may take from or add to a node that its conductor does not touch, as a share of the node's links. */
const LEAST_OF_LINKS = -0.6;
const MOST_OF_LINKS = 3;

/** Values of a local potential at nodes: neighbours ask for the same ones, and some are dear. */
type NodeValues = (node: number) => number;

function valuesOf(network: Network, potential: LocalPotential): NodeValues {
  const { columns, pitchXMm, pitchYMm } = network.grid;
  const { conduction } = network;
  const known = new Map<number, number>();
  return (node) => {
    const before = known.get(node);
    if (before !== undefined) return before;
    const x = (node % columns) * pitchXMm;
    const y = Math.floor(node / columns) * pitchYMm;
    // With varying depth k, φ/√k is harmonic to the order that matters here.
    const value = potential(x, y) / (conduction.isLevel ? 1 : Math.sqrt(Math.max(1e-6, conduction.depthAt(x, y))));
    known.set(node, value);
    return value;
  };
}

function fittedConductance(network: Network, node: number, at: NodeValues): number | null {
  const { grid, east, north, active, conduction } = network;
  const { columns, pitchXMm, pitchYMm } = grid;
  if (conduction.nearWaterline((node % columns) * pitchXMm, Math.floor(node / columns) * pitchYMm)) return null;
  const here = at(node);
  if (!(here > 0)) return null;
  let sum = 0;
  const link = (conductance: number, other: number): void => {
    if (conductance > 0 && active[other] === 1) sum += conductance * (at(other) - here);
  };
  link(east[node], node + 1);
  if (node > 0) link(east[node - 1], node - 1);
  link(north[node], node + columns);
  if (node >= columns) link(north[node - columns], node - columns);
  const fitted = sum / here;
  return Number.isFinite(fitted) ? fitted : null;
}

function linkSum(network: Network, node: number): number {
  const { east, north, grid } = network;
  return east[node] + (node > 0 ? east[node - 1] : 0) + north[node] + (node >= grid.columns ? north[node - grid.columns] : 0);
}

function plainNodesOf(network: Network): (node: number) => boolean {
  const { conduction, grid } = network;
  return (node) =>
    !conduction.stepAround(node) &&
    [node, node + 1, node - 1, node + grid.columns, node - grid.columns].every((one) => !conduction.nearInsulator(one));
}

function* fitBody(
  network: Network,
  body: number,
  field: LocalField,
  shared: ReadonlySet<number>,
  isPlain: (node: number) => boolean,
): Generator<void, Contact> {
  const { grid, active, layout } = network;
  const { columns, rows, pitchXMm, pitchYMm } = grid;
  const contact = network.contacts[body];
  const ties = new Map<number, number>();
  const values = new Map<LocalPotential, NodeValues>();
  const { loops } = layout.conductors[body];
  const atMetal = (node: number): boolean =>
    distanceToOutline(loops, (node % columns) * pitchXMm, Math.floor(node / columns) * pitchYMm) < AT_METAL * Math.min(pitchXMm, pitchYMm);
  const fittedAt = (node: number, potential: LocalPotential | null): number | null => {
    if (potential === null) return null;
    let at = values.get(potential);
    if (at === undefined) {
      at = valuesOf(network, potential);
      values.set(potential, at);
    }
    return fittedConductance(network, node, at);
  };
  contact.nodes.forEach((node, k) => {
    const plain = contact.conductances[k];
    ties.set(node, plain);
    if (shared.has(node) || active[node] === 0 || !isPlain(node)) return;
    const potential = field.at((node % columns) * pitchXMm, Math.floor(node / columns) * pitchYMm);
    const fitted = fittedAt(node, potential);
    // A part tied to a single node is too small for the plain value to mean much.
    const likely = (value: number): boolean =>
      contact.nodes.length === 1 || (value > LEAST_OF_PLAIN * plain && (value < MOST_OF_PLAIN * plain || atMetal(node)));
    if (fitted !== null && fitted > 0 && likely(fitted)) ties.set(node, fitted);
  });
  const [left, bottom, right, top] = layout.conductors[body].bounds;
  let looked = 0;
  const margin = field.widestReachMm;
  for (
    let row = Math.max(0, Math.floor((bottom - margin) / pitchYMm));
    row <= Math.min(rows - 1, Math.ceil((top + margin) / pitchYMm));
    row++
  ) {
    for (
      let column = Math.max(0, Math.floor((left - margin) / pitchXMm));
      column <= Math.min(columns - 1, Math.ceil((right + margin) / pitchXMm));
      column++
    ) {
      const node = row * columns + column;
      if (active[node] === 0 || ties.has(node) || shared.has(node) || !isPlain(node)) continue;
      if (++looked % PAUSE_EVERY === 0) yield;
      const potential = field.featureAt(column * pitchXMm, row * pitchYMm);
      const fitted = fittedAt(node, potential);
      if (fitted === null) continue;
      const share = fitted / linkSum(network, node);
      if (share > LEAST_OF_LINKS && (share < MOST_OF_LINKS || contact.nodes.length <= 1 || atMetal(node))) ties.set(node, fitted);
    }
  }
  const nodes = [...ties.keys()].sort((a, b) => a - b);
  return { nodes, conductances: nodes.map((node) => ties.get(node) ?? 0) };
}

/** A network whose contacts are fitted, with the local potentials that they were fitted to (one for each conductor). */
export interface FittedNetwork extends Network {
  readonly localFields: readonly LocalField[];
}

/** @returns the network with fitted contacts. Nodes next to two conductors, to insulators or depth steps stay plain. Yields now and then. */
export function* fitContacts(network: Network): Generator<void, FittedNetwork> {
  const { layout, grid } = network;
  const seen = new Set<number>();
  const shared = new Set<number>();
  for (const contact of network.contacts) {
    for (const node of contact.nodes) {
      if (seen.has(node)) shared.add(node);
      seen.add(node);
    }
  }
  const smallestReachMm = 2 * Math.max(grid.pitchXMm, grid.pitchYMm);
  const isPlain = plainNodesOf(network);
  const localFields = layout.conductors.map((conductor) => {
    const others = [...layout.conductors, ...layout.insulators].filter((other) => other !== conductor);
    const clearanceMm = (x: number, y: number): number =>
      Math.min(Infinity, ...others.map((other) => distanceToOutline(other.loops, x, y)));
    return localFieldOf(conductor, layout.setup, smallestReachMm, clearanceMm);
  });
  const contacts: Contact[] = [];
  for (const [body, field] of localFields.entries()) contacts.push(yield* fitBody(network, body, field, shared, isPlain));
  return { ...network, contacts, localFields };
}
