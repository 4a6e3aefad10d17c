import type { FileHandle, Host, KeptDraft, OpenOutcome } from "../../shared-types/host";
import { parseSetup, parseSetupText, setupText } from "../../shared-types/parse-setup";
import type { Setup } from "../../shared-types/setup";
import type { Document } from "../document/document";
import { texts } from "../texts/texts";
import { picturedOf } from "./tray-picture";
import type { Message, WindowStore } from "./window-state";

const words = texts.files;

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
  title: words.newTitle,
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
  return `${plain === "" ? words.fileName : plain}.fieldtray.json`;
};

export function filesOf(host: Host, document: Document, window: WindowStore): Files {
  const fail = (title: string, lines: readonly string[]): void => {
    window.tell({ tone: "problem", title, lines, choices: [] });
  };

  /** Nothing that the user had is lost: replacing is an undo step, and unsaved work stays a step back. */
  function replaceBy(setup: Setup, label: string, file: FileHandle | null, unsaved = false): void {
    document.replace(setup, { label, file, unsaved });
    window.set({ startPage: false });
  }

  function take(file: FileHandle, text: string): void {
    const parsed = parseSetupText(text);
    if (parsed.ok) replaceBy(parsed.value, words.steps.open(file.name), file);
    else
      fail(
        words.notOpened(file.name),
        parsed.problems.slice(0, 6).map(({ message }) => message),
      );
  }

  function takeOutcome(outcome: OpenOutcome): void {
    if (outcome.kind === "opened") take(outcome.file, outcome.text);
    else if (outcome.kind === "failed") fail(words.noFileOpened, [outcome.message]);
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
        fail(words.notSaved, [outcome.message]);
        return false;
      case "changed": {
        const taken = window.tell({
          tone: "question",
          title: outcome.gone ? words.gone(outcome.file.name) : words.changed(outcome.file.name),
          lines: [words.nothingWritten],
          choices: [
            { label: words.writeOver, choose: () => void save(false, true).then(() => taken()) },
            { label: words.otherName, choose: () => void save(true).then(() => taken()) },
          ],
        });
        return false;
      }
    }
  }

  function bringBack(draft: KeptDraft): void {
    const parsed = parseSetupText(draft.text);
    if (parsed.ok) {
      replaceBy(parsed.value, words.steps.bringBack(draft.title), draft.file, true);
      void host.discardDraft(draft.id);
    } else
      fail(
        words.keptUnreadable,
        parsed.problems.slice(0, 3).map(({ message }) => message),
      );
  }

  function offerKept(draft: KeptDraft, count: number): Omit<Message, "id"> {
    const at = new Date(draft.keptAtMs).toLocaleString(undefined, { dateStyle: "medium", timeStyle: "short" });
    const pictureOf = (text: string | null, caption: string) => {
      const parsed = text === null ? null : parseSetupText(text);
      return parsed?.ok ? [{ caption, pictured: picturedOf(parsed.value) }] : [];
    };
    return {
      tone: "question",
      pictures: [...pictureOf(draft.text, words.offer.kept(at)), ...pictureOf(draft.saved, words.offer.saved(draft.file?.name ?? ""))],
      title: words.offer.title(draft.title === "" ? words.offer.untitled : draft.title),
      lines: [words.offer.line(at, draft.file?.name ?? null, count - 1)],
      choices: [
        { label: words.offer.bringBack, choose: () => bringBack(draft) },
        { label: words.start.notWanted, choose: () => void host.discardDraft(draft.id) },
      ],
    };
  }

  return {
    newSetup: () => replaceBy(emptyTray(), words.steps.fresh, null),
    open: async () => takeOutcome(await host.openFile()),
    openRecent: async (handle) => takeOutcome(await host.readFile(handle)),
    save,
    take,
    showExample: (title, setup) => replaceBy(setup, words.steps.example(title), null),
    bringBack,
    offerKept,
  };
}
