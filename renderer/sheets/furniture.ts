import type { SheetFonts } from "./font-metrics";
import { circle, type Item, line, outline, type PathItem, type Point, text } from "./page";
import { STOP_BAND_MM } from "./paper";

/** What every page carries besides its content. */
export interface PageFacts {
  /** The setup's title. */
  readonly name: string;
  readonly setupId: string;
  readonly date: string;
  readonly version: string;
  readonly title: string;
  readonly number: number;
  readonly count: number;
  /** The correction for the short and the long side of the paper; null on a page that is printed without one. */
  readonly correction: Point | null;
  /** What stays blank at every edge, mm. */
  readonly edgeMm: number;
  /** Why the setup may not be used, or null. */
  readonly doNotUse: string | null;
}

const BAR_MM = 100;

/** A check bar of 100 mm with ticks every 10 mm, from a point along x or y. */
export function checkBar(x: number, y: number, along: "x" | "y"): Item[] {
  const at = (distance: number, off: number): Point => (along === "x" ? [x + distance, y + off] : [x + off, y + distance]);
  const ticks = Array.from({ length: 11 }, (_, k) =>
    line([at(10 * k, 0), at(10 * k, k % 10 === 0 ? 2.6 : k === 5 ? 1.7 : 1.1)], k % 10 === 0 ? 0.25 : 0.15),
  );
  return [line([at(0, 0), at(BAR_MM, 0)], 0.25), ...ticks];
}

/** @returns which printer correction a page carries, in words. */
export function scaleWords(correction: Point | null): string {
  if (correction === null) return "Printed without correction, to find one.";
  const [short, long] = correction.map((scale) => (100 * scale).toFixed(2));
  return correction.every((scale) => scale === 1)
    ? "No printer correction."
    : `Corrected for a printer that makes 100 mm ${short} mm along the paper’s short side, ${long} mm along its long side.`;
}

/** @returns words cut to a width (mm), with … where something was left out. */
export function fitted(words: string, widthMm: number, sizeMm: number, fonts: SheetFonts, bold = false): string {
  const { widthOf } = bold ? fonts.bold : fonts.regular;
  if (widthOf(words, sizeMm) <= widthMm) return words;
  const letters = [...words];
  while (letters.length > 1 && widthOf(`${letters.join("").trimEnd()}…`, sizeMm) > widthMm) letters.pop();
  return `${letters.join("").trimEnd()}…`;
}

/** @returns what stands over and under a page's content: header first, as it is read. */
export function furniture(widthMm: number, heightMm: number, facts: PageFacts, fonts: SheetFonts): { head: Item[]; foot: Item[] } {
  const edge = facts.edgeMm;
  const top = heightMm - edge;
  const right = widthMm - edge;
  const id = `Setup ${facts.setupId}`;
  const facing = `${facts.date} · page ${facts.number} of ${facts.count} · Fieldtray ${facts.version}`;
  const room = right - edge - 6;
  const head: Item[] = [
    ...(facts.doNotUse === null ? [] : backdrop(widthMm, heightMm)),
    text(edge, top - 4, fitted(facts.title, room - fonts.bold.widthOf(id, 4.2), 4.2, fonts, true), 4.2, { bold: true }),
    text(right, top - 4, id, 4.2, { bold: true, anchor: "end" }),
    text(edge, top - 8.6, fitted(facts.name, room - fonts.regular.widthOf(facing, 3), 3, fonts), 3, { ink: 0.2 }),
    text(right, top - 8.6, facing, 3, { anchor: "end", ink: 0.2 }),
    line(
      [
        [edge, top - 10.2],
        [right, top - 10.2],
      ],
      0.2,
    ),
    ...(facts.doNotUse === null ? [] : stopBand(widthMm, heightMm, edge, facts.doNotUse, fonts)),
  ];
  const foot: Item[] = [
    ...checkBar(edge + 13, edge + 7, "x"),
    ...checkBar(edge + 4.5, edge + 25, "y"),
    text(edge + 13, edge + 14.2, "Print at 100 % (actual size), never “fit to page”.", 2.8, { bold: true }),
    text(edge + 13, edge + 3.4, "100 mm ± 0.5 along x: measure this bar and the one at the left before use.", 2.5),
    text(edge + 3.4, edge + 25, "100 mm ± 0.5 along y", 2.5, { turnDeg: 90 }),
    text(edge + 13, edge + 0.6, scaleWords(facts.correction), 2.3, { ink: 0.3 }),
  ];
  return { head, foot };
}

/** Large pale words under the content: a cut-out tile still says that it may not be used. */
function backdrop(widthMm: number, heightMm: number): Item[] {
  const sizeMm = Math.min(widthMm, heightMm) * 0.13;
  return [0.3, 0.62].map((share) =>
    text(widthMm / 2, share * heightMm, "DO NOT USE", sizeMm, { bold: true, anchor: "middle", turnDeg: 20, ink: 0.88, backdrop: true }),
  );
}

/** A black band under the header that says that the setup may not be used, and why. */
function stopBand(widthMm: number, heightMm: number, edgeMm: number, reason: string, fonts: SheetFonts): Item[] {
  const [left, right] = [edgeMm, widthMm - edgeMm];
  const top = heightMm - edgeMm - 11.4;
  const bottom = top - STOP_BAND_MM + 2;
  const words = "DO NOT USE";
  const width = fonts.bold.widthOf(words, 6);
  const middle = (top + bottom) / 2;
  return [
    outline(
      [
        [
          [left, bottom],
          [right, bottom],
          [right, top],
          [left, top],
        ],
      ],
      0,
      null,
      0,
    ),
    text(left + 3, middle - 2.15, words, 6, { bold: true, ink: 1 }),
    text(left + width + 8, middle - 1, fitted(reason, right - left - width - 11, 2.9, fonts), 2.9, { ink: 1 }),
  ];
}

/** A cross by which neighbouring tiles are laid over each other. */
export const alignmentCross = ([x, y]: Point): PathItem[] => [
  line(
    [
      [x - 4, y],
      [x + 4, y],
    ],
    0.12,
  ),
  line(
    [
      [x, y - 4],
      [x, y + 4],
    ],
    0.12,
  ),
  circle(x, y, 2, 0.12),
];
