import { describe, expect, it } from "vitest";
import { type ColourScale, DARK_SCALE, LIGHT_SCALE, shadesInOklab } from "../../../renderer/canvas/colour-scale";
import { fieldPixels } from "../../../renderer/canvas/field-image";
import { DARK_CANVAS, LIGHT_CANVAS } from "../../../renderer/canvas/theme";
import { type FieldPicture, OWNER_NOTHING, OWNER_WATER } from "../../../shared-types/plan";
import { looseRing } from "../document/fixtures";

type Triple = readonly [number, number, number];

/** Relative luminance and contrast by WCAG 2.2. */
const linear = (byte: number): number => (byte <= 10.31475 ? byte / 255 / 12.92 : ((byte / 255 + 0.055) / 1.055) ** 2.4);
const luminance = ([r, g, b]: Triple): number => 0.2126 * linear(r) + 0.7152 * linear(g) + 0.0722 * linear(b);
const contrast = (a: Triple, b: Triple): number => {
  const [high, low] = [Math.max(luminance(a), luminance(b)), Math.min(luminance(a), luminance(b))];
  return (high + 0.05) / (low + 0.05);
};
const fromHex = (hex: string): Triple => [1, 3, 5].map((at) => Number.parseInt(hex.slice(at, at + 2), 16)) as unknown as Triple;

/** What protan and deutan eyes see, in linear light: Machado, Oliveira, Fernandes, IEEE TVCG 15 (2009) 1291, severity 1 (from memory). */
const DICHROMATS: Readonly<Record<string, readonly Triple[]>> = {
  protan: [
    [0.152286, 1.052583, -0.204868],
    [0.114503, 0.786281, 0.099216],
    [-0.003882, -0.048116, 1.051998],
  ],
  deutan: [
    [0.367322, 0.860646, -0.227968],
    [0.280085, 0.672501, 0.047413],
    [-0.01182, 0.04294, 0.968881],
  ],
};

const scales: readonly (readonly [string, boolean, ColourScale, string])[] = [
  ["light", false, LIGHT_SCALE, LIGHT_CANVAS.ink],
  ["dark", true, DARK_SCALE, DARK_CANVAS.ink],
];

describe.each(scales)("the %s scale of potential", (_, dark, scale, ink) => {
  it("keeps lines and labels readable over every shade (4.5:1)", () => {
    for (const shade of scale.shades) expect(contrast(shade, fromHex(ink))).toBeGreaterThanOrEqual(4.5);
  });

  it("gets lighter all the way, so that a grey print still tells high from low", () => {
    const light = shadesInOklab(dark).map(([lightness]) => lightness);
    expect(light.every((value, index) => index === 0 || value > (light[index - 1] as number))).toBe(true);
    expect((light.at(-1) as number) - (light[0] as number)).toBeGreaterThan(0.2);
  });

  it("changes by equal steps to the eye", () => {
    const shades = shadesInOklab(dark);
    const steps = shades
      .slice(1)
      .map((shade, index) => Math.hypot(...shade.map((value, axis) => value - (shades[index] as Triple)[axis as 0])));
    expect(Math.max(...steps) / Math.min(...steps)).toBeLessThan(1.15);
  });

  it.each(Object.entries(DICHROMATS))("stays ordered by lightness for %s eyes", (_name, matrix) => {
    const seen = scale.shades
      .filter((_shade, index) => index % 64 === 0)
      .map((shade) => {
        const light = shade.map(linear);
        return matrix.map((row) => row.reduce((sum, weight, axis) => sum + weight * (light[axis] as number), 0));
      });
    const brightness = seen.map(([r, g, b]) => 0.2126 * (r as number) + 0.7152 * (g as number) + 0.0722 * (b as number));
    expect(brightness.every((value, index) => index === 0 || value > (brightness[index - 1] as number))).toBe(true);
  });
});

describe("the picture of the field", () => {
  const tray = { ...looseRing.tray, shape: "rectangle", lengthMm: 20, widthMm: 20 } as const;
  const picture = (volts: readonly number[], owner: readonly number[]): FieldPicture => ({
    columns: 3,
    rows: 2,
    pitchXMm: 10,
    pitchYMm: 20,
    volts: Float32Array.from(volts),
    owner: Int16Array.from(owner),
  });
  const pixel = (bytes: Uint8ClampedArray, index: number) => [...bytes.slice(4 * index, 4 * index + 4)];

  it("has the far side of the tray on top, the lowest potential in the first shade and the highest in the last", () => {
    const { bytes } = fieldPixels(picture([0, 1, 2, 2, 4, 6], Array(6).fill(OWNER_WATER)), [0, 6], tray, LIGHT_SCALE);
    expect(pixel(bytes, 3)).toEqual([...(LIGHT_SCALE.shades[0] as Triple), 255]);
    expect(pixel(bytes, 2)).toEqual([...(LIGHT_SCALE.shades.at(-1) as Triple), 255]);
  });

  it("is empty where the bed is dry, and carries the water's colour on under an insulator's edge", () => {
    const volts = [Number.NaN, 0, 0, 0, 0, Number.NaN];
    const { bytes } = fieldPixels(picture(volts, [OWNER_NOTHING, -1, -1, -1, -1, 2]), [0, 6], tray, LIGHT_SCALE);
    expect(pixel(bytes, 3)).toEqual([0, 0, 0, 0]);
    expect(pixel(bytes, 2)).toEqual([...(LIGHT_SCALE.shades[0] as Triple), 255]);
  });
});
