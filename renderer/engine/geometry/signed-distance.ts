import type { PlacedShape, Shape } from "../../../shared-types/setup";
import { radians } from "../../../shared-types/units";
import { bowHolds, type Loop, outlineOf, type Piece, pointAlong } from "./outline";

/** @returns distance (mm) from a point to a piece of an outline. */
export function distanceToPiece(piece: Piece, x: number, y: number): number {
  if (piece.kind === "edge") {
    const dx = piece.x1 - piece.x0;
    const dy = piece.y1 - piece.y0;
    const share = ((x - piece.x0) * dx + (y - piece.y0) * dy) / (dx * dx + dy * dy);
    const clamped = Math.min(1, Math.max(0, share));
    return Math.hypot(x - piece.x0 - clamped * dx, y - piece.y0 - clamped * dy);
  }
  const ax = x - piece.cx;
  const ay = y - piece.cy;
  if (bowHolds(piece, Math.atan2(ay, ax))) return Math.abs(Math.hypot(ax, ay) - piece.radius);
  const [sx, sy] = pointAlong(piece, 0);
  const [ex, ey] = pointAlong(piece, 1);
  return Math.min(Math.hypot(x - sx, y - sy), Math.hypot(x - ex, y - ey));
}

/** @returns distance (mm) from a point to the nearest place of the outline. */
export function distanceToOutline(loops: readonly Loop[], x: number, y: number): number {
  let nearest = Infinity;
  for (const loop of loops) for (const piece of loop) nearest = Math.min(nearest, distanceToPiece(piece, x, y));
  return nearest;
}

function holdsLocally(shape: Shape, x: number, y: number): boolean {
  switch (shape.kind) {
    case "bar":
      return Math.abs(x) <= shape.lengthMm / 2 && Math.abs(y) <= shape.widthMm / 2;
    case "disc":
      return Math.hypot(x, y) <= shape.diameterMm / 2;
    case "ring":
    case "arc": {
      const r = Math.hypot(x, y);
      if (r > shape.outerMm / 2 || r < shape.innerMm / 2) return false;
      return shape.kind === "ring" || Math.abs(Math.atan2(y, x)) <= radians(shape.sweepDeg) / 2;
    }
    case "frame": {
      const a = shape.lengthMm / 2;
      const b = shape.widthMm / 2;
      const inOuter = Math.abs(x) <= a && Math.abs(y) <= b;
      return inOuter && !(Math.abs(x) < a - shape.wallMm && Math.abs(y) < b - shape.wallMm);
    }
    case "polygon": {
      let odd = false;
      shape.pointsMm.forEach(([x0, y0], index) => {
        const [x1, y1] = shape.pointsMm[(index + 1) % shape.pointsMm.length];
        if (y0 > y !== y1 > y && x < x0 + ((y - y0) / (y1 - y0)) * (x1 - x0)) odd = !odd;
      });
      return odd;
    }
  }
}

/** @returns whether the solid of a placed shape covers the point (mm); the water inside a ring is not solid. */
export function covers(placed: PlacedShape, x: number, y: number): boolean {
  const turn = radians(placed.turnDeg);
  const quarter = placed.turnDeg % 90 === 0;
  const c = quarter ? Math.round(Math.cos(turn)) : Math.cos(turn);
  const s = quarter ? Math.round(Math.sin(turn)) : Math.sin(turn);
  const dx = x - placed.xMm;
  const dy = y - placed.yMm;
  return holdsLocally(placed.shape, c * dx + s * dy, c * dy - s * dx);
}

/** @returns signed distance (mm) from the outline of a placed shape: negative inside its solid, positive outside. */
export function signedDistance(placed: PlacedShape, x: number, y: number, loops: readonly Loop[] = outlineOf(placed)): number {
  const distance = distanceToOutline(loops, x, y);
  return covers(placed, x, y) ? -distance : distance;
}
