import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { placeOnScreen, SMALLEST, type WindowPlace } from "../../../electron/window-place";

const SCREEN = { x: 0, y: 0, width: 1920, height: 1040 };
const SECOND = { x: 1920, y: 0, width: 1280, height: 1000 };
const last: WindowPlace = { x: 2000, y: 100, width: 1000, height: 700, maximized: false };

describe("where a window opens", () => {
  it("is where it was, while that screen exists", () => {
    expect(placeOnScreen(last, [SCREEN, SECOND])).toEqual(last);
  });
  it("is the middle of the first screen once the other is gone, in the same size", () => {
    expect(placeOnScreen(last, [SCREEN])).toEqual({ x: 460, y: 170, width: 1000, height: 700, maximized: false });
  });
  it("is the middle of the screen at the first start", () => {
    expect(placeOnScreen(null, [SCREEN])).toEqual({ x: 320, y: 120, width: 1280, height: 800, maximized: false });
  });
  it("always leaves a hand's breadth of title bar on a screen", () => {
    const numbers = fc.integer({ min: -5000, max: 5000 });
    const place = fc.record({
      x: numbers,
      y: numbers,
      width: fc.integer({ min: 1, max: 6000 }),
      height: fc.integer({ min: 1, max: 6000 }),
      maximized: fc.boolean(),
    });
    fc.assert(
      fc.property(place, ({ ...wanted }) => {
        const found = placeOnScreen(wanted, [SCREEN, SECOND]);
        const seen = [SCREEN, SECOND].some((area) => {
          const across = Math.min(found.x + found.width, area.x + area.width) - Math.max(found.x, area.x);
          const down = Math.min(found.y + 40, area.y + area.height) - Math.max(found.y, area.y);
          return across >= 120 && down >= 40;
        });
        expect(seen).toBe(true);
        expect(found.width).toBeGreaterThanOrEqual(SMALLEST.width);
        expect(found.height).toBeGreaterThanOrEqual(SMALLEST.height);
      }),
    );
  });
});
