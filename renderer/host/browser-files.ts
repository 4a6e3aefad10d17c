/**
 * Picking and writing files in a plain browser: through the File System Access API where it is there, else by upload and
 * download. Part of the API that TypeScript's own page types leave out is declared here.
 */

interface FileType {
  readonly description: string;
  readonly accept: Readonly<Record<string, readonly string[]>>;
}

interface FileSystemWindow {
  showOpenFilePicker?: (options: { types: readonly FileType[]; multiple: false }) => Promise<FileSystemFileHandle[]>;
  showSaveFilePicker?: (options: { suggestedName: string; types: readonly FileType[] }) => Promise<FileSystemFileHandle>;
}

export const SETUP_TYPE: FileType = { description: "Fieldtray setup", accept: { "application/json": [".json"] } };

const isAbort = (error: unknown): boolean => error instanceof DOMException && error.name === "AbortError";

/** A file that was picked: its name and text, and the browser's handle where it gives one. */
export interface BrowserFile {
  readonly name: string;
  readonly text: string;
  readonly lastModified: number;
  readonly fileHandle: FileSystemFileHandle | null;
}

export async function readFileHandle(fileHandle: FileSystemFileHandle): Promise<BrowserFile> {
  const file = await fileHandle.getFile();
  return { name: file.name, text: await file.text(), lastModified: file.lastModified, fileHandle };
}

/** Asks for a setup file. @returns it, or null when the user changed their mind. */
export async function pickFile(page: Window): Promise<BrowserFile | null> {
  const { showOpenFilePicker } = page as Window & FileSystemWindow;
  if (showOpenFilePicker === undefined) return uploadFile(page);
  try {
    const [fileHandle] = await showOpenFilePicker.call(page, { types: [SETUP_TYPE], multiple: false });
    return await readFileHandle(fileHandle);
  } catch (error) {
    if (isAbort(error)) return null;
    throw error;
  }
}

function uploadFile(page: Window): Promise<BrowserFile | null> {
  return new Promise((resolve, reject) => {
    const input = page.document.createElement("input");
    input.type = "file";
    input.accept = ".json,application/json";
    input.addEventListener("cancel", () => resolve(null));
    input.addEventListener("change", () => {
      const file = input.files?.[0];
      if (file === undefined) resolve(null);
      else file.text().then((text) => resolve({ name: file.name, text, lastModified: file.lastModified, fileHandle: null }), reject);
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

/** Writes through a handle: the browser swaps the finished file in when it is closed, so the old one stays whole until then. */
export async function writeFileHandle(fileHandle: FileSystemFileHandle, content: Blob): Promise<number> {
  const writable = await fileHandle.createWritable();
  await writable.write(content);
  await writable.close();
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
