import type { Plan, ProbePoint } from "../../shared-types/plan";
import type { Part, Setup } from "../../shared-types/setup";
import { radians } from "../../shared-types/units";
import { boundsOf, chainOf, outlineOf } from "../engine/geometry/outline";
import { trayOutline, traySizeMm } from "../engine/geometry/tray-outline";
import type { SheetFonts } from "./font-metrics";
import { type LabelPlaces, labelPlaces } from "./label-places";
import { circle, line, outline, type PathItem, type Point, type TextItem, text } from "./page";

/** What a drawing of the tray at full size shows; y away from the reader, origin in the tray's lower left corner. */
export interface DrawingChoice {
  readonly points: boolean;
  readonly parts: boolean;
  /** Lines of the grid: every millimetre, every 5 mm, or none. */
  readonly grid: "fine" | "coarse" | "none";
  readonly saveInk: boolean;
  /** To be read from below: x runs to the left. */
  readonly mirrored: boolean;
}

export interface Drawing {
  /** [left, bottom, right, top] of everything, mm. */
  readonly bounds: readonly [number, number, number, number];
  readonly items: readonly (PathItem | TextItem)[];
}

/** Room round the tray for the scales' figures, mm. */
const MARGIN = { left: 8, bottom: 6.5, right: 3, top: 3 };
/** Chords stray at most this from true arcs, mm: less than a printer's dot. */
const CHORD_MM = 0.005;
const POINT_RADIUS_MM = 1.3;

const rounded = (value: number): string => String(Number(value.toFixed(2)));

function gridItems(lengthMm: number, widthMm: number, { grid, saveInk }: DrawingChoice): PathItem[] {
  if (grid === "none") return [];
  const lines: PathItem[] = [];
  const step = grid === "fine" ? 1 : 5;
  const rule = (at: number): { width: number; ink: number } =>
    at % 10 === 0
      ? { width: 0.14, ink: saveInk ? 0.76 : 0.64 }
      : at % 5 === 0
        ? { width: 0.1, ink: saveInk ? 0.84 : 0.76 }
        : { width: 0.05, ink: saveInk ? 0.92 : 0.86 };
  for (const [along, across, vertical] of [
    [lengthMm, widthMm, true],
    [widthMm, lengthMm, false],
  ] as const) {
    const weights = new Map<string, { width: number; ink: number; chains: Point[][] }>();
    for (let at = 0; at <= along + 1e-9; at += step) {
      const { width, ink } = rule(at);
      const entry = weights.get(`${width}`) ?? { width, ink, chains: [] };
      entry.chains.push(
        vertical
          ? [
              [at, 0],
              [at, across],
            ]
          : [
              [0, at],
              [across, at],
            ],
      );
      weights.set(`${width}`, entry);
    }
    for (const { width, ink, chains } of weights.values())
      lines.push({ kind: "path", chains, closed: false, stroke: ink, fill: null, lineMm: width });
  }
  return lines;
}

function scaleItems(lengthMm: number, widthMm: number): TextItem[] {
  const figures: TextItem[] = [];
  for (let x = 0; x <= lengthMm + 1e-9; x += 10) figures.push(text(x, -4, String(x), 2.4, { anchor: "middle", ink: 0.25 }));
  for (let y = 0; y <= widthMm + 1e-9; y += 10) figures.push(text(-1.2, y - 0.85, String(y), 2.4, { anchor: "end", ink: 0.25 }));
  return figures;
}

/** What stands beside a part: sign and volts, or what it is. */
function tagOf(part: Part, volts: number): string {
  const name = part.name === "" ? part.id : part.name;
  switch (part.role) {
    case "electrode":
      return `${part.tap === 0 ? "−" : part.tap === 1 ? "+" : "tap"} ${rounded(part.tap * volts)} V  ${name}`;
    case "floating":
      return `floating  ${name}`;
    case "insulator":
      return `insulator  ${name}`;
  }
}

function hatching(part: Part): PathItem {
  const [left, bottom, right, top] = boundsOf(outlineOf(part));
  const chains: Point[][] = [];
  const height = top - bottom;
  const inside = partTest(part);
  for (let start = left - height; start < right; start += 3) {
    let run: Point[] = [];
    for (let y = 0; y <= height; y += 0.25) {
      const place: Point = [start + y, bottom + y];
      if (inside(place)) run.push(place);
      else {
        if (run.length > 2) chains.push([run[0], run[run.length - 1]]);
        run = [];
      }
    }
    if (run.length > 2) chains.push([run[0], run[run.length - 1]]);
  }
  return { kind: "path", chains, closed: false, stroke: 0.45, fill: null, lineMm: 0.1 };
}

const partTest = (part: Part): ((place: Point) => boolean) => {
  const loops = outlineOf(part).map((loop) => chainOf(loop, 0.05));
  return ([x, y]) => {
    let odd = false;
    for (const chain of loops) {
      chain.forEach(([x0, y0], index) => {
        const [x1, y1] = chain[(index + 1) % chain.length];
        if (y0 > y !== y1 > y && x < x0 + ((y - y0) / (y1 - y0)) * (x1 - x0)) odd = !odd;
      });
    }
    return odd;
  };
};

