import { type Bow, bowHolds, type Edge, type Piece, pointAlong } from "./outline";

/** A place on an outline, mm. */
export type Place = readonly [number, number];

/** Slack on the share of a piece at which a crossing still counts as on it: rounding at a corner must not lose it. */
const SHARE_SLACK = 1e-12;

const onPiece = (share: number): boolean => share >= -SHARE_SLACK && share <= 1 + SHARE_SLACK;

function edgesCross(a: Edge, b: Edge): readonly Place[] {
  const ax = a.x1 - a.x0;
  const ay = a.y1 - a.y0;
  const bx = b.x1 - b.x0;
  const by = b.y1 - b.y0;
  const turn = ax * by - ay * bx;
  if (Math.abs(turn) <= 1e-14 * Math.hypot(ax, ay) * Math.hypot(bx, by)) return [];
  const along = ((b.x0 - a.x0) * by - (b.y0 - a.y0) * bx) / turn;
  const across = ((b.x0 - a.x0) * ay - (b.y0 - a.y0) * ax) / turn;
  return onPiece(along) && onPiece(across) ? [pointAlong(a, along)] : [];
}

function edgeCrossesBow(edge: Edge, bow: Bow): readonly Place[] {
  const dx = edge.x1 - edge.x0;
  const dy = edge.y1 - edge.y0;
  const length = Math.hypot(dx, dy);
  const foot = ((bow.cx - edge.x0) * dx + (bow.cy - edge.y0) * dy) / (length * length);
  const away = ((bow.cx - edge.x0) * dy - (bow.cy - edge.y0) * dx) / length;
  if (Math.abs(away) > bow.radius) return [];
  const half = Math.sqrt(bow.radius * bow.radius - away * away) / length;
  return [foot - half, foot + half]
    .filter(onPiece)
    .map((share) => pointAlong(edge, share))
    .filter(([x, y]) => bowHolds(bow, Math.atan2(y - bow.cy, x - bow.cx)));
}

function bowsCross(a: Bow, b: Bow): readonly Place[] {
  const dx = b.cx - a.cx;
  const dy = b.cy - a.cy;
  const apart = Math.hypot(dx, dy);
  if (apart === 0 || apart > a.radius + b.radius || apart < Math.abs(a.radius - b.radius)) return [];
  const along = (apart * apart + a.radius * a.radius - b.radius * b.radius) / (2 * apart);
  const across = Math.sqrt(Math.max(0, a.radius * a.radius - along * along));
  const ux = dx / apart;
  const uy = dy / apart;
  return [across, -across]
    .map((side): Place => [a.cx + along * ux - side * uy, a.cy + along * uy + side * ux])
    .filter(([x, y]) => bowHolds(a, Math.atan2(y - a.cy, x - a.cx)) && bowHolds(b, Math.atan2(y - b.cy, x - b.cx)));
}

/**
 * Where two pieces of outlines cross or touch. Stretches that lie on each other have no single crossing and give none.
 * @returns the places in mm: none, one or two.
 */
export function crossingsOf(a: Piece, b: Piece): readonly Place[] {
  if (a.kind === "edge") return b.kind === "edge" ? edgesCross(a, b) : edgeCrossesBow(a, b);
  return b.kind === "edge" ? edgeCrossesBow(b, a) : bowsCross(a, b);
}
