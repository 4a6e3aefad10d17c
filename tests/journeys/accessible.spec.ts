import AxeBuilder from "@axe-core/playwright";
import { expect, goTo, test } from "./open-window";

for (const colorScheme of ["light", "dark"] as const) {
  test.describe(`in ${colorScheme} colours`, () => {
    test.use({ colorScheme });
    for (const desk of ["Lay out", "Bench", "Probe plan", "Sheets", "Start page"]) {
      test(`axe finds nothing serious on: ${desk}`, async ({ page }) => {
        if (desk === "Start page") await page.getByRole("button", { name: /^Start page/ }).click();
        else await goTo(page, desk);
        await page.waitForTimeout(700);
        const { violations } = await new AxeBuilder({ page }).analyze();
        const serious = violations.filter(({ impact }) => impact === "serious" || impact === "critical");
        expect(
          serious.map(({ id, nodes }) => `${id}: ${nodes.map(({ target, failureSummary }) => `${target} ${failureSummary}`).join(" | ")}`),
        ).toEqual([]);
      });
    }
  });
}
