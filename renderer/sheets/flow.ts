import type { Severity } from "../../shared-types/plan";
import type { SheetFonts } from "./font-metrics";
import { box, circle, type Item, line, outline, type Point, text } from "./page";
import { contentOf, type Sheet } from "./paper";
import { wrapped } from "./table";

/** Text, tables and tick boxes that run down a page and on to the next: what the checklist, the bench list and the cover are set in. */

export interface FlowColumn {
  readonly head: string;
  /** Share of the width; shares need not add up to anything. */
  readonly share: number;
  readonly align?: "start" | "end";
  readonly bold?: boolean;
}

export type Block =
  | { readonly kind: "heading"; readonly words: string }
  | { readonly kind: "paragraph"; readonly words: string; readonly bold?: boolean; readonly sizeMm?: number }
  | {
      readonly kind: "table";
      readonly columns: readonly FlowColumn[];
      readonly rows: readonly (readonly string[])[];
      /** A sign before each row's first cell. */
      readonly signs?: readonly Severity[];
    }
  /** A box to tick, with what is to be seen to. */
  | { readonly kind: "tick"; readonly words: string }
  /** Lines to write on, side by side, each with what is to be written. */
  | { readonly kind: "fields"; readonly labels: readonly string[] }
  /** Anything of a known height, drawn from its upper left corner. */
  | { readonly kind: "picture"; readonly heightMm: number; readonly draw: (left: number, top: number, width: number) => readonly Item[] }
  | { readonly kind: "gap"; readonly heightMm: number };

/** A piece of a block that is not broken over pages. */
interface Slice {
  readonly heightMm: number;
  readonly draw: (left: number, top: number) => readonly Item[];
  /** Whether the next slice must stand on the same page. */
  readonly keepWithNext?: boolean;
  /** What is set again at the top of the next page. */
  readonly repeats?: Slice;
}

const BODY_MM = 3;
const LINE_MM = 4.1;
const CELL_MM = 2.75;
const CELL_LINE_MM = 3.7;
/** Air between the header's line and what a page begins with. */
export const AIR_MM = 2;

const linesOf = (lines: readonly string[], sizeMm: number, leadMm: number, bold: boolean, indent = 0): Slice => ({
  heightMm: lines.length * leadMm + 1,
  draw: (left, top) => lines.map((words, k) => text(left + indent, top - sizeMm - k * leadMm, words, sizeMm, { bold })),
});

/** Octagon, triangle and circle, as on the screen: the shape alone tells them apart (shapes as in ISO 3864). */
function severitySign(severity: Severity, x: number, y: number): Item {
  const corners = (count: number, radius: number, startDeg: number): Point[] =>
    Array.from({ length: count }, (_, k): Point => {
      const angle = ((startDeg + (360 * k) / count) * Math.PI) / 180;
      return [x + radius * Math.cos(angle), y + radius * Math.sin(angle)];
    });
  if (severity === "stop") return outline([corners(8, 1.6, 22.5)], 0.2, 0, 0);
  return severity === "caution" ? outline([corners(3, 1.8, 90)], 0.35) : circle(x, y, 1.2, 0.3);
}

