import { spawn } from "node:child_process";
import { existsSync, mkdirSync, readFileSync, rmSync, statSync, writeFileSync } from "node:fs";
import { homedir } from "node:os";
import { join } from "node:path";
import { ensureBuilt, ensureDebianPackages, ensurePackages, findBrowser, findElectron, inRoot, isRoot, run, say } from "./steps.mjs";
import { serveWindow } from "./window-server.mjs";

/** `npm start`: sets up what is missing, builds what is stale, and opens the program. */

const DOWNLOAD_LIMIT_MS = 60_000;
/** A download of Electron that failed is not tried again for this long, so that the next start is quick. */
const RETRY_AFTER_MS = 24 * 3600 * 1000;

const hasDisplay = () => process.platform !== "linux" || Boolean(process.env.DISPLAY || process.env.WAYLAND_DISPLAY);

async function electronBinary() {
  const found = findElectron();
  if (found !== null) return found;
  const installer = inRoot("node_modules", "electron", "install.js");
  const failed = inRoot(".cache", "electron-download-failed");
  if (!existsSync(installer)) return null;
  if (existsSync(failed) && Date.now() - statSync(failed).mtimeMs < RETRY_AFTER_MS && !process.env.ELECTRON_MIRROR) return null;
  say("fetching Electron …");
  const abort = new AbortController();
  const timer = setTimeout(() => abort.abort(), DOWNLOAD_LIMIT_MS);
  await run(process.execPath, [installer], { signal: abort.signal, quiet: true, stdio: "ignore" });
  clearTimeout(timer);
  if (findElectron() === null) {
    mkdirSync(inRoot(".cache"), { recursive: true });
    writeFileSync(failed, "");
  }
  return findElectron();
}

function follow(child, whenGone) {
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"]) process.on(signal, () => child.kill("SIGTERM"));
  child.on("error", async (error) => {
    say(`the window could not be opened (${error.message})`);
    await whenGone();
    process.exit(1);
  });
  child.on("exit", async (code) => {
    await whenGone();
    process.exit(code ?? 0);
  });
}

function startElectron(binary, files) {
  const switches = isRoot() ? ["--no-sandbox"] : [];
  if (isRoot()) say("started as root: Electron's sandbox is switched off (--no-sandbox).");
  const child = spawn(binary, [...switches, inRoot("."), ...files], { stdio: ["ignore", "inherit", "inherit"] });
  follow(child, async () => {});
}

const profileFolder = () => join(process.env.XDG_CONFIG_HOME ?? join(homedir(), ".config"), "fieldtray", "browser-window");

/** @returns the address of a window that is already open on this profile, or null. */
function runningAddress(lock) {
  if (!existsSync(lock)) return null;
  try {
    const { pid, address } = JSON.parse(readFileSync(lock, "utf8"));
    process.kill(pid, 0);
    return address;
  } catch {
    return null;
  }
}

async function startBrowser() {
  const missing = findBrowser() === null ? await ensureDebianPackages([["chromium", "chromium"]]) : [];
  const browser = findBrowser();
  if (browser === null) {
    say(
      `no Chromium-family browser is installed${missing.length > 0 ? " and none could be installed" : ""}; install one, such as the package chromium.`,
    );
    process.exit(1);
  }
  const profile = profileFolder();
  mkdirSync(profile, { recursive: true });
  const lock = join(profile, "fieldtray-window.json");
  const switches = [
    `--user-data-dir=${profile}`,
    "--window-size=1280,800",
    "--no-first-run",
    "--no-default-browser-check",
    "--disable-background-networking",
    "--disable-component-update",
    "--disable-sync",
    "--disable-quic",
  ];
  if (isRoot()) {
    say("started as root: the browser's sandbox is switched off (--no-sandbox).");
    switches.push("--no-sandbox", "--test-type");
  }
  const open = runningAddress(lock);
  if (open !== null) {
    say("Fieldtray is open already; another window is opened in it.");
    follow(spawn(browser, [...switches, `--app=${open}`], { stdio: "ignore" }), async () => {});
    return;
  }
  const server = await serveWindow(inRoot("dist", "renderer"));
  writeFileSync(lock, JSON.stringify({ pid: process.pid, address: server.address }), { mode: 0o600 });
  const child = spawn(browser, [...switches, `--app=${server.address}`], { stdio: "ignore" });
  say(`the window is open in ${browser}; it closes with this command (Ctrl+C).`);
  follow(child, async () => {
    rmSync(lock, { force: true });
    await server.stop();
  });
}

try {
  if (!hasDisplay()) {
    say("this machine has no display to open a window on; use the headless command: npm run --silent headless -- solve FILE");
    process.exit(1);
  }
  await ensurePackages();
  await ensureBuilt();
  const binary = await electronBinary();
  if (binary !== null) startElectron(binary, process.argv.slice(2));
  else {
    say("Electron is not here and cannot be downloaded, so the program opens in a browser window of its own.");
    await startBrowser();
  }
} catch (error) {
  say(error.message);
  process.exit(1);
}
