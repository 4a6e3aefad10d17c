import type { SheetFonts } from "./font-metrics";
import { alignmentCross } from "./furniture";
import type { Box, Interval } from "./label-places";
import { box, type ClippedItem, type Item, line, type PathItem, type Point, plateOf, type TextItem, text } from "./page";
import { contentOf, OVERLAP_MM, type Tiling, tileIntervals, tileLabel } from "./paper";
import type { Drawing } from "./template-drawing";

/** A drawing spread over pages: what each page shows, without header and footer. */
export interface TilePage {
  readonly label: string;
  readonly widthMm: number;
  readonly heightMm: number;
  readonly items: readonly Item[];
}

/** What a tray's axes read and what is said under them. */
export interface AxisWords {
  /** Length of the axis along x, mm: with `mirrored` its figures run to the left. */
  readonly lengthMm: number;
  readonly widthMm: number;
  readonly mirrored: boolean;
  readonly note: string;
}

/** @returns which part of the drawing each column (or row) of tiles shows, mm. */
export const columnsOf = ([left]: Box, { columns, window }: Tiling): Interval[] => tileIntervals(left, columns, window[0]);
export const rowsOf = ([, bottom]: Box, { rows, window }: Tiling): Interval[] => tileIntervals(bottom, rows, window[1]);

/** The middles of the overlaps between neighbouring intervals. */
const seams = (intervals: readonly Interval[]): number[] => intervals.slice(1).map(([from]) => from + OVERLAP_MM / 2);

/** Two places for crosses on each stretch of a seam that one tile shows alone. */
function stations(intervals: readonly Interval[], end: number): number[] {
  return intervals.flatMap(([from, to], index) => {
    const start = index === 0 ? from : from + OVERLAP_MM;
    const stop = Math.min(end, index + 1 < intervals.length ? to - OVERLAP_MM : to);
    const [low, high] = [start + 6, stop - 6];
    return high - low > 20 ? [low + 0.15 * (high - low), high - 0.15 * (high - low)] : [(start + stop) / 2];
  });
}

/** Lines to trim along in the middle of every overlap, and the crosses on them. */
function seamItems([left, bottom, right, top]: Box, columns: readonly Interval[], rows: readonly Interval[]): PathItem[] {
  const trim = (from: Point, to: Point): PathItem => line([from, to], 0.12, 0.25, [2.5, 1.5]);
  return [
    ...seams(columns).flatMap((x) => [trim([x, bottom], [x, top]), ...stations(rows, top).flatMap((y) => alignmentCross([x, y]))]),
    ...seams(rows).flatMap((y) => [trim([left, y], [right, y]), ...stations(columns, right).flatMap((x) => alignmentCross([x, y]))]),
  ];
}

/** What a page shows of the drawing: paths that reach into it, texts that lie whole in it. */
function shownIn([left, bottom, right, top]: Box, items: Drawing["items"]): Drawing["items"] {
  return items.flatMap((item): Drawing["items"] => {
    if (item.kind === "image") return [item];
    if (item.kind === "text") {
      const plate = plateOf(item);
      if (plate === null) return [item];
      const [x, y, width, height] = plate;
      return x >= left - 1e-6 && y >= bottom - 1e-6 && x + width <= right + 1e-6 && y + height <= top + 1e-6 ? [item] : [];
    }
    const chains = item.chains.filter((chain) => {
      let [west, south, east, north] = [Infinity, Infinity, -Infinity, -Infinity];
      for (const [x, y] of chain) {
        west = Math.min(west, x);
        east = Math.max(east, x);
        south = Math.min(south, y);
        north = Math.max(north, y);
      }
      return west <= right + 1 && east >= left - 1 && south <= top + 1 && north >= bottom - 1;
    });
    // With a filling, holes and outsides belong together.
    if (chains.length === 0) return [];
    return [item.fill === null ? { ...item, chains } : item];
  });
}

const FIGURE_MM = 2.3;

/** The middle of the last gap between figures, where the axis' own letter stands; null when there is no gap. */
const lastGap = (places: readonly number[]): number | null =>
  places.length < 2 ? null : (places[places.length - 1] + places[places.length - 2]) / 2;

