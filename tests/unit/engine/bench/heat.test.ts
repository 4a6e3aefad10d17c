import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { circuitNumbers } from "../../../../renderer/engine/bench/circuit";
import { conductivityDrift, heatNumbers, riseKPerHour } from "../../../../renderer/engine/bench/heat";
import { waterNumbers } from "../../../../renderer/engine/bench/water";
import { channel, channelFacts } from "./trays";

const heatOf = (change: Parameters<typeof channel>[0] = {}) => {
  const setup = channel(change);
  return heatNumbers(setup, circuitNumbers(setup, channelFacts(setup)), waterNumbers(setup));
};

describe("warming", () => {
  it("a litre with 1.163 W warms by 1 K in an hour (4182 J/(kg K), IAPWS-95, confirmed)", () => {
    expect(riseKPerHour(1.16, 1)).toBeCloseTo(1, 2);
  });

  it("S = 4, 0.045 m², 12 V and 0.05 S/m give 0.55 K an hour at any depth (derived example)", () => {
    for (const depthM of [0.005, 0.02]) {
      const powerW = 0.05 * 4 * depthM * 12 ** 2;
      expect(riseKPerHour(powerW, 0.045 * depthM * 1000)).toBeCloseTo(0.55, 2);
    }
  });

  it("of 1 K raises conductivity, and current at fixed volts, by about 2 % (ISO 7888)", () => {
    expect(conductivityDrift("none", 22, 1)).toBeCloseTo(0.022, 2);
    expect(conductivityDrift("sodium-chloride", 25, 1)).toBeCloseTo(0.021, 9);
  });

  it("counts the session's minutes", () => {
    const { riseKPerHour: perHour, riseOverSessionK } = heatOf({ session: { minutes: 30 } });
    expect(riseOverSessionK).toBeCloseTo(perHour / 2, 12);
  });

  it("evaporation takes 0.1 to 0.2 mm an hour, and cools 10 mm of water by 5 to 10 K an hour at first (derived)", () => {
    const { evaporationMm, evaporationCoolingKPerHour } = heatOf({ session: { minutes: 60 }, water: { depthMm: 10 } });
    expect(evaporationMm.low).toBeCloseTo(0.1, 1);
    expect(evaporationMm.high).toBeCloseTo(0.2, 1);
    expect(evaporationCoolingKPerHour.low).toBeCloseTo(5, 0);
    expect(evaporationCoolingKPerHour.high).toBeCloseTo(10, 0);
  });

  it("grows with the square of the volts and with time", () => {
    fc.assert(
      fc.property(fc.double({ min: 1, max: 30, noNaN: true }), (volts) => {
        expect(heatOf({ supply: { volts: 2 * volts } }).riseOverSessionK / heatOf({ supply: { volts } }).riseOverSessionK).toBeCloseTo(
          4,
          9,
        );
        expect(heatOf({ supply: { volts }, session: { minutes: 80 } }).conductivityDrift).toBeGreaterThan(
          heatOf({ supply: { volts } }).conductivityDrift,
        );
      }),
      { numRuns: 15 },
    );
  });
});
