/**
 * Problem: a disc in the middle of a ring, the cross-section of a coaxial cable.
 *
 * Answer (Incropera and DeWitt, table 4.1; exact): S = 2π/ln(D₂/D₁), and φ falls with the logarithm of the distance r from the
 * middle: φ = V·ln(D₂/2r)/ln(D₂/D₁). Outside the ring there is no field.
 */
import { type Example, exampleSetup, ROUND_TRAY } from "./example";

const VOLTS = 6;
const DISC_MM = 40;
const RING_MM = 172;
const MIDDLE = { xMm: 95, yMm: 95 };

const at = (radiusMm: number, angleRad: number) => ({
  xMm: MIDDLE.xMm + radiusMm * Math.cos(angleRad),
  yMm: MIDDLE.yMm + radiusMm * Math.sin(angleRad),
  volts: (VOLTS * Math.log(RING_MM / 2 / radiusMm)) / Math.log(RING_MM / DISC_MM),
});

export const discInRing: Example = {
  id: "disc-in-ring",
  title: "Disc in a ring",
  purpose: "A coaxial cable seen from its end: circles whose spacing follows the logarithm.",
  setup: exampleSetup({
    title: "Disc in a ring",
    notes: "Saltmarsh College, physics prep room. Plot the readings against the logarithm of the distance: a straight line.",
    tray: ROUND_TRAY,
    water: { conductivityUsPerCm: 200 },
    parts: [
      { id: "A", name: "Disc", role: "electrode", tap: 1, ...MIDDLE, shape: { kind: "disc", diameterMm: DISC_MM } },
      { id: "B", name: "Ring", role: "electrode", tap: 0, ...MIDDLE, shape: { kind: "ring", outerMm: RING_MM + 8, innerMm: RING_MM } },
    ],
    probing: { levels: 7, pointsPerLevel: 8, partClearanceMm: 2.5 },
  }),
  known: {
    source: "2π/ln(D₂/D₁), Incropera and DeWitt, table 4.1 (exact)",
    shapeFactor: { value: (2 * Math.PI) / Math.log(RING_MM / DISC_MM), within: 1e-5 },
    currents: [],
    conductors: [],
    places: [at(22, 0.4), at(33, 2.1), at(47, 3.9), at(60, 5.2), at(80, 1.2)],
    voltsWithin: 1e-5,
  },
};
