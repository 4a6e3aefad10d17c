import { mkdtempSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { drafts } from "../../../electron/drafts";
import { knownFiles } from "../../../electron/known-files";

let folder = "";
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "fieldtray-drafts-"));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

const at = (ms: number) => () => ms;
const NOBODY: ReadonlySet<string> = new Set();

describe("drafts", () => {
  it("of windows that are gone are offered, newest first; those of open windows are not", async () => {
    const files = knownFiles();
    const write = (id: string, title: string, ms: number) =>
      drafts(folder, files, at(ms), () => {}).write(id, { title, handle: null, text: "{}" });
    await write("first", "One", 100);
    await write("second", "Two", 300);
    await write("third", "Three", 200);
    const kept = await drafts(folder, files, at(0), () => {}).kept(new Set(["third"]));
    expect(kept.map(({ title, keptAtMs, file }) => [title, keptAtMs, file])).toEqual([
      ["Two", 300, null],
      ["One", 100, null],
    ]);
  });

  it("find their file again, and notice that it has changed since", async () => {
    const path = join(folder, "tray.fieldtray.json");
    writeFileSync(path, "one");
    const before = knownFiles();
    const opened = await before.read(path);
    if (opened.kind !== "opened") throw new Error("not opened");
    const own = join(folder, "drafts");
    await drafts(own, before, at(1), () => {}).write("window", { title: "Tray", handle: opened.file.handle, text: "{}" });
    writeFileSync(path, "changed after the crash");

    const after = knownFiles();
    const [kept] = await drafts(own, after, at(2), () => {}).kept(NOBODY);
    expect(kept?.file?.name).toBe("tray.fieldtray.json");
    expect(kept?.saved).toBe("changed after the crash");
    expect(kept?.file?.handle).toBe(opened.file.handle);
    expect(await after.save(path, "draft", false)).toMatchObject({ kind: "changed" });
  });

  it("do not overtake each other: cleared after written is gone", async () => {
    const kept = drafts(folder, knownFiles(), at(1), () => {});
    await Promise.all([kept.write("w", { title: "x", handle: null, text: "a".repeat(100_000) }), kept.clear("w")]);
    expect(readdirSync(folder)).toEqual([]);
  });

  it("that are damaged are passed over and told of", async () => {
    writeFileSync(join(folder, "broken.json"), '{"title": 5}');
    const told: string[] = [];
    const kept = await drafts(folder, knownFiles(), at(1), (message) => told.push(message)).kept(NOBODY);
    expect(kept).toEqual([]);
    expect(told[0]).toContain("broken");
  });
});
