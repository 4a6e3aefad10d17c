import { type FieldPicture, OWNER_NOTHING } from "../../shared-types/plan";
import type { Tray } from "../../shared-types/setup";
import { depthFromWallMm } from "../engine/geometry/tray-outline";
import type { ColourScale } from "./colour-scale";

/** The potential as pixels: one pixel a node of the picture, top row first, as ImageData wants them. */
export interface FieldPixels {
  readonly columns: number;
  readonly rows: number;
  readonly bytes: Uint8ClampedArray<ArrayBuffer>;
}

/** The mean of a node's neighbours that have a potential; NaN without any. */
function meanAround({ columns, rows, volts }: FieldPicture, column: number, row: number): number {
  let sum = 0;
  let count = 0;
  for (let y = Math.max(0, row - 1); y <= Math.min(rows - 1, row + 1); y++) {
    for (let x = Math.max(0, column - 1); x <= Math.min(columns - 1, column + 1); x++) {
      const value = volts[y * columns + x] as number;
      if (Number.isNaN(value)) continue;
      sum += value;
      count++;
    }
  }
  return sum / count;
}

/**
 * Colours a picture of the potential. Nodes without potential stay transparent, save those next to the water that lie beyond
 * the tray's wall or in an insulator: they carry on the water's colour, so that smoothing between nodes does not fade the
 * water at a wall. (The painter clips to the wall and paints parts over it.) At a waterline the bed is dry, and it does fade.
 * @param spanV the potentials at the two ends of the scale, V.
 */
export function fieldPixels(picture: FieldPicture, spanV: readonly [number, number], tray: Tray, scale: ColourScale): FieldPixels {
  const { columns, rows, volts, owner, pitchXMm, pitchYMm } = picture;
  const bytes = new Uint8ClampedArray(columns * rows * 4);
  const pixels = new Uint32Array(bytes.buffer);
  const perVolt = (scale.packed.length - 1) / Math.max(spanV[1] - spanV[0], Number.MIN_VALUE);
  const last = scale.packed.length - 1;
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      const node = row * columns + column;
      let value = volts[node] as number;
      if (Number.isNaN(value)) {
        const carriesOn = owner[node] !== OWNER_NOTHING || depthFromWallMm(tray, column * pitchXMm, row * pitchYMm) < 0;
        if (carriesOn) value = meanAround(picture, column, row);
        if (Number.isNaN(value)) continue;
      }
      const shade = Math.min(last, Math.max(0, Math.round((value - spanV[0]) * perVolt)));
      pixels[(rows - 1 - row) * columns + column] = scale.packed[shade] as number;
    }
  }
  return { columns, rows, bytes };
}

/** @returns the pixels on a canvas of their own, ready to be drawn at any size. */
export function imageOf({ columns, rows, bytes }: FieldPixels): HTMLCanvasElement {
  const canvas = window.document.createElement("canvas");
  canvas.width = columns;
  canvas.height = rows;
  canvas.getContext("2d")?.putImageData(new ImageData(bytes, columns, rows), 0, 0);
  return canvas;
}
