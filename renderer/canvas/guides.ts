import type { BoxMm } from "../document/edit";

/** Snapping to what lies in the tray: edges and middles of other things, the tray's own, and equal gaps. All lengths in mm. */

/** A line on which edges or middles meet: at `atMm` along `axis`, drawn between two places along the other axis. */
export interface Guide {
  readonly axis: "x" | "y";
  readonly atMm: number;
  readonly fromMm: number;
  readonly toMm: number;
}

/** One of two or more equal gaps in a row: from edge to edge along `axis`, drawn at `atMm` across it. */
export interface EqualGap {
  readonly axis: "x" | "y";
  readonly fromMm: number;
  readonly toMm: number;
  readonly atMm: number;
}

/** Where a moved box comes to lie, and the lines that it then meets. */
export interface Snapped {
  readonly byXMm: number;
  readonly byYMm: number;
  readonly guides: readonly Guide[];
  readonly equalGaps: readonly EqualGap[];
}

const SAME_MM = 1e-6;
/** Places are kept to 0.01 mm: gaps that differ by less are equal. */
const EQUAL_MM = 0.015;

/** Low edge, middle and high edge of a box along an axis. */
const linesOf = (box: BoxMm, axis: "x" | "y"): readonly [number, number, number] => {
  const [low, high] = axis === "x" ? [box[0], box[2]] : [box[1], box[3]];
  return [(low + high) / 2, low, high];
};

const along = (box: BoxMm, axis: "x" | "y"): readonly [number, number] => (axis === "x" ? [box[0], box[2]] : [box[1], box[3]]);
const across = (box: BoxMm, axis: "x" | "y"): readonly [number, number] => along(box, axis === "x" ? "y" : "x");
const beside = (a: BoxMm, b: BoxMm, axis: "x" | "y"): boolean =>
  across(a, axis)[0] < across(b, axis)[1] && across(b, axis)[0] < across(a, axis)[1];

/** Shifts that make the gaps to the neighbours on both sides equal, or repeat the gap between two neighbours on one side. */
function equalGapShifts(moved: BoxMm, others: readonly BoxMm[], axis: "x" | "y"): readonly number[] {
  const [low, high] = along(moved, axis);
  const row = others.filter((other) => beside(moved, other, axis)).map((other) => along(other, axis));
  const middle = (low + high) / 2;
  const before = row.filter(([, end]) => end <= middle).sort((a, b) => b[1] - a[1]);
  const after = row.filter(([start]) => start >= middle).sort((a, b) => a[0] - b[0]);
  const [left, leftOfIt] = before;
  const [right, rightOfIt] = after;
  const shifts: number[] = [];
  if (left !== undefined && right !== undefined) shifts.push((left[1] + right[0] - low - high) / 2);
  if (left !== undefined && leftOfIt !== undefined) shifts.push(left[1] + (left[0] - leftOfIt[1]) - low);
  if (right !== undefined && rightOfIt !== undefined) shifts.push(right[0] - (rightOfIt[0] - right[1]) - high);
  return shifts;
}

/** The gap between two boxes that lie beside each other, drawn through the middle of the stretch that both share. */
function gapOf(before: BoxMm, after: BoxMm, axis: "x" | "y"): EqualGap {
  const [fromMm, toMm] = [along(before, axis)[1], along(after, axis)[0]];
  const low = Math.max(across(before, axis)[0], across(after, axis)[0]);
  const high = Math.min(across(before, axis)[1], across(after, axis)[1]);
  return { axis, fromMm, toMm, atMm: (low + high) / 2 };
}

