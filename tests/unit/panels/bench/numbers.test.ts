import { describe, expect, it } from "vitest";
import { benchOf } from "../../../../renderer/engine/bench/bench";
import { percentText, shownBounded, shownNumber, withPrefix } from "../../../../renderer/panels/bench/numbers";
import {
  circuitReadouts,
  heatAndGasReadouts,
  meterReadouts,
  surfaceReadouts,
  waterReadouts,
} from "../../../../renderer/panels/bench/readouts";
import { channel, channelFacts } from "../../engine/bench/trays";

describe("numbers for people", () => {
  it("carry as many digits as their bound supports", () => {
    expect(shownBounded({ value: 1487.486, error: 0.016 })).toBe("1487.5");
    expect(shownBounded({ value: 1487.486, error: 30 })).toBe(shownNumber(1500, 2));
    expect(shownBounded({ value: 1487.486, error: 0 })).toBe(shownNumber(1487.49, 6));
  });

  it("stand between one and a thousand, with the unit's prefix", () => {
    expect(withPrefix(0.00403, "A")).toBe("4.03 mA");
    expect(withPrefix(1487, "Ω")).toBe("1.49 kΩ");
    expect(withPrefix(9.54e6, "Ω")).toBe("9.54 MΩ");
    expect(withPrefix(0.9999, "A")).toBe("1 A");
    expect(withPrefix(0, "A")).toBe("0 A");
    expect(percentText(0.0263)).toBe("2.6 %");
  });
});

describe("the cards of the bench", () => {
  const cards = (change: Parameters<typeof channel>[0]) => {
    const setup = channel(change);
    const bench = benchOf(setup, channelFacts(setup));
    return [
      waterReadouts(setup, bench),
      circuitReadouts(setup, bench),
      surfaceReadouts(bench),
      meterReadouts(bench),
      heatAndGasReadouts(setup, bench),
    ].flat();
  };
  const value = (change: Parameters<typeof channel>[0], term: string): string | undefined =>
    cards(change).find((line) => line.term === term)?.value;

  it("say what the teacher asks: resistance, current, volume, salt", () => {
    expect(value({}, "Resistance")).toMatch(/^1,?333\.33 Ω$/);
    expect(value({}, "Current")).toBe("4.5 mA");
    expect(value({}, "Volume")).toBe("576 mL");
    expect(value({ water: { targetConductivityUsPerCm: 1000 } }, "Salt for 1000 µS/cm")).toMatch(/mg$/);
  });

  it("speak of gas only on DC, and of chlorine only with chloride", () => {
    expect(value({}, "Gas")).toBe("little");
    expect(value({ supply: { waveform: "dc" } }, "Hydrogen")).toMatch(/mL$/);
    expect(value({ supply: { waveform: "dc" } }, "Chlorine")).toBeUndefined();
    expect(value({ supply: { waveform: "dc" }, water: { salt: "sodium-chloride" } }, "Chlorine")).toMatch(/mL$/);
  });

  it("never show a hole", () => {
    for (const line of [
      ...cards({}),
      ...cards({ supply: { waveform: "dc" }, water: { salt: "NaCl", targetConductivityUsPerCm: 3000 }, session: { trays: 9 } }),
    ]) {
      expect(`${line.term} ${line.value} ${line.note ?? ""}`).not.toMatch(/NaN|undefined|null|Infinity|–/);
    }
  });
});
