import { existsSync, mkdirSync, readFileSync, rmSync } from "node:fs";
import { ensureBuilt, ensureDebianPackages, ensurePackages, findBrowser, inRoot, run, say } from "./steps.mjs";

/** `npm test`: sets up what is missing, then runs every check and closes on one line that counts them all. */

const TYPE_PROJECTS = {
  "everything with its tests": ".",
  "the page": "renderer",
  "the worker": "renderer/worker",
  "the desktop process": "electron",
};
const NEEDED = [
  ["chromium", "chromium"],
  ["pdftoppm", "poppler-utils"],
  ["Xvfb", "xvfb"],
  ["setpriv", "util-linux"],
];

const counts = { passed: 0, failed: 0, skipped: 0 };
/** How many tests were skipped for each reason. */
const reasons = new Map();
/** Journeys that passed only when tried again: a browser on a busy machine may fail to start, but nobody should have to guess that it did. */
const triedTwice = [];

const bin = (name) => inRoot("node_modules", ".bin", process.platform === "win32" ? `${name}.cmd` : name);

async function check(name, command, args) {
  const code = await run(command, args);
  counts[code === 0 ? "passed" : "failed"]++;
  say(`${name}: ${code === 0 ? "good" : "FAILED"}`);
}

const readJson = (path) => (existsSync(path) ? JSON.parse(readFileSync(path, "utf8")) : null);

function skip(reason) {
  counts.skipped++;
  reasons.set(reason, (reasons.get(reason) ?? 0) + 1);
}

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
  for (let number = 0; number < result.numPendingTests + result.numTodoTests; number++) skip("marked so in its file");
  // A file that fails before its first test counts as one.
  if (code !== 0 && result.numFailedTests === 0) counts.failed += Math.max(1, result.numFailedTestSuites);
}

function* testsOf(suite) {
  for (const spec of suite.specs ?? []) for (const test of spec.tests) yield { ...test, title: spec.title };
  for (const inner of suite.suites ?? []) yield* testsOf(inner);
}

async function runJourneys() {
  say("journeys in a real browser, and the desktop process …");
  const report = inRoot("test-results", "playwright.json");
  rmSync(report, { force: true });
  const code = await run(bin("playwright"), ["test", "--config", inRoot("tests", "playwright.config.ts")], {
    env: { ...process.env, CHROMIUM_PATH: findBrowser() ?? "" },
  });
  const tests = (readJson(report)?.suites ?? []).flatMap((suite) => [...testsOf(suite)]);
  for (const { status, annotations, title } of tests) {
    if (status === "flaky") triedTwice.push(title);
    if (status === "skipped") skip(annotations.find(({ type }) => type === "skip")?.description ?? "no reason given");
    else counts[status === "expected" || status === "flaky" ? "passed" : "failed"]++;
  }
  const anyFailed = tests.some(({ status }) => status === "unexpected");
  if (tests.length === 0 || (code !== 0 && !anyFailed)) counts.failed++;
}

mkdirSync(inRoot("test-results"), { recursive: true });
try {
  await ensurePackages();
  const missing = (await ensureDebianPackages(NEEDED)).filter((command) => command !== "chromium" || findBrowser() === null);
  if (missing.length > 0) {
    throw new Error(
      `the tests need ${missing.join(", ")}: install the packages ${NEEDED.map(([, name]) => name).join(", ")} and try again`,
    );
  }
  await ensureBuilt();
  say("type check, lint and format …");
  for (const [name, project] of Object.entries(TYPE_PROJECTS)) {
    await check(`types of ${name}`, bin("tsc"), ["--noEmit", "--project", inRoot(project)]);
  }
  await check("lint and format", bin("biome"), ["check", "--diagnostic-level=error", "."]);
  await runVitest();
  await runJourneys();
} catch (error) {
  say(error.message);
  counts.failed++;
}
for (const title of triedTwice) console.log(`passed at the second try only: ${title}`);
for (const [reason, number] of reasons) console.log(`skipped, ${number} tests: ${reason}`);
console.log(`${counts.passed} passed, ${counts.failed} failed${counts.skipped > 0 ? `, ${counts.skipped} skipped` : ""}`);
process.exit(counts.failed === 0 ? 0 : 1);
