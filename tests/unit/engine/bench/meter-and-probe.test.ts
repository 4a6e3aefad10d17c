import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { circuitNumbers } from "../../../../renderer/engine/bench/circuit";
import {
  digitVolts,
  inputImpedanceOhm,
  loadingShare,
  meterNumbers,
  meterRanges,
  tipResistanceOhm,
} from "../../../../renderer/engine/bench/meter-and-probe";
import { channel, channelFacts } from "./trays";

const meterOf = (change: Parameters<typeof channel>[0] = {}) => {
  const setup = channel(change);
  const facts = channelFacts(setup);
  return meterNumbers(setup, facts, circuitNumbers(setup, facts));
};

describe("probe and meter", () => {
  it("a tip of 0.5 mm in tap water has 20 kΩ and takes 0.2 % at 10 MΩ (spreading resistance 1/(4σa), a confirmed formula)", () => {
    const tip = tipResistanceOhm(0.05, 0.5);
    expect(tip).toBeCloseTo(20_000, 6);
    expect(loadingShare(tip, 10, 0, 0)).toBeCloseTo(0.002, 5);
  });

  it("in distilled water (1e-4 S/m) the tip has 10 MΩ and half of the reading is lost", () => {
    expect(tipResistanceOhm(1e-4, 0.5)).toBeCloseTo(1e7, 3);
    expect(loadingShare(tipResistanceOhm(1e-4, 0.5), 10, 0, 0)).toBeCloseTo(0.5, 9);
  });

  it("100 pF beside 10 MΩ make 3.0 MΩ at 500 Hz (1/|1/R + jωC|)", () => {
    expect(inputImpedanceOhm(10, 100, 0)).toBe(1e7);
    expect(inputImpedanceOhm(10, 100, 500)).toBeCloseTo(1 / Math.hypot(1e-7, 2 * Math.PI * 500 * 100e-12), 3);
    expect(inputImpedanceOhm(10, 100, 500) / 1e6).toBeCloseTo(3.03, 2);
  });

  it("a meter of 2000 counts shows 6 V to 10 mV, 1.9 V to 1 mV; one of 20 000 counts ten times finer", () => {
    expect(digitVolts(2000, "ac", 6)).toBeCloseTo(0.01, 12);
    expect(digitVolts(2000, "ac", 1.9)).toBeCloseTo(0.001, 12);
    expect(digitVolts(20_000, "ac", 6)).toBeCloseTo(0.001, 12);
    expect(meterRanges(2000, "ac", 6).map((range) => range.highestVolts)).toEqual([1.999, 19.990000000000002]);
  });

  it("of 2000 counts does not show 2.000 V on its 2 V range", () => {
    expect(digitVolts(2000, "ac", 1.999)).toBeCloseTo(0.001, 12);
    expect(digitVolts(2000, "ac", 2)).toBeCloseTo(0.01, 12);
  });

  it("gives the accuracy of its data sheet: 1 % of 6 V and 3 digits are 90 mV", () => {
    expect(meterOf().accuracyVolts).toBeCloseTo(0.09, 12);
  });

  it("the channel's field is 37.5 mV per mm, 3.75 digits", () => {
    const { medianFieldMvPerMm, digitsPerMm } = meterOf();
    expect(medianFieldMvPerMm).toBeCloseTo(6000 / 160, 4);
    expect(digitsPerMm).toBeCloseTo(3.75, 5);
  });

  it("the tray behind the tip is a quarter of its resistance: two halves side by side", () => {
    expect(meterOf().trayResistanceOhm).toBeCloseTo(0.16 / (0.05 * 0.012 * 0.2) / 4, 6);
  });

  it("knows whether the frequency lies in its AC range; DC always does", () => {
    expect(meterOf({ supply: { frequencyHz: 400 } }).frequencyWithinMeter).toBe(true);
    expect(meterOf({ supply: { frequencyHz: 401 } }).frequencyWithinMeter).toBe(false);
    expect(meterOf({ supply: { frequencyHz: 39 } }).frequencyWithinMeter).toBe(false);
    expect(meterOf({ supply: { waveform: "dc", frequencyHz: 5000 } }).frequencyWithinMeter).toBe(true);
  });

  it("takes more where water conducts less, the tip is thinner, or the frequency is higher", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-4, max: 5, noNaN: true }), fc.double({ min: 0.05, max: 5, noNaN: true }), (conductivity, tipMm) => {
        const tip = tipResistanceOhm(conductivity, tipMm);
        expect(tipResistanceOhm(conductivity * 1.5, tipMm)).toBeLessThan(tip);
        expect(tipResistanceOhm(conductivity, tipMm * 1.5)).toBeLessThan(tip);
        expect(loadingShare(tip * 1.5, 10, 100, 50)).toBeGreaterThan(loadingShare(tip, 10, 100, 50));
        expect(loadingShare(tip, 10, 100, 500)).toBeGreaterThanOrEqual(loadingShare(tip, 10, 100, 50));
      }),
    );
  });
});
