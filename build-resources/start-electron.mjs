import { spawn, spawnSync } from "node:child_process";
import { existsSync, mkdirSync, statSync, writeFileSync } from "node:fs";
import { findElectron, inRoot, isRoot, run, say } from "./steps.mjs";

/** Opens the desktop program in Electron, where its binary is here or can be had. */

const DOWNLOAD_LIMIT_MS = 90_000;
/** A download that failed is not tried again for this long, so that the next start is quick. */
const RETRY_AFTER_MS = 24 * 3600 * 1000;

/** A binary that is there may still lack the system's libraries. */
const runs = (binary) =>
  spawnSync(binary, ["--version"], { timeout: 10_000, env: { ...process.env, ELECTRON_RUN_AS_NODE: "1" } }).status === 0;

async function download() {
  const installer = inRoot("node_modules", "electron", "install.js");
  const failed = inRoot(".cache", "electron-download-failed");
  if (!existsSync(installer) || process.env.ELECTRON_SKIP_BINARY_DOWNLOAD) return;
  if (existsSync(failed) && Date.now() - statSync(failed).mtimeMs < RETRY_AFTER_MS && !process.env.ELECTRON_MIRROR) return;
  say(`fetching Electron (about 100 MB, given up after ${DOWNLOAD_LIMIT_MS / 1000} s) …`);
  await run(process.execPath, [installer], { timeout: DOWNLOAD_LIMIT_MS, killSignal: "SIGKILL", stdio: "ignore" });
  if (findElectron() === null) {
    mkdirSync(inRoot(".cache"), { recursive: true });
    writeFileSync(failed, "");
  }
}

/** @returns the path of a binary that runs, or null. Looks for a file and never loads the package, which would download. */
export async function electronBinary() {
  if (findElectron() === null) await download();
  const binary = findElectron();
  if (binary === null || runs(binary)) return binary;
  say(`Electron is at ${binary} but does not run on this system (a library is missing, most likely).`);
  return null;
}

export function startElectron(binary, files) {
  const switches = isRoot() ? ["--no-sandbox"] : [];
  if (isRoot()) say("started as root: Electron's sandbox is switched off (--no-sandbox).");
  const child = spawn(binary, [...switches, inRoot("."), ...files], { stdio: ["ignore", "inherit", "inherit"] });
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"]) process.on(signal, () => child.kill("SIGTERM"));
  child.on("error", (error) => {
    say(`the window could not be opened: ${error.message}`);
    process.exit(1);
  });
  child.on("exit", (code) => process.exit(code ?? 0));
}