/** Figures along the lower and the left edge of what a page shows, every 10 mm, with the axes' letters and their unit in the corner. */
function axisItems(shown: Box, [dx, dy]: Point, { lengthMm, widthMm, mirrored }: AxisWords, endMm: number, fonts: SheetFonts): TextItem[] {
  const [left, bottom, right, top] = shown;
  const figure = { ink: 0.2 } as const;
  const fits = ({ x, at }: { x: number; at: number }): boolean => {
    const half = fonts.regular.widthOf(String(x), FIGURE_MM) / 2;
    return at - half >= left - 0.4 && at + dx + half <= endMm;
  };
  const tens = (endMm: number): number[] => Array.from({ length: Math.floor(endMm / 10 + 1e-9) + 1 }, (_, k) => 10 * k);
  const xs = tens(lengthMm)
    .map((x) => ({ x, at: mirrored ? lengthMm - x : x }))
    .filter((place) => place.at >= left && place.at <= right && fits(place));
  const ys = tens(widthMm).filter((y) => y >= bottom && y <= top);
  const [xLetter, yLetter] = [lastGap(xs.map(({ at }) => at)), lastGap(ys)];
  const [under, beside] = [bottom + dy - 3, left + dx - 0.8];
  return [
    ...xs.map(({ x, at }) => text(at + dx, under, String(x), FIGURE_MM, { anchor: "middle", ...figure })),
    ...ys.map((y) => text(beside, y + dy - 0.84, String(y), FIGURE_MM, { anchor: "end", ...figure })),
    ...(xLetter === null ? [] : [text(xLetter + dx, under, "x", FIGURE_MM, { anchor: "middle", bold: true })]),
    ...(yLetter === null ? [] : [text(beside, yLetter + dy - 0.6, "y", FIGURE_MM, { anchor: "end", bold: true })]),
    text(beside, under, "mm", FIGURE_MM, { anchor: "end", ...figure }),
  ];
}

/** A small plan of all tiles with this one marked, its lower right corner given. */
function assemblyMap(right: number, bottom: number, { columns, rows }: Tiling, column: number, row: number): Item[] {
  const cell = Math.min(5, 11.5 / rows, 60 / columns);
  const [x, y] = [right - cell * columns, bottom];
  const items: Item[] = [];
  for (let r = 0; r < rows; r++) {
    for (let c = 0; c < columns; c++) {
      const here = c === column && r === row;
      items.push(box(x + c * cell, y + r * cell, cell, cell, 0.15, 0, here ? 0 : null));
      if (cell < 3) continue;
      const words = tileLabel(c, r);
      items.push(
        text(x + (c + 0.5) * cell, y + (r + 0.34) * cell, words, 0.44 * cell, { anchor: "middle", ink: here ? 1 : 0, bold: here }),
      );
    }
  }
  return items;
}

/** Cuts a drawing into tiles of true size, in the order in which they are read: from the far side, left to right. */
export function tilesOf(drawing: Drawing, tiling: Tiling, axis: AxisWords, fonts: SheetFonts): TilePage[] {
  const { bounds } = drawing;
  const { widthMm, heightMm, columns, rows, window, edgeMm } = tiling;
  const content = contentOf(tiling);
  const [across, along] = [columnsOf(bounds, tiling), rowsOf(bounds, tiling)];
  const single = columns * rows === 1;
  const items = single ? drawing.items : [...drawing.items, ...seamItems(bounds, across, along)];
  const pages: TilePage[] = [];
  for (let row = rows - 1; row >= 0; row--) {
    for (let column = 0; column < columns; column++) {
      // A drawing smaller than what a page can show lies in the middle of it, and high rather than low.
      const slackX = columns === 1 ? (window[0] - (bounds[2] - bounds[0])) / 2 : 0;
      const slackY = rows === 1 ? (window[1] - (bounds[3] - bounds[1])) / 2 : 0;
      const offset: Point = [content[0] - across[column][0] + slackX, content[1] - along[row][0] + slackY];
      const shown: Box = [
        Math.max(bounds[0], across[column][0] - slackX),
        Math.max(bounds[1], along[row][0] - slackY),
        Math.min(bounds[2], across[column][1]),
        Math.min(bounds[3], along[row][1]),
      ];
      const seen: Box = [shown[0] + offset[0], shown[1] + offset[1], shown[2] + offset[0], shown[3] + offset[1]];
      const clipped: ClippedItem = { kind: "clipped", window: seen, offset, items: shownIn(shown, items) };
      const label = tileLabel(column, row);
      const right = widthMm - edgeMm;
      const guide = `Tile ${label} of ${columns * rows}: lay cross on cross, trim one sheet along the dashes.`;
      const noteWidth = fonts.regular.widthOf(axis.note, 2.4);
      const noteX = Math.max(content[0] + noteWidth / 2, Math.min(content[2] - noteWidth / 2, (seen[0] + seen[2]) / 2));
      const furniture: Item[] = [
        ...axisItems(shown, offset, axis, right, fonts),
        ...(row === 0 ? [text(noteX, seen[1] - 6.3, axis.note, 2.4, { anchor: "middle", ink: 0.1 })] : []),
        ...(single
          ? []
          : [text(right, edgeMm + 14.2, guide, 2.5, { anchor: "end" }), ...assemblyMap(right, edgeMm + 1, tiling, column, row)]),
      ];
      pages.push({ label, widthMm, heightMm, items: [clipped, ...furniture] });
    }
  }
  return pages;
}
