import { describe, expect, it } from "vitest";
import { pasteThings, thingsText } from "../../../renderer/document/clipboard";
import { copyAlongRow } from "../../../renderer/document/commands/copies";
import { toggleGroup, toggleLock } from "../../../renderer/document/commands/holding";
import { duplicateThings, removeThings, setMaterial, setRole } from "../../../renderer/document/commands/parts";
import { alignThings, moveThings, turnThings } from "../../../renderer/document/commands/placing";
import { parseSetupText, setupText } from "../../../shared-types/parse-setup";
import { setupId } from "../../../shared-types/setup-id";
import { boxOf, looseRing, openDocument, part, TRAY_BOX } from "./fixtures";

const lock = (...ids: string[]) => toggleLock(looseRing, ids);

describe("a locked part", () => {
  it("is moved neither alone nor with others, nor turned, aligned or taken away, and the refusal names it", () => {
    const document = openDocument();
    document.run(lock("A"));
    const { setup } = document.getState();
    for (const edit of [
      moveThings(setup, ["A"], 1, 0),
      moveThings(setup, ["A", "B"], 1, 0),
      turnThings(setup, ["A"], 5, boxOf),
      alignThings(setup, ["A"], "left", boxOf, TRAY_BOX),
      removeThings(setup, ["A"]),
    ]) {
      const result = document.run(edit);
      expect(result.ok ? "went through" : result.problems[0]?.message).toBe("Left bar is locked. Unlock it first (K).");
    }
    expect(document.getState().setup).toBe(setup);
  });

  it("stays put under a drag, while another moves freely", () => {
    const document = openDocument();
    document.run(lock("A"));
    document.startDrag("move");
    expect(document.dragTo(moveThings(document.getState().setup, ["A"], 5, 0)).ok).toBe(false);
    expect(document.dragTo(moveThings(document.getState().setup, ["B"], 5, 0)).ok).toBe(true);
    document.finishDrag();
    expect([part(document, "A").xMm, part(document, "B").xMm]).toEqual([65, 240]);
  });

  it("may still be wired and given another material, and moves again once unlocked", () => {
    const document = openDocument();
    document.run(lock("A"));
    document.run(setMaterial(document.getState().setup, ["A"], "copper"));
    document.run(setRole(document.getState().setup, ["A"], "floating"));
    expect(part(document, "A")).toMatchObject({ role: "floating", material: "copper", locked: true });
    document.run(toggleLock(document.getState().setup, ["A"]));
    expect("locked" in part(document, "A")).toBe(false);
    expect(document.run(moveThings(document.getState().setup, ["A"], 1, 0)).ok).toBe(true);
  });

  it("has copies that are free", () => {
    const document = openDocument();
    document.run(lock("C"));
    document.run(duplicateThings(document.getState().setup, ["C"]));
    expect(part(document, "D").locked).toBeUndefined();
  });
});

describe("a group", () => {
  const grouped = () => {
    const document = openDocument();
    document.run(toggleGroup(document.getState().setup, ["A", "C"]));
    return document;
  };

  it("is selected as one, and taken apart again", () => {
    const document = grouped();
    document.select(["C"]);
    expect([...document.getState().selection].sort()).toEqual(["A", "C"]);
    document.run(toggleGroup(document.getState().setup, ["A", "C"]));
    document.select(["C"]);
    expect(document.getState().selection).toEqual(["C"]);
  });

  it("is one step to undo", () => {
    const document = grouped();
    expect(document.getState().past.at(-1)?.label).toBe("group Left bar and Loose ring");
    document.undo();
    expect(document.getState().setup).toBe(looseRing);
  });

  it("has copies that hold together without holding on to it: duplicated, pasted, in a row", () => {
    const document = grouped();
    const groupOf = (id: string) => part(document, id).group;
    document.run(duplicateThings(document.getState().setup, ["A", "C"]));
    expect([groupOf("A"), groupOf("C"), groupOf("D"), groupOf("E")]).toEqual(["1", "1", "2", "2"]);
    const pasted = pasteThings(thingsText(document.getState().setup, ["A", "C"]) ?? "");
    if (pasted?.ok !== true) throw new Error("nothing to paste");
    document.run(pasted.value);
    expect([groupOf("F"), groupOf("G")]).toEqual(["3", "3"]);
    document.run(copyAlongRow(document.getState().setup, ["A", "C"], 3, 1, 1));
    expect(["H", "I", "J", "K"].map(groupOf)).toEqual(["4", "4", "5", "5"]);
  });
});

it("groups and locks are kept in the file, and the setup's id is the same with and without them", () => {
  const document = openDocument();
  document.run(toggleGroup(looseRing, ["A", "C"]));
  document.run(toggleLock(document.getState().setup, ["B"]));
  const { setup } = document.getState();
  const read = parseSetupText(setupText(setup));
  expect(read.ok && read.value.parts.map(({ group, locked }) => [group, locked])).toEqual([
    ["1", undefined],
    [undefined, true],
    ["1", undefined],
  ]);
  expect(setupId(setup)).toBe(setupId(looseRing));
});
