import { mkdir, readdir, readFile, rm } from "node:fs/promises";
import { join } from "node:path";
import { z } from "zod";
import { type Draft, draftSchema, type KeptDraft, keptDraftSchema } from "../shared-types/host";
import type { KnownFiles } from "./known-files";
import { saveWhole } from "./save-whole";
import { readText } from "./text-on-disk";

/** What lies on the disk for one window: its draft, when it was written, and the file that it belongs to as that looked then. */
const storedSchema = z.strictObject({
  ...draftSchema.omit({ handle: true }).shape,
  keptAtMs: z.number().nonnegative(),
  path: z.string().max(4096).nullable(),
  seen: z.strictObject({ mtimeMs: z.number(), sizeBytes: z.number(), digest: z.string() }).nullable(),
});

/** Unsaved work, one file for each window, until it is saved or given up. */
export interface Drafts {
  readonly write: (windowId: string, draft: Draft) => Promise<void>;
  readonly clear: (windowId: string) => Promise<void>;
  /** @returns drafts whose window is not among the living, newest first. */
  readonly kept: (living: ReadonlySet<string>) => Promise<readonly KeptDraft[]>;
}

export function drafts(folder: string, files: KnownFiles, now: () => number, onDamaged: (message: string) => void): Drafts {
  const at = (id: string): string => join(folder, `${id}.json`);
  // Writing and clearing one window's draft must not overtake each other.
  const queue = new Map<string, Promise<void>>();
  function after(id: string, act: () => Promise<void>): Promise<void> {
    const next = (queue.get(id) ?? Promise.resolve()).catch(() => {}).then(act);
    queue.set(id, next);
    return next;
  }

  async function readOne(id: string): Promise<KeptDraft | null> {
    try {
      const { path, seen, ...draft } = storedSchema.parse(JSON.parse(await readFile(at(id), "utf8")));
      // Read without being seen: a change since the draft was written must still be noticed when it is saved.
      const saved =
        path === null
          ? null
          : await readText(path).then(
              ({ text }) => text,
              () => null,
            );
      return keptDraftSchema.parse({ ...draft, id, file: path === null ? null : files.recall(path, seen), saved });
    } catch (error) {
      onDamaged(`the draft ${id} cannot be read: ${error instanceof Error ? error.message.slice(0, 300) : String(error)}`);
      return null;
    }
  }

  return {
    write: (windowId, { handle, ...draft }) =>
      after(windowId, async () => {
        await mkdir(folder, { recursive: true });
        const stored = {
          ...draft,
          keptAtMs: now(),
          path: handle === null ? null : files.pathOf(handle),
          seen: handle === null ? null : files.sightingOf(handle),
        };
        await saveWhole(at(windowId), JSON.stringify(stored), false);
      }),
    clear: (windowId) => after(windowId, () => rm(at(windowId), { force: true })),
    kept: async (living) => {
      const names = await readdir(folder).catch(() => []);
      const ids = names.flatMap((name) => (/^[A-Za-z0-9-]{1,100}\.json$/.test(name) ? [name.slice(0, -5)] : []));
      const found = await Promise.all(ids.filter((id) => !living.has(id)).map(readOne));
      return found
        .filter((draft) => draft !== null)
        .sort((a, b) => b.keptAtMs - a.keptAtMs)
        .slice(0, 50);
    },
  };
}
