import { readFileSync } from "node:fs";
import { expect, goTo, openExample, savedFile, test, withoutPickers } from "./open-window";

test.beforeEach(async ({ page }) => {
  await withoutPickers(page);
  await openExample(page, "Two discs");
  await goTo(page, "Sheets");
  await expect(page.locator("figure").first()).toBeVisible();
});

const pageTitles = (page: import("@playwright/test").Page) => page.locator("figcaption").allTextContents();

test("the pages shown are the pages saved", async ({ page }) => {
  const shown = await page.locator("figure").count();
  const path = await savedFile(page, () => page.getByRole("button", { name: "Save as PDF…" }).click());
  const pdf = readFileSync(path).toString("latin1");
  expect(pdf.startsWith("%PDF-")).toBe(true);
  expect(pdf.match(/\/Type\s*\/Page\b/g)).toHaveLength(shown);
  await expect(page.getByRole("status").filter({ hasText: "Saved Two discs" })).toContainText("measure the check bars");
});

test("a pack is chosen by who works from it, a page by its name", async ({ page }) => {
  await page.getByRole("button", { name: "Safety", exact: true }).click();
  await expect.poll(() => pageTitles(page)).toEqual(expect.arrayContaining([expect.stringContaining("Low-voltage checklist")]));
  await expect.poll(async () => (await pageTitles(page)).some((title) => title.includes("Tray template"))).toBe(false);
  await page.getByLabel("Tray template", { exact: true }).check();
  await expect.poll(async () => (await pageTitles(page)).some((title) => title.includes("Tray template"))).toBe(true);
  await expect(page.getByRole("button", { name: "Safety", exact: true })).toHaveAttribute("aria-pressed", "false");
});

test("the pages can be seen as large as on paper, and gone to one by one from the strip", async ({ page }) => {
  await page.getByRole("button", { name: "Everything", exact: true }).click();
  await expect.poll(async () => (await pageTitles(page)).some((title) => title.includes("Printer calibration"))).toBe(true);
  await page.getByRole("button", { name: "100 %", exact: true }).click();
  const box = await page.locator(".page-picture").first().boundingBox();
  // A CSS millimetre is 96/25.4 pixels (CSS Values and Units, section 6.2).
  expect(box?.width).toBeCloseTo((210 * 96) / 25.4, 0);
  expect(box?.height).toBeCloseTo((297 * 96) / 25.4, 0);
  const strip = page.getByRole("navigation", { name: "Go to a page" });
  await expect(strip.getByRole("button")).toHaveCount(await page.locator("figure").count());
  await strip.getByRole("button", { name: /Low-voltage checklist, 1/ }).click();
  const checklist = page.locator("figure").filter({ hasText: "Low-voltage checklist, 1" });
  await expect(checklist).toBeFocused();
  await expect(checklist).toBeInViewport();
  await expect(strip.getByRole("button", { name: /Low-voltage checklist, 1/ })).toHaveAttribute("aria-current", "page");
});

test("mirroring, grid, ink, wall and edge change the page that is shown", async ({ page }) => {
  const picture = page.locator(".page-picture").first();
  const millimetres = picture.locator('path[stroke-width="0.05"]');
  const grounds = picture.locator('path[fill="rgb(217 217 217)"]');
  await expect(picture.locator("text", { hasText: "thick outline: inside of the wall" })).toHaveCount(1);
  await expect(millimetres).not.toHaveCount(0);
  await expect(grounds).not.toHaveCount(0);
  await page.getByLabel("Template mirrored, to read from below").check();
  const title = picture.locator("text", { hasText: "Tray template 1:1, mirrored, tile A1" });
  await expect(title).toHaveAttribute("x", "5");
  await page.getByLabel("Grid").selectOption({ label: "5 mm" });
  await expect(millimetres).toHaveCount(0);
  await page.getByLabel("Save ink").check();
  await expect(grounds).toHaveCount(0);
  await page.getByLabel("Wall drawn").fill("4");
  await page.getByLabel("Wall drawn").press("Enter");
  await expect(picture.locator("text", { hasText: "thin: its outside" })).toHaveCount(1);
  await page.getByLabel("Blank edge").fill("12");
  await page.getByLabel("Blank edge").press("Enter");
  await expect(title).toHaveAttribute("x", "12");
  await page.getByLabel("Blank edge").fill("3");
  await page.getByLabel("Blank edge").press("Enter");
  await expect(page.getByRole("alert").filter({ hasText: "Blank edge: 4 to 20 mm" })).toBeVisible();
});

