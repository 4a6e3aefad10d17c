import { LARGEST_FILE_BYTES } from "../../shared-types/parse-setup";

/**
 * Picking, reading and writing files in a plain browser: through the File System Access API where it is there, else by upload and
 * download. Part of the API that TypeScript's own page types leave out is declared here.
 */

export interface FileType {
  readonly description: string;
  readonly accept: Readonly<Record<string, readonly string[]>>;
}

interface FileSystemWindow {
  showOpenFilePicker?: (options: { types: readonly FileType[]; multiple: false }) => Promise<FileSystemFileHandle[]>;
  showSaveFilePicker?: (options: { suggestedName: string; types: readonly FileType[] }) => Promise<FileSystemFileHandle>;
}

interface PermissionHandle {
  queryPermission?: (wanted: { mode: "read" | "readwrite" }) => Promise<PermissionState>;
  requestPermission?: (wanted: { mode: "read" | "readwrite" }) => Promise<PermissionState>;
}

export const SETUP_TYPE: FileType = { description: "Fieldtray setup", accept: { "application/json": [".json"] } };

/** @returns whether the browser lets a page write to the files that the user picks. */
export const canOverwriteFiles = (page: Window): boolean => (page as Window & FileSystemWindow).showSaveFilePicker !== undefined;

const isAbort = (error: unknown): boolean => error instanceof DOMException && error.name === "AbortError";

/** A file that was picked: the browser's handle where it gives one, and the state in which it was last seen. */
export interface SeenFile {
  readonly name: string;
  readonly fileHandle: FileSystemFileHandle | null;
  readonly lastModified: number;
}

/** A reason, in a sentence for a person, why a file cannot be used. */
export class FileRefusal extends Error {}

/** Reads a file as text. Throws a FileRefusal when it is too large or not UTF-8. */
export async function textOf(file: File): Promise<string> {
  if (file.size > LARGEST_FILE_BYTES) {
    throw new FileRefusal(`${file.name} holds ${(file.size / 1024 / 1024).toFixed(1)} MB, allowed: at most 5 MB.`);
  }
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(await file.arrayBuffer());
  } catch (error) {
    if (error instanceof TypeError) throw new FileRefusal(`${file.name} is not a text file (UTF-8).`);
    throw error;
  }
}

/** @returns what an error means for a person who deals with the file of that name. */
export function inPlainWords(error: unknown, name: string, doing: "read" | "written"): string {
  if (error instanceof FileRefusal) return error.message;
  if (error instanceof DOMException) {
    if (error.name === "NotFoundError") return `${name} is no longer there.`;
    if (error.name === "NotAllowedError" || error.name === "SecurityError" || error.name === "NoModificationAllowedError") {
      return `${name} may not be ${doing}: the browser or the folder refuses it.`;
    }
    if (error.name === "QuotaExceededError") return `${name} could not be ${doing}: the disk is full.`;
  }
  return `${name} could not be ${doing}: ${error instanceof Error ? error.message : String(error)}`;
}

/** Asks for a file. @returns it, or null when the user changed their mind. */
export async function pickFile(page: Window, type: FileType): Promise<{ file: File; fileHandle: FileSystemFileHandle | null } | null> {
  const { showOpenFilePicker } = page as Window & FileSystemWindow;
  if (showOpenFilePicker === undefined) return uploadFile(page, type);
  try {
    const [fileHandle] = await showOpenFilePicker.call(page, { types: [type], multiple: false });
    return { file: await fileHandle.getFile(), fileHandle };
  } catch (error) {
    if (isAbort(error)) return null;
    throw error;
  }
}

function uploadFile(page: Window, type: FileType): Promise<{ file: File; fileHandle: null } | null> {
  return new Promise((resolve) => {
    const input = page.document.createElement("input");
    input.type = "file";
    input.accept = Object.entries(type.accept)
      .flatMap(([mime, endings]) => [mime, ...endings])
      .join(",");
    input.addEventListener("cancel", () => resolve(null));
    input.addEventListener("change", () => {
      const file = input.files?.[0];
      resolve(file === undefined ? null : { file, fileHandle: null });
    });
    input.click();
  });
}

/** Asks where to save. @returns the handle; null when the user changed their mind; undefined where the browser cannot ask. */
export async function pickTarget(page: Window, suggestedName: string, type: FileType): Promise<FileSystemFileHandle | null | undefined> {
  const { showSaveFilePicker } = page as Window & FileSystemWindow;
  if (showSaveFilePicker === undefined) return undefined;
  try {
    return await showSaveFilePicker.call(page, { suggestedName, types: [type] });
  } catch (error) {
    if (isAbort(error)) return null;
    throw error;
  }
}

/** @returns whether this page may use a file as it is, without a question. */
export async function isAllowed(fileHandle: FileSystemFileHandle, mode: "read" | "readwrite"): Promise<boolean> {
  const { queryPermission } = fileHandle as FileSystemFileHandle & PermissionHandle;
  return queryPermission === undefined || (await queryPermission.call(fileHandle, { mode })) === "granted";
}

/** Asks the user, where the browser wants it, whether this page may use a file that was picked in an earlier session. */
export async function mayUse(fileHandle: FileSystemFileHandle, mode: "read" | "readwrite"): Promise<boolean> {
  const { queryPermission, requestPermission } = fileHandle as FileSystemFileHandle & PermissionHandle;
  if (queryPermission === undefined || requestPermission === undefined) return true;
  if ((await queryPermission.call(fileHandle, { mode })) === "granted") return true;
  return (await requestPermission.call(fileHandle, { mode })) === "granted";
}

/** Writes through a handle: the browser swaps the finished file in when it is closed, so the old one stays whole until then. */
export async function writeThrough(fileHandle: FileSystemFileHandle, content: Blob): Promise<number> {
  const writable = await fileHandle.createWritable();
  try {
    await writable.write(content);
    await writable.close();
  } catch (error) {
    await writable.abort().catch(() => {});
    throw error;
  }
  return (await fileHandle.getFile()).lastModified;
}

/** Offers a download. */
export function download(page: Window, name: string, content: Blob): void {
  const address = URL.createObjectURL(content);
  const link = page.document.createElement("a");
  link.href = address;
  link.download = name;
  link.click();
  page.setTimeout(() => URL.revokeObjectURL(address), 60_000);
}
