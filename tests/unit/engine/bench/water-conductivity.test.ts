import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  changePerKelvin,
  conductivityAtTemperatureSPerM,
  naturalWaterShare,
  saltSolutionShare,
} from "../../../../renderer/engine/bench/water-conductivity";
import { channel } from "./trays";

// ISO 7888 (EN 27888), table of f₂₅ = κ₂₅/κ for natural waters of 60–1000 µS/cm; confirmed in a published copy.
const ISO_7888: readonly (readonly [number, number])[] = [
  [0, 1.918],
  [5, 1.643],
  [10, 1.428],
  [15, 1.256],
  [18, 1.168],
  [20, 1.116],
  [22, 1.067],
  [25, 1],
  [28, 0.94],
  [30, 0.903],
  [35, 0.822],
];

// Potassium chloride reference solutions, Pure Appl. Chem. 73, 1783 (2001), µS/cm: [°C, 0.01 mol/kg, 0.1 mol/kg]; confirmed.
const POTASSIUM_CHLORIDE: readonly (readonly [number, number, number])[] = [
  [18, 1219.93, 11140.6],
  [20, 1273.03, 11615.9],
  [25, 1408.23, 12824.6],
];

describe("conductivity at the water's temperature", () => {
  it.each(ISO_7888)("natural water at %d °C follows the table of ISO 7888", (temperatureC, factor) => {
    expect(1 / naturalWaterShare(temperatureC) / factor).toBeCloseTo(1, 3);
    expect(Math.abs(1 / naturalWaterShare(temperatureC) / factor - 1)).toBeLessThan(0.0006);
  });

  it.each(POTASSIUM_CHLORIDE)(
    "the 2.1 %%/K of salt water is within 2 %% of the potassium chloride standards at %d °C",
    (temperatureC, thin, strong) => {
      expect(Math.abs(saltSolutionShare(temperatureC) / (thin / 1408.23) - 1)).toBeLessThan(0.02);
      expect(Math.abs(saltSolutionShare(temperatureC) / (strong / 12824.6) - 1)).toBeLessThan(0.02);
    },
  );

  it("at 25 °C is exactly what the meter shows: 500 µS/cm are 0.05 S/m", () => {
    expect(conductivityAtTemperatureSPerM(channel())).toBe(0.05);
    expect(conductivityAtTemperatureSPerM(channel({ water: { salt: "sodium-chloride" } }))).toBe(0.05);
  });

  it("changes by about 2 % per kelvin", () => {
    expect(changePerKelvin("none", 25)).toBeCloseTo(0.021, 3);
    expect(changePerKelvin("sodium-chloride", 25)).toBeCloseTo(0.021, 6);
  });

  it("warmer water always conducts better", () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 94, noNaN: true }), fc.constantFrom("none", "sodium-chloride"), (temperatureC, salt) => {
        const cool = conductivityAtTemperatureSPerM(channel({ water: { temperatureC, salt } }));
        const warm = conductivityAtTemperatureSPerM(channel({ water: { temperatureC: temperatureC + 1, salt } }));
        expect(cool).toBeGreaterThan(0);
        expect(warm).toBeGreaterThan(cool);
      }),
    );
  });
});
