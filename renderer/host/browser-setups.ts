import type { FileHandle, OpenOutcome, RecentFile, SaveOutcome, SaveRequest } from "../../shared-types/host";
import {
  canOverwriteFiles,
  download,
  inPlainWords,
  isAllowed,
  mayUse,
  pickFile,
  pickTarget,
  SETUP_TYPE,
  type SeenFile,
  textOf,
  writeThrough,
} from "./browser-files";
import type { KeyStore } from "./key-store";

const RECENT_KEPT = 10;
const RECENT_KEY = "recent";

interface KeptRecent {
  readonly handle: string;
  readonly name: string;
  readonly openedAtMs: number;
  readonly fileHandle: FileSystemFileHandle;
}

/** The setup files that this window knows by handle. */
export interface BrowserSetups {
  readonly open: () => Promise<OpenOutcome>;
  readonly read: (handle: string) => Promise<OpenOutcome>;
  readonly save: (request: SaveRequest) => Promise<SaveOutcome>;
  readonly recent: () => Promise<readonly RecentFile[]>;
  readonly forget: (handle: string) => Promise<void>;
  /** A file that was dropped on the window. */
  readonly arrived: (file: File, fileHandle: FileSystemFileHandle | null) => Promise<OpenOutcome>;
  /** @returns when the file of a handle was last seen to change, null when it is not known. */
  readonly lastSeen: (handle: string) => number | null;
  /** Makes a handle of an earlier session known again, as it was last seen. @returns null when nothing is kept of it. */
  readonly recall: (handle: string, lastModified: number) => Promise<FileHandle | null>;
  /** @returns what a known file holds now, if the browser lets it be read without a question; it does not count as seen. */
  readonly glimpse: (handle: string) => Promise<string | null>;
  /** @returns whether another program changed the file since it was last seen, or took it away; null when it did neither. */
  readonly changedOnDisk: (handle: string) => Promise<{ readonly file: FileHandle; readonly gone: boolean } | null>;
}

const shown = (handle: string, { name }: { name: string }): FileHandle => ({ handle, name, place: "" });

