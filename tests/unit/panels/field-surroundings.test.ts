import { describe, expect, it } from "vitest";
import { changeWater } from "../../../renderer/document/commands/bench";
import { createDocument } from "../../../renderer/document/document";
import { EXAMPLES } from "../../../renderer/examples/all-examples";
import { tried } from "../../../renderer/panels/field-surroundings";
import { createWindowStore } from "../../../renderer/panels/window-state";

describe("stepping a number with a held key", () => {
  const document = createDocument(EXAMPLES[0].setup);
  const before = EXAMPLES[0].setup.water.depthMm;

  it("is one step to undo", () => {
    for (let press = 1; press <= 5; press++) expect(tried(document, changeWater({ depthMm: before + press }), true)).toEqual([]);
    expect(document.getState().setup.water.depthMm).toBe(before + 5);
    document.settle();
    document.undo();
    expect(document.getState().setup.water.depthMm).toBe(before);
  });

  it("leaves a typed number a step of its own", () => {
    tried(document, changeWater({ depthMm: before + 1 }));
    tried(document, changeWater({ depthMm: before + 2 }));
    document.undo();
    expect(document.getState().setup.water.depthMm).toBe(before + 1);
  });

  it("is refused in words beyond the range and changes nothing", () => {
    const kept = document.getState().setup;
    const [problem] = tried(document, changeWater({ depthMm: 900 }), true);
    expect(problem.message).toContain("0.5 mm to 200 mm");
    expect(document.getState().setup).toBe(kept);
  });
});

describe("the desks of the window", () => {
  it("show the probe points on their own desk, and elsewhere only when asked to", () => {
    const window = createWindowStore();
    window.goTo("probe-plan");
    expect(window.getState().shown.points).toBe(true);
    window.goTo("lay-out");
    expect(window.getState().shown.points).toBe(false);
    window.set({ shown: { ...window.getState().shown, points: true } });
    window.goTo("bench");
    expect(window.getState().shown.points).toBe(true);
  });

  it("leave the start page behind", () => {
    const window = createWindowStore();
    window.set({ startPage: true });
    window.goTo("sheets");
    expect(window.getState()).toMatchObject({ desk: "sheets", startPage: false });
  });
});

it("a message stays until it is dismissed, and old ones make room", () => {
  const window = createWindowStore();
  const message = { tone: "problem", lines: [], choices: [] } as const;
  const takeAway = window.tell({ ...message, title: "first" });
  for (const title of ["second", "third", "fourth"]) window.tell({ ...message, title });
  expect(window.getState().messages.map(({ title }) => title)).toEqual(["first", "second", "third", "fourth"]);
  takeAway();
  expect(window.getState().messages.map(({ title }) => title)).toEqual(["second", "third", "fourth"]);
  for (const title of ["fifth", "sixth"]) window.tell({ ...message, title });
  expect(window.getState().messages).toHaveLength(4);
});
