import type { Quality } from "../../../shared-types/plan";
import type { Tray } from "../../../shared-types/setup";
import { traySizeMm } from "../geometry/tray-outline";

/** A regular grid of nodes over the tray's bounding box; node (column, row) at (column·pitchX, row·pitchY), index row·columns + column. */
export interface Grid {
  readonly columns: number;
  readonly rows: number;
  readonly pitchXMm: number;
  readonly pitchYMm: number;
}

/** Nodes aimed at in each quality; 300 mm × 200 mm then gets pitches of 1, 0.5 and 0.25 mm. */
const AIMED_NODES: Readonly<Record<Quality, number>> = { live: 60_000, print: 240_000, reference: 960_000 };

/** @returns a grid over a tray of this size with an even number of cells a side, pitches near `pitchMm`. */
export function gridOfPitch(tray: Tray, pitchMm: number): Grid {
  const [lengthMm, widthMm] = traySizeMm(tray);
  const cells = (sizeMm: number): number => Math.max(8, 2 * Math.round(sizeMm / (2 * pitchMm)));
  const columns = cells(lengthMm) + 1;
  const rows = cells(widthMm) + 1;
  return { columns, rows, pitchXMm: lengthMm / (columns - 1), pitchYMm: widthMm / (rows - 1) };
}

/** @returns the pitch (mm) at which a tray of this size is solved in the given quality. */
export function pitchFor(tray: Tray, quality: Quality): number {
  const [lengthMm, widthMm] = traySizeMm(tray);
  return Math.sqrt((lengthMm * widthMm) / AIMED_NODES[quality]);
}

/** @returns the grid with every other node left out in both directions. */
export function halved(grid: Grid): Grid {
  return {
    columns: (grid.columns + 1) / 2,
    rows: (grid.rows + 1) / 2,
    pitchXMm: grid.pitchXMm * 2,
    pitchYMm: grid.pitchYMm * 2,
  };
}
