import {
  type Draft,
  draftSchema,
  type ExportOutcome,
  type Host,
  type LogEntry,
  type PickedFile,
  type RecentFile,
  type SaveOutcome,
  type Settings,
  settingsSchema,
} from "../../shared-types/host";
import { type BrowserFile, download, pickFile, pickTarget, readFileHandle, SETUP_TYPE, writeFileHandle } from "./browser-files";
import { type BrowserStore, browserStore } from "./browser-store";

const EXPORT_TYPES = {
  pdf: { description: "PDF document", mime: "application/pdf" },
  svg: { description: "SVG drawing", mime: "image/svg+xml" },
  dxf: { description: "DXF drawing", mime: "image/vnd.dxf" },
  csv: { description: "Table (CSV)", mime: "text/csv" },
  png: { description: "PNG picture", mime: "image/png" },
} as const;

const RECENT_KEPT = 10;
const LOG_KEPT = 200;

interface KnownFile {
  readonly name: string;
  readonly fileHandle: FileSystemFileHandle | null;
  readonly lastModified: number;
}

interface KeptRecent extends RecentFile {
  readonly fileHandle: FileSystemFileHandle;
}

const wording = (error: unknown): string => (error instanceof Error ? error.message : String(error));

/**
 * The plain browser as surroundings: files through the File System Access API or by upload and download, drafts and
 * settings in IndexedDB.
 */
