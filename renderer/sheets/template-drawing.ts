import type { Plan, ProbePoint } from "../../shared-types/plan";
import type { PlacedShape, Setup, Tray } from "../../shared-types/setup";
import { chainOf, type Loop, outlineOf, pointAlong } from "../engine/geometry/outline";
import { trayOutline, traySizeMm } from "../engine/geometry/tray-outline";
import type { SheetFonts } from "./font-metrics";
import { type Box, besidePoint, type Interval, type LabelPlaces, labelPlaces } from "./label-places";
import { circle, type ImageItem, line, outline, type PathItem, type Point, plate, type TextItem } from "./page";
import { besidePlaced, CHORD_MM, chainsOf, crossArmMm, partMarks, tagsOf } from "./part-marks";

/** What a drawing of the tray at full size shows; y away from the reader, origin in the tray's lower left corner. */
export interface DrawingChoice {
  readonly points: boolean;
  /** Lines of the grid: every millimetre, every 5 mm, or none. */
  readonly grid: "fine" | "coarse" | "none";
  readonly saveInk: boolean;
  /** To be read from below: x runs to the left. */
  readonly mirrored: boolean;
  /** Thickness of the tray's wall, mm; 0 draws its inside alone. */
  readonly wallMm: number;
}

export interface Drawing {
  /** [left, bottom, right, top] of everything, mm. */
  readonly bounds: Box;
  readonly items: readonly (PathItem | TextItem | ImageItem)[];
  /** Point numbers and part tags for which there was no room. */
  readonly leftOut: number;
}

/** Room round the tray's inside for its own line, mm. */
const MARGIN_MM = 0.8;
const POINT_RADIUS_MM = 1.3;
const TAG_MM = 3;
const NUMBER_SIZES_MM = [2.5, 2];
/** Share of the size that capitals and figures are high, with a little air. */
const PLATE_HEIGHT = 0.86;
/** The same for words, whose letters reach below the line. */
const WORDS_HEIGHT = 1.14;

/** @returns [left, bottom, right, top] of a tray's drawing, mm; the same mirrored. */
export function drawingBounds(setup: Setup, wallMm = 0): Box {
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  const out = MARGIN_MM + wallMm;
  return [-out, -out, lengthMm + out, widthMm + out];
}

/** The outside of the wall: the inside, larger all round by its thickness. */
function outsideOf(tray: Tray, wallMm: number): Loop {
  if (tray.shape === "circle")
    return trayOutline(tray).map((piece) => (piece.kind === "bow" ? { ...piece, radius: piece.radius + wallMm } : piece));
  const shift = (at: number): number => (at === 0 ? -wallMm : at + wallMm);
  return trayOutline(tray).map((piece) =>
    piece.kind === "edge" ? { ...piece, x0: shift(piece.x0), y0: shift(piece.y0), x1: shift(piece.x1), y1: shift(piece.y1) } : piece,
  );
}

/** Lines of the grid by weight: every 10 mm, every 5 mm, every millimetre. */
function gridItems(lengthMm: number, widthMm: number, { grid, saveInk }: DrawingChoice): PathItem[] {
  if (grid === "none") return [];
  const weights = [
    { belongs: (at: number) => at % 10 === 0, lineMm: 0.14, ink: saveInk ? 0.76 : 0.64 },
    { belongs: (at: number) => at % 5 === 0 && at % 10 !== 0, lineMm: 0.1, ink: saveInk ? 0.84 : 0.76 },
    { belongs: (at: number) => at % 5 !== 0 && grid === "fine", lineMm: 0.05, ink: saveInk ? 0.92 : 0.86 },
  ];
  return weights.map(({ belongs, lineMm, ink }): PathItem => {
    const chains: Point[][] = [];
    for (let x = 0; x <= lengthMm + 1e-9; x++)
      if (belongs(x))
        chains.push([
          [x, 0],
          [x, widthMm],
        ]);
    for (let y = 0; y <= widthMm + 1e-9; y++)
      if (belongs(y))
        chains.push([
          [0, y],
          [lengthMm, y],
        ]);
    return { kind: "path", chains, closed: false, stroke: ink, fill: null, lineMm };
  });
}

