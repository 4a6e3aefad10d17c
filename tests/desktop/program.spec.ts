import { existsSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import type { Page } from "@playwright/test";
import { settingsSchema } from "../../shared-types/host";
import {
  answerOpen,
  answerQuestion,
  answerSave,
  choose,
  closeWindow,
  draftsIn,
  expect,
  lastQuestion,
  retitle,
  SHELLS,
  test,
  titleInFile,
  titleOf,
} from "./program";

/** A small valid setup under a title of its own. */
const setupNamed = (title: string): string =>
  JSON.stringify({
    format: "fieldtray.setup",
    version: 1,
    title,
    tray: { shape: "rectangle", lengthMm: 300, widthMm: 200 },
    water: { depthMm: 12, conductivityUsPerCm: 500 },
    supply: { waveform: "ac", frequencyHz: 50, volts: 6 },
    parts: [],
  });

for (const shell of SHELLS) {
  test.describe(`on ${shell}`, () => {
    test.use({ shell });

    test("starts with an example loaded, in a window of its own origin that Node cannot be reached from", async ({ bench }) => {
      const { app, page } = await bench.start();
      const [address, visible] = await app.evaluate(({ BrowserWindow }) => {
        const window = BrowserWindow.getAllWindows()[0];
        return [window.webContents.getURL(), window.isVisible()];
      });
      expect(address).toBe("app://fieldtray/index.html");
      expect(visible).toBe(true);
      await expect(page.locator(".ledger-entry", { hasText: "Resistance" }).locator("dd")).toContainText("Ω", { timeout: 30_000 });
      expect(await page.evaluate(() => [typeof require, typeof process, Object.keys(window).includes("fieldtrayBridge")])).toEqual([
        "undefined",
        "undefined",
        true,
      ]);
      expect(await page.evaluate(() => crossOriginIsolated)).toBe(true);
    });

    test("nothing in the window offends its own policy, on any desk", async ({ bench }) => {
      const program = await bench.start();
      const complaints: string[] = [];
      program.page.on("console", (message) => {
        if (message.type() === "error") complaints.push(message.text());
      });
      program.page.on("pageerror", (error) => complaints.push(error.message));
      await program.page.reload();
      await expect(program.page.locator(".ledger-entry", { hasText: "Resistance" }).locator("dd")).toContainText("Ω", { timeout: 30_000 });
      for (const desk of ["desk-bench", "desk-probe-plan", "desk-sheets", "desk-lay-out", "start-page"]) {
        await choose(program, desk);
        await program.page.waitForTimeout(700);
      }
      expect(complaints).toEqual([]);
    });

    test("a setup is saved as, opened again and saved over itself, and the title tells", async ({ bench }) => {
      const program = await bench.start();
      const path = join(bench.folder, "third-bench.fieldtray.json");
      await retitle(program, "Tray of the third bench");
      await expect.poll(() => titleOf(program)).toBe("• Tray of the third bench – Fieldtray");
      await answerSave(program, path);
      await choose(program, "save-as");
      await expect.poll(() => titleOf(program)).toBe("Tray of the third bench – Fieldtray");
      expect(titleInFile(path)).toBe("Tray of the third bench");

      await retitle(program, "Tray of the fourth bench");
      await answerSave(program, null);
      await choose(program, "save");
      await expect.poll(() => titleOf(program)).toBe("Tray of the fourth bench – Fieldtray");
      expect(titleInFile(path)).toBe("Tray of the fourth bench");
      expect(titleInFile(join(bench.folder, "third-bench.previous.fieldtray.json"))).toBe("Tray of the third bench");

      const other = join(bench.folder, "other.fieldtray.json");
      writeFileSync(other, setupNamed("A tray from elsewhere"));
      await answerOpen(program, other);
      await choose(program, "open");
      await expect(program.page.getByRole("heading", { level: 1 })).toContainText("A tray from elsewhere");
      const recent = await program.app.evaluate(({ Menu }) =>
        Menu.getApplicationMenu()
          ?.getMenuItemById("recent")
          ?.submenu?.items.map(({ label }) => label.split("  ")[0]),
      );
      expect(recent).toEqual(["other.fieldtray.json", "third-bench.fieldtray.json"]);
    });

    test("a menu key is heard once, by the window's own command", async ({ bench }) => {
      const program = await bench.start();
      const path = join(bench.folder, "by-key.fieldtray.json");
      await retitle(program, "Saved by key");
      await answerSave(program, path);
      await program.page.keyboard.press("Control+s");
      await expect.poll(() => existsSync(path)).toBe(true);
      await choose(program, "desk-bench");
      await expect(program.page.getByRole("complementary", { name: "Bench" })).toBeVisible();
    });

    test("a damaged file is refused in words and the open setup stays", async ({ bench }) => {
      const program = await bench.start();
      const path = join(bench.folder, "damaged.fieldtray.json");
      writeFileSync(path, Buffer.from([0x7b, 0xff, 0xfe, 0x00]));
      const before = await program.page.getByRole("heading", { level: 1 }).textContent();
      await answerOpen(program, path);
      await choose(program, "open");
      await expect(program.page.locator(".message")).toContainText("not a text file");
      expect(await program.page.getByRole("heading", { level: 1 }).textContent()).toBe(before);
    });

    test("closing with changes asks: staying stays, saving saves and closes", async ({ bench }) => {
      const program = await bench.start();
      const path = join(bench.folder, "asked.fieldtray.json");
      await retitle(program, "Asked before closing");
      await expect.poll(() => titleOf(program)).toContain("•");
      await answerQuestion(program, "Stay");
      await closeWindow(program);
      await expect.poll(() => lastQuestion(program)).toBe("Asked before closing has changes that are not saved.");
      expect(program.page.isClosed()).toBe(false);

      await answerSave(program, path);
      await answerQuestion(program, "Save");
      const ended = program.app.waitForEvent("close");
      await closeWindow(program);
      await ended;
      expect(titleInFile(path)).toBe("Asked before closing");
      expect(draftsIn(bench.userData)).toEqual([]);
    });

    test("closing without saving gives the changes up and leaves no draft behind", async ({ bench }) => {
      const program = await bench.start();
      await retitle(program, "Given up");
      await expect.poll(() => draftsIn(bench.userData).length).toBe(1);
      await answerQuestion(program, "Close without saving");
      const ended = program.app.waitForEvent("close");
      await closeWindow(program);
      await ended;
      expect(draftsIn(bench.userData)).toEqual([]);
    });

    test("work of the last two seconds is offered again after the program was killed", async ({ bench }) => {
      const first = await bench.start();
      await retitle(first, "Killed at the bench");
      await expect.poll(() => draftsIn(bench.userData).length, { timeout: 2000 }).toBe(1);
      first.app.process().kill("SIGKILL");

      const second = await bench.start();
      const offer = second.page.locator(".message", { hasText: "Killed at the bench" });
      await expect(offer).toBeVisible();
      await offer.getByRole("button", { name: "Bring it back" }).click();
      await expect(second.page.getByRole("heading", { level: 1 })).toContainText("Killed at the bench");
      await expect.poll(() => titleOf(second)).toContain("•");
    });

    test("a page that dies is told of, started again, and its work is offered there", async ({ bench }) => {
      const program = await bench.start();
      await retitle(program, "Died with its page");
      await expect.poll(() => draftsIn(bench.userData).length).toBe(1);
      await answerQuestion(program, "Start it again");
      await program.app.evaluate(({ BrowserWindow }) => BrowserWindow.getAllWindows()[0].webContents.forcefullyCrashRenderer());
      await expect.poll(() => lastQuestion(program)).toBe("The window has stopped working.");
      const offer = async (): Promise<number> => {
        const pages = program.app.windows().filter((page) => !page.isClosed());
        const counts = await Promise.all(
          pages.map((page) =>
            page
              .locator(".message", { hasText: "Died with its page" })
              .count()
              .catch(() => 0),
          ),
        );
        return counts.reduce((sum, count) => sum + count, 0);
      };
      await expect.poll(offer, { timeout: 30_000 }).toBe(1);
    });

    test("two windows keep two drafts, and each only its own", async ({ bench }) => {
      const program = await bench.start();
      const [second] = await Promise.all([program.app.waitForEvent("window"), choose(program, "new-window")]);
      await expect(second.getByRole("heading", { level: 1 })).toBeVisible({ timeout: 30_000 });
      await retitle(program, "In the first window");
      await retitle({ app: program.app, page: second }, "In the second window");
      await expect.poll(() => draftsIn(bench.userData).length).toBe(2);
      await expect(second.locator(".message", { hasText: "In the first window" })).toHaveCount(0);
    });

    test("a second start hands its file to the first and ends", async ({ bench }) => {
      const program = await bench.start();
      const path = join(bench.folder, "handed-over.fieldtray.json");
      writeFileSync(path, setupNamed("Handed over"));
      expect(bench.startAgain(path)).toBe(0);
      await expect(program.page.getByRole("heading", { level: 1 })).toContainText("Handed over");
      expect(program.app.windows()).toHaveLength(1);
    });

    test("a file named at the start is open when the window is", async ({ bench }) => {
      const path = join(bench.folder, "named.fieldtray.json");
      writeFileSync(path, setupNamed("Named at the start"));
      const { page } = await bench.start(path);
      await expect(page.getByRole("heading", { level: 1 })).toContainText("Named at the start");
    });

    test("a change on disk by another program is noticed, asked about, and never overwritten silently", async ({ bench }) => {
      const program = await bench.start();
      const path = join(bench.folder, "shared.fieldtray.json");
      writeFileSync(path, setupNamed("Shared tray"));
      await answerOpen(program, path);
      await choose(program, "open");
      await expect(program.page.getByRole("heading", { level: 1 })).toContainText("Shared tray");
      await retitle(program, "My own change");
      writeFileSync(path, setupNamed("A colleague's change"));
      await expect(program.page.locator(".message", { hasText: "changed by another program" })).toBeVisible();
      await choose(program, "save");
      const question = program.page.locator(".message", { hasText: "Nothing has been written yet" });
      await expect(question).toBeVisible();
      expect(titleInFile(path)).toBe("A colleague's change");
      await question.getByRole("button", { name: "Write mine over it" }).click();
      await expect.poll(() => titleInFile(path)).toBe("My own change");
      expect(titleInFile(join(bench.folder, "shared.previous.fieldtray.json"))).toBe("A colleague's change");
    });

    test("a folder that vanished is told in words, and the work stays unsaved", async ({ bench }) => {
      const program = await bench.start();
      const path = join(bench.folder, "gone.fieldtray.json");
      writeFileSync(path, setupNamed("Soon without a folder"));
      await answerOpen(program, path);
      await choose(program, "open");
      await expect(program.page.getByRole("heading", { level: 1 })).toContainText("Soon without a folder");
      await retitle(program, "Changed meanwhile");
      rmSync(bench.folder, { recursive: true });
      await choose(program, "save");
      await expect(program.page.locator(".message", { hasText: "no longer there" })).toBeVisible();
      await expect.poll(() => titleOf(program)).toContain("•");
    });

    test("other pages, other windows and the machine's devices are refused", async ({ bench }) => {
      const { app, page } = await bench.start();
      await page.evaluate(() => {
        location.href = "https://example.org/";
      });
      await page.evaluate(() => void window.open("https://example.org/"));
      const log = join(bench.userData, "logs", "fieldtray.log");
      await expect.poll(() => (existsSync(log) ? readFileSync(log, "utf8") : "")).toMatch(/refused to go to https:\/\/example\.org/);
      await expect.poll(() => readFileSync(log, "utf8")).toMatch(/refused a new window/);
      await expect.poll(() => app.windows().length).toBe(1);
      expect(page.url()).toMatch(/index\.html$/);
      const permission = await page.evaluate(async () => (await navigator.permissions.query({ name: "geolocation" })).state);
      expect(permission).toBe("denied");
      const answers = await app.evaluate(async ({ session }) => {
        const ask = async (address: string): Promise<number> => (await session.defaultSession.fetch(address)).status;
        return Promise.all(["app://fieldtray/../../package.json", "app://fieldtray/absent.js", "app://elsewhere/index.html"].map(ask));
      });
      expect(answers).toEqual([404, 404, 403]);
    });

    test("messages that do not fit the contract are refused", async ({ bench }) => {
      const { page } = await bench.start();
      const tried = await page.evaluate(async () => {
        const bridge: { ask: Record<string, (request?: unknown) => Promise<unknown>> } = Reflect.get(window, "fieldtrayBridge");
        const outcome = async (name: string, request: unknown): Promise<string> => {
          try {
            return JSON.stringify(await bridge.ask[name](request));
          } catch (error) {
            return String(error);
          }
        };
        return [
          await outcome("readFile", { path: "/etc/passwd" }),
          await outcome("readFile", "/etc/passwd"),
          await outcome("saveFile", { handle: "/etc/passwd", suggestedName: "x", text: 5, overwrite: true }),
          await outcome("discardDraft", "../settings"),
          await outcome("writeSettings", { theme: "purple" }),
        ];
      });
      expect(tried[0]).toContain("does not fit its schema");
      expect(tried[1]).toContain("cancelled");
      for (const answer of tried.slice(2)) expect(answer).toContain("does not fit its schema");
    });

    test("the settings and the window's place outlive the program", async ({ bench }) => {
      const first = await bench.start();
      const askBridge = (page: Page, name: string, request?: unknown): Promise<unknown> =>
        page.evaluate(([door, message]) => Reflect.get(window, "fieldtrayBridge").ask[String(door)](message), [name, request]);
      const settings = { ...settingsSchema.parse({}), paper: "a3", printers: [{ name: "Prep room", scaleX: 0.998, scaleY: 1.002 }] };
      await askBridge(first.page, "writeSettings", settings);
      await first.app.evaluate(({ BrowserWindow }) =>
        BrowserWindow.getAllWindows()[0].setBounds({ x: 60, y: 40, width: 1100, height: 720 }),
      );
      const ended = first.app.waitForEvent("close");
      await answerQuestion(first, "Close without saving");
      await closeWindow(first);
      await ended;
      const second = await bench.start();
      expect(await askBridge(second.page, "readSettings")).toEqual(settings);
      const bounds = await second.app.evaluate(({ BrowserWindow }) => BrowserWindow.getAllWindows()[0].getBounds());
      expect(bounds).toMatchObject({ x: 60, y: 40, width: 1100, height: 720 });
    });
  });
}

test("sheets go to the system's print dialog at their actual size, and a refusal is told in words", async ({ bench }) => {
  const program = await bench.start();
  const { app, page } = program;
  await expect(page.locator(".ledger-entry", { hasText: "Resistance" }).locator("dd")).toContainText("Ω", { timeout: 30_000 });
  await choose(program, "print");
  const job = () => app.evaluate(({ webContents }) => Reflect.get(webContents, "lastPrint") ?? null);
  await expect.poll(job, { timeout: 30_000 }).toMatchObject({
    head: "%PDF-",
    job: { silent: false, scaleFactor: 100, margins: { marginType: "none" } },
  });
  await expect(page.locator(".message", { hasText: "no printer in the stand-in" })).toBeVisible();
  await expect.poll(() => app.evaluate(({ BrowserWindow }) => BrowserWindow.getAllWindows().length)).toBe(1);
});
