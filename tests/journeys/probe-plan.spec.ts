import { readFileSync } from "node:fs";
import { expect, goTo, ledger, savedFile, test, withoutPickers } from "./open-window";

const rows = ".points tbody tr:not(.level)";

test.beforeEach(async ({ page }) => {
  await withoutPickers(page);
  await goTo(page, "Probe plan");
});

test("the points are grouped by level, numbered on, and the loose ring has its checks", async ({ page }) => {
  await expect(page.getByRole("heading", { name: "0.75 V", exact: true })).toBeVisible();
  await expect(page.getByRole("heading", { name: "Checks of loose conductors" })).toBeVisible();
  const numbers = await page.locator(`${rows} [data-point]`).allTextContents();
  expect(numbers.map(Number)).toEqual(Array.from({ length: numbers.length }, (_, index) => index + 1));
  const reads = await page.locator("tbody").nth(3).locator("tr:not(.level) td:nth-child(4)").allTextContents();
  for (const volts of reads) expect(Number(volts)).toBeCloseTo(3, 1);
});

test("more levels, fewer points, wider clearances: the list follows, and undo brings each back", async ({ page }) => {
  const levels = page.getByLabel("Levels", { exact: true });
  const count = await page.locator(rows).count();
  await levels.fill("3");
  await levels.press("Enter");
  await expect(page.getByRole("heading", { name: "4.5 V", exact: true })).toBeVisible();
  await expect(page.getByRole("heading", { name: "0.75 V", exact: true })).toHaveCount(0);
  await expect.poll(() => page.locator(rows).count()).toBeLessThan(count);
  await levels.press("Control+z");
  await expect.poll(() => page.locator(rows).count()).toBe(count);
  await page.getByLabel("Points a level").fill("0");
  await page.getByLabel("Points a level").press("Enter");
  await expect(page.getByRole("alert").filter({ hasText: "whole number from 1 to 200" })).toBeVisible();
  await expect.poll(() => page.locator(rows).count()).toBe(count);
});

test("points that find no room are told at their level", async ({ page }) => {
  await page.getByLabel("Clear of parts").fill("60");
  await page.getByLabel("Clear of parts").press("Enter");
  await expect(page.locator(".points .level .hint").first()).toBeVisible();
});

test("the list is walked by arrow keys, one stop of the Tab key", async ({ page }) => {
  const first = page.locator("[data-point='1']");
  await first.focus();
  await page.keyboard.press("ArrowDown");
  await page.keyboard.press("ArrowDown");
  await expect(page.locator("[data-point='3']")).toBeFocused();
  await page.keyboard.press("End");
  await expect(page.locator("[data-point]").last()).toBeFocused();
  await expect(page.locator("[data-point][tabindex='0']")).toHaveCount(1);
});

test("the table saved for a spreadsheet holds the very numbers of the list", async ({ page }) => {
  await expect(ledger(page, "Resistance")).toContainText("Ω");
  const path = await savedFile(page, () => page.getByRole("button", { name: "Save as CSV…" }).click());
  const [head, ...lines] = readFileSync(path, "utf8").trim().split("\r\n");
  const column = (name: string): number => head.split(",").indexOf(name);
  expect(lines).toHaveLength(await page.locator(rows).count());
  const shown = await page.locator(rows).nth(9).locator("td").allTextContents();
  const saved = lines[9].split(",");
  expect(Number(saved[column("x_mm")])).toBe(Number(shown[0]));
  expect(Number(saved[column("y_mm")])).toBe(Number(shown[1]));
  expect(Number(saved[column("expected_V")])).toBe(Number(shown[2]));
});

test("the bands take in every stated tolerance, and bars say which causes matter most, for the tray and for a point", async ({ page }) => {
  const card = page.getByRole("region", { name: "What the bands are made of" });
  await expect(card.getByText(/^\d.* of .*: \d+ %$/).first()).toBeVisible({ timeout: 60_000 });
  const shares = (await card.locator("ul").first().locator("li").allTextContents()).map((text) => Number(/([\d.]+) %$/.exec(text)?.[1]));
  expect(shares.reduce((sum, share) => sum + share, 0)).toBeGreaterThan(97);
  expect(shares.reduce((sum, share) => sum + share, 0)).toBeLessThan(103);
  await page.locator(rows).nth(9).getByRole("button").focus();
  await expect(card.getByRole("heading", { name: /^Point 10, ± [\d.]+ V$/ })).toBeVisible();
});

test("drawn trays check the bands point by point, and drawing can be stopped", async ({ page }) => {
  const card = page.getByRole("region", { name: "Check of the bands" });
  const start = card.getByRole("button", { name: "Draw trays" });
  await expect(start).toBeEnabled({ timeout: 60_000 });
  await card.getByLabel("Trays to draw").fill("100");
  await card.getByLabel("Trays to draw").press("Enter");
  await expect(card.getByText("a whole number from 200 to 5000")).toBeVisible();
  await card.getByLabel("Trays to draw").fill("5000");
  await card.getByLabel("Trays to draw").press("Enter");
  await start.click();
  await expect(card.getByRole("progressbar")).toBeVisible();
  await card.getByRole("button", { name: "Stop drawing" }).click();
  await expect(card.getByRole("progressbar")).toBeHidden();
  await card.getByLabel("Trays to draw").fill("200");
  await card.getByLabel("Trays to draw").press("Enter");
  await start.click();
  await expect(card.getByText(/of 51 points agree within 10 % with 200 drawn trays/)).toBeVisible({ timeout: 100_000 });
  await expect(card.getByRole("listitem")).toHaveCount(51);
  await expect(card.getByRole("listitem").first()).toContainText(/± [\d.]+ V, drawn ± [\d.]+ V/);
});

test("points at which a misplaced probe goes unseen are told as flat: those on and in the loose ring, no others", async ({ page }) => {
  await expect(page.locator(rows).first()).toBeVisible();
  await expect(page.locator(`${rows}:has(.flat)`)).toHaveCount(2);
  await expect(page.locator(rows).last().locator(".flat")).toHaveText("flat");
});

test("a looser tolerance of the parts widens the bands and comes first among the causes; undo brings them back", async ({ page }) => {
  const card = page.getByRole("region", { name: "What the bands are made of" });
  const first = card.locator("ul").first().locator("li").first();
  await expect(first).toBeVisible({ timeout: 60_000 });
  const before = await first.textContent();
  const field = page.getByLabel("Place of parts");
  await field.fill("3");
  await field.press("Enter");
  await expect(first).toContainText(/^3 mm of place of /, { timeout: 60_000 });
  await field.press("Control+z");
  await expect(first).toHaveText(before ?? "", { timeout: 60_000 });
});
