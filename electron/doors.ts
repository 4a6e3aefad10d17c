import { clipboard, nativeTheme } from "electron";
import type { ExportOutcome, OpenOutcome, SaveOutcome, SaveRequest, Settings } from "../shared-types/host";
import type { Request } from "../shared-types/host-channels";
import type { Doors } from "./channels";
import { askForDocument, askForDocumentTarget, askForSetup, askForSetupTarget } from "./dialogs";
import type { Drafts } from "./drafts";
import type { KnownFiles } from "./known-files";
import type { Log } from "./log";
import type { OwnFile } from "./own-files";
import { printPdf } from "./printing";
import type { Recent } from "./recent";
import { saveWhole } from "./save-whole";
import { inPlainWords } from "./text-on-disk";
import type { OpenWindow, Windows } from "./windows";

export interface DoorParts {
  readonly files: KnownFiles;
  readonly recent: Recent;
  readonly drafts: Drafts;
  readonly settings: OwnFile<Settings>;
  readonly windows: Windows;
  readonly log: Log;
  readonly details: () => string;
}

/** Shows the window's frame and menus in the look that was chosen; high contrast follows the system's light or dark. */
export function followTheme(theme: Settings["theme"]): void {
  nativeTheme.themeSource = theme === "light" || theme === "dark" ? theme : "system";
}

function editText({ browserWindow }: OpenWindow, what: Request<"editText">): void {
  const { webContents } = browserWindow;
  const edits: Readonly<Record<Request<"editText">, () => void>> = {
    undo: () => webContents.undo(),
    redo: () => webContents.redo(),
    cut: () => webContents.cut(),
    copy: () => webContents.copy(),
    paste: () => webContents.paste(),
    delete: () => webContents.delete(),
    "select-all": () => webContents.selectAll(),
  };
  edits[what]();
}

/** @returns what stands behind each door of the bridge. */
export function doorsOf({ files, recent, drafts, settings, windows, log, details }: DoorParts): Doors {
  async function read(path: string | null): Promise<OpenOutcome> {
    if (path === null) return { kind: "cancelled" };
    const outcome = await files.read(path);
    if (outcome.kind === "opened") await noteRecent(path);
    return outcome;
  }

  /** A list of recent setups that cannot be kept is no reason to refuse the setup. */
  const noteRecent = (path: string): Promise<void> =>
    recent.note(path).catch((error: unknown) => log.write({ level: "warning", message: `recent files: ${String(error)}` }));

  async function save(window: OpenWindow, { handle, suggestedName, text, overwrite }: SaveRequest): Promise<SaveOutcome> {
    const known = handle === null ? null : files.pathOf(handle);
    const path = known ?? (await askForSetupTarget(window.browserWindow, suggestedName));
    if (path === null) return { kind: "cancelled" };
    // The system's dialog has asked about replacing a file that was picked there.
    const outcome = await files.save(path, text, overwrite || known === null);
    if (outcome.kind === "saved") await noteRecent(path);
    return outcome;
  }

  async function exportFile(window: OpenWindow, { suggestedName, kind, bytes }: Request<"exportFile">): Promise<ExportOutcome> {
    const path = await askForDocumentTarget(window.browserWindow, suggestedName, kind);
    if (path === null) return { kind: "cancelled" };
    try {
      await saveWhole(path, bytes, false);
      return { kind: "saved", name: files.handleOf(path).name };
    } catch (error) {
      return { kind: "failed", message: inPlainWords(error, path, "saved") };
    }
  }

  return {
    ready: (window) => windows.ready(window),
    openFile: async ({ browserWindow }) => read(await askForSetup(browserWindow)),
    readFile: (_window, handle) => read(files.pathOf(handle)),
    saveFile: save,
    exportFile,
    importText: async ({ browserWindow }, kind) => {
      const path = await askForDocument(browserWindow, kind);
      return path === null ? { kind: "cancelled" } : files.read(path);
    },
    printPdf: ({ browserWindow }, request) => printPdf(browserWindow, request),
    recentFiles: async () => [...(await recent.list())],
    forgetRecent: async (_window, handle) => {
      const path = files.pathOf(handle);
      if (path !== null) await recent.forget(path);
    },
    writeDraft: ({ draftId }, draft) => drafts.write(draftId, draft),
    clearDraft: ({ draftId }) => drafts.clear(draftId),
    keptDrafts: async () => [...(await drafts.kept(new Set(windows.all().map(({ draftId }) => draftId))))],
    discardDraft: (_window, id) => drafts.clear(id),
    readSettings: () => settings.read(),
    writeSettings: async (_window, changed) => {
      followTheme(changed.theme);
      await settings.write(changed);
    },
    setTitle: (window, title) => windows.show(window, title),
    closeWindow: ({ browserWindow }) => browserWindow.destroy(),
    copyText: (_window, text) => {
      clipboard.writeText(text);
      return true;
    },
    editText: (window, what) => editText(window, what),
    log: (_window, entry) => log.write({ ...entry, message: `window: ${entry.message}` }),
    details: () => details(),
  };
}