/** All points of a plan in visiting order. */
export const pointsOf = (plan: Plan): readonly ProbePoint[] =>
  [...plan.probing.levels.flatMap(({ points }) => points), ...plan.probing.checks].sort((a, b) => a.n - b.n);

/** Where a leader ends: on the border of the plate, on the way to its middle. */
function borderTowards([x, y]: Point, [middleX, middleY]: Point, width: number, height: number): Point {
  const [dx, dy] = [x - middleX, y - middleY];
  const share = Math.min(1, width / 2 / Math.abs(dx || 1e-9), height / 2 / Math.abs(dy || 1e-9));
  return [middleX + share * dx, middleY + share * dy];
}

/** The place of an outline that is nearest to a label, and the gap between them, mm. */
function nearestOn(placed: PlacedShape, [x, y]: Point, width: number, height: number): { place: Point; gapMm: number } {
  const places = outlineOf(placed)
    .flat()
    .flatMap((piece) => Array.from({ length: 24 }, (_, k) => pointAlong(piece, k / 24)));
  const away = ([px, py]: Point): number =>
    Math.hypot(Math.max(0, Math.abs(px - x) - width / 2), Math.max(0, Math.abs(py - y) - height / 2));
  const place = places.reduce((best, one) => (away(one) < away(best) ? one : best));
  return { place, gapMm: away(place) };
}

/** Tags of parts and slabs, each in its fullest wording that finds room. */
function tagItems(setup: Setup, places: LabelPlaces, fonts: SheetFonts): { items: (PathItem | TextItem)[]; leftOut: number } {
  const items: (PathItem | TextItem)[] = [];
  const tagged = [
    ...setup.parts.map((part) => ({ placed: part, tags: tagsOf(part, setup.supply.volts), sizeMm: TAG_MM, bold: true })),
    ...setup.water.slabs.map((slab) => ({
      placed: slab,
      tags: [`slab ${slab.id}, ${Number(slab.thicknessMm.toFixed(2))} mm`, `slab ${slab.id}`],
      sizeMm: 2.5,
      bold: false,
    })),
  ];
  let leftOut = 0;
  for (const { placed, tags, sizeMm, bold } of tagged) {
    const height = sizeMm * WORDS_HEIGHT;
    const found = (function* () {
      for (const farMm of [4, 60]) {
        for (const words of tags) {
          const width = (bold ? fonts.bold : fonts.regular).widthOf(words, sizeMm) + 0.8;
          const middle = places.place(besidePlaced(placed, 1, width, height, farMm), width, height);
          if (middle !== null) yield { words, middle, width };
        }
      }
    })().next().value;
    if (found === undefined) {
      leftOut++;
      continue;
    }
    const { words, middle, width } = found;
    const { place, gapMm } = nearestOn(placed, middle, width, height);
    if (gapMm > 4) items.push(line([place, borderTowards(place, middle, width, height)], 0.1, 0.3));
    items.push(plate(middle, words, sizeMm, [width, height], bold));
  }
  return { items, leftOut };
}

