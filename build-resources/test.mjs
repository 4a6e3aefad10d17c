import { existsSync, mkdirSync, readFileSync, rmSync } from "node:fs";
import { ensureBuilt, ensureDebianPackages, ensurePackages, findBrowser, inRoot, run, say } from "./steps.mjs";

/** `npm test`: sets up what is missing, then runs every check and closes on one line that counts them all. */

const counts = { passed: 0, failed: 0, skipped: 0 };
const reasons = [];

const bin = (name) => inRoot("node_modules", ".bin", process.platform === "win32" ? `${name}.cmd` : name);

async function check(name, command, args) {
  say(`${name} …`);
  const code = await run(command, args);
  counts[code === 0 ? "passed" : "failed"]++;
  if (code !== 0) say(`${name} FAILED`);
  return code === 0;
}

const readJson = (path) => (existsSync(path) ? JSON.parse(readFileSync(path, "utf8")) : null);

async function runVitest() {
  say("unit, reference and layering tests …");
  const report = inRoot("test-results", "vitest.json");
  rmSync(report, { force: true });
  const code = await run(bin("vitest"), ["run", "--config", inRoot("tests", "vitest.config.ts")]);
  const result = readJson(report);
  if (result === null || result.numTotalTests === 0) {
    counts.failed++;
    return;
  }
  counts.passed += result.numPassedTests;
  counts.failed += result.numFailedTests;
  counts.skipped += result.numPendingTests + result.numTodoTests;
  // A file that fails before its first test counts as one.
  if (code !== 0 && result.numFailedTests === 0) counts.failed += Math.max(1, result.numFailedTestSuites);
}

function countSpecs(suite, visit) {
  for (const spec of suite.specs ?? []) for (const test of spec.tests) visit(spec, test);
  for (const inner of suite.suites ?? []) countSpecs(inner, visit);
}

async function runJourneys() {
  say("journeys in a real browser and the desktop process …");
  const report = inRoot("test-results", "playwright.json");
  rmSync(report, { force: true });
  const code = await run(bin("playwright"), ["test", "--config", inRoot("tests", "playwright.config.ts")], {
    env: { ...process.env, CHROMIUM_PATH: findBrowser() ?? "" },
  });
  const result = readJson(report);
  let seen = 0;
  for (const suite of result?.suites ?? []) {
    countSpecs(suite, (spec, test) => {
      seen++;
      if (test.status === "skipped") {
        counts.skipped++;
        const reason = test.annotations.find(({ type }) => type === "skip")?.description ?? "no reason given";
        reasons.push(`${spec.title}: ${reason}`);
      } else counts[test.status === "expected" || test.status === "flaky" ? "passed" : "failed"]++;
    });
  }
  if (seen === 0 || (code !== 0 && counts.failed === 0)) counts.failed++;
}

mkdirSync(inRoot("test-results"), { recursive: true });
try {
  await ensurePackages();
  const missing = await ensureDebianPackages([
    ["chromium", "chromium"],
    ["pdftoppm", "poppler-utils"],
    ["Xvfb", "xvfb"],
  ]);
  const needed = missing.filter((command) => command !== "chromium" || findBrowser() === null);
  if (needed.length > 0) throw new Error(`the tests need ${needed.join(", ")}: install the packages chromium, poppler-utils and xvfb`);
  await ensureBuilt();
  await check("type check", bin("tsc"), ["--noEmit"]);
  await check("lint and format", bin("biome"), ["check", "--diagnostic-level=error", "."]);
  await runVitest();
  await runJourneys();
} catch (error) {
  say(error.message);
  counts.failed++;
}
for (const reason of reasons) console.log(`skipped: ${reason}`);
console.log(`${counts.passed} passed, ${counts.failed} failed${counts.skipped > 0 ? `, ${counts.skipped} skipped` : ""}`);
process.exit(counts.failed === 0 ? 0 : 1);
