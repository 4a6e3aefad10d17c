import { spawn } from "node:child_process";
import { lstatSync, mkdirSync, readFileSync, readlinkSync, rmSync, writeFileSync } from "node:fs";
import { homedir, hostname } from "node:os";
import { join } from "node:path";
import { ensureDebianPackages, findBrowser, inRoot, isRoot, say } from "./steps.mjs";
import { serveWindow } from "./window-server.mjs";

/**
 * Opens the program in a window of an installed Chromium-family browser, served from this machine. One profile, one browser, one server: a
 * second start asks the first one's browser for another window and ends.
 */

/** A browser that ends sooner than this without a window has failed to start. */
const STARTS_WITHIN_MS = 15_000;
const KILL_AFTER_MS = 5000;
/** How long a browser that was open already may take to load the window. */
const TAKEN_OVER_WITHIN_MS = 5000;

const SWITCHES = [
  "--window-size=1280,800",
  "--no-first-run",
  "--no-default-browser-check",
  "--disable-background-mode",
  "--disable-background-networking",
  "--disable-component-update",
  "--disable-popup-blocking",
  "--disable-sync",
  "--disable-quic",
];

const profileFolder = () => join(process.env.XDG_CONFIG_HOME ?? join(homedir(), ".config"), "fieldtray", "browser-window");

/** @returns the address of the server that answers for this profile, or null. */
async function runningAddress(lock) {
  try {
    const { address } = JSON.parse(readFileSync(lock, "utf8"));
    const answer = await fetch(`${address}arrive`, { signal: AbortSignal.timeout(1500) });
    return answer.ok && (await answer.text()) === "fieldtray" ? address : null;
  } catch {
    return null;
  }
}

/** A browser that was killed on a machine of another name leaves a lock that its successor would refuse to open. */
function clearForeignLock(profile) {
  const lock = join(profile, "SingletonLock");
  try {
    if (!lstatSync(lock).isSymbolicLink() || readlinkSync(lock).startsWith(`${hostname()}-`)) return;
  } catch {
    return;
  }
  for (const name of ["SingletonLock", "SingletonCookie", "SingletonSocket"]) rmSync(join(profile, name), { force: true });
}

function openWindow(browser, profile, address) {
  const root = isRoot() ? ["--no-sandbox", "--test-type"] : [];
  if (isRoot()) say("started as root: the browser's sandbox is switched off (--no-sandbox).");
  const child = spawn(browser, [`--user-data-dir=${profile}`, ...SWITCHES, ...root, `--app=${address}`], {
    stdio: ["ignore", "ignore", "pipe"],
  });
  let said = "";
  child.stderr.on("data", (piece) => {
    said = (said + piece).slice(-2000);
  });
  const ended = new Promise((resolve, reject) => {
    child.on("error", reject);
    child.on("exit", (code) => resolve({ code, said }));
  });
  return { child, ended };
}

/** @returns the process that owns the profile: not the one that was started, where an older browser took the window over. */
function ownerOf(profile, child) {
  try {
    return Number(readlinkSync(join(profile, "SingletonLock")).split("-").at(-1));
  } catch {
    return child.pid;
  }
}

function send(signal, pid) {
  try {
    process.kill(pid, signal);
  } catch {
    // It has ended by itself.
  }
}

/** Passes signals on to the browser. @returns a promise that settles when a signal has asked to end and the browser has, or was made to. */
function forwardSignals(profile, child, ended) {
  return new Promise((resolve) => {
    for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"]) {
      process.once(signal, () => {
        const owner = ownerOf(profile, child);
        send("SIGTERM", owner);
        setTimeout(() => send("SIGKILL", owner), KILL_AFTER_MS).unref();
        ended.finally(resolve);
      });
    }
  });
}

/** @returns the line of the browser's complaints that says most. */
function complaint(said) {
  const lines = said.trim().split("\n");
  if (lines.some((line) => /display|X server|ozone/i.test(line))) {
    return "the display that DISPLAY or WAYLAND_DISPLAY names does not answer; without one, use npm run --silent headless -- solve FILE";
  }
  return lines.at(-1) ?? "";
}

async function browserOnThisMachine() {
  if (findBrowser() === null) await ensureDebianPackages([["chromium", "chromium"]]);
  const browser = findBrowser();
  if (browser === null) {
    throw new Error(
      "no Chromium-family browser is installed and none could be; install one, such as the package chromium, and start again.",
    );
  }
  return browser;
}

/** Claims the profile for this start. @returns false when another start was quicker. */
function claim(lock, address) {
  try {
    writeFileSync(lock, JSON.stringify({ pid: process.pid, address }), { mode: 0o600, flag: "wx" });
    return true;
  } catch (error) {
    if (error.code === "EEXIST") return false;
    throw error;
  }
}

async function anotherWindow(browser, profile, address, files) {
  for (const file of files) await fetch(`${address}arrive`, { method: "POST", body: JSON.stringify(file) });
  say("Fieldtray is open already; another window of it is opened.");
  const { ended } = openWindow(browser, profile, address);
  await ended;
}

/**
 * Opens the window and stays until the last one is closed.
 * @param files what the window is told of the files named on the command line: `{ name, text }` or `{ refused }`.
 */
export async function startBrowser(files) {
  const browser = await browserOnThisMachine();
  const profile = profileFolder();
  mkdirSync(profile, { recursive: true, mode: 0o700 });
  const lock = join(profile, "fieldtray-window.json");
  const running = await runningAddress(lock);
  if (running !== null) {
    await anotherWindow(browser, profile, running, files);
    return;
  }
  rmSync(lock, { force: true });
  clearForeignLock(profile);
  const server = await serveWindow(inRoot("dist", "renderer"), join(profile, "kept"));
  if (!claim(lock, server.address)) {
    await server.stop();
    await startBrowser(files);
    return;
  }
  try {
    for (const file of files) server.windows.await(file);
    const startedAt = Date.now();
    const { child, ended } = openWindow(browser, profile, server.address);
    const stopped = forwardSignals(profile, child, ended);
    say(`the window is open (${browser}); it closes with this command too (Ctrl+C).`);
    const { code, said } = await ended;
    if (Date.now() - startedAt < STARTS_WITHIN_MS && code !== null) {
      if (code !== 0) throw new Error(`the browser could not open a window (exit code ${code}): ${complaint(said)}`);
      // A browser left over from a start that was killed takes the window over, and the new process ends at once.
      await Promise.race([server.windows.came(TAKEN_OVER_WITHIN_MS), stopped]);
    }
    await Promise.race([server.windows.gone(), stopped]);
  } finally {
    rmSync(lock, { force: true });
    await server.stop();
  }
}
