import type { KeyStore } from "./key-store";

/**
 * The store behind the local window server: files in the user's own folder, so that drafts and settings outlive a change of port (which
 * is a change of origin, and with it of the browser's own store).
 */

/** The mark that the window server sets into the page which it hands out, so that no other server is asked for a store. */
export const SERVER_MARK = "fieldtray-window";

/** @returns the address of the store when this page comes from the window server, else null. */
export function serverStoreAddress(page: Window): string | null {
  const marked = page.document.querySelector(`meta[name="${SERVER_MARK}"]`) !== null;
  return marked ? new URL("store/", page.location.href).href : null;
}

async function asked(answer: Promise<Response>): Promise<Response> {
  const settled = await answer;
  if (!settled.ok && settled.status !== 404) throw new Error(`the window server answered ${settled.status}: ${await settled.text()}`);
  return settled;
}

/** @returns the store at that address. Keys are letters, digits and dashes; values are JSON. */
export function serverStore(page: Window, address: string): KeyStore {
  const at = (key: string): string => `${address}${encodeURIComponent(key)}`;
  return {
    read: async (key) => {
      const answer = await asked(page.fetch(at(key), { cache: "no-store" }));
      return answer.ok ? answer.json() : undefined;
    },
    write: async (key, value) => {
      const answer = await asked(page.fetch(at(key), { method: "PUT", body: JSON.stringify(value) }));
      if (!answer.ok) throw new Error("the window server does not know its own store");
    },
    remove: async (key) => {
      await asked(page.fetch(at(key), { method: "DELETE" }));
    },
    keys: async () => {
      const listed: unknown = await (await asked(page.fetch(address, { cache: "no-store" }))).json();
      return Array.isArray(listed) ? listed.map(String) : [];
    },
  };
}