function tableSlices({ columns, rows, signs }: Extract<Block, { kind: "table" }>, width: number, fonts: SheetFonts): Slice[] {
  const shares = columns.reduce((sum, { share }) => sum + share, 0);
  const widths = columns.map(({ share }) => (share / shares) * width);
  const lefts = widths.map((_, k) => widths.slice(0, k).reduce((sum, one) => sum + one, 0));
  const indent = signs === undefined ? 0 : 5;
  const row = (cells: readonly string[], head: boolean, sign?: Severity): Slice => {
    const bold = (k: number): boolean => head || (columns[k].bold ?? false);
    const set = cells.map((words, k) => wrapped(words, widths[k] - 3 - (k === 0 ? indent : 0), CELL_MM, fonts, bold(k)));
    const heightMm = Math.max(1, ...set.map((lines) => lines.length)) * CELL_LINE_MM + 1.7;
    return {
      heightMm,
      draw: (left, top) => [
        ...(sign === undefined ? [] : [severitySign(sign, left + 2, top - 2.6)]),
        ...set.flatMap((lines, k) =>
          lines.map((words, index) => {
            const end = columns[k].align === "end";
            const x = left + lefts[k] + (end ? widths[k] - 2 : k === 0 ? indent : 0);
            return text(x, top - 3.5 - index * CELL_LINE_MM, words, CELL_MM, { anchor: end ? "end" : "start", bold: bold(k) });
          }),
        ),
        line(
          [
            [left, top - heightMm],
            [left + width, top - heightMm],
          ],
          head ? 0.3 : 0.08,
          head ? 0 : 0.55,
        ),
      ],
    };
  };
  const head = columns.some((column) => column.head !== "")
    ? row(
        columns.map((column) => column.head),
        true,
      )
    : undefined;
  const body = rows.map((cells, index) => ({ ...row(cells, false, signs?.[index]), ...(head === undefined ? {} : { repeats: head }) }));
  return [...(head === undefined ? [] : [{ ...head, keepWithNext: true }]), ...body, { heightMm: 2, draw: () => [] }];
}

function slicesOf(block: Block, width: number, fonts: SheetFonts): Slice[] {
  switch (block.kind) {
    case "heading":
      return [{ heightMm: 8.4, keepWithNext: true, draw: (left, top) => [text(left, top - 6.2, block.words, 3.9, { bold: true })] }];
    case "paragraph": {
      const sizeMm = block.sizeMm ?? BODY_MM;
      const bold = block.bold ?? false;
      return [linesOf(wrapped(block.words, width, sizeMm, fonts, bold), sizeMm, (sizeMm / BODY_MM) * LINE_MM, bold)];
    }
    case "table":
      return tableSlices(block, width, fonts);
    case "tick": {
      const lines = linesOf(wrapped(block.words, width - 7, BODY_MM, fonts), BODY_MM, LINE_MM, false, 7);
      return [
        { heightMm: lines.heightMm + 0.7, draw: (left, top) => [box(left + 0.5, top - 3.7, 3.4, 3.4, 0.25), ...lines.draw(left, top)] },
      ];
    }
    case "fields": {
      const each = width / block.labels.length;
      const draw: Slice["draw"] = (left, top) =>
        block.labels.flatMap((label, k) => {
          const [from, to] = [left + k * each, left + (k + 1) * each - 4];
          const words = fonts.regular.widthOf(label, 2.7) + 1.5;
          return [
            text(from, top - 8, label, 2.7),
            line(
              [
                [from + words, top - 8.4],
                [to, top - 8.4],
              ],
              0.15,
            ),
          ];
        });
      // Lines to sign on stand together: a signature on a page of its own signs nothing.
      return [{ heightMm: 9.4, keepWithNext: true, draw }];
    }
    case "picture":
      return [{ heightMm: block.heightMm, draw: (left, top) => block.draw(left, top, width) }];
    case "gap":
      return [{ heightMm: block.heightMm, draw: () => [] }];
  }
}

/** @returns the items of each page that the blocks fill; a heading never stands alone at the foot. */
export function flowPages(blocks: readonly Block[], sheet: Sheet, fonts: SheetFonts): { readonly items: readonly Item[] }[] {
  const [left, bottom, right, ceiling] = contentOf(sheet);
  const top = ceiling - AIR_MM;
  // The figures' row under a drawing is free here.
  const floor = bottom - 5;
  const slices = blocks.flatMap((block) => slicesOf(block, right - left, fonts));
  const pages: Item[][] = [[]];
  let y = top;
  slices.forEach((slice, index) => {
    let needed = slice.heightMm;
    for (let k = index; slices[k].keepWithNext && k + 1 < slices.length; k++) needed += slices[k + 1].heightMm;
    if (y - needed < floor && y < top) {
      pages.push([]);
      y = top;
      if (slice.repeats !== undefined) {
        pages[pages.length - 1].push(...slice.repeats.draw(left, y));
        y -= slice.repeats.heightMm;
      }
    }
    pages[pages.length - 1].push(...slice.draw(left, y));
    y -= slice.heightMm;
  });
  return pages.map((items) => ({ items }));
}
