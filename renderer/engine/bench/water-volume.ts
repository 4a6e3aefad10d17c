import type { Bounded } from "../../../shared-types/plan";
import type { PlacedShape, Setup } from "../../../shared-types/setup";
import { boundsOf, type Loop, outlineOf, type Piece, pointAlong } from "../geometry/outline";
import { covers } from "../geometry/signed-distance";
import { depthFromWallMm, trayOutline } from "../geometry/tray-outline";
import { bedDepthMm } from "../geometry/water-depth";

/**
 * The water's volume and surface by scan lines. Along a line the integral is exact, since depth is linear between outlines; across
 * the lines Gauss's rule runs between the heights where an outline begins, ends or turns, so that neither straight nor round edges
 * spoil it. The stated error is the difference between two rules.
 */

export interface WaterExtent {
  readonly volumeMm3: Bounded;
  /** Free surface; water that stands over a part or a slab counts. */
  readonly surfaceMm2: Bounded;
  /** Bed that is neither wet nor covered by a part. */
  readonly dryBedMm2: number;
}

interface Sums {
  volume: number;
  surface: number;
  dry: number;
}

interface Obstacle {
  readonly placed: PlacedShape;
  readonly pieces: readonly Piece[];
  readonly bottom: number;
  readonly top: number;
  /** How far it stands above the bed, mm. */
  readonly riseMm: number;
  readonly isPart: boolean;
}

// Nodes and weights of Gauss's rule on −1 … 1, from the zeros of the Legendre polynomial.
function gaussRule(count: number): readonly (readonly [number, number])[] {
  return Array.from({ length: count }, (_, index) => {
    let x = Math.cos((Math.PI * (index + 0.75)) / (count + 0.5));
    let slope = 1;
    for (let step = 0; step < 20; step++) {
      let before = 1;
      let value = x;
      for (let n = 2; n <= count; n++) [before, value] = [value, ((2 * n - 1) * x * value - (n - 1) * before) / n];
      slope = (count * (before - x * value)) / (1 - x * x);
      x -= value / slope;
    }
    return [x, 2 / ((1 - x * x) * slope * slope)];
  });
}

const FINE = gaussRule(14);
const COARSE = gaussRule(10);
/** Heights closer than this are taken as one: outlines of hundreds of short edges need no more. */
const LEAST_STEP_MM = 0.05;

function obstaclesOf(setup: Setup): readonly Obstacle[] {
  const obstacle = (placed: PlacedShape, riseMm: number, isPart: boolean): Obstacle => {
    const loops = outlineOf(placed);
    const [, bottom, , top] = boundsOf(loops);
    return { placed, pieces: loops.flat(), bottom, top, riseMm, isPart };
  };
  return [
    ...setup.water.slabs.map((slab) => obstacle(slab, slab.thicknessMm, false)),
    ...setup.parts.map((part) => obstacle(part, part.heightMm, true)),
  ];
}

function turningHeights(loops: readonly Loop[]): readonly number[] {
  return loops.flat().flatMap((piece) => {
    const ends = [pointAlong(piece, 0)[1], pointAlong(piece, 1)[1]];
    return piece.kind === "edge" ? ends : [...ends, piece.cy - piece.radius, piece.cy + piece.radius];
  });
}

function crossings(pieces: readonly Piece[], y: number): readonly number[] {
  return pieces.flatMap((piece) => {
    if (piece.kind === "edge") {
      if (piece.y0 > y === piece.y1 > y) return [];
      return [piece.x0 + ((y - piece.y0) / (piece.y1 - piece.y0)) * (piece.x1 - piece.x0)];
    }
    const half = piece.radius ** 2 - (y - piece.cy) ** 2;
    return half <= 0 ? [] : [piece.cx - Math.sqrt(half), piece.cx + Math.sqrt(half)];
  });
}

/** Adds the wet and dry shares of one stretch of a scan line, over which the depth runs from `start` to `end`. */
function addStretch(sums: Sums, length: number, start: number, end: number, weight: number, floored: boolean): void {
  if (start <= 0 && end <= 0) {
    if (!floored) sums.dry += weight * length;
    return;
  }
  const wetShare = start > 0 && end > 0 ? 1 : Math.max(start, end) / Math.abs(start - end);
  const meanWet = start > 0 && end > 0 ? (start + end) / 2 : Math.max(start, end) / 2;
  sums.volume += weight * length * wetShare * meanWet;
  sums.surface += weight * length * wetShare;
  if (!floored) sums.dry += weight * length * (1 - wetShare);
}

function addLine(sums: Sums, setup: Setup, wall: readonly Piece[], obstacles: readonly Obstacle[], y: number, weight: number): void {
  const here = obstacles.filter((one) => one.bottom <= y && y <= one.top);
  const xs = [...crossings(wall, y), ...here.flatMap((one) => crossings(one.pieces, y))].sort((a, b) => a - b);
  for (let index = 1; index < xs.length; index++) {
    const [left, right] = [xs[index - 1], xs[index]];
    const middle = (left + right) / 2;
    if (right - left < 1e-9 || depthFromWallMm(setup.tray, middle, y) < 0) continue;
    let slabs = 0;
    let part = 0;
    for (const one of here) {
      if (!covers(one.placed, middle, y)) continue;
      if (one.isPart) part = Math.max(part, one.riseMm);
      else slabs += one.riseMm;
    }
    const below = slabs + part;
    addStretch(sums, right - left, bedDepthMm(setup, left, y) - below, bedDepthMm(setup, right, y) - below, weight, part > 0);
  }
}

function integrate(setup: Setup, obstacles: readonly Obstacle[], rule: readonly (readonly [number, number])[]): Sums {
  const wall = trayOutline(setup.tray);
  const heights = [...turningHeights([wall, ...obstacles.map((one) => one.pieces)])].sort((a, b) => a - b);
  const sums: Sums = { volume: 0, surface: 0, dry: 0 };
  const [, bottom, , top] = boundsOf([wall]);
  let from = bottom;
  for (const to of [...heights.filter((height) => height > bottom && height < top), top]) {
    if (to - from < LEAST_STEP_MM && to !== top) continue;
    for (const [node, weight] of rule) {
      // y = middle + half·sin(πt/2) gathers the lines at both ends, where a round edge turns back.
      const half = (to - from) / 2;
      const angle = (Math.PI / 2) * node;
      addLine(sums, setup, wall, obstacles, from + half + half * Math.sin(angle), weight * half * (Math.PI / 2) * Math.cos(angle));
    }
    from = to;
  }
  return sums;
}

const bounded = (fine: number, coarse: number): Bounded => ({ value: fine, error: Math.abs(fine - coarse) + 1e-9 * Math.abs(fine) });

/** @returns volume (mm³), free surface and dry bed (mm²) of the water in one tray: parts and slabs subtracted, tilt counted. */
export function waterExtent(setup: Setup): WaterExtent {
  const obstacles = obstaclesOf(setup);
  const fine = integrate(setup, obstacles, FINE);
  const coarse = integrate(setup, obstacles, COARSE);
  return {
    volumeMm3: bounded(fine.volume, coarse.volume),
    surfaceMm2: bounded(fine.surface, coarse.surface),
    dryBedMm2: fine.dry,
  };
}
