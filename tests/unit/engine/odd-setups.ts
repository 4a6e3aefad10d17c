import type { Setup } from "../../../shared-types/setup";
import { type PartialSetup, trayWith } from "../../reference/solved";

/** Setups that nobody would build on purpose but somebody will draw by hand. */

type Placed = { readonly id: string; readonly xMm: number; readonly yMm: number; readonly turnDeg?: number; readonly shape: object };

const barShape = (lengthMm: number, widthMm: number) => ({ kind: "bar", lengthMm, widthMm });
const disc = (diameterMm: number) => ({ kind: "disc", diameterMm });
const ring = (outerMm: number, innerMm: number) => ({ kind: "ring", outerMm, innerMm });
const arc = (outerMm: number, innerMm: number, sweepDeg: number) => ({ kind: "arc", outerMm, innerMm, sweepDeg });
const frame = (lengthMm: number, widthMm: number, wallMm: number) => ({ kind: "frame", lengthMm, widthMm, wallMm });
/** A closed curve round the part's centre, given by its radius (mm) at each of `count` vertices. */
const polygon = (count: number, radiusMm: (vertex: number) => number) => ({
  kind: "polygon",
  pointsMm: Array.from({ length: count }, (_, vertex) => {
    const angle = (2 * Math.PI * vertex) / count;
    return [radiusMm(vertex) * Math.cos(angle), radiusMm(vertex) * Math.sin(angle)];
  }),
});

const place = (id: string, xMm: number, yMm: number, shape: object, turnDeg = 0): Placed => ({ id, xMm, yMm, turnDeg, shape });
const electrode = (tap: number, placed: Placed) => ({ ...placed, role: "electrode", tap });
const loose = (placed: Placed) => ({ ...placed, role: "floating" });
const insulator = (placed: Placed) => ({ ...placed, role: "insulator" });
const slab = (thicknessMm: number, placed: Placed) => ({ ...placed, thicknessMm });

/** Two upright bars, 160 mm of water between them. */
export const BARS = [electrode(0, place("A", 65, 100, barShape(100, 10), 90)), electrode(1, place("B", 235, 100, barShape(100, 10), 90))];
const acrossTray = (id: string, xMm: number, widthMm: number): Placed => place(id, xMm, 100, barShape(200, widthMm), 90);
const withBars = (...more: readonly object[]): PartialSetup => ({ parts: [...BARS, ...more] });
const inWater = (water: object): PartialSetup => ({ water, parts: BARS });

const manyLooseAndInsulating = (): object[] =>
  Array.from({ length: 62 }, (_, index) => {
    const kinds = [disc(12), barShape(14, 6), ring(16, 12), arc(16, 11, 200), frame(14, 12, 2), polygon(5, () => 7)];
    const one = place(`P${index}`, 30 + (index % 10) * 26, 22 + Math.floor(index / 10) * 26, kinds[index % 6] ?? disc(12), 7 * index);
    return index % 3 === 0 ? insulator(one) : loose(one);
  });

const SMALL_TRAY = { shape: "rectangle", lengthMm: 20, widthMm: 20 };
const LARGE_TRAY = { shape: "rectangle", lengthMm: 2000, widthMm: 2000 };
/** The same layout in a tray of 20 mm and, a hundred times as large, in one of 2000 mm. */
const scaled = (tray: object, by: number): PartialSetup => ({
  tray,
  parts: [
    electrode(0, place("A", 3 * by, 10 * by, barShape(10 * by, 2 * by), 90)),
    electrode(1, place("B", 17 * by, 10 * by, barShape(10 * by, 2 * by), 90)),
    loose(place("R", 10 * by, 11 * by, ring(6 * by, 5 * by))),
  ],
});

