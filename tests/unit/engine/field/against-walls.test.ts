import { describe, expect, it } from "vitest";
import { FINE_TOLERANCE, solveUnitPotentials } from "../../../../renderer/engine/field/unit-potentials";
import { networkOf } from "../../../reference/networks";
import { finished, type PartialSetup, trayWith } from "../../../reference/solved";

const bar = (lengthMm: number, widthMm: number): object => ({ kind: "bar", lengthMm, widthMm });
const electrode = (id: string, tap: number, xMm: number, yMm: number, shape: object, turnDeg = 90): object => ({
  id,
  role: "electrode",
  tap,
  xMm,
  yMm,
  turnDeg,
  shape,
});
const FAR_BAR = electrode("B", 1, 235, 100, bar(100, 10));
const ROUND = { shape: "circle", diameterMm: 240 };

const LAYOUTS: readonly (readonly [string, PartialSetup])[] = [
  ["a bar flush with the wall", { parts: [electrode("A", 0, 5, 100, bar(80, 10)), FAR_BAR] }],
  ["a bar sunk into the wall", { parts: [electrode("A", 0, 3, 100, bar(80, 10)), FAR_BAR] }],
  ["a bar turned through the wall", { parts: [electrode("A", 0, 20, 100, bar(80, 10), 25), FAR_BAR] }],
  ["a disc half in the wall", { parts: [electrode("A", 0, 0, 100, { kind: "disc", diameterMm: 40 }), FAR_BAR] }],
  [
    "bars across a round tray's wall",
    { tray: ROUND, parts: [electrode("A", 0, 5, 120, bar(60, 10)), electrode("B", 1, 190, 120, bar(60, 10))] },
  ],
  [
    "a bar that leans on another of the same tap",
    { parts: [electrode("A", 0, 65, 100, bar(80, 10)), electrode("C", 0, 75, 120, bar(40, 10)), FAR_BAR] },
  ],
];

describe("metal against walls is as exact as metal in open water: the current does not depend on the grid beyond 3e-5 with", () => {
  it.each(LAYOUTS)("%s", (_, layout) => {
    const setup = trayWith(layout);
    const current = (pitchMm: number): number =>
      finished(solveUnitPotentials(networkOf(setup, pitchMm), { tolerance: FINE_TOLERANCE })).conductanceMm.at(-1) ?? Number.NaN;
    const fine = current(0.25);
    for (const pitchMm of [0.5, 0.55, 0.62]) expect(Math.abs(current(pitchMm) / fine - 1)).toBeLessThan(3e-5);
  });
});
