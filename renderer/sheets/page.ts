/**
 * A page as data before it is PDF or picture. All measures in millimetres as they shall come out of the printer; x to the
 * right and y upwards from the page's lower left corner, as on the tray.
 */

export type Point = readonly [number, number];

/** A grey (0 black, 1 white) or a colour as red, green, blue from 0 to 255. */
export type Ink = number | readonly [number, number, number];

export interface PathItem {
  readonly kind: "path";
  /** Chains of points; each is closed when `closed`. Several chains with a fill follow the even-odd rule. */
  readonly chains: readonly (readonly Point[])[];
  readonly closed: boolean;
  readonly stroke: Ink | null;
  readonly fill: Ink | null;
  readonly lineMm: number;
  readonly dashMm?: readonly [number, number];
}

export interface TextItem {
  readonly kind: "text";
  readonly x: number;
  /** Of the text's baseline. */
  readonly y: number;
  readonly text: string;
  /** Size of the type: the distance from line to line when set solid. */
  readonly sizeMm: number;
  readonly anchor: "start" | "middle" | "end";
  readonly bold?: boolean;
  readonly turnDeg?: number;
  readonly ink?: Ink;
  /** A white plate of this width and height under the text, round its middle: keeps it readable over a grid. Needs anchor "middle". */
  readonly plateMm?: Point;
  /** Large pale words that lie under everything else on purpose. */
  readonly backdrop?: boolean;
}

/** A coloured picture in dots, the one thing that lines cannot say. */
export interface ImageItem {
  readonly kind: "image";
  /** Its lower left corner and size, mm. */
  readonly x: number;
  readonly y: number;
  readonly widthMm: number;
  readonly heightMm: number;
  readonly columns: number;
  readonly rows: number;
  /** Red, green, blue of every dot, upper row first. */
  readonly rgb: Uint8Array;
}

/** Items that are cut off at a rectangle [left, bottom, right, top] and moved by an offset. */
export interface ClippedItem {
  readonly kind: "clipped";
  readonly window: readonly [number, number, number, number];
  readonly offset: Point;
  readonly items: readonly (PathItem | TextItem | ImageItem)[];
}

export type Item = PathItem | TextItem | ImageItem | ClippedItem;

export interface Page {
  /** Which sheet it belongs to, such as "template". */
  readonly sheet: string;
  /** What a reader calls it, such as "Tray template, tile A1". */
  readonly title: string;
  readonly widthMm: number;
  readonly heightMm: number;
  /** What the printer makes of a true length along x and y; the page is shrunk or stretched against it. */
  readonly printerScale: Point;
  readonly items: readonly Item[];
}

/** Pages in printing order, with what belongs to the document as a whole. */
export interface Pack {
  readonly title: string;
  readonly setupId: string;
  readonly date: string;
  readonly version: string;
  readonly pages: readonly Page[];
}

const BLACK = 0;

/** @returns an open line through points. */
export const line = (points: readonly Point[], lineMm = 0.2, stroke: Ink = BLACK, dashMm?: readonly [number, number]): PathItem => ({
  kind: "path",
  chains: [points],
  closed: false,
  stroke,
  fill: null,
  lineMm,
  ...(dashMm === undefined ? {} : { dashMm }),
});

/** @returns a closed outline, filled or not. */
export const outline = (
  chains: readonly (readonly Point[])[],
  lineMm = 0.3,
  stroke: Ink | null = BLACK,
  fill: Ink | null = null,
): PathItem => ({
  kind: "path",
  chains,
  closed: true,
  stroke,
  fill,
  lineMm,
});

/** @returns a rectangle from its lower left corner. */
export const box = (
  x: number,
  y: number,
  width: number,
  height: number,
  lineMm = 0.2,
  stroke: Ink | null = BLACK,
  fill: Ink | null = null,
): PathItem =>
  outline(
    [
      [
        [x, y],
        [x + width, y],
        [x + width, y + height],
        [x, y + height],
      ],
    ],
    lineMm,
    stroke,
    fill,
  );

/** @returns a circle as a chain fine enough for 600 dots an inch. */
export const circle = (
  x: number,
  y: number,
  radius: number,
  lineMm = 0.2,
  stroke: Ink | null = BLACK,
  fill: Ink | null = null,
): PathItem => {
  const count = Math.max(24, Math.ceil(Math.PI / Math.acos(Math.max(0.5, 1 - 0.005 / radius))));
  const chain = Array.from({ length: count }, (_, k): Point => {
    const angle = (2 * Math.PI * k) / count;
    return [x + radius * Math.cos(angle), y + radius * Math.sin(angle)];
  });
  return outline([chain], lineMm, stroke, fill);
};

/** How far below the middle of figures and capitals their baseline lies, as a share of the size (DejaVu Sans: capitals 0.729 high). */
const HALF_CAPITAL = 0.3645;

/** @returns the plate of a text as [left, bottom, width, height], or null. */
export function plateOf({ x, y, sizeMm, plateMm }: TextItem): readonly [number, number, number, number] | null {
  if (plateMm === undefined) return null;
  return [x - plateMm[0] / 2, y + HALF_CAPITAL * sizeMm - plateMm[1] / 2, ...plateMm];
}

/** @returns text on a white plate, both round their middle. */
export const plate = ([x, y]: Point, words: string, sizeMm: number, plateMm: Point, bold: boolean): TextItem => ({
  kind: "text",
  x,
  y: y - HALF_CAPITAL * sizeMm,
  text: words,
  sizeMm,
  anchor: "middle",
  bold,
  plateMm,
});

/** @returns text; see TextItem. */
export const text = (
  x: number,
  y: number,
  words: string,
  sizeMm: number,
  more: Partial<Omit<TextItem, "kind" | "x" | "y" | "text" | "sizeMm">> = {},
): TextItem => ({
  kind: "text",
  x,
  y,
  text: words,
  sizeMm,
  anchor: "start",
  ...more,
});
