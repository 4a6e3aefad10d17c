/**
 * Problem: two discs stand for a pair of charged cylinders, or for two towers on the ground.
 *
 * Answer: V/2 on the mirror line (exact). Shape factor and the other potentials from an independent finite-element solution
 * (second-order elements, 327 477 unknowns, changed by less than 2e-8 from the next coarser mesh), reference case p05.
 * In an unbounded sheet of water it would be 2π/acosh[(4w² − D₁² − D₂²)/(2D₁D₂)] = 1.522 (Incropera and DeWitt, table 4.1):
 * the walls matter, which is why the tray is computed with them.
 */
import { type Example, exampleSetup } from "./example";

export const twoDiscs: Example = {
  id: "two-discs",
  title: "Two discs",
  purpose: "The field of two round electrodes: closed lines near each disc, a straight one midway.",
  setup: exampleSetup({
    title: "Two discs",
    notes: "Saltmarsh College, physics prep room. Compare with the bars: where is the field strongest?",
    parts: [
      { id: "A", name: "Left disc", role: "electrode", tap: 0, xMm: 70, yMm: 100, shape: { kind: "disc", diameterMm: 40 } },
      { id: "B", name: "Right disc", role: "electrode", tap: 1, xMm: 230, yMm: 100, shape: { kind: "disc", diameterMm: 40 } },
    ],
  }),
  known: {
    source: "independent finite-element solution, reference case p05; symmetry",
    shapeFactor: { value: 1.0906941784, within: 2e-5 },
    currents: [],
    conductors: [],
    places: [
      { xMm: 150, yMm: 20, volts: 3 },
      { xMm: 150, yMm: 140, volts: 3 },
      { xMm: 100, yMm: 100, volts: 0.7284245 },
      { xMm: 100, yMm: 160, volts: 1.5727756 },
      { xMm: 200, yMm: 130, volts: 4.8386806 },
      { xMm: 30, yMm: 100, volts: 0.2838844 },
      { xMm: 85, yMm: 155, volts: 1.1776836 },
      { xMm: 260, yMm: 170, volts: 5.197187 },
    ],
    voltsWithin: 2e-5,
  },
};
