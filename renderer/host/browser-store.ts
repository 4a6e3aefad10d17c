/** A small key–value store of the browser (IndexedDB) for drafts, settings and the list of recent files. */
export interface BrowserStore {
  readonly read: (key: string) => Promise<unknown>;
  readonly write: (key: string, value: unknown) => Promise<void>;
  readonly remove: (key: string) => Promise<void>;
  readonly keys: () => Promise<readonly string[]>;
}

const STORE = "values";

function settled<Value>(request: IDBRequest<Value>): Promise<Value> {
  return new Promise((resolve, reject) => {
    request.onsuccess = () => resolve(request.result);
    request.onerror = () => reject(request.error ?? new Error("the browser's store failed"));
  });
}

/** @returns the store named `name`. Its promises reject where the browser refuses storage. */
export function browserStore(name: string): BrowserStore {
  let opened: Promise<IDBDatabase> | null = null;
  const database = (): Promise<IDBDatabase> => {
    opened ??= new Promise((resolve, reject) => {
      const request = indexedDB.open(name, 1);
      request.onupgradeneeded = () => request.result.createObjectStore(STORE);
      request.onsuccess = () => resolve(request.result);
      request.onerror = () => reject(request.error ?? new Error("the browser's store cannot be opened"));
    });
    return opened;
  };
  const values = async (mode: IDBTransactionMode): Promise<IDBObjectStore> =>
    (await database()).transaction(STORE, mode).objectStore(STORE);
  return {
    read: async (key) => settled(await values("readonly").then((store) => store.get(key))),
    write: async (key, value) => {
      await settled((await values("readwrite")).put(value, key));
    },
    remove: async (key) => {
      await settled((await values("readwrite")).delete(key));
    },
    keys: async () => (await settled((await values("readonly")).getAllKeys())).map(String),
  };
}
