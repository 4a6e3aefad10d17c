import { describe, expect, it } from "vitest";
import { pitchFor } from "../../../../renderer/engine/field/grid";
import { type Kernels, startKernels } from "../../../../renderer/engine/field/kernels/kernels";
import { loadNetwork } from "../../../../renderer/engine/field/load-network";
import { createSolverMemory } from "../../../../renderer/engine/field/solver-memory";
import { FINE_TOLERANCE, LIVE_TOLERANCE, solveUnitPotentials } from "../../../../renderer/engine/field/unit-potentials";
import { barsAndLooseParts, barsAndLooseRing, networkOf } from "../../../reference/networks";
import { randomSetup, seededNumbers } from "../../../reference/random-setups";
import { REFERENCE_CASES } from "../../../reference/reference-cases";
import { finished, soundSetup, trayWith } from "../../../reference/solved";
import { solvePlainly } from "./plain-multigrid/plain-solver";

type Network = ReturnType<typeof networkOf>;

const largestDifference = (a: Float64Array, b: Float64Array): number =>
  a.reduce((largest, value, index) => Math.max(largest, Math.abs(value - b[index])), a.length === b.length ? 0 : Number.POSITIVE_INFINITY);

/** Both solvers go on until only rounding is left; what remains between them is an error of one of them. */
const TO_ROUNDING = 1e-12;

function expectSameAsPlain(network: Network): void {
  const units = finished(solveUnitPotentials(network, { tolerance: TO_ROUNDING }));
  for (let electrode = 0; electrode < network.layout.electrodeCount; electrode++) {
    const plain = solvePlainly(network, electrode, TO_ROUNDING);
    expect(largestDifference(units.potentials[electrode], plain.potentials)).toBeLessThanOrEqual(1e-9);
    expect(largestDifference(units.floating[electrode], plain.floating)).toBeLessThanOrEqual(1e-9);
  }
}

describe("the compiled solver gives the potentials of the plain one within 1e-9 V per volt", () => {
  it.each(REFERENCE_CASES.map((one) => [one.id, one] as const))("%s", (_, { setup: data }) => {
    const setup = soundSetup(data);
    expectSameAsPlain(networkOf(setup, 1.5 * pitchFor(setup.tray, "live")));
  });

  it("random setups with insulators, slabs, tilts and several electrodes", () => {
    for (let seed = 700; seed < 736; seed++) {
      const setup = randomSetup(seed, { insulators: seed % 2 === 0, slabs: seed % 4 === 1, tilt: seed % 3 === 0 });
      expectSameAsPlain(networkOf(setup, 2 * pitchFor(setup.tray, "live")));
    }
  });

  it("two loose parts and an electrode nearer to each other than the grid's pitch", () => {
    const bar = (id: string, role: string, xMm: number) => ({
      id,
      role,
      ...(role === "electrode" ? { tap: 1 } : {}),
      xMm,
      yMm: 100,
      shape: { kind: "bar", lengthMm: 6.3, widthMm: 60 },
    });
    const earth = { id: "E", role: "electrode", tap: 0, xMm: 250, yMm: 100, shape: { kind: "disc", diameterMm: 30 } };
    const parts = [bar("A", "electrode", 80), bar("F", "floating", 87), bar("G", "floating", 94), earth];
    expectSameAsPlain(networkOf(trayWith({ parts }), 2));
  });
});

describe("iterations to 1e-9 of the power", () => {
  it.each([0, 1, 2, 3, 5, 8, 12])("are at most 10 with %i loose parts", (count) => {
    for (const pitchMm of [2, 1, 0.5]) {
      const { record } = finished(solveUnitPotentials(networkOf(barsAndLooseParts(count), pitchMm), { tolerance: FINE_TOLERANCE }));
      expect(record.iterations).toBeLessThanOrEqual(10);
      expect(record.relativeResidual).toBeLessThanOrEqual(FINE_TOLERANCE);
    }
  });

  it("are at most 10 for nearly all random setups, and never more than one beyond the plain solver's", () => {
    let slow = 0;
    for (let seed = 800; seed < 840; seed++) {
      const setup = randomSetup(seed, { insulators: seed % 2 === 0, slabs: seed % 4 === 1, tilt: seed % 3 === 0 });
      const network = networkOf(setup, 2 * pitchFor(setup.tray, "live"));
      const { iterations } = finished(solveUnitPotentials(network, { tolerance: FINE_TOLERANCE })).record;
      if (iterations <= 10) continue;
      slow++;
      const plain = network.contacts.slice(0, network.layout.electrodeCount).map((_, e) => solvePlainly(network, e, FINE_TOLERANCE));
      expect(iterations).toBeLessThanOrEqual(Math.max(...plain.map(({ record }) => record.iterations)) + 1);
    }
    expect(slow).toBeLessThanOrEqual(2);
  });
});

