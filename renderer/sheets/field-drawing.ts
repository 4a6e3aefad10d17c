import type { Plan } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import { chainOf, outlineOf } from "../engine/geometry/outline";
import { trayOutline, traySizeMm } from "../engine/geometry/tray-outline";
import { colourPicture, hatchedBands } from "./field-colours";
import type { SheetFonts } from "./font-metrics";
import { type Interval, type LabelPlaces, labelPlaces } from "./label-places";
import { type ImageItem, line, outline, type PathItem, type Point, plate, type TextItem } from "./page";
import { besidePlaced, CHORD_MM, chainsOf, partMarks, tagsOf } from "./part-marks";
import { type Drawing, drawingBounds } from "./template-drawing";

/** How the potential between the lines is shown: in colour, hatched for grey printers, or not at all. */
export type FieldInk = "colour" | "hatched" | "lines";

export interface FieldChoice {
  /** Paper mm for a tray mm, 1 for full size. */
  readonly scale: number;
  readonly ink: FieldInk;
  readonly fieldLines: boolean;
  /** Volts on the lines and tags on the parts. */
  readonly labels: boolean;
}

const LABEL_MM = 2.6;
/** Height of a plate for volts, and for words, whose letters reach below the line. */
const VOLTS_HEIGHT_MM = 0.9 * LABEL_MM;
const WORDS_HEIGHT_MM = 1.14 * LABEL_MM;

const pairs = (path: Float64Array, scale: number): Point[] =>
  Array.from({ length: path.length / 2 }, (_, k): Point => [path[2 * k] * scale, path[2 * k + 1] * scale]);

/** A chain without points nearer to each other than a printer can tell. */
function thinned(chain: readonly Point[]): Point[] {
  const kept: Point[] = [];
  for (const [index, point] of chain.entries()) {
    const last = kept.at(-1);
    if (last === undefined || index === chain.length - 1 || Math.hypot(point[0] - last[0], point[1] - last[1]) > 0.25) kept.push(point);
  }
  return kept;
}

/** The point at a share of a chain's length, and the direction there. */
function along(chain: readonly Point[], share: number): { place: Point; direction: Point } | null {
  const lengths = chain.slice(1).map(([x, y], k) => Math.hypot(x - chain[k][0], y - chain[k][1]));
  let left = share * lengths.reduce((sum, length) => sum + length, 0);
  for (const [k, length] of lengths.entries()) {
    if (left <= length && length > 0) {
      const [[x0, y0], [x1, y1]] = [chain[k], chain[k + 1]];
      const part = left / length;
      return { place: [x0 + part * (x1 - x0), y0 + part * (y1 - y0)], direction: [(x1 - x0) / length, (y1 - y0) / length] };
    }
    left -= length;
  }
  return null;
}

const plainVolts = (volts: number): string => `${Number(volts.toPrecision(3))} V`.replace("-", "−");

/** Where along a line its volts are tried: the plainest places first, then all others. */
const LABEL_SHARES = [0.3, 0.7, 0.2, 0.8, 0.5, 0.1, 0.9, 0.4, 0.6, ...Array.from({ length: 39 }, (_, k) => (k + 1) / 40)];

/** Volts in a gap of their own line, on the longest path of every level first. */
function voltLabels(plan: Plan, scale: number, places: LabelPlaces, fonts: SheetFonts): TextItem[] {
  return plan.equipotentials.flatMap(({ volts, paths }) => {
    const words = plainVolts(volts);
    const width = fonts.regular.widthOf(words, LABEL_MM) + 0.8;
    const height = VOLTS_HEIGHT_MM;
    return paths
      .map((path) => pairs(path, scale))
      .filter((chain) => chain.length > 1)
      .sort((a, b) => b.length - a.length)
      .slice(0, 3)
      .flatMap((chain): TextItem[] => {
        const middles = LABEL_SHARES.flatMap((share) => {
          const found = along(chain, share);
          return found === null ? [] : [found.place];
        });
        const middle = places.place(middles, width, height);
        return middle === null ? [] : [plate(middle, words, LABEL_MM, [width, height], false)];
      });
  });
}

