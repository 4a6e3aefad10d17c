/** A small store of plain values by name: the browser's own (IndexedDB), or the folder behind the local window server. */
export interface KeyStore {
  /** @returns the value, or undefined when there is none. */
  readonly read: (key: string) => Promise<unknown>;
  readonly write: (key: string, value: unknown) => Promise<void>;
  readonly remove: (key: string) => Promise<void>;
  readonly keys: () => Promise<readonly string[]>;
}

/**
 * Two stores as one: everything goes to the first; where that fails (the local server is gone) it goes to the second, so that a draft is
 * never lost for want of a server. Reading looks into both, the first one's value wins.
 */
export function firstOf(first: KeyStore, second: KeyStore): KeyStore {
  return {
    read: async (key) => {
      const value = await first.read(key).catch(() => undefined);
      return value === undefined ? second.read(key) : value;
    },
    write: async (key, value) => {
      try {
        await first.write(key, value);
      } catch {
        await second.write(key, value);
        return;
      }
      await second.remove(key).catch(() => {});
    },
    remove: async (key) => {
      await Promise.all([first.remove(key).catch(() => {}), second.remove(key)]);
    },
    keys: async () => [...new Set([...(await first.keys().catch(() => [])), ...(await second.keys().catch(() => []))])],
  };
}
