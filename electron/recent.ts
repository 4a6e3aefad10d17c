import { z } from "zod";
import type { RecentFile } from "../shared-types/host";
import type { KnownFiles } from "./known-files";
import type { OwnFile } from "./own-files";

const RECENT_KEPT = 10;

export const recentSchema = z
  .array(z.strictObject({ path: z.string().min(1).max(4096), openedAtMs: z.number().nonnegative() }))
  .max(RECENT_KEPT);

/** The setups that were open lately, newest first. */
export interface Recent {
  readonly list: () => Promise<readonly RecentFile[]>;
  readonly note: (path: string) => Promise<void>;
  readonly forget: (path: string) => Promise<void>;
}

/** @param onChange is told the new list and what was opened, for the menu and the system. */
export function recent(
  store: OwnFile<z.infer<typeof recentSchema>>,
  files: KnownFiles,
  now: () => number,
  onChange: (list: readonly RecentFile[], opened: string | null) => void,
): Recent {
  const shown = (list: z.infer<typeof recentSchema>): readonly RecentFile[] =>
    list.map(({ path, openedAtMs }) => ({ file: files.handleOf(path), openedAtMs }));

  async function replace(
    opened: string | null,
    change: (list: z.infer<typeof recentSchema>) => z.infer<typeof recentSchema>,
  ): Promise<void> {
    const list = change(await store.read()).slice(0, RECENT_KEPT);
    onChange(shown(list), opened);
    await store.write(list);
  }
  return {
    list: async () => shown(await store.read()),
    note: (path) => replace(path, (list) => [{ path, openedAtMs: now() }, ...list.filter((entry) => entry.path !== path)]),
    forget: (path) => replace(null, (list) => list.filter((entry) => entry.path !== path)),
  };
}
