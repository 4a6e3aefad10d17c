import { describe, expect, it } from "vitest";
import { createTapeHand, type Tape, tapeText } from "../../../renderer/canvas/tape";
import { createTrayView, toScreen, viewOf } from "../../../renderer/canvas/view";
import { looseRing } from "../document/fixtures";

const trayView = createTrayView(looseRing.tray);
trayView.setSize(1280, 740);
const view = viewOf(trayView.getState());
const on = (xMm: number, yMm: number) => toScreen(view, xMm, yMm);

function pulled(from: readonly [number, number], to: readonly [number, number]): Tape | null {
  let tape: Tape | null = null;
  const hand = createTapeHand(
    () => ({ setup: looseRing, view }),
    (next) => {
      tape = next;
    },
  );
  hand.press(on(...from));
  hand.move(on(...to));
  hand.release(on(...to));
  return tape;
}

describe("the measuring tape", () => {
  it("holds to edges, so that the clear distance between the bars reads true", () => {
    const tape = pulled([70.7, 100], [229.3, 100]);
    expect(tape && tapeText(tape)).toBe("160 mm");
  });

  it("holds to corners and middles before edges", () => {
    const tape = pulled([69.5, 149.2], [150.8, 100.5]);
    expect(tape?.from).toEqual([70, 150]);
    expect(tape?.to).toEqual([150, 100]);
    expect(tape && tapeText(tape)).toBe("94.3 mm (80 across, 50 up)");
  });

  it("measures between free places too, and rolls itself up after a mere click", () => {
    const tape = pulled([100, 20], [100, 60.04]);
    expect(tape && tapeText(tape)).toBe("40 mm");
    expect(pulled([100, 20], [100.5, 20])).toBeNull();
  });
});
