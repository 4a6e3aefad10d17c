import { expect, it } from "vitest";
import { createDocument } from "../../../renderer/document/document";
import { EXAMPLES } from "../../../renderer/examples/all-examples";
import { filesOf } from "../../../renderer/panels/files";
import { picturedOf } from "../../../renderer/panels/tray-picture";
import { createWindowStore } from "../../../renderer/panels/window-state";
import type { Host, KeptDraft } from "../../../shared-types/host";
import { setupText } from "../../../shared-types/parse-setup";

const [saved, edited] = [EXAMPLES[0].setup, EXAMPLES[1].setup];
const offered = (more: Partial<KeptDraft>) => {
  const document = createDocument(saved);
  const files = filesOf({} as Host, document, createWindowStore());
  const draft: KeptDraft = {
    id: "w",
    title: edited.title,
    keptAtMs: Date.UTC(2026, 11, 1, 9, 5),
    file: { handle: "h", name: "bench.fieldtray.json", place: "" },
    text: setupText(edited),
    saved: setupText(saved),
    ...more,
  };
  return files.offerKept(draft, 1);
};

it("work that was left behind is offered with its time and picture, beside the picture of what is saved", () => {
  const { pictures = [], lines } = offered({});
  expect(lines[0]).toMatch(/2026/);
  expect(pictures.map(({ pictured }) => pictured)).toEqual([picturedOf(edited), picturedOf(saved)]);
  expect(pictures[0].caption).toMatch(/^Kept .*2026/);
  expect(pictures[1].caption).toBe("Saved in bench.fieldtray.json");
});

it("work that was never saved, or whose file is gone or damaged, is offered with its own picture alone", () => {
  for (const more of [{ file: null, saved: null }, { saved: null }, { saved: "{" }]) {
    expect(offered(more).pictures?.map(({ pictured }) => pictured)).toEqual([picturedOf(edited)]);
  }
});
