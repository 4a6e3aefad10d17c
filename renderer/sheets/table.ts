import type { SheetFonts } from "./font-metrics";
import { type Item, line, text } from "./page";
import { contentOf, type Sheet } from "./paper";

/** A column of a printed table. */
export interface Column {
  readonly head: string;
  readonly widthMm: number;
  readonly align: "start" | "end" | "middle";
}

/** A row: cells, or a heading across the whole table. */
export type Row = { readonly cells: readonly string[]; readonly bold?: boolean } | { readonly heading: string; readonly note?: string };

export interface TablePage {
  readonly items: readonly Item[];
}

const ROW_MM = 5.4;
const HEADING_MM = 7.6;
const NOTE_MM = 2.6;
const NOTE_LINE_MM = 3.4;

/** Cuts a word that is wider than a line into pieces that fit; others stay whole. */
function pieces(word: string, fits: (words: string) => boolean): string[] {
  if (fits(word)) return [word];
  const cut: string[] = [""];
  for (const sign of word) {
    const last = cut.length - 1;
    if (cut[last] === "" || fits(cut[last] + sign)) cut[last] += sign;
    else cut.push(sign);
  }
  return cut;
}

/** Breaks words into lines that fit a width. @returns at least one line. */
export function wrapped(words: string, widthMm: number, sizeMm: number, fonts: SheetFonts, bold = false): string[] {
  const metrics = bold ? fonts.bold : fonts.regular;
  const fits = (some: string): boolean => metrics.widthOf(some, sizeMm) <= widthMm;
  const lines: string[] = [];
  let current = "";
  for (const word of words.split(/\s+/).flatMap((one) => pieces(one, fits))) {
    const longer = current === "" ? word : `${current} ${word}`;
    if (current !== "" && !fits(longer)) {
      lines.push(current);
      current = word;
    } else current = longer;
  }
  return [...lines, current];
}

function cellItem(x: number, y: number, column: Column, words: string, bold: boolean): Item {
  const at = column.align === "start" ? x + 1 : column.align === "end" ? x + column.widthMm - 1 : x + column.widthMm / 2;
  return text(at, y, words, 3.1, { anchor: column.align, bold });
}

/**
 * Sets rows into as many columns of tables and pages as they need; a heading never stands alone at the foot.
 * @param page the paper that the table stands on. @returns the items of each page.
 */
export function tablePages(
  columns: readonly Column[],
  rows: readonly Row[],
  page: Sheet,
  fonts: SheetFonts,
  intro: readonly string[] = [],
): TablePage[] {
  const [left, bottom, right, top] = contentOf(page);
  const width = columns.reduce((sum, column) => sum + column.widthMm, 0);
  const across = Math.max(1, Math.floor((right - left + 8) / (width + 8)));
  const pages: Item[][] = [];
  let items: Item[] = [];
  let lane = across;
  let y = 0;
  let x = left;
  let ceiling = top - 2;
  const open = (): void => {
    lane++;
    if (lane >= across) {
      items = [];
      pages.push(items);
      lane = 0;
      ceiling = top - 2;
      if (pages.length === 1) {
        for (const sentence of intro.flatMap((one) => wrapped(one, right - left, 3, fonts))) {
          items.push(text(left, ceiling - 3, sentence, 3, { ink: 0.15 }));
          ceiling -= 4.4;
        }
        if (intro.length > 0) ceiling -= 2;
      }
    }
    x = left + lane * (width + 8);
    y = ceiling;
    let at = x;
    for (const column of columns) {
      items.push(cellItem(at, y - 4, { ...column }, column.head, true));
      at += column.widthMm;
    }
    items.push(
      line(
        [
          [x, y - 5.6],
          [x + width, y - 5.6],
        ],
        0.3,
      ),
    );
    y -= 5.6;
  };
  open();
  rows.forEach((row, index) => {
    const notes = "heading" in row && row.note !== undefined ? wrapped(row.note, width, NOTE_MM, fonts) : [];
    const height = "heading" in row ? HEADING_MM + notes.length * NOTE_LINE_MM : ROW_MM;
    const needed = "heading" in row && index + 1 < rows.length ? height + ROW_MM : height;
    if (y - needed < bottom) open();
    if ("heading" in row) {
      items.push(text(x, y - 5.6, row.heading, 3.5, { bold: true }));
      for (const [k, words] of notes.entries()) items.push(text(x, y - 9.6 - k * NOTE_LINE_MM, words, NOTE_MM, { ink: 0.2 }));
    } else {
      let at = x;
      columns.forEach((column, place) => {
        items.push(cellItem(at, y - 3.9, column, row.cells[place] ?? "", row.bold ?? false));
        at += column.widthMm;
      });
      items.push(
        line(
          [
            [x, y - ROW_MM],
            [x + width, y - ROW_MM],
          ],
          0.08,
          0.6,
        ),
      );
    }
    y -= height;
  });
  return pages.map((made) => ({ items: made }));
}
