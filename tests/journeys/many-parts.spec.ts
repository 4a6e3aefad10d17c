import type { Page } from "@playwright/test";
import { expect, test } from "./open-window";

const part = (page: Page, name: RegExp) => page.getByRole("region", { name: "Parts", exact: true }).getByRole("button", { name });
const inTray = (page: Page) => page.getByRole("region", { name: "Parts", exact: true }).getByRole("listitem");
const described = (page: Page, name: RegExp) => page.getByRole("option").filter({ hasText: name });

test("the list of parts selects one, and with Shift more; the card speaks of all of them", async ({ page }) => {
  await part(page, /^Left bar/).click();
  await expect(page.getByRole("heading", { name: "Left bar" })).toBeVisible();
  await part(page, /^Right bar/).click({ modifiers: ["Shift"] });
  await expect(page.getByRole("heading", { name: "2 parts selected" })).toBeVisible();
  await page.getByLabel("Material", { exact: true }).selectOption("copper");
  await page.getByLabel("Height", { exact: true }).fill("2 cm");
  await page.getByLabel("Height", { exact: true }).press("Enter");
  await part(page, /^Left bar/).click();
  await expect(page.getByLabel("Material", { exact: true })).toHaveValue("copper");
  await expect(page.getByLabel("Height", { exact: true })).toHaveValue("20");
});

test("160 mm clear between two bars: one stays, the other moves there", async ({ page }) => {
  await part(page, /^Left bar/).click();
  await part(page, /^Right bar/).click({ modifiers: ["Shift"] });
  await page.getByLabel("Clear between the two").fill("100");
  await page.getByLabel("Clear between the two").press("Enter");
  await expect(described(page, /^Left bar/)).toContainText("x 65,");
  await expect(described(page, /^Right bar/)).toContainText("x 175,");
  await page.getByLabel("Clear between the two").press("Control+z");
  await expect(page.getByLabel("Clear between the two")).toHaveValue("160");
});

test("parts line up, and a single part lines up in the tray", async ({ page }) => {
  await part(page, /^Loose ring/).click();
  await page.getByRole("button", { name: "Far edges" }).click();
  await expect(described(page, /^Loose ring/)).toContainText("y 170 mm");
  await part(page, /^Left bar/).click({ modifiers: ["Control"] });
  await page.getByRole("button", { name: "Middles, near to far" }).click();
  const places = await page
    .getByRole("option")
    .filter({ hasText: /^(Left bar|Loose ring)/ })
    .allTextContents();
  const [first, second] = places.map((text) => /y ([\d.]+) mm/.exec(text)?.[1]);
  expect(first).toBe(second);
});

test("discs are set in a ring round the tray's centre, and in a row, each one step to undo", async ({ page }) => {
  await page.getByRole("button", { name: "Disc", exact: true }).click();
  for (const [label, value] of [
    ["Diameter", "8"],
    ["x", "150"],
    ["y", "145"],
  ] as const) {
    await page.getByLabel(label, { exact: true }).fill(value);
    await page.getByLabel(label, { exact: true }).press("Enter");
  }
  await page.getByText("Copies", { exact: true }).click();
  await page.getByLabel("How many in all").fill("4");
  await page.getByLabel("How many in all").press("Enter");
  await page.getByRole("button", { name: "Make the ring" }).click();
  await expect(inTray(page)).toHaveCount(7);
  await expect(page.getByRole("option").filter({ hasText: "x 150, y 55 mm" })).toHaveCount(1);
  await page.getByRole("button", { name: /^Undo ring of/ }).click();
  await expect(inTray(page)).toHaveCount(4);
});

test("a polygon's corners are set by number; an outline that touches itself is refused in words", async ({ page }) => {
  await page.getByRole("button", { name: "Polygon", exact: true }).click();
  await page.getByRole("button", { name: "Add a corner after corner 1" }).click();
  await expect(page.getByRole("option").filter({ hasText: /^Polygon/ })).toContainText("4 corners");
  await page.getByLabel("Corner 2, y").fill("-25");
  await page.getByLabel("Corner 2, y").press("Enter");
  await expect(page.getByLabel("Corner 2, y")).toHaveValue("-25");
  await page.getByLabel("Corner 2, y").fill("20");
  await page.getByLabel("Corner 2, y").press("Enter");
  await expect(page.locator(".field-refusal")).toBeVisible();
  await page.getByLabel("Corner 2, y").press("Escape");
  await expect(page.getByLabel("Corner 2, y")).toHaveValue("-25");
  await page.getByRole("button", { name: "Take corner 2 away" }).click();
  await expect(page.getByRole("button", { name: "Take corner 1 away" })).toBeDisabled();
});

test("a locked part stays under hand and keys, and says why; unlocked it moves", async ({ page }) => {
  await part(page, /^Left bar/).click();
  await page.getByRole("button", { name: "Lock in its place (K)" }).click();
  await page.locator(".tray-surface").focus();
  await page.keyboard.press("ArrowRight");
  await expect(page.locator(".tray-refusal")).toHaveText("Left bar is locked. Unlock it first (K).");
  await expect(described(page, /^Left bar/)).toContainText("x 65, y 100 mm");
  await expect(described(page, /^Left bar/)).toContainText("locked");
  await page.getByLabel("x", { exact: true }).fill("70");
  await page.getByLabel("x", { exact: true }).press("Enter");
  await expect(page.locator(".field-refusal")).toContainText("locked");
  await page.getByLabel("x", { exact: true }).press("Escape");
  await page.locator(".tray-surface").focus();
  await page.keyboard.press("k");
  await page.keyboard.press("ArrowRight");
  await expect(described(page, /^Left bar/)).toContainText("x 66, y 100 mm");
  await expect(page.locator(".tray-refusal")).toHaveCount(0);
});

test("grouped parts are chosen and moved as one, by keyboard alone, and one undo takes the move back", async ({ page }) => {
  await page.getByRole("listbox", { name: "Parts in the tray" }).focus();
  await page.keyboard.press("Home");
  await page.keyboard.press("Shift+ArrowDown");
  await page.keyboard.press("Enter");
  await page.keyboard.press("g");
  await page.keyboard.press("Escape");
  await part(page, /^Right bar/).click();
  await expect(page.getByRole("heading", { name: "2 parts selected" })).toBeVisible();
  await page.locator(".tray-surface").focus();
  await page.keyboard.press("ArrowUp");
  await expect(described(page, /^Left bar/)).toContainText("x 65, y 101 mm");
  await expect(described(page, /^Right bar/)).toContainText("x 235, y 101 mm");
  await expect(described(page, /^Right bar/)).toContainText("in group 1");
  await page.keyboard.press("Control+z");
  await expect(described(page, /^Left bar/)).toContainText("x 65, y 100 mm");
  await page.getByRole("button", { name: "Take the group apart (G)" }).click();
  await part(page, /^Right bar/).click();
  await expect(page.getByRole("heading", { name: "Right bar" })).toBeVisible();
});
