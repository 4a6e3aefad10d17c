import { mkdtempSync, readdirSync, readFileSync, rmSync, statSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, expect, it } from "vitest";
import { openLog } from "../../../electron/log";

let folder = "";
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "fieldtray-log-"));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

const at = () => new Date(Date.UTC(2026, 11, 1, 8, 30));

it("the log has a line an entry, with time and level, whatever the message holds", () => {
  const log = openLog(join(folder, "logs", "fieldtray.log"), at);
  log.write({ level: "warning", message: "the probe table\n  was odd" });
  expect(readFileSync(log.path, "utf8")).toBe("2026-12-01T08:30:00.000Z warning the probe table | was odd\n");
  expect(log.newest()).toEqual(["2026-12-01T08:30:00.000Z warning the probe table | was odd"]);
});

it("the log turns at half a megabyte, keeps two old ones, and loses no line of the newest three", () => {
  const log = openLog(join(folder, "fieldtray.log"), at);
  const count = 800;
  for (let number = 1; number <= count; number++) log.write({ level: "info", message: `${number} ${"x".repeat(4000)}` });
  expect(readdirSync(folder).sort()).toEqual(["fieldtray.log", "fieldtray.log.1", "fieldtray.log.2"]);
  const kept = ["fieldtray.log.2", "fieldtray.log.1", "fieldtray.log"].flatMap((name) => {
    expect(statSync(join(folder, name)).size).toBeLessThan(512 * 1024 + 5000);
    return readFileSync(join(folder, name), "utf8").trimEnd().split("\n");
  });
  const numbers = kept.map((line) => Number(line.split(" ")[2]));
  expect(numbers).toEqual(Array.from({ length: numbers.length }, (_, k) => count - numbers.length + 1 + k));
  expect(log.newest().length).toBeLessThanOrEqual(100);
  expect(log.newest().at(-1)).toContain(`info ${count} `);
});

it("a log that cannot be written stops nothing", () => {
  const log = openLog("/dev/null/fieldtray.log", at);
  expect(() => log.write({ level: "error", message: "lost" })).not.toThrow();
  expect(log.newest()).toEqual([]);
});
