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

/** What printers leave blank at every edge, mm (they differ: 4 to 6.7 mm); nothing is printed nearer. */
export const PRINTER_EDGE_MM = 7;
/** Room for the furniture round a page's content: check bar at the left, header above, footer with check bar below. */
const LEFT_MM = 13;
const ABOVE_MM = 12;
const BELOW_MM = 21;

/** The part of a page that its content has, [left, bottom, right, top] in mm. */
export function contentOf(widthMm: number, heightMm: number): readonly [number, number, number, number] {
  const edge = PRINTER_EDGE_MM;
  return [edge + LEFT_MM, edge + BELOW_MM, widthMm - edge, heightMm - edge - ABOVE_MM];
}

/** Overlap of neighbouring tiles, mm. */
export const OVERLAP_MM = 10;

export interface Tiling {
  readonly widthMm: number;
  readonly heightMm: number;
  readonly columns: number;
  readonly rows: number;
  /** Step from tile to tile, mm. */
  readonly step: Point;
}

const tilesAlong = (sizeMm: number, windowMm: number): number =>
  sizeMm <= windowMm + 1e-9 ? 1 : Math.ceil((sizeMm - OVERLAP_MM) / (windowMm - OVERLAP_MM) - 1e-9);

/**
 * Lays out tiles for a drawing of a size: the orientation with the fewest tiles, upright where both need as many.
 * @param paper its size upright, mm, as the printer sees true lengths.
 */
export function tilingFor(drawing: Point, paper: Point): Tiling {
  const options = [paper, [paper[1], paper[0]] as const].map(([widthMm, heightMm]): Tiling => {
    const [left, bottom, right, top] = contentOf(widthMm, heightMm);
    const window: Point = [right - left, top - bottom];
    return {
      widthMm,
      heightMm,
      columns: tilesAlong(drawing[0], window[0]),
      rows: tilesAlong(drawing[1], window[1]),
      step: [window[0] - OVERLAP_MM, window[1] - OVERLAP_MM],
    };
  });
  const [upright, across] = options;
  return across.columns * across.rows < upright.columns * upright.rows ? across : upright;
}

/** @returns the label of a tile: letters from left to right, numbers from the reader's side away: A1, B1, A2 … */
export const tileLabel = (column: number, row: number): string => `${String.fromCharCode(65 + column)}${row + 1}`;
