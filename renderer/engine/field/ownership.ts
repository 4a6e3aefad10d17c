import { OWNER_NOTHING, OWNER_WATER } from "../../../shared-types/plan";
import { type Loop, lengthOf, pointAlong } from "../geometry/outline";
import { covers } from "../geometry/signed-distance";
import { bedDepthMm } from "../geometry/water-depth";
import type { Grid } from "./grid";
import type { FieldLayout, Solid } from "./layout";

/** What lies at each node of the grid. */
export interface Ownership {
  /** Index of the part that covers the node, OWNER_WATER, or OWNER_NOTHING (outside the tray, dry). */
  readonly owner: Int16Array;
  /** Number of the conductor (in `layout.conductors`) that covers the node, else -1. */
  readonly body: Int16Array;
}

/** A node this near to a conductor's surface (share of the pitch) counts as metal: keeps cut links from vanishing. */
export const SURFACE_SHARE = 1e-4;

/** Calls `visit` with every node (column, row) of the grid inside a box in mm. */
function eachNodeIn(grid: Grid, bounds: Solid["bounds"], visit: (column: number, row: number) => void): void {
  const [left, bottom, right, top] = bounds;
  const firstColumn = Math.max(0, Math.ceil(left / grid.pitchXMm - 1e-9));
  const lastColumn = Math.min(grid.columns - 1, Math.floor(right / grid.pitchXMm + 1e-9));
  const firstRow = Math.max(0, Math.ceil(bottom / grid.pitchYMm - 1e-9));
  const lastRow = Math.min(grid.rows - 1, Math.floor(top / grid.pitchYMm + 1e-9));
  for (let row = firstRow; row <= lastRow; row++) for (let column = firstColumn; column <= lastColumn; column++) visit(column, row);
}

/**
 * Decides for each node whether it lies in water, in a part, or where there is neither.
 * Conductors win over insulators where the two touch.
 */
export function ownNodes(layout: FieldLayout, grid: Grid): Ownership {
  const { setup } = layout;
  const { columns, rows, pitchXMm, pitchYMm } = grid;
  const owner = new Int16Array(columns * rows).fill(OWNER_WATER);
  const body = new Int16Array(columns * rows).fill(-1);
  const { tray, water } = setup;
  if (tray.shape === "circle") {
    const radius = tray.diameterMm / 2;
    for (let row = 0; row < rows; row++) {
      for (let column = 0; column < columns; column++) {
        if (Math.hypot(column * pitchXMm - radius, row * pitchYMm - radius) > radius + SURFACE_SHARE * pitchXMm) {
          owner[row * columns + column] = OWNER_NOTHING;
        }
      }
    }
  }
  if (water.tiltXDeg !== 0 || water.tiltYDeg !== 0) {
    for (let row = 0; row < rows; row++) {
      for (let column = 0; column < columns; column++) {
        if (bedDepthMm(setup, column * pitchXMm, row * pitchYMm) <= 0) owner[row * columns + column] = OWNER_NOTHING;
      }
    }
  }
  for (const insulator of layout.insulators) {
    eachNodeIn(grid, insulator.bounds, (column, row) => {
      if (covers(insulator.placed, column * pitchXMm, row * pitchYMm)) owner[row * columns + column] = insulator.index;
    });
  }
  layout.conductors.forEach((conductor, number) => {
    eachNodeIn(grid, conductor.bounds, (column, row) => {
      if (!covers(conductor.placed, column * pitchXMm, row * pitchYMm)) return;
      owner[row * columns + column] = conductor.index;
      body[row * columns + column] = number;
    });
  });
  return { owner, body };
}

/** Marks with `bit` all nodes within two cells of an outline, so that only they need the careful treatment. */
export function markNear(flags: Uint8Array, bit: number, grid: Grid, loops: readonly Loop[]): void {
  const { columns, rows, pitchXMm, pitchYMm } = grid;
  const stepMm = Math.min(pitchXMm, pitchYMm);
  for (const loop of loops) {
    for (const piece of loop) {
      const count = Math.max(1, Math.ceil(lengthOf(piece) / stepMm));
      for (let step = 0; step <= count; step++) {
        const [x, y] = pointAlong(piece, step / count);
        const column = Math.floor(x / pitchXMm);
        const row = Math.floor(y / pitchYMm);
        for (let j = Math.max(0, row - 2); j <= Math.min(rows - 1, row + 3); j++) {
          for (let i = Math.max(0, column - 2); i <= Math.min(columns - 1, column + 3); i++) flags[j * columns + i] |= bit;
        }
      }
    }
  }
}

/** Marks with `bit` all nodes within `radiusMm` and a cell of a place. */
export function markDisc(flags: Uint8Array, bit: number, grid: Grid, x: number, y: number, radiusMm: number): void {
  const { columns, pitchXMm, pitchYMm } = grid;
  const reach = radiusMm + Math.max(pitchXMm, pitchYMm);
  eachNodeIn(grid, [x - reach, y - reach, x + reach, y + reach], (column, row) => {
    if (Math.hypot(column * pitchXMm - x, row * pitchYMm - y) <= reach) flags[row * columns + column] |= bit;
  });
}
