import { createReadStream, existsSync, statSync } from "node:fs";
import { createServer, type Server } from "node:http";
import { extname, join, normalize } from "node:path";
import { fileURLToPath } from "node:url";
import { test as base, expect, type Page } from "@playwright/test";
import { POLICY } from "../../build-resources/window-server.mjs";

/** The built window, served as the program serves it: same policy, nothing from elsewhere. WINDOW_FOLDER names another build of it. */
const folder = process.env.WINDOW_FOLDER ?? fileURLToPath(new URL("../../dist/renderer", import.meta.url));

const TYPES: Readonly<Record<string, string>> = {
  ".html": "text/html; charset=utf-8",
  ".js": "text/javascript; charset=utf-8",
  ".css": "text/css; charset=utf-8",
  ".ttf": "font/ttf",
  ".svg": "image/svg+xml",
};
function serve(): Promise<Server> {
  const server = createServer((request, response) => {
    const path = decodeURIComponent(new URL(request.url ?? "/", "http://window").pathname);
    const file = normalize(join(folder, path === "/" ? "index.html" : path));
    if (!file.startsWith(folder) || !existsSync(file) || !statSync(file).isFile()) {
      response.writeHead(404).end();
      return;
    }
    response.writeHead(200, { "Content-Type": TYPES[extname(file)] ?? "application/octet-stream", "Content-Security-Policy": POLICY });
    createReadStream(file).pipe(response);
  });
  return new Promise((resolve) => server.listen(0, "127.0.0.1", () => resolve(server)));
}

/**
 * A test with a window: `page` is open on the tray of the first example, and every fault that the page reports fails the test, unless the
 * test takes it out of `faults`.
 */
export const test = base.extend<{ page: Page; faults: string[] }, { address: string }>({
  address: [
    // biome-ignore lint/correctness/noEmptyPattern: Playwright reads the fixture's needs from its pattern
    async ({}, use) => {
      const server = await serve();
      const place = server.address();
      await use(`http://127.0.0.1:${typeof place === "object" && place !== null ? place.port : 0}/`);
      server.closeAllConnections();
      server.close();
    },
    { scope: "worker" },
  ],
  // biome-ignore lint/correctness/noEmptyPattern: Playwright reads the fixture's needs from its pattern
  faults: async ({}, use) => use([]),
  page: async ({ page, address, faults }, use) => {
    page.on("pageerror", (error) => faults.push(error.message));
    page.on("console", (line) => line.type() === "error" && faults.push(line.text()));
    await page.goto(address);
    await expect(ledger(page, "Resistance")).toContainText("Ω");
    // The quick solution comes first; journeys begin with the careful one, whose figures stay.
    await expect(page.locator(".ledger")).toHaveAttribute("data-quality", "print");
    await use(page);
    expect(faults).toEqual([]);
  },
});

export { expect };

/** An entry of the bottom line by its name. */
export const ledger = (page: Page, name: string) => page.locator(".ledger-entry", { hasText: name }).locator("dd");

export const goTo = (page: Page, desk: string) =>
  page.getByRole("navigation", { name: "Desks" }).getByRole("button", { name: desk }).click();

/** Opens one of the ready setups by its title. */
export async function openExample(page: Page, title: string): Promise<void> {
  const before = (await ledger(page, "Resistance").textContent()) ?? "";
  await page.getByRole("button", { name: /^Start page/ }).click();
  await page.getByRole("region", { name: "Examples" }).getByRole("button", { name: title }).click();
  await expect(ledger(page, "Resistance")).not.toHaveText(before);
  await expect(ledger(page, "Resistance")).not.toHaveText("–");
}

/** The middle of the stage of the tray, in page coordinates, and the scale of the fitted tray. */
export async function trayBox(page: Page) {
  const box = await page.getByRole("main", { name: "Tray" }).boundingBox();
  if (box === null) throw new Error("the tray is not on the page");
  return box;
}

/** Opening becomes an upload and saving a download: the browser's own file dialogs are out of a test's reach. */
export const withoutPickers = (page: Page): Promise<void> =>
  page.evaluate(() => {
    Reflect.deleteProperty(window, "showOpenFilePicker");
    Reflect.deleteProperty(window, "showSaveFilePicker");
  });

/** @returns the path of the file that an action saves. */
export async function savedFile(page: Page, act: () => Promise<void>): Promise<string> {
  const [download] = await Promise.all([page.waitForEvent("download"), act()]);
  return download.path();
}
