import type { Point } from "./page";

/** Axis-parallel boxes [left, bottom, right, top] in mm that nothing else may cover. */
export type Box = readonly [number, number, number, number];

/** An interval of one axis, mm. */
export type Interval = readonly [number, number];

/** Side of the squares by which neighbours are found, mm. */
const CELL_MM = 12;

const meets = (a: Box, b: Box): boolean => a[0] < b[2] && b[0] < a[2] && a[1] < b[3] && b[1] < a[3];

/** Whether a straight line touches a box: its share within each pair of sides must overlap (slab method). */
function crosses([x0, y0, x1, y1]: Box, box: Box): boolean {
  let [from, to] = [0, 1];
  for (const [start, delta, low, high] of [
    [x0, x1 - x0, box[0], box[2]],
    [y0, y1 - y0, box[1], box[3]],
  ]) {
    if (delta === 0) {
      if (start <= low || start >= high) return false;
      continue;
    }
    const [a, b] = [(low - start) / delta, (high - start) / delta];
    from = Math.max(from, Math.min(a, b));
    to = Math.min(to, Math.max(a, b));
    if (from >= to) return false;
  }
  return true;
}

/** Things found by the squares that they touch. */
function byPlace(): { add: (box: Box, thing: Box) => void; near: (box: Box) => Iterable<Box> } {
  const cells = new Map<string, Box[]>();
  const keysOf = function* ([left, bottom, right, top]: Box): Iterable<string> {
    for (let column = Math.floor(left / CELL_MM); column <= Math.floor(right / CELL_MM); column++)
      for (let row = Math.floor(bottom / CELL_MM); row <= Math.floor(top / CELL_MM); row++) yield `${column} ${row}`;
  };
  return {
    add: (box, thing) => {
      for (const key of keysOf(box)) {
        const cell = cells.get(key);
        if (cell === undefined) cells.set(key, [thing]);
        else cell.push(thing);
      }
    },
    near: function* (box) {
      for (const key of keysOf(box)) yield* cells.get(key) ?? [];
    },
  };
}

/** Keeps track of what is taken on a drawing, and tells where a label of some size still fits. */
export interface LabelPlaces {
  readonly takeBox: (box: Box) => void;
  /** Takes a closed chain of points: a label may lie on either side of it, not across. */
  readonly takeOutline: (chain: readonly Point[]) => void;
  /** @returns the first of these middles at which a label of this size lies free, now taken; null when none does. */
  readonly place: (middles: Iterable<Point>, width: number, height: number) => Point | null;
}

/**
 * @param area where labels may lie.
 * @param columns what each tile shows along x, `rows` along y: a label lies whole within one of them, or a reader would find it in halves.
 */
export function labelPlaces(area: Box, columns: readonly Interval[], rows: readonly Interval[]): LabelPlaces {
  const boxes = byPlace();
  const lines = byPlace();
  const within = (low: number, high: number, intervals: readonly Interval[]): boolean =>
    intervals.some(([from, to]) => low >= from && high <= to);
  const isFree = (box: Box): boolean => {
    if (box[0] < area[0] || box[1] < area[1] || box[2] > area[2] || box[3] > area[3]) return false;
    if (!within(box[0], box[2], columns) || !within(box[1], box[3], rows)) return false;
    for (const other of boxes.near(box)) if (meets(box, other)) return false;
    for (const line of lines.near(box)) if (crosses(line, box)) return false;
    return true;
  };
  return {
    takeBox: (box) => boxes.add(box, box),
    takeOutline: (chain) => {
      chain.forEach(([x0, y0], index) => {
        const [x1, y1] = chain[(index + 1) % chain.length];
        lines.add([Math.min(x0, x1), Math.min(y0, y1), Math.max(x0, x1), Math.max(y0, y1)], [x0, y0, x1, y1]);
      });
    },
    place: (middles, width, height) => {
      for (const middle of middles) {
        const box: Box = [middle[0] - width / 2, middle[1] - height / 2, middle[0] + width / 2, middle[1] + height / 2];
        if (!isFree(box)) continue;
        boxes.add(box, box);
        return middle;
      }
      return null;
    },
  };
}

/** Directions in which a label is tried beside a point, the plainest first. */
const SIDES: readonly Point[] = [
  [1, 0],
  [-1, 0],
  [0, 1],
  [0, -1],
  [1, 1],
  [-1, 1],
  [1, -1],
  [-1, -1],
];

/** @returns middles for a label beside a point, close by first, then farther off up to `farMm` between point and label. */
export function* besidePoint([x, y]: Point, width: number, height: number, gapMm: number, farMm: number): Iterable<Point> {
  for (let gap = gapMm; gap <= farMm; gap = gap * 1.5 + 0.3)
    for (const [dx, dy] of SIDES) yield [x + dx * (gap + width / 2), y + dy * (gap + height / 2)];
}

/** @returns middles for a label beside a box: over it, under it, at its sides, sliding along them, then farther off. */
export function* besideBox([left, bottom, right, top]: Box, width: number, height: number, gapMm: number, farMm: number): Iterable<Point> {
  const [x, y] = [(left + right) / 2, (bottom + top) / 2];
  for (let gap = gapMm; gap <= farMm; gap = gap * 1.4 + 0.5) {
    const [over, under] = [top + gap + height / 2, bottom - gap - height / 2];
    const [before, after] = [left - gap - width / 2, right + gap + width / 2];
    const alongX = [x, left + width / 2, right - width / 2, left, right];
    const alongY = [y, top - height / 2, bottom + height / 2, y + (top - y) / 2, y - (y - bottom) / 2];
    for (const at of alongX) yield [at, over];
    for (const at of alongX) yield [at, under];
    for (const at of alongY) yield [after, at];
    for (const at of alongY) yield [before, at];
    yield* [
      [before, over],
      [after, over],
      [before, under],
      [after, under],
    ] as const;
  }
}

/**
 * Middles for a label against an outline itself, where a box round it would leave gaps: at its upper side first.
 * @param chain the outline counter-clockwise, its solid on the left.
 */
export function* besideOutline(chain: readonly Point[], width: number, height: number, gapMm: number, farMm: number): Iterable<Point> {
  const lengths = chain.map(([x, y], k) => {
    const [nextX, nextY] = chain[(k + 1) % chain.length];
    return Math.hypot(nextX - x, nextY - y);
  });
  const step = Math.max(2, lengths.reduce((sum, length) => sum + length, 0) / 60);
  const places: { at: Point; out: Point }[] = [];
  chain.forEach(([x, y], k) => {
    const [nextX, nextY] = chain[(k + 1) % chain.length];
    const count = Math.max(1, Math.round(lengths[k] / step));
    if (lengths[k] === 0) return;
    const out: Point = [(nextY - y) / lengths[k], (x - nextX) / lengths[k]];
    for (let n = 0; n < count; n++) {
      const share = (n + 0.5) / count;
      places.push({ at: [x + share * (nextX - x), y + share * (nextY - y)], out });
    }
  });
  places.sort((a, b) => b.out[1] - a.out[1]);
  for (let gap = gapMm; gap <= farMm; gap = gap * 1.4 + 0.5) {
    for (const { at, out } of places) {
      // Pushed out until the label's nearest corner or side clears the tangent.
      const push = gap + (Math.abs(out[0]) * width + Math.abs(out[1]) * height) / 2;
      yield [at[0] + out[0] * push, at[1] + out[1] * push];
    }
  }
}
