import { existsSync } from "node:fs";
import { resolve } from "node:path";
import { hasNotes, writeNotices } from "./notices.mjs";
import { ensureBuilt, ensurePackages, findElectron, inRoot, run, say } from "./steps.mjs";

/**
 * `npm run package [-- --linux|--win|--mac [TARGET …]] [--runtime FOLDER] [--output FOLDER]`: packs the desktop program. `--runtime` names a
 * folder with an unpacked Electron, for a network that cannot fetch one; `dir` as a target leaves the program unpacked.
 */

const given = process.argv.slice(2);
function take(name) {
  const at = given.indexOf(name);
  return at === -1 ? null : resolve(process.env.INIT_CWD ?? ".", given.splice(at, 2)[1]);
}
const runtime = take("--runtime") ?? process.env.ELECTRON_OVERRIDE_DIST_PATH ?? null;
const output = take("--output");
const BUNDLES = ["window", "worker", "main", "preload"];

try {
  await ensurePackages();
  await ensureBuilt();
  if (!hasNotes(BUNDLES)) await run(process.execPath, [inRoot("build-resources", "build.mjs")]);
  const { packages } = writeNotices(BUNDLES);
  say(`licences of ${packages.length} packages noted: ${packages.join(", ")}`);
  const settings = ["--config", inRoot("build-resources", "electron-builder.yml"), "--publish", "never"];
  const own = [
    ...(runtime === null ? [] : [`--config.electronDist=${runtime}`]),
    ...(output === null ? [] : [`--config.directories.output=${output}`]),
  ];
  if (runtime === null && findElectron() === null)
    say("Electron will be fetched; in a closed network name an unpacked one with --runtime FOLDER.");
  const builder = inRoot("node_modules", "electron-builder", "cli.js");
  if (!existsSync(builder)) throw new Error("electron-builder is not installed: npm ci");
  process.exitCode = await run(process.execPath, [builder, ...given, ...settings, ...own]);
} catch (error) {
  say(error.message);
  process.exitCode = 1;
}
