import { beforeEach, describe, expect, it } from "vitest";
import { announcement } from "../../../renderer/canvas/announcement";
import { createHand, type Hand, type HandLook, IDLE, type Modifiers } from "../../../renderer/canvas/hand";
import { type Key, meaningOf } from "../../../renderer/canvas/keys";
import { createTrayView, type Place, toScreen, viewOf } from "../../../renderer/canvas/view";
import { setHeight } from "../../../renderer/document/commands/parts";
import { createDocument, type Document, undoLabel } from "../../../renderer/document/document";
import { looseRing, part } from "../document/fixtures";

const plain: Modifiers = { shift: false, fine: false, pan: false };
let document: Document;
let hand: Hand;
let look: HandLook;
let editable: boolean;

const trayView = createTrayView(looseRing.tray);
trayView.setSize(1280, 740);
/** A place of the tray (mm) on the stage (px). */
const on = (xMm: number, yMm: number): Place => toScreen(viewOf(trayView.getState()), xMm, yMm);

function drag(from: Place, to: Place, modifiers = plain): void {
  hand.press(on(...from), modifiers);
  for (let step = 1; step <= 10; step++) {
    hand.move(on(from[0] + ((to[0] - from[0]) * step) / 10, from[1] + ((to[1] - from[1]) * step) / 10), modifiers);
  }
}
const drop = (at: Place) => hand.release(on(...at), plain);

beforeEach(() => {
  document = createDocument(looseRing);
  look = IDLE;
  editable = true;
  trayView.fit();
  hand = createHand(
    () => ({ ...document.getState(), view: viewOf(trayView.getState()), editable, actions: document, panBy: trayView.panBy }),
    (next) => {
      look = next;
    },
  );
});

describe("the hand", () => {
  it("takes a part with it and sets it down on whole millimetres, as one step", () => {
    drag([65, 120], [80.4, 121.3]);
    expect(look.live).toBe("x 80, y 101 mm");
    drop([80.4, 121.3]);
    expect(part(document, "A")).toMatchObject({ xMm: 80, yMm: 101 });
    expect(document.getState().past.map(({ label }) => label)).toEqual(["move Left bar"]);
  });

  it("places finely with Alt or with snapping off, and keeps to one axis with Shift", () => {
    drag([65, 120], [80.44, 121.3], { ...plain, fine: true });
    expect(part(document, "A").xMm).toBeCloseTo(80.4, 6);
    hand.cancel();
    document.setSnapping(false);
    drag([65, 120], [80.44, 121.3]);
    expect(part(document, "A").xMm).toBeCloseTo(80.4, 6);
    hand.cancel();
    drag([65, 120], [80.4, 126], { ...plain, shift: true });
    expect(part(document, "A").yMm).toBe(100);
  });

  it("moves all that is selected when it takes one of them", () => {
    document.select(["A", "C"]);
    drag([65, 120], [75, 120]);
    drop([75, 120]);
    expect([part(document, "A").xMm, part(document, "B").xMm, part(document, "C").xMm]).toEqual([75, 235, 160]);
    expect(undoLabel(document.getState())).toBe("move Left bar and Loose ring");
  });

  it("puts everything back with Escape, wherever it has been", () => {
    drag([178.5, 100], [235, 100]);
    expect(hand.cancel()).toBe(true);
    expect(document.getState().setup).toBe(looseRing);
    expect(hand.cancel()).toBe(false);
  });

  it("turns by the handle that stands off the part, with the angle beside it", () => {
    document.select(["A"]);
    const offMm = 5 + 30 / trayView.getState().scale;
    drag([65 - offMm, 100], [30, 65]);
    expect(look.live).toBe("135°");
    drop([30, 65]);
    expect(part(document, "A").turnDeg).toBe(135);
    expect(undoLabel(document.getState())).toBe("turn Left bar");
  });

  it("resizes by a handle, with the size beside it", () => {
    document.select(["C"]);
    const offMm = 10 / trayView.getState().scale;
    drag([180 + offMm, 100], [190 + offMm, 100]);
    expect(look.live).toBe("⌀ 80 outside, 54 inside mm");
    drop([190, 100]);
    expect(part(document, "C").shape).toMatchObject({ outerMm: 80, innerMm: 54 });
  });

  it("selects with a click, adds with Shift, frames from empty water, and lets go on empty water", () => {
    hand.press(on(65, 100), plain);
    hand.release(on(65, 100), plain);
    hand.press(on(235, 100), { ...plain, shift: true });
    hand.release(on(235, 100), { ...plain, shift: true });
    expect(document.getState().selection).toEqual(["A", "B"]);
    drag([110, 50], [200, 150]);
    expect(look.frame).not.toBeNull();
    drop([200, 150]);
    expect(document.getState().selection).toEqual(["C"]);
    hand.press(on(110, 20), plain);
    hand.release(on(110, 20), plain);
    expect(document.getState().selection).toEqual([]);
    expect(document.getState().past).toEqual([]);
  });

  it("only looks and selects where nothing may be edited", () => {
    editable = false;
    drag([65, 120], [80, 120]);
    drop([80, 120]);
    expect(document.getState().setup).toBe(looseRing);
    expect(document.getState().selection).toEqual(["A"]);
  });

  it("pans without touching a part", () => {
    const before = trayView.getState().middleMm[0];
    drag([65, 100], [95, 100], { ...plain, pan: true });
    hand.release(on(65, 100), plain);
    expect(trayView.getState().middleMm[0]).toBeLessThan(before);
    expect(document.getState().selection).toEqual([]);
  });
});

