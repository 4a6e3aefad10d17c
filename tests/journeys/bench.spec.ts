import type { Page } from "@playwright/test";
import { expect, goTo, openExample, test } from "./open-window";

/** What the rules found, by their codes, but that a sheet needs tiles: a matter of paper, not of the bench. */
const found = async (page: Page): Promise<string[]> => {
  const codes = await page
    .getByRole("complementary", { name: "Bench" })
    .locator("[data-finding]")
    .evaluateAll((all) => all.map((one) => one.getAttribute("data-finding") ?? ""));
  return codes.filter((code) => code !== "template-tiles");
};
const dot = (page: Page) => page.getByRole("slider", { name: /^Depth and voltage/ });
const field = (page: Page, name: string) => page.getByRole("complementary", { name: "Bench" }).getByRole("textbox", { name, exact: true });
const undo = (page: Page) => page.getByRole("button", { name: /^Undo/ });

async function enter(page: Page, name: string, value: string): Promise<void> {
  await field(page, name).fill(value);
  await field(page, name).press("Enter");
}

async function middleOf(page: Page, selector: string): Promise<readonly [number, number]> {
  const box = await page.locator(selector).boundingBox();
  if (box === null) throw new Error(`${selector} is not on the page`);
  return [box.x + box.width / 2, box.y + box.height / 2];
}

test.beforeEach(async ({ page }) => {
  await openExample(page, "Two discs");
  await goTo(page, "Bench");
});

test("a teacher comes from a bad setting to a justified one: AC, 6 V, the dot dragged to the suggestion, and back by undo", async ({
  page,
}) => {
  await page.getByRole("combobox", { name: "Current", exact: true }).selectOption("dc");
  await enter(page, "Voltage", "40");
  await enter(page, "Depth at the centre", "4");
  await expect.poll(() => found(page)).toEqual(expect.arrayContaining(["volts-above-wet-hands", "dc-polarises", "too-shallow-for-tilt"]));

  await page.getByRole("combobox", { name: "Current", exact: true }).selectOption("ac");
  await enter(page, "Voltage", "6");
  await expect.poll(() => found(page)).toEqual(["too-shallow-for-tilt"]);
  await expect(page.locator(".bench-verdict")).toContainText("breaks: tilt of the tray");

  await dot(page).scrollIntoViewIfNeeded();
  const from = await middleOf(page, ".bench-chart-ring >> nth=0");
  const to = await middleOf(page, ".bench-chart-suggestion");
  await page.mouse.move(...from);
  await page.mouse.down();
  await page.mouse.move((from[0] + to[0]) / 2, to[1] + 20, { steps: 8 });
  await page.mouse.move(...to, { steps: 8 });
  await page.mouse.up();
  await expect.poll(() => found(page)).toEqual([]);
  await expect(page.locator(".bench-verdict")).toContainText("every rule is kept");
  await expect(page.getByRole("button", { name: "This is the suggestion" })).toBeDisabled();

  await undo(page).click();
  await expect(field(page, "Depth at the centre")).toHaveValue("4");
  await expect(field(page, "Voltage")).toHaveValue("6");
  await expect.poll(() => found(page)).toEqual(["too-shallow-for-tilt"]);
});

test("the dot moves by keys, a held key is one step, and Shift makes larger ones", async ({ page }) => {
  const depth = Number(await field(page, "Depth at the centre").inputValue());
  const volts = Number(await field(page, "Voltage").inputValue());
  await dot(page).focus();
  for (const key of ["ArrowUp", "ArrowUp", "ArrowRight", "Shift+ArrowRight"]) await page.keyboard.press(key);
  await expect(field(page, "Voltage")).toHaveValue(String(Number((volts + 0.2).toFixed(1))));
  await expect(field(page, "Depth at the centre")).toHaveValue(String(depth + 3));
  await expect(dot(page)).toHaveAttribute("aria-valuetext", new RegExp(`^${depth + 3} mm of water`));
  await undo(page).click();
  await expect(field(page, "Depth at the centre")).toHaveValue(String(depth));
  await expect(field(page, "Voltage")).toHaveValue(String(volts));
});

test("one button takes the suggestion, another applies a remedy; both can be undone", async ({ page }) => {
  await enter(page, "Voltage", "13");
  await expect.poll(() => found(page)).toEqual(["volts-above-wet-hands"]);
  await page.getByRole("button", { name: "Set 12 V" }).click();
  await expect(field(page, "Voltage")).toHaveValue("12");
  await expect.poll(() => found(page)).not.toContain("volts-above-wet-hands");
  await undo(page).click();
  await expect(field(page, "Voltage")).toHaveValue("13");
  await page.getByRole("button", { name: /^Take the suggestion/ }).click();
  await expect.poll(() => found(page)).toEqual([]);
  await undo(page).click();
  await expect(field(page, "Voltage")).toHaveValue("13");
});

test("a finding leads to the field that it is about, also from the bottom line of another desk", async ({ page }) => {
  await enter(page, "Frequency", "1000");
  await expect.poll(() => found(page)).toContain("frequency-outside-meter");
  await page.locator('[data-finding="frequency-outside-meter"]').getByRole("button").first().click();
  await expect(field(page, "Frequency")).toBeFocused();
  await goTo(page, "Probe plan");
  await page.locator(".ledger-findings").click();
  await page
    .getByRole("region", { name: "Findings" })
    .locator('[data-finding="frequency-outside-meter"]')
    .getByRole("button")
    .first()
    .click();
  await expect(field(page, "Frequency")).toBeFocused();
});

test("a value out of range is refused in words and changes nothing", async ({ page }) => {
  const before = (await page.locator(".bench-verdict").textContent()) ?? "";
  await enter(page, "Depth at the centre", "900");
  await expect(page.locator(".field-refusal")).toContainText("0.5 mm to 200 mm");
  await expect(page.locator(".bench-verdict")).toHaveText(before);
});

test("an empty region names the two rules that collide and what opens it", async ({ page }) => {
  await enter(page, "Current limit", "0.0001");
  await enter(page, "Counts", "200");
  await expect(page.locator(".bench-clash")).toContainText("supply gives 0.0001 A");
  await expect(page.locator(".bench-clash")).toContainText("Opens with");
});
