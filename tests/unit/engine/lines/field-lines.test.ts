import { describe, expect, it } from "vitest";
import { fieldLinesOf } from "../../../../renderer/engine/lines/field-lines";
import type { FieldLine } from "../../../../shared-types/plan";
import { randomSetup } from "../../../reference/random-setups";
import { solved, trayWith } from "../../../reference/solved";
import { analyticField, coaxialVolts, discInRing, fullWidthBars, setupWith, uniformVolts } from "./analytic-field";

const first = (line: FieldLine): readonly [number, number] => [line[0], line[1]];
const last = (line: FieldLine): readonly [number, number] => [line[line.length - 2], line[line.length - 1]];

describe("field lines", () => {
  it.each(["live", "print"] as const)("between full-width bars are straight, evenly spaced and run from high to low (%s)", (quality) => {
    const setup = setupWith(fullWidthBars);
    const lines = fieldLinesOf(analyticField(setup, uniformVolts, 1), setup, 10, quality);
    const heights = lines.map((line) => line[1]).sort((a, b) => a - b);
    expect(heights).toHaveLength(10);
    for (const [index, y] of heights.entries()) expect(Math.abs(y - (10 + 20 * index))).toBeLessThan(1);
    for (const line of lines) {
      expect(line[0]).toBeCloseTo(250, 6);
      expect(last(line)[0]).toBeCloseTo(50, 6);
      expect(last(line)[1]).toBeCloseTo(line[1], 6);
    }
  });

  it.each(["live", "print"] as const)("from a disc in a ring are radii at equal angles (%s)", (quality) => {
    const setup = setupWith(discInRing);
    const lines = fieldLinesOf(analyticField(setup, coaxialVolts, 1), setup, 12, quality);
    const angleOf = ([x, y]: readonly [number, number]): number => Math.atan2(y - 100, x - 150);
    const angles = lines.map((line) => angleOf(first(line))).sort((a, b) => a - b);
    expect(angles).toHaveLength(12);
    for (const [index, angle] of angles.slice(1).entries()) expect(Math.abs(angle - angles[index] - Math.PI / 6)).toBeLessThan(0.01);
    for (const line of lines) {
      expect(Math.hypot(last(line)[0] - 150, last(line)[1] - 100)).toBeCloseTo(80, 3);
      expect(Math.abs(Math.sin(angleOf(last(line)) - angleOf(first(line))))).toBeLessThan(0.01);
    }
  });

  it("arriving at a loose ring are as many as leave it", () => {
    const setup = trayWith({
      parts: [
        { id: "A", role: "electrode", tap: 0, xMm: 65, yMm: 100, turnDeg: 90, shape: { kind: "bar", lengthMm: 100, widthMm: 10 } },
        { id: "B", role: "electrode", tap: 1, xMm: 235, yMm: 100, turnDeg: 90, shape: { kind: "bar", lengthMm: 100, widthMm: 10 } },
        { id: "C", role: "floating", xMm: 150, yMm: 100, shape: { kind: "ring", outerMm: 60, innerMm: 54 } },
      ],
    });
    const lines = fieldLinesOf(solved(setup, "live"), setup, 24, "live");
    const onRing = ([x, y]: readonly [number, number]): boolean => Math.abs(Math.hypot(x - 150, y - 100) - 30) < 0.05;
    const leaving = lines.filter((line) => onRing(first(line))).length;
    expect(leaving).toBeGreaterThan(5);
    expect(Math.abs(lines.filter((line) => onRing(last(line))).length - leaving)).toBeLessThanOrEqual(1);
    expect(lines.length - leaving).toBe(24);
  });

  it.each([11, 12, 13, 14, 15, 16])("of random setups fall all the way and end at metal (%i)", (number) => {
    const setup = randomSetup(number, { insulators: true, slabs: false, tilt: false });
    const field = solved(setup, "live");
    const lines = fieldLinesOf(field, setup, 24, "print");
    expect(lines.length).toBeGreaterThanOrEqual(20);
    let arrived = 0;
    for (const line of lines) {
      let before = Infinity;
      for (let index = 2; index + 2 < line.length; index += 2) {
        const volts = field.read(line[index], line[index + 1]).volts;
        if (volts === null) continue;
        expect(volts).toBeLessThanOrEqual(before + 1e-5);
        before = volts;
      }
      const end = last(line);
      const nearest = Math.min(
        ...field.conductors.map(({ id }) => {
          const around = Array.from({ length: 16 }, (_, k) => field.read(end[0] + 0.05 * Math.cos(k), end[1] + 0.05 * Math.sin(k)));
          return around.some(({ inside }) => inside === id) ? 0 : 1;
        }),
      );
      if (nearest === 0) arrived++;
    }
    expect(arrived / lines.length).toBeGreaterThan(0.95);
  });
});
