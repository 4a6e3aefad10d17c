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
