import { type ChildProcess, spawn } from "node:child_process";
import { existsSync, mkdtempSync, readFileSync, readlinkSync, rmSync, writeFileSync } from "node:fs";
import { rm } from "node:fs/promises";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { type Browser, test as base, chromium, expect, type Page } from "@playwright/test";

/** `npm start` without Electron, as a user meets it: a browser window of its own on a real (virtual) display. */

const root = fileURLToPath(new URL("../..", import.meta.url));

interface Ended {
  readonly code: number | null;
  readonly said: string;
}
interface Start {
  readonly child: ChildProcess;
  readonly ended: Promise<Ended>;
}
interface Desk {
  readonly profile: string;
  readonly folder: string;
  readonly start: (...given: readonly string[]) => Start;
  readonly startByNpm: () => Start;
  readonly browser: () => Promise<Browser>;
}

function startIn(env: NodeJS.ProcessEnv, given: readonly string[], through: "node" | "npm" = "node"): Start {
  const [command, before] = through === "npm" ? ["npm", ["start", "--"]] : [process.execPath, [join(root, "build-resources", "start.mjs")]];
  const child = spawn(command, [...before, "--browser", ...given], {
    env,
    cwd: root,
    stdio: ["ignore", "ignore", "pipe"],
  });
  let said = "";
  child.stderr?.on("data", (piece) => {
    said += piece;
  });
  const ended = new Promise<Ended>((resolve) => child.on("exit", (code) => resolve({ code, said })));
  return { child, ended };
}

const test = base.extend<{ desk: Desk }, { display: string }>({
  display: [
    // biome-ignore lint/correctness/noEmptyPattern: Playwright reads the fixture's needs from its pattern
    async ({}, use) => {
      const server = spawn("Xvfb", ["-displayfd", "1", "-screen", "0", "1400x900x24", "-nolisten", "tcp"], {
        stdio: ["ignore", "pipe", "ignore"],
      });
      const number = await new Promise<string>((resolve) => server.stdout.once("data", (piece) => resolve(String(piece).trim())));
      await use(`:${number}`);
      server.kill("SIGKILL");
    },
    { scope: "worker" },
  ],
  desk: async ({ display }, use) => {
    const folder = mkdtempSync(join(tmpdir(), "fieldtray-start-"));
    const profile = join(folder, "fieldtray", "browser-window");
    // The user's browser, with a port through which the test looks into the window that the user sees.
    const seenThrough = join(folder, "browser");
    const binary = process.env.CHROMIUM_PATH || "/usr/bin/chromium";
    writeFileSync(seenThrough, `#!/bin/sh\nexec "${binary}" --remote-debugging-port=0 "$@"\n`, { mode: 0o755 });
    const env = { ...process.env, DISPLAY: display, XDG_CONFIG_HOME: folder, CHROMIUM_PATH: seenThrough };
    const started: ChildProcess[] = [];
    await use({
      profile,
      folder,
      start: (...given) => {
        const one = startIn(env, given);
        started.push(one.child);
        return one;
      },
      startByNpm: () => {
        const one = startIn(env, [], "npm");
        started.push(one.child);
        return one;
      },
      browser: async () => {
        const note = join(profile, "DevToolsActivePort");
        await expect.poll(() => existsSync(note), { timeout: 30_000 }).toBe(true);
        const [port] = readFileSync(note, "utf8").split("\n");
        const targets = async (): Promise<string> => (await fetch(`http://127.0.0.1:${port}/json/list`).catch(() => null))?.text() ?? "";
        await expect.poll(targets, { timeout: 30_000 }).toContain('"title": "');
        // A browser that is still loading its first window may leave the first caller without an answer.
        const connect = (): Promise<Browser> => chromium.connectOverCDP(`http://127.0.0.1:${port}`, { timeout: 15_000 });
        return connect().catch(connect).catch(connect);
      },
    });
    for (const child of started) child.kill("SIGTERM");
    await expect
      .poll(() => started.every(({ exitCode, signalCode }) => exitCode !== null || signalCode !== null), { timeout: 15_000 })
      .toBe(true);
    await rm(folder, { recursive: true, force: true, maxRetries: 20, retryDelay: 100 });
  },
});

const pagesOf = (browser: Browser): Page[] => browser.contexts()[0].pages();
const heading = (page: Page) => page.getByRole("heading", { level: 1 });
async function firstPage(browser: Browser): Promise<Page> {
  await expect.poll(() => pagesOf(browser).length, { timeout: 20_000 }).toBeGreaterThan(0);
  const [page] = pagesOf(browser);
  await expect(heading(page)).toBeVisible({ timeout: 30_000 });
  return page;
}

