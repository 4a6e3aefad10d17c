import { describe, expect, it } from "vitest";
import { setTitle } from "../../../renderer/document/commands/bench";
import { addPart, duplicateThings, removeThings, setHeight, setName } from "../../../renderer/document/commands/parts";
import { moveThings, resizeThing } from "../../../renderer/document/commands/placing";
import { createDocument, isDirty, redoLabel, undoLabel } from "../../../renderer/document/document";
import { FIRST_SHAPES } from "../../../renderer/document/shelf-part";
import { twoBars } from "../../../renderer/examples/two-bars";
import { looseRing, openDocument, part } from "./fixtures";

describe("undo", () => {
  it("names the step after what the hand did, and takes exactly that back", () => {
    const document = openDocument();
    document.run(moveThings(looseRing, ["A"], 10, 0));
    document.run(setHeight(document.getState().setup, ["B"], 30));
    expect(undoLabel(document.getState())).toBe("change height of Right bar");
    document.undo();
    expect(undoLabel(document.getState())).toBe("move Left bar");
    expect(redoLabel(document.getState())).toBe("change height of Right bar");
    expect(part(document, "A").xMm).toBe(75);
    document.undo();
    expect(document.getState().setup).toBe(looseRing);
    document.redo();
    document.redo();
    expect(part(document, "A").xMm).toBe(75);
    expect(part(document, "B").heightMm).toBe(30);
  });

  it("treats a drag of many previews as one step, counted from where it began", () => {
    const document = openDocument();
    document.startDrag("move Left bar");
    for (let by = 1; by <= 40; by++) document.dragTo(moveThings(looseRing, ["A"], by, -by));
    expect(part(document, "A").xMm).toBe(105);
    document.finishDrag();
    expect(document.getState().past).toHaveLength(1);
    document.undo();
    expect(document.getState().setup).toBe(looseRing);
  });

  it("puts everything back when a drag is called off, and leaves no step", () => {
    const document = openDocument();
    document.startDrag("move Left bar");
    document.dragTo(moveThings(looseRing, ["A"], 40, 0));
    document.cancelDrag();
    expect(document.getState().setup).toBe(looseRing);
    expect(undoLabel(document.getState())).toBeNull();
  });

  it("makes one step of a held arrow key, and a new one after the key was released", () => {
    const document = openDocument();
    const nudge = () => document.run(moveThings(document.getState().setup, ["A"], 1, 0, "nudge A"));
    for (let press = 0; press < 5; press++) nudge();
    document.settle();
    nudge();
    expect(document.getState().past).toHaveLength(2);
    document.undo();
    expect(part(document, "A").xMm).toBe(70);
    document.undo();
    expect(part(document, "A").xMm).toBe(65);
  });

  it("drops what could be redone once something else is done", () => {
    const document = openDocument();
    document.run(moveThings(looseRing, ["A"], 10, 0));
    document.undo();
    document.run(moveThings(looseRing, ["B"], 10, 0));
    expect(redoLabel(document.getState())).toBeNull();
  });

  it("brings back the setup before an opened file, with its own file and its unsaved state", () => {
    const document = createDocument(looseRing, { name: "ring.fieldtray.json", handle: "h1", place: "" });
    document.run(setTitle("Ring, first try"));
    document.replace(twoBars.setup, { label: "open bars", file: { name: "bars.fieldtray.json", handle: "h2", place: "" } });
    expect(document.getState().file?.name).toBe("bars.fieldtray.json");
    expect(isDirty(document.getState())).toBe(false);
    document.undo();
    expect(document.getState().setup.title).toBe("Ring, first try");
    expect(document.getState().file?.name).toBe("ring.fieldtray.json");
    expect(isDirty(document.getState())).toBe(true);
    document.redo();
    expect(document.getState().file?.name).toBe("bars.fieldtray.json");
    expect(isDirty(document.getState())).toBe(false);
  });
});

