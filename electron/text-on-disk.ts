import { createHash } from "node:crypto";
import { readFile, stat } from "node:fs/promises";
import { basename, dirname } from "node:path";
import { LARGEST_FILE_BYTES } from "../shared-types/parse-setup";

/** A file as it was last seen: enough to tell whether another program has changed it since. */
export interface Sighting {
  readonly mtimeMs: number;
  readonly sizeBytes: number;
  /** SHA-256 of the content, so that a file that was only touched does not count as changed. */
  readonly digest: string;
}

/** A reason, in one sentence for a person, why a file cannot be used. */
export class FileRefusal extends Error {}

export const digestOf = (content: string | Uint8Array): string => createHash("sha256").update(content).digest("hex");

/** Reads a text file whole. Throws a FileRefusal when it is too large or not UTF-8, and the system's error when it cannot be read. */
export async function readText(path: string): Promise<{ readonly text: string; readonly sighting: Sighting }> {
  const name = basename(path);
  const found = await stat(path);
  const { mtimeMs, size } = found;
  if (!found.isFile()) throw new FileRefusal(`${name} is not an ordinary file.`);
  if (size > LARGEST_FILE_BYTES) {
    throw new FileRefusal(`${name} holds ${(size / 1024 / 1024).toFixed(1)} MB, allowed: at most 5 MB.`);
  }
  const content = await readFile(path);
  let text: string;
  try {
    text = new TextDecoder("utf-8", { fatal: true }).decode(content);
  } catch {
    throw new FileRefusal(`${name} is not a text file (UTF-8).`);
  }
  return { text, sighting: { mtimeMs, sizeBytes: content.byteLength, digest: digestOf(content) } };
}

/** @returns how the file looks now; null when it is gone. */
export async function lookAt(path: string): Promise<Sighting | null> {
  try {
    const { mtimeMs, size } = await stat(path);
    return { mtimeMs, sizeBytes: size, digest: digestOf(await readFile(path)) };
  } catch (error) {
    if (codeOf(error) === "ENOENT" || codeOf(error) === "ENOTDIR") return null;
    throw error;
  }
}

/** @returns `same`, `changed` or `gone`, looking into the file only when its time or size differ. */
export async function comparedWith(path: string, seen: Sighting): Promise<"same" | "changed" | "gone"> {
  try {
    const { mtimeMs, size } = await stat(path);
    if (mtimeMs === seen.mtimeMs && size === seen.sizeBytes) return "same";
  } catch (error) {
    if (codeOf(error) !== "ENOENT" && codeOf(error) !== "ENOTDIR") throw error;
    return "gone";
  }
  const now = await lookAt(path);
  return now === null ? "gone" : now.digest === seen.digest ? "same" : "changed";
}

export const codeOf = (error: unknown): string => (error instanceof Error && "code" in error ? String(error.code) : "");

/** @returns what went wrong with a file, in one sentence for a person. */
export function inPlainWords(error: unknown, path: string, doing: "read" | "saved"): string {
  if (error instanceof FileRefusal) return error.message;
  const [name, folder] = [basename(path), dirname(path)];
  switch (codeOf(error)) {
    case "ENOENT":
    case "ENOTDIR":
      return doing === "read" ? `${name} is no longer in ${folder}.` : `The folder ${folder} is no longer there; save under another place.`;
    case "EACCES":
    case "EPERM":
      return `${name} may not be ${doing}: ${folder} does not allow it${doing === "saved" ? "; save under another place" : ""}.`;
    case "EROFS":
      return `${name} could not be saved: ${folder} can only be read; save under another place.`;
    case "ENOSPC":
    case "EDQUOT":
      return `${name} could not be saved: the disk is full. The file on the disk is still the one from before.`;
    case "EISDIR":
      return `${name} is not an ordinary file.`;
    case "EBUSY":
      return `${name} is held by another program; close it there and try again.`;
    default:
      return `${name} could not be ${doing}: ${error instanceof Error ? error.message : String(error)}`;
  }
}
