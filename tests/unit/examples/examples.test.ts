import { describe, expect, it } from "vitest";
import { gapMm, wallGapMm } from "../../../renderer/engine/geometry/clearance";
import { outlined, overlaps } from "../../../renderer/engine/geometry/overlap";
import { planSetup } from "../../../renderer/engine/plan";
import { EXAMPLES } from "../../../renderer/examples/all-examples";
import { parseSetupText, setupText } from "../../../shared-types/parse-setup";
import { shapeFactorOf, solved } from "../../reference/solved";

describe.each(EXAMPLES.map((example) => [example.title, example] as const))("the example '%s'", (_, { setup, known, purpose }) => {
  it("is a setup that survives being saved and opened", () => {
    expect(parseSetupText(setupText(setup))).toEqual({ ok: true, value: setup });
    expect(purpose).toMatch(/^[A-Z].*\.$/);
  });

  it("has its parts clear of each other and inside the tray", () => {
    const shapes = setup.parts.map(outlined);
    shapes.forEach((shape, index) => {
      expect(wallGapMm(shape, setup.tray)).toBeGreaterThanOrEqual(0);
      for (const other of shapes.slice(0, index)) {
        expect(overlaps(shape, other)).toBe(false);
        expect(gapMm(shape, other)).toBeGreaterThan(5);
      }
    });
  });

  it(`has its known answer at print quality (${known.source})`, () => {
    const field = solved(setup, "print");
    const span = field.spanV[1] - field.spanV[0];
    if (known.shapeFactor !== null) {
      expect(Math.abs(shapeFactorOf(setup, field) / known.shapeFactor.value - 1)).toBeLessThanOrEqual(known.shapeFactor.within);
    }
    if (known.shapeFactor !== null) {
      const share = Math.abs(shapeFactorOf(setup, field) / known.shapeFactor.value - 1);
      expect(share, "beyond the program's own bound").toBeLessThanOrEqual(field.totalFlux.error / field.totalFlux.value);
    }
    const flux = (id: string): number => {
      const conductors = field.conductors.map(({ currentA }) => Math.abs(currentA)).reduce((sum, each) => sum + each, 0) / 2;
      const amperes = field.conductors.find((each) => each.id === id)?.currentA ?? Number.NaN;
      return ((amperes / conductors) * field.totalFlux.value) / setup.water.depthMm;
    };
    for (const { id, voltsPerSigmaDepth } of known.currents) expect(Math.abs(flux(id) - voltsPerSigmaDepth)).toBeLessThanOrEqual(1e-4);
    for (const { id, volts } of known.conductors) {
      const conductor = field.conductors.find((each) => each.id === id);
      expect(Math.abs((conductor?.volts ?? Number.NaN) - volts)).toBeLessThanOrEqual(known.voltsWithin * span);
    }
    expect(known.places.length).toBeGreaterThanOrEqual(5);
    for (const { xMm, yMm, volts } of known.places) {
      const reading = field.read(xMm, yMm);
      // The source's last digit is 1e-7 V.
      const error = Math.abs((reading.volts ?? Number.NaN) - volts);
      expect(error, `beyond the program's own bound at ${xMm}, ${yMm}`).toBeLessThanOrEqual(reading.voltsError + 1e-6);
      expect(Math.abs((field.read(xMm, yMm).volts ?? Number.NaN) - volts), `at ${xMm}, ${yMm}`).toBeLessThanOrEqual(
        known.voltsWithin * span,
      );
    }
  });

  it("can be planned, without a finding that stops it and with points on most levels", async () => {
    const outcome = await planSetup(setup, "live");
    expect(outcome.ok).toBe(true);
    if (!outcome.ok) return;
    expect(outcome.plan.findings.filter(({ severity }) => severity === "stop")).toEqual([]);
    const full = outcome.plan.probing.levels.filter(({ points }) => points.length === setup.probing.pointsPerLevel);
    expect(full.length).toBeGreaterThanOrEqual(setup.probing.levels - 1);
  });
});

describe("the examples", () => {
  it("have ids and titles of their own", () => {
    expect(new Set(EXAMPLES.map(({ id }) => id)).size).toBe(EXAMPLES.length);
    expect(new Set(EXAMPLES.map(({ title }) => title)).size).toBe(EXAMPLES.length);
  });
});