/** @param recentStore keeps the browser's own file handles, so it has to be the browser's own store. */
export function browserSetups(page: Window, recentStore: KeyStore, now: () => number): BrowserSetups {
  const known = new Map<string, SeenFile>();

  const kept = async (): Promise<readonly KeptRecent[]> => {
    const list = await recentStore.read(RECENT_KEY).catch(() => undefined);
    return Array.isArray(list) ? list : [];
  };

  /** @returns the handle of a file, the same one whenever it is the same file on disk. */
  async function handleOf(file: SeenFile): Promise<string> {
    const { fileHandle } = file;
    if (fileHandle === null) return page.crypto.randomUUID();
    const list = await kept();
    for (const entry of list) if (await entry.fileHandle.isSameEntry(fileHandle)) return entry.handle;
    return page.crypto.randomUUID();
  }

  async function note(handle: string, { name, fileHandle }: SeenFile): Promise<void> {
    if (fileHandle === null) return;
    const others = (await kept()).filter((entry) => entry.handle !== handle);
    const entry: KeptRecent = { handle, name, openedAtMs: now(), fileHandle };
    await recentStore.write(RECENT_KEY, [entry, ...others].slice(0, RECENT_KEPT)).catch(() => {});
  }

  async function taken(file: File, fileHandle: FileSystemFileHandle | null): Promise<OpenOutcome> {
    try {
      const text = await textOf(file);
      const seen = { name: file.name, fileHandle, lastModified: file.lastModified };
      const handle = await handleOf(seen);
      known.set(handle, seen);
      await note(handle, seen);
      return { kind: "opened", file: shown(handle, seen), text };
    } catch (error) {
      return { kind: "failed", message: inPlainWords(error, file.name, "read") };
    }
  }

  async function open(): Promise<OpenOutcome> {
    const picked = await pickFile(page, SETUP_TYPE);
    return picked === null ? { kind: "cancelled" } : taken(picked.file, picked.fileHandle);
  }

  async function read(handle: string): Promise<OpenOutcome> {
    const file = known.get(handle) ?? (await kept()).find((entry) => entry.handle === handle);
    if (file === undefined || file.fileHandle === null) {
      return { kind: "failed", message: `${file?.name ?? "This file"} has to be picked again: the browser keeps no way to it.` };
    }
    try {
      if (!(await mayUse(file.fileHandle, "read"))) return { kind: "cancelled" };
      return await taken(await file.fileHandle.getFile(), file.fileHandle);
    } catch (error) {
      return { kind: "failed", message: inPlainWords(error, file.name, "read") };
    }
  }

  async function changedOnDisk(handle: string): Promise<{ file: FileHandle; gone: boolean } | null> {
    const file = known.get(handle);
    if (file === undefined || file.fileHandle === null) return null;
    try {
      const { lastModified } = await file.fileHandle.getFile();
      return lastModified === file.lastModified ? null : { file: shown(handle, file), gone: false };
    } catch (error) {
      const gone = error instanceof DOMException && error.name === "NotFoundError";
      return gone ? { file: shown(handle, file), gone } : null;
    }
  }

  async function glimpse(handle: string): Promise<string | null> {
    const fileHandle = known.get(handle)?.fileHandle ?? null;
    if (fileHandle === null || !(await isAllowed(fileHandle, "read"))) return null;
    return fileHandle
      .getFile()
      .then(textOf)
      .catch(() => null);
  }

  async function saveTo(handle: string, file: SeenFile, content: Blob): Promise<SaveOutcome> {
    if (file.fileHandle === null) {
      download(page, file.name, content);
      known.set(handle, file);
    } else {
      if (!(await mayUse(file.fileHandle, "readwrite"))) return { kind: "cancelled" };
      known.set(handle, { ...file, lastModified: await writeThrough(file.fileHandle, content) });
      await note(handle, file);
    }
    return { kind: "saved", file: shown(handle, file) };
  }

  async function save({ handle, suggestedName, text, overwrite }: SaveRequest): Promise<SaveOutcome> {
    const content = new Blob([text], { type: "application/json" });
    const file = handle === null ? undefined : known.get(handle);
    try {
      // A file that came without the browser's handle (dropped, handed over) can only be written where the user says.
      if (handle !== null && file !== undefined && (file.fileHandle !== null || !canOverwriteFiles(page))) {
        const change = overwrite ? null : await changedOnDisk(handle);
        return change === null ? await saveTo(handle, file, content) : { kind: "changed", ...change };
      }
      const target = await pickTarget(page, file?.name ?? suggestedName, SETUP_TYPE);
      if (target === null) return { kind: "cancelled" };
      const fresh: SeenFile = { name: target?.name ?? suggestedName, fileHandle: target ?? null, lastModified: 0 };
      return await saveTo(await handleOf(fresh), fresh, content);
    } catch (error) {
      return { kind: "failed", message: inPlainWords(error, file?.name ?? suggestedName, "written") };
    }
  }

  return {
    open,
    read,
    save,
    recent: async () => (await kept()).map((entry) => ({ file: shown(entry.handle, entry), openedAtMs: entry.openedAtMs })),
    forget: async (handle) => {
      const others = (await kept()).filter((entry) => entry.handle !== handle);
      await recentStore.write(RECENT_KEY, others).catch(() => {});
    },
    arrived: taken,
    lastSeen: (handle) => known.get(handle)?.lastModified ?? null,
    recall: async (handle, lastModified) => {
      const entry = (await kept()).find((one) => one.handle === handle);
      if (entry === undefined) return null;
      known.set(handle, { name: entry.name, fileHandle: entry.fileHandle, lastModified });
      return shown(handle, entry);
    },
    glimpse,
    changedOnDisk,
  };
}
