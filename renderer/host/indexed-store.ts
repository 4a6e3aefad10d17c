import type { KeyStore } from "./key-store";

const STORE = "values";

function settled<Value>(request: IDBRequest<Value>): Promise<Value> {
  return new Promise((resolve, reject) => {
    request.onsuccess = () => resolve(request.result);
    request.onerror = () => reject(request.error ?? new Error("the browser's store failed"));
  });
}

/** Resolves once the transaction is on disk, so that a draft is only called kept when it is. */
function committed(transaction: IDBTransaction): Promise<void> {
  return new Promise((resolve, reject) => {
    transaction.oncomplete = () => resolve();
    transaction.onabort = () => reject(transaction.error ?? new Error("the browser's store is full"));
  });
}

/** @returns the browser's own store (IndexedDB) of that name; its promises reject where the browser refuses storage. */
export function indexedStore(name: string): KeyStore {
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
  const change = async (act: (store: IDBObjectStore) => void): Promise<void> => {
    const transaction = (await database()).transaction(STORE, "readwrite", { durability: "strict" });
    const done = committed(transaction);
    act(transaction.objectStore(STORE));
    await done;
  };
  const values = async (): Promise<IDBObjectStore> => (await database()).transaction(STORE, "readonly").objectStore(STORE);
  return {
    read: async (key) => settled((await values()).get(key)),
    write: (key, value) => change((store) => void store.put(value, key)),
    remove: (key) => change((store) => void store.delete(key)),
    keys: async () => (await settled((await values()).getAllKeys())).map(String),
  };
}
