import { spawn } from "node:child_process";
import { ensureBuilt, ensurePackages, inRoot, say } from "./steps.mjs";

/** `npm run --silent headless -- VERB FILE …`: sets up what is missing, then runs the built command with the same streams. */
try {
  await ensurePackages();
  await ensureBuilt();
} catch (error) {
  say(error.message);
  process.exit(1);
}
const child = spawn(process.execPath, [inRoot("dist", "headless", "headless.mjs"), ...process.argv.slice(2)], {
  cwd: process.env.INIT_CWD ?? process.cwd(),
  stdio: "inherit",
});
for (const signal of ["SIGINT", "SIGTERM"]) process.on(signal, () => child.kill(signal));
child.on("exit", (code, signal) => process.exit(signal === null ? (code ?? 1) : 1));