test("what the canvas shows is saved as a picture", async ({ page }) => {
  await goTo(page, "Lay out");
  await expect(page.locator(".tray-surface canvas").first()).toBeVisible();
  const path = await savedFile(page, () => page.getByRole("button", { name: /as a picture/ }).click());
  const png = readFileSync(path);
  expect(png.subarray(1, 4).toString("latin1")).toBe("PNG");
  const shown = await page
    .locator(".tray-surface canvas")
    .first()
    .evaluate((canvas: HTMLCanvasElement) => [canvas.width, canvas.height]);
  expect([png.readUInt32BE(16), png.readUInt32BE(20)]).toEqual(shown);
  // The potential's colours are in it: a blank picture of this size takes a few thousand bytes.
  expect(png.byteLength).toBeGreaterThan(20_000);
});

test("on larger paper the template comes in one piece", async ({ page }) => {
  await expect.poll(async () => (await pageTitles(page)).filter((title) => title.includes("tile")).length).toBeGreaterThan(1);
  await page.getByLabel("Paper").selectOption("a3");
  await expect.poll(async () => (await pageTitles(page)).filter((title) => title.includes("tile")).length).toBe(0);
});

test("a measured printer is kept by its name, also after the window is loaded again; a bar far off is refused", async ({ page }) => {
  const bar = page.getByLabel("100 mm in x measure");
  await bar.fill("97/1.5");
  await bar.press("Enter");
  await expect(page.getByRole("alert").filter({ hasText: "fit to page" })).toBeVisible();
  await bar.fill("149.4/1.5");
  await bar.press("Enter");
  await page.getByLabel("Its name").fill("Prep room laser");
  await page.getByLabel("Its name").press("Enter");
  await expect(page.getByRole("combobox", { name: "Printer" })).toHaveValue("Prep room laser");
  await page.reload();
  await goTo(page, "Sheets");
  await expect(page.getByRole("combobox", { name: "Printer" })).toHaveValue("Prep room laser");
  await expect(bar).toHaveValue("99.6");
  await page.getByRole("button", { name: "Forget Prep room laser" }).click();
  await expect(bar).toHaveValue("100");
});

test("the drawing goes to a cutter at true size", async ({ page }) => {
  const path = await savedFile(page, () => page.getByRole("button", { name: "Save as SVG…" }).click());
  expect(readFileSync(path, "utf8")).toMatch(/<svg[^>]*width="[\d.]+mm"/);
  const dxf = await savedFile(page, () => page.getByRole("button", { name: "Save as DXF…" }).click());
  expect(readFileSync(dxf, "utf8")).toContain("ELECTRODES");
});

test("a tray that cannot be planned says why nothing is printed", async ({ page }) => {
  await goTo(page, "Lay out");
  await page.getByRole("button", { name: /^Left disc/ }).click();
  await page.getByLabel("x", { exact: true }).fill("225");
  await page.getByLabel("x", { exact: true }).press("Enter");
  await goTo(page, "Sheets");
  await expect(page.locator(".pages-note")).toContainText("overlap");
  await expect(page.getByRole("button", { name: "Save as PDF…" })).toBeDisabled();
  await page.keyboard.press("Control+p");
  await expect(page.locator(".message").filter({ hasText: "nothing to print" })).toContainText("overlap");
});
