import type { Setup } from "../../shared-types/setup";
import { box, circle, type Item, line, outline, type Point, text } from "./page";
import { PRINTER_EDGE_MM } from "./paper";

/** What every page carries besides its content. */
export interface PageFacts {
  readonly setup: Setup;
  readonly setupId: string;
  readonly date: string;
  readonly version: string;
  readonly title: string;
  readonly number: number;
  readonly count: number;
  readonly printerScale: Point;
  /** Why the setup may not be used, or null. */
  readonly doNotUse: string | null;
}

const BAR_MM = 100;

/** A check bar of 100 mm with ticks every 10 mm, from a point along x or y. */
function checkBar(x: number, y: number, along: "x" | "y"): Item[] {
  const at = (distance: number, off: number): Point => (along === "x" ? [x + distance, y + off] : [x + off, y + distance]);
  const ticks = Array.from({ length: 11 }, (_, k) =>
    line([at(10 * k, 0), at(10 * k, k % 10 === 0 ? 2.6 : k === 5 ? 1.7 : 1.1)], k % 10 === 0 ? 0.25 : 0.15),
  );
  return [line([at(0, 0), at(BAR_MM, 0)], 0.25), ...ticks];
}

const scaleWords = ([x, y]: Point): string =>
  x === 1 && y === 1
    ? "no printer correction"
    : `corrected for a printer that prints ${(100 * x).toFixed(2)} mm and ${(100 * y).toFixed(2)} mm for 100 mm (x, y)`;

/** @returns header, footer and check bars of a page of this size. */
export function furniture(widthMm: number, heightMm: number, facts: PageFacts): Item[] {
  const edge = PRINTER_EDGE_MM;
  const top = heightMm - edge;
  const right = widthMm - edge;
  const name = facts.setup.title === "" ? "Untitled tray" : facts.setup.title;
  const items: Item[] = [
    text(edge, top - 4, facts.title, 4.2, { bold: true }),
    text(edge, top - 8.6, name, 3, { ink: 0.2 }),
    text(right, top - 4, `Setup ${facts.setupId}`, 4.2, { bold: true, anchor: "end" }),
    text(right, top - 8.6, `${facts.date} · page ${facts.number} of ${facts.count} · Fieldtray ${facts.version}`, 3, {
      anchor: "end",
      ink: 0.2,
    }),
    line(
      [
        [edge, top - 10.2],
        [right, top - 10.2],
      ],
      0.2,
    ),
    ...checkBar(edge + 13, edge + 7, "x"),
    ...checkBar(edge + 4.5, edge + 24, "y"),
    text(edge + 13, edge + 3.4, "100 mm ± 0.5 along x: measure this bar and the one at the left before use", 2.5),
    text(edge + 3.4, edge + 24, "100 mm ± 0.5 along y", 2.5, { turnDeg: 90 }),
    text(edge + 13, edge + 14.2, "Print at 100 % (actual size), never “fit to page”.", 2.8, { bold: true }),
    text(edge + 13, edge, scaleWords(facts.printerScale), 2.3, { ink: 0.3 }),
    box(edge, edge + 17.6, right - edge, 0, 0.1, 0.6),
  ];
  return facts.doNotUse === null ? items : [...items, ...warningBand(widthMm, heightMm, facts.doNotUse)];
}

/** A band across the page that says that the setup may not be used. */
function warningBand(widthMm: number, heightMm: number, reason: string): Item[] {
  const middle = heightMm / 2;
  const half = 9;
  return [
    outline(
      [
        [
          [PRINTER_EDGE_MM, middle - half],
          [widthMm - PRINTER_EDGE_MM, middle - half],
          [widthMm - PRINTER_EDGE_MM, middle + half],
          [PRINTER_EDGE_MM, middle + half],
        ],
      ],
      0.8,
      0,
      1,
    ),
    text(widthMm / 2, middle + 0.5, "DO NOT USE", 9, { bold: true, anchor: "middle" }),
    text(widthMm / 2, middle - 5.5, reason.length > 110 ? `${reason.slice(0, 108)}…` : reason, 2.9, { anchor: "middle" }),
  ];
}

/** A cross by which neighbouring tiles are laid over each other. */
export const alignmentCross = ([x, y]: Point): (ReturnType<typeof line> | ReturnType<typeof circle>)[] => [
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
