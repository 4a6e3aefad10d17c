/**
 * Problem: two discs and a bar that is wired to a tap of a divider, as a grid between cathode and anode. It takes up part of
 * the current, though nothing but its potential is set.
 *
 * Answer: currents and potentials from an independent finite-element solution (second-order elements, 578 881 unknowns, changed
 * by less than 1e-6 from the next coarser mesh), reference case p10. The three currents sum to zero (exact).
 */
import { type Example, exampleSetup } from "./example";

export const threeElectrodes: Example = {
  id: "three-electrodes",
  title: "Three electrodes on a divider",
  purpose: "A third electrode on a tap of a divider: it takes part of the current and bends the lines.",
  setup: exampleSetup({
    title: "Three electrodes on a divider",
    notes: "Saltmarsh College, physics prep room. The bar hangs on a divider at 2.5 V of 6 V: which way does its current flow?",
    parts: [
      { id: "A", name: "Common disc", role: "electrode", tap: 0, xMm: 60, yMm: 60, shape: { kind: "disc", diameterMm: 30 } },
      { id: "B", name: "Live disc", role: "electrode", tap: 1, xMm: 240, yMm: 60, shape: { kind: "disc", diameterMm: 30 } },
      {
        id: "C",
        name: "Tapped bar",
        role: "electrode",
        tap: 2.5 / 6,
        xMm: 150,
        yMm: 150,
        shape: { kind: "bar", lengthMm: 80, widthMm: 6 },
      },
    ],
  }),
  known: {
    source: "independent finite-element solution, reference case p10",
    shapeFactor: null,
    currents: [
      { id: "A", voltsPerSigmaDepth: -4.811878242 },
      { id: "B", voltsPerSigmaDepth: 5.846227766 },
      { id: "C", voltsPerSigmaDepth: -1.034349524 },
    ],
    conductors: [],
    places: [
      { xMm: 150, yMm: 60, volts: 2.8425897 },
      { xMm: 150, yMm: 120, volts: 2.6410027 },
      { xMm: 100, yMm: 100, volts: 1.623377 },
      { xMm: 200, yMm: 100, volts: 3.9442941 },
      { xMm: 150, yMm: 190, volts: 2.5436972 },
      { xMm: 20, yMm: 180, volts: 1.4663684 },
    ],
    voltsWithin: 2e-5,
  },
};
