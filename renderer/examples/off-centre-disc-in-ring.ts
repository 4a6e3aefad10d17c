/**
 * Problem: as the disc in a ring, but with the disc pushed aside: what a cable loses when its core is not in the middle.
 *
 * Answer (Incropera and DeWitt, table 4.1; exact): S = 2π/acosh[(D² + d² − 4z²)/(2Dd)]. The lines are circles of one pencil
 * (bipolar coordinates): with the limit points of both circles on the line of centres, φ is linear in the logarithm of the
 * ratio of the distances from them.
 */
import { type Example, exampleSetup, ROUND_TRAY } from "./example";

const VOLTS = 6;
const DISC_MM = 40;
const RING_MM = 172;
const OFFSET_MM = 30;
const MIDDLE = { xMm: 95, yMm: 95 };

/** Distances of the two limit points from the ring's middle, towards the disc: their product is R², and that from the disc's middle r². */
const sum = (RING_MM ** 2 / 4 - DISC_MM ** 2 / 4 + OFFSET_MM ** 2) / OFFSET_MM;
const near = (sum - Math.sqrt(sum * sum - RING_MM ** 2)) / 2;
const far = RING_MM ** 2 / 4 / near;

const logRatio = (x: number, y: number): number => Math.log(Math.hypot(x - near, y) / Math.hypot(x - far, y));
const onRing = logRatio(-RING_MM / 2, 0);
const onDisc = logRatio(OFFSET_MM - DISC_MM / 2, 0);

const at = (x: number, y: number) => ({
  xMm: MIDDLE.xMm + x,
  yMm: MIDDLE.yMm + y,
  volts: (VOLTS * (logRatio(x, y) - onRing)) / (onDisc - onRing),
});

export const offCentreDiscInRing: Example = {
  id: "off-centre-disc-in-ring",
  title: "Disc off the centre of a ring",
  purpose: "A cable with its core pushed aside: the field crowds where the gap is narrow.",
  setup: exampleSetup({
    title: "Disc off the centre of a ring",
    notes: "Saltmarsh College, physics prep room. Where would the insulation of this cable break down first?",
    tray: ROUND_TRAY,
    water: { conductivityUsPerCm: 200 },
    parts: [
      {
        id: "A",
        name: "Disc",
        role: "electrode",
        tap: 1,
        xMm: MIDDLE.xMm + OFFSET_MM,
        yMm: MIDDLE.yMm,
        shape: { kind: "disc", diameterMm: DISC_MM },
      },
      { id: "B", name: "Ring", role: "electrode", tap: 0, ...MIDDLE, shape: { kind: "ring", outerMm: RING_MM + 8, innerMm: RING_MM } },
    ],
    probing: { levels: 7, pointsPerLevel: 8, partClearanceMm: 2 },
  }),
  known: {
    source: "2π/acosh[(D² + d² − 4z²)/(2Dd)], Incropera and DeWitt, table 4.1 (exact); bipolar coordinates",
    shapeFactor: {
      value: (2 * Math.PI) / Math.acosh((RING_MM ** 2 + DISC_MM ** 2 - 4 * OFFSET_MM ** 2) / (2 * RING_MM * DISC_MM)),
      within: 1e-5,
    },
    currents: [],
    conductors: [],
    places: [at(65, 0), at(30, 32), at(-20, 10), at(0, -45), at(-55, -30)],
    voltsWithin: 2e-5,
  },
};
