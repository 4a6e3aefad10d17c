import { mkdtempSync, readdirSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { gzipSync } from "node:zlib";
import { chromium } from "playwright";
import { findBrowser, inRoot } from "../../build-resources/steps.mjs";
import { serveWindow } from "../../build-resources/window-server.mjs";

/**
 * How long until the window can be used, and how much script that takes: `npm run speed -- --start`.
 * Usable means: the tray is drawn, its field solved and its resistance shown. Each run has a fresh profile, as after an installation.
 */

const RUNS = 7;
/** Promises to the user (ms, bytes). */
const LIMITS = { usableMs: 1200, firstScriptGzipBytes: 400_000 };

const assets = inRoot("dist", "renderer", "assets");
const gzipBytes = (name) => gzipSync(readFileSync(join(assets, name)), { level: 9 }).length;

async function once(address) {
  const profile = mkdtempSync(join(tmpdir(), "fieldtray-speed-"));
  const context = await chromium.launchPersistentContext(profile, {
    executablePath: findBrowser() ?? "/usr/bin/chromium",
    args: ["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run"],
    viewport: { width: 1280, height: 800 },
  });
  const page = context.pages()[0] ?? (await context.newPage());
  const scripts = [];
  page.on("response", (response) => {
    if (response.request().resourceType() === "script") scripts.push(new URL(response.url()).pathname.split("/").at(-1));
  });
  await page.goto("about:blank");
  const from = performance.now();
  await page.goto(address);
  await page.locator(".rail, nav").first().waitFor();
  const drawnMs = performance.now() - from;
  await page.waitForFunction(() => /Ω/.test(document.querySelector(".ledger")?.textContent ?? document.body.textContent ?? ""), null, {
    polling: 20,
  });
  const usableMs = performance.now() - from;
  await context.close();
  rmSync(profile, { recursive: true, force: true, maxRetries: 20, retryDelay: 100 });
  return { drawnMs, usableMs, scripts };
}

const median = (values) => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)];

const store = mkdtempSync(join(tmpdir(), "fieldtray-speed-kept-"));
const server = await serveWindow(inRoot("dist", "renderer"), store, 0);
const runs = [];
for (let run = 0; run < RUNS; run++) runs.push(await once(server.address));
await server.stop();
rmSync(store, { recursive: true, force: true });

const firstScripts = [...new Set(runs[0].scripts)].filter((name) => !/worker/.test(name));
const lazy = readdirSync(assets).filter((name) => name.endsWith(".js") && !runs[0].scripts.includes(name));
const report = {
  drawnMs: Math.round(median(runs.map(({ drawnMs }) => drawnMs))),
  usableMs: Math.round(median(runs.map(({ usableMs }) => usableMs))),
  slowestMs: Math.round(Math.max(...runs.map(({ usableMs }) => usableMs))),
  runs: RUNS,
  firstScriptGzipBytes: firstScripts.reduce((sum, name) => sum + gzipBytes(name), 0),
  firstScripts,
  loadedWhenUsed: Object.fromEntries(lazy.map((name) => [name, gzipBytes(name)])),
  limits: LIMITS,
};
console.log(JSON.stringify(report, null, 2));
const kept = report.usableMs <= LIMITS.usableMs && report.firstScriptGzipBytes <= LIMITS.firstScriptGzipBytes;
process.exit(kept ? 0 : 1);
