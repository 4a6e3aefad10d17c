import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { circuitNumbers } from "../../../../renderer/engine/bench/circuit";
import {
  alternatingInterface,
  alternatingShareLost,
  alternatingWaterVolts,
  directInterface,
  doubleLayerReactanceOhm,
  readingWithInterfaceVolts,
} from "../../../../renderer/engine/bench/interface";
import { channel, channelFacts } from "./trays";

const alternating = (change: Parameters<typeof channel>[0] = {}) => {
  const setup = channel(change);
  return alternatingInterface(setup, circuitNumbers(setup, channelFacts(setup)));
};
const direct = (change: { interface?: { electrodeDropVolts: number }; parts?: never } = {}, volts = 6) => {
  const setup = channel({ ...change, supply: { waveform: "dc", volts } });
  return directInterface(setup, circuitNumbers(setup, channelFacts(setup)));
};

describe("volts lost at the electrodes' surfaces, AC", () => {
  // Derived example: two faces of 6.3 cm² at 20 µF/cm² and 50 Hz, from X = 1/(2πfC).
  const reactance = 2 * doubleLayerReactanceOhm(50, 20, 630);

  it("two faces of 6.3 cm² at 20 µF/cm² and 50 Hz have 51 Ω", () => {
    expect(reactance).toBeCloseTo(51, 0);
  });

  it.each([
    [500, 0.005],
    [100, 0.11],
    [25, 0.56],
  ])("in %d Ω of water that takes the share %d of the water's volts (derived example)", (ohm, share) => {
    expect(1 - alternatingWaterVolts(1, reactance, ohm)).toBeCloseTo(share, 2);
  });

  it("the lost and the remaining volts stand at right angles: their squares add to the supply's", () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 1e4, noNaN: true }), fc.double({ min: 0.01, max: 1e4, noNaN: true }), (x, r) => {
        expect(alternatingShareLost(x, r) ** 2 + alternatingWaterVolts(1, x, r) ** 2).toBeCloseTo(1, 9);
      }),
    );
  });

  it("of the channel: both bars in series, 48 cm² each", () => {
    const { reactanceOhm, reactanceEnteringOhm, shareLost } = alternating();
    const x = 1 / (2 * Math.PI * 50 * 20e-6 * 48);
    expect(reactanceEnteringOhm.typical).toBeCloseTo(x, 9);
    expect(reactanceOhm.typical).toBeCloseTo(2 * x, 9);
    expect(shareLost.typical).toBeCloseTo((2 * x) / Math.hypot(2 * x, 1333.333), 6);
  });

  it("takes the user's own capacitance before that of the material, and says which", () => {
    expect(alternating().basis).toBe("material");
    const own = alternating({ interface: { doubleLayerUfPerCm2: 10 } });
    expect(own.basis).toBe("given");
    expect(own.reactanceOhm.typical / alternating().reactanceOhm.typical).toBeCloseTo(2, 9);
    expect(own.shareLost.low).toBe(own.shareLost.high);
  });

  it("polished gold has 6 ± 2 µF/cm² (published)", () => {
    const setup = channel();
    const gold = { ...setup, parts: setup.parts.map((part) => ({ ...part, material: "gold" })) };
    expect(alternatingInterface(gold, circuitNumbers(gold, channelFacts(gold))).doubleLayerUfPerCm2).toEqual({
      low: 4,
      typical: 6,
      high: 8,
    });
  });

  it("loses 2 % exactly at the frequency that it names", () => {
    const { frequencyForTwoPercentHz } = alternating();
    expect(alternating({ supply: { frequencyHz: frequencyForTwoPercentHz } }).shareLost.typical).toBeCloseTo(0.02, 9);
  });

  it("loses less at a higher frequency, in its curve as in its number", () => {
    fc.assert(
      fc.property(fc.double({ min: 1, max: 1e4, noNaN: true }), (frequencyHz) => {
        const low = alternating({ supply: { frequencyHz } });
        expect(alternating({ supply: { frequencyHz: 2 * frequencyHz } }).shareLost.typical).toBeLessThan(low.shareLost.typical);
        expect(low.shareLost.low).toBeLessThan(low.shareLost.high);
        low.alongFrequency.slice(1).forEach((point, index) => {
          expect(point.frequencyHz).toBeGreaterThan(low.alongFrequency[index].frequencyHz);
          expect(point.share.typical).toBeLessThan(low.alongFrequency[index].share.typical);
        });
      }),
      { numRuns: 20 },
    );
  });

  it("is the same at any depth: face and water grow together", () => {
    expect(alternating({ water: { depthMm: 6 } }).shareLost.typical).toBeCloseTo(
      alternating({ water: { depthMm: 18 } }).shareLost.typical,
      12,
    );
  });

  it("holds gas back below about 3 mA/cm² at 50 Hz (2πfC·0.5 V, derived)", () => {
    expect(alternating().gasFreeCurrentDensityAPerM2 / 10).toBeCloseTo(3.14, 2);
  });
});

describe("volts lost at the electrodes, DC", () => {
  it("where brass dissolves are 0.8 to 1.3 V for both electrodes (from memory)", () => {
    expect(direct().electrodeDropVolts).toEqual({ low: 0.8, typical: 1.05, high: 1.3 });
    expect(direct().waterVolts.typical).toBeCloseTo(4.95, 9);
  });

  it("on stainless steel are 1.5 to 2.5 V (from memory), above the 1.23 V that split water (published)", () => {
    const setup = channel({ supply: { waveform: "dc" } });
    const steel = { ...setup, parts: setup.parts.map((part) => ({ ...part, material: "stainless steel" })) };
    const { electrodeDropVolts } = directInterface(steel, circuitNumbers(steel, channelFacts(steel)));
    expect(electrodeDropVolts).toEqual({ low: 1.5, typical: 2, high: 2.5 });
    expect(electrodeDropVolts.low).toBeGreaterThan(1.23);
  });

  it("are the user's own reading where there is one", () => {
    const own = direct({ interface: { electrodeDropVolts: 1.4 } });
    expect(own.basis).toBe("given");
    expect(own.waterVolts).toEqual({ low: 4.6, typical: 4.6, high: 4.6 });
  });

  it("never leave less than nothing, and matter less at more volts", () => {
    expect(direct({}, 0.5).waterVolts.typical).toBe(0);
    expect(direct({}, 0.5).shareLost.typical).toBe(1);
    expect(direct({}, 12).shareLost.typical).toBeLessThan(direct({}, 6).shareLost.typical);
  });
});

describe("readings that allow for the loss", () => {
  it("on DC keep half of the drop at either end", () => {
    const setup = channel({ supply: { waveform: "dc" }, interface: { electrodeDropVolts: 2 } });
    const circuit = circuitNumbers(setup, channelFacts(setup));
    const surface = directInterface(setup, circuit);
    expect([0, 0.5, 1].map((share) => readingWithInterfaceVolts(surface, circuit, share))).toEqual([1, 3, 5]);
  });

  it("on AC never exceed the supply, rise from electrode to electrode, and stay near the plain reading when little is lost", () => {
    const setup = channel();
    const circuit = circuitNumbers(setup, channelFacts(setup));
    const surface = alternatingInterface(setup, circuit);
    const readings = [0, 0.25, 0.5, 0.75, 1].map((share) => readingWithInterfaceVolts(surface, circuit, share));
    for (const [index, volts] of readings.slice(1).entries()) expect(volts).toBeGreaterThan(readings[index]);
    expect(readings[4]).toBeLessThanOrEqual(6);
    expect(readings[2]).toBeCloseTo(3, 3);
  });
});