test("the window shows an example, served from this machine alone; closing it ends the command and the server", async ({ desk }) => {
  const { ended } = desk.start();
  const browser = await desk.browser();
  const page = await firstPage(browser);
  await expect(page.locator(".ledger-entry", { hasText: "Resistance" }).locator("dd")).toContainText("Ω", { timeout: 30_000 });
  const address = page.url();
  expect(address).toMatch(/^http:\/\/127\.0\.0\.1:\d+\/[\w-]{32}\/$/);
  expect(await page.evaluate(() => [crossOriginIsolated, matchMedia("(display-mode: standalone)").matches])).toEqual([true, true]);
  await page.close();
  const { code, said } = await ended;
  expect(code).toBe(0);
  if (process.getuid?.() === 0) expect(said).toContain("--no-sandbox");
  await expect(fetch(address)).rejects.toThrow();
  expect(existsSync(join(desk.profile, "fieldtray-window.json"))).toBe(false);
});

test("ending npm ends the window and the server too", async ({ desk }) => {
  const { child } = desk.startByNpm();
  const page = await firstPage(await desk.browser());
  const address = page.url();
  expect((await fetch(address)).status).toBe(200);
  child.kill("SIGTERM");
  const answers = async (): Promise<boolean> => (await fetch(address).catch(() => null)) !== null;
  await expect.poll(answers, { timeout: 20_000 }).toBe(false);
});

test("printing shows the sheets in the browser's own viewer, under a name that tells what they are", async ({ desk }) => {
  desk.start();
  const browser = await desk.browser();
  const page = await firstPage(browser);
  await expect(page.locator(".ledger-entry", { hasText: "Resistance" }).locator("dd")).toContainText("Ω", { timeout: 30_000 });
  await page.keyboard.press("Control+p");
  await expect.poll(() => pagesOf(browser).map((one) => one.url()), { timeout: 30_000 }).toHaveLength(2);
  const shown = pagesOf(browser).find((one) => one !== page);
  await expect.poll(() => shown?.url()).toMatch(/\/print\/[^/]+\.pdf$/);
  const head = await fetch(shown?.url() ?? "").then(async (answer) => (await answer.text()).slice(0, 5));
  expect(head).toBe("%PDF-");
});

test("a second start opens a second window with its file and ends; the first goes on", async ({ desk }) => {
  const first = desk.start();
  const browser = await desk.browser();
  await firstPage(browser);
  const path = join(desk.folder, "handed.fieldtray.json");
  const tray = { shape: "rectangle", lengthMm: 300, widthMm: 200 };
  const rest = { water: { depthMm: 12, conductivityUsPerCm: 500 }, supply: { waveform: "ac", volts: 6 }, parts: [] };
  writeFileSync(path, JSON.stringify({ format: "fieldtray.setup", version: 1, title: "Handed to the second window", tray, ...rest }));
  const second = await desk.start(path).ended;
  expect(second.code).toBe(0);
  expect(second.said).toContain("open already");
  await expect.poll(() => pagesOf(browser).length, { timeout: 20_000 }).toBe(2);
  const titles = async (): Promise<string[]> =>
    Promise.all(pagesOf(browser).map(async (page) => (await heading(page).textContent()) ?? ""));
  await expect
    .poll(async () => (await titles()).some((title) => title.includes("Handed to the second window")), { timeout: 20_000 })
    .toBe(true);
  expect(first.child.exitCode).toBeNull();
});

test("work that was not saved is offered again after browser and command were killed, on another port", async ({ desk }) => {
  const first = desk.start();
  const page = await firstPage(await desk.browser());
  const before = new URL(page.url()).port;
  const title = page.getByRole("textbox", { name: "Title", exact: true });
  await title.fill("Killed in the browser");
  await title.press("Enter");
  const kept = (): boolean =>
    existsSync(join(desk.profile, "kept")) && readFileSync(join(desk.profile, "fieldtray-window.json"), "utf8").length > 0;
  await expect.poll(kept).toBe(true);
  await page.waitForTimeout(2000);
  const owner = Number(readlinkSync(join(desk.profile, "SingletonLock")).split("-").at(-1));
  first.child.kill("SIGKILL");
  await first.ended;
  process.kill(owner, "SIGKILL");
  rmSync(join(desk.profile, "DevToolsActivePort"), { force: true });
  // Somebody else sits on the port now.
  const squatter = createServer().listen(Number(before), "127.0.0.1");
  try {
    desk.start();
    const again = await firstPage(await desk.browser());
    expect(new URL(again.url()).port).not.toBe(before);
    await expect(again.locator(".message", { hasText: "Killed in the browser" })).toBeVisible({ timeout: 20_000 });
  } finally {
    squatter.close();
  }
});

test("a machine without a display is told so in one sentence that names the headless command", async ({ desk }) => {
  const { DISPLAY: _display, WAYLAND_DISPLAY: _wayland, ...env } = process.env;
  const { code, said } = await startIn({ ...env, XDG_CONFIG_HOME: desk.folder }, []).ended;
  expect(code).toBe(1);
  expect(said.trim().split("\n")).toHaveLength(1);
  expect(said).toContain("npm run --silent headless -- solve FILE");
});

test("a display that does not answer is told so, and the command ends", async ({ desk }) => {
  const { code, said } = await startIn({ ...process.env, DISPLAY: ":4711", XDG_CONFIG_HOME: desk.folder }, []).ended;
  expect(code).toBe(1);
  expect(said).toContain("does not answer");
});
