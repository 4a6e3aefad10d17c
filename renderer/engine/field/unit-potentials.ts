import { conjugateGradient, type SolveRecord } from "./conjugate-gradient";
import type { Network } from "./discretise";
import type { Kernels } from "./kernels/kernels";
import { loadNetwork, PAUSE_NODES } from "./load-network";
import { createSolverMemory, type FirstGuess, type SolverMemory } from "./solver-memory";

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

/** Bridges from an electrode to floating conductors: the conductor (counted among the floating) and the conductance. */
function bridgesToFloating({ bridges, layout }: Network, electrode: number): readonly (readonly [number, number])[] {
  return bridges.flatMap(({ bodyA, bodyB, conductanceMm }): [number, number][] => {
    const other = bodyA === electrode ? bodyB : bodyB === electrode ? bodyA : -1;
    return other >= layout.electrodeCount ? [[other - layout.electrodeCount, conductanceMm]] : [];
  });
}

/** The kernels' potentials at every node, those on metal as the metal's. */
function potentialsOf(kernels: Kernels, network: Network, electrode: number, floating: Float64Array): Float64Array {
  const { columns, rows } = network.grid;
  const { body } = network.ownership;
  const first = network.layout.electrodeCount;
  const values = new Float64Array(kernels.memory.buffer, kernels.potentials(), columns * rows).slice();
  for (let node = 0; node < values.length; node++) {
    const owner = body[node];
    if (owner >= 0) values[node] = owner >= first ? floating[owner - first] : owner === electrode ? 1 : 0;
  }
  return values;
}

interface Solved {
  readonly potentials: Float64Array;
  readonly floating: Float64Array;
  /** What the unfinished iteration leaves of the currents: red nodes (padded), floating conductors. */
  readonly residual: { readonly red: Float64Array; readonly floating: Float64Array };
  readonly record: SolveRecord;
}

const dot = (a: Float64Array, b: Float64Array): number => {
  let sum = 0;
  for (let n = 0; n < a.length; n++) sum += a[n] * b[n];
  return sum;
};

function* solveElectrode(
  kernels: Kernels,
  network: Network,
  electrode: number,
  tolerance: number,
  guess: FirstGuess | undefined,
): Generator<void, Solved> {
  const { columns, rows } = network.grid;
  const floaters = network.layout.conductors.length - network.layout.electrodeCount;
  const view = (address: number, length: number): Float64Array => new Float64Array(kernels.memory.buffer, address, length);
  if (guess !== undefined) {
    view(kernels.potentials(), columns * rows).set(guess.potentials);
    view(kernels.floatingPotentials(), floaters).set(guess.floating);
  }
  kernels.beginSolve(electrode, guess !== undefined);
  for (const [floater, conductanceMm] of bridgesToFloating(network, electrode)) kernels.driveFloating(floater, conductanceMm);
  const record = yield* conjugateGradient(kernels, tolerance, guess !== undefined, columns * rows > PAUSE_NODES);
  kernels.finish(electrode);
  const floating = view(kernels.floatingPotentials(), floaters).slice();
  return {
    potentials: potentialsOf(kernels, network, electrode, floating),
    floating,
    residual: {
      red: view(kernels.redResidual(), kernels.redLength()).slice(),
      floating: view(kernels.floatingResidual(), floaters).slice(),
    },
    record,
  };
}

/** The current per volt that leaves electrode `electrode`'s own ties and bridges into a field. */
function driveTimes(network: Network, electrode: number, { potentials, floating }: Solved): number {
  const { nodes, conductances } = network.contacts[electrode];
  let sum = 0;
  for (let k = 0; k < nodes.length; k++) sum += conductances[k] * potentials[nodes[k]];
  for (const [floater, conductanceMm] of bridgesToFloating(network, electrode)) sum += conductanceMm * floating[floater];
  return sum;
}

export interface SolveOptions {
  /** See FINE_TOLERANCE. */
  readonly tolerance: number;
  readonly memory?: SolverMemory;
  /** Starts from the newest such solve on a grid of this size and is a start for the next; else solves start from zero. */
  readonly followsOn?: boolean;
  /** Told the share of the work done, 0 to 1. */
  readonly onSolved?: (share: number) => void;
}

/**
 * Solves the unit potentials of all electrodes; the last one follows from the others, because together they make 1 V everywhere.
 * Yields every few milliseconds so that a caller can stop or pause it.
 */
export function* solveUnitPotentials(network: Network, options: SolveOptions): Generator<void, UnitPotentials> {
  const { columns, rows } = network.grid;
  const { electrodeCount: count, conductors } = network.layout;
  const memory = options.memory ?? createSolverMemory();
  const guesses = options.followsOn === true ? memory.recall(columns, rows, count - 1, conductors.length - count) : undefined;
  const kernels = memory.borrow(columns, rows);
  try {
    yield* loadNetwork(kernels, network);
    const conductanceMm = directConductance(network);
    const solved: Solved[] = [];
    for (let e = 0; e + 1 < count; e++) {
      const one = yield* solveElectrode(kernels, network, e, options.tolerance, guesses?.[e]);
      solved.push(one);
      const red = new Float64Array(kernels.memory.buffer, kernels.redSolution(), kernels.redLength());
      for (let f = 0; f <= e; f++) {
        // The power of the two fields in each other: its error is of second order in the solver's.
        const rest = dot(red, solved[f].residual.red) + dot(one.floating, solved[f].residual.floating);
        const mutual = conductanceMm[e * count + f] - driveTimes(network, e, solved[f]) - rest;
        conductanceMm[e * count + f] = mutual;
        conductanceMm[f * count + e] = mutual;
      }
      options.onSolved?.((e + 1) / (count - 1));
      yield;
    }
    if (options.followsOn === true) {
      memory.remember(
        columns,
        rows,
        solved.map(({ potentials, floating }) => ({ potentials, floating })),
      );
    }
    return withLast(network, solved, conductanceMm);
  } finally {
    memory.giveBack(columns, rows, kernels);
  }
}

/** Adds the last electrode, whose field is what the others leave of 1 V everywhere. */
function withLast(network: Network, solved: readonly Solved[], conductanceMm: Float64Array): UnitPotentials {
  const { active, layout, ownership } = network;
  const last = layout.electrodeCount - 1;
  const count = layout.electrodeCount;
  for (let e = 0; e < last; e++) {
    let sum = 0;
    for (let f = 0; f < last; f++) sum += conductanceMm[e * count + f];
    conductanceMm[e * count + last] = -sum;
    conductanceMm[last * count + e] = -sum;
  }
  let own = 0;
  for (let e = 0; e < last; e++) own -= conductanceMm[e * count + last];
  conductanceMm[last * count + last] = own;
  const rest = new Float64Array(active.length);
  let unknowns = layout.conductors.length - count;
  for (let node = 0; node < rest.length; node++) {
    unknowns += active[node];
    if (active[node] === 0 && ownership.body[node] < 0) continue;
    let value = 1;
    for (let e = 0; e < last; e++) value -= solved[e].potentials[node];
    rest[node] = value;
  }
  const restFloating = new Float64Array(layout.conductors.length - count).fill(1);
  for (const { floating } of solved) for (let f = 0; f < restFloating.length; f++) restFloating[f] -= floating[f];
  return {
    potentials: [...solved.map(({ potentials }) => potentials), rest],
    floating: [...solved.map(({ floating }) => floating), restFloating],
    conductanceMm,
    unknowns,
    record: {
      iterations: Math.max(0, ...solved.map(({ record }) => record.iterations)),
      relativeResidual: Math.max(0, ...solved.map(({ record }) => record.relativeResidual)),
    },
  };
}
