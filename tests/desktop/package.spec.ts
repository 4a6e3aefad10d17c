import { spawnSync } from "node:child_process";
import { chmodSync, existsSync, mkdirSync, mkdtempSync, readdirSync, readFileSync, statSync, writeFileSync } from "node:fs";
import { rm } from "node:fs/promises";
import { builtinModules } from "node:module";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { expect, test } from "@playwright/test";
import { standInProgram } from "./program";

/** Packing without Electron's binary: a made-up runtime folder takes its place, everything else is packed as for a release. */

const root = fileURLToPath(new URL("../..", import.meta.url));

/** The mark in Electron's binary after which its fuses lie: a version, their number, and one letter each. */
const FUSE_MARK = "dL7pKGdnNz796PbbjQWNKmHXBZaB9tsX";
const FUSES = "\x01\x08" + "10100111";

function makeRuntime(folder: string): void {
  mkdirSync(join(folder, "locales"), { recursive: true });
  mkdirSync(join(folder, "resources"));
  writeFileSync(join(folder, "electron"), `#!/bin/sh\nexit 0\n${FUSE_MARK}${FUSES}`, "latin1");
  chmodSync(join(folder, "electron"), 0o755);
  const { version } = JSON.parse(readFileSync(join(root, "node_modules", "electron", "package.json"), "utf8"));
  writeFileSync(join(folder, "version"), version);
  for (const name of ["LICENSE", "LICENSES.chromium.html", "chrome-sandbox", "locales/en-US.pak", "locales/en-GB.pak", "locales/fr.pak"]) {
    writeFileSync(join(folder, name), name);
  }
}

interface Entry {
  readonly files?: Readonly<Record<string, Entry>>;
  readonly size?: number;
  readonly offset?: string;
}

/** The files of an archive: a length of its head at byte 12, the head as JSON from byte 16, then the files one after the other. */
function unpack(archive: Buffer, into: string): ReadonlyMap<string, number> {
  const headLength = archive.readUInt32LE(12);
  const body = 8 + archive.readUInt32LE(4);
  const found = new Map<string, number>();
  const walk = (entry: Entry, path: string): void => {
    for (const [name, inner] of Object.entries(entry.files ?? {})) {
      const place = path === "" ? name : `${path}/${name}`;
      if (inner.files !== undefined) walk(inner, place);
      else {
        const [from, size] = [body + Number(inner.offset), inner.size ?? 0];
        found.set(place, size);
        mkdirSync(dirname(join(into, place)), { recursive: true });
        writeFileSync(join(into, place), archive.subarray(from, from + size));
      }
    }
  };
  walk(JSON.parse(archive.subarray(16, 16 + headLength).toString("utf8")), "");
  return found;
}

test.describe.configure({ mode: "serial" });

let place = "";
let packed = "";
let files: ReadonlyMap<string, number> = new Map();

test.beforeAll(() => {
  place = mkdtempSync(join(tmpdir(), "fieldtray-package-"));
  makeRuntime(join(place, "runtime"));
  const script = join(root, "build-resources", "package.mjs");
  const options = ["--linux", "dir", "--runtime", join(place, "runtime"), "--output", join(place, "packages")];
  const { status, stderr, stdout } = spawnSync(process.execPath, [script, ...options], { encoding: "utf8", cwd: root });
  expect(`${stdout}${stderr}`).toContain("packaging");
  expect(status).toBe(0);
  packed = join(place, "packages", "linux-unpacked");
  files = unpack(readFileSync(join(packed, "resources", "app.asar")), join(place, "unpacked"));
});
// The browser's own processes end a moment after the program and still write into their profile.
test.afterAll(() => rm(place, { recursive: true, force: true, maxRetries: 20, retryDelay: 100 }));

test("the archive holds the compiled program and nothing else", () => {
  const names = [...files.keys()];
  expect(names).toEqual(
    expect.arrayContaining(["package.json", "dist/electron/main.cjs", "dist/electron/preload.cjs", "dist/renderer/index.html"]),
  );
  const strangers = names.filter((name) => !/^(package\.json|dist\/electron\/(main|preload)\.cjs|dist\/renderer\/.+)$/.test(name));
  expect(strangers).toEqual([]);
  expect(names.filter((name) => /\.(map|tsx?|md)$|node_modules|tests?\//.test(name))).toEqual([]);
  const manifest = JSON.parse(readFileSync(join(place, "unpacked", "package.json"), "utf8"));
  expect(manifest).toMatchObject({ name: "fieldtray", main: "dist/electron/main.cjs" });
  expect(manifest.devDependencies).toBeUndefined();
});

test("the archive stays small", () => {
  const total = [...files.values()].reduce((sum, size) => sum + size, 0);
  // Two fonts of 0.7 MB, 1.5 MB of scripts; 5 MB would mean that something has slipped in.
  expect(total).toBeLessThan(5_000_000);
  expect(total).toBeGreaterThan(1_000_000);
});

test("everything that the main process and the preload ask for is inside or Node's own", () => {
  for (const name of ["main.cjs", "preload.cjs"]) {
    const source = readFileSync(join(place, "unpacked", "dist", "electron", name), "utf8");
    const asked = [...source.matchAll(/\brequire\("([^"]+)"\)/g)].map(([, module]) => module.replace(/^node:/, ""));
    expect(asked.length).toBeGreaterThan(0);
    expect(asked.filter((module) => module !== "electron" && !builtinModules.includes(module))).toEqual([]);
  }
});

test("the licences of all that is bundled lie beside the program", () => {
  const notices = readFileSync(join(packed, "LICENCES.txt"), "utf8");
  for (const name of ["react ", "react-dom", "konva", "jspdf", "zod", "zustand", "dejavu-fonts-ttf", "@noble/hashes"]) {
    expect(notices).toContain(name);
  }
  expect(readFileSync(join(packed, "LICENSE.fieldtray.txt"), "utf8")).toContain("The Fieldtray authors");
  expect(existsSync(join(packed, "LICENSE.electron.txt")) && existsSync(join(packed, "LICENSES.chromium.html"))).toBe(true);
  expect(readdirSync(join(packed, "locales")).sort()).toEqual(["en-GB.pak", "en-US.pak"]);
});

test("the fuses are set: no Node mode, no inspector, no other program than the archive's", () => {
  const binary = readFileSync(join(packed, "fieldtray"), "latin1");
  const [, fuses] = new RegExp(`${FUSE_MARK}\x01\x08([01]{8})`).exec(binary) ?? [];
  // In Electron's order: Node mode, cookie encryption, NODE_OPTIONS, inspector, archive integrity, archive only, V8 snapshot, file rights.
  expect(fuses).toBe("01001100");
  expect(statSync(join(packed, "fieldtray")).mode & 0o111).toBeGreaterThan(0);
});

test("the packed program starts and shows its window", async () => {
  const program = await standInProgram(join(place, "unpacked"), join(place, "data"));
  await expect(program.page.locator(".ledger-entry", { hasText: "Resistance" }).locator("dd")).toContainText("Ω", { timeout: 30_000 });
  const ended = new Promise((resolve) => program.app.process().once("exit", resolve));
  program.app.process().kill("SIGKILL");
  await ended;
});
