/**
 * Problem: an insulating block lies midway between two bars. The current goes round it, and the lines meet its faces squarely.
 *
 * Answer: V/2 on the mirror line (exact). A quarter of the tray is a polygon with ten corners; its conductance by the
 * Schwarz–Christoffel formula (Driscoll and Trefethen, Schwarz–Christoffel Mapping, 2002, ch. 2), side lengths right to 1e-14:
 * S = 0.915036582749. Potentials in front of the bar and on the block's faces by the same map.
 */
import { BAR_PAIR, type Example, exampleSetup } from "./example";

const VOLTS = 6;
/** x, y (mm) and the share of V/2 there. */
const SHARE_OF_HALF: readonly (readonly [number, number, number])[] = [
  [90, 100, 0.1758978366],
  [110, 100, 0.3167475674],
  [129.999, 115, 0.4130425],
  [140, 130.001, 0.8334081],
];

export const barsWithInsulatingBlock: Example = {
  id: "bars-with-insulating-block",
  title: "Bars with an insulating block",
  purpose: "A block that carries no current: the lines end on it squarely and crowd at its corners.",
  setup: exampleSetup({
    title: "Two bars and an insulating block",
    notes: "Saltmarsh College, physics prep room. How does the current find its way round a rock?",
    parts: [
      ...BAR_PAIR,
      {
        id: "C",
        name: "Acrylic block",
        role: "insulator",
        xMm: 150,
        yMm: 100,
        material: "acrylic",
        shape: { kind: "bar", lengthMm: 40, widthMm: 60 },
      },
    ],
  }),
  known: {
    source: "Schwarz–Christoffel map of a quarter of the tray; symmetry",
    shapeFactor: { value: 0.915036582749, within: 3e-4 },
    currents: [],
    conductors: [],
    places: [
      ...SHARE_OF_HALF.map(([xMm, yMm, share]) => ({ xMm, yMm, volts: (share * VOLTS) / 2 })),
      ...SHARE_OF_HALF.map(([xMm, yMm, share]) => ({ xMm: 300 - xMm, yMm: 200 - yMm, volts: VOLTS - (share * VOLTS) / 2 })),
      { xMm: 150, yMm: 20, volts: VOLTS / 2 },
      { xMm: 150, yMm: 145, volts: VOLTS / 2 },
    ],
    voltsWithin: 3e-4,
  },
};
