import { type ChildProcess, spawnSync } from "node:child_process";
import { existsSync, mkdtempSync, readdirSync, readFileSync } from "node:fs";
import { rm } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { test as base, type ElectronApplication, _electron as electron, expect, type Page } from "@playwright/test";

/**
 * The desktop program under test: the compiled main process and preload with the built window. Each journey runs twice: on the stand-in
 * for Electron (see `stand-in/`), and on Electron itself where its binary is there and runs on this machine.
 */

const root = fileURLToPath(new URL("../..", import.meta.url));
const STAND_IN = fileURLToPath(new URL("stand-in/electron", import.meta.url));

/** @returns Electron's own binary when there is one that runs here, or why not. */
function realElectron(): { readonly binary: string } | { readonly missing: string } {
  const folders = [process.env.ELECTRON_OVERRIDE_DIST_PATH, join(root, "node_modules", "electron", "dist")];
  const binary = folders.flatMap((folder) => (folder ? [join(folder, "electron")] : [])).find((path) => existsSync(path));
  if (binary === undefined) return { missing: "Electron's binary is not on this machine" };
  const tried = spawnSync(binary, ["--version"], { timeout: 10_000, env: { ...process.env, ELECTRON_RUN_AS_NODE: "1" } });
  if (tried.status !== 0) return { missing: `Electron's binary does not run on this machine: ${tried.stderr}` };
  return process.env.DISPLAY ? { binary } : { missing: "Electron needs a display (run under xvfb-run)" };
}

/** Starts a program, packed or not, on the stand-in. */
export async function standInProgram(folder: string, userData: string): Promise<Program> {
  const env = { ...process.env, FIELDTRAY_USER_DATA: userData };
  const app = await electron.launch({ executablePath: STAND_IN, args: [folder], env });
  const page = await app.firstWindow();
  await page.waitForURL(/index\.html/);
  return { app, page };
}

export const SHELLS = ["stand-in", "electron"] as const;
export type Shell = (typeof SHELLS)[number];

/** A running program with its first window. */
export interface Program {
  readonly app: ElectronApplication;
  readonly page: Page;
}

export interface Bench {
  /** The user's data folder and a folder for setups, both empty at first and kept from one start to the next. */
  readonly userData: string;
  readonly folder: string;
  readonly start: (...files: readonly string[]) => Promise<Program>;
  /** Starts without waiting for a window: a second start ends by itself. @returns its exit code. */
  readonly startAgain: (...files: readonly string[]) => number | null;
}

interface Options {
  readonly shell: Shell;
}

/** A test with a bench to start the program on; whatever was started is ended afterwards. */
export const test = base.extend<{ bench: Bench } & Options>({
  shell: ["stand-in", { option: true }],
  bench: async ({ shell }, use, testInfo) => {
    const place = mkdtempSync(join(tmpdir(), "fieldtray-desktop-"));
    const [userData, folder] = [join(place, "data"), mkdtempSync(join(place, "setups-"))];
    const real = realElectron();
    if (shell === "electron" && "missing" in real) testInfo.skip(true, real.missing);
    const binary = shell === "electron" && "binary" in real ? real.binary : STAND_IN;
    const env = { ...process.env, FIELDTRAY_USER_DATA: userData };
    const started: ChildProcess[] = [];
    await use({
      userData,
      folder,
      start: async (...files) => {
        const app = await electron.launch({ executablePath: binary, args: [root, ...files], env, cwd: folder });
        started.push(app.process());
        const page = await app.firstWindow();
        await page.waitForURL(/index\.html/);
        await expect(page.getByRole("heading", { level: 1 })).toBeVisible({ timeout: 30_000 });
        return { app, page };
      },
      startAgain: (...files) => spawnSync(binary, [root, ...files], { env, cwd: folder, timeout: 20_000 }).status,
    });
    for (const child of started) {
      const ended = new Promise((resolve) => child.once("exit", resolve));
      if (child.exitCode === null && child.signalCode === null && child.kill("SIGKILL")) await ended;
    }
    // The browser's own processes end a moment later and still write into their profile.
    await rm(place, { recursive: true, force: true, maxRetries: 20, retryDelay: 100 });
  },
});
export { expect };

/** Has the next dialog to open answer with `path`, or be cancelled. */
export const answerOpen = ({ app }: Program, path: string | null): Promise<void> =>
  app.evaluate(({ dialog }, picked) => {
    dialog.showOpenDialog = async () => ({ canceled: picked === null, filePaths: picked === null ? [] : [picked] });
  }, path);

/** Has the next dialog to save answer with `path`, or be cancelled. */
export const answerSave = ({ app }: Program, path: string | null): Promise<void> =>
  app.evaluate(({ dialog }, picked) => {
    dialog.showSaveDialog = async () => ({ canceled: picked === null, filePath: picked ?? "" });
  }, path);

/** Has the next question answered by the button of that name, and remembers what was asked. */
export const answerQuestion = ({ app }: Program, button: string): Promise<void> =>
  app.evaluate(({ app: program, dialog }, wanted) => {
    const answer = async (...given: readonly unknown[]) => {
      const question = given.at(-1) as { message: string; buttons: string[] };
      Object.assign(program, { asked: question.message });
      return { response: question.buttons.indexOf(wanted), checkboxChecked: false };
    };
    dialog.showMessageBox = answer as typeof dialog.showMessageBox;
  }, button);
export const lastQuestion = ({ app }: Program): Promise<string | null> =>
  app.evaluate(({ app: program }) => String(Reflect.get(program, "asked") ?? "") || null);

/** Chooses an item of the menu bar. */
export const choose = ({ app }: Program, id: string): Promise<void> =>
  app.evaluate(({ Menu }, item) => {
    const found = Menu.getApplicationMenu()?.getMenuItemById(item);
    if (!found) throw new Error(`the menu has no ${item}`);
    found.click();
  }, id);

/** Asks the first window to close, as its own button would. */
export const closeWindow = ({ app }: Program): Promise<void> =>
  app.evaluate(({ BrowserWindow }) => {
    // Later, because the last window takes the process along before it could answer.
    setTimeout(() => BrowserWindow.getAllWindows().at(0)?.close());
  });
export const titleOf = ({ app }: Program): Promise<string> =>
  app.evaluate(({ BrowserWindow }) => BrowserWindow.getAllWindows().at(0)?.getTitle() ?? "");

/** Gives the open setup another title: the simplest change that there is. */
export async function retitle({ page }: Program, title: string): Promise<void> {
  const field = page.getByRole("textbox", { name: "Title", exact: true });
  await field.fill(title);
  await field.press("Enter");
  await expect(page.getByRole("heading", { level: 1 })).toContainText(title);
}

export const titleInFile = (path: string): string => JSON.parse(readFileSync(path, "utf8")).title;
/** Names of the kept drafts in the user's data. */
export const draftsIn = (userData: string): readonly string[] =>
  existsSync(join(userData, "drafts")) ? readdirSync(join(userData, "drafts")).filter((name) => name.endsWith(".json")) : [];
