import type { Network } from "./discretise";
import type { Kernels } from "./kernels/kernels";

/** Networks of more nodes than this are worked on in steps of several milliseconds: between two of them computing may pause. */
export const PAUSE_NODES = 150_000;

/** Conductances of the floating conductors among themselves and to all else: row-major, positive on the diagonal. */
function floatingMatrix({ contacts, bridges, layout }: Network): Float64Array {
  const first = layout.electrodeCount;
  const count = layout.conductors.length - first;
  const matrix = new Float64Array(count * count);
  contacts.slice(first).forEach(({ conductances }, f) => {
    for (const conductance of conductances) matrix[f * count + f] += conductance;
  });
  for (const { bodyA, bodyB, conductanceMm } of bridges) {
    const a = bodyA - first;
    const b = bodyB - first;
    if (a >= 0) matrix[a * count + a] += conductanceMm;
    if (b >= 0) matrix[b * count + b] += conductanceMm;
    if (a >= 0 && b >= 0) {
      matrix[a * count + b] -= conductanceMm;
      matrix[b * count + a] -= conductanceMm;
    }
  }
  // A floating conductor that nothing ties down must not divide by zero; its potential is reported as undetermined.
  for (let f = 0; f < count; f++) if (!(matrix[f * count + f] > 0)) matrix[f * count + f] = 1;
  return matrix;
}

/**
 * Puts a network into the kernels and builds the multigrid hierarchy of it. Yields now and then so that a caller can stop it.
 */
export function* loadNetwork(kernels: Kernels, network: Network): Generator<void, void> {
  const { grid, east, north, contacts, layout } = network;
  const size = grid.columns * grid.rows;
  const electrodes = layout.electrodeCount;
  const tieCount = contacts.reduce((sum, { nodes }) => sum + nodes.length, 0);
  const floaters = layout.conductors.length - electrodes;
  kernels.prepare(grid.columns, grid.rows, electrodes, floaters, tieCount);
  const { buffer } = kernels.memory;
  new Float64Array(buffer, kernels.eastLinks(), size).set(east);
  new Float64Array(buffer, kernels.northLinks(), size).set(north);
  const nodes = new Int32Array(buffer, kernels.tieNodes(), tieCount);
  const bodies = new Int32Array(buffer, kernels.tieBodies(), tieCount);
  const conductances = new Float64Array(buffer, kernels.tieConductances(), tieCount);
  let tie = 0;
  contacts.forEach((contact, body) => {
    nodes.set(contact.nodes, tie);
    conductances.set(contact.conductances, tie);
    bodies.fill(body < electrodes ? -1 - body : body - electrodes, tie, tie + contact.nodes.length);
    tie += contact.nodes.length;
  });
  new Float64Array(buffer, kernels.floatingMatrix(), floaters * floaters).set(floatingMatrix(network));
  if (size > PAUSE_NODES) yield;
  kernels.buildFinest();
  yield;
  for (let index = 0; index + 1 < kernels.levelsToBuild(); index++) {
    kernels.buildBelow(index);
    if (size > PAUSE_NODES >> (2 * index)) yield;
  }
}
