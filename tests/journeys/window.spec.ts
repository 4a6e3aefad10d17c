import type { Page } from "@playwright/test";
import { expect, goTo, ledger, openExample, test, trayBox } from "./open-window";

test("the tray stays where it is while desks change beside it", async ({ page }) => {
  const box = await trayBox(page);
  for (const desk of ["Bench", "Probe plan", "Lay out"]) {
    await goTo(page, desk);
    expect(await trayBox(page)).toEqual(box);
  }
});

test("a held arrow key in a field is one step, and Ctrl+Z takes it back while the field has the focus", async ({ page }) => {
  const depth = page.getByLabel("Depth at the centre");
  await depth.focus();
  await page.keyboard.down("ArrowUp");
  for (let repeat = 0; repeat < 4; repeat++) await page.keyboard.down("ArrowUp");
  await page.keyboard.up("ArrowUp");
  await expect(depth).toHaveValue("14.5");
  await page.keyboard.press("Shift+ArrowDown");
  await expect(depth).toHaveValue("9.5");
  await page.keyboard.press("Control+z");
  await expect(depth).toHaveValue("14.5");
  await page.keyboard.press("Control+z");
  await expect(depth).toHaveValue("12");
  await page.keyboard.press("Control+Shift+z");
  await expect(depth).toHaveValue("14.5");
});

test("half a number that is being typed is the field's own: Ctrl+Z does not touch the tray", async ({ page }) => {
  await page.getByLabel("Depth at the centre").fill("15");
  await page.getByLabel("Depth at the centre").press("Enter");
  await page.getByLabel("Temperature").fill("2");
  await page.getByLabel("Temperature").press("Control+z");
  await expect(page.getByLabel("Depth at the centre")).toHaveValue("15");
});

test("who thinks in inches reads and writes inches; the setup stays in millimetres", async ({ page }) => {
  await page.getByRole("button", { name: "Units and size" }).click();
  await page.getByLabel("Lengths in").selectOption("in");
  await page.getByRole("button", { name: "Close", exact: true }).click();
  await expect(page.getByLabel("Length (x)")).toHaveValue("11.811024");
  await page.getByLabel("Length (x)").fill("12");
  await page.getByLabel("Length (x)").press("Enter");
  await expect(page.getByLabel("Length (x)")).toHaveValue("12");
  await page.getByLabel("Width (y)").fill("20 cm");
  await page.getByLabel("Width (y)").press("Enter");
  await expect(page.getByLabel("Width (y)")).toHaveValue("7.874016");
  await page.reload();
  await expect(page.getByLabel("Length (x)")).toHaveValue("11.811024");
});

test("an action is found by a word of its name and run from the keyboard", async ({ page }) => {
  await page.keyboard.press("F1");
  await page.getByLabel("Find an action").fill("probe");
  await page.keyboard.press("Enter");
  await expect(page.getByRole("heading", { name: "Points" })).toBeVisible();
  await page.keyboard.press("F1");
  await expect(page.getByLabel("Find an action")).toBeFocused();
  await page.getByLabel("Find an action").fill("no such thing");
  await expect(page.getByText("No action has these words")).toBeVisible();
  await page.keyboard.press("Escape");
  await expect(page.getByLabel("Find an action")).toHaveCount(0);
});

test("colours go from the system's to light, dark and high contrast, and are kept", async ({ page }) => {
  const colours = page.getByRole("button", { name: /^Colours/ });
  for (const theme of ["light", "dark", "contrast"]) {
    await colours.click();
    await expect(page.getByRole("button", { name: `Colours: ${theme}` })).toBeVisible();
  }
  await expect(page.locator("html")).toHaveAttribute("data-contrast", "more");
  await page.reload();
  await expect(page.getByRole("button", { name: "Colours: contrast" })).toBeVisible();
});

test("the findings open over the tray, lead to their parts, and close by Escape", async ({ page }) => {
  await openExample(page, "Two discs");
  await page.getByLabel("Depth at the centre").fill("30");
  await page.getByLabel("Depth at the centre").press("Enter");
  await page.locator(".ledger-findings").click();
  const list = page.getByRole("region", { name: "Findings" });
  await expect(list.locator("[data-finding]").first()).toBeVisible();
  await list.locator("summary").first().click();
  await expect(list.getByText(/^Source: /).first()).toBeVisible();
  await page.keyboard.press("Escape");
  await expect(list).toHaveCount(0);
});

test("a fault of ours is told with its details, and the tray stays usable", async ({ page, faults }) => {
  await page.evaluate(() => setTimeout(() => Promise.reject(new Error("made to fail in a test")), 0));
  const card = page.locator(".message").filter({ hasText: "made to fail in a test" });
  await expect(card).toContainText("Your tray is kept");
  await expect(card.getByRole("button", { name: "Copy details" })).toBeVisible();
  await page.getByRole("button", { name: "Disc", exact: true }).click();
  await expect(page.getByRole("region", { name: "Parts", exact: true }).getByRole("listitem")).toHaveCount(4);
  await expect(ledger(page, "Resistance")).toContainText("Ω");
  expect(faults.splice(0)).toEqual(["made to fail in a test"]);
});

/** What sticks out of the window, or is cut off without a sign that it is. */
const cutOff = (page: Page): Promise<string[]> =>
  page.evaluate(() => {
    const wide = document.documentElement.scrollWidth > innerWidth ? ["the page"] : [];
    const cut = [...document.querySelectorAll<HTMLElement>("button, label, h1, h2, h3, th, td, dt, dd, legend")].filter((element) => {
      const { width } = element.getBoundingClientRect();
      const style = getComputedStyle(element);
      const hidden = element.closest(".unseen, .parts-list, svg") !== null || width === 0 || style.visibility === "hidden";
      return !hidden && style.textOverflow !== "ellipsis" && element.scrollWidth > element.clientWidth + 1 && style.display !== "inline";
    });
    return [...wide, ...cut.map((element) => `${element.tagName} “${element.textContent?.trim().slice(0, 40)}”`)];
  });

for (const [width, height] of [
  [1024, 700],
  [1280, 800],
  [1920, 1080],
  [3840, 2160],
] as const) {
  test(`at ${width} × ${height} nothing is cut off on any desk`, async ({ page }) => {
    await page.setViewportSize({ width, height });
    for (const desk of ["Lay out", "Bench", "Probe plan", "Sheets"]) {
      await goTo(page, desk);
      expect(await cutOff(page), desk).toEqual([]);
    }
    await goTo(page, "Lay out");
    await page.getByRole("region", { name: "Parts", exact: true }).getByRole("button").first().click();
    expect(await cutOff(page), "a selected part").toEqual([]);
  });
}

test("texts a third longer still find their room", async ({ page }) => {
  for (const desk of ["Lay out", "Bench", "Probe plan", "Sheets"]) {
    await goTo(page, desk);
    await page.evaluate(() => {
      const walker = document.createTreeWalker(document.querySelector(".side") ?? document.body, NodeFilter.SHOW_TEXT);
      for (let node = walker.nextNode(); node !== null; node = walker.nextNode()) {
        const words = node.textContent ?? "";
        const holds = node.parentElement?.closest("label, h2, h3, button, .hint, legend") ?? null;
        if (holds !== null && /[a-z]{3}/.test(words) && node.parentElement?.closest("svg, option") === null) {
          node.textContent = `${words} ${"lå".repeat(Math.ceil(words.length / 6))}`;
        }
      }
    });
    expect(await cutOff(page), desk).toEqual([]);
  }
});
