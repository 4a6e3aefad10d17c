import { discretise } from "../../renderer/engine/field/discretise";
import { type FittedNetwork, fitContacts } from "../../renderer/engine/field/fit";
import { gridOfPitch } from "../../renderer/engine/field/grid";
import { fieldLayout } from "../../renderer/engine/field/layout";
import type { Setup } from "../../shared-types/setup";
import { finished, trayWith } from "./solved";

/** @returns the network that the program solves for a setup at a pitch near the given one, mm. */
export function networkOf(setup: Setup, pitchMm: number): FittedNetwork {
  return finished(fitContacts(finished(discretise(fieldLayout(setup), gridOfPitch(setup.tray, pitchMm)))));
}

/** Two bars at a slight turn: the electrodes of the setups below. */
const BARS = [
  { id: "A", role: "electrode", tap: 1, xMm: 40, yMm: 100, turnDeg: 3, shape: { kind: "bar", lengthMm: 10, widthMm: 120 } },
  { id: "B", role: "electrode", tap: 0, xMm: 260, yMm: 100, turnDeg: -7, shape: { kind: "bar", lengthMm: 10, widthMm: 120 } },
];

/** @returns two bars and a loose ring between them: what the solver's speed is measured on. */
export const barsAndLooseRing = (): Setup =>
  trayWith({ parts: [...BARS, { id: "R", role: "floating", xMm: 150, yMm: 100, shape: { kind: "ring", outerMm: 80, innerMm: 70 } }] });

/** @returns two bars with `count` (up to 12) loose rings, discs and bars between them. */
export function barsAndLooseParts(count: number): Setup {
  const shapes = [
    { kind: "ring", outerMm: 28, innerMm: 22 },
    { kind: "disc", diameterMm: 21.3 },
    { kind: "bar", lengthMm: 30, widthMm: 4 },
  ];
  const loose = Array.from({ length: count }, (_, k) => ({
    id: `F${k}`,
    role: "floating",
    xMm: 90 + 40 * (k % 4),
    yMm: 45 + 50 * Math.floor(k / 4),
    turnDeg: 17 * k,
    shape: shapes[k % shapes.length],
  }));
  return trayWith({ parts: [...BARS, ...loose] });
}
