import { spawn, spawnSync } from "node:child_process";
import { createHash } from "node:crypto";
import { existsSync, mkdirSync, readdirSync, readFileSync, statSync, writeFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { alone } from "./alone.mjs";

/** What `npm start`, `npm test` and `npm run headless` share: plain Node, usable before anything is installed. */

export const root = fileURLToPath(new URL("..", import.meta.url));
export const inRoot = (...parts) => join(root, ...parts);

/** Says on standard error what is being done; standard output belongs to results. */
export const say = (text) => process.stderr.write(`fieldtray: ${text}\n`);

/** Runs a command to its end. @returns its exit code (1 when it could not be started or was killed). */
export function run(command, args, options = {}) {
  return new Promise((resolve) => {
    const child = spawn(command, args, { cwd: root, stdio: ["ignore", options.quiet ? "ignore" : 2, 2], ...options });
    child.on("error", () => resolve(1));
    child.on("exit", (code) => resolve(code ?? 1));
  });
}

const npm = process.platform === "win32" ? "npm.cmd" : "npm";
const installedStamp = inRoot("node_modules", ".package-lock.json");
const PROGRESS_EVERY_MS = 3000;

function packagesUnder(folder) {
  if (!existsSync(folder)) return 0;
  let count = 0;
  for (const name of readdirSync(folder)) {
    if (name.startsWith("@")) count += packagesUnder(join(folder, name));
    else if (!name.startsWith(".")) count += existsSync(join(folder, name, "package.json")) ? 1 : 0;
  }
  return count;
}

/** Says every few seconds how far an install has come. @returns a way to stop. */
function sayProgress(total) {
  const startedAt = Date.now();
  const timer = setInterval(() => {
    const seconds = Math.round((Date.now() - startedAt) / 1000);
    const inPlace = Math.min(total, packagesUnder(inRoot("node_modules")));
    say(`  ${seconds} s, ${inPlace} of ${total} packages in place`);
  }, PROGRESS_EVERY_MS);
  return () => clearInterval(timer);
}

const inPlace = (lock) => {
  if (!existsSync(installedStamp)) return false;
  return statSync(installedStamp).mtimeMs >= statSync(lock).mtimeMs || sameLock(lock);
};

async function installPackages(lock) {
  if (inPlace(lock)) return;
  const named = Object.entries(JSON.parse(readFileSync(lock, "utf8")).packages);
  const total = named.filter(([path, { optional }]) => /^node_modules\/(@[^/]+\/)?[^/]+$/.test(path) && !optional).length;
  say(`installing the ${total} packages named in package-lock.json (about half a minute) …`);
  const stop = sayProgress(total);
  const code = await run(npm, ["ci", "--no-audit", "--no-fund", "--loglevel=error"]);
  stop();
  if (code !== 0) throw new Error("the packages could not be installed: see npm's message above");
  say("the packages are in place.");
  mkdirSync(inRoot(".cache"), { recursive: true });
  writeFileSync(inRoot(".cache", "installed-lock"), digestOf(lock));
}

/** Installs the packages of the lock when they are missing or older than it. */
export async function ensurePackages() {
  const lock = inRoot("package-lock.json");
  if (!inPlace(lock)) await alone(inRoot(".cache", "installing"), () => installPackages(lock));
}

const digestOf = (path) => createHash("sha256").update(readFileSync(path)).digest("hex");
/** A fresh checkout may be newer than an install of the very same lock. */
function sameLock(lock) {
  const noted = inRoot(".cache", "installed-lock");
  return existsSync(noted) && readFileSync(noted, "utf8") === digestOf(lock);
}

const isRoot = () => typeof process.getuid === "function" && process.getuid() === 0;
const onPath = (command) => spawnSync("sh", ["-c", `command -v ${command}`], { stdio: "ignore" }).status === 0;
export const isDebian = () => existsSync("/etc/debian_version") && onPath("apt-get");

/**
 * Installs Debian packages whose commands are missing, where that is possible.
 * @param wanted pairs of [command, package].
 * @returns the commands that are still missing.
 */
export async function ensureDebianPackages(wanted) {
  const missing = wanted.filter(([command]) => !onPath(command));
  if (missing.length === 0 || !isDebian() || !isRoot()) return missing.map(([command]) => command);
  const names = [...new Set(missing.map(([, name]) => name))];
  const environment = { ...process.env, DEBIAN_FRONTEND: "noninteractive" };
  say(`installing Debian's ${names.join(", ")} …`);
  const startedAt = Date.now();
  const timer = setInterval(() => say(`  ${Math.round((Date.now() - startedAt) / 1000)} s, still downloading and unpacking`), 5000);
  const apt = (...args) => run("apt-get", ["-qq", ...args], { env: environment, stdio: "ignore" });
  const install = () => apt("install", "-y", "--no-install-recommends", ...names);
  if ((await install()) !== 0) {
    await apt("update");
    await install();
  }
  clearInterval(timer);
  return missing.filter(([command]) => !onPath(command)).map(([command]) => command);
}

const SOURCES = ["renderer", "electron", "shared-types", "build-resources", "package-lock.json", "tsconfig.json"];

function* filesUnder(path) {
  if (statSync(path).isFile()) {
    yield path;
    return;
  }
  for (const name of readdirSync(path)) if (name !== "node_modules") yield* filesUnder(join(path, name));
}

function sourceDigest() {
  const hash = createHash("sha256");
  for (const source of SOURCES) {
    if (!existsSync(inRoot(source))) continue;
    for (const file of [...filesUnder(inRoot(source))].sort()) {
      const { size, mtimeMs } = statSync(file);
      hash.update(`${file} ${size} ${mtimeMs}\n`);
    }
  }
  return hash.digest("hex");
}

const builtStamp = inRoot("dist", "built-from");
const isBuilt = () => existsSync(builtStamp) && readFileSync(builtStamp, "utf8") === sourceDigest();

async function buildAll() {
  if (isBuilt()) return;
  say("building (a few seconds) …");
  const code = await run(process.execPath, [inRoot("build-resources", "build.mjs")]);
  if (code !== 0) throw new Error("the build failed: see the message above");
  mkdirSync(dirname(builtStamp), { recursive: true });
  // The kernels are built into the source tree, so the digest is taken again.
  writeFileSync(builtStamp, sourceDigest());
}

/** Builds window, desktop process and headless command when a source is newer than the last build. */
export async function ensureBuilt() {
  if (!isBuilt()) await alone(inRoot(".cache", "building"), buildAll);
}

/** @returns the path of an installed Chromium-family browser, or null. */
export function findBrowser() {
  const named = process.env.CHROMIUM_PATH;
  if (named && existsSync(named)) return named;
  for (const command of ["chromium", "chromium-browser", "google-chrome", "google-chrome-stable", "microsoft-edge", "brave-browser"]) {
    const found = spawnSync("sh", ["-c", `command -v ${command}`], { encoding: "utf8" }).stdout.trim();
    if (found) return found;
  }
  const elsewhere = [
    "/Applications/Google Chrome.app/Contents/MacOS/Google Chrome",
    "/Applications/Chromium.app/Contents/MacOS/Chromium",
    "C:\\Program Files\\Google\\Chrome\\Application\\chrome.exe",
    "C:\\Program Files (x86)\\Microsoft\\Edge\\Application\\msedge.exe",
  ];
  return elsewhere.find((path) => existsSync(path)) ?? null;
}

/** @returns the path of Electron's binary as a file, or null; never downloads. */
export function findElectron() {
  const name = { win32: "electron.exe", darwin: "Electron.app/Contents/MacOS/Electron" }[process.platform] ?? "electron";
  const override = process.env.ELECTRON_OVERRIDE_DIST_PATH;
  const folders = [override, inRoot("node_modules", "electron", "dist")].filter(Boolean);
  return folders.map((folder) => join(folder, name)).find((path) => existsSync(path)) ?? null;
}

export { isRoot };
