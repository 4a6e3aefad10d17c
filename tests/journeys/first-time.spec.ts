import { readFileSync } from "node:fs";
import { expect, goTo, ledger, savedFile, test, withoutPickers } from "./open-window";

/** First meetings with the program, written as people act who were told nothing. */

test("a technician goes from an empty tray to a printed template", async ({ page }) => {
  await withoutPickers(page);
  await page.getByRole("button", { name: /^New tray/ }).click();
  await expect(page.getByText("Drag a bar or a disc from the shelf")).toBeVisible();
  await page.getByRole("button", { name: "Bar", exact: true }).click();
  await page.getByLabel("x", { exact: true }).fill("65");
  await page.getByLabel("Turn").fill("90");
  await page.getByLabel("Turn").press("Enter");
  await page.getByRole("button", { name: "Bar", exact: true }).click();
  await page.getByLabel("x", { exact: true }).fill("235");
  await page.getByLabel("Turn").fill("90");
  await page.getByLabel("Turn").press("Enter");
  await expect(ledger(page, "Resistance")).toContainText("Ω");
  await expect(ledger(page, "Span")).toHaveText("0 to 6 V");
  await goTo(page, "Sheets");
  await expect(page.locator("figcaption").first()).toContainText("Tray template");
  const path = await savedFile(page, () => page.getByRole("button", { name: "Save as PDF…" }).click());
  expect(readFileSync(path).toString("latin1").startsWith("%PDF-")).toBe(true);
  await expect(page.locator(".message")).toContainText("Print at 100 %");
});

test("a safety officer sees a limit broken, reads where it is published, mends it and takes the checklist away", async ({ page }) => {
  await withoutPickers(page);
  await page.getByLabel("Voltage (rms)").fill("24");
  await page.getByLabel("Voltage (rms)").press("Enter");
  await expect(page.locator(".ledger-findings")).toContainText(/stop|caution/);
  await page.locator(".ledger-findings").click();
  const finding = page.getByRole("region", { name: "Findings" }).locator('[data-finding="volts-above-wet-hands"]');
  await finding.getByText("What to do, and why").click();
  await expect(finding.getByText(/^Source: /)).toContainText("IEC");
  await finding.getByRole("button", { name: "Set 12 V" }).click();
  await expect(page.getByLabel("Voltage (rms)")).toHaveValue("12");
  await expect(finding).toHaveCount(0);
  await page.keyboard.press("Escape");
  await goTo(page, "Sheets");
  await page.getByRole("button", { name: "Safety", exact: true }).click();
  await expect(page.locator("figcaption").filter({ hasText: "Low-voltage checklist" }).first()).toBeVisible();
  const path = await savedFile(page, () => page.getByRole("button", { name: "Save as PDF…" }).click());
  expect(readFileSync(path).toString("latin1").startsWith("%PDF-")).toBe(true);
});
