import { describe, expect, it } from "vitest";
import { firstOf, type KeyStore } from "../../../renderer/host/key-store";

function plainStore(): KeyStore & { fails: boolean; readonly values: Map<string, unknown> } {
  const values = new Map<string, unknown>();
  const store = {
    fails: false,
    values,
    read: async (key: string) => guard(() => values.get(key)),
    write: async (key: string, value: unknown) => guard(() => void values.set(key, value)),
    remove: async (key: string) => guard(() => void values.delete(key)),
    keys: async () => guard(() => [...values.keys()]),
  };
  function guard<Value>(act: () => Value): Value {
    if (store.fails) throw new Error("the server is gone");
    return act();
  }
  return store;
}

describe("drafts behind the server, with the browser's own store to fall back on", () => {
  it("go to the server while it is there", async () => {
    const [server, own] = [plainStore(), plainStore()];
    await firstOf(server, own).write("draft", 1);
    expect([server.values.get("draft"), own.values.has("draft")]).toEqual([1, false]);
  });

  it("are kept by the browser when the server is gone, and found again", async () => {
    const [server, own] = [plainStore(), plainStore()];
    const both = firstOf(server, own);
    server.fails = true;
    await both.write("draft", 2);
    expect(await both.read("draft")).toBe(2);
    expect(await both.keys()).toEqual(["draft"]);
    server.fails = false;
    expect(await both.read("draft")).toBe(2);
    await both.write("draft", 3);
    expect(own.values.has("draft")).toBe(false);
    await both.remove("draft");
    expect(await both.keys()).toEqual([]);
  });

  it("are refused, and told of, only when both stores fail", async () => {
    const [server, own] = [plainStore(), plainStore()];
    server.fails = true;
    own.fails = true;
    await expect(firstOf(server, own).write("draft", 4)).rejects.toThrow();
  });
});
