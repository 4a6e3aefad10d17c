import AxeBuilder from "@axe-core/playwright";
import type { Page } from "@playwright/test";
import { expect, goTo, test } from "./open-window";

const press = async (page: Page, key: string, name: string): Promise<void> => {
  await page.getByLabel(name, { exact: true }).fill(key);
  await page.getByLabel(name, { exact: true }).press("Enter");
};

/** Scenes of the window, each as a user comes to it from the one before. */
const SCENES: readonly (readonly [scene: string, go: (page: Page) => Promise<unknown>])[] = [
  ["the tray's cards", (page) => goTo(page, "Lay out")],
  ["a refused number", (page) => press(page, "900", "Depth at the centre")],
  ["the findings", (page) => page.locator(".ledger-findings").click()],
  ["units and size", (page) => page.getByRole("button", { name: "Units and size" }).click()],
  ["keys and actions", (page) => page.keyboard.press("F1")],
  [
    "a selected part",
    async (page) => {
      await page.keyboard.press("Escape");
      await page.getByRole("region", { name: "Parts", exact: true }).getByRole("button").first().click();
      await page.getByText("Copies", { exact: true }).click();
    },
  ],
  [
    "the closer look",
    async (page) => {
      const card = page.getByRole("region", { name: "Closer look" });
      await page.getByRole("button", { name: /^Closer look/ }).click();
      await card.getByRole("button", { name: "Pin the tray's middle" }).click();
      await card.getByRole("button", { name: "Across the middle" }).click();
      await card.getByText("Values", { exact: true }).click();
    },
  ],
  [
    "the stock list",
    async (page) => {
      await page.getByRole("button", { name: "Close the closer look" }).click();
      await page.getByRole("button", { name: "Stock list…" }).click();
      await page.getByRole("region", { name: "Stock", exact: true }).getByRole("button", { name: "Example list" }).click();
    },
  ],
  ["the Bench desk", (page) => goTo(page, "Bench")],
  ["the Probe plan desk", (page) => goTo(page, "Probe plan")],
  [
    "the Sheets desk",
    async (page) => {
      await goTo(page, "Sheets");
      await expect(page.locator("figure").first()).toBeVisible();
    },
  ],
  ["the start page", (page) => page.getByRole("button", { name: /^Start page/ }).click()],
  [
    "an overlap",
    async (page) => {
      await page.getByRole("region", { name: "Examples" }).getByRole("button", { name: "Two discs" }).click();
      await goTo(page, "Lay out");
      await page.getByRole("button", { name: /^Left disc/ }).click();
      await press(page, "225", "x");
      await expect(page.locator(".part-note-stop").first()).toBeVisible();
    },
  ],
];

/** @returns what axe calls serious or worse, in words. */
async function seriousFaults(page: Page): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page }).analyze();
  return violations
    .filter(({ impact }) => impact === "serious" || impact === "critical")
    .map(({ id, nodes }) => `${id}: ${nodes.map(({ target, failureSummary }) => `${target} ${failureSummary}`).join(" | ")}`);
}

for (const colours of ["light", "dark", "contrast"] as const) {
  test.describe(`in ${colours} colours`, () => {
    test.use({ colorScheme: colours === "dark" ? "dark" : "light" });
    test.setTimeout(240_000);
    test("axe finds nothing serious on any desk, card or message", async ({ page }) => {
      if (colours === "contrast") for (let turn = 0; turn < 3; turn++) await page.getByRole("button", { name: /^Colours/ }).click();
      for (const [scene, go] of SCENES) {
        await test.step(scene, async () => {
          await go(page);
          expect.soft(await seriousFaults(page), scene).toEqual([]);
        });
      }
    });
  });
}
