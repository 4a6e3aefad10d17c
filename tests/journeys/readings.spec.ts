import { readFileSync } from "node:fs";
import AxeBuilder from "@axe-core/playwright";
import type { Page } from "@playwright/test";
import { expect, goTo, savedFile, test, withoutPickers } from "./open-window";

const table = (page: Page) => page.getByRole("region", { name: "At the points" });
const verdict = (page: Page) => page.getByRole("region", { name: "Verdict" });
const reading = (page: Page, n: number) => page.getByLabel(`Reading at point ${n}`, { exact: true });
const expectedVolts = (page: Page) => table(page).locator("tbody td:nth-child(2)").allTextContents();

/** Puts text where Ctrl+V takes it from, and pastes it into a field. */
async function paste(page: Page, n: number, text: string): Promise<void> {
  await reading(page, n).evaluate((field, pasted) => {
    const clipboardData = new DataTransfer();
    clipboardData.setData("text/plain", pasted);
    field.dispatchEvent(new ClipboardEvent("paste", { clipboardData, bubbles: true, cancelable: true }));
  }, text);
}

test.beforeEach(async ({ page }) => {
  await withoutPickers(page);
  await goTo(page, "Readings");
  await expect(reading(page, 1)).toBeVisible();
});

test("readings are typed one after the other, judged at once, and taken back by undo", async ({ page }) => {
  const [first, second] = await expectedVolts(page);
  await reading(page, 1).fill(first);
  await reading(page, 1).press("Enter");
  await expect(reading(page, 2)).toBeFocused();
  await page.keyboard.type(String(Number(second) + 2).replace(".", ","));
  await page.keyboard.press("Enter");
  await expect(reading(page, 3)).toBeFocused();
  await expect(table(page).locator("tbody tr").nth(0)).toContainText("Pass");
  await expect(table(page).locator("tbody tr").nth(1)).toContainText("Fail");
  await expect(verdict(page)).toContainText("Fail");
  await expect(verdict(page)).toContainText("point 2");
  await expect(page.getByRole("region", { name: "Runs" }).getByRole("button", { name: /^Tray 1/ })).toContainText("2 read");
  await page.getByRole("button", { name: /^Undo enter reading 2/ }).click();
  await expect(reading(page, 2)).toHaveValue("");
  await reading(page, 1).fill("six");
  await reading(page, 1).press("Enter");
  await expect(reading(page, 1)).toBeFocused();
  await expect(page.getByRole("alert").filter({ hasText: "six is no number" })).toBeVisible();
});

test("a spreadsheet's columns are pasted, wrong rows are named with their line, and the table comes back from its file", async ({
  page,
}) => {
  const volts = await expectedVolts(page);
  const rows = volts.map((one, index) => `${index + 1}\t${one.replace(".", ",")}`);
  await paste(page, 1, [...rows, "999\t1,0", "5\tOL"].join("\n"));
  await expect(verdict(page)).toContainText("Pass");
  await expect(table(page)).toContainText(`${volts.length} taken`);
  await expect(table(page)).toContainText(`Line ${volts.length + 1}: no such point`);
  await expect(table(page)).toContainText(`Line ${volts.length + 2}: not a number`);
  const path = await savedFile(page, () => table(page).getByRole("button", { name: "Save as CSV…" }).click());
  const [head, ...lines] = readFileSync(path, "utf8").trim().split("\r\n");
  expect(head.split(",")).toContain("reading_V");
  expect(lines).toHaveLength(volts.length);
  await page.getByRole("region", { name: "Runs" }).getByRole("button", { name: "Add a run" }).click();
  await expect(reading(page, 1)).toHaveValue("");
  const [chooser] = await Promise.all([page.waitForEvent("filechooser"), table(page).getByRole("button", { name: "Import CSV…" }).click()]);
  await chooser.setFiles({ name: "back.csv", mimeType: "text/csv", buffer: readFileSync(path) });
  await expect(reading(page, 1)).toHaveValue(volts[0]);
  await expect(page.getByRole("region", { name: "Runs" }).getByRole("button", { name: /^Tray 2/ })).toContainText(`${volts.length} read`);
});

test("a column of volts is pasted on from where it is pasted", async ({ page }) => {
  await paste(page, 3, "1.11\n1.22\n");
  await expect(reading(page, 3)).toHaveValue("1.11");
  await expect(reading(page, 4)).toHaveValue("1.22");
  await expect(reading(page, 1)).toHaveValue("");
});

test("the likely cause of a supply that is off is found, with its size", async ({ page }) => {
  const volts = await expectedVolts(page);
  await paste(page, 1, volts.map((one) => (0.92 * Number(one)).toFixed(2)).join("\n"));
  const cause = page.getByRole("region", { name: "Likely cause" });
  await cause.getByRole("button", { name: "Look for the cause" }).click();
  await expect(cause).toContainText(/off by one share, −[78]\.\d ±/, { timeout: 60_000 });
  await expect(cause).toContainText("Next best");
  if (process.env.PICTURES_FOLDER !== undefined) await page.screenshot({ path: `${process.env.PICTURES_FOLDER}/cause.png` });
  await reading(page, 1).fill("0.8");
  await reading(page, 1).press("Enter");
  await expect(cause).not.toContainText("Next best");
});

test("a found place is told its distance from the predicted line", async ({ page }) => {
  const found = page.getByRole("region", { name: "Found places" });
  await found.getByLabel("Looked for").selectOption({ label: "3 V" });
  await found.getByLabel("x", { exact: true }).fill("154");
  await found.getByLabel("y", { exact: true }).fill("30");
  await found.getByLabel("y", { exact: true }).press("Enter");
  await expect(found.locator("tbody tr").first()).toContainText("+4.0");
  await expect(found.getByLabel("x", { exact: true })).toBeFocused();
});

for (const colours of ["light", "dark"] as const) {
  test.describe(`in ${colours} colours`, () => {
    test.use({ colorScheme: colours });
    test("axe finds nothing serious on the desk with readings in it, and the residuals stand on the tray", async ({ page }) => {
      const before = await page.locator(".tray-surface").screenshot();
      const volts = await expectedVolts(page);
      await paste(page, 1, volts.map((one, index) => (Number(one) + (index % 9 === 4 ? 0.25 : 0.01)).toFixed(2)).join("\n"));
      await expect(verdict(page)).toContainText("Fail");
      const { violations } = await new AxeBuilder({ page }).analyze();
      const serious = violations.filter(({ impact }) => impact === "serious" || impact === "critical");
      expect(serious.map(({ id, nodes }) => `${id}: ${nodes.map(({ target }) => target).join(" ")}`)).toEqual([]);
      const after = await page.locator(".tray-surface").screenshot();
      expect(after.equals(before)).toBe(false);
      if (process.env.PICTURES_FOLDER !== undefined)
        await page.screenshot({ path: `${process.env.PICTURES_FOLDER}/readings-${colours}.png` });
    });
  });
}
