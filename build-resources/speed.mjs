import { existsSync, readdirSync } from "node:fs";
import { ensureBuilt, ensureDebianPackages, ensurePackages, inRoot, run, say } from "./steps.mjs";

/**
 * `npm run speed [-- --NAME …] [options]`: measures of `tests/speed/NAME.mjs` or `.ts`, all of them when none is named; further options go
 * to the measure. Exit 1 when a measure misses its limit.
 */

const folder = inRoot("tests", "speed");
const measures = [...new Set(readdirSync(folder).flatMap((name) => (/\.(mjs|ts)$/.test(name) ? [name.replace(/\.(mjs|ts)$/, "")] : [])))];
const given = process.argv.slice(2);
const named = measures.filter((name) => given.includes(`--${name}`));
const options = given.filter((option) => !measures.includes(option.slice(2)));

async function measure(name) {
  const plain = inRoot("tests", "speed", `${name}.mjs`);
  if (existsSync(plain)) return run(process.execPath, [plain, ...options], { stdio: "inherit" });
  const built = await run(process.execPath, [inRoot("build-resources", "build.mjs"), `speed/${name}`]);
  if (built !== 0) return built;
  return run(process.execPath, [inRoot("dist", "speed", `${name}.mjs`), ...options], { stdio: "inherit" });
}

try {
  await ensurePackages();
  await ensureDebianPackages([["chromium", "chromium"]]);
  await ensureBuilt();
  for (const name of named.length > 0 ? named : measures) {
    say(`measuring: ${name} …`);
    if ((await measure(name)) !== 0) process.exitCode = 1;
  }
} catch (error) {
  say(error.message);
  process.exitCode = 1;
}
