import { readFileSync } from "node:fs";
import { expect, goTo, ledger, savedFile, test, withoutPickers } from "./open-window";

/** A tray as large as a table: some hundred pages of A4. */
const TABLE = {
  format: "fieldtray.setup",
  version: 1,
  title: "Table-sized tray",
  tray: { shape: "rectangle", lengthMm: 1500, widthMm: 1000 },
  water: { depthMm: 15, conductivityUsPerCm: 500 },
  supply: { waveform: "ac", frequencyHz: 50, volts: 6 },
  parts: [0, 1].map((tap) => ({
    id: tap === 0 ? "A" : "B",
    role: "electrode",
    tap,
    xMm: 400 + 700 * tap,
    yMm: 500,
    shape: { kind: "disc", diameterMm: 120 },
  })),
};

test.beforeEach(async ({ page }) => {
  await withoutPickers(page);
  const before = (await ledger(page, "Resistance").textContent()) ?? "";
  const [chooser] = await Promise.all([page.waitForEvent("filechooser"), page.keyboard.press("Control+o")]);
  const buffer = Buffer.from(JSON.stringify(TABLE));
  await chooser.setFiles({ name: "table.fieldtray.json", mimeType: "application/json", buffer });
  await expect(ledger(page, "Resistance")).not.toHaveText(before);
  await goTo(page, "Sheets");
  await page.getByRole("button", { name: "Everything", exact: true }).click();
  await expect(page.locator("figcaption").filter({ hasText: "Printer calibration" })).toBeVisible();
});

/** A slow computer, so that there is time to look at what goes on. */
async function slowed(page: import("@playwright/test").Page): Promise<void> {
  const session = await page.context().newCDPSession(page);
  await session.send("Emulation.setCPUThrottlingRate", { rate: 8 });
}

const setting = (page: import("@playwright/test").Page) => page.getByRole("status").filter({ hasText: "Setting the pages" });

test("a long pack shows its progress and can be stopped, and nothing is saved", async ({ page }) => {
  let downloads = 0;
  page.on("download", () => downloads++);
  await slowed(page);
  await page.getByRole("button", { name: "Save as PDF…" }).click();
  await expect(setting(page).getByRole("progressbar")).toBeVisible();
  await setting(page).getByRole("button", { name: "Stop" }).click();
  await expect(setting(page)).toHaveCount(0);
  await goTo(page, "Lay out");
  await expect(page.getByRole("main", { name: "Tray" })).toBeVisible();
  expect(downloads).toBe(0);
});

test("a long pack is saved whole, and the window answers meanwhile", async ({ page }) => {
  const pages = await page.locator("figure").count();
  expect(pages).toBeGreaterThan(60);
  let saved = false;
  page.on("download", () => {
    saved = true;
  });
  await slowed(page);
  const path = await savedFile(page, async () => {
    await page.getByRole("button", { name: "Save as PDF…" }).click();
    await expect(setting(page)).toBeVisible();
    await goTo(page, "Probe plan");
    await expect(page.getByRole("button", { name: "Save as CSV…" })).toBeVisible();
    expect(saved).toBe(false);
  });
  expect(
    readFileSync(path)
      .toString("latin1")
      .match(/\/Type\s*\/Page\b/g),
  ).toHaveLength(pages);
});
