import { describe, expect, it } from "vitest";
import { isKey } from "../../../renderer/host/browser-commands";
import { COMMAND_MENUS, commandEntries, commandSchema } from "../../../shared-types/host-commands";

const pressed = (key: string, held: Partial<Record<"ctrlKey" | "metaKey" | "shiftKey" | "altKey", boolean>> = {}) => ({
  key,
  ctrlKey: false,
  metaKey: false,
  shiftKey: false,
  altKey: false,
  ...held,
});

describe("a command's key", () => {
  it("is Ctrl on Linux and Windows, and ⌘ on a Mac", () => {
    expect(isKey("Mod+S", pressed("s", { ctrlKey: true }), false)).toBe(true);
    expect(isKey("Mod+S", pressed("s", { metaKey: true }), true)).toBe(true);
    expect(isKey("Mod+S", pressed("s", { metaKey: true }), false)).toBe(false);
    expect(isKey("Mod+S", pressed("s", { ctrlKey: true }), true)).toBe(false);
  });
  it("is not another one that holds more keys", () => {
    expect(isKey("Mod+S", pressed("S", { ctrlKey: true, shiftKey: true }), false)).toBe(false);
    expect(isKey("Mod+Shift+S", pressed("S", { ctrlKey: true, shiftKey: true }), false)).toBe(true);
    expect(isKey("Mod+S", pressed("s", { ctrlKey: true, altKey: true }), false)).toBe(false);
    expect(isKey("F1", pressed("F1"), false)).toBe(true);
    expect(isKey("Mod+Plus", pressed("+", { ctrlKey: true }), false)).toBe(true);
  });
});

describe("the menus", () => {
  it("name each command once and give no key to two of them", () => {
    const entries = commandEntries();
    expect(new Set(entries.map(({ command }) => command)).size).toBe(entries.length);
    const keys = entries.flatMap((entry) => (entry.keys === null ? [] : [entry.keys]));
    expect(new Set(keys).size).toBe(keys.length);
    for (const { command } of entries) expect(commandSchema.safeParse(command).success).toBe(true);
    expect(COMMAND_MENUS.map(({ label }) => label)).toEqual(["File", "Edit", "Desk", "Help"]);
  });
});
