import { z } from "zod";
import { type Draft, draftSchema, type KeptDraft } from "../../shared-types/host";
import type { BrowserSetups } from "./browser-setups";
import type { KeyStore } from "./key-store";

/** What is stored for one window: its draft, when it was written, and how its file looked then. */
const storedSchema = draftSchema.extend({ keptAtMs: z.number().nonnegative(), lastSeenMs: z.number().nullable() });

const KEY = "draft-";

/** Which windows are alive: each holds a lock under its name for as long as it lives, however it ends. */
export interface WindowLocks {
  readonly hold: (name: string) => void;
  readonly held: () => Promise<ReadonlySet<string>>;
}

/** @returns locks shared by all windows of this origin (Web Locks). */
export function windowLocks(page: Window): WindowLocks {
  const { locks } = page.navigator;
  return {
    hold: (name) => void locks.request(name, () => new Promise<void>(() => {})).catch(() => {}),
    held: async () => {
      const { held = [] } = await locks.query();
      return new Set(held.flatMap(({ name }) => (name === undefined ? [] : [name])));
    },
  };
}

/** Drafts of this window and of those that went down. */
export interface BrowserDrafts {
  readonly write: (draft: Draft) => Promise<void>;
  readonly clear: () => Promise<void>;
  readonly kept: () => Promise<readonly KeptDraft[]>;
  readonly discard: (id: string) => Promise<void>;
}

/** @param windowId names this window among all that ever were. */
export function browserDrafts(
  store: KeyStore,
  setups: BrowserSetups,
  windowId: string,
  locks: WindowLocks,
  now: () => number,
): BrowserDrafts {
  const own = `${KEY}${windowId}`;
  locks.hold(own);

  async function kept(): Promise<readonly KeptDraft[]> {
    const [keys, alive] = await Promise.all([store.keys(), locks.held()]);
    const found: KeptDraft[] = [];
    for (const key of keys) {
      if (!key.startsWith(KEY) || key === own || alive.has(key)) continue;
      const stored = storedSchema.safeParse(await store.read(key).catch(() => undefined));
      if (!stored.success) continue;
      const { title, text, keptAtMs, handle, lastSeenMs } = stored.data;
      const file = handle === null || lastSeenMs === null ? null : await setups.recall(handle, lastSeenMs);
      found.push({ id: key, title, keptAtMs, file, text, saved: file === null ? null : await setups.glimpse(file.handle) });
    }
    return found.sort((a, b) => b.keptAtMs - a.keptAtMs).slice(0, 50);
  }

  return {
    write: (draft) =>
      store.write(own, { ...draft, keptAtMs: now(), lastSeenMs: draft.handle === null ? null : setups.lastSeen(draft.handle) }),
    clear: () => store.remove(own),
    kept,
    discard: (id) => (id.startsWith(KEY) ? store.remove(id) : Promise.resolve()),
  };
}
