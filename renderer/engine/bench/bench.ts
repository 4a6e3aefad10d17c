import type { BenchNumbers } from "../../../shared-types/bench";
import type { Setup } from "../../../shared-types/setup";
import { circuitNumbers } from "./circuit";
import type { FieldFacts } from "./field-facts";
import { gasNumbers } from "./gas";
import { heatNumbers } from "./heat";
import { interfaceNumbers } from "./interface";
import { meterNumbers } from "./meter-and-probe";
import { operatingRegion } from "./operating-region";
import { waterNumbers } from "./water";
import { waterGeometry } from "./water-geometry";

/** @returns the circuit and what its electrodes' surfaces take: all that a reading needs of the bench. */
export function lossesOf(setup: Setup, facts: FieldFacts): Pick<BenchNumbers, "circuit" | "interface"> {
  const circuit = circuitNumbers(setup, facts);
  return { circuit, interface: interfaceNumbers(setup, circuit) };
}

/**
 * Everything of the bench that follows from a setup and its solved field: water, circuit, surfaces, meter, heat, gas, geometry of
 * the water and the depth–voltage region. Starts no solve.
 */
export function benchOf(setup: Setup, facts: FieldFacts): BenchNumbers {
  const water = waterNumbers(setup);
  const losses = lossesOf(setup, facts);
  const { circuit } = losses;
  const solved = {
    ...losses,
    water,
    meter: meterNumbers(setup, facts, circuit),
    heat: heatNumbers(setup, circuit, water),
    gas: gasNumbers(setup, circuit),
    geometry: waterGeometry(setup),
  };
  return { ...solved, region: operatingRegion(setup, solved) };
}
