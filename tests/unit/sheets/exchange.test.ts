import { describe, expect, it } from "vitest";
import { areaOf, boundsOf, type Loop, outlineOf } from "../../../renderer/engine/geometry/outline";
import { EXAMPLES } from "../../../renderer/examples/all-examples";
import { pointsOf } from "../../../renderer/sheets/template-drawing";
import { templateDxf } from "../../../renderer/sheets/template-dxf";
import { templateSvg } from "../../../renderer/sheets/template-svg";
import { randomSetup } from "../../reference/random-setups";
import { FONTS, planned } from "./packs";

/** Files for other machines say the same as the paper. */

interface Entity {
  readonly kind: string;
  readonly groups: ReadonlyMap<number, string>;
}

/** Reads pairs of lines: a code and a value; code 0 begins something new. */
function entitiesOf(dxf: string): Entity[] {
  const lines = dxf.split("\r\n").slice(0, -1);
  expect(lines.length % 2).toBe(0);
  const entities: { kind: string; groups: Map<number, string> }[] = [];
  for (let k = 0; k < lines.length; k += 2) {
    const code = Number(lines[k]);
    expect(Number.isInteger(code), `group code “${lines[k]}”`).toBe(true);
    if (code === 0) entities.push({ kind: lines[k + 1], groups: new Map() });
    else entities.at(-1)?.groups.set(code, lines[k + 1]);
  }
  return entities;
}

/** Outlines from the file alone: the same pieces, whichever way round. */
const areaInFile = (entities: readonly Entity[], reference: readonly Loop[]): { pieces: number; box: readonly number[] } => {
  const number = ({ groups }: Entity, code: number): number => Number(groups.get(code));
  const pieces = entities.map((entity): Loop[number] => {
    if (entity.kind === "LINE")
      return { kind: "edge", x0: number(entity, 10), y0: number(entity, 20), x1: number(entity, 11), y1: number(entity, 21) };
    const [startDeg, endDeg] = entity.kind === "ARC" ? [number(entity, 50), number(entity, 51)] : [0, 360];
    const sweepDeg = endDeg > startDeg ? endDeg - startDeg : endDeg + 360 - startDeg;
    return {
      kind: "bow",
      cx: number(entity, 10),
      cy: number(entity, 20),
      radius: number(entity, 40),
      startRad: (startDeg * Math.PI) / 180,
      sweepRad: (sweepDeg * Math.PI) / 180,
    };
  });
  expect(pieces).toHaveLength(reference.flat().length);
  return { pieces: pieces.length, box: boundsOf([pieces]) };
};

describe("the template for a cutter (DXF)", () => {
  it("has every part where the setup has it, to a thousandth of a millimetre, in lines, arcs and circles", async () => {
    for (const seed of [21, 22, 23, 24]) {
      const setup = randomSetup(seed, { insulators: true, slabs: true, tilt: false });
      const entities = entitiesOf(templateDxf(setup, await planned(setup), false));
      expect(entities.at(-1)?.kind).toBe("EOF");
      const drawn = entities.filter(({ kind }) => ["LINE", "ARC", "CIRCLE"].includes(kind));
      const onParts = drawn.filter(({ groups }) => ["ELECTRODES", "LOOSE", "INSULATORS"].includes(groups.get(8) ?? ""));
      let from = 0;
      for (const part of setup.parts) {
        const loops = outlineOf(part);
        expect(areaOf(loops)).toBeGreaterThan(0);
        const { pieces, box } = areaInFile(onParts.slice(from, from + loops.flat().length), loops);
        from += pieces;
        boundsOf(loops).forEach((value, side) => {
          expect(Math.abs(box[side] - value)).toBeLessThan(1e-3);
        });
      }
      expect(from).toBe(onParts.length);
    }
  });

  it("has the probe points with their numbers, and is plain ASCII", async () => {
    const { setup } = EXAMPLES[1];
    const plan = await planned(setup);
    const dxf = templateDxf(setup, plan, true);
    expect(dxf).toMatch(/^[\x20-\x7e\r\n]*$/);
    const entities = entitiesOf(dxf);
    const marks = entities.filter(({ kind }) => kind === "POINT").map(({ groups }) => [Number(groups.get(10)), Number(groups.get(20))]);
    expect(marks).toEqual(pointsOf(plan).map(({ xMm, yMm }) => [xMm, yMm]));
    const numbers = entities.filter(({ kind }) => kind === "TEXT").map(({ groups }) => Number(groups.get(1)));
    expect(numbers).toEqual(pointsOf(plan).map(({ n }) => n));
  });
});

describe("the template as SVG", () => {
  it("is as large as the tray in millimetres and names its setup", async () => {
    const { setup } = EXAMPLES[0];
    const plan = await planned(setup);
    const svg = templateSvg(setup, plan, FONTS, { points: true, grid: "coarse", saveInk: true, mirrored: false, wallMm: 0 });
    const [, width, height] = /width="([\d.]+)mm" height="([\d.]+)mm" viewBox="0 0 \1 \2"/.exec(svg) ?? [];
    expect(Number(width)).toBeCloseTo(300 + 2 * 0.8 + 4, 3);
    expect(Number(height)).toBeCloseTo(200 + 2 * 0.8 + 4, 3);
    expect(svg).toContain(plan.setupId);
    for (const { n } of pointsOf(plan)) expect(svg).toContain(`>${n}</text>`);
  });
});
