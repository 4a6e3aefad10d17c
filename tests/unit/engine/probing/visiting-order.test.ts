import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { Place } from "../../../../renderer/engine/probing/rounded-place";
import { roundedPlace } from "../../../../renderer/engine/probing/rounded-place";
import { visitingOrder } from "../../../../renderer/engine/probing/visiting-order";
import { setupWith } from "../lines/analytic-field";

const column = (x: number, ys: readonly number[], closed = false) => ({ closed, places: ys.map((y): Place => [x, y]) });
const travelMm = (places: readonly Place[]): number =>
  places.slice(1).reduce((sum, [x, y], index) => sum + Math.hypot(x - places[index][0], y - places[index][1]), 0);

describe("the order of visiting", () => {
  it("goes up one line and down the next", () => {
    const order = visitingOrder([10, 20, 30].map((x) => [column(x, [0, 10, 20])]));
    expect(order.flat()).toEqual([
      [10, 0],
      [10, 10],
      [10, 20],
      [20, 20],
      [20, 10],
      [20, 0],
      [30, 0],
      [30, 10],
      [30, 20],
    ]);
  });

  it("passes over a level without points", () => {
    const order = visitingOrder([[column(10, [0, 10])], [], [column(30, [0, 10])]]);
    expect(order).toEqual([
      [
        [10, 0],
        [10, 10],
      ],
      [],
      [
        [30, 10],
        [30, 0],
      ],
    ]);
  });

  it("enters a loop where the hand is", () => {
    const loop: Place[] = [0, 1, 2, 3, 4, 5].map((k): Place => [50 + 10 * Math.cos((k * Math.PI) / 3), 10 * Math.sin((k * Math.PI) / 3)]);
    const order = visitingOrder([[column(30, [-20, 0])], [{ closed: true, places: loop }]]);
    expect(order[1][0][0]).toBeCloseTo(40, 9);
    expect(travelMm(order[1])).toBeCloseTo(50, 9);
  });

  it("visits every place once, and no level is shorter when walked the other way round", () => {
    const levels = fc.array(
      fc.array(fc.tuple(fc.integer({ min: 0, max: 300 }), fc.integer({ min: 0, max: 200 })), { minLength: 1, maxLength: 8 }),
      { minLength: 1, maxLength: 6 },
    );
    fc.assert(
      fc.property(levels, (places) => {
        const order = visitingOrder(places.map((level) => [{ closed: false, places: level }]));
        expect(order.map((level) => [...level].sort())).toEqual(places.map((level) => [...level].sort()));
        const whole = travelMm(order.flat());
        order.forEach((level, index) => {
          const other = order.map((each, which) => (which === index ? [...level].reverse() : each));
          // Up to 2 mm are given away so that plans begin at the reader's end.
          expect(travelMm(other.flat())).toBeGreaterThanOrEqual(whole - 2 - 1e-6);
        });
      }),
      { numRuns: 200, seed: 5 },
    );
  });
});

describe("rounding to half a millimetre", () => {
  const { tray } = setupWith([]);

  it("moves no place by more than 0.36 mm, and mirrored places to mirrored places", () => {
    const place = fc.tuple(fc.integer({ min: 0, max: 30_000 }), fc.integer({ min: 0, max: 20_000 }));
    fc.assert(
      fc.property(place, ([xHundredths, yHundredths]) => {
        const [x, y] = [xHundredths / 100, yHundredths / 100];
        const [roundX, roundY] = roundedPlace(tray, [x, y]);
        expect(Math.hypot(roundX - x, roundY - y)).toBeLessThan(0.36);
        const [mirrorX, mirrorY] = roundedPlace(tray, [300 - x, 200 - y]);
        // A place on the axis itself has itself as partner.
        if (x !== 150) expect(mirrorX).toBe(300 - roundX);
        if (y !== 100) expect(mirrorY).toBe(200 - roundY);
      }),
      { numRuns: 500, seed: 6 },
    );
  });
});
