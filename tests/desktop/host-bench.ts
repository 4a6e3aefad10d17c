import { existsSync, mkdirSync, mkdtempSync, readFileSync, writeFileSync } from "node:fs";
import { rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { type Browser, chromium, type Page } from "@playwright/test";
import { build } from "vite";
import { serveWindow } from "../../build-resources/window-server.mjs";
import type { Host, HostEvent } from "../../shared-types/host";
import { answerOpen, answerSave, type Bench, type Program } from "./program";

/**
 * One bench for both hosts: a page in which `host` is the very code that the window uses, a folder whose files it can be made to pick, and
 * a way to let the window go down and come back.
 */
export interface HostBench {
  readonly page: () => Page;
  /** Writes a file as another program would. */
  readonly put: (name: string, content: string | Buffer) => Promise<void>;
  /** @returns a file's text, null when there is none. */
  readonly get: (name: string) => Promise<string | null>;
  readonly remove: (name: string) => Promise<void>;
  /** What the user picks in the next dialogs; null is 'Cancel'. */
  readonly pickToOpen: (name: string | null) => Promise<void>;
  readonly pickToSave: (name: string | null) => Promise<void>;
  readonly title: () => Promise<string>;
  /** Drops a file of the folder on the window. */
  readonly drop: (name: string) => Promise<void>;
  /** The window goes down without a word, and another one opens. */
  readonly crashAndReturn: () => Promise<void>;
  readonly end: () => Promise<void>;
}

declare global {
  interface Window {
    host: Host;
    heard: HostEvent[];
    makeHost?: { findHost: (page: Window, version: string) => Host };
  }
}

const under = (path: string): string => fileURLToPath(new URL(path, import.meta.url));
let code: Promise<string> | null = null;

/** @returns the hosts' code as a script that makes a host in whatever page it runs in. */
function hostCode(): Promise<string> {
  code ??= (async () => {
    const result = await build({
      configFile: false,
      logLevel: "silent",
      build: {
        write: false,
        minify: false,
        lib: { entry: under("../../renderer/host/find-host.ts"), formats: ["iife"], name: "makeHost" },
      },
    });
    const [output] = Array.isArray(result) ? result : [result];
    if (!("output" in output)) throw new Error("nothing was built");
    return output.output[0].code.replace(/^var makeHost/, "globalThis.makeHost");
  })();
  return code;
}

async function makeHost(page: Page): Promise<void> {
  await page.evaluate(await hostCode());
  await page.evaluate(() => {
    if (window.makeHost === undefined) throw new Error("the hosts' code did not run");
    window.host = window.makeHost.findHost(window, "9.9.9");
    window.heard = [];
    window.host.listen((event) => window.heard.push(event));
  });
}

/** Drops a file that the page holds already. */
const dropOnPage = (page: Page, name: string, text: string): Promise<void> =>
  page.evaluate(
    ([fileName, content]) => {
      const dataTransfer = new DataTransfer();
      dataTransfer.items.add(new File([content], fileName));
      document.body.dispatchEvent(new DragEvent("drop", { dataTransfer, bubbles: true, cancelable: true }));
    },
    [name, text] as const,
  );

/** The desktop program on the stand-in for Electron. */
export async function desktopBench(bench: Bench): Promise<HostBench> {
  let program: Program = await bench.start();
  await makeHost(program.page);
  const at = (name: string): string => join(bench.folder, name);
  return {
    page: () => program.page,
    put: async (name, content) => writeFileSync(at(name), content),
    get: async (name) => (existsSync(at(name)) ? readFileSync(at(name), "utf8") : null),
    remove: (name) => rm(at(name)),
    pickToOpen: (name) => answerOpen(program, name === null ? null : at(name)),
    pickToSave: (name) => answerSave(program, name === null ? null : at(name)),
    title: () => program.app.evaluate(({ BrowserWindow }) => BrowserWindow.getAllWindows()[0].getTitle()),
    drop: async (name) => {
      await program.page.evaluate(([file, path]) => Object.assign(window, { __standInPaths: { [file]: path } }), [name, at(name)] as const);
      await dropOnPage(program.page, name, readFileSync(at(name), "utf8"));
    },
    crashAndReturn: async () => {
      const ended = program.app.waitForEvent("close");
      program.app.process().kill("SIGKILL");
      await ended;
      program = await bench.start();
      await makeHost(program.page);
    },
    end: async () => {},
  };
}

/** The browser's own private folder stands for the user's: its handles are real ones, only the dialogs are answered by the test. */
const PICKERS = `
  globalThis.picks = { open: null, save: null };
  const folder = () => navigator.storage.getDirectory();
  const picked = async (name, create) => {
    if (name === null) throw new DOMException("The user aborted a request.", "AbortError");
    return (await folder()).getFileHandle(name, { create });
  };
  globalThis.showOpenFilePicker = async () => [await picked(globalThis.picks.open, false)];
  globalThis.showSaveFilePicker = async () => picked(globalThis.picks.save, true);
`;

/** A Chromium window on the local window server, as `npm start` opens it without Electron, with nothing on its page but the host. */
export async function browserBench(): Promise<HostBench> {
  const place = mkdtempSync(join(tmpdir(), "fieldtray-browser-"));
  const pages = join(place, "pages");
  mkdirSync(pages);
  writeFileSync(join(pages, "index.html"), "<!doctype html><html><head></head><body></body></html>");
  const server = await serveWindow(pages, join(place, "kept"), 0);
  const browser: Browser = await chromium.launch({
    executablePath: process.env.CHROMIUM_PATH || "/usr/bin/chromium",
    args: ["--no-sandbox", "--disable-gpu", "--disable-quic"],
  });
  const context = await browser.newContext({ permissions: ["clipboard-read", "clipboard-write"] });
  async function open(): Promise<Page> {
    const fresh = await context.newPage();
    await fresh.addInitScript(PICKERS);
    await fresh.goto(server.address);
    await makeHost(fresh);
    return fresh;
  }
  let page = await open();
  const set = (kind: string, name: string | null): Promise<void> =>
    page.evaluate(([key, value]) => Object.assign(Reflect.get(globalThis, "picks"), { [String(key)]: value }), [kind, name]);
  const get = (name: string): Promise<string | null> =>
    page.evaluate(async (fileName) => {
      const folder = await navigator.storage.getDirectory();
      const handle = await folder.getFileHandle(fileName).catch(() => null);
      return handle === null ? null : (await handle.getFile()).text();
    }, name);
  return {
    page: () => page,
    put: (name, content) =>
      page.evaluate(
        async ([fileName, encoded]) => {
          const handle = await (await navigator.storage.getDirectory()).getFileHandle(fileName, { create: true });
          const writable = await handle.createWritable();
          await writable.write(Uint8Array.from(atob(encoded), (letter) => letter.charCodeAt(0)));
          await writable.close();
        },
        [name, Buffer.from(content).toString("base64")] as const,
      ),
    get,
    remove: (name) => page.evaluate(async (fileName) => (await navigator.storage.getDirectory()).removeEntry(fileName), name),
    pickToOpen: (name) => set("open", name),
    pickToSave: (name) => set("save", name),
    title: () => page.title(),
    drop: async (name) => dropOnPage(page, name, (await get(name)) ?? ""),
    crashAndReturn: async () => {
      await page.close();
      page = await open();
    },
    end: async () => {
      await browser.close();
      await server.stop();
      await rm(place, { recursive: true, force: true });
    },
  };
}