/** Field lines with an arrow midway, from high to low potential. */
function fieldLineItems(plan: Plan, scale: number): PathItem[] {
  const lines = plan.fieldLines.map((path) => thinned(pairs(path, scale))).filter((chain) => chain.length > 1);
  const arrows = lines.flatMap((chain): Point[][] => {
    const found = along(chain, 0.5);
    if (found === null) return [];
    const {
      place: [x, y],
      direction: [dx, dy],
    } = found;
    return [
      [
        [x - 1.4 * dx - 0.7 * dy, y - 1.4 * dy + 0.7 * dx],
        [x, y],
        [x - 1.4 * dx + 0.7 * dy, y - 1.4 * dy - 0.7 * dx],
      ],
    ];
  });
  const thin = { kind: "path", closed: false, stroke: 0.25, fill: null } as const;
  return [
    { ...thin, chains: lines, lineMm: 0.1, dashMm: [1.6, 0.8] },
    { ...thin, chains: arrows, lineMm: 0.16 },
  ];
}

function partTags(setup: Setup, scale: number, places: LabelPlaces, fonts: SheetFonts): TextItem[] {
  return setup.parts.flatMap((part): TextItem[] => {
    for (const farMm of [4, 40]) {
      for (const words of tagsOf(part, setup.supply.volts)) {
        const width = fonts.bold.widthOf(words, LABEL_MM) + 0.8;
        const middle = places.place(besidePlaced(part, scale, width, WORDS_HEIGHT_MM, farMm), width, WORDS_HEIGHT_MM);
        if (middle !== null) return [plate(middle, words, LABEL_MM, [width, WORDS_HEIGHT_MM], true)];
      }
    }
    return [];
  });
}

/**
 * @param columns what each tile shows of x, `rows` of y, in paper mm.
 * @returns the solved field over the tray in paper mm, its origin in the tray's lower left corner.
 */
export function fieldDrawing(
  setup: Setup,
  plan: Plan,
  fonts: SheetFonts,
  { scale, ink, fieldLines, labels }: FieldChoice,
  columns: readonly Interval[],
  rows: readonly Interval[],
): Drawing {
  const size = traySizeMm(setup.tray);
  const [width, height] = [size[0] * scale, size[1] * scale];
  const scaled = (chains: readonly (readonly Point[])[]): Point[][] =>
    chains.map((chain) => chain.map(([x, y]): Point => [x * scale, y * scale]));
  const [wall] = scaled([chainOf(trayOutline(setup.tray), CHORD_MM)]);
  const places = labelPlaces([0.6, 0.6, width - 0.6, height - 0.6], columns, rows);
  places.takeOutline(wall);
  for (const chain of scaled(setup.parts.flatMap(chainsOf))) places.takeOutline(chain);
  const levels = plan.equipotentials.map(({ volts }) => volts).sort((a, b) => a - b);
  const outside: Point[] = [
    [-1, -1],
    [width + 1, -1],
    [width + 1, height + 1],
    [-1, height + 1],
  ];
  const tags = labels ? partTags(setup, scale, places, fonts) : [];
  const volts = labels ? voltLabels(plan, scale, places, fonts) : [];
  const items: (PathItem | TextItem | ImageItem)[] = [
    ...(ink === "colour" ? [colourPicture(plan.picture, plan.spanV, size, scale)] : []),
    ...(ink === "hatched" ? [hatchedBands(plan.picture, levels, size, scale)] : []),
    ...(setup.tray.shape === "circle" ? [outline([outside, wall], 0, null, 1)] : []),
    ...(fieldLines ? fieldLineItems(plan, scale) : []),
    ...plan.equipotentials.flatMap(({ paths }) => paths.map((path) => line(thinned(pairs(path, scale)), 0.25))),
    ...setup.water.slabs.map((slab) => ({
      ...outline(scaled(outlineOf(slab).map((loop) => chainOf(loop, CHORD_MM))), 0.25, 0.15),
      dashMm: [3, 1.5] as const,
    })),
    ...setup.parts.flatMap((part) => partMarks(part, false).map((item) => ({ ...item, chains: scaled(item.chains) }))),
    outline([wall], 0.45),
    ...tags,
    ...volts,
  ];
  const [left, bottom, right, top] = drawingBounds(setup);
  return { bounds: [left * scale, bottom * scale, right * scale, top * scale], items, leftOut: 0 };
}
