import { expect, it } from "vitest";
import { boundsOnRandomSetups } from "./bounds-on-random-setups";

/** `npm run accuracy -- --bounds 300` runs the long version. */
it("the bound that a number carries covers the true error in at least 95 % and is in the median at most ten times too large", () => {
  const { places, coveredPlaces, currents, coveredCurrents, medianRatio, inWords } = boundsOnRandomSetups(36);
  expect(places).toBeGreaterThan(600);
  expect(coveredPlaces / places, inWords).toBeGreaterThanOrEqual(0.95);
  expect(coveredCurrents / currents, inWords).toBeGreaterThanOrEqual(0.9);
  expect(medianRatio, inWords).toBeLessThanOrEqual(10);
}, 1_200_000);
