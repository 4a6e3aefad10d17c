/**
 * Problem: bars across the whole tray, and a plate on the bed that halves the depth over part of the way: two sheets of water
 * in series, like two dielectrics in a capacitor.
 *
 * Answer (exact): the field is uniform over each depth, h·E is the same everywhere. With lengths L₁ at depth h and L₂ at depth
 * h − t, S = W/(L₁ + L₂·h/(h − t)); potentials are linear in the depth-weighted length. (Within a depth or two of the step the
 * real flow is three-dimensional.)
 */
import { type Example, exampleSetup } from "./example";

const VOLTS = 6;
const WIDTH_MM = 200;
const DEPTH_MM = 12;
const PLATE_MM = 6;
/** The bars' faces, and where the plate begins and ends, mm from the left. */
const [LEFT_FACE, PLATE_FROM, PLATE_TO, RIGHT_FACE] = [30, 150, 240, 270];
const weight = DEPTH_MM / (DEPTH_MM - PLATE_MM);
const weighted = (x: number): number =>
  Math.min(x, PLATE_FROM) - LEFT_FACE + weight * Math.max(0, Math.min(x, PLATE_TO) - PLATE_FROM) + Math.max(0, x - PLATE_TO);

const at = (xMm: number, yMm: number) => ({ xMm, yMm, volts: (VOLTS * weighted(xMm)) / weighted(RIGHT_FACE) });

export const stepInDepth: Example = {
  id: "step-in-depth",
  title: "Step in depth",
  purpose: "A plate on the bed halves the depth: the lines crowd over it as in a second dielectric.",
  setup: exampleSetup({
    title: "Step in depth",
    notes: "Saltmarsh College, physics prep room. Two materials in a capacitor: the shallow water takes the larger field.",
    water: {
      depthMm: DEPTH_MM,
      slabs: [
        {
          id: "S1",
          xMm: (PLATE_FROM + PLATE_TO) / 2,
          yMm: 100,
          thicknessMm: PLATE_MM,
          shape: { kind: "bar", lengthMm: PLATE_TO - PLATE_FROM, widthMm: WIDTH_MM },
        },
      ],
    },
    parts: [
      {
        id: "A",
        name: "Left bar",
        role: "electrode",
        tap: 0,
        xMm: LEFT_FACE - 5,
        yMm: 100,
        turnDeg: 90,
        shape: { kind: "bar", lengthMm: WIDTH_MM, widthMm: 10 },
      },
      {
        id: "B",
        name: "Right bar",
        role: "electrode",
        tap: 1,
        xMm: RIGHT_FACE + 5,
        yMm: 100,
        turnDeg: 90,
        shape: { kind: "bar", lengthMm: WIDTH_MM, widthMm: 10 },
      },
    ],
  }),
  known: {
    source: "two depths in series (exact)",
    shapeFactor: { value: WIDTH_MM / weighted(RIGHT_FACE), within: 1e-6 },
    currents: [],
    conductors: [],
    places: [at(90, 50), at(149, 120), at(150, 10), at(165, 100), at(230, 160), at(255, 40)],
    voltsWithin: 1e-6,
  },
};
