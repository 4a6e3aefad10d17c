import { existsSync, mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { fileArguments } from "../../../electron/file-arguments";
import { knownFiles } from "../../../electron/known-files";
import { openLog } from "../../../electron/log";
import { ownFile } from "../../../electron/own-files";
import { recent, recentSchema } from "../../../electron/recent";
import { settingsSchema } from "../../../shared-types/host";

let folder = "";
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "fieldtray-own-"));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

describe("settings", () => {
  it("come back as they were written, and are the usual ones at first", async () => {
    const usual = settingsSchema.parse({});
    const file = ownFile(join(folder, "data", "settings.json"), settingsSchema, usual, () => {});
    expect(await file.read()).toEqual(usual);
    const changed = { ...usual, theme: "dark" as const, printers: [{ name: "Prep room", scaleX: 0.998, scaleY: 1.003 }] };
    await file.write(changed);
    expect(await file.read()).toEqual(changed);
  });

  it("that are damaged are put aside, not overwritten", async () => {
    const path = join(folder, "settings.json");
    writeFileSync(path, '{"theme":"purple"}');
    const told: string[] = [];
    const file = ownFile(path, settingsSchema, settingsSchema.parse({}), (message) => told.push(message));
    expect((await file.read()).theme).toBe("system");
    expect(readFileSync(`${path}.damaged`, "utf8")).toContain("purple");
    expect(told).toHaveLength(1);
  });

  it("refuse a printer correction beyond 5 %", () => {
    expect(settingsSchema.safeParse({ printers: [{ name: "p", scaleX: 0.94, scaleY: 1 }] }).success).toBe(false);
    expect(settingsSchema.safeParse({ printers: [{ name: "p", scaleX: 0.95, scaleY: 1.05 }] }).success).toBe(true);
  });
});

describe("the list of recent setups", () => {
  it("holds ten, newest first, each once, and tells the menu", async () => {
    const told: number[] = [];
    const store = ownFile(join(folder, "recent.json"), recentSchema, [], () => {});
    const list = recent(store, knownFiles(), Date.now, (entries) => told.push(entries.length));
    for (let number = 0; number < 12; number++) await list.note(join(folder, `${number}.json`));
    await list.note(join(folder, "5.json"));
    await list.forget(join(folder, "11.json"));
    expect((await list.list()).map(({ file }) => file.name)).toEqual(
      ["5", "10", "9", "8", "7", "6", "4", "3", "2"].map((name) => `${name}.json`),
    );
    expect(told.at(-1)).toBe(9);
  });
});

describe("the log", () => {
  it("keeps one line for each entry and two old files of half a megabyte", () => {
    const path = join(folder, "logs", "fieldtray.log");
    const log = openLog(path, () => new Date(0));
    log.write({ level: "error", message: "first line\n  second line" });
    expect(log.newest()).toEqual(["1970-01-01T00:00:00.000Z error first line | second line"]);
    for (let number = 0; number < 2000; number++) log.write({ level: "info", message: `${number} ${"x".repeat(1000)}` });
    expect(statSync(path).size).toBeLessThan(600 * 1024);
    expect(existsSync(`${path}.1`) && existsSync(`${path}.2`)).toBe(true);
    expect(existsSync(`${path}.3`)).toBe(false);
    expect(log.newest().at(-1)).toContain("info 1999 ");
    expect(log.newest().length).toBeLessThanOrEqual(100);
  });

  it("never stops the work when it cannot be written", () => {
    writeFileSync(join(folder, "in-the-way"), "");
    const log = openLog(join(folder, "in-the-way", "fieldtray.log"), () => new Date(0));
    expect(() => log.write({ level: "info", message: "x" })).not.toThrow();
    expect(log.newest()).toEqual([]);
  });
});

describe("the files that a start was given", () => {
  it("are found among the switches, unpackaged and packaged, from the folder of the start", () => {
    expect(fileArguments(["electron", "--no-sandbox", ".", "a.json", "/b/c.json"], false, "/home/t")).toEqual([
      "/home/t/a.json",
      "/b/c.json",
    ]);
    expect(fileArguments(["/opt/fieldtray", "--flag=1", "a.json"], true, "/home/t")).toEqual(["/home/t/a.json"]);
    expect(fileArguments(["electron", "."], false, "/home/t")).toEqual([]);
  });
});
