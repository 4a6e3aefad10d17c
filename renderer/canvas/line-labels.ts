import type { Equipotential } from "../../shared-types/plan";
import { toScreen, type View } from "./view";

/** A label on its line: its middle on the stage (px) and the line's direction there, upright for reading. */
export interface PlacedLabel {
  readonly text: string;
  readonly volts: number;
  readonly x: number;
  readonly y: number;
  readonly angleRad: number;
}

/** Whether a disc (px) would cover something that a label must not hide. */
export type Taken = (x: number, y: number, radiusPx: number) => boolean;

/** Half of a label's height with a little air, px. */
const HALF_HEIGHT_PX = 7;
/** Places along a line are tried this far apart, px. */
const STEP_PX = 24;
/** A label lies straight: the line may stray from it by no more, px. */
const STRAY_PX = 4;
/** Two labels keep apart by this, px. */
const AIR_PX = 6;

interface Measured {
  /** x, y on the stage, px. */
  readonly points: Float64Array;
  /** Length walked up to each point, px. */
  readonly walked: Float64Array;
  readonly lengthPx: number;
}

function measured(path: Float64Array, view: View): Measured {
  const count = path.length / 2;
  const points = new Float64Array(path.length);
  const walked = new Float64Array(count);
  for (let index = 0; index < count; index++) {
    const [x, y] = toScreen(view, path[2 * index] as number, path[2 * index + 1] as number);
    points[2 * index] = x;
    points[2 * index + 1] = y;
    if (index > 0) {
      const step = Math.hypot(x - (points[2 * index - 2] as number), y - (points[2 * index - 1] as number));
      walked[index] = (walked[index - 1] as number) + step;
    }
  }
  return { points, walked, lengthPx: count === 0 ? 0 : (walked[count - 1] as number) };
}

/** The index of the point at or just before a length along the line. */
function before({ walked }: Measured, length: number): number {
  let low = 0;
  let high = walked.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((walked[middle] as number) <= length) low = middle;
    else high = middle;
  }
  return low;
}

function placeAlong(line: Measured, length: number): readonly [number, number] {
  const index = before(line, length);
  const { points, walked } = line;
  const [from, to] = [walked[index] as number, walked[index + 1] ?? (walked[index] as number)];
  const share = to > from ? (length - from) / (to - from) : 0;
  const x = points[2 * index] as number;
  const y = points[2 * index + 1] as number;
  return [x + share * ((points[2 * index + 2] ?? x) - x), y + share * ((points[2 * index + 3] ?? y) - y)];
}

/** How far the line strays from the chord between two lengths along it, px. */
function strayPx(line: Measured, from: number, to: number): number {
  const [x0, y0] = placeAlong(line, from);
  const [x1, y1] = placeAlong(line, to);
  const chord = Math.hypot(x1 - x0, y1 - y0);
  if (chord < 0.75 * (to - from)) return Number.POSITIVE_INFINITY;
  let stray = 0;
  for (let share = 0.25; share < 1; share += 0.25) {
    const [x, y] = placeAlong(line, from + share * (to - from));
    stray = Math.max(stray, Math.abs((x - x0) * (y1 - y0) - (y - y0) * (x1 - x0)) / chord);
  }
  return stray;
}

/** Lengths along a line at which a label is tried: the middle first, then ever further to both ends. */
function* places(lengthPx: number, roomPx: number): Generator<number> {
  const middle = lengthPx / 2;
  yield middle;
  for (let off = STEP_PX; off <= middle - roomPx; off += STEP_PX) {
    yield middle - off;
    yield middle + off;
  }
}

/** A label as a row of discs along its line: enough to tell what it would hide. */
function discsOf(x: number, y: number, angleRad: number, widthPx: number): readonly (readonly [number, number])[] {
  const count = Math.max(2, Math.ceil(widthPx / HALF_HEIGHT_PX));
  return Array.from({ length: count }, (_, index) => {
    const along = (index / (count - 1) - 0.5) * Math.max(0, widthPx - HALF_HEIGHT_PX);
    return [x + along * Math.cos(angleRad), y + along * Math.sin(angleRad)] as const;
  });
}

/** Lines lean to either side of upright within this; their labels should all read the same way, radians. */
const LEAN_RAD = 0.2;

/** Brings a direction to one that reads without turning the head: left to right, or upwards on upright lines. */
const readable = (angleRad: number): number => {
  if (angleRad > Math.PI / 2 - LEAN_RAD) return angleRad - Math.PI;
  return angleRad <= -Math.PI / 2 - LEAN_RAD ? angleRad + Math.PI : angleRad;
};

/**
 * Finds a place for one label on each equipotential, on its longest path first: straight enough, in sight, and hiding neither
 * what `taken` names nor another label. A line without such a place gets none.
 * @param textsOf what to write for a potential: the best text first, shorter ones for where it finds no place.
 * @param widthOf how wide a text is, px.
 */
export function placeLabels(
  lines: readonly Equipotential[],
  view: View,
  textsOf: (volts: number) => readonly string[],
  widthOf: (text: string) => number,
  taken: Taken,
): readonly PlacedLabel[] {
  const labels: PlacedLabel[] = [];
  const discs: (readonly [number, number])[] = [];
  const free = (x: number, y: number): boolean =>
    x > HALF_HEIGHT_PX &&
    y > HALF_HEIGHT_PX &&
    x < view.widthPx - HALF_HEIGHT_PX &&
    y < view.heightPx - HALF_HEIGHT_PX &&
    !taken(x, y, HALF_HEIGHT_PX) &&
    discs.every(([dx, dy]) => Math.hypot(dx - x, dy - y) > 2 * HALF_HEIGHT_PX + AIR_PX);

  /** @returns whether the text found a place on one of the paths. */
  function place(text: string, volts: number, paths: readonly Measured[]): boolean {
    const width = widthOf(text) + 8;
    for (const line of paths) {
      if (line.lengthPx < 1.4 * width) return false;
      for (const at of places(line.lengthPx, width / 2)) {
        const [x, y] = placeAlong(line, at);
        if (!free(x, y) || strayPx(line, at - width / 2, at + width / 2) > STRAY_PX) continue;
        const [x0, y0] = placeAlong(line, at - width / 2);
        const [x1, y1] = placeAlong(line, at + width / 2);
        const angleRad = readable(Math.atan2(y1 - y0, x1 - x0));
        const own = discsOf(x, y, angleRad, width);
        if (!own.every(([dx, dy]) => free(dx, dy))) continue;
        labels.push({ text, volts, x, y, angleRad });
        discs.push(...own);
        return true;
      }
    }
    return false;
  }

  for (const { volts, paths } of lines) {
    const longestFirst = paths.map((path) => measured(path, view)).sort((a, b) => b.lengthPx - a.lengthPx);
    textsOf(volts).some((text) => place(text, volts, longestFirst));
  }
  return labels;
}
