import { type Bow, bowHolds, type Edge, type Loop, type Piece } from "../geometry/outline";

/** Directions of a straight scan line: along x at a fixed y (a row), or along y at a fixed x (a column). */
export type ScanAxis = "row" | "column";

function edgeCrossing(edge: Edge, axis: ScanAxis, fixed: number, slack: number): number | null {
  const from = axis === "row" ? edge.y0 : edge.x0;
  const to = axis === "row" ? edge.y1 : edge.x1;
  if (from === to || fixed < Math.min(from, to) - slack || fixed > Math.max(from, to) + slack) return null;
  const share = Math.min(1, Math.max(0, (fixed - from) / (to - from)));
  return axis === "row" ? edge.x0 + share * (edge.x1 - edge.x0) : edge.y0 + share * (edge.y1 - edge.y0);
}

function bowCrossings(bow: Bow, axis: ScanAxis, fixed: number, take: (position: number) => void): void {
  const centre = axis === "row" ? bow.cx : bow.cy;
  const off = fixed - (axis === "row" ? bow.cy : bow.cx);
  const square = bow.radius * bow.radius - off * off;
  if (square < 0) return;
  const half = Math.sqrt(square);
  for (const along of [-half, half]) {
    const angle = axis === "row" ? Math.atan2(off, along) : Math.atan2(along, off);
    if (bowHolds(bow, angle)) take(centre + along);
  }
}

/**
 * Calls `take` with each position (mm along the scan line) where a piece of an outline crosses it. Pieces that lie along
 * the line are skipped: their ends belong to their neighbours. Ends count for both pieces, so a vertex may be taken twice.
 */
export function crossPiece(piece: Piece, axis: ScanAxis, fixed: number, slack: number, take: (position: number) => void): void {
  if (piece.kind === "bow") {
    bowCrossings(piece, axis, fixed, take);
    return;
  }
  const position = edgeCrossing(piece, axis, fixed, slack);
  if (position !== null) take(position);
}

/** @returns positions strictly between `from` and `to` where the outlines cross a scan line, ascending, mm. */
export function crossingsBetween(loops: readonly Loop[], axis: ScanAxis, fixed: number, from: number, to: number): number[] {
  const found: number[] = [];
  const take = (position: number): void => {
    if (position > from && position < to) found.push(position);
  };
  for (const loop of loops) for (const piece of loop) crossPiece(piece, axis, fixed, 0, take);
  return found.sort((a, b) => a - b);
}

/** @returns [lowest, highest] coordinate across the scan direction that a piece reaches, mm. */
export function reachAcross(piece: Piece, axis: ScanAxis): readonly [number, number] {
  if (piece.kind === "bow") {
    const centre = axis === "row" ? piece.cy : piece.cx;
    return [centre - piece.radius, centre + piece.radius];
  }
  const from = axis === "row" ? piece.y0 : piece.x0;
  const to = axis === "row" ? piece.y1 : piece.x1;
  return [Math.min(from, to), Math.max(from, to)];
}
