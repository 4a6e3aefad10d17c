import { type Loop, lengthOf, type Piece, pointAlong } from "../geometry/outline";

/** A corner of an outline as the water sees it. */
export interface Corner {
  readonly x: number;
  readonly y: number;
  /** Direction (radians) of the edge that leaves the corner; the water lies clockwise from it. */
  readonly along: number;
  /** Opening of the water, radians: more than π where the solid sticks out. */
  readonly waterAngle: number;
  /** Distance (mm) within which the corner alone shapes the field. */
  readonly reachMm: number;
}

/** Directions (unit vectors) in which a piece leaves its start and arrives at its end. */
function tangents(piece: Piece): { leaving: readonly [number, number]; arriving: readonly [number, number] } {
  if (piece.kind === "edge") {
    const length = lengthOf(piece);
    const d = [(piece.x1 - piece.x0) / length, (piece.y1 - piece.y0) / length] as const;
    return { leaving: d, arriving: d };
  }
  const sense = Math.sign(piece.sweepRad);
  const at = (angle: number): readonly [number, number] => [-sense * Math.sin(angle), sense * Math.cos(angle)];
  return { leaving: at(piece.startRad), arriving: at(piece.startRad + piece.sweepRad) };
}

/** @returns the corners of a loop; places where it runs on smoothly are none. */
export function cornersOf(loop: Loop): Corner[] {
  return loop.flatMap((piece, index): Corner[] => {
    const before = loop[(index + loop.length - 1) % loop.length];
    const arriving = tangents(before).arriving;
    const leaving = tangents(piece).leaving;
    const turn = Math.atan2(arriving[0] * leaving[1] - arriving[1] * leaving[0], arriving[0] * leaving[0] + arriving[1] * leaving[1]);
    if (Math.abs(turn) < 1e-3) return [];
    const [x, y] = pointAlong(piece, 0);
    const bent = [before, piece].some((one) => one.kind === "bow");
    const reachMm = Math.min(lengthOf(before), lengthOf(piece)) * (bent ? 0.25 : 0.45);
    // The outline turns left by `turn` at the corner, so the water opens by π + turn.
    return [{ x, y, along: Math.atan2(leaving[1], leaving[0]), waterAngle: Math.PI + turn, reachMm }];
  });
}

/** @returns the angle (0 to 2π) from a corner's leaving edge, clockwise into the water, to the direction (dx, dy). */
export function angleFromEdge(along: number, dx: number, dy: number): number {
  const theta = along - Math.atan2(dy, dx);
  return theta - 2 * Math.PI * Math.floor((theta + 1e-9) / (2 * Math.PI));
}
