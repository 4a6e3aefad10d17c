import { describe, expect, it } from "vitest";
import { drive } from "../../../../renderer/engine/field/drive";
import { placeSensitivities } from "../../../../renderer/engine/tolerance/place-sensitivities";
import { solveSensitivities } from "../../../../renderer/engine/tolerance/sensitivity-field";
import { parseSetup } from "../../../../shared-types/parse-setup";
import type { Setup } from "../../../../shared-types/setup";

function setupOf(value: object): Setup {
  const parsed = parseSetup({ format: "fieldtray.setup", version: 1, supply: { waveform: "ac", volts: 6 }, ...value });
  if (!parsed.ok) throw new Error(JSON.stringify(parsed));
  return parsed.value;
}

const fieldOf = (setup: Setup) => drive(solveSensitivities(setup), {});

/** Bars right across a 200 mm × 100 mm tray, faces at 20 mm and 180 mm: the field is even, 6 V over 160 mm. */
const EVEN = setupOf({
  tray: { shape: "rectangle", lengthMm: 200, widthMm: 100 },
  water: { depthMm: 10, conductivityUsPerCm: 500 },
  parts: [
    { id: "A", role: "electrode", tap: 0, xMm: 15, yMm: 50, turnDeg: 90, shape: { kind: "bar", lengthMm: 100, widthMm: 10 } },
    { id: "B", role: "electrode", tap: 1, xMm: 185, yMm: 50, turnDeg: 90, shape: { kind: "bar", lengthMm: 100, widthMm: 10 } },
  ],
});

describe("sensitivities where the answer is known", () => {
  it("a bar of an even field that slides by 1 mm takes the potential with it in proportion to the nearness", async () => {
    // φ = V(x − a)/(b − a): ∂φ/∂a = −V(b − x)/(b − a)², ∂φ/∂b = −V(x − a)/(b − a)² (exact).
    const field = await fieldOf(EVEN);
    for (const xMm of [40, 100, 150]) {
      const at = placeSensitivities(EVEN, field, xMm, 40);
      const [a, b] = at.parts;
      expect(a.alongXVPerMm).toBeCloseTo((-6 * (180 - xMm)) / 160 ** 2, 4);
      expect(b.alongXVPerMm).toBeCloseTo((-6 * (xMm - 20)) / 160 ** 2, 4);
      expect(at.electrodes.reduce((sum, { voltsPerVolt }) => sum + voltsPerVolt, 0)).toBeCloseTo(1, 9);
      expect(at.electrodes[1].voltsPerVolt).toBeCloseTo((xMm - 20) / 160, 4);
    }
  });

  it("a tilt along an even field moves its middle as the logarithm of the depth says, and a tilt across it moves nothing there", async () => {
    // h = h₀ + s(x − 100), current uniform: φ = V·ln(h/h_a)/ln(h_b/h_a); at s → 0 dφ/ds = −V/(2·h₀)·(x − a)(x − b)/(b − a) (exact).
    const field = await fieldOf(EVEN);
    const perDegree = Math.PI / 180;
    for (const xMm of [60, 100, 140]) {
      const at = placeSensitivities(EVEN, field, xMm, 50);
      expect(at.tiltXVPerDeg).toBeCloseTo((((-6 / 20) * (xMm - 20) * (xMm - 180)) / 160) * perDegree, 3);
      expect(Math.abs(at.tiltYVPerDeg)).toBeLessThan(1e-4);
      expect(at.depthVPerMm).toBe(0);
    }
  });

  it("a disc that leaves the centre of a ring changes the potential as the bipolar solution does", async () => {
    // To first order in the disc's displacement s towards +x: φ = V·[ln(R/r) + s·cosθ·(R²/r − r)/(R² − a²)]/ln(R/a), by matching
    // both circles (exact derivative; from the first harmonic of Laplace's equation between two circles).
    const setup = setupOf({
      tray: { shape: "rectangle", lengthMm: 200, widthMm: 200 },
      water: { depthMm: 10, conductivityUsPerCm: 500 },
      parts: [
        { id: "A", role: "electrode", tap: 1, xMm: 100, yMm: 100, shape: { kind: "disc", diameterMm: 40 } },
        { id: "B", role: "electrode", tap: 0, xMm: 100, yMm: 100, shape: { kind: "ring", outerMm: 180, innerMm: 160 } },
      ],
    });
    const [a, R] = [20, 80];
    const field = await fieldOf(setup);
    for (const [r, angle] of [
      [40, 0],
      [40, 1],
      [60, 2.5],
    ]) {
      const at = placeSensitivities(setup, field, 100 + r * Math.cos(angle), 100 + r * Math.sin(angle));
      const first = (6 * ((R * R) / r - r)) / ((R * R - a * a) * Math.log(R / a));
      expect(at.parts[0].alongXVPerMm).toBeCloseTo(first * Math.cos(angle), 3);
      expect(at.parts[0].alongYVPerMm).toBeCloseTo(first * Math.sin(angle), 3);
    }
  });
});
