import type { FileHandle, Host, KeptDraft, OpenOutcome } from "../../shared-types/host";
import { parseSetup, parseSetupText, setupText } from "../../shared-types/parse-setup";
import type { Setup } from "../../shared-types/setup";
import type { Document } from "../document/document";
import type { Message, WindowStore } from "./window-state";

/** Opening and saving: what host, document and window do together. */
export interface Files {
  readonly newSetup: () => void;
  readonly open: () => Promise<void>;
  readonly openRecent: (handle: string) => Promise<void>;
  /** @returns whether the setup is saved now. */
  readonly save: (as?: boolean) => Promise<boolean>;
  /** Takes a file that arrived by itself. */
  readonly take: (file: FileHandle, text: string) => void;
  readonly showExample: (title: string, setup: Setup) => void;
  readonly bringBack: (draft: KeptDraft) => void;
  /** @returns the question that a start after a crash asks about the newest of `count` kept drafts. */
  readonly offerKept: (draft: KeptDraft, count: number) => Omit<Message, "id">;
}

const EMPTY_TRAY: unknown = {
  format: "fieldtray.setup",
  version: 1,
  title: "New tray",
  tray: { shape: "rectangle", lengthMm: 300, widthMm: 200 },
  water: { depthMm: 12, conductivityUsPerCm: 500 },
  supply: { waveform: "ac", frequencyHz: 50, volts: 6 },
  parts: [],
};

/** @returns an empty bench tray of 300 mm × 200 mm. */
export function emptyTray(): Setup {
  const parsed = parseSetup(EMPTY_TRAY);
  if (!parsed.ok) throw new Error("the empty tray is no setup");
  return parsed.value;
}

const nameFor = (setup: Setup): string => {
  const plain = setup.title
    .toLowerCase()
    .replace(/[^\p{L}\p{N}]+/gu, "-")
    .replace(/^-+|-+$/g, "");
  return `${plain === "" ? "tray" : plain}.fieldtray.json`;
};

export function filesOf(host: Host, document: Document, window: WindowStore): Files {
  const fail = (title: string, lines: readonly string[]): void => {
    window.tell({
      tone: "problem",
      title,
      lines,
      choices: [
        {
          label: "Copy details",
          choose: () => void host.details().then((details) => host.copyText(`${title}\n${lines.join("\n")}\n${details}`)),
        },
      ],
    });
  };

  /** Nothing that the user had is lost: replacing is an undo step, and unsaved work stays a step back. */
  function replaceBy(setup: Setup, label: string, file: FileHandle | null, unsaved = false): void {
    document.replace(setup, { label, file, unsaved });
    window.set({ startPage: false });
  }

  function take(file: FileHandle, text: string): void {
    const parsed = parseSetupText(text);
    if (parsed.ok) replaceBy(parsed.value, `open ${file.name}`, file);
    else
      fail(
        `${file.name} was not opened. Your tray is unchanged.`,
        parsed.problems.slice(0, 6).map(({ message }) => message),
      );
  }

  function takeOutcome(outcome: OpenOutcome): void {
    if (outcome.kind === "opened") take(outcome.file, outcome.text);
    else if (outcome.kind === "failed") fail("The file was not opened.", [outcome.message]);
  }

  async function save(as = false, overwrite = false): Promise<boolean> {
    const { setup, file } = document.getState();
    const handle = as ? null : (file?.handle ?? null);
    const outcome = await host.saveFile({ handle, suggestedName: file?.name ?? nameFor(setup), text: setupText(setup), overwrite });
    switch (outcome.kind) {
      case "saved":
        document.markSaved(setup, outcome.file);
        return true;
      case "cancelled":
        return false;
      case "failed":
        fail("The setup was not saved.", [outcome.message]);
        return false;
      case "changed": {
        const taken = window.tell({
          tone: "question",
          title: outcome.gone
            ? `${outcome.file.name} is no longer there.`
            : `Another program changed ${outcome.file.name} since it was read.`,
          lines: ["Nothing has been written yet."],
          choices: [
            { label: "Write mine over it", choose: () => void save(false, true).then(() => taken()) },
            { label: "Save under another name", choose: () => void save(true).then(() => taken()) },
          ],
        });
        return false;
      }
    }
  }

  function bringBack(draft: KeptDraft): void {
    const parsed = parseSetupText(draft.text);
    if (parsed.ok) {
      replaceBy(parsed.value, `bring back ${draft.title}`, draft.file, true);
      void host.discardDraft(draft.id);
    } else
      fail(
        "The kept work cannot be read.",
        parsed.problems.slice(0, 3).map(({ message }) => message),
      );
  }

  function offerKept(draft: KeptDraft, count: number): Omit<Message, "id"> {
    const name = draft.title === "" ? "An untitled tray" : draft.title;
    const at = new Date(draft.keptAtMs).toLocaleString(undefined, { dateStyle: "medium", timeStyle: "short" });
    return {
      tone: "question",
      title: `${name} was left behind unsaved`,
      lines: [
        `Kept ${at}${draft.file === null ? ", never saved" : `, from ${draft.file.name}`}.${count > 1 ? ` ${count - 1} more on the start page.` : ""}`,
      ],
      choices: [
        { label: "Bring it back", choose: () => bringBack(draft) },
        { label: "Not wanted", choose: () => void host.discardDraft(draft.id) },
      ],
    };
  }

  return {
    newSetup: () => replaceBy(emptyTray(), "new tray", null),
    open: async () => takeOutcome(await host.openFile()),
    openRecent: async (handle) => takeOutcome(await host.readFile(handle)),
    save,
    take,
    showExample: (title, setup) => replaceBy(setup, `open example ${title}`, null),
    bringBack,
    offerKept,
  };
}
