import { expect, ledger, openExample, test } from "./open-window";

test("a technician places, wires and moves parts, and the numbers follow", async ({ page }) => {
  await page.getByRole("button", { name: /^New tray/ }).click();
  await expect(
    page
      .getByText(/drag a part/i)
      .or(page.getByText(/shelf/i))
      .first(),
  ).toBeVisible();
  await page.getByRole("button", { name: "Bar", exact: true }).click();
  await page.getByLabel("x", { exact: true }).fill("65");
  await page.getByLabel("x", { exact: true }).press("Enter");
  await page.getByLabel("Turn").fill("180/2");
  await page.getByLabel("Turn").press("Enter");
  await page.getByRole("button", { name: "Disc", exact: true }).click();
  await page.getByLabel("x", { exact: true }).fill("23,5 cm");
  await page.getByLabel("x", { exact: true }).press("Enter");
  await expect(page.getByLabel("x", { exact: true })).toHaveValue("235");
  await expect(page.getByRole("button", { name: "+ live" })).toHaveAttribute("aria-pressed", "true");
  await expect(ledger(page, "Resistance")).toContainText("Ω");
  const before = await ledger(page, "Resistance").textContent();
  await page.getByLabel("Diameter").fill("50");
  await page.getByLabel("Diameter").press("Enter");
  await expect(ledger(page, "Resistance")).not.toHaveText(before ?? "");
});

test("a part dragged by the hand takes the field with it, and undo brings both back", async ({ page }) => {
  await openExample(page, "Two discs");
  const before = (await ledger(page, "Resistance").textContent()) ?? "";
  const stage = page.locator(".tray-surface");
  const box = await stage.boundingBox();
  if (box === null) throw new Error("no tray");
  const canvas = await page.locator(".tray-surface canvas").first().boundingBox();
  expect(canvas).not.toBeNull();
  // The tray is centred in the stage: the left disc lies 80 mm left of its middle.
  const scale = Math.min((box.width - 108) / 300, (box.height - 108) / 200);
  const middle = { x: box.x + 72 + (box.width - 108) / 2, y: box.y + 36 + (box.height - 108) / 2 };
  await page.mouse.move(middle.x - 80 * scale, middle.y);
  await page.mouse.down();
  for (let step = 1; step <= 10; step++) await page.mouse.move(middle.x - 80 * scale + 3 * step * scale, middle.y);
  await page.mouse.up();
  await expect(ledger(page, "Resistance")).not.toHaveText(before);
  await page.keyboard.press("Control+z");
  await expect(ledger(page, "Resistance")).toHaveText(before);
  await page.keyboard.press("Control+Shift+z");
  await expect(ledger(page, "Resistance")).not.toHaveText(before);
});

test("overlapping parts are told in words, and the rest stays usable", async ({ page }) => {
  await openExample(page, "Two discs");
  await page.getByRole("listbox").focus();
  await page.keyboard.press("Home");
  await page.getByLabel("x", { exact: true }).fill("225");
  await page.getByLabel("x", { exact: true }).press("Enter");
  await expect(page.locator(".part-note-stop").first()).toBeVisible();
  await expect(page.locator(".ledger-findings")).toContainText("stop");
  await expect(ledger(page, "Resistance")).toHaveText("–");
  await page.getByLabel("x", { exact: true }).fill("70");
  await page.getByLabel("x", { exact: true }).press("Enter");
  await expect(ledger(page, "Resistance")).toContainText("Ω");
});

test("a wrong number is refused beside its field and the old value stays", async ({ page }) => {
  const depth = page.getByLabel("Depth at the centre");
  await depth.fill("900");
  await depth.press("Enter");
  await expect(page.getByRole("alert").filter({ hasText: "200" })).toBeVisible();
  await depth.press("Escape");
  await expect(depth).toHaveValue("12");
});

test("by keyboard alone: a part is placed, moved and wired", async ({ page }) => {
  await page.getByRole("button", { name: /^New tray/ }).focus();
  await page.keyboard.press("Enter");
  await page.getByRole("button", { name: "Ring", exact: true }).focus();
  await page.keyboard.press("Enter");
  const list = page.getByRole("listbox");
  await list.focus();
  await expect(list.getByRole("option")).toHaveCount(1);
  await page.keyboard.press("Home");
  const x = page.getByLabel("x", { exact: true });
  const before = Number(await x.inputValue());
  await list.focus();
  await page.keyboard.press("Enter");
  await page.keyboard.press("ArrowRight");
  await page.keyboard.press("Shift+ArrowRight");
  await expect(x).toHaveValue(String(before + 11));
  await page.getByLabel("Role").selectOption("floating");
  await expect(list.getByRole("option").first()).toContainText("floating");
});

test("another voltage changes current and readings at once, not the resistance", async ({ page }) => {
  const resistance = await ledger(page, "Resistance").textContent();
  const current = await ledger(page, "Current").textContent();
  await page.getByLabel("Voltage (rms)").fill("3");
  await page.getByLabel("Voltage (rms)").press("Enter");
  await expect(ledger(page, "Span")).toHaveText("0 to 3 V");
  await expect(ledger(page, "Resistance")).toHaveText(resistance ?? "");
  await expect(ledger(page, "Current")).not.toHaveText(current ?? "");
});
