import { readFileSync } from "node:fs";
import { expect, ledger, openExample, test, withoutPickers } from "./open-window";

/** In these tests the browser has no file dialogs of its own, so that opening is an upload and saving a download. */
test.use({ acceptDownloads: true });

test("a saved setup opens again as it was", async ({ page }) => {
  await withoutPickers(page);
  await openExample(page, "Three electrodes");
  const [download] = await Promise.all([page.waitForEvent("download"), page.getByRole("button", { name: /^Save/ }).first().click()]);
  const path = await download.path();
  expect(download.suggestedFilename()).toMatch(/\.fieldtray\.json$/);
  const saved = JSON.parse(readFileSync(path, "utf8"));
  expect(saved.format).toBe("fieldtray.setup");
  await page.getByRole("button", { name: /^New tray/ }).click();
  const [chooser] = await Promise.all([
    page.waitForEvent("filechooser"),
    page
      .getByRole("button", { name: /^Open a setup/ })
      .first()
      .click(),
  ]);
  await chooser.setFiles({ name: "again.fieldtray.json", mimeType: "application/json", buffer: readFileSync(path) });
  await expect(page.getByRole("heading", { level: 1 })).toContainText(saved.title);
  await expect(page.getByRole("listbox").getByRole("option")).toHaveCount(saved.parts.length);
});

for (const [kind, text, words] of [
  ["a damaged file", '{"format": "fieldtray.setup", "version": 1, ', "not valid JSON"],
  ["a foreign file", '{"hello": "world"}', "fieldtray.setup"],
  [
    "a file with a wrong value",
    '{"format":"fieldtray.setup","version":1,"tray":{"shape":"rectangle","lengthMm":5,"widthMm":200},"water":{"depthMm":12,"conductivityUsPerCm":500},"supply":{"waveform":"ac","volts":6},"parts":[]}',
    "tray.lengthMm is 5",
  ],
] as const) {
  test(`${kind} gives a clear message and leaves the open setup untouched`, async ({ page }) => {
    await withoutPickers(page);
    const before = await ledger(page, "Resistance").textContent();
    const title = await page.getByRole("heading", { level: 1 }).textContent();
    const [chooser] = await Promise.all([
      page.waitForEvent("filechooser"),
      page
        .getByRole("button", { name: /^Open a setup/ })
        .first()
        .click(),
    ]);
    await chooser.setFiles({ name: "odd.fieldtray.json", mimeType: "application/json", buffer: Buffer.from(text) });
    await expect(page.locator(".message")).toContainText(words);
    await expect(page.locator(".message")).toContainText("unchanged");
    await expect(ledger(page, "Resistance")).toHaveText(before ?? "");
    await expect(page.getByRole("heading", { level: 1 })).toHaveText(title ?? "");
  });
}

test("work that was not saved is offered again after the window went down", async ({ page, address, context }) => {
  await openExample(page, "Two discs");
  await page.getByLabel("Title").fill("Tray of the third bench");
  await page.getByLabel("Title").press("Enter");
  await expect(page.locator(".unsaved")).toHaveText("not saved");
  await page.waitForTimeout(2500);
  await page.close({ runBeforeUnload: false });
  const again = await context.newPage();
  await again.goto(address);
  await expect(again.locator(".message")).toContainText("Tray of the third bench");
  await again.getByRole("button", { name: "Bring it back" }).click();
  await expect(again.getByRole("heading", { level: 1 })).toContainText("Tray of the third bench");
});
