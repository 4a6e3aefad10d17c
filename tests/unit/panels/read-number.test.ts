import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readNumber, unitsFor } from "../../../renderer/panels/read-number";

describe("what people type into a length field", () => {
  it.each([
    ["300/2", 150],
    ["16 cm", 160],
    ["16cm", 160],
    ["23,5 cm", 235],
    ["1.5in", 38.1],
    ['2"', 50.8],
    ["0.3 m", 300],
    ["(20+5)*4", 100],
    ["20 − 5", 15],
    ["3 × 12.5", 37.5],
    ["100 ÷ 8", 12.5],
    ["-7,25", -7.25],
    ["+4", 4],
    ["  12 ", 12],
    ["300/2 cm", 1500],
    [".5", 0.5],
  ])("%s is %f mm", (text, millimetres) => {
    expect(readNumber(text, unitsFor("mm"))).toBeCloseTo(millimetres, 9);
  });

  it.each(["", "twelve", "3 + ", "(3", "3)", "4 4", "1/0", "12 V", "1e999", "--", "1.2.3", "3; alert(1)"])("“%s” is no number", (text) => {
    expect(readNumber(text, unitsFor("mm"))).toBeNull();
  });

  it("takes a bare number in the unit that the user thinks in, and a number with a unit as it stands", () => {
    expect(readNumber("2", unitsFor("mm"), 25.4)).toBeCloseTo(50.8, 9);
    expect(readNumber("2 mm", unitsFor("mm"), 25.4)).toBe(2);
  });
});

it("each field understands its own unit and its near relations", () => {
  expect(readNumber("500 mV", unitsFor("V"))).toBe(0.5);
  expect(readNumber("6 V", unitsFor("V"))).toBe(6);
  expect(readNumber("0,5 mS/cm", unitsFor("µS/cm"))).toBe(500);
  expect(readNumber("0.05 S/m", unitsFor("µS/cm"))).toBe(500);
  expect(readNumber("350 μS/cm", unitsFor("µS/cm"))).toBe(350);
  expect(readNumber("0.5 h", unitsFor("min"))).toBe(30);
  expect(readNumber("1 kHz", unitsFor("Hz"))).toBe(1000);
  expect(readNumber("21 °C", unitsFor("°C"))).toBe(21);
  expect(readNumber("3", unitsFor(""))).toBe(3);
});

it("a number is read as it is written, with either decimal sign", () => {
  fc.assert(
    fc.property(fc.integer({ min: -9_999_999, max: 9_999_999 }), (thousandths) => {
      const value = thousandths / 1000;
      const text = value.toFixed(3);
      expect(readNumber(text, unitsFor("mm"))).toBeCloseTo(value, 9);
      expect(readNumber(text.replace(".", ","), unitsFor("mm"))).toBeCloseTo(value, 9);
    }),
  );
});

it("a sum is worked out by the rules of arithmetic", () => {
  const small = fc.integer({ min: 1, max: 99 });
  fc.assert(
    fc.property(small, small, small, small, (a, b, c, d) => {
      expect(readNumber(`${a}+${b}*${c}-${d}`, unitsFor("mm"))).toBeCloseTo(a + b * c - d, 9);
      expect(readNumber(`(${a}+${b})/${c}*${d}`, unitsFor("mm"))).toBeCloseTo(((a + b) / c) * d, 6);
    }),
  );
});
