import { describe, expect, it } from "vitest";
import { pitchFor } from "../../../../renderer/engine/field/grid";
import { FINE_TOLERANCE, solveUnitPotentials } from "../../../../renderer/engine/field/unit-potentials";
import { networkOf } from "../../../reference/networks";
import { type RandomSetupOptions, randomSetup } from "../../../reference/random-setups";
import { finished } from "../../../reference/solved";

/** Grids on which a node falls within some micrometres of a corner, found by solving random setups at many pitches. */
const PLAIN = { insulators: false, slabs: false, tilt: false };
const UNLUCKY: readonly (readonly [string, number, RandomSetupOptions, number])[] = [
  ["just outside a bar's corner", 5016, PLAIN, 1.84],
  ["just outside another bar's corner", 5021, PLAIN, 1.385],
  ["just outside an arc's corner", 5019, PLAIN, 1.525],
  ["on the bisector of an insulating frame's corner", 7024, { insulators: true, slabs: true, tilt: false }, 1.46],
  ["on the bisector of an insulating bar's corner", 7014, { insulators: true, slabs: true, tilt: false }, 1.1],
];

describe("a node that falls", () => {
  it.each(UNLUCKY)("%s changes no current by more than the grid's own error", (_, seed, options, pitches) => {
    const setup = randomSetup(seed, options);
    const conductance = (times: number): number => {
      const network = networkOf(setup, times * pitchFor(setup.tray, "print"));
      return finished(solveUnitPotentials(network, { tolerance: FINE_TOLERANCE })).conductanceMm[0];
    };
    const [finer, here, coarser] = [pitches - 0.04, pitches, pitches + 0.04].map(conductance);
    expect(Math.abs(here / ((finer + coarser) / 2) - 1)).toBeLessThan(2e-5);
  });
});
