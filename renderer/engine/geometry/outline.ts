import type { PlacedShape, Shape } from "../../../shared-types/setup";
import { radians } from "../../../shared-types/units";

/** A straight piece of an outline, mm; the solid lies on its left. */
export interface Edge {
  readonly kind: "edge";
  readonly x0: number;
  readonly y0: number;
  readonly x1: number;
  readonly y1: number;
}

/** A circular piece of an outline: from angle `startRad` over `sweepRad` (> 0 counter-clockwise), mm and radians. */
export interface Bow {
  readonly kind: "bow";
  readonly cx: number;
  readonly cy: number;
  readonly radius: number;
  readonly startRad: number;
  readonly sweepRad: number;
}

export type Piece = Edge | Bow;
/** A closed run of pieces. Outer loops run counter-clockwise, holes clockwise: the solid is always on the left. */
export type Loop = readonly Piece[];

const FULL_TURN = 2 * Math.PI;

const circle = (radius: number, sense: 1 | -1): Loop => [{ kind: "bow", cx: 0, cy: 0, radius, startRad: 0, sweepRad: sense * FULL_TURN }];

function polygon(points: readonly (readonly [number, number])[], sense: 1 | -1): Loop {
  let twiceArea = 0;
  points.forEach(([x, y], index) => {
    const [nextX, nextY] = points[(index + 1) % points.length];
    twiceArea += x * nextY - nextX * y;
  });
  const ordered = Math.sign(twiceArea) === sense ? points : [...points].reverse();
  return ordered.map(([x0, y0], index): Edge => {
    const [x1, y1] = ordered[(index + 1) % ordered.length];
    return { kind: "edge", x0, y0, x1, y1 };
  });
}

const rectangle = (lengthMm: number, widthMm: number, sense: 1 | -1): Loop => {
  const a = lengthMm / 2;
  const b = widthMm / 2;
  return polygon(
    [
      [-a, -b],
      [a, -b],
      [a, b],
      [-a, b],
    ],
    sense,
  );
};

function openRing(outerMm: number, innerMm: number, sweepDeg: number): Loop {
  const half = radians(sweepDeg) / 2;
  const outer = outerMm / 2;
  const inner = innerMm / 2;
  const c = Math.cos(half);
  const s = Math.sin(half);
  return [
    { kind: "bow", cx: 0, cy: 0, radius: outer, startRad: -half, sweepRad: 2 * half },
    { kind: "edge", x0: outer * c, y0: outer * s, x1: inner * c, y1: inner * s },
    { kind: "bow", cx: 0, cy: 0, radius: inner, startRad: half, sweepRad: -2 * half },
    { kind: "edge", x0: inner * c, y0: -inner * s, x1: outer * c, y1: -outer * s },
  ];
}

function localLoops(shape: Shape): readonly Loop[] {
  switch (shape.kind) {
    case "bar":
      return [rectangle(shape.lengthMm, shape.widthMm, 1)];
    case "disc":
      return [circle(shape.diameterMm / 2, 1)];
    case "ring":
      return [circle(shape.outerMm / 2, 1), circle(shape.innerMm / 2, -1)];
    case "arc":
      return [openRing(shape.outerMm, shape.innerMm, shape.sweepDeg)];
    case "frame":
      return [
        rectangle(shape.lengthMm, shape.widthMm, 1),
        rectangle(shape.lengthMm - 2 * shape.wallMm, shape.widthMm - 2 * shape.wallMm, -1),
      ];
    case "polygon":
      return [polygon(shape.pointsMm, 1)];
  }
}

/**
 * The exact outline of a placed shape in tray coordinates (mm): straight pieces and circular ones, nothing approximated.
 * @returns its loops, outer ones counter-clockwise and holes clockwise.
 */
