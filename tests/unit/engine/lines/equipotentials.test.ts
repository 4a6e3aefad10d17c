import { describe, expect, it } from "vitest";
import type { PotentialField } from "../../../../renderer/engine/field/potential-field";
import { openWaterOf } from "../../../../renderer/engine/geometry/open-water";
import { covers } from "../../../../renderer/engine/geometry/signed-distance";
import { equipotentialsOf } from "../../../../renderer/engine/lines/equipotentials";
import type { Equipotential } from "../../../../shared-types/plan";
import type { Setup } from "../../../../shared-types/setup";
import { randomSetup } from "../../../reference/random-setups";
import { solved } from "../../../reference/solved";
import { analyticField, coaxialVolts, discInRing, fullWidthBars, setupWith, uniformVolts } from "./analytic-field";

type Pair = readonly [number, number];
const placesOf = (path: Float64Array): Pair[] =>
  Array.from({ length: path.length / 2 }, (_, index): Pair => [path[2 * index], path[2 * index + 1]]);
const placesOn = (line: Equipotential): Pair[] => line.paths.flatMap(placesOf);
const endsOf = (path: Float64Array): readonly [Pair, Pair] => [placesOf(path)[0], placesOf(path)[path.length / 2 - 1]];
const isClosed = (path: Float64Array): boolean => path[0] === path[path.length - 2] && path[1] === path[path.length - 1];

/** A uniform field of 0.04 V/mm along x, disturbed by a round body of 30 mm radius at (150, 100): + insulating, − conducting. */
const roundBody =
  (sign: 1 | -1) =>
  (x: number, y: number): number => {
    const [dx, dy] = [x - 150, y - 100];
    return 4 + 0.04 * dx * (1 + (sign * 900) / (dx * dx + dy * dy));
  };

