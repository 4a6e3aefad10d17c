import { describe, expect, it } from "vitest";
import { fieldLayout } from "../../../../renderer/engine/field/layout";
import { solveField } from "../../../../renderer/engine/field/solve-field";
import { traySizeMm } from "../../../../renderer/engine/geometry/tray-outline";
import type { Setup } from "../../../../shared-types/setup";
import { randomPlaces, randomSetup } from "../../../reference/random-setups";
import { finished, solved, soundSetup, trayWith } from "../../../reference/solved";

/** What must hold for any field, whatever its numbers: checked on seeded random setups at live quality. */
const seeds = Array.from({ length: 8 }, (_, index) => 500 + index);
const kinds = { insulators: true, slabs: true, tilt: true };

describe.each(seeds)("random setup %d", (seed) => {
  const setup = randomSetup(seed, kinds);
  const field = solved(setup, "live");
  const [low, high] = field.spanV;
  const solution = finished(solveField(fieldLayout(setup), "live"));

  it("has its potentials between the lowest and the highest electrode (maximum principle)", () => {
    for (const [x, y] of randomPlaces(setup, seed, 150, 0.2)) {
      const { volts } = field.read(x, y);
      if (volts === null) continue;
      expect(volts).toBeGreaterThanOrEqual(low - 1e-4);
      expect(volts).toBeLessThanOrEqual(high + 1e-4);
    }
    for (const { volts } of field.conductors) {
      expect(volts).toBeGreaterThanOrEqual(low);
      expect(volts).toBeLessThanOrEqual(high);
    }
  });

  it("lets as much current into the water as out of it, and none from a floating part", () => {
    const sum = field.conductors.reduce((total, { currentA }) => total + currentA, 0);
    const largest = Math.max(...field.conductors.map(({ currentA }) => Math.abs(currentA)));
    expect(Math.abs(sum)).toBeLessThanOrEqual(1e-9 * largest);
    for (const { role, currentA } of field.conductors) if (role === "floating") expect(currentA).toBe(0);
  });

  it("has a symmetric conductance matrix (reciprocity) with rows that add up to nothing", () => {
    const { conductanceMm } = solution.fine.units;
    const count = solution.layout.electrodeCount;
    for (let e = 0; e < count; e++) {
      let row = 0;
      for (let f = 0; f < count; f++) {
        row += conductanceMm[e * count + f];
        expect(conductanceMm[e * count + f]).toBe(conductanceMm[f * count + e]);
        if (e !== f) expect(conductanceMm[e * count + f]).toBeLessThanOrEqual(1e-9 * conductanceMm[e * count + e]);
      }
      expect(Math.abs(row)).toBeLessThanOrEqual(1e-9 * conductanceMm[e * count + e]);
    }
  });

  it("answers ten times the volts with ten times the field", () => {
    const tenfold = solved(soundSetup({ ...setup, supply: { ...setup.supply, volts: 10 * setup.supply.volts } }), "live");
    expect(tenfold.totalFlux.value / field.totalFlux.value).toBeCloseTo(10, 9);
    for (const [x, y] of randomPlaces(setup, seed, 10, 1)) {
      const volts = field.read(x, y).volts;
      if (volts !== null) expect(tenfold.read(x, y).volts).toBeCloseTo(10 * volts, 7);
    }
  });

  it("is mirrored by a mirrored tray within the bound", () => {
    const mirrored = mirroredSetup(setup);
    const image = solved(mirrored, "live");
    const [lengthMm] = traySizeMm(setup.tray);
    const share = image.totalFlux.error / image.totalFlux.value + field.totalFlux.error / field.totalFlux.value;
    expect(Math.abs(image.totalFlux.value / field.totalFlux.value - 1)).toBeLessThanOrEqual(share);
    for (const [x, y] of randomPlaces(setup, seed, 20, 2)) {
      const here = field.read(x, y);
      const there = image.read(lengthMm - x, y);
      if (here.volts === null || there.volts === null) continue;
      expect(Math.abs(here.volts - there.volts)).toBeLessThanOrEqual(here.voltsError + there.voltsError + 2e-5);
    }
  });
});

/** The setup seen in a mirror that stands across the tray: x becomes length - x. */
function mirroredSetup(setup: Setup): Setup {
  const [lengthMm] = traySizeMm(setup.tray);
  const mirror = <Placed extends Setup["parts"][number] | Setup["water"]["slabs"][number]>(placed: Placed): object => ({
    ...placed,
    xMm: lengthMm - placed.xMm,
    turnDeg: 180 - placed.turnDeg,
    shape: placed.shape.kind === "polygon" ? { kind: "polygon", pointsMm: placed.shape.pointsMm.map(([x, y]) => [x, -y]) } : placed.shape,
  });
  return soundSetup({
    ...setup,
    water: { ...setup.water, tiltXDeg: -setup.water.tiltXDeg, slabs: setup.water.slabs.map(mirror) },
    parts: setup.parts.map(mirror),
  });
}

