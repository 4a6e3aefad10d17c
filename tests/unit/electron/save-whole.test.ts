import { type ChildProcess, spawn, spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import {
  chmodSync,
  lstatSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  symlinkSync,
  writeFileSync,
} from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { build } from "vite";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { clearLeftovers, previousName, saveWhole } from "../../../electron/save-whole";

let folder = "";
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "fieldtray-save-"));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

const names = (): string[] => readdirSync(folder).sort();

describe("saving", () => {
  it("writes the whole text and keeps the version before beside it", async () => {
    const path = join(folder, "bars.fieldtray.json");
    await saveWhole(path, "first");
    await saveWhole(path, "second");
    await saveWhole(path, "third");
    expect(readFileSync(path, "utf8")).toBe("third");
    expect(readFileSync(join(folder, "bars.previous.fieldtray.json"), "utf8")).toBe("second");
    expect(names()).toEqual(["bars.fieldtray.json", "bars.previous.fieldtray.json"]);
  });

  it("names the version before so that it opens like any other setup", () => {
    expect(previousName("bars.fieldtray.json")).toBe("bars.previous.fieldtray.json");
    expect(previousName("bars")).toBe("bars.previous");
    expect(previousName(".hidden.json")).toBe(".hidden.previous.json");
  });

  it("leaves a link a link and the file's rights as they were", async () => {
    const target = join(folder, "real.json");
    writeFileSync(target, "old");
    chmodSync(target, 0o640);
    const link = join(folder, "link.json");
    symlinkSync(target, link);
    await saveWhole(link, "new", false);
    expect(lstatSync(link).isSymbolicLink()).toBe(true);
    expect(readFileSync(target, "utf8")).toBe("new");
    expect(statSync(target).mode & 0o777).toBe(0o640);
  });

  it("refuses a folder that is not there and a target that is no file, and leaves nothing behind", async () => {
    await expect(saveWhole(join(folder, "gone", "a.json"), "text")).rejects.toMatchObject({ code: "ENOENT" });
    mkdirSync(join(folder, "a-folder"));
    await expect(saveWhole(join(folder, "a-folder"), "text")).rejects.toMatchObject({ code: "EISDIR" });
    expect(names()).toEqual(["a-folder"]);
  });
});

/** The module under test as a file that plain Node can run. */
async function compiled(into: string): Promise<void> {
  const module = fileURLToPath(new URL("../../../electron/save-whole.ts", import.meta.url));
  await build({
    configFile: false,
    logLevel: "silent",
    build: { ssr: module, outDir: into, emptyOutDir: false, rollupOptions: { output: { entryFileNames: "save-whole.mjs" } } },
  });
}

describe("a disk without room", () => {
  it("keeps the old file whole and leaves nothing half written", async () => {
    await compiled(folder);
    const setups = join(folder, "setups");
    mkdirSync(setups);
    const path = join(setups, "tray.json");
    writeFileSync(path, "old");
    const code = `import { saveWhole } from "./save-whole.mjs"; await saveWhole(${JSON.stringify(path)}, "x".repeat(1e6)).catch(({ code }) => console.log(code));`;
    writeFileSync(join(folder, "writer.mjs"), code);
    // The shell's limit on the size of a file stops the write half way, as a full disk does.
    const limited = `trap "" XFSZ; ulimit -f 8; exec "${process.execPath}" writer.mjs`;
    const { stdout } = spawnSync("sh", ["-c", limited], { cwd: folder, encoding: "utf8" });
    expect(stdout.trim()).toBe("EFBIG");
    expect(readFileSync(path, "utf8")).toBe("old");
    expect(readdirSync(setups)).toEqual(["tray.json"]);
  });
});

/** What the killed process writes: a number, then so much text that a save takes a while, then the digest of both. */
const SIZE = 3_000_000;

const WRITER = `
import { createHash } from "node:crypto";
import { saveWhole } from "./save-whole.mjs";
const path = process.argv[2];
for (let version = 1; ; version++) {
  const text = version + " " + String.fromCharCode(97 + (version % 26)).repeat(${SIZE});
  process.stdout.write(version + "\\n");
  await saveWhole(path, text + createHash("sha256").update(text).digest("hex"));
}
`;

/** @returns the version number of a whole file; throws for anything else. */
function versionOf(path: string): number {
  const content = readFileSync(path, "utf8");
  const [text, digest] = [content.slice(0, -64), content.slice(-64)];
  if (createHash("sha256").update(text).digest("hex") !== digest) throw new Error(`${path} is neither the old nor the new file`);
  return Number.parseInt(text, 10);
}

const firstSaid = (child: ChildProcess, wanted: RegExp): Promise<void> =>
  new Promise((resolve, reject) => {
    let said = "";
    child.stdout?.on("data", (piece) => {
      said += piece;
      if (wanted.test(said)) resolve();
    });
    child.on("error", reject);
  });

describe("a save that is cut off", () => {
  it("leaves a whole old or a whole new file at each of 50 random moments", { timeout: 120_000 }, async () => {
    await compiled(folder);
    const writer = join(folder, "writer.mjs");
    writeFileSync(writer, WRITER);
    const setups = join(folder, "setups");
    mkdirSync(setups);
    const path = join(setups, "tray.fieldtray.json");
    let cutOff = 0;
    for (let round = 0; round < 50; round++) {
      const child = spawn(process.execPath, [writer, path], { stdio: ["ignore", "pipe", "inherit"] });
      // From the second save on there is an old file to lose.
      await firstSaid(child, /^2$/m);
      await new Promise((resolve) => setTimeout(resolve, Math.random() * 40));
      const ended = new Promise((resolve) => child.on("exit", resolve));
      child.kill("SIGKILL");
      await ended;
      expect(versionOf(path)).toBeGreaterThan(0);
      const left = readdirSync(setups);
      if (left.includes("tray.previous.fieldtray.json")) versionOf(join(setups, "tray.previous.fieldtray.json"));
      cutOff += left.some((name) => name.endsWith(".part")) ? 1 : 0;
      for (const name of left.filter((one) => one.endsWith(".part"))) rmSync(join(setups, name));
    }
    // A kill that never met a save half done would prove nothing.
    expect(cutOff).toBeGreaterThan(5);
  });

  it("leaves a part file that goes a minute later, when no save can still be at work on it", async () => {
    const left = ".tray.fieldtray.json.0123abcd.part";
    for (const name of [left, ".other.json.0123abcd.part"]) writeFileSync(join(folder, name), "half a tr");
    await saveWhole(join(folder, "tray.fieldtray.json"), "whole");
    expect(names()).toContain(left);
    await clearLeftovers(folder, "tray.fieldtray.json", Date.now() + 61_000);
    expect(names()).toEqual([".other.json.0123abcd.part", "tray.fieldtray.json"]);
  });
});
