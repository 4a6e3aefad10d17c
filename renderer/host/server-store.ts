import { z } from "zod";
import { fileTextSchema } from "../../shared-types/host";
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
  if (!settled.ok) throw new Error(`the window server answered ${settled.status}: ${await settled.text()}`);
  return settled;
}

/** @returns the store at that address. Keys are letters, digits and dashes; values are JSON. */
export function serverStore(page: Window, address: string): KeyStore {
  const at = (key: string): string => `${address}${encodeURIComponent(key)}`;
  return {
    read: async (key) => {
      const answer = await asked(page.fetch(at(key), { cache: "no-store" }));
      return answer.status === 204 ? undefined : answer.json();
    },
    write: async (key, value) => {
      await asked(page.fetch(at(key), { method: "PUT", body: JSON.stringify(value) }));
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

const arrivalSchema = z.union([
  z.strictObject({ name: z.string().min(1).max(512), text: fileTextSchema }),
  z.strictObject({ refused: z.string().max(2000) }),
]);

/**
 * Keeps the window server told that this window lives, and takes the files that a later start of the program hands over.
 * @returns a way to stop.
 */
export function attendServer(page: Window, take: (arrival: z.infer<typeof arrivalSchema>) => void): () => void {
  const live = new EventSource(new URL("live", page.location.href));
  live.onmessage = ({ data }: MessageEvent<string>) => {
    const arrival = arrivalSchema.safeParse(JSON.parse(data));
    if (arrival.success) take(arrival.data);
  };
  return () => live.close();
}
