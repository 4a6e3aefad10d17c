import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { chromium } from "playwright";
import { findBrowser, inRoot } from "../../build-resources/steps.mjs";
import { serveWindow } from "../../build-resources/window-server.mjs";

/**
 * How long the full pack takes in the window, from the moment a setup is opened to the finished PDF, the careful solution included:
 * `npm run speed -- --sheets`. An example, and a tray of 600 × 400 mm on A4; and the longest that the window did not answer meanwhile.
 */

const RUNS = 5;
/** Promises to the user (ms, bytes). */
const LIMITS = { exampleMs: 1500, largeMs: 4000, unansweredMs: 250, pdfBytes: 2 * 1024 * 1024 };

const LARGE = {
  format: "fieldtray.setup",
  version: 1,
  title: "Tray of 600 × 400 mm",
  tray: { shape: "rectangle", lengthMm: 600, widthMm: 400 },
  water: { depthMm: 15, conductivityUsPerCm: 500 },
  supply: { waveform: "ac", frequencyHz: 50, volts: 6 },
  parts: [
    { id: "A", role: "electrode", tap: 0, xMm: 120, yMm: 200, turnDeg: 90, shape: { kind: "bar", lengthMm: 200, widthMm: 10 } },
    { id: "B", role: "electrode", tap: 1, xMm: 480, yMm: 200, shape: { kind: "disc", diameterMm: 80 } },
    { id: "C", role: "floating", xMm: 300, yMm: 200, shape: { kind: "ring", outerMm: 100, innerMm: 90 } },
  ],
};

const median = (values) => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)];

/** Opens a setup and saves its pack at once. @returns how long that took, the longest pause of the page, and the size. */
async function pack(page, file) {
  await page.evaluate(() => {
    const gaps = { longest: 0, last: performance.now(), on: true };
    globalThis.gaps = gaps;
    const beat = () => {
      const now = performance.now();
      gaps.longest = Math.max(gaps.longest, now - gaps.last);
      gaps.last = now;
      if (gaps.on) setTimeout(beat, 0);
    };
    beat();
  });
  const [chooser] = await Promise.all([page.waitForEvent("filechooser"), page.keyboard.press("Control+o")]);
  const download = page.waitForEvent("download");
  const title = JSON.parse(readFileSync(file, "utf8")).title;
  const from = performance.now();
  await chooser.setFiles(file);
  await page.waitForFunction((words) => document.querySelector("h1")?.textContent?.includes(words), title, { polling: 5 });
  await page.keyboard.press("Control+e");
  const made = await download;
  const ms = performance.now() - from;
  const unansweredMs = await page.evaluate(() => {
    globalThis.gaps.on = false;
    return globalThis.gaps.longest;
  });
  const bytes = readFileSync(await made.path()).byteLength;
  return { ms, unansweredMs, bytes };
}

const place = mkdtempSync(join(tmpdir(), "fieldtray-speed-sheets-"));
const server = await serveWindow(inRoot("dist", "renderer"), join(place, "kept"), 0);
const example = JSON.parse(JSON.stringify(LARGE));
Object.assign(example, { title: "Example", tray: { shape: "rectangle", lengthMm: 300, widthMm: 200 } });
example.parts = [
  { id: "A", role: "electrode", tap: 0, xMm: 65, yMm: 100, turnDeg: 90, shape: { kind: "bar", lengthMm: 100, widthMm: 10 } },
  { id: "B", role: "electrode", tap: 1, xMm: 235, yMm: 100, turnDeg: 90, shape: { kind: "bar", lengthMm: 100, widthMm: 10 } },
  { id: "C", role: "floating", xMm: 150, yMm: 100, shape: { kind: "ring", outerMm: 60, innerMm: 54 } },
];
const files = { example: join(place, "example.json"), large: join(place, "large.json") };
writeFileSync(files.large, JSON.stringify(LARGE));

const results = { example: [], large: [] };
for (let run = 0; run < RUNS; run++) {
  const context = await chromium.launchPersistentContext(join(place, `profile-${run}`), {
    executablePath: findBrowser() ?? "/usr/bin/chromium",
    args: ["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run"],
    viewport: { width: 1280, height: 800 },
    acceptDownloads: true,
  });
  await context.addInitScript(() => {
    Object.assign(globalThis, { showOpenFilePicker: undefined, showSaveFilePicker: undefined });
  });
  const page = context.pages()[0] ?? (await context.newPage());
  // From the start, or the first question for a file may come before the page's questions are caught.
  page.on("filechooser", () => {});
  await page.goto(server.address);
  await page.waitForFunction(() => /Ω/.test(document.querySelector(".ledger")?.textContent ?? ""));
  await page.keyboard.press("Control+4");
  await page.getByRole("button", { name: "Everything", exact: true }).click();
  await page.locator("figcaption").last().waitFor();
  await page.keyboard.press("Control+1");
  await page.locator(".tray-surface canvas").first().waitFor();
  for (const kind of ["example", "large"]) {
    writeFileSync(files.example, JSON.stringify({ ...example, title: `Example ${run}` }));
    results[kind].push(await pack(page, files[kind]));
  }
  await context.close();
}
await server.stop();
rmSync(place, { recursive: true, force: true, maxRetries: 20, retryDelay: 100 });

const of = (kind, key) => Math.round(median(results[kind].map((one) => one[key])));
const report = {
  exampleMs: of("example", "ms"),
  largeMs: of("large", "ms"),
  unansweredMs: Math.max(of("example", "unansweredMs"), of("large", "unansweredMs")),
  pdfBytes: Math.max(of("example", "bytes"), of("large", "bytes")),
  runs: RUNS,
  each: results,
  limits: LIMITS,
};
console.log(JSON.stringify(report, null, 2));
process.exit(Object.entries(LIMITS).every(([key, most]) => report[key] <= most) ? 0 : 1);
