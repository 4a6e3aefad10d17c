import { describe, expect, it } from "vitest";
import { REFERENCE_CASES } from "./reference-cases";
import { shapeFactorOf, solved, soundSetup } from "./solved";

/** Allowed relative error of shape factor and currents, and error of potentials as a share of the span. */
const ALLOWED = { live: { current: 1e-4, volts: 1e-4 }, print: { current: 1e-5, volts: 2e-5 } };

describe.each(["live", "print"] as const)("at %s quality", (quality) => {
  describe.each(REFERENCE_CASES.map((one) => [one.id, one] as const))("%s", (_, { setup: data, expected, how }) => {
    const setup = soundSetup(data);
    const field = solved(setup, quality);
    const span = field.spanV[1] - field.spanV[0];
    const allowed = ALLOWED[quality];
    const own = {
      shape: expected.shapeFactorUncertainty ?? 0,
      current: expected.currentUncertainty ?? 0,
      volts: expected.voltsUncertainty ?? 0,
    };

    if (expected.shapeFactor !== undefined)
      it(`has the shape factor of the source (${how})`, () => {
        const known = expected.shapeFactor ?? Number.NaN;
        const error = Math.abs(shapeFactorOf(setup, field) - known);
        expect(error).toBeLessThanOrEqual(allowed.current * known);
        expect(error).toBeLessThanOrEqual((field.totalFlux.error / field.totalFlux.value) * known + own.shape);
      });

    if (expected.conductors !== undefined)
      it("has the currents and floating potentials of the source", () => {
        for (const known of expected.conductors ?? []) {
          const conductor = field.conductors.find(({ id }) => id === known.id);
          expect(conductor).toBeDefined();
          if (conductor === undefined) continue;
          expect(Math.abs(conductor.volts - known.volts)).toBeLessThanOrEqual(allowed.volts * span);
          expect(Math.abs(conductor.volts - known.volts)).toBeLessThanOrEqual(conductor.voltsError + own.volts + 1e-12);
          // The source gives current per σ and depth; ours is in ampere at 500 µS/cm.
          const amperes = known.currentPerSigmaH * 0.05 * (setup.water.depthMm / 1000);
          const total = Math.abs(field.totalFlux.value * 0.05) / 1000;
          expect(Math.abs(conductor.currentA - amperes)).toBeLessThanOrEqual(allowed.current * total);
        }
      });

    if (expected.at !== undefined)
      it("has the potentials of the source, each within its own bound", () => {
        let covered = 0;
        for (const [x, y, volts] of expected.at ?? []) {
          const reading = field.read(x, y);
          expect(reading.volts).not.toBeNull();
          const error = Math.abs((reading.volts ?? Number.NaN) - volts);
          expect(error).toBeLessThanOrEqual(allowed.volts * span + own.volts);
          if (error <= reading.voltsError + own.volts + 1e-9) covered++;
        }
        expect(covered).toBe(expected.at?.length ?? 0);
      });
  });
});
