import type { Page } from "@playwright/test";
import { createTrayView, toScreen, viewOf } from "../../renderer/canvas/view";
import { expect, test } from "./open-window";

/** @returns where a place of the example's tray (mm) lies on the page, while the whole tray is in sight; `zoom` is the size of the interface. */
async function trayOnPage(page: Page, zoom = 1) {
  const box = await page.locator(".tray-surface").boundingBox();
  if (box === null) throw new Error("the tray is not on the page");
  const tray = createTrayView({ shape: "rectangle", lengthMm: 300, widthMm: 200, wallHeightMm: 40, baseMm: 3, baseMaterial: "acrylic" });
  tray.setSize(box.width / zoom, box.height / zoom);
  const view = viewOf(tray.getState());
  return (xMm: number, yMm: number): readonly [number, number] => {
    const [x, y] = toScreen(view, xMm, yMm);
    return [box.x + zoom * x, box.y + zoom * y];
  };
}

async function drag(page: Page, from: readonly [number, number], to: readonly [number, number]): Promise<void> {
  await page.mouse.move(...from);
  await page.mouse.down();
  await page.mouse.move(...to, { steps: 12 });
}

const options = (page: Page) => page.getByRole("listbox", { name: "Parts in the tray" }).getByRole("option");
const option = (page: Page, name: RegExp) => options(page).filter({ hasText: name });
const announced = (page: Page) => page.getByRole("status").filter({ hasText: /./ });

test("a dragged part snaps to whole millimetres, tells its place under the hand, and Escape puts it back", async ({ page }) => {
  const on = await trayOnPage(page);
  await drag(page, on(65, 120), on(80.4, 121.3));
  await expect(page.locator(".live-number")).toHaveText("x 80, y 101 mm");
  await page.mouse.up();
  await expect(option(page, /^Left bar/)).toContainText("x 80, y 101 mm");
  await expect(announced(page).first()).toContainText("Move Left bar: x 80, y 101 mm");
  await drag(page, on(80, 120), on(200, 20));
  await page.keyboard.press("Escape");
  await page.mouse.up();
  await expect(option(page, /^Left bar/)).toContainText("x 80, y 101 mm");
});

test("a ring grows by its handle and a bar turns by its own, with the number in sight", async ({ page }) => {
  const on = await trayOnPage(page);
  await page.mouse.click(...on(178.5, 100));
  const [edge, y] = on(180, 100);
  await drag(page, [edge + 10, y], [on(190, 100)[0] + 10, y]);
  await expect(page.locator(".live-number")).toContainText("80 outside");
  await page.mouse.up();
  await page.mouse.click(...on(65, 60));
  const [side, middle] = on(60, 100);
  await drag(page, [side - 30, middle], on(30, 65));
  await expect(page.locator(".live-number")).toHaveText("135°");
  await page.mouse.up();
  await expect(option(page, /^Left bar/)).toContainText("turned 135°");
});

test("a disc dropped from the shelf lies where it was let go", async ({ page }) => {
  const on = await trayOnPage(page);
  const box = await page.locator(".tray-surface").boundingBox();
  const [x, y] = on(150, 40);
  await page
    .getByRole("button", { name: "Disc", exact: true })
    .dragTo(page.locator(".tray-surface"), { targetPosition: { x: x - (box?.x ?? 0), y: y - (box?.y ?? 0) } });
  await expect(option(page, /^Disc/)).toContainText("x 150, y 40 mm");
  await expect(option(page, /^Disc/)).toHaveAttribute("aria-selected", "true");
});

test("a part is framed, copied and pasted beside itself, and all of it undone, from the keyboard", async ({ page }) => {
  const on = await trayOnPage(page);
  await drag(page, on(40, 190), on(90, 20));
  await page.mouse.up();
  await expect(option(page, /^Left bar/)).toHaveAttribute("aria-selected", "true");
  await page.keyboard.press("Control+c");
  await page.keyboard.press("Control+v");
  await expect(options(page)).toHaveCount(4);
  await expect(option(page, /^Left bar D/)).toContainText("x 75, y 90 mm");
  await page.keyboard.press("Control+z");
  await expect(options(page)).toHaveCount(3);
});

test("list and tray share the selection: choose by arrow, go to the tray, nudge", async ({ page }) => {
  await page.getByRole("listbox", { name: "Parts in the tray" }).focus();
  await page.keyboard.press("End");
  await expect(option(page, /^Loose ring/)).toHaveAttribute("aria-selected", "true");
  await page.keyboard.press("Enter");
  await page.keyboard.press("Shift+ArrowUp");
  await page.keyboard.press("ArrowRight");
  await page.keyboard.press("Alt+ArrowRight");
  await expect(option(page, /^Loose ring/)).toContainText("x 151.1, y 110 mm");
});

test("the pointer reads volts and field where it rests, and nothing outside the tray", async ({ page }) => {
  const on = await trayOnPage(page);
  await page.mouse.move(...on(150, 100));
  await expect(page.locator("body")).toContainText("3.000 V");
  await page.mouse.move(...on(150, 215));
  await expect(page.locator("body")).not.toContainText("3.000 V");
});

test("a larger interface has larger words on the tray too, and the hand still meets the part", async ({ page }) => {
  await page.getByRole("button", { name: "Units and size" }).click();
  await page.getByLabel("Size of the interface").selectOption("1.5");
  await page.keyboard.press("Escape");
  const on = await trayOnPage(page, 1.5);
  await drag(page, on(65, 120), on(80.4, 121.3));
  await expect(page.locator(".live-number")).toHaveText("x 80, y 101 mm");
  await page.mouse.up();
  const sharpness = await page
    .locator(".tray-surface canvas")
    .first()
    .evaluate((canvas: HTMLCanvasElement) => canvas.width / canvas.getBoundingClientRect().width);
  expect(sharpness).toBeCloseTo(1, 2);
});

test("an opened setup never shows the lines of the one before it", async ({ page }) => {
  // The line of the drawing at the middle of the tray, in frames until the new field has come.
  await page.getByRole("button", { name: /^Start page/ }).click();
  await page.evaluate(() => {
    const seen: string[] = [];
    Reflect.set(window, "seenFields", seen);
    const look = (): void => {
      const shown = document.querySelector(".tray-canvas");
      if (shown !== null) seen.push(shown.getAttribute("data-field") ?? "");
      requestAnimationFrame(look);
    };
    look();
  });
  await page.getByRole("region", { name: "Examples" }).getByRole("button", { name: "Two discs" }).click();
  await expect(page.locator(".tray-canvas")).toHaveAttribute("data-field", "shown");
  const seen = await page.evaluate(() => [...new Set(Reflect.get(window, "seenFields") as string[])]);
  expect(seen).not.toContain("pale");
});

test("while a part is dragged its clear gaps stand on the tray in mm, and equal ones say that they are equal", async ({ page }) => {
  // What the canvas writes is caught at the pen, since a picture has no words.
  await page.evaluate(() => {
    const written: string[] = [];
    Reflect.set(window, "written", written);
    const write = CanvasRenderingContext2D.prototype.fillText;
    CanvasRenderingContext2D.prototype.fillText = function (text, ...rest) {
      written.push(text);
      return write.call(this, text, ...rest);
    };
  });
  const written = () => page.evaluate(() => (Reflect.get(window, "written") as string[]).splice(0));
  const on = await trayOnPage(page);
  await drag(page, on(178.5, 100), on(168.5, 100));
  await expect.poll(written).toContain("40 mm");
  await page.mouse.move(...on(178.6, 100), { steps: 4 });
  await expect.poll(written).toContain("= 50 mm");
  await page.mouse.up();
});