describe("a layout in open water", () => {
  const at = (x: number, y: number, turn: number): Setup => {
    const c = Math.cos((turn * Math.PI) / 180);
    const s = Math.sin((turn * Math.PI) / 180);
    const place = (dx: number, dy: number): { xMm: number; yMm: number } => ({ xMm: x + c * dx - s * dy, yMm: y + s * dx + c * dy });
    return trayWith({
      tray: { shape: "circle", diameterMm: 260 },
      parts: [
        { id: "A", role: "electrode", tap: 0, ...place(-40, 5), turnDeg: turn + 70, shape: { kind: "bar", lengthMm: 50, widthMm: 6 } },
        { id: "B", role: "electrode", tap: 1, ...place(45, -10), turnDeg: turn, shape: { kind: "disc", diameterMm: 24 } },
        { id: "C", role: "floating", ...place(0, 20), turnDeg: turn + 20, shape: { kind: "arc", outerMm: 40, innerMm: 34, sweepDeg: 200 } },
      ],
    });
  };

  it("turned about the middle of a round tray gives the same answer within the bound", () => {
    const straight = solved(at(130, 130, 0), "live");
    for (const turn of [17, 45, 133.7]) {
      const turned = solved(at(130, 130, turn), "live");
      const difference = Math.abs(turned.totalFlux.value - straight.totalFlux.value);
      expect(difference).toBeLessThanOrEqual(turned.totalFlux.error + straight.totalFlux.error);
      expect(difference).toBeLessThanOrEqual(2e-4 * straight.totalFlux.value);
    }
  });

  it("of twice the size in every direction has the same resistance per depth, and the same potentials at scaled places", () => {
    const part = (scale: number): object[] => [
      {
        id: "A",
        role: "electrode",
        tap: 0,
        xMm: 40 * scale,
        yMm: 50 * scale,
        turnDeg: 30,
        shape: { kind: "bar", lengthMm: 40 * scale, widthMm: 6 * scale },
      },
      { id: "B", role: "electrode", tap: 1, xMm: 110 * scale, yMm: 60 * scale, shape: { kind: "disc", diameterMm: 20 * scale } },
    ];
    const tray = (scale: number): object => ({ shape: "rectangle", lengthMm: 150 * scale, widthMm: 100 * scale });
    const small = solved(trayWith({ tray: tray(1), parts: part(1) }), "live");
    const large = solved(trayWith({ tray: tray(2), parts: part(2) }), "live");
    expect(large.totalFlux.value / small.totalFlux.value).toBeCloseTo(1, 6);
    expect(large.read(150, 80).volts).toBeCloseTo(small.read(75, 40).volts ?? Number.NaN, 6);
  });
});

describe("a part that is dragged", () => {
  it("moves resistance and readings smoothly across grid lines: no jump beyond 1e-4 of the span in 200 steps of 0.05 mm", () => {
    const resistances: number[] = [];
    const readings: number[] = [];
    for (let step = 0; step < 200; step++) {
      const setup = trayWith({
        parts: [
          { id: "A", role: "electrode", tap: 0, xMm: 65, yMm: 100, turnDeg: 90, shape: { kind: "bar", lengthMm: 100, widthMm: 10 } },
          {
            id: "B",
            role: "electrode",
            tap: 1,
            xMm: 200 + 0.05 * step,
            yMm: 103,
            turnDeg: 78,
            shape: { kind: "bar", lengthMm: 70, widthMm: 6 },
          },
        ],
      });
      const field = solved(setup, "live");
      resistances.push(1 / field.totalFlux.value);
      readings.push((field.read(140, 90).volts ?? Number.NaN) / 6);
    }
    expect(roughness(resistances.map((value) => value / resistances[0]))).toBeLessThanOrEqual(1e-4);
    expect(roughness(readings)).toBeLessThanOrEqual(1e-4);
  }, 900_000);
});

/** Largest distance of a value from the cubic through its neighbours two and four steps away on each side. */
function roughness(values: readonly number[]): number {
  let largest = 0;
  for (let k = 4; k + 4 < values.length; k++) {
    const smooth = (-values[k - 4] + 4 * values[k - 2] + 4 * values[k + 2] - values[k + 4]) / 6;
    largest = Math.max(largest, Math.abs(values[k] - smooth));
  }
  return largest;
}
