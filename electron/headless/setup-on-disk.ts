import { readFile, stat } from "node:fs/promises";
import { LARGEST_FILE_BYTES, parseSetupText } from "../../shared-types/parse-setup";
import type { Setup } from "../../shared-types/setup";
import { wrong } from "./refusal";

const reasonOf = (error: unknown): string => {
  const code = error instanceof Error && "code" in error ? error.code : undefined;
  if (code === "ENOENT") return "there is no such file";
  if (code === "EISDIR") return "it is a folder, allowed: a setup file";
  if (code === "EACCES") return "permission denied";
  return error instanceof Error ? error.message : String(error);
};

/** @returns the bytes of a file; throws a refusal when it is missing, cannot be read or is too large. */
async function bytesOf(path: string): Promise<Uint8Array> {
  const tooLarge = (size: number) => wrong(`${path} holds ${size} bytes, allowed: at most ${LARGEST_FILE_BYTES} (5 MB)`);
  const { size } = await stat(path).catch((error: unknown) => {
    throw wrong(`${path} cannot be read: ${reasonOf(error)}`);
  });
  if (size > LARGEST_FILE_BYTES) throw tooLarge(size);
  const bytes = await readFile(path).catch((error: unknown) => {
    throw wrong(`${path} cannot be read: ${reasonOf(error)}`);
  });
  // A pipe tells its size only by being read.
  if (bytes.length > LARGEST_FILE_BYTES) throw tooLarge(bytes.length);
  return bytes;
}

/** @returns the setup in a file; throws a refusal that names every key that is wrong, its value and what is allowed. */
export async function readSetup(path: string): Promise<Setup> {
  const bytes = await bytesOf(path);
  let text: string;
  try {
    text = new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch {
    throw wrong(`${path}: the file is not UTF-8 text`);
  }
  const parsed = parseSetupText(text);
  if (parsed.ok) return parsed.value;
  throw wrong(parsed.problems.map(({ message }) => `${path}: ${message}`).join("\n"));
}
