import type { Setup } from "../../shared-types/setup";
import { radians } from "../../shared-types/units";
import { trayWith } from "./solved";

/** Fields with closed forms, each with its source. Shape factor S = 1/(σ·h·R), h the depth at the tray's centre. */
export interface ExactCase {
  readonly id: string;
  readonly source: string;
  readonly setup: Setup;
  readonly shapeFactor: number;
  /** What the formula leaves out, or the digits to which it is given: a share of the shape factor. */
  readonly leftOut: number;
  /** x, y (mm) and volts where the formula gives them. */
  readonly at: readonly (readonly [number, number, number])[];
}

const SUPPLY_VOLTS = 6;

/** The exact shape factors of a square in a square, to five figures; they agree with 8/(r - 1) + 2.235 for r ≤ 2. */
const SQUARES: readonly (readonly [ratio: number, shapeFactor: number])[] = [
  [2, 10.2341],
  [3, 6.2155],
  [4, 4.8444],
];

const squareInSquare = (ratio: number, shapeFactor: number): ExactCase => {
  const outerMm = 160;
  const wallMm = 5;
  const frame = { kind: "frame", lengthMm: outerMm + 2 * wallMm, widthMm: outerMm + 2 * wallMm, wallMm };
  return {
    id: `square in a square ${ratio} times its side`,
    source: "exact through elliptic integrals (F. Bowman, Introduction to Elliptic Functions, 1953: from memory; values derived)",
    setup: trayWith({
      parts: [
        {
          id: "A",
          role: "electrode",
          tap: 1,
          xMm: 150,
          yMm: 100,
          shape: { kind: "bar", lengthMm: outerMm / ratio, widthMm: outerMm / ratio },
        },
        { id: "B", role: "electrode", tap: 0, xMm: 150, yMm: 100, shape: frame },
      ],
    }),
    shapeFactor,
    leftOut: 1e-4 / shapeFactor,
    at: [],
  };
};

/** R = [ln(2s/a) + ln((B² + s²)/(B² - s²))]/(πσh); the formula leaves out terms of order (a/s)². */
function twoRodsInRoundTray(): ExactCase {
  const [trayRadius, offset, radius] = [120, 60, 2];
  const disc = (id: string, tap: number, xMm: number) => ({
    id,
    role: "electrode",
    tap,
    xMm,
    yMm: trayRadius,
    shape: { kind: "disc", diameterMm: 2 * radius },
  });
  const images = Math.log((trayRadius ** 2 + offset ** 2) / (trayRadius ** 2 - offset ** 2));
  return {
    id: "two thin rods in a round tray",
    source: "image rods (derived)",
    setup: trayWith({
      tray: { shape: "circle", diameterMm: 2 * trayRadius },
      parts: [disc("A", 1, trayRadius + offset), disc("B", 0, trayRadius - offset)],
    }),
    shapeFactor: Math.PI / (Math.log((2 * offset) / radius) + images),
    leftOut: 5e-4,
    at: [],
  };
}

/** Bars across the slope of a tray that runs dry on one side: R = ln(h₂/h₁)/(σ·W·tan α). */
function barsAcrossWedge(): ExactCase {
  const tiltDeg = 4;
  const depthMm = 8;
  const slope = Math.tan(radians(tiltDeg));
  const depthAt = (x: number): number => depthMm + (x - 150) * slope;
  const [shallow, deep] = [depthAt(110), depthAt(260)];
  const bar = (id: string, tap: number, xMm: number) => ({
    id,
    role: "electrode",
    tap,
    xMm,
    yMm: 100,
    shape: { kind: "bar", lengthMm: 10, widthMm: 200 },
  });
  const volts = (x: number): number => (SUPPLY_VOLTS * Math.log(depthAt(x) / shallow)) / Math.log(deep / shallow);
  return {
    id: "bars across a wedge, partly dry",
    source: "depth linear along the current (derived, exact)",
    setup: trayWith({ water: { depthMm, tiltXDeg: tiltDeg }, parts: [bar("A", 0, 105), bar("B", 1, 265)] }),
    shapeFactor: (200 * slope) / Math.log(deep / shallow) / depthMm,
    leftOut: 0,
    at: [
      [130, 20, volts(130)],
      [180.3, 100, volts(180.3)],
      [240, 187, volts(240)],
    ],
  };
}

/** Electrodes round a point of the waterline: the wedge obeys div(r grad φ) = 0, so that these are concentric spheres. */
function spheresInWedge(): ExactCase {
  const tiltDeg = 6;
  const depthMm = 12;
  const slope = Math.tan(radians(tiltDeg));
  const waterlineMm = 150 - depthMm / slope;
  const [inner, outer] = [30, 80];
  const volts = (r: number): number => (SUPPLY_VOLTS * (1 / r - 1 / outer)) / (1 / inner - 1 / outer);
  const at = (r: number, angle: number) => [waterlineMm + r * Math.cos(angle), 100 + r * Math.sin(angle), volts(r)] as const;
  return {
    id: "concentric spheres in a wedge",
    source: "div(r grad φ) = 0 (derived, exact)",
    setup: trayWith({
      water: { depthMm, tiltXDeg: tiltDeg },
      parts: [
        { id: "A", role: "electrode", tap: 1, xMm: waterlineMm, yMm: 100, shape: { kind: "disc", diameterMm: 2 * inner } },
        {
          id: "B",
          role: "electrode",
          tap: 0,
          xMm: waterlineMm,
          yMm: 100,
          shape: { kind: "ring", innerMm: 2 * outer, outerMm: 2 * outer + 8 },
        },
      ],
    }),
    shapeFactor: (2 * slope) / (1 / inner - 1 / outer) / depthMm,
    leftOut: 0,
    at: [at(40, 0.3), at(55, -0.8), at(70, 1.2)],
  };
}

export const EXACT_CASES: readonly ExactCase[] = [
  ...SQUARES.map(([ratio, shapeFactor]) => squareInSquare(ratio, shapeFactor)),
  twoRodsInRoundTray(),
  barsAcrossWedge(),
  spheresInWedge(),
];