/** The gaps of a row, next to a box, that are equal: those to both neighbours, or that to one and the gap behind it. */
function equalGapsOf(box: BoxMm, others: readonly BoxMm[], axis: "x" | "y"): readonly EqualGap[] {
  const row = others.filter((other) => beside(box, other, axis));
  const [low, high] = along(box, axis);
  const before = row.filter((other) => along(other, axis)[1] <= low + SAME_MM).sort((a, b) => along(b, axis)[1] - along(a, axis)[1]);
  const after = row.filter((other) => along(other, axis)[0] >= high - SAME_MM).sort((a, b) => along(a, axis)[0] - along(b, axis)[0]);
  const [left, leftOfIt, right, rightOfIt] = [before[0], before[1], after[0], after[1]];
  const pairs: (readonly [EqualGap, EqualGap])[] = [];
  if (left !== undefined && right !== undefined) pairs.push([gapOf(left, box, axis), gapOf(box, right, axis)]);
  if (left !== undefined && leftOfIt !== undefined) pairs.push([gapOf(leftOfIt, left, axis), gapOf(left, box, axis)]);
  if (right !== undefined && rightOfIt !== undefined) pairs.push([gapOf(box, right, axis), gapOf(right, rightOfIt, axis)]);
  const equal = pairs.filter(([a, b]) => {
    const [first, second] = [a.toMm - a.fromMm, b.toMm - b.fromMm];
    return first > EQUAL_MM && Math.abs(first - second) <= EQUAL_MM;
  });
  const seen = new Map(equal.flat().map((gap) => [`${gap.fromMm} ${gap.toMm}`, gap]));
  return [...seen.values()];
}

function nearestShift(moved: BoxMm, others: readonly BoxMm[], tray: BoxMm, axis: "x" | "y", reachMm: number): number | null {
  const own = linesOf(moved, axis);
  const shifts = [
    ...[tray, ...others].flatMap((other) => linesOf(other, axis).flatMap((line) => own.map((mine) => line - mine))),
    ...equalGapShifts(moved, others, axis),
  ];
  let nearest: number | null = null;
  for (const shift of shifts) {
    if (Math.abs(shift) <= reachMm && (nearest === null || Math.abs(shift) < Math.abs(nearest) - SAME_MM)) nearest = shift;
  }
  return nearest;
}

/** The lines on which a box meets others, each once and as long as needed. */
function guidesOf(box: BoxMm, others: readonly BoxMm[], axis: "x" | "y"): readonly Guide[] {
  const found = new Map<number, Guide>();
  for (const mine of linesOf(box, axis)) {
    for (const other of others) {
      if (!linesOf(other, axis).some((line) => Math.abs(line - mine) < SAME_MM)) continue;
      const [fromA, toA] = across(box, axis);
      const [fromB, toB] = across(other, axis);
      const before = found.get(mine);
      found.set(mine, {
        axis,
        atMm: mine,
        fromMm: Math.min(fromA, fromB, before?.fromMm ?? fromA),
        toMm: Math.max(toA, toB, before?.toMm ?? toA),
      });
    }
  }
  return [...found.values()];
}

/**
 * Moves a box by a distance and lets it snap: to a line or an equal gap within reach, else to the step of the grid.
 * @param start the box before the move; `anchor` is the place in it that the grid counts from.
 * @param reachMm how near a line must be.
 */
export function snappedMove(
  start: BoxMm,
  anchor: readonly [number, number],
  byMm: readonly [number, number],
  others: readonly BoxMm[],
  tray: BoxMm,
  stepMm: number,
  reachMm: number,
): Snapped {
  const moved: BoxMm = [start[0] + byMm[0], start[1] + byMm[1], start[2] + byMm[0], start[3] + byMm[1]];
  const onAxis = (axis: "x" | "y"): number => {
    const index = axis === "x" ? 0 : 1;
    const shift = nearestShift(moved, others, tray, axis, reachMm);
    return shift === null ? Math.round((anchor[index] + byMm[index]) / stepMm) * stepMm - anchor[index] : byMm[index] + shift;
  };
  const [byXMm, byYMm] = [onAxis("x"), onAxis("y")];
  const box: BoxMm = [start[0] + byXMm, start[1] + byYMm, start[2] + byXMm, start[3] + byYMm];
  const equalGaps = reachMm < 0 ? [] : (["x", "y"] as const).flatMap((axis) => equalGapsOf(box, others, axis));
  return { byXMm, byYMm, equalGaps, guides: [...guidesOf(box, [...others, tray], "x"), ...guidesOf(box, [...others, tray], "y")] };
}
