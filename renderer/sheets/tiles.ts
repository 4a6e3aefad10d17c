import { alignmentCross } from "./furniture";
import { box, type ClippedItem, type Item, line, type PathItem, type Point, type TextItem, text } from "./page";
import { contentOf, OVERLAP_MM, type Tiling, tileLabel, tilingFor } from "./paper";
import type { Drawing } from "./template-drawing";

/** A drawing spread over pages: what each page shows, without header and footer. */
export interface TilePage {
  readonly label: string;
  readonly widthMm: number;
  readonly heightMm: number;
  readonly items: readonly Item[];
}

/** Where seams run: the middle of each overlap, in the drawing's own millimetres. */
function seams(start: number, count: number, step: number): number[] {
  return Array.from({ length: count - 1 }, (_, k) => start + (k + 1) * step + OVERLAP_MM / 2);
}

/** Crosses on every seam, two for each tile along it, and the line to cut along. */
function seamItems(drawing: Drawing, { columns, rows, step }: Tiling, window: Point): (PathItem | TextItem)[] {
  const [left, bottom, right, top] = drawing.bounds;
  const items: (PathItem | TextItem)[] = [];
  const stations = (start: number, count: number, stepMm: number, windowMm: number, end: number): number[] =>
    Array.from({ length: count }, (_, k) => {
      const from = start + k * stepMm + (k === 0 ? 0 : OVERLAP_MM);
      const to = Math.min(end, start + k * stepMm + windowMm - OVERLAP_MM);
      return [from + 0.2 * (to - from), from + 0.8 * (to - from)];
    }).flat();
  for (const x of seams(left, columns, step[0])) {
    items.push(
      line(
        [
          [x, bottom],
          [x, top],
        ],
        0.1,
        0.4,
        [2, 2],
      ),
    );
    for (const y of stations(bottom, rows, step[1], window[1], top)) items.push(...alignmentCross([x, y]));
  }
  for (const y of seams(bottom, rows, step[1])) {
    items.push(
      line(
        [
          [left, y],
          [right, y],
        ],
        0.1,
        0.4,
        [2, 2],
      ),
    );
    for (const x of stations(left, columns, step[0], window[0], right)) items.push(...alignmentCross([x, y]));
  }
  return items;
}

/** A small plan of all tiles with this one marked. */
function assemblyMap(x: number, y: number, { columns, rows }: Tiling, column: number, row: number): Item[] {
  const cell = 5;
  const items: Item[] = [];
  for (let r = 0; r < rows; r++) {
    for (let c = 0; c < columns; c++) {
      const here = c === column && r === row;
      items.push(box(x + c * cell, y + r * cell, cell, cell, 0.15, 0, here ? 0 : null));
      items.push(
        text(x + (c + 0.5) * cell, y + (r + 0.5) * cell - 0.8, tileLabel(c, r), 2.2, { anchor: "middle", ink: here ? 1 : 0, bold: here }),
      );
    }
  }
  return items;
}

/**
 * Cuts a drawing into tiles of true size.
 * @param paper the sheet's size upright, mm, as the printer sees true lengths.
 */
export function tilesOf(drawing: Drawing, paper: Point): TilePage[] {
  const [left, bottom, right, top] = drawing.bounds;
  const tiling = tilingFor([right - left, top - bottom], paper);
  const { widthMm, heightMm, columns, rows, step } = tiling;
  const content = contentOf(widthMm, heightMm);
  const window: Point = [content[2] - content[0], content[3] - content[1]];
  const single = columns * rows === 1;
  const items = single ? drawing.items : [...drawing.items, ...seamItems(drawing, tiling, window)];
  const pages: TilePage[] = [];
  for (let row = rows - 1; row >= 0; row--) {
    for (let column = 0; column < columns; column++) {
      // A drawing smaller than its window lies in the middle.
      const slackX = Math.max(0, (window[0] - (right - left)) / 2);
      const slackY = Math.max(0, (window[1] - (top - bottom)) / 2);
      const offset: Point = [
        content[0] - left - column * step[0] + (columns === 1 ? slackX : 0),
        content[1] - bottom - row * step[1] + (rows === 1 ? slackY : 0),
      ];
      const clipped: ClippedItem = { kind: "clipped", window: content, offset, items };
      const furniture: Item[] = single
        ? []
        : [
            ...assemblyMap(content[2] - 5 * columns - 1, 8.5, tiling, column, row),
            text(
              content[2] - 5 * columns - 3,
              9.5,
              `tile ${tileLabel(column, row)} of ${columns * rows}: lay the crosses on each other, cut along the dashes`,
              2.5,
              {
                anchor: "end",
              },
            ),
          ];
      pages.push({ label: tileLabel(column, row), widthMm, heightMm, items: [clipped, ...furniture] });
    }
  }
  return pages;
}
