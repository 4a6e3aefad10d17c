import { describe, expect, it } from "vitest";
import { pasteThings, thingsText } from "../../../renderer/document/clipboard";
import { addSlab } from "../../../renderer/document/commands/bench";
import { copyAlongRow, copyAroundCentre, rowStepMm } from "../../../renderer/document/commands/copies";
import { removeThings } from "../../../renderer/document/commands/parts";
import { createDocument } from "../../../renderer/document/document";
import { twoDiscs } from "../../../renderer/examples/two-discs";
import { boxOf, looseRing, openDocument } from "./fixtures";

const pasted = (document: ReturnType<typeof openDocument>, text: string | null) => {
  const edit = pasteThings(text ?? "");
  if (edit === null || !edit.ok) throw new Error("an edit expected");
  return document.run(edit.value);
};

describe("copied parts", () => {
  it("come back from text in another window just as they were, slabs too", () => {
    const from = openDocument();
    from.run(addSlab({ kind: "bar", lengthMm: 40, widthMm: 40 }, 4, 150, 50));
    const text = thingsText(from.getState().setup, ["C", "D"]);
    const to = createDocument(looseRing);
    to.run(removeThings(looseRing, ["A", "B", "C"]));
    pasted(to, text);
    expect(to.getState().setup.parts).toEqual([looseRing.parts[2]]);
    expect(to.getState().setup.water.slabs).toMatchObject([{ id: "D", thicknessMm: 4 }]);
    expect(to.getState().selection).toEqual(["C", "D"]);
  });

  it("step aside from what lies in their place, each time further, with ids and names of their own", () => {
    const document = openDocument();
    const text = thingsText(looseRing, ["C"]);
    pasted(document, text);
    pasted(document, text);
    expect(document.getState().setup.parts.slice(3)).toMatchObject([
      { id: "D", name: "Loose ring D", xMm: 160, yMm: 90 },
      { id: "E", name: "Loose ring E", xMm: 170, yMm: 80 },
    ]);
    document.undo();
    document.undo();
    expect(document.getState().setup).toBe(looseRing);
  });

  it("are refused with reasons where they are damaged or break a rule, and other text is no copy of parts", () => {
    const document = openDocument();
    const text = thingsText(looseRing, ["C"]) ?? "";
    expect(pasteThings("a sentence from elsewhere")).toBeNull();
    expect(pasteThings('{"format":"other"}')).toBeNull();
    expect(pasteThings(text.replace('"xMm": 150', '"xMm": "here"'))).toMatchObject({ ok: false });
    const result = pasted(document, text.replace('"outerMm": 60', '"outerMm": -1'));
    expect(result).toMatchObject({ ok: false });
    expect(document.getState().setup).toBe(looseRing);
  });
});

describe("copies in order", () => {
  it("stand in a row with the clear distance that was asked for", () => {
    const document = createDocument(twoDiscs.setup);
    const [first] = twoDiscs.setup.parts;
    if (first === undefined) throw new Error("a disc expected");
    document.run(copyAlongRow(twoDiscs.setup, [first.id], 3, rowStepMm(twoDiscs.setup, [first.id], 12, boxOf), 0));
    const [a, , b, c] = document.getState().setup.parts.map(boxOf);
    if (a === undefined || b === undefined || c === undefined) throw new Error("copies expected");
    expect(b[0] - a[2]).toBeCloseTo(12, 6);
    expect(c[0] - b[2]).toBeCloseTo(12, 6);
  });

  it("stand evenly around a centre, each turned as the first faces it", () => {
    const document = openDocument();
    document.run(copyAroundCentre(looseRing, ["A"], 4, [150, 100]));
    const bars = document.getState().setup.parts.filter(({ name }) => name.startsWith("Left bar"));
    expect(bars.map(({ xMm, yMm, turnDeg }) => [xMm, yMm, turnDeg])).toEqual([
      [65, 100, 90],
      [150, 15, 180],
      [235, 100, 270],
      [150, 185, 0],
    ]);
    expect(new Set(bars.map(({ name }) => name)).size).toBe(4);
  });
});
