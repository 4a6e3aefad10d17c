import type { SheetFonts } from "./font-metrics";
import { type Item, line, type Point, text } from "./page";
import { contentOf, type Sheet } from "./paper";
import { wrapped } from "./table";

/** Long bars, since a ruler's half millimetre is a smaller share of them. */
const BAR_X_MM = 150;
const BAR_Y_MM = 200;
const BAR_Y_ACROSS_MM = 120;

function longBar([x, y]: Point, lengthMm: number, along: "x" | "y"): Item[] {
  const at = (distance: number, off: number): Point => (along === "x" ? [x + distance, y + off] : [x + off, y + distance]);
  const ticks = Array.from({ length: lengthMm / 10 + 1 }, (_, k) => {
    const end = k === 0 || k === lengthMm / 10;
    return line([at(10 * k, end ? -3 : 0), at(10 * k, end ? 5 : k % 5 === 0 ? 3 : 1.8)], end ? 0.15 : 0.12);
  });
  return [line([at(0, 0), at(lengthMm, 0)], 0.15), ...ticks];
}

/**
 * The page by which a printer is corrected. It is printed without any correction.
 * @returns its items.
 */
export function calibrationItems(sheet: Sheet, fonts: SheetFonts): Item[] {
  const [left, , right, top] = contentOf(sheet);
  const yBar = sheet.heightMm > 260 ? BAR_Y_MM : BAR_Y_ACROSS_MM;
  const origin: Point = [left + 12, 60];
  const sentences = [
    "Print this page at 100 %, on the paper and from the tray of the printer that the template will be printed with. Let the sheet lie for a few minutes: fresh from a hot printer it is a little short.",
    `Measure both bars between the middles of their long end ticks with a steel ruler, to a quarter of a millimetre. The bar along x should be ${BAR_X_MM} mm, the bar along y ${yBar} mm.`,
    `Divide: along x by ${BAR_X_MM / 100}, along y by ${yBar / 100}. Enter the two results as what 100 mm measures (from 95 to 105; farther off, something else is wrong: as a rule the page was fitted to the paper).`,
    "Every page then says which correction it carries; its own check bars must come out at 100 mm.",
  ];
  const items: Item[] = [...longBar(origin, BAR_X_MM, "x"), ...longBar(origin, yBar, "y")];
  let y = top - 4;
  const textLeft = left + 28;
  for (const [index, sentence] of sentences.entries()) {
    items.push(text(textLeft - 5, y - 3, String(index + 1), 3.2, { bold: true }));
    for (const words of wrapped(sentence, Math.min(150, right - textLeft - 2), 3.2, fonts)) {
      items.push(text(textLeft, y - 3, words, 3.2));
      y -= 4.5;
    }
    y -= 2;
  }
  const fields = [
    ["Along x", BAR_X_MM],
    ["Along y", yBar],
  ] as const;
  for (const [name, lengthMm] of fields) {
    y -= 9;
    items.push(text(textLeft, y, `${name}:  ________ mm  ÷ ${lengthMm / 100}  =  ________ mm for 100 mm`, 3.4));
  }
  y -= 9;
  items.push(text(textLeft, y, "Printer: ______________________   paper: ____________   date: ____________", 3.2));
  return items;
}
