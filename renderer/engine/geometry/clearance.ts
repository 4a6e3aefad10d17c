import type { Tray } from "../../../shared-types/setup";
import { crossingsOf } from "./crossings-of-pieces";
import { type Bow, boundsOf, bowHolds, type Edge, type Piece, pointAlong } from "./outline";
import { type Box, boxGapMm, type OutlinedShape, overlaps } from "./overlap";
import { distanceToPiece } from "./signed-distance";

/** The smallest distance from the ends of a piece to another piece. */
const fromEnds = (piece: Piece, other: Piece): number =>
  Math.min(distanceToPiece(other, ...pointAlong(piece, 0)), distanceToPiece(other, ...pointAlong(piece, 1)));

/** The place of an edge nearest to a bow's centre: there the two can run parallel. */
function fromFoot(edge: Edge, bow: Bow): number {
  const dx = edge.x1 - edge.x0;
  const dy = edge.y1 - edge.y0;
  const share = ((bow.cx - edge.x0) * dx + (bow.cy - edge.y0) * dy) / (dx * dx + dy * dy);
  return share > 0 && share < 1 ? distanceToPiece(bow, ...pointAlong(edge, share)) : Infinity;
}

/** The places of a bow on the line through both centres: there two bows can run parallel. */
function fromCentreLine(bow: Bow, other: Bow): number {
  const dx = other.cx - bow.cx;
  const dy = other.cy - bow.cy;
  let nearest = Infinity;
  for (const angle of [Math.atan2(dy, dx), Math.atan2(-dy, -dx)]) {
    if (!bowHolds(bow, angle)) continue;
    nearest = Math.min(nearest, distanceToPiece(other, bow.cx + bow.radius * Math.cos(angle), bow.cy + bow.radius * Math.sin(angle)));
  }
  return nearest;
}

/** @returns the exact distance between two pieces of outlines, mm; 0 when they meet. */
export function distanceBetweenPieces(a: Piece, b: Piece): number {
  if (crossingsOf(a, b).length > 0) return 0;
  // Two pieces are nearest at an end of one of them or where both have a common normal.
  const ends = Math.min(fromEnds(a, b), fromEnds(b, a));
  if (a.kind === "edge") return b.kind === "edge" ? ends : Math.min(ends, fromFoot(a, b));
  return b.kind === "edge" ? Math.min(ends, fromFoot(b, a)) : Math.min(ends, fromCentreLine(a, b));
}

/**
 * The exact gap between two solids, from their outlines.
 * @returns mm; 0 when they touch or overlap (`overlaps` tells which). A disc in a ring's water has a gap to the ring.
 */
export function gapMm(a: OutlinedShape, b: OutlinedShape): number {
  if (overlaps(a, b)) return 0;
  const boxed = (piece: Piece): { piece: Piece; box: Box } => ({ piece, box: boundsOf([[piece]]) });
  const others = b.loops.flat().map(boxed);
  let nearest = Infinity;
  for (const { piece, box } of a.loops.flat().map(boxed)) {
    if (boxGapMm(box, b.box) >= nearest) continue;
    for (const other of others) {
      if (boxGapMm(box, other.box) < nearest) nearest = Math.min(nearest, distanceBetweenPieces(piece, other.piece));
    }
  }
  return nearest;
}

/** The largest distance of a piece's places from a given place, mm. */
function farthestFrom(piece: Piece, x: number, y: number): number {
  const [startX, startY] = pointAlong(piece, 0);
  const [endX, endY] = pointAlong(piece, 1);
  const ends = Math.max(Math.hypot(startX - x, startY - y), Math.hypot(endX - x, endY - y));
  if (piece.kind === "edge") return ends;
  const apart = Math.hypot(piece.cx - x, piece.cy - y);
  const away = apart === 0 ? piece.startRad : Math.atan2(piece.cy - y, piece.cx - x);
  return bowHolds(piece, away) ? apart + piece.radius : ends;
}

/**
 * The exact gap between a shape and the inside of the tray's wall.
 * @returns mm; 0 when it touches the wall, negative by how far it reaches beyond the wall.
 */
export function wallGapMm(shape: OutlinedShape, tray: Tray): number {
  if (tray.shape === "rectangle") {
    const [left, bottom, right, top] = shape.box;
    return Math.min(left, bottom, tray.lengthMm - right, tray.widthMm - top);
  }
  const radius = tray.diameterMm / 2;
  const reach = shape.loops.flat().reduce((farthest, piece) => Math.max(farthest, farthestFrom(piece, radius, radius)), 0);
  return radius - reach;
}

/** @returns how far a shape reaches beyond the inside of the tray's wall, mm; 0 when all of it is inside or touches the wall. */
export function reachBeyondWallMm(shape: OutlinedShape, tray: Tray): number {
  return Math.max(0, -wallGapMm(shape, tray));
}
