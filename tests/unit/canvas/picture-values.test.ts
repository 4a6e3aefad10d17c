import { describe, expect, it } from "vitest";
import { scaleFor, stepped } from "../../../renderer/canvas/colour-scale";
import { differenceVolts, fieldStrengthVPerCm, rounded } from "../../../renderer/canvas/picture-values";
import { type FieldPicture, OWNER_WATER } from "../../../shared-types/plan";

/** A picture of 2 mm pitch whose potential is a formula of the place. */
function pictureOf(
  columns: number,
  rows: number,
  pitchMm: number,
  volts: (x: number, y: number) => number,
  owner = OWNER_WATER,
): FieldPicture {
  return {
    columns,
    rows,
    pitchXMm: pitchMm,
    pitchYMm: pitchMm,
    volts: Float32Array.from({ length: columns * rows }, (_, node) =>
      volts((node % columns) * pitchMm, Math.floor(node / columns) * pitchMm),
    ),
    owner: new Int16Array(columns * rows).fill(owner),
  };
}

describe("the picture of field strength", () => {
  it("is the slope of the potential, in V/cm, at walls as in the middle", () => {
    const strength = fieldStrengthVPerCm(pictureOf(9, 7, 2, (x, y) => 0.03 * x + 0.04 * y));
    for (const value of strength) expect(value).toBeCloseTo(0.5, 4);
  });

  it("uses the water's side of a conductor's edge, and has no value on metal", () => {
    const picture = pictureOf(9, 3, 2, (x) => (x <= 8 ? 1 : 1 + 0.1 * (x - 8)));
    for (let row = 0; row < 3; row++) for (let column = 0; column <= 4; column++) picture.owner[row * 9 + column] = 0;
    const strength = fieldStrengthVPerCm(picture);
    expect(strength[9 + 3]).toBeNaN();
    expect(strength[9 + 5]).toBeCloseTo(1, 4);
  });
});

describe("the difference of two setups", () => {
  it("is nothing between a field and itself on another grid", () => {
    const formula = (x: number, y: number): number => 0.02 * x - 0.01 * y;
    const difference = differenceVolts(pictureOf(21, 11, 2, formula), pictureOf(9, 5, 5, formula));
    for (const value of difference) expect(value).toBeCloseTo(0, 5);
  });

  it("has no value where the other tray has ended", () => {
    const difference = differenceVolts(
      pictureOf(5, 5, 2, () => 3),
      pictureOf(3, 5, 2, () => 1),
    );
    expect(difference[0]).toBeCloseTo(2, 6);
    expect(difference[4]).toBeNaN();
  });
});

describe("scales", () => {
  it("end at a number of two digits, never below what they show", () => {
    expect([0.4011, 1, 12.7, 0.0213].map(rounded)).toEqual([0.41, 1, 13, 0.022]);
  });

  it("of greys have no hue at all", () => {
    for (const dark of [false, true])
      for (const [r, g, b] of scaleFor(dark, "greys", true).shades) expect(Math.max(r, g, b) - Math.min(r, g, b)).toBeLessThanOrEqual(1);
  });

  it("in steps have as many colours as bands", () => {
    expect(new Set(stepped(scaleFor(false, "hues", false), 8).packed).size).toBe(8);
  });

  it("of differences are faintest where nothing changed", () => {
    const { shades } = scaleFor(false, "hues", true);
    const colourfulness = shades.map((shade) => Math.max(...shade) - Math.min(...shade));
    expect(colourfulness.indexOf(Math.min(...colourfulness))).toBeCloseTo(shades.length / 2, -2);
  });
});
