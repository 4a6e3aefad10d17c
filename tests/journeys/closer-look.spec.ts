import { readFileSync } from "node:fs";
import type { Page } from "@playwright/test";
import { expect, goTo, savedFile, test, withoutPickers } from "./open-window";

const card = (page: Page) => page.getByRole("region", { name: "Closer look" });
const open = (page: Page) => page.getByRole("button", { name: /^Closer look/ }).click();
const set = async (page: Page, label: string, value: string): Promise<void> => {
  await card(page).getByLabel(label, { exact: true }).fill(value);
  await card(page).getByLabel(label, { exact: true }).press("Enter");
};
/** The colour of the stage at a share of its width and height. */
const colourAt = (page: Page, x: number, y: number): Promise<readonly number[]> =>
  page.evaluate(
    ([across, down]) => {
      const canvas = document.querySelectorAll<HTMLCanvasElement>(".tray-surface canvas")[1];
      const data = canvas?.getContext("2d")?.getImageData(across * canvas.width, down * canvas.height, 1, 1).data ?? [];
      return [...data].slice(0, 3);
    },
    [x, y] as const,
  );

test("the colours show potential, field strength or current density, each with its own scale and unit, in hues or greys", async ({
  page,
}) => {
  const scale = page.locator(".volt-scale");
  await expect(scale).toHaveAttribute("aria-label", "Colours of potential, from 0 V to 6 V, lighter is higher");
  await open(page);
  await card(page).getByLabel("Colours show").selectOption("field");
  await expect(scale).toHaveAttribute("aria-label", /^Colours of field strength, from 0 V\/cm to ≥ 0\.\d+ V\/cm/);
  await card(page).getByLabel("Colours show").selectOption("current");
  await expect(scale).toHaveAttribute("aria-label", /^Colours of current density, from 0 A\/m² to ≥ \d+(\.\d+)? A\/m²/);
  await card(page).getByLabel("Colours", { exact: true }).selectOption("greys");
  const [red, green, blue] = await colourAt(page, 0.4, 0.4);
  expect(Math.max(Math.abs(red - green), Math.abs(green - blue))).toBeLessThanOrEqual(1);
});

test("in steps the picture has as many colours as there are bands between the lines", async ({ page }) => {
  await open(page);
  await card(page).getByLabel("In steps").check();
  await expect(page.locator(".volt-scale-bar")).toHaveAttribute("style", / 12\.5%, .* 25%/);
  await page.reload();
  await expect(page.locator(".volt-scale-bar")).toHaveAttribute("style", / 12\.5%, .* 25%/);
});

test("a pin reads volts with their bound, field and direction, and follows the tray", async ({ page }) => {
  await open(page);
  await card(page).getByRole("button", { name: "Pin the tray's middle" }).click();
  const row = card(page).getByRole("table", { name: "What the pins read" }).getByRole("row").nth(2);
  await expect(row).toContainText("3.00");
  await expect(row).toContainText("±");
  await set(page, "Pin 1, x", "100");
  await expect(row).toContainText("V/cm to 180°");
  await set(page, "Pin 1, x", "65");
  await expect(row).toContainText("on Left bar");
  await set(page, "Pin 1, x", "400");
  await expect(card(page).getByRole("alert")).toContainText("outside the tray");
  await card(page).getByLabel("Pin 1, x").press("Escape");
  await card(page).getByRole("button", { name: "Take pin 1 away" }).click();
  await expect(card(page).getByRole("table")).toHaveCount(0);
});

test("P and a click on the water pin a probe there", async ({ page }) => {
  await open(page);
  await page.locator(".tray-surface").focus();
  await page.keyboard.press("p");
  const box = await page.locator(".tray-surface").boundingBox();
  await page.mouse.click((box?.x ?? 0) + (box?.width ?? 0) * 0.5, (box?.y ?? 0) + 140);
  await expect(card(page).getByLabel("Pin 1, x")).toBeVisible();
  await page.keyboard.press("Escape");
});

test("by keyboard alone a section is laid across the tray, drawn as a chart and read as a table", async ({ page }) => {
  await page.getByRole("button", { name: /^Closer look/ }).focus();
  await page.keyboard.press("Enter");
  await card(page).getByRole("button", { name: "Across the middle" }).focus();
  await page.keyboard.press("Enter");
  await expect(card(page).getByRole("img")).toHaveAttribute(
    "aria-label",
    "Potential along the section from A to B, 300 mm, between 0.000 and 6.000 V",
  );
  await card(page).getByText("Values", { exact: true }).focus();
  await page.keyboard.press("Enter");
  const rows = card(page).locator(".section-values tbody tr");
  await expect(rows).toHaveCount(21);
  await expect(rows.nth(10)).toContainText("3.000");
  await expect(rows.nth(0)).toContainText("0.000");
  await set(page, "B, x", "150");
  await expect(card(page).getByRole("img")).toHaveAttribute("aria-label", /150 mm, between 0\.000 and 3\.0/);
});

test("compared with a saved setup the colours show the difference, and none where nothing changed", async ({ page }) => {
  await withoutPickers(page);
  const path = await savedFile(page, () => page.getByRole("button", { name: "Save (Ctrl+S)" }).click());
  const file = { name: "before.fieldtray.json", mimeType: "application/json", buffer: readFileSync(path) };
  await goTo(page, "Lay out");
  await page.getByLabel("Voltage (rms)").fill("5");
  await page.getByLabel("Voltage (rms)").press("Enter");
  await open(page);
  const [chooser] = await Promise.all([
    page.waitForEvent("filechooser"),
    card(page).getByRole("button", { name: "Compare with a setup file…" }).click(),
  ]);
  await chooser.setFiles(file);
  await expect(card(page)).toContainText("Compared with before.fieldtray.json");
  await expect(page.locator(".volt-scale")).toHaveAttribute(
    "aria-label",
    "Colours of the difference of potential, from -1 V to 1 V".replace("-", "−"),
  );
  await card(page).getByRole("button", { name: "End the comparison" }).click();
  await expect(page.locator(".volt-scale")).toHaveAttribute("aria-label", /^Colours of potential/);
});