const ODD = {
  "a loose disc of 0.1 mm": withBars(loose(place("D", 150.3, 100.2, disc(0.1)))),
  "an electrode disc of 0.1 mm": { parts: [electrode(0, acrossTray("A", 5, 10)), electrode(1, place("D", 150.3, 100.2, disc(0.1)))] },
  "a loose bar across the whole tray": {
    parts: [electrode(0, acrossTray("A", 5, 10)), electrode(1, acrossTray("B", 295, 10)), loose(acrossTray("C", 150, 10))],
  },
  "an insulating plate of 0.5 mm across the whole tray": withBars(insulator(acrossTray("W", 150, 0.5))),
  "an insulating plate across the tray, turned": withBars(insulator(place("W", 150, 100, barShape(400, 0.5), 50))),
  "an insulating plate with a slit": withBars(
    insulator(place("W1", 150, 49.5, barShape(99, 0.5), 90)),
    insulator(place("W2", 150, 150.5, barShape(99, 0.5), 90)),
  ),
  "a wedge that runs dry under one electrode": inWater({ depthMm: 2, tiltXDeg: 4 }),
  "a wedge whose waterline runs through an electrode": inWater({ depthMm: 6, tiltXDeg: 4 }),
  "a tray tilted by 45° both ways": inWater({ depthMm: 12, tiltXDeg: 45, tiltYDeg: 45 }),
  "a ring in a ring round a disc": withBars(
    loose(place("R1", 140, 110, ring(90, 80))),
    loose(place("R2", 145, 110, ring(50, 44))),
    loose(place("D", 143, 112, disc(10))),
  ),
  "a loose part that touches the wall": withBars(loose(place("C", 150, 10, barShape(60, 20)))),
  "a loose part that crosses the wall": withBars(loose(place("C", 150, 5, barShape(60, 20)))),
  "a frame in a frame round an insulating frame": withBars(
    loose(place("F1", 150, 100, frame(100, 90, 5), 20)),
    loose(place("F2", 150, 100, frame(60, 50, 4), -10)),
    insulator(place("F3", 150, 100, frame(20, 10, 1), 33)),
  ),
  "water inside an insulating ring": withBars(insulator(place("R", 150, 100, ring(60, 50)))),
  "a loose disc inside an insulating ring": withBars(insulator(place("R", 150, 100, ring(60, 50))), loose(place("D", 150, 100, disc(10)))),
  "an electrode inside an insulating ring": withBars(
    insulator(place("R", 150, 100, ring(60, 50))),
    electrode(0.5, place("D", 150, 100, disc(10))),
  ),
  "one of two electrodes inside an insulating frame": {
    parts: [
      insulator(place("F", 80, 100, frame(80, 80, 3))),
      electrode(0, place("A", 80, 100, disc(30))),
      electrode(1, place("B", 220, 100, disc(30))),
    ],
  },
  "a loose disc drawn as a polygon of 500 vertices": withBars(
    loose(
      place(
        "P",
        150,
        110,
        polygon(500, () => 30),
      ),
    ),
  ),
  "the same disc as a disc": withBars(loose(place("P", 150, 110, disc(60)))),
  "a star of 500 vertices": withBars(
    loose(
      place(
        "P",
        150,
        100,
        polygon(500, (vertex) => (vertex % 2 === 0 ? 30 : 22)),
      ),
    ),
  ),
  "a needle": withBars(
    loose(
      place("P", 150, 100, {
        kind: "polygon",
        pointsMm: [
          [-30, 0],
          [30, -0.02],
          [30, 0.02],
        ],
      }),
    ),
  ),
  "64 parts": {
    parts: [
      electrode(0, place("A", 7, 100, barShape(190, 6), 90)),
      electrode(1, place("B", 293, 100, barShape(190, 6), 90)),
      ...manyLooseAndInsulating(),
    ],
  },
  "a tray of 20 mm": scaled(SMALL_TRAY, 1),
  "a tray of 2000 mm": scaled(LARGE_TRAY, 100),
  "a tray of 2000 mm by 20 mm": {
    tray: { shape: "rectangle", lengthMm: 2000, widthMm: 20 },
    parts: [electrode(0, place("A", 10, 10, barShape(20, 5), 90)), electrode(1, place("B", 1990, 10, barShape(20, 5), 90))],
  },
  "a loose arc closed but for one degree": withBars(loose(place("C", 150, 110, arc(60, 54, 359), 40))),
  "the same arc closed to a ring": withBars(loose(place("C", 150, 110, ring(60, 54)))),
  "an arc of one degree": withBars(loose(place("C", 150, 100, arc(60, 54, 1)))),
  "no slab": inWater({ depthMm: 12 }),
  "a slab larger than the tray": inWater({ depthMm: 12, slabs: [slab(5, place("S", 150, 100, barShape(1000, 1000)))] }),
  "a slab that stands out of the water": inWater({ depthMm: 12, slabs: [slab(15, place("S", 150, 100, barShape(60, 100)))] }),
  "a slab as thick as the water is deep": inWater({ depthMm: 12, slabs: [slab(12, place("S", 150, 100, barShape(60, 100)))] }),
  "a dry slab from wall to wall": inWater({ depthMm: 12, slabs: [slab(15, place("S", 150, 100, barShape(60, 300)))] }),
  "0.01 mm of water over a slab from wall to wall": inWater({ depthMm: 12, slabs: [slab(11.99, place("S", 150, 100, barShape(60, 400)))] }),
  "electrodes at three potentials": withBars(electrode(0.3, place("M", 150, 100, disc(20)))),
  "taps a ten-millionth apart": {
    parts: [
      { ...BARS[0], tap: 0.5 },
      { ...BARS[1], tap: 0.5000001 },
    ],
  },
  "electrodes 0.02 mm apart": {
    parts: [electrode(0, place("A", 100, 100, barShape(100, 10), 90)), electrode(1, place("B", 110.02, 100, barShape(100, 10), 90))],
  },
  "a loose bar that joins both electrodes": {
    parts: [electrode(0, acrossTray("A", 5, 10)), electrode(1, acrossTray("B", 295, 10)), loose(place("C", 150, 100, barShape(280, 10)))],
  },
  "electrodes that touch at a corner": {
    parts: [electrode(0, place("A", 100, 100, barShape(40, 40))), electrode(1, place("B", 140, 140, barShape(40, 40)))],
  },
  "electrodes that touch at the same tap": {
    parts: [electrode(0, place("A", 65, 100, barShape(100, 10), 90)), electrode(0, place("A2", 75, 100, barShape(100, 10), 90)), BARS[1]],
  },
  "an electrode outside the tray": { parts: [BARS[0], electrode(1, place("B", 500, 100, barShape(100, 10), 90))] },
  "a loose part outside the tray": withBars(loose(place("C", 500, 100, barShape(100, 10), 90))),
  "a part that covers the tray": withBars(insulator(place("C", 150, 100, barShape(2000, 2000)))),
  "a frame along all walls round a disc": {
    parts: [electrode(0, place("A", 150, 100, frame(300, 200, 5))), electrode(1, place("B", 150, 100, disc(30)))],
  },
  "a ring round a round tray": {
    tray: { shape: "circle", diameterMm: 200 },
    parts: [electrode(0, place("R", 100, 100, ring(220, 200))), electrode(1, place("D", 100, 100, disc(20)))],
  },
} as const satisfies Readonly<Record<string, PartialSetup>>;

export type OddName = keyof typeof ODD;
export const ODD_NAMES = Object.keys(ODD) as readonly OddName[];

/** @returns an odd setup by its name, validated: all of them are valid files. */
export const oddSetup = (name: OddName): Setup => trayWith(ODD[name]);
