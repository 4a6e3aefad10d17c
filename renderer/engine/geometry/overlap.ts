import type { PlacedShape } from "../../../shared-types/setup";
import { crossingsOf, type Place } from "./crossings-of-pieces";
import { boundsOf, type Loop, outlineOf, type Piece, pointAlong } from "./outline";
import { covers } from "./signed-distance";

/** A placed shape with its outline and the box round it, worked out once for many comparisons. */
export interface OutlinedShape {
  readonly placed: PlacedShape;
  readonly loops: readonly Loop[];
  /** left, bottom, right, top in mm. */
  readonly box: Box;
}

export type Box = readonly [number, number, number, number];

/** Solids that share less than this depth only touch: rounding of coordinates is far below it, anything that matters far above. Mm. */
export const TOUCH_MM = 1e-6;

/** @returns a placed shape with its outline and bounding box. */
export function outlined(placed: PlacedShape): OutlinedShape {
  const loops = outlineOf(placed);
  return { placed, loops, box: boundsOf(loops) };
}

/** @returns the gap between two boxes in mm, 0 when they meet: never more than the gap between what they hold. */
export function boxGapMm(a: Box, b: Box): number {
  return Math.hypot(Math.max(0, b[0] - a[2], a[0] - b[2]), Math.max(0, b[1] - a[3], a[1] - b[3]));
}

/** Share (0 to 1) of a piece at which a place on it lies, or next to which a place off it lies. */
function shareOf(piece: Piece, [x, y]: Place): number {
  if (piece.kind === "edge") {
    const dx = piece.x1 - piece.x0;
    const dy = piece.y1 - piece.y0;
    return ((x - piece.x0) * dx + (y - piece.y0) * dy) / (dx * dx + dy * dy);
  }
  const turned = (Math.atan2(y - piece.cy, x - piece.cx) - piece.startRad) * Math.sign(piece.sweepRad);
  const turn = 2 * Math.PI;
  return (turned - turn * Math.floor(turned / turn)) / Math.abs(piece.sweepRad);
}

/** A place just inside the solid, left of the piece at a share of it. */
function justInside(piece: Piece, share: number): Place {
  const [x, y] = pointAlong(piece, share);
  if (piece.kind === "edge") {
    const dx = piece.x1 - piece.x0;
    const dy = piece.y1 - piece.y0;
    const step = TOUCH_MM / Math.hypot(dx, dy);
    return [x - dy * step, y + dx * step];
  }
  const inward = (Math.sign(piece.sweepRad) * TOUCH_MM) / piece.radius;
  return [x - (x - piece.cx) * inward, y - (y - piece.cy) * inward];
}

/** Whether some stretch of a's outline runs within b's solid, or along it with both solids on the same side. */
function outlineEnters(a: OutlinedShape, b: OutlinedShape): boolean {
  const others = b.loops.flat();
  for (const piece of a.loops.flat()) {
    if (boxGapMm(boundsOf([[piece]]), b.box) > 0) continue;
    const shares = [0, 1];
    for (const other of others) {
      const places = [...crossingsOf(piece, other), pointAlong(other, 0), pointAlong(other, 1)];
      for (const place of places) {
        const share = shareOf(piece, place);
        if (share > 0 && share < 1) shares.push(share);
      }
    }
    shares.sort((first, second) => first - second);
    for (let index = 1; index < shares.length; index++) {
      if (covers(b.placed, ...justInside(piece, (shares[index - 1] + shares[index]) / 2))) return true;
    }
  }
  return false;
}

/**
 * Whether two solids share space. Touching is no overlap; a disc in a ring's water does not overlap the ring;
 * a disc inside a bar does overlap it.
 */
export function overlaps(a: OutlinedShape, b: OutlinedShape): boolean {
  if (boxGapMm(a.box, b.box) > 0) return false;
  // Between two neighbouring crossings an outline is wholly inside or wholly outside the other solid: its middle tells.
  return outlineEnters(a, b) || outlineEnters(b, a);
}
