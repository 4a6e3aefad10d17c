import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { type Page, test as plain } from "@playwright/test";
import { build } from "vite";
import { serveWindow } from "../../build-resources/window-server.mjs";
import { expect } from "./open-window";

/** The window built with a catalogue of longer, accented words (pseudo-texts.ts): what is cut off, and what is not in the catalogue. */

const inProject = (path: string): string => fileURLToPath(new URL(`../../${path}`, import.meta.url));

const test = plain.extend<{ page: Page }, { address: string }>({
  address: [
    // biome-ignore lint/correctness/noEmptyPattern: Playwright reads the fixture's needs from its pattern
    async ({}, use) => {
      const folder = mkdtempSync(join(tmpdir(), "fieldtray-pseudo-"));
      const [window, kept] = [join(folder, "window"), join(folder, "kept")];
      const catalogue = inProject("renderer/texts/texts.ts");
      await build({
        configFile: inProject("renderer/vite.config.ts"),
        logLevel: "error",
        build: { outDir: window, emptyOutDir: true, minify: false },
        plugins: [
          {
            name: "longer-words",
            enforce: "pre",
            async resolveId(source, importer, options) {
              if (!/\/texts$/.test(source) || importer === undefined || importer.endsWith("pseudo-texts.ts")) return null;
              const found = await this.resolve(source, importer, { ...options, skipSelf: true });
              return found?.id === catalogue ? inProject("tests/journeys/pseudo-texts.ts") : null;
            },
          },
        ],
      });
      const server = await serveWindow(window, kept, 0);
      await use(server.address);
      await server.stop();
      rmSync(folder, { recursive: true, force: true });
    },
    { scope: "worker", timeout: 120_000 },
  ],
  page: async ({ page, address }, use) => {
    await page.goto(address);
    await expect(page.locator(".ledger-entry dd").first()).toContainText("Ω");
    await use(page);
  },
});

/** What is on the page and wider than its own box without a way to see the rest: in words, with where it stands. */
const cutOff = (page: Page): Promise<string[]> =>
  page.evaluate(() => {
    const ends = (element: Element): boolean => getComputedStyle(element).textOverflow === "ellipsis";
    const found: string[] = [];
    for (const element of document.querySelectorAll("button, label, legend, dt, dd, h1, h2, h3, p, th, td, li, select, output")) {
      const box = element.getBoundingClientRect();
      if (box.width < 4 || box.height < 4 || element.closest(".unseen, .parts-list, [hidden]") !== null) continue;
      const { overflowX } = getComputedStyle(element);
      const words = (element.textContent ?? "").slice(0, 50);
      if (element.scrollWidth > element.clientWidth + 2 && element.clientWidth > 0 && overflowX !== "auto" && overflowX !== "scroll") {
        const shortened = ends(element) || [...element.querySelectorAll("*")].some(ends);
        if (!shortened || element.getAttribute("title") === null) found.push(`${element.tagName} ${element.className}: ${words}`);
      }
      if (box.right > innerWidth + 1 || box.left < -1) found.push(`beyond the window: ${element.tagName} ${element.className}: ${words}`);
    }
    return found;
  });

/** Words of three letters and more that stand on the page as plain English. */
const plainWords = (page: Page, within: string): Promise<string[]> =>
  page.evaluate((selector) => {
    const found: string[] = [];
    for (const root of document.querySelectorAll(selector)) {
      for (const element of [root, ...root.querySelectorAll("*")]) {
        for (const name of ["aria-label", "title", "placeholder"]) {
          const text = element.getAttribute(name);
          if (text !== null && /[A-Za-z]{4}/.test(text) && !/[·áëïöüÅÉÎØÛ]/.test(text)) found.push(`${name}: ${text}`);
        }
        for (const child of element.childNodes) {
          const text = child.nodeType === Node.TEXT_NODE ? (child.textContent ?? "") : "";
          if (/[A-Za-z]{4}/.test(text) && !/[·áëïöüÅÉÎØÛ]/.test(text)) found.push(text);
        }
      }
    }
    return [...new Set(found)];
  }, within);

const desks = (page: Page) => page.locator(".rail nav button");

for (const [width, height] of [
  [1024, 700],
  [1280, 800],
] as const) {
  test(`at ${width} × ${height} no longer word is cut off on any desk`, async ({ page }) => {
    await page.setViewportSize({ width, height });
    const count = await desks(page).count();
    for (let desk = 0; desk < count; desk++) {
      await desks(page).nth(desk).click();
      expect.soft(await cutOff(page), (await desks(page).nth(desk).textContent()) ?? "").toEqual([]);
    }
    await desks(page).nth(0).click();
    await page.locator(".in-tray").first().click();
    expect.soft(await cutOff(page), "a selected part").toEqual([]);
    await page.locator(".view-bar .view-group").last().getByRole("button").nth(1).click();
    for (const button of await page.locator(".closer-card .choices button:last-child").all()) await button.click();
    expect.soft(await cutOff(page), "the closer look").toEqual([]);
    await page.locator(".stock-edit").click();
    await page.locator(".stock-card .choices button").last().click();
    expect.soft(await cutOff(page), "the stock list").toEqual([]);
  });
}

test("tray, shelf, cards, bars and undo speak only words of the catalogue", async ({ page }) => {
  await page.locator(".in-tray").first().click();
  await page.locator(".tray-surface").focus();
  await page.keyboard.press("ArrowRight");
  // Names, titles and notes are the user's own; a part's name is one.
  const own = /^(Left bar|Right bar|Loose ring|Two bars|accented)/;
  for (const place of [".rail", ".top-bar", ".shelf", ".view-bar", ".tray-canvas", ".card"]) {
    const found = await plainWords(page, place);
    expect
      .soft(
        found.filter((text) => !own.test(text.replace(/^(title|aria-label): /, ""))),
        place,
      )
      .toEqual([]);
  }
});