describe("an edit with a bad value", () => {
  it("is refused with the thing, the value and the range, and loses nothing", () => {
    const document = openDocument();
    const result = document.run(resizeThing(looseRing, "A", { kind: "bar", lengthMm: 5000, widthMm: 10 }));
    expect(result.ok).toBe(false);
    expect(document.getState().setup).toBe(looseRing);
    expect(document.getState().past).toHaveLength(0);
    expect(document.getState().refused.map(({ message }) => message)).toEqual(["Left bar, length is 5000 mm, allowed: 0.1 mm to 4000 mm"]);
  });

  it("says of a ring which of its two diameters is wrong", () => {
    const document = openDocument();
    document.run(resizeThing(looseRing, "C", { kind: "ring", outerMm: 50, innerMm: 54 }));
    expect(document.getState().refused[0]?.message).toBe("Loose ring, inner diameter is 54 mm, allowed: less than outer diameter (50 mm)");
  });

  it("refuses a number that is none", () => {
    const document = openDocument();
    expect(document.run(moveThings(looseRing, ["A"], Number.NaN, 0)).ok).toBe(false);
    expect(document.getState().setup).toBe(looseRing);
  });

  it("stops a drag at the last good preview and lets it go on from there", () => {
    const document = openDocument();
    document.startDrag("resize Left bar");
    document.dragTo(resizeThing(looseRing, "A", { kind: "bar", lengthMm: 120, widthMm: 10 }));
    document.dragTo(resizeThing(looseRing, "A", { kind: "bar", lengthMm: 0, widthMm: 10 }));
    expect(part(document, "A").shape).toEqual({ kind: "bar", lengthMm: 120, widthMm: 10 });
    document.dragTo(resizeThing(looseRing, "A", { kind: "bar", lengthMm: 130, widthMm: 10 }));
    document.finishDrag();
    expect(part(document, "A").shape).toEqual({ kind: "bar", lengthMm: 130, widthMm: 10 });
    expect(document.getState().refused).toEqual([]);
  });

  it("refuses a 65th part", () => {
    const document = openDocument();
    for (let count = 3; count < 64; count++) document.run(addPart(document.getState().setup, { shape: FIRST_SHAPES.disc }, 10, 10));
    expect(document.getState().setup.parts).toHaveLength(64);
    expect(document.run(addPart(document.getState().setup, { shape: FIRST_SHAPES.disc }, 10, 10)).ok).toBe(false);
    expect(document.getState().setup.parts).toHaveLength(64);
  });
});

describe("selection", () => {
  it("goes to what an edit made, and leaves what it took away", () => {
    const document = openDocument();
    document.select(["A", "B", "nobody"]);
    expect(document.getState().selection).toEqual(["A", "B"]);
    document.run(duplicateThings(looseRing, ["A", "B"]));
    expect(document.getState().selection).toEqual(["D", "E"]);
    document.run(removeThings(document.getState().setup, ["D"]));
    expect(document.getState().selection).toEqual(["E"]);
  });
});

describe("unsaved work", () => {
  it("is told by content: saving, undoing and redoing across the save change it", () => {
    const document = openDocument();
    expect(isDirty(document.getState())).toBe(false);
    document.run(setName(looseRing, "A", "West bar"));
    expect(isDirty(document.getState())).toBe(true);
    document.markSaved(document.getState().setup, { name: "west.fieldtray.json", handle: "hnull", place: "" });
    expect(isDirty(document.getState())).toBe(false);
    document.undo();
    expect(isDirty(document.getState())).toBe(true);
    document.redo();
    expect(isDirty(document.getState())).toBe(false);
  });

  it("holds for a draft brought back after a crash until it is saved", () => {
    const document = openDocument();
    document.replace(twoBars.setup, { label: "recover draft", file: null, unsaved: true });
    expect(isDirty(document.getState())).toBe(true);
  });
});
