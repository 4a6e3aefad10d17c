import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { type PlacedLabel, placeLabels } from "../../../renderer/canvas/line-labels";
import { boxesMeet, createCrowd, discMeetsBox, placeNumbers, RING_PX } from "../../../renderer/canvas/point-numbers";
import { createReadout, type PointerReadout, type SampleSource } from "../../../renderer/canvas/readout";
import { placeTags } from "../../../renderer/canvas/tags";
import { createTrayView, viewOf } from "../../../renderer/canvas/view";
import { decimalsForStep, fixed, trimmed } from "../../../renderer/document/number-text";
import type { Equipotential, FieldReading, ProbePoint } from "../../../shared-types/plan";
import { looseRing } from "../document/fixtures";

const trayView = createTrayView(looseRing.tray);
trayView.setSize(1280, 740);
const view = viewOf(trayView.getState());
const widthOf = (text: string) => 7 * text.length;

const point = (n: number, xMm: number, yMm: number): ProbePoint => ({
  n,
  xMm,
  yMm,
  inside: null,
  volts: 3,
  voltsError: 0,
  voltsPerMm: 0,
  directionDeg: 0,
  bandV: 0.1,
});
const points = fc
  .array(fc.tuple(fc.integer({ min: 0, max: 300 }), fc.integer({ min: 0, max: 200 })), { maxLength: 120 })
  .map((places) => places.map(([x, y], index) => point(index + 1, x, y)));

describe("numbers of probe points", () => {
  it("cover no ring and no other number, however crowded the tray", () => {
    fc.assert(
      fc.property(points, (crowd) => {
        const placed = placeNumbers(crowd, view, widthOf);
        const boxes = placed.flatMap(({ number }) => (number === null ? [] : [number]));
        for (const [index, box] of boxes.entries()) {
          for (const other of boxes.slice(index + 1)) expect(boxesMeet(box, other)).toBe(false);
          for (const { x, y } of placed) expect(discMeetsBox(x, y, RING_PX, box)).toBe(false);
        }
      }),
      { numRuns: 40 },
    );
  });

  it("stand beside every point where there is room", () => {
    const grid = Array.from({ length: 49 }, (_, index) => point(index + 1, 30 + 40 * (index % 7), 20 + 26 * Math.floor(index / 7)));
    expect(placeNumbers(grid, view, widthOf).filter(({ number }) => number === null)).toEqual([]);
  });
});

describe("labels of equipotentials", () => {
  /** A wavy line from bottom to top of the tray. */
  const wavy = (xMm: number, swing: number, volts: number): Equipotential => ({
    volts,
    paths: [Float64Array.from({ length: 402 }, (_, index) => (index % 2 === 0 ? xMm + swing * Math.sin(index / 40) : index / 2))],
  });
  const free = () => false;
  const text = (volts: number) => [`${volts} V`];

  it("never collide, hide no point, and lie on their own line", () => {
    fc.assert(
      fc.property(
        fc.array(fc.tuple(fc.integer({ min: 10, max: 290 }), fc.integer({ min: 0, max: 8 })), { minLength: 1, maxLength: 15 }),
        points,
        (lines, crowd) => {
          const placed = placeNumbers(crowd, view, widthOf);
          const taken = (x: number, y: number, radius: number) => placed.some((one) => Math.hypot(one.x - x, one.y - y) < radius + RING_PX);
          const equipotentials = lines.map(([x, swing], index) => wavy(x, swing, index));
          const labels = placeLabels(equipotentials, view, text, widthOf, taken);
          const middleOf = ({ x, y, angleRad, text: written }: PlacedLabel) =>
            [-0.5, -0.25, 0, 0.25, 0.5].map(
              (share) => [x + share * widthOf(written) * Math.cos(angleRad), y + share * widthOf(written) * Math.sin(angleRad)] as const,
            );
          for (const [index, label] of labels.entries()) {
            for (const [x, y] of middleOf(label)) {
              for (const one of placed) expect(Math.hypot(one.x - x, one.y - y)).toBeGreaterThan(RING_PX);
              for (const other of labels.slice(index + 1))
                for (const [ox, oy] of middleOf(other)) expect(Math.hypot(ox - x, oy - y)).toBeGreaterThan(12);
            }
          }
        },
      ),
      { numRuns: 30 },
    );
  });

  it("read without turning the head, upright lines all the same way", () => {
    const labels = placeLabels([wavy(60, 0, 1), wavy(150, 3, 2), wavy(240, -3, 3)], view, text, widthOf, free);
    expect(labels).toHaveLength(3);
    for (const { angleRad } of labels) expect(angleRad).toBeLessThan(0);
  });

  it("are left out where a line is too short, and shortened where only a short text fits", () => {
    const short: Equipotential = { volts: 2.25, paths: [Float64Array.from([100, 100, 100, 104])] };
    expect(placeLabels([short], view, text, widthOf, free)).toEqual([]);
    const middling: Equipotential = { volts: 2.25, paths: [Float64Array.from([100, 100, 100, 118])] };
    expect(placeLabels([middling], view, () => ["2.250 volts", "2.25"], widthOf, free)[0]?.text).toBe("2.25");
  });
});

