import { afterEach, expect, it, vi } from "vitest";
import { EXAMPLES } from "../../../renderer/examples/all-examples";
import { handOverOf } from "../../../renderer/panels/hand-over";
import { FIRST_CHOICE, type SheetSource, sheetChoiceOf } from "../../../renderer/panels/sheet-choice";
import { createWindowStore } from "../../../renderer/panels/window-state";
import { texts } from "../../../renderer/texts/texts";
import { type Host, settingsSchema } from "../../../shared-types/host";
import { planned } from "../sheets/packs";

const words = texts.sheets;
const [{ setup }] = EXAMPLES;

afterEach(() => {
  vi.restoreAllMocks();
});

/** A printer's desk whose pages take `pageMs` each by a clock of its own, and what was handed to a file. */
async function deskWith(pages: number, pageMs: number) {
  const plan = await planned(setup);
  const exported: string[] = [];
  const host = {
    exportFile: async ({ suggestedName }: { suggestedName: string }) => {
      exported.push(suggestedName);
      return { kind: "saved", name: suggestedName };
    },
  } as unknown as Host;
  let clock = 0;
  vi.spyOn(performance, "now").mockImplementation(() => clock);
  const source: Pick<SheetSource, "pdf"> = {
    pdf: async (_setup, _plan, _choice, { onPage, signal }) => {
      for (let page = 1; page <= pages; page++) {
        await new Promise((resolve) => setTimeout(resolve));
        clock += pageMs;
        if (signal.aborted) return null;
        onPage(page, pages);
      }
      return new Uint8Array([1]);
    },
  };
  const window = createWindowStore();
  const choice = sheetChoiceOf(FIRST_CHOICE, settingsSchema.parse({}));
  const handOver = handOverOf(
    host,
    window,
    async () => ({ setup, plan }),
    () => choice,
    async () => source as SheetSource,
    () => "",
    { png: async () => new Uint8Array([137, 80, 78, 71]), title: () => "Two bars" },
  );
  const working = () => window.getState().messages.find(({ tone }) => tone === "working");
  return { handOver, window, exported, working };
}

it("a pack that is made at once is saved without a word of progress", async () => {
  const { handOver, window, exported } = await deskWith(3, 1);
  const tones: string[] = [];
  window.subscribe(({ messages }) => tones.push(...messages.map(({ tone }) => tone)));
  await handOver.savePdf();
  expect(exported).toEqual([`${setup.title}.pdf`]);
  expect(tones).not.toContain("working");
  expect(window.getState().messages.map(({ title }) => title)).toEqual([words.saved(`${setup.title}.pdf`)]);
});

it("a long pack shows how far it is, and takes the word away when it is saved", async () => {
  const { handOver, window, exported, working } = await deskWith(30, 30);
  const shares: number[] = [];
  window.subscribe(() => {
    const share = working()?.progress;
    if (share !== undefined && share > 0 && share !== shares.at(-1)) shares.push(share);
  });
  await handOver.savePdf();
  expect(shares.length).toBeGreaterThan(3);
  expect([...shares].sort((a, b) => a - b)).toEqual(shares);
  expect(shares.at(-1)).toBe(1);
  expect(exported).toHaveLength(1);
  expect(working()).toBeUndefined();
});

it("a pack that is stopped leaves no file, no complaint and no card", async () => {
  const { handOver, window, exported, working } = await deskWith(100_000, 30);
  const done = handOver.savePdf();
  await vi.waitFor(() => expect(working()).toBeDefined(), { timeout: 20_000 });
  const [stop] = working()?.choices ?? [];
  expect(stop?.label).toBe(words.stopSetting);
  stop?.choose();
  await done;
  expect(exported).toEqual([]);
  expect(window.getState().messages).toEqual([]);
});
