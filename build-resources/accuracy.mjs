import { ensurePackages, inRoot, run, say } from "./steps.mjs";

/** `npm run accuracy`: the table of cases with known answers (`--json`, `--quality live,print,reference`, `--bounds COUNT`). */
try {
  await ensurePackages();
} catch (error) {
  say(error.message);
  process.exit(1);
}
const built = await run(process.execPath, [inRoot("build-resources", "build.mjs"), "kernels", "accuracy"]);
if (built !== 0) process.exit(built);
const script = inRoot("dist", "accuracy", "accuracy.mjs");
process.exit(await run(process.execPath, [script, ...process.argv.slice(2)], { stdio: "inherit" }));