describe("equipotentials", () => {
  it.each(["live", "print"] as const)("between full-width bars are straight from wall to wall (%s)", (quality) => {
    const setup = setupWith(fullWidthBars);
    const lines = equipotentialsOf(analyticField(setup, uniformVolts, 1), setup, [1, 4, 7.3], quality);
    expect(lines.map(({ volts, paths }) => [volts, paths.length])).toEqual([
      [1, 1],
      [4, 1],
      [7.3, 1],
    ]);
    for (const line of lines) {
      const places = placesOn(line);
      for (const [x] of places) expect(x).toBeCloseTo(50 + line.volts / 0.04, 4);
      expect(Math.min(...places.map(([, y]) => y))).toBe(0);
      expect(Math.max(...places.map(([, y]) => y))).toBe(200);
    }
  });

  it.each([
    ["live", 0.02],
    ["print", 1e-3],
  ] as const)("round a disc are closed circles where the logarithm puts them (%s: within %d mm)", (quality, allowedMm) => {
    const setup = setupWith(discInRing);
    for (const line of equipotentialsOf(analyticField(setup, coaxialVolts, 1), setup, [1, 3, 5, 7], quality)) {
      expect(line.paths).toHaveLength(1);
      expect(isClosed(line.paths[0])).toBe(true);
      const radius = 80 * 8 ** (-line.volts / 8);
      for (const [x, y] of placesOn(line)) expect(Math.abs(Math.hypot(x - 150, y - 100) - radius)).toBeLessThan(allowedMm);
    }
  });

  it.each(["live", "print"] as const)("end on the surface of an insulator, none inside it (%s)", (quality) => {
    const insulator = { id: "I", role: "insulator", xMm: 150, yMm: 100, shape: { kind: "disc", diameterMm: 60 } };
    const setup = setupWith([...fullWidthBars, insulator]);
    const [line] = equipotentialsOf(analyticField(setup, roundBody(1), 1), setup, [4.8], quality);
    expect(line.paths).toHaveLength(2);
    for (const [x, y] of placesOn(line)) expect(Math.hypot(x - 150, y - 100)).toBeGreaterThan(30 - 1e-6);
    for (const path of line.paths) {
      const fromMiddle = endsOf(path).map(([x, y]) => Math.hypot(x - 150, y - 100));
      expect(Math.min(...fromMiddle)).toBeCloseTo(30, 2);
    }
  });

  it("of a loose ring's own potential end on its metal, and none run along it or through the water inside", () => {
    const ring = { id: "C", role: "floating", xMm: 150, yMm: 100, shape: { kind: "ring", outerMm: 60, innerMm: 54 } };
    const setup = setupWith([...fullWidthBars, ring]);
    const outside = roundBody(-1);
    const noise = (x: number, y: number): number => 4 + 1e-7 * Math.sin(7 * x + 3 * y);
    const volts = (x: number, y: number): number => (Math.hypot(x - 150, y - 100) > 28 ? outside(x, y) : noise(x, y));
    const [line] = equipotentialsOf(analyticField(setup, volts, 1, { C: 4 }), setup, [4], "print");
    expect(line.paths).toHaveLength(2);
    for (const [x, y] of placesOn(line)) {
      expect(Math.abs(x - 150)).toBeLessThan(1e-3);
      expect(Math.abs(y - 100)).toBeGreaterThan(29.99);
    }
    for (const path of line.paths) expect(Math.min(...endsOf(path).map(([, y]) => Math.abs(y - 100)))).toBeCloseTo(30, 2);
  });

  it("close round a loose conductor when their level is hardly off its potential", () => {
    const disc = { id: "C", role: "floating", xMm: 150, yMm: 100, shape: { kind: "disc", diameterMm: 60 } };
    const setup = setupWith([...fullWidthBars, disc]);
    const [line] = equipotentialsOf(analyticField(setup, roundBody(-1), 1, { C: 4 }), setup, [4.01], "print");
    expect(line.paths).toHaveLength(1);
    for (const [x, y] of placesOn(line)) {
      expect(Math.hypot(x - 150, y - 100)).toBeGreaterThan(30);
      expect(roundBody(-1)(x, y)).toBeCloseTo(4.01, 4);
    }
  });

  it("reach the wall of a round tray", () => {
    const setup = setupWith([], { tray: { shape: "circle", diameterMm: 240 } });
    const field: PotentialField = { ...analyticField(setup, (x, y) => 0.02 * x + 0.01 * y, 1), spanV: [0, 8] };
    for (const line of equipotentialsOf(field, setup, [1.5, 3.6, 5.5], "live")) {
      expect(line.paths).toHaveLength(1);
      for (const [x, y] of endsOf(line.paths[0])) expect(Math.hypot(x - 120, y - 120)).toBeCloseTo(120, 2);
    }
  });

  it("end at the waterline of a tilted tray", () => {
    // Depth 10 mm at x = 150 and nothing at x = 50; lines across the slope meet the waterline squarely.
    const setup = setupWith([], { water: { tiltXDeg: (Math.atan(0.1) * 180) / Math.PI } });
    const field: PotentialField = { ...analyticField(setup, (_, y) => 0.04 * y, 1), spanV: [0, 8] };
    const [line] = equipotentialsOf(field, setup, [3.33], "print");
    const xs = placesOn(line).map(([x]) => x);
    expect(Math.min(...xs)).toBeCloseTo(50, 2);
    expect(Math.max(...xs)).toBe(300);
  });

  it("do not run along an insulating plate thinner than the grid's pitch", () => {
    const plate = { id: "I", role: "insulator", xMm: 150, yMm: 100.4, shape: { kind: "bar", lengthMm: 300, widthMm: 0.2 } };
    const setup = setupWith([plate]);
    // Both sides carry the same uniform field, the far side one volt higher.
    const field: PotentialField = { ...analyticField(setup, (x, y) => 0.02 * x + (y > 100.4 ? 1 : 0), 1), spanV: [0, 8] };
    const [line] = equipotentialsOf(field, setup, [3], "live");
    expect(line.paths).toHaveLength(2);
    for (const [x, y] of placesOn(line)) expect(x).toBeCloseTo(y > 100.4 ? 100 : 150, 4);
  });
});

describe("equipotentials of random setups", () => {
  const water = { insulators: true, slabs: false, tilt: true };
  const levelsOf = ({ spanV: [low, high] }: PotentialField): number[] => [1, 2, 3, 4, 5, 6, 7].map((k) => low + ((high - low) * k) / 8);
  const inMetal = (setup: Setup, [x, y]: Pair): boolean => setup.parts.some((part) => covers(part, x, y));

  it.each([1, 2, 3, 4, 5, 6, 7, 8, 9, 10])("(%i) lie in the water, at their level, and end only where the water does", (number) => {
    const setup = randomSetup(number, water);
    const field = solved(setup, "live");
    const holdsWater = openWaterOf(setup);
    const cellMm = Math.hypot(field.picture.pitchXMm, field.picture.pitchYMm);
    for (const line of equipotentialsOf(field, setup, levelsOf(field), "print")) {
      for (const place of placesOn(line)) {
        expect(inMetal(setup, place)).toBe(false);
        const { volts, voltsError, fieldVPerM } = field.read(...place);
        if (volts === null) continue;
        // Within the field's bound, or a twentieth of a millimetre: ends are carried on to the corner of an insulator.
        expect(Math.abs(volts - line.volts)).toBeLessThan(1e-4 + voltsError + (fieldVPerM / 1000) * 0.05);
      }
      for (const path of line.paths) {
        if (isClosed(path)) continue;
        for (const [x, y] of endsOf(path)) {
          const round = Array.from({ length: 32 }, (_, index) => (index * Math.PI) / 16);
          expect(round.some((angle) => !holdsWater(x + cellMm * Math.cos(angle), y + cellMm * Math.sin(angle)))).toBe(true);
        }
      }
    }
  });
});
