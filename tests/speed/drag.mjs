import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { chromium } from "playwright";
import { findBrowser, inRoot } from "../../build-resources/steps.mjs";
import { serveWindow } from "../../build-resources/window-server.mjs";

/**
 * How soon the picture follows the hand: a loose part is dragged for five seconds in a real Chromium, one pointer event a frame, and
 * from each event that the worker was asked with to the end of the frame that shows its answer the time is taken: `npm run speed -- --drag`.
 * The engine's share is what the worker says it computed for. Limits are told, never asserted.
 */

const DRAG_MS = 5000;

const bar = (id, tap, xMm, yMm, lengthMm) => ({
  id,
  role: "electrode",
  tap,
  xMm,
  yMm,
  turnDeg: 90,
  shape: { kind: "bar", lengthMm, widthMm: 10 },
});
const setupOf = (title, lengthMm, widthMm, parts) => ({
  format: "fieldtray.setup",
  version: 1,
  title,
  tray: { shape: "rectangle", lengthMm, widthMm },
  water: { depthMm: 12, conductivityUsPerCm: 500 },
  supply: { waveform: "ac", volts: 6 },
  parts,
});
const ring = { id: "R", role: "floating", xMm: 150, yMm: 100, shape: { kind: "ring", outerMm: 60, innerMm: 52 } };
const crowd = Array.from({ length: 9 }, (_, k) => ({
  id: `D${k}`,
  role: "floating",
  xMm: 120 + 45 * k,
  yMm: k % 2 === 0 ? 90 : 310,
  shape: { kind: "disc", diameterMm: 24 },
}));

const TRAYS = [
  {
    name: "300 × 200 mm, 3 conductors",
    setup: setupOf("Three conductors", 300, 200, [bar("A", 0, 65, 100, 100), bar("B", 1, 235, 100, 100), ring]),
    goals: { engineP50Ms: 10, pictureP50Ms: 20, pictureP95Ms: 33 },
  },
  {
    name: "600 × 400 mm, 12 conductors",
    setup: setupOf("Twelve conductors", 600, 400, [
      bar("A", 0, 65, 200, 200),
      bar("B", 1, 535, 200, 200),
      { ...ring, xMm: 300, yMm: 200, shape: { kind: "disc", diameterMm: 60 } },
      ...crowd,
    ]),
    goals: { pictureP95Ms: 60 },
  },
];

/** Notes every request to the worker and every answer from it. */
function watchWorkers() {
  const asked = new Map();
  window.dragNotes = { lastPointer: 0, pictures: [] };
  const Plain = window.Worker;
  window.Worker = class extends Plain {
    constructor(...given) {
      super(...given);
      this.addEventListener("message", ({ data }) => {
        const pointerAt = asked.get(data.requestId);
        if (data.kind !== "planned" || !data.outcome.ok || pointerAt === undefined) return;
        const { quality, numerics } = data.outcome.plan;
        // The frame that draws the answer is the next one; it ends when a message posted in it arrives.
        requestAnimationFrame(() => {
          const { port1, port2 } = new MessageChannel();
          port1.onmessage = () => {
            const now = performance.now();
            window.dragNotes.pictures.push({ ms: now - pointerAt, engineMs: numerics.elapsedMs, quality, pitchMm: numerics.pitchMm });
          };
          port2.postMessage(null);
        });
      });
    }
    postMessage(...given) {
      if (given[0].kind === "plan") asked.set(given[0].requestId, window.dragNotes.lastPointer);
      super.postMessage(...given);
    }
  };
}

function dragInPage({ x, y, dragMs }) {
  const surface = document.querySelector(".tray-surface");
  surface.setPointerCapture = () => {};
  const send = (type, dx, dy) => {
    window.dragNotes.lastPointer = performance.now();
    const buttons = { button: type === "pointermove" ? -1 : 0, buttons: type === "pointerup" ? 0 : 1 };
    surface.dispatchEvent(new PointerEvent(type, { bubbles: true, pointerId: 1, ...buttons, clientX: x + dx, clientY: y + dy }));
  };
  return new Promise((done) => {
    const frames = [];
    const frame = (now) => {
      frames.push(now);
      const angle = (2 * Math.PI * (now - frames[0])) / 2500;
      if (now - frames[0] < dragMs) {
        send("pointermove", 40 * Math.sin(angle), 25 * Math.sin(2 * angle));
        requestAnimationFrame(frame);
        return;
      }
      const pictures = window.dragNotes.pictures.filter(({ quality }) => quality === "live");
      send("pointerup", 0, 0);
      done({ intervals: frames.slice(1).map((time, index) => time - frames[index]), pictures });
    };
    send("pointerdown", 0, 0);
    window.dragNotes.pictures.length = 0;
    requestAnimationFrame(frame);
  });
}