export function browserHost(page: Window, version: string, store: BrowserStore = browserStore("fieldtray")): Host {
  const known = new Map<string, KnownFile>();
  const log: string[] = [];
  let unsaved = false;
  let nextHandle = 1;

  function remember(file: KnownFile): string {
    const handle = `file-${nextHandle++}`;
    known.set(handle, file);
    return handle;
  }

  async function noteRecent(handle: string, { name, fileHandle }: KnownFile): Promise<void> {
    if (fileHandle === null) return;
    const before = await keptRecent();
    const others = [];
    for (const entry of before) if (!(await entry.fileHandle.isSameEntry(fileHandle))) others.push(entry);
    const entry: KeptRecent = { handle, name, openedAt: new Date().toISOString(), fileHandle };
    await store.write("recent", [entry, ...others].slice(0, RECENT_KEPT)).catch(() => {});
  }

  const keptRecent = async (): Promise<readonly KeptRecent[]> => {
    const kept = await store.read("recent").catch(() => undefined);
    return Array.isArray(kept) ? kept : [];
  };

  async function taken(file: BrowserFile | null): Promise<PickedFile | null> {
    if (file === null) return null;
    const handle = remember(file);
    await noteRecent(handle, file);
    return { handle, name: file.name, text: file.text };
  }

  async function saveFile({ handle, suggestedName, text, overwrite }: Parameters<Host["saveFile"]>[0]): Promise<SaveOutcome> {
    const content = new Blob([text], { type: "application/json" });
    try {
      const file = handle === null ? undefined : known.get(handle);
      let target = file?.fileHandle ?? null;
      if (handle !== null && file !== undefined && target !== null) {
        const onDisk = await target.getFile().catch(() => null);
        if (!overwrite && onDisk !== null && onDisk.lastModified !== file.lastModified) return { kind: "changed", name: file.name };
      } else {
        const picked = await pickTarget(page, suggestedName, SETUP_TYPE);
        if (picked === null) return { kind: "cancelled" };
        target = picked ?? null;
      }
      if (target === null) {
        download(page, suggestedName, content);
        return { kind: "saved", handle: remember({ name: suggestedName, fileHandle: null, lastModified: 0 }), name: suggestedName };
      }
      const entry = { name: target.name, fileHandle: target, lastModified: await writeFileHandle(target, content) };
      const saved = handle !== null && file !== undefined ? handle : remember(entry);
      known.set(saved, entry);
      await noteRecent(saved, entry);
      return { kind: "saved", handle: saved, name: target.name };
    } catch (error) {
      return { kind: "failed", message: `${suggestedName} could not be saved: ${wording(error)}` };
    }
  }

  async function exportFile({ suggestedName, kind, bytes }: Parameters<Host["exportFile"]>[0]): Promise<ExportOutcome> {
    const { description, mime } = EXPORT_TYPES[kind];
    const content = new Blob([bytes.slice()], { type: mime });
    try {
      const target = await pickTarget(page, suggestedName, { description, accept: { [mime]: [`.${kind}`] } });
      if (target === null) return { kind: "cancelled" };
      if (target === undefined) download(page, suggestedName, content);
      else await writeFileHandle(target, content);
      return { kind: "saved", name: target?.name ?? suggestedName };
    } catch (error) {
      return { kind: "failed", message: `${suggestedName} could not be written: ${wording(error)}` };
    }
  }

  /** The browser's own PDF view prints at actual size (the file asks for it); an inner frame would be fitted to the page. */
  async function printPdf({ title, bytes }: Parameters<Host["printPdf"]>[0]): Promise<ExportOutcome> {
    const address = URL.createObjectURL(new Blob([bytes.slice()], { type: "application/pdf" }));
    const opened = page.open(address, "_blank");
    page.setTimeout(() => URL.revokeObjectURL(address), 600_000);
    if (opened !== null) return { kind: "saved", name: title };
    return exportFile({ suggestedName: `${title}.pdf`, kind: "pdf", bytes });
  }

  async function drafts(): Promise<readonly Draft[]> {
    const found: Draft[] = [];
    for (const key of await store.keys().catch(() => [])) {
      if (!key.startsWith("draft ")) continue;
      const parsed = draftSchema.safeParse(await store.read(key));
      if (parsed.success) found.push({ ...parsed.data, handle: null });
    }
    return found.sort((a, b) => (a.writtenAt < b.writtenAt ? 1 : -1));
  }

  async function readSettings(): Promise<Settings> {
    const parsed = settingsSchema.safeParse(await store.read("settings").catch(() => undefined));
    return parsed.success ? parsed.data : settingsSchema.parse({});
  }

  page.addEventListener("beforeunload", (event) => {
    if (unsaved) event.preventDefault();
  });

  const note = ({ level, message }: LogEntry): void => {
    log.push(`${new Date().toISOString()} ${level} ${message}`);
    if (log.length > LOG_KEPT) log.shift();
  };

  return {
    kind: "browser",
    openFile: async () => taken(await pickFile(page)),
    openRecent: async (handle) => {
      const entry = (await keptRecent()).find((one) => one.handle === handle);
      if (entry === undefined) return null;
      try {
        return await taken(await readFileHandle(entry.fileHandle));
      } catch (error) {
        note({ level: "warning", message: `a recent file could not be read: ${wording(error)}` });
        return null;
      }
    },
    recentFiles: async () => (await keptRecent()).map(({ handle, name, openedAt }) => ({ handle, name, openedAt })),
    saveFile,
    exportFile,
    printPdf,
    drafts,
    writeDraft: (draft) => store.write(`draft ${draft.id}`, draft),
    discardDraft: (id) => store.remove(`draft ${id}`),
    readSettings,
    writeSettings: (settings) => store.write("settings", settings),
    setTitle: (title) => {
      unsaved = title.unsaved;
      page.document.title = `${title.unsaved ? "• " : ""}${title.name} – Fieldtray`;
    },
    log: note,
    details: async () => [`Fieldtray ${version} in a browser`, page.navigator.userAgent, ...log].join("\n"),
    onFileArrived: (take) =>
      listenForDrops(page, async (file) => take({ handle: remember({ ...file, fileHandle: null }), name: file.name, text: file.text })),
    onMenuCommand: () => () => {},
    onCloseAsked: () => () => {},
  };
}

/** Files dropped on the window. @returns a way to stop listening. */
function listenForDrops(page: Window, take: (file: { name: string; text: string; lastModified: number }) => void): () => void {
  const hasFiles = (event: DragEvent): boolean => event.dataTransfer?.types.includes("Files") ?? false;
  const over = (event: DragEvent): void => {
    if (hasFiles(event)) event.preventDefault();
  };
  const drop = (event: DragEvent): void => {
    const file = event.dataTransfer?.files[0];
    if (!hasFiles(event) || file === undefined) return;
    event.preventDefault();
    void file.text().then((text) => take({ name: file.name, text, lastModified: file.lastModified }));
  };
  page.addEventListener("dragover", over);
  page.addEventListener("drop", drop);
  return () => {
    page.removeEventListener("dragover", over);
    page.removeEventListener("drop", drop);
  };
}