describe("keys on the tray", () => {
  const key = (name: string, held: Partial<Key> = {}): Key => ({
    key: name,
    shiftKey: false,
    altKey: false,
    ctrlKey: false,
    metaKey: false,
    ...held,
  });
  const press = (pressed: Key) => {
    const meaning = meaningOf(pressed, document.getState().setup, document.getState().selection);
    if (meaning?.kind === "edit") document.run(meaning.edit);
    if (meaning?.kind === "select") document.select(meaning.ids);
    return meaning?.kind ?? null;
  };

  it("nudge by 1 mm, with Shift by 10, with Alt by 0.1", () => {
    document.select(["A"]);
    press(key("ArrowRight"));
    press(key("ArrowUp", { shiftKey: true }));
    press(key("ArrowLeft", { altKey: true }));
    expect(part(document, "A")).toMatchObject({ xMm: 65.9, yMm: 110 });
  });

  it("turn, duplicate, delete and select all without a pointer", () => {
    document.select(["A"]);
    press(key("l"));
    expect(part(document, "A").turnDeg).toBe(95);
    press(key("R", { shiftKey: true }));
    expect(part(document, "A").turnDeg).toBe(50);
    press(key("d", { ctrlKey: true }));
    expect(document.getState().setup.parts).toHaveLength(4);
    press(key("a", { metaKey: true }));
    press(key("Delete"));
    expect(document.getState().setup.parts).toHaveLength(0);
  });

  it("mean nothing to parts while none is selected, so that the page keeps them", () => {
    expect(press(key("ArrowRight"))).toBeNull();
    expect(press(key("Delete"))).toBeNull();
    expect(press(key("Escape"))).toBeNull();
    expect(press(key("+"))).toBe("view");
  });
});

describe("what a listener hears", () => {
  it("is the step with where the part now lies, its undoing, a refusal, and the selection", () => {
    const heard: string[] = [];
    document.subscribe((now, before) => {
      const sentence = announcement(now, before);
      if (sentence !== null) heard.push(sentence);
    });
    drag([65, 120], [75, 120]);
    drop([75, 120]);
    document.undo();
    document.redo();
    document.run(setHeight(document.getState().setup, ["A"], -4));
    document.select([]);
    expect(heard).toEqual([
      "Left bar selected, x 65, y 100 mm, turned 90°",
      "Move Left bar: x 75, y 100 mm, turned 90°",
      "Undone: move Left bar",
      "Redone: move Left bar: x 75, y 100 mm, turned 90°",
      "Refused. Left bar, height is -4 mm, allowed: 0.1 mm to 500 mm",
      "Nothing selected",
    ]);
  });
});
