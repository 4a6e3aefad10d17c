import type { Part, Setup } from "../../../shared-types/setup";
import { boundsOf, lengthOf, outlineOf, type Piece, pointAlong } from "../geometry/outline";
import { covers } from "../geometry/signed-distance";
import { depthFromWallMm } from "../geometry/tray-outline";
import { waterDepthMm } from "../geometry/water-depth";

/** How far before the face the water is looked for, mm. */
const BEFORE_FACE_MM = 0.02;
const SAMPLE_EVERY_MM = 2;
const MOST_SAMPLES = 60;

/** A point of the face and the unit normal that points away from the solid (which lies on the left of its outline). */
function faceAt(piece: Piece, share: number): readonly [number, number, number, number] {
  const [x, y] = pointAlong(piece, share);
  if (piece.kind === "edge") {
    const length = lengthOf(piece);
    return [x, y, (piece.y1 - piece.y0) / length, -(piece.x1 - piece.x0) / length];
  }
  const sense = Math.sign(piece.sweepRad);
  return [x, y, (sense * (x - piece.cx)) / piece.radius, (sense * (y - piece.cy)) / piece.radius];
}

/**
 * Area of a part's upright face that water touches, mm²: where it stands against a wall or another part it is not wet, and
 * where the part is shorter than the water only its own height counts. Sampled along the outline, exact for parts clear of walls
 * in level water.
 */
export function wettedFaceMm2(setup: Setup, part: Part): number {
  const loops = outlineOf(part);
  const [left, bottom, right, top] = boundsOf(loops);
  const neighbours = setup.parts.filter((other) => {
    if (other.id === part.id) return false;
    const [l, b, r, t] = boundsOf(outlineOf(other));
    return l <= right + 1 && r >= left - 1 && b <= top + 1 && t >= bottom - 1;
  });
  let area = 0;
  for (const piece of loops.flat()) {
    const length = lengthOf(piece);
    const count = Math.min(MOST_SAMPLES, Math.max(2, Math.ceil(length / SAMPLE_EVERY_MM)));
    for (let index = 0; index < count; index++) {
      const [x, y, nx, ny] = faceAt(piece, (index + 0.5) / count);
      const [wx, wy] = [x + BEFORE_FACE_MM * nx, y + BEFORE_FACE_MM * ny];
      if (depthFromWallMm(setup.tray, wx, wy) < 0 || neighbours.some((other) => covers(other, wx, wy))) continue;
      area += (length / count) * Math.max(0, Math.min(part.heightMm, waterDepthMm(setup, wx, wy)));
    }
  }
  return area;
}
