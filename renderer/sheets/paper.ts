import type { Point } from "./page";

/** Paper sizes, mm: ISO 216, and the US sizes of ANSI Y14.1 (Letter, Tabloid). */
export const PAPERS = {
  a4: [210, 297],
  a3: [297, 420],
  a2: [420, 594],
  letter: [215.9, 279.4],
  tabloid: [279.4, 431.8],
} as const satisfies Readonly<Record<string, Point>>;

export type PaperName = keyof typeof PAPERS;

/** What most printers leave blank at every edge, mm (common practice, no source); a printer that needs more is ordered for. */
export const PRINTER_EDGE_MM = 5;
/** Room round a page's content: check bar and figures at the left, header above, check bar, figures and notes below. */
const LEFT_MM = 13;
const ABOVE_MM = 12;
const BELOW_MM = 25;
/** Height of the band that stands under the header while the setup may not be used. */
export const STOP_BAND_MM = 11;

/** The edges, mm, that a pack may be ordered with. */
export const EDGE_RANGE_MM = [4, 20] as const;

/** What all pages of a pack keep free. */
export interface Frame {
  /** Whether the band stands on them that forbids the use. */
  readonly stopped: boolean;
  /** What stays blank at every edge, mm. */
  readonly edgeMm: number;
}

/** A page's size and what its furniture leaves. */
export interface Sheet extends Frame {
  readonly widthMm: number;
  readonly heightMm: number;
}

/** The part of a page that its content has, [left, bottom, right, top] in mm. */
export function contentOf({ widthMm, heightMm, stopped, edgeMm: edge }: Sheet): readonly [number, number, number, number] {
  return [edge + LEFT_MM, edge + BELOW_MM, widthMm - edge, heightMm - edge - ABOVE_MM - (stopped ? STOP_BAND_MM : 0)];
}

/** Overlap of neighbouring tiles, mm. */
export const OVERLAP_MM = 10;

export interface Tiling extends Sheet {
  readonly columns: number;
  readonly rows: number;
  /** Width and height of what a page can show, mm. */
  readonly window: Point;
}

const tilesAlong = (sizeMm: number, windowMm: number): number =>
  sizeMm <= windowMm + 1e-9 ? 1 : Math.ceil((sizeMm - OVERLAP_MM) / (windowMm - OVERLAP_MM) - 1e-9);

/**
 * Lays out tiles for a drawing of a size: the orientation with the fewest tiles, upright where both need as many.
 * @param paper its size upright, mm, as the printer sees true lengths.
 */
export function tilingFor(drawing: Point, paper: Point, frame: Frame): Tiling {
  const options = [paper, [paper[1], paper[0]] as const].map(([widthMm, heightMm]): Tiling => {
    const [left, bottom, right, top] = contentOf({ widthMm, heightMm, ...frame });
    const window: Point = [right - left, top - bottom];
    return { widthMm, heightMm, ...frame, columns: tilesAlong(drawing[0], window[0]), rows: tilesAlong(drawing[1], window[1]), window };
  });
  const [upright, across] = options;
  return across.columns * across.rows < upright.columns * upright.rows ? across : upright;
}

/** @returns what each of `count` tiles shows of an axis from `start`, mm: intervals that overlap by OVERLAP_MM. */
export const tileIntervals = (start: number, count: number, windowMm: number): (readonly [number, number])[] =>
  Array.from({ length: count }, (_, k) => {
    const from = start + k * (windowMm - OVERLAP_MM);
    return [from, from + windowMm] as const;
  });

/** @returns the label of a tile: letters from left to right, numbers from the reader's side away: A1, B1, A2 … */
export const tileLabel = (column: number, row: number): string => `${String.fromCharCode(65 + column)}${row + 1}`;
