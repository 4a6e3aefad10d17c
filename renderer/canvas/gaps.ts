import type { Setup, Tray } from "../../shared-types/setup";
import type { Thing } from "../document/edit";
import { gapMm, wallGapMm } from "../engine/geometry/clearance";
import { bowHolds, type Loop, type Piece, pointAlong } from "../engine/geometry/outline";
import { boxGapMm, type OutlinedShape } from "../engine/geometry/overlap";
import { covers } from "../engine/geometry/signed-distance";
import { outlinedThing } from "./hit";
import type { Place } from "./view";

/** The clear gap between two things, and where it lies: from an outline to the other, mm. */
export interface Gap {
  readonly from: Place;
  readonly to: Place;
  readonly gapMm: number;
}

/** Gaps shown at a time: more would hide the tray. */
const MOST_GAPS = 3;
/** Neighbours whose exact gap is worked out, the nearest boxes first. */
const LOOKED_AT = 5;

function closestOn(piece: Piece, [x, y]: Place): Place {
  if (piece.kind === "edge") {
    const [dx, dy] = [piece.x1 - piece.x0, piece.y1 - piece.y0];
    const share = ((x - piece.x0) * dx + (y - piece.y0) * dy) / (dx * dx + dy * dy);
    return pointAlong(piece, Math.min(1, Math.max(0, share)));
  }
  const angle = Math.atan2(y - piece.cy, x - piece.cx);
  if (bowHolds(piece, angle)) return [piece.cx + piece.radius * Math.cos(angle), piece.cy + piece.radius * Math.sin(angle)];
  const [start, end] = [pointAlong(piece, 0), pointAlong(piece, 1)];
  return Math.hypot(x - start[0], y - start[1]) < Math.hypot(x - end[0], y - end[1]) ? start : end;
}

/** @returns the place of an outline nearest to a place, mm. */
export function closestOnOutline(loops: readonly Loop[], at: Place): Place {
  let nearest: Place = at;
  let nearestMm = Number.POSITIVE_INFINITY;
  for (const piece of loops.flat()) {
    const place = closestOn(piece, at);
    const distance = Math.hypot(place[0] - at[0], place[1] - at[1]);
    if (distance < nearestMm) [nearest, nearestMm] = [place, distance];
  }
  return nearest;
}

const SAMPLES_PER_PIECE = 12;
const PROJECTIONS = 16;

/** The two nearest places of two outlines: the best of many, then led to each other in turn. Near enough to draw by. */
function nearestPlaces(a: OutlinedShape, b: OutlinedShape): readonly [Place, Place] {
  let from: Place = [a.placed.xMm, a.placed.yMm];
  let to = from;
  let nearestMm = Number.POSITIVE_INFINITY;
  for (const piece of a.loops.flat()) {
    for (let index = 0; index <= SAMPLES_PER_PIECE; index++) {
      const place = pointAlong(piece, index / SAMPLES_PER_PIECE);
      const other = closestOnOutline(b.loops, place);
      const distance = Math.hypot(place[0] - other[0], place[1] - other[1]);
      if (distance < nearestMm - 1e-9) [from, to, nearestMm] = [place, other, distance];
    }
  }
  for (let turn = 0; turn < PROJECTIONS; turn++) {
    from = closestOnOutline(a.loops, to);
    to = closestOnOutline(b.loops, from);
  }
  return centred(a, b, from, to);
}

/** Between parallel sides every place is as near as the next: the middle of the stretch that faces the other side is shown. */
function centred(a: OutlinedShape, b: OutlinedShape, from: Place, to: Place): readonly [Place, Place] {
  const [left, right] = [Math.max(a.box[0], b.box[0]), Math.min(a.box[2], b.box[2])];
  const [bottom, top] = [Math.max(a.box[1], b.box[1]), Math.min(a.box[3], b.box[3])];
  const gap = Math.hypot(to[0] - from[0], to[1] - from[1]);
  const across = Math.abs(to[1] - from[1]) < 1e-6 && top > bottom;
  const upright = Math.abs(to[0] - from[0]) < 1e-6 && right > left;
  if (!across && !upright) return [from, to];
  const middle: Place = across ? [to[0], (bottom + top) / 2] : [(left + right) / 2, to[1]];
  const onB = closestOnOutline(b.loops, middle);
  const onA = closestOnOutline(a.loops, onB);
  return Math.abs(Math.hypot(onB[0] - onA[0], onB[1] - onA[1]) - gap) < 1e-6 ? [onA, onB] : [from, to];
}

