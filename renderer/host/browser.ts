import { type Host, type HostEvent, type LogEntry, type Settings, type Surroundings, settingsSchema } from "../../shared-types/host";
import { listenForCommandKeys } from "./browser-commands";
import { exportDocument, importDocument, printDocument } from "./browser-documents";
import { browserDrafts, type WindowLocks, windowLocks } from "./browser-drafts";
import { listenForDrops } from "./browser-drops";
import { canOverwriteFiles } from "./browser-files";
import { browserSetups } from "./browser-setups";
import { indexedStore } from "./indexed-store";
import { firstOf, type KeyStore } from "./key-store";
import { attendServer, serverStore, serverStoreAddress } from "./server-store";

const LOG_KEPT = 200;
/** How often the open file is looked at for changes by another program, ms. */
const LOOK_AT_FILE_MS = 4000;

function systemOf(page: Window): Surroundings["system"] {
  const name = page.navigator.userAgent;
  return /Windows/.test(name) ? "windows" : /Mac OS/.test(name) ? "mac" : /Linux|X11|CrOS/.test(name) ? "linux" : "other";
}

/** What a test may put in place of the browser's own. */
export interface BrowserParts {
  readonly ownStore: KeyStore;
  readonly locks: WindowLocks;
  readonly now: () => number;
}

/**
 * The plain browser as surroundings: files through the File System Access API or by upload and download, drafts and settings behind the
 * local window server where there is one, else in the browser's own store.
 */
export function browserHost(page: Window, version: string, parts: Partial<BrowserParts> = {}): Host {
  const { ownStore = indexedStore("fieldtray"), locks = windowLocks(page), now = Date.now } = parts;
  const address = serverStoreAddress(page);
  const store = address === null ? ownStore : firstOf(serverStore(page, address), ownStore);
  const setups = browserSetups(page, ownStore, now);
  const drafts = browserDrafts(store, setups, page.crypto.randomUUID(), locks, now);
  const surroundings: Surroundings = { system: systemOf(page), version, canOverwrite: canOverwriteFiles(page), hasMenuBar: false };
  const log: string[] = [];
  let unsaved = false;
  let openHandle: string | null = null;

  const note = ({ level, message }: LogEntry): void => {
    log.push(`${new Date(now()).toISOString()} ${level} ${message}`);
    if (log.length > LOG_KEPT) log.shift();
  };

  page.addEventListener("beforeunload", (event) => {
    if (unsaved) event.preventDefault();
  });

  /** Tells of a change on disk once, and again only when it changes anew. */
  function watchOpenFile(take: (event: HostEvent) => void): () => void {
    let told: string | null = null;
    const look = async (): Promise<void> => {
      if (openHandle === null || page.document.visibilityState === "hidden") return;
      const change = await setups.changedOnDisk(openHandle);
      const sign = change === null ? null : `${openHandle} ${change.gone}`;
      if (change !== null && sign !== told) take({ kind: "changed-on-disk", ...change });
      told = sign;
    };
    const timer = page.setInterval(() => void look(), LOOK_AT_FILE_MS);
    const focus = (): void => void look();
    page.addEventListener("focus", focus);
    return () => {
      page.clearInterval(timer);
      page.removeEventListener("focus", focus);
    };
  }

  function listen(take: (event: HostEvent) => void): () => void {
    const arrived = async (file: File, fileHandle: FileSystemFileHandle | null): Promise<void> => {
      const outcome = await setups.arrived(file, fileHandle);
      if (outcome.kind === "opened") take({ kind: "file-arrived", file: outcome.file, text: outcome.text });
      else if (outcome.kind === "failed") take({ kind: "file-refused", message: outcome.message });
    };
    const stops = [
      listenForCommandKeys(page, surroundings.system === "mac", (command) => take({ kind: "command", command })),
      listenForDrops(page, (file, fileHandle) => void arrived(file, fileHandle)),
      watchOpenFile(take),
    ];
    if (address !== null) {
      const attend = attendServer(page, (arrival) => {
        if ("refused" in arrival) take({ kind: "file-refused", message: arrival.refused });
        else void arrived(new File([arrival.text], arrival.name), null);
      });
      stops.push(attend);
    }
    return () => {
      for (const stop of stops) stop();
    };
  }

  async function readSettings(): Promise<Settings> {
    const parsed = settingsSchema.safeParse(await store.read("settings").catch(() => undefined));
    return parsed.success ? parsed.data : settingsSchema.parse({});
  }

  return {
    kind: "browser",
    surroundings,
    listen,
    openFile: setups.open,
    readFile: setups.read,
    saveFile: setups.save,
    exportFile: (request) => exportDocument(page, request),
    importText: (kind) => importDocument(page, kind),
    printPdf: (request) => printDocument(page, request, address),
    recentFiles: setups.recent,
    forgetRecent: setups.forget,
    writeDraft: drafts.write,
    clearDraft: drafts.clear,
    keptDrafts: drafts.kept,
    discardDraft: drafts.discard,
    readSettings,
    writeSettings: (settings) => store.write("settings", settings),
    setTitle: (title) => {
      unsaved = title.unsaved;
      openHandle = title.handle;
      page.document.title = `${title.unsaved ? "• " : ""}${title.name} – Fieldtray`;
    },
    closeWindow: () => {
      unsaved = false;
      page.close();
    },
    copyText: (text) =>
      page.navigator.clipboard.writeText(text).then(
        () => true,
        () => false,
      ),
    log: note,
    details: async () => [`Fieldtray ${version} in a browser`, page.navigator.userAgent, ...log].join("\n"),
  };
}
