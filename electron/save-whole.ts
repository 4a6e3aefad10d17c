import { randomBytes } from "node:crypto";
import { constants, type PathLike } from "node:fs";
import { chmod, copyFile, link, open, readdir, realpath, rename, rm, stat } from "node:fs/promises";
import { basename, dirname, join } from "node:path";

/**
 * Saving that can be cut off at any moment: the text goes to a temporary file beside the target, is flushed to the disk, and takes the
 * target's name in one step. Whoever looks finds the whole old file or the whole new one. The version before stays as a file of its own.
 */

const PART = /^\.(.+)\.[0-9a-f]{8}\.part$/;
/** No save in progress leaves its file alone for so long; process numbers would not tell, as the system gives them out again. */
const LEFT_BEHIND_AFTER_MS = 60_000;

/** @returns the name under which the version before is kept: `bars.fieldtray.json` becomes `bars.previous.fieldtray.json`. */
export function previousName(name: string): string {
  const dot = name.indexOf(".", 1);
  return dot === -1 ? `${name}.previous` : `${name.slice(0, dot)}.previous${name.slice(dot)}`;
}

const isGone = (error: unknown): boolean => error instanceof Error && "code" in error && error.code === "ENOENT";

/** Follows links, so that a link to a setup stays a link. */
async function targetOf(path: string): Promise<string> {
  try {
    return await realpath(path);
  } catch (error) {
    if (isGone(error)) return path;
    throw error;
  }
}

async function flushFolder(folder: PathLike): Promise<void> {
  // Windows cannot open a folder; there the rename itself is written through.
  const handle = await open(folder, constants.O_RDONLY).catch(() => null);
  if (handle === null) return;
  await handle.sync().catch(() => {});
  await handle.close();
}

/** Takes away what saves of the file `name` left behind in its folder when they were cut off a minute or more before `now` (ms). */
export async function clearLeftovers(folder: string, name: string, now = Date.now()): Promise<void> {
  for (const entry of await readdir(folder).catch(() => [])) {
    if (PART.exec(entry)?.[1] !== name) continue;
    const leftover = join(folder, entry);
    const writtenAt = await stat(leftover).then(
      ({ ctimeMs }) => ctimeMs,
      () => Number.NaN,
    );
    if (now - writtenAt > LEFT_BEHIND_AFTER_MS) await rm(leftover, { force: true }).catch(() => {});
  }
}

async function keepPrevious(target: string, spare: string): Promise<void> {
  const previous = join(dirname(target), previousName(basename(target)));
  try {
    await link(target, spare);
  } catch (error) {
    if (isGone(error)) return;
    // A disk without hard links (a memory stick, a network folder) gets a copy.
    await copyFile(target, spare);
  }
  await rename(spare, previous);
}

/**
 * Writes the whole text to `path`, keeping one previous version beside it.
 * Rejects with the system's own error (ENOSPC, EACCES, ENOENT …); the old file is whole then, and nothing else is left behind.
 * Only an ordinary file is ever replaced, never a folder or a device.
 * @param keepsPrevious false for the program's own files, which need no previous version.
 */
export async function saveWhole(path: string, content: string | Uint8Array, keepsPrevious = true): Promise<void> {
  const target = await targetOf(path);
  const [folder, name] = [dirname(target), basename(target)];
  await clearLeftovers(folder, name);
  const part = (): string => join(folder, `.${name}.${randomBytes(4).toString("hex")}.part`);
  const temporary = part();
  const spare = part();
  const old = await stat(target).catch(() => null);
  if (old !== null && !old.isFile()) throw Object.assign(new Error(`${name} is not a file`), { code: "EISDIR" });
  try {
    const handle = await open(temporary, "wx", old === null ? 0o666 : old.mode & 0o777);
    try {
      await handle.writeFile(content);
      await handle.sync();
    } finally {
      await handle.close();
    }
    if (old !== null) {
      await chmod(temporary, old.mode & 0o777).catch(() => {});
      // Losing the copy of the old version is no reason to lose the new one.
      if (keepsPrevious) await keepPrevious(target, spare).catch(() => {});
    }
    await rename(temporary, target);
    await flushFolder(folder);
  } catch (error) {
    await Promise.all([temporary, spare].map((leftover) => rm(leftover, { force: true }).catch(() => {})));
    throw error;
  }
}