/** The gap to the nearest side of the wall. */
function wallGap(shape: OutlinedShape, tray: Tray): Gap | null {
  const clear = wallGapMm(shape, tray);
  if (clear <= 0) return null;
  const { box, placed } = shape;
  if (tray.shape === "rectangle") {
    const sides: readonly (readonly [number, Place, Place])[] = [
      [box[0], [box[0], placed.yMm], [0, placed.yMm]],
      [tray.lengthMm - box[2], [box[2], placed.yMm], [tray.lengthMm, placed.yMm]],
      [box[1], [placed.xMm, box[1]], [placed.xMm, 0]],
      [tray.widthMm - box[3], [placed.xMm, box[3]], [placed.xMm, tray.widthMm]],
    ];
    const nearest = sides.find(([gap]) => Math.abs(gap - clear) < 1e-9);
    return nearest === undefined ? null : { from: nearest[1], to: nearest[2], gapMm: clear };
  }
  const radius = tray.diameterMm / 2;
  const angle = Math.atan2(placed.yMm - radius, placed.xMm - radius);
  const at = (distance: number): Place => [radius + distance * Math.cos(angle), radius + distance * Math.sin(angle)];
  return placed.xMm === radius && placed.yMm === radius ? null : { from: at(radius - clear), to: at(radius), gapMm: clear };
}

/** Whether a part lies across the straight line between two places: then they are no neighbours. */
function liesBetween(part: Thing, [from, to]: readonly [Place, Place]): boolean {
  const [left, bottom, right, top] = outlinedThing(part).box;
  const [dx, dy] = [to[0] - from[0], to[1] - from[1]];
  if (Math.min(from[0], to[0]) > right || Math.max(from[0], to[0]) < left) return false;
  if (Math.min(from[1], to[1]) > top || Math.max(from[1], to[1]) < bottom) return false;
  const steps = Math.max(2, Math.ceil(Math.hypot(dx, dy)));
  return Array.from({ length: steps - 1 }, (_, index) => (index + 1) / steps).some((share) =>
    covers(part, from[0] + share * dx, from[1] + share * dy),
  );
}

/** @returns the exact clear gap between two things, mm; 0 where they touch or overlap. */
export const gapBetween = (a: Thing, b: Thing): number => gapMm(outlinedThing(a), outlinedThing(b));

/** @returns the clear gaps from a thing to its nearest neighbours and to the wall, the narrowest first. */
export function gapsAround(thing: Thing, setup: Setup): readonly Gap[] {
  const own = outlinedThing(thing);
  const neighbours = setup.parts
    .filter(({ id }) => id !== thing.id)
    .map((part) => ({ shape: outlinedThing(part), boxGap: boxGapMm(own.box, outlinedThing(part).box) }))
    .sort((a, b) => a.boxGap - b.boxGap)
    .slice(0, LOOKED_AT)
    .map(({ shape }) => ({ shape, clear: gapMm(own, shape) }))
    .filter(({ clear }) => clear > 0)
    .sort((a, b) => a.clear - b.clear)
    .map(({ shape, clear }) => ({ shape, clear, ends: nearestPlaces(own, shape) }))
    .filter(
      ({ shape, ends }) => !setup.parts.some((part) => part.id !== thing.id && part.id !== shape.placed.id && liesBetween(part, ends)),
    )
    .slice(0, MOST_GAPS - 1)
    .map(({ clear, ends: [from, to] }): Gap => ({ from, to, gapMm: clear }));
  const wall = wallGap(own, setup.tray);
  return wall === null ? neighbours : [...neighbours, wall];
}
