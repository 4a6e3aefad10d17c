import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { circuitNumbers } from "../../../../renderer/engine/bench/circuit";
import { wettedFaceMm2 } from "../../../../renderer/engine/bench/wetted-face";
import { CHANNEL_LENGTH_MM, CHANNEL_WIDTH_MM, channel, channelFacts } from "./trays";

const circuitOf = (change: Parameters<typeof channel>[0] = {}) => {
  const setup = channel(change);
  return circuitNumbers(setup, channelFacts(setup));
};

describe("the circuit", () => {
  it("between full-width bars has R = L/(σ h W) (Incropera & DeWitt, table 4.1, plane wall: S = W/L)", () => {
    const { resistanceOhm, shapeFactor, currentA, powerW } = circuitOf();
    const ohm = 0.16 / (0.05 * 0.012 * 0.2);
    expect(resistanceOhm?.value).toBeCloseTo(ohm, 6);
    expect(shapeFactor?.value).toBeCloseTo(CHANNEL_WIDTH_MM / CHANNEL_LENGTH_MM, 9);
    expect(currentA.value).toBeCloseTo(6 / ohm, 9);
    expect(powerW.value).toBeCloseTo(36 / ohm, 9);
  });

  it("gives currents in ampere and current densities in ampere per square metre", () => {
    const { electrodes } = circuitOf();
    // 4.5 mA leave 200 mm × 12 mm of facing metal: 1.875 A/m² = 0.1875 mA/cm².
    expect(electrodes[1].largestCurrentDensityAPerM2).toBeCloseTo(0.0045 / 0.0024, 6);
    expect(electrodes[0].shareOfTotal).toBeCloseTo(-1, 12);
    expect(electrodes[1].shareOfTotal).toBeCloseTo(1, 12);
  });

  it("counts as wet what water touches: both long faces of a full-width bar, not the ends at the walls", () => {
    const setup = channel();
    expect(wettedFaceMm2(setup, setup.parts[0])).toBeCloseTo(2 * 200 * 12, 6);
  });

  it("counts one face of a bar that stands with its back to the wall", () => {
    const setup = channel();
    const atWall = { ...setup, parts: [{ ...setup.parts[0], xMm: 5 }, setup.parts[1]] };
    expect(wettedFaceMm2(atWall, atWall.parts[0])).toBeCloseTo(200 * 12, 6);
  });

  it("counts only its own height where the electrode is shorter than the water", () => {
    const setup = channel();
    const low = { ...setup.parts[0], heightMm: 7 };
    expect(wettedFaceMm2({ ...setup, parts: [low, setup.parts[1]] }, low)).toBeCloseTo(2 * 200 * 7, 6);
  });

  it("counts both walls of a ring", () => {
    const ring = { id: "R", role: "electrode", tap: 1, xMm: 130, yMm: 100, shape: { kind: "ring", outerMm: 80, innerMm: 60 } };
    const setup = channel({ parts: [ring] });
    expect(wettedFaceMm2(setup, setup.parts[0])).toBeCloseTo(Math.PI * (80 + 60) * 12, 6);
  });

  it("current grows with volts, power with their square", () => {
    fc.assert(
      fc.property(fc.double({ min: 0.5, max: 50, noNaN: true }), (volts) => {
        const one = circuitOf({ supply: { volts } });
        const two = circuitOf({ supply: { volts: 2 * volts } });
        expect(two.currentA.value / one.currentA.value).toBeCloseTo(2, 9);
        expect(two.powerW.value / one.powerW.value).toBeCloseTo(4, 9);
        expect(two.shareOfLimit).toBeGreaterThan(one.shareOfLimit);
      }),
      { numRuns: 20 },
    );
  });
});