const at = (values, share) => [...values].sort((a, b) => a - b)[Math.floor(share * (values.length - 1))] ?? Number.NaN;
const tenths = (value) => Math.round(10 * value) / 10;

const store = mkdtempSync(join(tmpdir(), "fieldtray-speed-"));
const server = await serveWindow(process.env.WINDOW_FOLDER ?? inRoot("dist", "renderer"), store, 0);
const browser = await chromium.launch({
  executablePath: findBrowser() ?? "/usr/bin/chromium",
  args: ["--no-sandbox", "--disable-gpu", "--disable-quic", "--no-first-run"],
});

async function measure({ name, setup, goals }) {
  const context = await browser.newContext({ viewport: { width: 1280, height: 800 } });
  const page = await context.newPage();
  await page.addInitScript(watchWorkers);
  await page.addInitScript(() => {
    Reflect.deleteProperty(window, "showOpenFilePicker");
  });
  await page.goto(server.address);
  await page.waitForFunction(() => /Ω/.test(document.querySelector(".ledger")?.textContent ?? ""));
  const [chooser] = await Promise.all([page.waitForEvent("filechooser"), page.getByRole("button", { name: /^Open a setup/ }).click()]);
  await chooser.setFiles({ name: "drag.fieldtray.json", mimeType: "application/json", buffer: Buffer.from(JSON.stringify(setup)) });
  await page.waitForFunction((count) => document.querySelectorAll(".in-tray").length === count, setup.parts.length);
  await page.waitForFunction(() => document.querySelector(".tray-canvas")?.getAttribute("data-field") === "shown", null, {
    timeout: 60_000,
  });
  await page.waitForTimeout(3000);
  // Its metal on the fitted tray (margins as in renderer/canvas/view.ts).
  const box = await page.locator(".tray-surface").boundingBox();
  const { lengthMm, widthMm } = setup.tray;
  const scale = Math.min((box.width - 108) / lengthMm, (box.height - 144) / widthMm);
  const dragged = setup.parts.find(({ id }) => id === "R");
  const grabMm = dragged.shape.kind === "ring" ? (dragged.shape.outerMm + dragged.shape.innerMm) / 4 : 0;
  const place = {
    x: box.x + 72 + (box.width - 108 - lengthMm * scale) / 2 + (dragged.xMm + grabMm) * scale,
    y: box.y + 44 + (box.height - 144 - widthMm * scale) / 2 + (widthMm - dragged.yMm) * scale,
  };
  const { intervals, pictures } = await page.evaluate(dragInPage, { ...place, dragMs: DRAG_MS });
  const undo = await page.getByRole("button", { name: /^Undo/ }).getAttribute("title");
  await context.close();
  const latencies = pictures.map(({ ms }) => ms);
  const engine = pictures.map(({ engineMs }) => engineMs);
  return {
    tray: name,
    dragged: undo,
    pitchMm: pictures[0]?.pitchMm ?? null,
    frames: intervals.length,
    droppedFrames: intervals.filter((ms) => ms > 25).length,
    pictures: pictures.length,
    picturesPerSecond: tenths((1000 * pictures.length) / DRAG_MS),
    pictureP50Ms: tenths(at(latencies, 0.5)),
    pictureP95Ms: tenths(at(latencies, 0.95)),
    engineP50Ms: tenths(at(engine, 0.5)),
    engineP95Ms: tenths(at(engine, 0.95)),
    goals,
  };
}

const report = [];
for (const tray of TRAYS) report.push(await measure(tray));
await browser.close();
await server.stop();
rmSync(store, { recursive: true, force: true, maxRetries: 20, retryDelay: 100 });
console.log(JSON.stringify(report, null, 2));
