import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  molarConductivity,
  saltConcentrationMolPerLitre,
  saltConductivitySPerM,
  saltDose,
} from "../../../../renderer/engine/bench/salt-to-add";
import { waterNumbers } from "../../../../renderer/engine/bench/water";
import { channel } from "./trays";

// CRC Handbook, equivalent conductivity of NaCl in water at 25 °C, S cm²/mol; a confirmed copy for the larger part.
const CRC_HANDBOOK: readonly (readonly [number, number])[] = [
  [0, 126.39],
  [0.001, 123.68],
  [0.005, 120.59],
  [0.01, 118.45],
  [0.02, 115.7],
  [0.05, 111.01],
  [0.1, 106.69],
];

describe("salt to add", () => {
  it.each(CRC_HANDBOOK)("at %d mol/L NaCl conducts as the CRC Handbook says, within 0.1 %%", (molPerLitre, published) => {
    expect(Math.abs(molarConductivity(molPerLitre) / published - 1)).toBeLessThan(0.001);
  });

  it("0.1 mol/L conduct 1.067 S/m, which a meter shows as 10 669 µS/cm", () => {
    expect(Math.abs(saltConductivitySPerM(0.1) / 1.0669 - 1)).toBeLessThan(0.001);
  });

  it("a litre of pure water takes 0.584 g for 0.01 mol/L (1184.5 µS/cm)", () => {
    const dose = saltDose(0, 1184.5, 1, 1);
    expect(dose.molPerLitre).toBeCloseTo(0.01, 4);
    expect(dose.perTrayG).toBeCloseTo(0.5844, 2);
  });

  it("counts the litres of the tray and the trays of the class", () => {
    const one = saltDose(200, 1000, 0.5, 1);
    const class30 = saltDose(200, 1000, 0.5, 30);
    expect(class30.allTraysG).toBeCloseTo(30 * one.perTrayG, 9);
    expect(saltDose(200, 1000, 1, 1).perTrayG).toBeCloseTo(2 * one.perTrayG, 9);
  });

  it("says where the published data end", () => {
    expect(saltDose(0, 10_000, 1, 1).withinData).toBe(true);
    expect(saltDose(0, 11_000, 1, 1).withinData).toBe(false);
  });

  it("is asked for by a target above the present water, and by no other", () => {
    expect(waterNumbers(channel()).saltToTarget).toBeNull();
    expect(waterNumbers(channel({ water: { targetConductivityUsPerCm: 400 } })).saltToTarget).toBeNull();
    expect(waterNumbers(channel({ water: { targetConductivityUsPerCm: 900 } })).saltToTarget?.toUsPerCm).toBe(900);
  });

  it("the concentration found conducts what was asked for, and more salt conducts more", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-5, max: 20, noNaN: true }), (conductivity) => {
        const concentration = saltConcentrationMolPerLitre(conductivity);
        expect(saltConductivitySPerM(concentration) / conductivity).toBeCloseTo(1, 9);
        expect(saltConcentrationMolPerLitre(conductivity * 1.01)).toBeGreaterThan(concentration);
      }),
    );
  });
});