export function outlineOf(placed: PlacedShape): readonly Loop[] {
  const turn = radians(placed.turnDeg);
  // A quarter turn must not smear a bar's edges off the axes by rounding.
  const quarter = placed.turnDeg % 90 === 0;
  const c = quarter ? Math.round(Math.cos(turn)) : Math.cos(turn);
  const s = quarter ? Math.round(Math.sin(turn)) : Math.sin(turn);
  const moveX = (x: number, y: number): number => placed.xMm + c * x - s * y;
  const moveY = (x: number, y: number): number => placed.yMm + s * x + c * y;
  return localLoops(placed.shape).map((loop) =>
    loop.map(
      (piece): Piece =>
        piece.kind === "edge"
          ? {
              kind: "edge",
              x0: moveX(piece.x0, piece.y0),
              y0: moveY(piece.x0, piece.y0),
              x1: moveX(piece.x1, piece.y1),
              y1: moveY(piece.x1, piece.y1),
            }
          : {
              kind: "bow",
              cx: moveX(piece.cx, piece.cy),
              cy: moveY(piece.cx, piece.cy),
              radius: piece.radius,
              startRad: piece.startRad + turn,
              sweepRad: piece.sweepRad,
            },
    ),
  );
}

/** @returns the point (mm) where a piece begins (`share` 0), ends (1), or lies in between. */
export function pointAlong(piece: Piece, share: number): readonly [number, number] {
  if (piece.kind === "edge") return [piece.x0 + share * (piece.x1 - piece.x0), piece.y0 + share * (piece.y1 - piece.y0)];
  const angle = piece.startRad + share * piece.sweepRad;
  return [piece.cx + piece.radius * Math.cos(angle), piece.cy + piece.radius * Math.sin(angle)];
}

/** @returns the length of a piece, mm. */
export function lengthOf(piece: Piece): number {
  return piece.kind === "edge" ? Math.hypot(piece.x1 - piece.x0, piece.y1 - piece.y0) : Math.abs(piece.radius * piece.sweepRad);
}

/**
 * A loop as a chain of points for drawing: bows are divided so that no chord strays more than `toleranceMm` from the arc.
 * @returns [x, y] pairs in mm, the first not repeated at the end.
 */
export function chainOf(loop: Loop, toleranceMm: number): readonly (readonly [number, number])[] {
  return loop.flatMap((piece) => {
    if (piece.kind === "edge") return [pointAlong(piece, 0)];
    const stepRad = 2 * Math.acos(Math.max(0.5, 1 - toleranceMm / piece.radius));
    const count = Math.max(2, Math.ceil(Math.abs(piece.sweepRad) / stepRad));
    return Array.from({ length: count }, (_, index) => pointAlong(piece, index / count));
  });
}

/** @returns area enclosed by the loops, mm² (holes subtracted), exactly. */
export function areaOf(loops: readonly Loop[]): number {
  let area = 0;
  for (const piece of loops.flat()) {
    const [x0, y0] = pointAlong(piece, 0);
    const [x1, y1] = pointAlong(piece, 1);
    area += (x0 * y1 - x1 * y0) / 2;
    if (piece.kind === "bow") area += (piece.radius * piece.radius * (piece.sweepRad - Math.sin(piece.sweepRad))) / 2;
  }
  return area;
}

/** @returns the box [left, bottom, right, top] in mm that just holds the loops. */
export function boundsOf(loops: readonly Loop[]): readonly [number, number, number, number] {
  let left = Infinity;
  let bottom = Infinity;
  let right = -Infinity;
  let top = -Infinity;
  const take = (x: number, y: number): void => {
    left = Math.min(left, x);
    right = Math.max(right, x);
    bottom = Math.min(bottom, y);
    top = Math.max(top, y);
  };
  for (const piece of loops.flat()) {
    take(...pointAlong(piece, 0));
    take(...pointAlong(piece, 1));
    if (piece.kind !== "bow") continue;
    for (let quarter = 0; quarter < 4; quarter++) {
      const angle = (quarter * Math.PI) / 2;
      if (bowHolds(piece, angle)) take(piece.cx + piece.radius * Math.cos(angle), piece.cy + piece.radius * Math.sin(angle));
    }
  }
  return [left, bottom, right, top];
}

/** @returns whether the direction `angleRad` from a bow's centre falls on the bow. */
export function bowHolds(bow: Bow, angleRad: number): boolean {
  const sweep = Math.abs(bow.sweepRad);
  if (sweep >= FULL_TURN - 1e-12) return true;
  const from = bow.sweepRad > 0 ? angleRad - bow.startRad : bow.startRad - angleRad;
  const turned = from - FULL_TURN * Math.floor(from / FULL_TURN);
  return turned <= sweep + 1e-12 || turned >= FULL_TURN - 1e-12;
}