/** Outline, centre cross and turn mark of a part. */
function partItems(part: Part, saveInk: boolean): PathItem[] {
  const loops = outlineOf(part).map((loop) => chainOf(loop, CHORD_MM));
  const fill = part.role === "insulator" || saveInk ? null : part.role === "electrode" ? 0.86 : 0.93;
  const turn = radians(part.turnDeg);
  const [c, s] = [Math.cos(turn), Math.sin(turn)];
  const arm = 3;
  const items = [outline(loops, 0.35, 0, fill)];
  if (part.role === "insulator") items.push(hatching(part));
  for (const [dx, dy] of [
    [c, s],
    [-s, c],
  ]) {
    items.push(
      line(
        [
          [part.xMm - arm * dx, part.yMm - arm * dy],
          [part.xMm + arm * dx, part.yMm + arm * dy],
        ],
        0.15,
      ),
    );
  }
  // The mark of the turn: a small open arrow on the arm that points along the part's own +x.
  items.push(
    line(
      [
        [part.xMm + arm * c - 1.1 * c - 0.7 * s, part.yMm + arm * s - 1.1 * s + 0.7 * c],
        [part.xMm + arm * c, part.yMm + arm * s],
        [part.xMm + arm * c - 1.1 * c + 0.7 * s, part.yMm + arm * s - 1.1 * s - 0.7 * c],
      ],
      0.15,
    ),
  );
  return items;
}

function label(
  items: (PathItem | TextItem)[],
  places: LabelPlaces,
  fonts: SheetFonts,
  at: Point,
  words: string,
  sizeMm: number,
  gap: number,
  bold: boolean,
): void {
  const width = (bold ? fonts.bold : fonts.regular).widthOf(words, sizeMm) + 0.4;
  const { middle, far } = places.beside(at, width, sizeMm * 0.85, gap);
  if (far) {
    const away = Math.hypot(middle[0] - at[0], middle[1] - at[1]);
    const start: Point = [at[0] + (gap * 0.8 * (middle[0] - at[0])) / away, at[1] + (gap * 0.8 * (middle[1] - at[1])) / away];
    items.push(line([start, middle], 0.08, 0.4));
  }
  const baseline = middle[1] - sizeMm * 0.36;
  items.push(outline([boxAround(middle, width, sizeMm * 0.9)], 0, null, 1));
  items.push(text(middle[0], baseline, words, sizeMm, { anchor: "middle", bold }));
}

const boxAround = ([x, y]: Point, width: number, height: number): Point[] => [
  [x - width / 2, y - height / 2],
  [x + width / 2, y - height / 2],
  [x + width / 2, y + height / 2],
  [x - width / 2, y + height / 2],
];

/** All points of a plan in visiting order. */
export const pointsOf = (plan: Plan): readonly ProbePoint[] =>
  [...plan.probing.levels.flatMap(({ points }) => points), ...plan.probing.checks].sort((a, b) => a.n - b.n);

/** @returns the tray at full size with what `choice` asks for. */
export function trayDrawing(setup: Setup, plan: Plan, fonts: SheetFonts, choice: DrawingChoice): Drawing {
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  const bounds = [-MARGIN.left, -MARGIN.bottom, lengthMm + MARGIN.right, widthMm + MARGIN.top] as const;
  const items: (PathItem | TextItem)[] = [...gridItems(lengthMm, widthMm, choice), ...scaleItems(lengthMm, widthMm)];
  items.push(outline([chainOf(trayOutline(setup.tray), CHORD_MM)], 0.5));
  const places = labelPlaces([0.5, 0.5, lengthMm - 0.5, widthMm - 0.5]);
  if (choice.parts) {
    for (const slab of setup.water.slabs) {
      items.push({
        ...outline(
          outlineOf(slab).map((loop) => chainOf(loop, CHORD_MM)),
          0.25,
          0.2,
        ),
        dashMm: [3, 1.5],
      });
      items.push(text(slab.xMm, slab.yMm, `slab ${rounded(slab.thicknessMm)} mm`, 2.6, { anchor: "middle", ink: 0.25 }));
    }
    for (const part of setup.parts) items.push(...partItems(part, choice.saveInk));
  }
  const points = choice.points ? pointsOf(plan) : [];
  for (const { xMm, yMm } of points) {
    const r = POINT_RADIUS_MM + 0.2;
    places.take([xMm - r, yMm - r, xMm + r, yMm + r]);
  }
  if (choice.parts) {
    for (const part of setup.parts) {
      const [left, bottom, right, top] = boundsOf(outlineOf(part));
      const solid =
        part.shape.kind === "ring" || part.shape.kind === "frame" || part.shape.kind === "arc"
          ? null
          : ([left, bottom, right, top] as const);
      if (solid !== null) places.take(solid);
      label(items, places, fonts, [(left + right) / 2, top], tagOf(part, setup.supply.volts), 3.2, 2, true);
    }
  }
  for (const { xMm, yMm } of points) {
    items.push(circle(xMm, yMm, POINT_RADIUS_MM, 0.18, 0, 1), circle(xMm, yMm, 0.22, 0, null, 0));
  }
  for (const { n, xMm, yMm } of points) label(items, places, fonts, [xMm, yMm], String(n), 2.5, POINT_RADIUS_MM + 0.5, true);
  return choice.mirrored ? mirrored({ bounds, items }, lengthMm) : { bounds, items };
}

/** The drawing seen from below: x becomes length − x, while text stays readable. */
function mirrored({ bounds, items }: Drawing, lengthMm: number): Drawing {
  const flip = ([x, y]: Point): Point => [lengthMm - x, y];
  const anchors = { start: "end", middle: "middle", end: "start" } as const;
  return {
    bounds: [lengthMm - bounds[2], bounds[1], lengthMm - bounds[0], bounds[3]],
    items: items.map((item) =>
      item.kind === "path"
        ? { ...item, chains: item.chains.map((chain) => chain.map(flip)) }
        : { ...item, x: lengthMm - item.x, anchor: anchors[item.anchor] },
    ),
  };
}
