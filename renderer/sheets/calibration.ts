import type { SheetFonts } from "./font-metrics";
import { type Item, line, type Point, text } from "./page";
import { contentOf, type Sheet } from "./paper";
import { wrapped } from "./table";

/** Long bars, since a ruler's half millimetre is a smaller share of them; with 150 and 200 mm the diagonal is 250 mm. */
const BAR_X_MM = 150;
const BAR_Y_MM = 200;
/** Where a wide blank edge leaves less room. */
const SHORT_BAR_Y_MM = 150;
const TYPE_MM = 3.2;
const LEAD_MM = 4.5;

function longBar([x, y]: Point, lengthMm: number, along: "x" | "y"): Item[] {
  const at = (distance: number, off: number): Point => (along === "x" ? [x + distance, y + off] : [x + off, y + distance]);
  const ticks = Array.from({ length: lengthMm / 10 + 1 }, (_, k) => {
    const end = k === 0 || k === lengthMm / 10;
    return line([at(10 * k, end ? -3 : 0), at(10 * k, end ? 5 : k % 5 === 0 ? 3 : 1.8)], end ? 0.15 : 0.12);
  });
  return [line([at(0, 0), at(lengthMm, 0)], 0.15), ...ticks];
}

/** The four steps, numbered, right of the diagonal. */
function steps(sentences: readonly string[], left: number, top: number, right: number, fonts: SheetFonts): Item[] {
  let y = top - 3;
  return sentences.flatMap((sentence, index): Item[] => {
    const number = text(left, y - TYPE_MM, String(index + 1), TYPE_MM, { bold: true });
    const lines = wrapped(sentence, Math.min(125, right - left - 6), TYPE_MM, fonts).map((words) => {
      const item = text(left + 5, y - TYPE_MM, words, TYPE_MM);
      y -= LEAD_MM;
      return item;
    });
    y -= 2;
    return [number, ...lines];
  });
}

/**
 * The page by which a printer is corrected: two bars at right angles and the diagonal between their ends. It is printed
 * without any correction, on upright paper.
 * @returns its items.
 */
export function calibrationItems(sheet: Sheet, fonts: SheetFonts): Item[] {
  const [left, bottom, right, top] = contentOf(sheet);
  const barY = top - bottom >= BAR_Y_MM + 8 ? BAR_Y_MM : SHORT_BAR_Y_MM;
  const [x, y]: Point = [left + 4, bottom + 4];
  const diagonal = Number(Math.hypot(BAR_X_MM, barY).toFixed(1));
  const sentences = [
    "Print this page at 100 %, on the paper and from the drawer of the printer that the template will be printed with. Let the sheet lie for a few minutes: fresh from a hot printer it is a little short.",
    `Measure both bars between the middles of their long end ticks with a steel ruler, to a quarter of a millimetre. The bar along x should be ${BAR_X_MM} mm, the bar along y ${barY} mm.`,
    `Measure the dashed diagonal too: ${diagonal} mm, or √(x² + y²) of what the bars measure. More than 1 mm off, the paper runs askew; no correction mends that.`,
    `Divide: along x by ${BAR_X_MM / 100}, along y by ${barY / 100}. Enter the two results as what 100 mm measures (from 95 to 105; farther off, something else is wrong: as a rule the page was fitted to the paper).`,
    "Every page then says which correction it carries; its own check bars must come out at 100 mm.",
  ];
  const fields = [
    `Along x:  ________ mm  ÷ ${BAR_X_MM / 100}  =  ________ mm for 100 mm`,
    `Along y:  ________ mm  ÷ ${barY / 100}  =  ________ mm for 100 mm`,
    "Diagonal:  ________ mm",
    "Printer: __________________   paper: ____________   date: ____________",
  ];
  return [
    ...longBar([x, y], BAR_X_MM, "x"),
    ...longBar([x, y], barY, "y"),
    line(
      [
        [x + BAR_X_MM, y],
        [x, y + barY],
      ],
      0.12,
      0.2,
      [3, 1.5],
    ),
    ...steps(sentences, left + 62, top, right, fonts),
    ...fields.map((words, k) => text(x + 12, y + 44 - 9.5 * k, words, TYPE_MM)),
  ];
}
