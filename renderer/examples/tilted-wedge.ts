/**
 * Problem: a tray tilted so that its left part runs dry holds a wedge of water. Its depth grows with the distance from the
 * waterline as a slice of a round body grows with the distance from the axis: the tray shows a field with axial symmetry.
 * A disc and an open ring centred on the waterline stand for two concentric spheres.
 *
 * Answer: with h = r·tan α the field obeys div(r·grad φ) = 0 (derived); between concentric spheres of radii a and b it is
 * φ = V·(1/R − 1/b)/(1/a − 1/b). The current through the wedge is 2·σ·tan α·V/(1/a − 1/b), hence with the depth h₀ at the
 * tray's centre S = 2·tan α/[h₀·(1/a − 1/b)]. Exact for small slopes, where the water's own third dimension does not show.
 */
import { degrees } from "../../shared-types/units";
import { type Example, exampleSetup } from "./example";

const VOLTS = 6;
/** Fall of the bed: 1 mm in 10 mm. With 5.5 mm of water at the centre of a tray 190 mm long the waterline lies at 40 mm. */
const SLOPE = 0.1;
const CENTRE_DEPTH_MM = 5.5;
const TRAY = { shape: "rectangle", lengthMm: 190, widthMm: 300, wallHeightMm: 40, baseMm: 3, baseMaterial: "acrylic" };
const WATERLINE = { xMm: TRAY.lengthMm / 2 - CENTRE_DEPTH_MM / SLOPE, yMm: TRAY.widthMm / 2 };
const INNER_MM = 35;
const OUTER_MM = 135;
const curvature = 1 / INNER_MM - 1 / OUTER_MM;

const at = (x: number, y: number) => ({
  xMm: WATERLINE.xMm + x,
  yMm: WATERLINE.yMm + y,
  volts: (VOLTS * (1 / Math.hypot(x, y) - 1 / OUTER_MM)) / curvature,
});

export const tiltedWedge: Example = {
  id: "tilted-wedge",
  title: "Tilted wedge",
  purpose: "A tray tilted until it runs dry on one side: the field between two spheres in a wedge of water.",
  setup: exampleSetup({
    title: "Spheres in a tilted wedge",
    notes:
      "Saltmarsh College, physics prep room. Prop the right end down until the waterline runs through the disc's centre; the left 40 mm stay dry on purpose.",
    tray: TRAY,
    water: { conductivityUsPerCm: 200, depthMm: CENTRE_DEPTH_MM, tiltXDeg: degrees(Math.atan(SLOPE)) },
    parts: [
      { id: "A", name: "Inner sphere", role: "electrode", tap: 1, ...WATERLINE, shape: { kind: "disc", diameterMm: 2 * INNER_MM } },
      {
        id: "B",
        name: "Outer sphere",
        role: "electrode",
        tap: 0,
        ...WATERLINE,
        shape: { kind: "arc", outerMm: 2 * OUTER_MM + 12, innerMm: 2 * OUTER_MM, sweepDeg: 180 },
      },
    ],
    probing: { levels: 7, pointsPerLevel: 7, partClearanceMm: 2.5 },
  }),
  known: {
    source: "field between concentric spheres, by the wedge's analogy with axial symmetry (exact)",
    shapeFactor: { value: (2 * SLOPE) / (CENTRE_DEPTH_MM * curvature), within: 5e-5 },
    currents: [],
    conductors: [],
    places: [at(45, 0), at(5, 60), at(40, 50), at(90, -60), at(30, -100)],
    voltsWithin: 5e-5,
  },
};
