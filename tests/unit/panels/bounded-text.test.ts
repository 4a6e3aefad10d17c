import { describe, expect, it } from "vitest";
import { boundedText, percentText } from "../../../renderer/panels/bounded-text";

describe("a number on the ledger", () => {
  it.each([
    [{ value: 1352.04, error: 0.003 }, "Ω", "1352.0 Ω"],
    [{ value: 812.43, error: 0.2 }, "Ω", "812 Ω"],
    [{ value: 23_456, error: 0.5 }, "Ω", "23.46 kΩ"],
    [{ value: 0.0044379, error: 1e-8 }, "A", "4.4379 mA"],
    [{ value: 2.5e-6, error: 1e-9 }, "A", "2.50 µA"],
    [{ value: 0, error: 0 }, "A", "0 A"],
  ])("shows as many figures as its bound supports: %o", (bounded, unit, text) => {
    expect(boundedText(bounded, unit)).toBe(text);
  });

  it("never shows fewer than three figures nor more than six", () => {
    for (const error of [1e-15, 1e-6, 1e-3, 0.1, 0.9]) {
      const figures = boundedText({ value: 1.2345678, error }, "V").replace(/[^\d]/g, "").length;
      expect(figures).toBeGreaterThanOrEqual(3);
      expect(figures).toBeLessThanOrEqual(6);
    }
  });

  it("says in words that no current flows where the resistance has no end", () => {
    expect(boundedText({ value: Number.POSITIVE_INFINITY, error: 0 }, "Ω")).toBe("none flows");
    expect(boundedText({ value: Number.NaN, error: 0 }, "Ω")).toBe("none flows");
  });
});

it("the bound is shown in per cent, to one figure", () => {
  expect(percentText({ value: 100, error: 0.0234 })).toBe("0.02");
  expect(percentText({ value: -2, error: 0.1 })).toBe("5");
  expect(percentText({ value: 0, error: 0 })).toBe("–");
  expect(percentText({ value: 3, error: 0 })).toBe("0");
});