describe("tags of conductors", () => {
  it("name the lead by sign and volts, and say that a loose part floats", () => {
    const tags = placeTags(looseRing, null, view, widthOf, new Set(), createCrowd());
    expect(tags.map(({ partId, sign, text: written, dashed }) => [partId, sign, written, dashed])).toEqual([
      ["A", "−", "0 V", false],
      ["B", "+", "6 V", false],
      ["C", null, "floats", true],
    ]);
  });

  it("give way to probe points", () => {
    const [plainly] = placeTags(looseRing, null, view, widthOf, new Set(), createCrowd());
    if (plainly === undefined) throw new Error("a tag expected");
    const crowd = createCrowd();
    crowd.add(plainly.box);
    const [moved] = placeTags(looseRing, null, view, widthOf, new Set(), crowd);
    expect(moved !== undefined && boxesMeet(moved.box, plainly.box)).toBe(false);
  });
});

describe("numbers", () => {
  it("carry as many digits as their step needs, with a true minus and no minus zero", () => {
    expect([0.75, 1.5, 0.05, 0.8571].map(decimalsForStep)).toEqual([2, 1, 3, 2]);
    expect(fixed(-0.5, 2)).toBe("−0.50");
    expect(fixed(-0.001, 2)).toBe("0.00");
    expect(trimmed(6, 3)).toBe("6");
    expect(trimmed(100, 0)).toBe("100");
    expect(trimmed(2.5, 3)).toBe("2.5");
  });
});

describe("the reading under the pointer", () => {
  const reading = (xMm: number): FieldReading => ({
    xMm,
    yMm: 0,
    inside: null,
    volts: xMm / 50,
    voltsError: 0,
    fieldVPerM: 25,
    directionDeg: 180,
  });
  const settled = () => new Promise((resolve) => setTimeout(resolve, 0));

  it("asks for one place at a time, the newest next, and gives the field in V/cm", async () => {
    const asked: number[] = [];
    const told: (PointerReadout | null)[] = [];
    const waiting: (() => void)[] = [];
    const source: SampleSource = {
      sample: (_setup, [place]) =>
        new Promise((resolve) => {
          asked.push(place?.[0] ?? Number.NaN);
          waiting.push(() => resolve([reading(place?.[0] ?? 0)]));
        }),
    };
    const readout = createReadout(source, (next) => told.push(next));
    for (const x of [10, 20, 30]) readout.at(looseRing, [x, 0]);
    waiting.shift()?.();
    await settled();
    expect(asked).toEqual([10, 30]);
    waiting.shift()?.();
    await settled();
    expect(told.at(-1)).toMatchObject({ xMm: 30, volts: 0.6, fieldVPerCm: 0.25 });
  });

  it("says nothing of a field that has just been refused, even when an old answer comes late", async () => {
    const told: (PointerReadout | null)[] = [];
    const readout = createReadout({ sample: async () => [reading(300)] }, (next) => told.push(next));
    readout.at(looseRing, [10, 0]);
    readout.at(null, [11, 0]);
    await settled();
    expect(told.at(-1)).toMatchObject({ xMm: 11, volts: null });
    readout.leave();
    expect(told.at(-1)).toBeNull();
  });
});
