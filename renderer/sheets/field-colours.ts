import { type FieldPicture, OWNER_NOTHING } from "../../shared-types/plan";
import type { ImageItem, PathItem, Point } from "./page";

/**
 * The colours of potential on paper: steel blue (low) over pale teal to pale straw (high). Lightness rises all the way, so that a
 * grey printer keeps the order; blue against yellow is the pair that the common kinds of colour blindness leave apart.
 */
const STOPS: readonly (readonly [number, number, number])[] = [
  [112, 170, 222],
  [140, 201, 222],
  [170, 222, 214],
  [208, 236, 196],
  [252, 240, 176],
];

/** @returns red, green, blue for a share of the span, 0 to 1. */
export function fieldColour(share: number): readonly [number, number, number] {
  const along = Math.max(0, Math.min(1, share)) * (STOPS.length - 1);
  const index = Math.min(STOPS.length - 2, Math.floor(along));
  const [low, high] = [STOPS[index], STOPS[index + 1]];
  const mixed = (channel: 0 | 1 | 2): number => Math.round(low[channel] + (along - index) * (high[channel] - low[channel]));
  return [mixed(0), mixed(1), mixed(2)];
}

/** @returns the potential (V) at a place of the tray (mm), between the nodes of the picture; NaN where there is no water or metal. */
export function voltsIn(picture: FieldPicture): (x: number, y: number) => number {
  const { columns, rows, pitchXMm, pitchYMm, volts, owner } = picture;
  return (x, y) => {
    const [u, v] = [x / pitchXMm, y / pitchYMm];
    if (u < 0 || v < 0 || u > columns - 1 || v > rows - 1) return Number.NaN;
    const nearest = Math.round(v) * columns + Math.round(u);
    if (owner[nearest] === OWNER_NOTHING) return Number.NaN;
    const [column, row] = [Math.min(columns - 2, Math.floor(u)), Math.min(rows - 2, Math.floor(v))];
    const [fu, fv] = [u - column, v - row];
    const at = row * columns + column;
    const between =
      (1 - fv) * ((1 - fu) * volts[at] + fu * volts[at + 1]) + fv * ((1 - fu) * volts[at + columns] + fu * volts[at + columns + 1]);
    // Beside an insulator or the wall some corners have no value.
    return Number.isNaN(between) ? volts[nearest] : between;
  };
}

/** Dots along the longer side of a colour picture: the lines over it carry the detail. */
const MOST_DOTS = 360;

/** @returns the potential in colour over a tray of this size (mm), drawn at `scale`. */
export function colourPicture(picture: FieldPicture, [low, high]: Point, [lengthMm, widthMm]: Point, scale: number): ImageItem {
  const perMm = Math.min(2, MOST_DOTS / Math.max(lengthMm, widthMm));
  const [columns, rows] = [Math.max(1, Math.round(lengthMm * perMm)), Math.max(1, Math.round(widthMm * perMm))];
  const rgb = new Uint8Array(3 * columns * rows).fill(255);
  const voltsAt = voltsIn(picture);
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      const volts = voltsAt(((column + 0.5) / columns) * lengthMm, (1 - (row + 0.5) / rows) * widthMm);
      if (!Number.isNaN(volts)) rgb.set(fieldColour((volts - low) / (high - low || 1)), 3 * (row * columns + column));
    }
  }
  return { kind: "image", x: 0, y: 0, widthMm: lengthMm * scale, heightMm: widthMm * scale, columns, rows, rgb };
}

const FINEST_MM = 1.1;

/**
 * Hatching for grey printers: the higher the potential, the denser; neighbouring bands lean to different sides.
 * @param levels the volts between the bands, rising.
 */
export function hatchedBands(picture: FieldPicture, levels: readonly number[], [lengthMm, widthMm]: Point, scale: number): PathItem {
  const voltsAt = voltsIn(picture);
  const bandOf = (volts: number): number => levels.filter((level) => volts >= level).length;
  const every = (band: number): number => 1 + Math.round((5 * (levels.length - band)) / Math.max(1, levels.length));
  const [width, height] = [lengthMm * scale, widthMm * scale];
  const chains: Point[][] = [];
  for (const lean of [1, -1]) {
    const start = lean === 1 ? -height : 0;
    const stop = lean === 1 ? width : width + height;
    for (let number = 0, at = start; at < stop; number++, at += FINEST_MM * Math.SQRT2) {
      let run: Point[] = [];
      const finish = (): void => {
        if (run.length > 1) chains.push([run[0], run[run.length - 1]]);
        run = [];
      };
      for (let y = 0; y <= height; y += 0.3) {
        const x = at + lean * y;
        const volts = x < 0 || x > width ? Number.NaN : voltsAt(x / scale, y / scale);
        const band = Number.isNaN(volts) ? -1 : bandOf(volts);
        // The lowest band stays white.
        if (band > 0 && band % 2 === (lean === 1 ? 1 : 0) && number % every(band) === 0) run.push([x, y]);
        else finish();
      }
      finish();
    }
  }
  return { kind: "path", chains, closed: false, stroke: 0.45, fill: null, lineMm: 0.08 };
}
