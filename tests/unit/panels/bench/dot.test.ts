import { describe, expect, it } from "vitest";
import { createDocument } from "../../../../renderer/document/document";
import { moveDot, remedyWords } from "../../../../renderer/panels/bench/dot";
import { channel } from "../../engine/bench/trays";

describe("the chart's dot", () => {
  it("moves as one step, however many previews a drag has", () => {
    const document = createDocument(channel());
    document.startDrag("depth and voltage");
    for (const volts of [7, 8, 9]) document.dragTo(moveDot(15, volts));
    document.finishDrag();
    expect(document.getState().past.map((step) => step.label)).toEqual(["set 15 mm and 9 V"]);
    document.undo();
    expect(document.getState().setup).toEqual(channel());
  });

  it("moved by a held key makes one step", () => {
    const document = createDocument(channel());
    for (const volts of [6.1, 6.2, 6.3]) document.run(moveDot(12, volts, "chart's dot"));
    expect(document.getState().past.length).toBe(1);
    expect(document.getState().setup.supply.volts).toBe(6.3);
  });

  it("cannot leave what a setup may hold", () => {
    const document = createDocument(channel());
    expect(document.run(moveDot(900, 6)).ok).toBe(false);
    expect(document.getState().setup.water.depthMm).toBe(12);
  });
});

describe("a remedy's button", () => {
  it.each([
    ["supply.volts", 12, "Set 12 V"],
    ["supply.waveform", "ac", "Use AC"],
    ["water.depthMm", 9, "Fill to 9 mm"],
    ["parts[0].heightMm", 24, "Make it 24 mm high"],
    ["parts[0].tap", 1, "Wire to the positive lead"],
  ])("says what %s will be", (path, value, words) => {
    expect(remedyWords({ path, value })).toBe(words);
  });
});
