import type { Bounded } from "../../../shared-types/plan";
import type { PlacedShape, Setup } from "../../../shared-types/setup";
import { reachBeyondWallMm } from "../geometry/clearance";
import { areaOf, boundsOf, type Loop, outlineOf, type Piece, pointAlong } from "../geometry/outline";
import { outlined } from "../geometry/overlap";
import { covers } from "../geometry/signed-distance";
import { depthFromWallMm, trayOutline } from "../geometry/tray-outline";
import { bedDepthMm } from "../geometry/water-depth";

/**
 * The water's volume and surface. In level water without slabs, with all parts inside the wall, they are exact sums of outlines'
 * areas. Otherwise scan lines: along a line the integral is exact, since depth is linear between outlines; across
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
  /** left, bottom, right, top, mm. */
  readonly box: readonly [number, number, number, number];
  /** How far it stands above the bed, mm. */
  readonly riseMm: number;
  readonly isPart: boolean;
}

type Rule = readonly (readonly [number, number])[];
// Nodes and weights of Gauss's rule on −1 … 1, from the zeros of the Legendre polynomial.
function gaussRule(count: number): Rule {
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
/** For outlines of hundreds of short edges, whose heights lie close together. */
const FINE_BETWEEN_MANY = gaussRule(4);
const COARSE_BETWEEN_MANY = gaussRule(3);
const MANY_HEIGHTS = 200;
/** Heights closer than this are taken as one. */
const LEAST_STEP_MM = 0.05;

function obstaclesOf(setup: Setup): readonly Obstacle[] {
  const obstacle = (placed: PlacedShape, riseMm: number, isPart: boolean): Obstacle => {
    const loops = outlineOf(placed);
    return { placed, pieces: loops.flat(), box: boundsOf(loops), riseMm, isPart };
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
  const here = obstacles.filter((one) => one.box[1] <= y && y <= one.box[3]);
  const xs = [...crossings(wall, y), ...here.flatMap((one) => crossings(one.pieces, y))].sort((a, b) => a - b);
  for (let index = 1; index < xs.length; index++) {
    const [left, right] = [xs[index - 1], xs[index]];
    const middle = (left + right) / 2;
    if (right - left < 1e-9 || depthFromWallMm(setup.tray, middle, y) < 0) continue;
    let slabs = 0;
    let part = 0;
    for (const one of here) {
      if (middle < one.box[0] || middle > one.box[2] || !covers(one.placed, middle, y)) continue;
      if (one.isPart) part = Math.max(part, one.riseMm);
      else slabs += one.riseMm;
    }
    const below = slabs + part;
    addStretch(sums, right - left, bedDepthMm(setup, left, y) - below, bedDepthMm(setup, right, y) - below, weight, part > 0);
  }
}

/** Heights between which nothing begins, ends or turns; close ones thinned out. */
function bandsOf(setup: Setup, obstacles: readonly Obstacle[]): readonly number[] {
  const wall = trayOutline(setup.tray);
  const [, bottom, , top] = boundsOf([wall]);
  const heights = turningHeights([wall, ...obstacles.map((one) => one.pieces)]).filter((height) => height > bottom && height < top);
  const least = heights.length > MANY_HEIGHTS ? (top - bottom) / MANY_HEIGHTS : LEAST_STEP_MM;
  const bands = [bottom];
  for (const height of [...heights].sort((a, b) => a - b)) {
    if (height - bands[bands.length - 1] >= least && top - height >= least) bands.push(height);
  }
  return [...bands, top];
}

function integrate(setup: Setup, obstacles: readonly Obstacle[], bands: readonly number[], rule: Rule): Sums {
  const wall = trayOutline(setup.tray);
  const sums: Sums = { volume: 0, surface: 0, dry: 0 };
  for (let index = 1; index < bands.length; index++) {
    const from = bands[index - 1];
    const half = (bands[index] - from) / 2;
    for (const [node, weight] of rule) {
      // y = middle + half·sin(πt/2) gathers the lines at both ends, where a round edge turns back.
      const angle = (Math.PI / 2) * node;
      addLine(sums, setup, wall, obstacles, from + half + half * Math.sin(angle), weight * half * (Math.PI / 2) * Math.cos(angle));
    }
  }
  return sums;
}

/** The sums of areas, where they hold; null elsewhere. Parts that overlap are a stop of their own. */
function exactExtent(setup: Setup): WaterExtent | null {
  const { depthMm, tiltXDeg, tiltYDeg, slabs } = setup.water;
  if (tiltXDeg !== 0 || tiltYDeg !== 0 || slabs.length > 0) return null;
  let surface = areaOf([trayOutline(setup.tray)]);
  let volume = surface * depthMm;
  for (const part of setup.parts) {
    const shape = outlined(part);
    if (reachBeyondWallMm(shape, setup.tray) > 1e-6) return null;
    const area = areaOf(shape.loops);
    volume -= area * Math.min(depthMm, part.heightMm);
    if (part.heightMm >= depthMm) surface -= area;
  }
  return { volumeMm3: bounded(volume, volume), surfaceMm2: bounded(surface, surface), dryBedMm2: 0 };
}

const bounded = (fine: number, coarse: number): Bounded => ({ value: fine, error: Math.abs(fine - coarse) + 1e-9 * Math.abs(fine) });

/** @returns volume (mm³), free surface and dry bed (mm²) of the water in one tray: parts and slabs subtracted, tilt counted. */
export function waterExtent(setup: Setup): WaterExtent {
  const exact = exactExtent(setup);
  if (exact !== null) return exact;
  const obstacles = obstaclesOf(setup);
  const bands = bandsOf(setup, obstacles);
  const many = bands.length > MANY_HEIGHTS / 2;
  const fine = integrate(setup, obstacles, bands, many ? FINE_BETWEEN_MANY : FINE);
  const coarse = integrate(setup, obstacles, bands, many ? COARSE_BETWEEN_MANY : COARSE);
  return {
    volumeMm3: bounded(fine.volume, coarse.volume),
    surfaceMm2: bounded(fine.surface, coarse.surface),
    dryBedMm2: fine.dry,
  };
}
