import { describe, expect, it } from "vitest";
import { randomPlaces, randomSetup } from "./random-setups";
import { solved } from "./solved";

/**
 * The stated bound against the true error, on random setups that the program was not tuned to: `live` compared with
 * `reference`, two refinements finer. `npm run accuracy -- --bounds 300` runs the long version.
 */
const kinds = { insulators: true, slabs: true, tilt: true };
const seeds = Array.from({ length: 36 }, (_, index) => 9000 + index);

describe("the bound that a number carries", () => {
  it("covers the true error of currents and potentials in at least 95 % and is in the median at most ten times too large", () => {
    let places = 0;
    let covered = 0;
    let currents = 0;
    let coveredCurrents = 0;
    const ratios: number[] = [];
    for (const seed of seeds) {
      const setup = randomSetup(seed, { insulators: seed % 2 === 0, slabs: seed % 4 === 1, tilt: kinds.tilt && seed % 3 === 0 });
      const rough = solved(setup, "live");
      const sharp = solved(setup, "reference");
      for (const conductor of rough.conductors) {
        const known = sharp.conductors.find(({ id }) => id === conductor.id);
        if (known === undefined || conductor.role === "floating") continue;
        currents++;
        if (Math.abs(known.currentA - conductor.currentA) <= conductor.currentErrorA + 0.05 * known.currentErrorA) coveredCurrents++;
      }
      for (const [x, y] of randomPlaces(setup, seed, 60, 0.5)) {
        const here = rough.read(x, y);
        const there = sharp.read(x, y);
        if (here.volts === null || there.volts === null) continue;
        const error = Math.abs(here.volts - there.volts);
        places++;
        if (error <= here.voltsError) covered++;
        ratios.push(here.voltsError / Math.max(error, 1e-9));
      }
    }
    ratios.sort((a, b) => a - b);
    expect(places).toBeGreaterThan(600);
    expect(covered / places, `${covered} of ${places} places`).toBeGreaterThanOrEqual(0.95);
    expect(coveredCurrents / currents, `${coveredCurrents} of ${currents} currents`).toBeGreaterThanOrEqual(0.9);
    expect(ratios[Math.floor(ratios.length / 2)]).toBeLessThanOrEqual(10);
  }, 600_000);
});
