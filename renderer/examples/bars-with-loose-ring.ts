/**
 * Problem: a metal ring without a lead lies midway between two bars. It takes one potential, pushes the lines away from itself,
 * and the water inside it is all at that potential.
 *
 * Answer: V/2 on the ring, in it and on the mirror line, by symmetry (exact). Shape factor and the other potentials from an
 * independent finite-element solution (second-order elements, 651 073 unknowns, changed by less than 5e-7 from the next
 * coarser mesh), which stands among the project's reference cases as p04.
 */
import { BAR_PAIR, type Example, exampleSetup } from "./example";

export const barsWithLooseRing: Example = {
  id: "bars-with-loose-ring",
  title: "Bars with a loose ring",
  purpose: "A ring without a lead between two bars: its metal and the water inside are all at one potential.",
  setup: exampleSetup({
    title: "Two bars and a loose ring",
    notes: "Saltmarsh College, physics prep room. Why is there no field inside a ring of metal?",
    parts: [
      ...BAR_PAIR,
      { id: "C", name: "Loose ring", role: "floating", xMm: 150, yMm: 100, shape: { kind: "ring", outerMm: 60, innerMm: 54 } },
    ],
  }),
  known: {
    source: "independent finite-element solution, reference case p04; symmetry",
    shapeFactor: { value: 1.3445510858, within: 2e-5 },
    currents: [],
    conductors: [{ id: "C", volts: 3 }],
    places: [
      { xMm: 150, yMm: 100, volts: 3 },
      { xMm: 135, yMm: 110, volts: 3 },
      { xMm: 150, yMm: 20, volts: 3 },
      { xMm: 100, yMm: 100, volts: 1.6541544 },
      { xMm: 100, yMm: 160, volts: 1.5035176 },
      { xMm: 200, yMm: 130, volts: 4.4753557 },
      { xMm: 85, yMm: 155, volts: 0.9181845 },
      { xMm: 260, yMm: 170, volts: 5.6030729 },
    ],
    voltsWithin: 2e-5,
  },
};