/** Rings with a dot at the probe points, and their numbers where there is room. */
function pointItems(
  points: readonly ProbePoint[],
  places: LabelPlaces,
  fonts: SheetFonts,
): { items: (PathItem | TextItem)[]; leftOut: number } {
  const marks = points.flatMap(({ xMm, yMm }) => [circle(xMm, yMm, POINT_RADIUS_MM, 0.15, 0, 1), circle(xMm, yMm, 0.25, 0, null, 0)]);
  const items: (PathItem | TextItem)[] = [];
  let leftOut = 0;
  for (const { n, xMm, yMm } of points) {
    const found = (function* () {
      for (const sizeMm of NUMBER_SIZES_MM) {
        const width = fonts.bold.widthOf(String(n), sizeMm) + 0.5;
        const height = sizeMm * PLATE_HEIGHT;
        const middle = places.place(besidePoint([xMm, yMm], width, height, POINT_RADIUS_MM + 0.35, 9), width, height);
        if (middle !== null) yield { middle, width, height, sizeMm };
      }
    })().next().value;
    if (found === undefined) {
      leftOut++;
      continue;
    }
    const { middle, width, height, sizeMm } = found;
    const end = borderTowards([xMm, yMm], middle, width, height);
    const distance = Math.hypot(end[0] - xMm, end[1] - yMm);
    if (distance > POINT_RADIUS_MM + 1.2) {
      const share = POINT_RADIUS_MM / distance;
      items.push(line([[xMm + share * (end[0] - xMm), yMm + share * (end[1] - yMm)], end], 0.1, 0.3));
    }
    items.push(plate(middle, String(n), sizeMm, [width, height], true));
  }
  return { items: [...marks, ...items], leftOut };
}

/**
 * @param columns what each tile shows of x, `rows` of y, in the drawing's own mm: labels keep whole within a tile.
 * @returns the tray at full size with what `choice` asks for.
 */
export function trayDrawing(
  setup: Setup,
  plan: Plan,
  fonts: SheetFonts,
  choice: DrawingChoice,
  columns: readonly Interval[],
  rows: readonly Interval[],
): Drawing {
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  const bounds = drawingBounds(setup, choice.wallMm);
  // Everything is composed as seen from above and turned over at the end, so the tiles are turned over first.
  const seenColumns = choice.mirrored ? columns.map(([from, to]): Interval => [lengthMm - to, lengthMm - from]) : columns;
  const places = labelPlaces([0.6, 0.6, lengthMm - 0.6, widthMm - 0.6], seenColumns, rows);
  const points = choice.points ? pointsOf(plan) : [];
  const wall = chainOf(trayOutline(setup.tray), CHORD_MM);
  const slabs = setup.water.slabs.map((slab) => outlineOf(slab).map((loop) => chainOf(loop, CHORD_MM)));
  places.takeOutline(wall);
  for (const chain of [...slabs.flat(), ...setup.parts.flatMap(chainsOf)]) places.takeOutline(chain);
  for (const part of setup.parts) {
    const { xMm, yMm } = part;
    const r = crossArmMm(part) + 0.3;
    places.takeBox([xMm - r, yMm - r, xMm + r, yMm + r]);
  }
  for (const { xMm, yMm } of points) {
    const r = POINT_RADIUS_MM + 0.2;
    places.takeBox([xMm - r, yMm - r, xMm + r, yMm + r]);
  }
  const tags = tagItems(setup, places, fonts);
  const numbers = pointItems(points, places, fonts);
  const items: (PathItem | TextItem)[] = [
    ...gridItems(lengthMm, widthMm, choice),
    outline([wall], 0.45),
    ...(choice.wallMm > 0 ? [outline([chainOf(outsideOf(setup.tray, choice.wallMm), CHORD_MM)], 0.2)] : []),
    ...slabs.map((chains) => ({ ...outline(chains, 0.25, 0.15), dashMm: [3, 1.5] as const })),
    ...setup.parts.flatMap((part) => partMarks(part, choice.saveInk)),
    ...tags.items,
    ...numbers.items,
  ];
  return { bounds, items: choice.mirrored ? turnedOver(items, lengthMm) : items, leftOut: tags.leftOut + numbers.leftOut };
}

/** The items seen from below: x becomes length − x, while text stays readable. */
function turnedOver(items: readonly (PathItem | TextItem)[], lengthMm: number): (PathItem | TextItem)[] {
  const anchors = { start: "end", middle: "middle", end: "start" } as const;
  return items.map((item) =>
    item.kind === "path"
      ? { ...item, chains: item.chains.map((chain) => chain.map(([x, y]): Point => [lengthMm - x, y])) }
      : { ...item, x: lengthMm - item.x, anchor: anchors[item.anchor] },
  );
}
