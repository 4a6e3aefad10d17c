import { mkdirSync, mkdtempSync, readFileSync, rmSync, utimesSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { knownFiles } from "../../../electron/known-files";

let folder = "";
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "fieldtray-known-"));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

const failing = (code: string) => async (): Promise<void> => {
  throw Object.assign(new Error(code), { code });
};

describe("files that the user picked", () => {
  it("have one opaque handle each, which says nothing of the path", async () => {
    const files = knownFiles();
    const path = join(folder, "a.json");
    writeFileSync(path, "{}");
    const first = files.handleOf(path);
    expect(files.handleOf(join(folder, ".", "a.json"))).toEqual(first);
    expect(first.handle).not.toContain("a.json");
    expect(files.pathOf(first.handle)).toBe(path);
    expect(files.pathOf(path)).toBeNull();
  });

  it("are saved when nobody else has touched them, and when they were only touched", async () => {
    const files = knownFiles();
    const path = join(folder, "a.json");
    writeFileSync(path, "one");
    await files.read(path);
    utimesSync(path, new Date(), new Date(Date.now() + 5000));
    expect((await files.save(path, "two", false)).kind).toBe("saved");
    expect((await files.save(path, "three", false)).kind).toBe("saved");
    expect(readFileSync(path, "utf8")).toBe("three");
  });

  it("are never overwritten silently after a change by another program", async () => {
    const files = knownFiles();
    const path = join(folder, "a.json");
    writeFileSync(path, "one");
    const opened = await files.read(path);
    writeFileSync(path, "another's");
    expect(await files.save(path, "mine", false)).toMatchObject({ kind: "changed", gone: false });
    expect(readFileSync(path, "utf8")).toBe("another's");
    expect((await files.save(path, "mine", true)).kind).toBe("saved");
    expect(readFileSync(path, "utf8")).toBe("mine");
    if (opened.kind !== "opened") throw new Error("not opened");
    rmSync(path);
    expect(await files.changeOf(opened.file.handle)).toMatchObject({ gone: true });
    expect(await files.save(path, "mine", false)).toMatchObject({ kind: "changed", gone: true });
  });

  it("keep to their order when saved twice at once", async () => {
    const files = knownFiles();
    const path = join(folder, "a.json");
    const [first, second] = await Promise.all([files.save(path, "one", false), files.save(path, "two", false)]);
    expect([first.kind, second.kind]).toEqual(["saved", "saved"]);
    expect(readFileSync(path, "utf8")).toBe("two");
  });

  it("are refused in words when they are too large, no text or not there", async () => {
    const files = knownFiles();
    const large = join(folder, "large.json");
    writeFileSync(large, Buffer.alloc(5 * 1024 * 1024 + 1, 32));
    expect(await files.read(large)).toEqual({ kind: "failed", message: "large.json holds 5.0 MB, allowed: at most 5 MB." });
    const bytes = join(folder, "bytes.json");
    writeFileSync(bytes, Buffer.from([0xff, 0xfe]));
    expect(await files.read(bytes)).toEqual({ kind: "failed", message: "bytes.json is not a text file (UTF-8)." });
    expect(await files.read(join(folder, "none.json"))).toEqual({ kind: "failed", message: `none.json is no longer in ${folder}.` });
    mkdirSync(join(folder, "d"));
    expect(await files.read(join(folder, "d"))).toMatchObject({ kind: "failed" });
  });

  it.each([
    ["ENOSPC", "the disk is full"],
    ["EROFS", "can only be read"],
    ["EACCES", "does not allow it"],
    ["ENOENT", "is no longer there"],
    ["EBUSY", "held by another program"],
  ])("say what to do when saving fails with %s", async (code, words) => {
    const files = knownFiles(failing(code));
    const outcome = await files.save(join(folder, "a.json"), "text", false);
    expect(outcome.kind === "failed" ? outcome.message : outcome.kind).toContain(words);
  });
});
