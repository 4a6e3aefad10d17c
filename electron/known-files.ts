import { createHash } from "node:crypto";
import { basename, dirname, resolve } from "node:path";
import type { FileHandle, OpenOutcome, SaveOutcome } from "../shared-types/host";
import { saveWhole } from "./save-whole";
import { comparedWith, inPlainWords, lookAt, readText, type Sighting } from "./text-on-disk";

/**
 * The files that the user picked, under opaque handles: the only way in which the window can name one. Each is remembered as it was last
 * seen, so that a change by another program is noticed before anything is overwritten.
 */
export interface KnownFiles {
  /** @returns the handle of a path that the user chose; the same path always has the same handle, also in the next session. */
  readonly handleOf: (path: string) => FileHandle;
  /** @returns the path behind a handle, or null for a handle that was never given out. */
  readonly pathOf: (handle: string) => string | null;
  readonly sightingOf: (handle: string) => Sighting | null;
  /** Makes a file known as it was seen in an earlier session. */
  readonly recall: (path: string, seen: Sighting | null) => FileHandle;
  readonly read: (path: string) => Promise<OpenOutcome>;
  /** Writes the whole text unless the file has changed since it was last seen (`overwrite`: even then). */
  readonly save: (path: string, text: string, overwrite: boolean) => Promise<SaveOutcome>;
  /** @returns the change that another program made since the file was last seen, or null. */
  readonly changeOf: (handle: string) => Promise<{ readonly file: FileHandle; readonly gone: boolean } | null>;
}

interface Known {
  readonly path: string;
  seen: Sighting | null;
}

/** @param write saves a text to a path; a test may put a failing one in. */
export function knownFiles(write: (path: string, text: string) => Promise<void> = saveWhole): KnownFiles {
  const byHandle = new Map<string, Known>();
  const handles = new Map<string, string>();
  // Two saves of one file follow each other: the second one must see what the first one wrote.
  const running = new Map<string, Promise<unknown>>();

  function handleOf(path: string): FileHandle {
    const whole = resolve(path);
    let handle = handles.get(whole);
    if (handle === undefined) {
      // The same in every session, so that what is kept by handle is found again. It opens nothing before the file was picked here.
      handle = createHash("sha256").update(whole).digest("base64url");
      handles.set(whole, handle);
      byHandle.set(handle, { path: whole, seen: null });
    }
    return { handle, name: basename(whole), place: dirname(whole) };
  }

  function see(file: FileHandle, seen: Sighting | null): void {
    const known = byHandle.get(file.handle);
    if (known !== undefined) known.seen = seen;
  }

  async function read(path: string): Promise<OpenOutcome> {
    try {
      const { text, sighting } = await readText(path);
      const file = handleOf(path);
      see(file, sighting);
      return { kind: "opened", file, text };
    } catch (error) {
      return { kind: "failed", message: inPlainWords(error, path, "read") };
    }
  }

  async function changeOf(handle: string): Promise<{ file: FileHandle; gone: boolean } | null> {
    const known = byHandle.get(handle);
    if (known === undefined || known.seen === null) return null;
    const state = await comparedWith(known.path, known.seen);
    return state === "same" ? null : { file: handleOf(known.path), gone: state === "gone" };
  }

  async function saveNow(path: string, text: string, overwrite: boolean): Promise<SaveOutcome> {
    try {
      const file = handleOf(path);
      const change = overwrite ? null : await changeOf(file.handle);
      if (change !== null) return { kind: "changed", ...change };
      await write(path, text);
      see(file, await lookAt(path));
      return { kind: "saved", file };
    } catch (error) {
      return { kind: "failed", message: inPlainWords(error, path, "saved") };
    }
  }

  return {
    handleOf,
    pathOf: (handle) => byHandle.get(handle)?.path ?? null,
    sightingOf: (handle) => byHandle.get(handle)?.seen ?? null,
    recall: (path, seen) => {
      const file = handleOf(path);
      if (seen !== null) see(file, seen);
      return file;
    },
    read,
    save: (path, text, overwrite) => {
      const before = running.get(path) ?? Promise.resolve();
      const saving = before.then(() => saveNow(path, text, overwrite));
      running.set(path, saving);
      return saving;
    },
    changeOf,
  };
}