it("coarse nodes of which metal leaves next to nothing do not upset single precision", () => {
  // At this pitch the loose disc's edge leaves shares that shrink from level to level.
  const setup = randomSetup(7004, { insulators: true, slabs: true, tilt: false });
  const network = networkOf(setup, pitchFor(setup.tray, "reference"));
  expect(finished(solveUnitPotentials(network, { tolerance: FINE_TOLERANCE })).record.iterations).toBeLessThanOrEqual(10);
});

/** The preconditioner applied to a residual: the red nodes' numbers and the floating conductors'. */
function preconditioned(kernels: Kernels, red: Float64Array): Float64Array {
  const length = kernels.redLength();
  kernels.beginSolve(0, false);
  new Float64Array(kernels.memory.buffer, kernels.redResidual(), length).set(red);
  kernels.descend(false, 0);
  kernels.cycleBelow();
  kernels.ascend();
  return Float64Array.from(new Float32Array(kernels.memory.buffer, kernels.redCorrection(), length));
}

it("the multigrid cycle is a symmetric positive operation, as conjugate gradients ask for", () => {
  const network = networkOf(barsAndLooseParts(5), 2);
  const kernels = startKernels();
  finished(loadNetwork(kernels, network));
  const random = seededNumbers(11);
  // Where a unit residual is answered by nothing there is no unknown: padding and metal.
  const ones = preconditioned(kernels, new Float64Array(kernels.redLength()).fill(1));
  const noise = (): Float64Array => ones.map((value) => (value === 0 ? 0 : random() - 0.5));
  const times = (a: Float64Array, b: Float64Array): number => a.reduce((sum, value, index) => sum + value * b[index], 0);
  for (let trial = 0; trial < 5; trial++) {
    const [a, b] = [noise(), noise()];
    const [za, zb] = [preconditioned(kernels, a), preconditioned(kernels, b)];
    const size = Math.sqrt(times(a, za) * times(b, zb));
    expect(times(a, za)).toBeGreaterThan(0);
    expect(Math.abs(times(a, zb) - times(b, za))).toBeLessThanOrEqual(1e-5 * size);
  }
});

it("memory that served another network leaves no trace in the next answer", () => {
  const memory = createSolverMemory();
  const [one, other, third] = [barsAndLooseParts(3), barsAndLooseRing(), barsAndLooseParts(0)].map((setup) => networkOf(setup, 2));
  const solve = (network: Network, kept = memory): readonly Float64Array[] =>
    finished(solveUnitPotentials(network, { tolerance: FINE_TOLERANCE, memory: kept })).potentials;
  for (const network of [one, other, third, networkOf(barsAndLooseRing(), 3), one]) {
    expect(solve(network)).toEqual(solve(network, createSolverMemory()));
  }
});

it("a solve that another one overtakes ends as if it had been alone", () => {
  const memory = createSolverMemory();
  const network = networkOf(barsAndLooseRing(), 2);
  const slow = solveUnitPotentials(network, { tolerance: FINE_TOLERANCE, memory });
  for (let step = 0; step < 6; step++) slow.next();
  finished(solveUnitPotentials(networkOf(barsAndLooseParts(4), 2), { tolerance: FINE_TOLERANCE, memory }));
  const alone = finished(solveUnitPotentials(network, { tolerance: FINE_TOLERANCE }));
  expect(finished(slow).potentials).toEqual(alone.potentials);
});

it("a solve that follows on from the one before a small move needs fewer iterations and answers alike", () => {
  const moved = (xMm: number): Network => {
    const ring = { id: "R", role: "floating", xMm, yMm: 100, shape: { kind: "ring", outerMm: 80, innerMm: 70 } };
    return networkOf(trayWith({ parts: [...barsAndLooseParts(0).parts, ring] }), 2);
  };
  const memory = createSolverMemory();
  finished(solveUnitPotentials(moved(150), { tolerance: LIVE_TOLERANCE, memory, followsOn: true }));
  const network = moved(150.7);
  const following = finished(solveUnitPotentials(network, { tolerance: LIVE_TOLERANCE, memory, followsOn: true }));
  const cold = finished(solveUnitPotentials(network, { tolerance: LIVE_TOLERANCE }));
  expect(following.record.iterations).toBeLessThan(cold.record.iterations);
  expect(largestDifference(following.potentials[0], cold.potentials[0])).toBeLessThanOrEqual(1e-5);
});
