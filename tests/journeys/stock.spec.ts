import { readFileSync } from "node:fs";
import type { Page } from "@playwright/test";
import { expect, savedFile, test, withoutPickers } from "./open-window";

const card = (page: Page) => page.getByRole("region", { name: "Stock", exact: true });
const shelf = (page: Page) => page.getByRole("region", { name: "Own parts" });

test("the prep room's list: places its own parts, warns when a plan needs more, and comes back after a restart", async ({ page }) => {
  await page.getByRole("button", { name: "Stock list…" }).click();
  await card(page).getByRole("button", { name: "Example list" }).click();
  await expect(card(page).getByLabel("Belongs to")).toHaveValue(/^Saltmarsh College/);
  await card(page).getByRole("button", { name: "Close the stock list" }).click();
  await expect(shelf(page).getByRole("button", { name: "Ring 60 1 of 2 left" })).toBeVisible();
  await expect(page.locator(".ledger-findings")).not.toContainText("caution");
  for (const left of ["1 of 2", "0 of 2"])
    await shelf(page)
      .getByRole("button", { name: `Ring 60 ${left} left` })
      .click();
  await expect(shelf(page).getByRole("button", { name: "Ring 60 1 too few" })).toBeVisible();
  await page.locator(".ledger-findings").click();
  await expect(page.getByRole("region", { name: "Findings" })).toContainText(
    "3 × brass ring ⌀ 60 outside, 54 inside mm, 24 mm high needed, 2 in stock.",
  );
  await page.reload();
  await expect(shelf(page).getByRole("button", { name: "Long bar 6 of 8 left" })).toBeVisible();
});

test("a list is filled from the tray, counted, exported, struck off and imported again", async ({ page }) => {
  await withoutPickers(page);
  await page.locator(".tray-surface").focus();
  await page.keyboard.press("Control+a");
  await page.getByRole("button", { name: "Stock list…" }).click();
  for (const name of ["Add the selected parts", "Add this tray", "Add this supply"]) await card(page).getByRole("button", { name }).click();
  await card(page).getByLabel("Count of Loose ring").fill("2*2");
  await card(page).getByLabel("Count of Loose ring").press("Enter");
  const path = await savedFile(page, () => card(page).getByRole("button", { name: "Export…" }).click());
  const text = readFileSync(path, "utf8");
  expect(JSON.parse(text)).toMatchObject({ format: "fieldtray.stock", parts: [{ count: 2 }, { name: "Loose ring", count: 4 }] });
  await card(page).getByRole("button", { name: "Strike Loose ring off the list" }).click();
  await expect(card(page).getByLabel("Count of Loose ring")).toHaveCount(0);
  const upload = async (content: string): Promise<void> => {
    const [chooser] = await Promise.all([page.waitForEvent("filechooser"), card(page).getByRole("button", { name: "Import…" }).click()]);
    await chooser.setFiles({ name: "stock.json", mimeType: "application/json", buffer: Buffer.from(content) });
  };
  await upload(text.replace('"count": 4', '"count": "four"'));
  await expect(page.locator(".message-problem")).toContainText("parts[1].count");
  await upload(text);
  await expect(card(page).getByLabel("Count of Loose ring")).toHaveValue("4");
});
