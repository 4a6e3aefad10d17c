import { readFileSync, statSync } from "node:fs";
import { basename, resolve } from "node:path";
import { startBrowser } from "./start-browser.mjs";
import { electronBinary, startElectron } from "./start-electron.mjs";
import { ensureBuilt, ensurePackages, say } from "./steps.mjs";

/**
 * `npm start [-- [--browser] FILE …]`: sets up what is missing, builds what is stale, and opens the program, with the named setups if there
 * are any. `--browser` opens it in a browser window even where Electron could be had.
 */

const LARGEST_FILE_BYTES = 5 * 1024 * 1024;

const hasDisplay = () => process.platform !== "linux" || Boolean(process.env.DISPLAY || process.env.WAYLAND_DISPLAY);

/** npm runs this behind a shell that passes no signal on: when the shell is gone, this start was meant to end. */
function endWithNpm() {
  if (process.env.npm_lifecycle_event === undefined) return;
  const parent = process.ppid;
  setInterval(() => {
    if (process.ppid !== parent) process.kill(process.pid, "SIGTERM");
  }, 500).unref();
}

/** Paths on the command line are meant from the folder in which npm was called. */
const given = process.argv.slice(2);
const inBrowser = given.includes("--browser");
const files = given.filter((name) => name !== "--browser").map((name) => resolve(process.env.INIT_CWD ?? process.cwd(), name));

/** @returns what a browser window is told of a file: its name and text, or why it cannot be read. */
function contentsOf(path) {
  try {
    if (statSync(path).size > LARGEST_FILE_BYTES) return { refused: `${basename(path)} is larger than 5 MB.` };
    return { name: basename(path), text: new TextDecoder("utf-8", { fatal: true }).decode(readFileSync(path)) };
  } catch (error) {
    return { refused: error.code === "ENOENT" ? `${path} is not there.` : `${path} cannot be read: ${error.message}` };
  }
}

endWithNpm();
try {
  if (!hasDisplay()) {
    say("this machine has no display to open a window on; use the headless command instead: npm run --silent headless -- solve FILE");
    process.exit(1);
  }
  await ensurePackages();
  await ensureBuilt();
  const binary = inBrowser ? null : await electronBinary();
  if (binary !== null) startElectron(binary, files);
  else {
    if (!inBrowser) say("Electron is not here and cannot be downloaded, so the program opens in a browser window of its own.");
    await startBrowser(files.map(contentsOf));
  }
} catch (error) {
  say(error.message);
  process.exit(1);
}
