import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { circuitNumbers } from "../../../../renderer/engine/bench/circuit";
import { ELECTRONS, gasMl, gasNumbers, holdsChloride, metalLostG } from "../../../../renderer/engine/bench/gas";
import { channel, channelFacts } from "./trays";

const gasOf = (change: Parameters<typeof channel>[0] = {}) => {
  const setup = channel({ ...change, supply: { waveform: "dc", volts: 6 } });
  return gasNumbers(setup, circuitNumbers(setup, channelFacts(setup)));
};

describe("gas and metal on DC", () => {
  it("an ampere-hour makes 0.418 L of hydrogen and 0.209 L of oxygen at 0 °C (published)", () => {
    expect(gasMl(3600, ELECTRONS.hydrogen, 0) / 1000).toBeCloseTo(0.418, 3);
    expect(gasMl(3600, ELECTRONS.oxygen, 0) / 1000).toBeCloseTo(0.209, 3);
  });

  it("an ampere-hour dissolves 1.186 g of copper (Faraday; handbook value of copper's electrochemical equivalent)", () => {
    expect(metalLostG(3600, 63.546, 2)).toBeCloseTo(1.186, 2);
  });

  it("0.2 A for an hour through chloride can make 0.9 ppm of chlorine in 100 m³ (derived)", () => {
    const litres = gasMl(0.2 * 3600, ELECTRONS.chlorine, 20) / 1000;
    expect((litres / 100_000) * 1e6).toBeCloseTo(0.9, 1);
  });

  it("is none on AC, where the double layers carry the current", () => {
    const setup = channel();
    expect(gasNumbers(setup, circuitNumbers(setup, channelFacts(setup)))).toBeNull();
  });

  it("counts charge in coulomb: 4.5 mA over 40 min are 10.8 C", () => {
    expect(gasOf()?.chargePerTrayC).toBeCloseTo(10.8, 6);
  });

  it("chlorine needs chloride, by whatever name the salt goes", () => {
    expect(["sodium-chloride", "NaCl", "table salt", "sea salt", "KCl"].every(holdsChloride)).toBe(true);
    expect(["none", "magnesium-sulfate", "sodium-carbonate"].some(holdsChloride)).toBe(false);
    expect(gasOf()?.chlorineMl).toBe(0);
    expect(gasOf({ water: { salt: "sodium-chloride" } })?.chlorineMl).toBeGreaterThan(0);
  });

  it("only the positive side dissolves, and only metal that does", () => {
    const anodes = gasOf()?.anodes ?? [];
    expect(anodes.map((anode) => anode.id)).toEqual(["B"]);
    expect(anodes[0].lostG).toBeCloseTo(metalLostG(10.8, 64.2, 2), 9);
  });

  it("hydrogen thins with the hood's air, chlorine grows with the number of trays", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 30 }), fc.double({ min: 1, max: 500, noNaN: true }), (trays, hoodLitres) => {
        const salt = { water: { salt: "sodium-chloride" } };
        const gas = gasOf({ ...salt, session: { trays, hoodLitres } });
        const wider = gasOf({ ...salt, session: { trays: trays + 1, hoodLitres: 2 * hoodLitres } });
        expect((gas?.hydrogenVolPercent ?? 0) / (wider?.hydrogenVolPercent ?? 1)).toBeCloseTo(2, 9);
        expect(wider?.chlorineRoomPpm ?? 0).toBeGreaterThan(gas?.chlorineRoomPpm ?? Infinity);
      }),
      { numRuns: 20 },
    );
  });
});
