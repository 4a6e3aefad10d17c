/**
 * Problem: two bars face each other in a rectangular tray with insulating walls; the lines between them are straight in the
 * middle and bend round the ends.
 *
 * Answer: a quarter of the tray is a polygon with eight corners. Mapped onto a half-plane (Schwarz–Christoffel formula, Driscoll
 * and Trefethen, Schwarz–Christoffel Mapping, 2002, ch. 2) and from there onto a rectangle, its conductance is K(λ)/K(1 − λ),
 * K the complete elliptic integral of parameter λ. Solved with the side lengths right to 1e-15: S = 1.117872702597.
 * Potentials on the line through the bars' middles follow from the incomplete integral. Midway all is at V/2 by symmetry.
 */
import { BAR_PAIR, type Example, exampleSetup } from "./example";

const VOLTS = 6;
/** Share of V/2 at a distance (mm) in front of the left bar's face, on the middle line. */
const SHARE_OF_HALF: readonly (readonly [number, number])[] = [
  [20, 0.2622269324],
  [40, 0.5158870853],
  [60, 0.760433816],
];

export const twoBars: Example = {
  id: "two-bars",
  title: "Two bars",
  purpose: "The plain case: straight, even lines between two long bars, bending where the bars end.",
  setup: exampleSetup({
    title: "Two bars",
    notes: "Saltmarsh College, physics prep room. First tray of the course: find the lines between two bars.",
    parts: BAR_PAIR,
  }),
  known: {
    source: "Schwarz–Christoffel map of a quarter of the tray; symmetry",
    shapeFactor: { value: 1.117872702597, within: 1e-5 },
    currents: [],
    conductors: [],
    places: [
      ...SHARE_OF_HALF.map(([distance, share]) => ({ xMm: 70 + distance, yMm: 100, volts: (share * VOLTS) / 2 })),
      ...SHARE_OF_HALF.map(([distance, share]) => ({ xMm: 230 - distance, yMm: 100, volts: VOLTS - (share * VOLTS) / 2 })),
      { xMm: 150, yMm: 35, volts: VOLTS / 2 },
      { xMm: 150, yMm: 180, volts: VOLTS / 2 },
    ],
    voltsWithin: 1e-5,
  },
};
