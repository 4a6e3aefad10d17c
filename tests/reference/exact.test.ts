import { describe, expect, it } from "vitest";
import { radians } from "../../shared-types/units";
import { EXACT_CASES } from "./exact-cases";
import { shapeFactorOf, solved, trayWith } from "./solved";

/** Allowed error of the shape factor (share of it) and of potentials (share of the span) beside what the formula leaves out. */
const ALLOWED_OF_SHAPE_FACTOR = 1e-4;
const ALLOWED_VOLTS_OF_SPAN = 1e-4;

/** Complete elliptic integral of the first kind of modulus k, by the arithmetic–geometric mean (Abramowitz & Stegun 17.6). */
function completeElliptic(modulus: number): number {
  let a = 1;
  let b = Math.sqrt(1 - modulus * modulus);
  while (Math.abs(a - b) > 1e-15 * a) [a, b] = [(a + b) / 2, Math.sqrt(a * b)];
  return Math.PI / (2 * a);
}

const within = (value: number, known: number, share: number): void => {
  expect(Math.abs(value / known - 1), `${value} against ${known}`).toBeLessThanOrEqual(share);
};

describe.each(EXACT_CASES.map((one) => [one.id, one] as const))("%s", (_, { source, setup, shapeFactor, leftOut, at }) => {
  const field = solved(setup, "print");
  it(`has the shape factor of the formula (${source})`, () => {
    within(shapeFactorOf(setup, field), shapeFactor, leftOut + ALLOWED_OF_SHAPE_FACTOR);
  });
  if (at.length > 0)
    it(`has the potentials of the formula (${source})`, () => {
      for (const [x, y, volts] of at) {
        expect(Math.abs((field.read(x, y).volts ?? Number.NaN) - volts)).toBeLessThanOrEqual(ALLOWED_VOLTS_OF_SPAN * setup.supply.volts);
      }
    });
});

it("the dry side of a wedge has no potential", () => {
  const wedge = EXACT_CASES.find(({ id }) => id.includes("partly dry"));
  expect(wedge).toBeDefined();
  if (wedge !== undefined) expect(solved(wedge.setup, "live").read(20, 100).volts).toBeNull();
});

describe("a strip midway between two plates (S. B. Cohn, 1954: exact for a strip without thickness)", () => {
  it("of width equal to the distance of the plates, 5.7645, approached as the strip gets thinner", () => {
    const b = 60;
    const modulus = Math.tanh(Math.PI / 2);
    const known = (4 * completeElliptic(modulus)) / completeElliptic(Math.sqrt(1 - modulus * modulus));
    expect(known).toBeCloseTo(5.7645, 4);
    const errors = [2, 1, 0.5].map((thickness) => {
      const setup = trayWith({
        parts: [
          { id: "strip", role: "electrode", tap: 1, xMm: 150, yMm: 100, shape: { kind: "bar", lengthMm: b, widthMm: thickness } },
          { id: "low", role: "electrode", tap: 0, xMm: 150, yMm: 100 - b / 2 - 5, shape: { kind: "bar", lengthMm: 300, widthMm: 10 } },
          { id: "high", role: "electrode", tap: 0, xMm: 150, yMm: 100 + b / 2 + 5, shape: { kind: "bar", lengthMm: 300, widthMm: 10 } },
        ],
      });
      return shapeFactorOf(setup, solved(setup, "print")) / known - 1;
    });
    // Thickness adds t/b times a slowly growing factor; what is left when it is taken out is the program's error.
    expect(errors[0]).toBeGreaterThan(errors[1]);
    expect(errors[1]).toBeGreaterThan(errors[2]);
    expect(errors[2]).toBeGreaterThan(0);
    expect(errors[2]).toBeLessThan(0.03);
  });
});

describe("a slab's edge (J. C. Maxwell, Treatise vol. 1, near art. 310, with σ for h)", () => {
  it("bends the field so that tan θ₁/tan θ₂ = h₁/h₂", () => {
    const setup = trayWith({
      water: {
        depthMm: 12,
        slabs: [{ id: "S", xMm: 225, yMm: 100, turnDeg: 0, thicknessMm: 7, shape: { kind: "bar", lengthMm: 150, widthMm: 200 } }],
      },
      parts: [
        { id: "A", role: "electrode", tap: 0, xMm: 70, yMm: 40, shape: { kind: "disc", diameterMm: 30 } },
        { id: "B", role: "electrode", tap: 1, xMm: 230, yMm: 160, shape: { kind: "disc", diameterMm: 30 } },
      ],
    });
    const field = solved(setup, "print");
    for (const y of [60, 90, 120]) {
      const tangent = (x: number): number => Math.tan(radians(field.read(x, y).directionDeg));
      within(tangent(149.999) / tangent(150.001), 12 / 5, 5e-3);
    }
  });
});
