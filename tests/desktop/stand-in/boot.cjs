/** Starts a Chromium, tells whoever launched this process where to find it, and runs the program that the arguments name. */
const { readFileSync, statSync } = require("node:fs");
const { release } = require("node:os");
const { join, resolve } = require("node:path");
const { startChromium } = require("./chromium.cjs");
const standIn = require("./module.cjs");

const given = process.argv.slice(2);
const program = resolve(given.find((argument) => !argument.startsWith("-")) ?? ".");
const folder = statSync(program).isDirectory() ? program : null;
const manifest = folder === null ? null : JSON.parse(readFileSync(join(folder, "package.json"), "utf8"));
const main = manifest === null ? program : join(folder, manifest.main);

process.argv = [process.execPath, ...given];
Object.defineProperty(process.versions, "electron", { value: "stand-in" });
Object.defineProperty(process.versions, "chrome", { value: "Debian" });
process.getSystemVersion = () => release();
standIn.app.name = manifest?.name ?? "program";
standIn.app.version = manifest?.version ?? "0.0.0";

// The program runs first, as it does in Electron: what it sets before it is ready (its folder, its schemes) counts.
require(main);

(async () => {
  if (standIn.app.isLeaving) return;
  const chromium = await startChromium(join(standIn.app.getPath("userData"), "chromium"));
  standIn.app.chromium = chromium;
  // The launcher connects to this address, and calls the function below once it has.
  const attended = new Promise((go) => {
    globalThis.__playwright_run = go;
  });
  process.stderr.write(`DevTools listening on ${chromium.address}\n`);
  if (!process.env.STAND_IN_UNATTENDED) await attended;
  standIn.app.becomeReady();
})().catch((error) => {
  process.stderr.write(`the stand-in failed: ${error.stack}\n`);
  process.exit(1);
});
