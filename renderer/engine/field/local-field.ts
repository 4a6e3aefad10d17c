import type { Setup } from "../../../shared-types/setup";
import { radians } from "../../../shared-types/units";
import { type Bow, type Edge, type Loop, lengthOf, type Piece, pointAlong } from "../geometry/outline";
import { distanceToPiece } from "../geometry/signed-distance";
import { depthFromWallMm } from "../geometry/tray-outline";
import { angleFromEdge, cornersOf } from "./corners";
import type { Solid } from "./layout";
import { stripEndPotential } from "./strip-end";

/**
 * A positive function that is harmonic in the water next to one place of a conductor and zero on its surface: the form
 * that every potential difference to the conductor takes there, whatever stands farther away.
 */
export type LocalPotential = (x: number, y: number) => number;

/** A corner or a strip's end with the neighbourhood in which its local potential rules. */
interface Feature {
  /** The corner itself, or the end face of a strip: the neighbourhood is what lies within reach of it. */
  readonly core: Edge;
  readonly reachMm: number;
  /** The potential, 0 where the point lies in the metal's sector. */
  readonly potential: LocalPotential;
}

/** Every place of a conductor with its local potential. */
export interface LocalField {
  /**
   * @returns the local potential that rules at a point in the water, or null where none is sure (near a corner too small
   * for the grid, or past the end of an edge).
   */
  readonly at: (x: number, y: number) => LocalPotential | null;
  /** @returns the potential of the corner or strip end in whose circle a point lies, else null. */
  readonly featureAt: (x: number, y: number) => LocalPotential | null;
  /** Radius of the widest such circle, mm. */
  readonly widestReachMm: number;
}

function cornerFeatures(loop: Loop): Feature[] {
  return cornersOf(loop).map(({ x, y, along, waterAngle, reachMm }) => ({
    core: { kind: "edge", x0: x, y0: y, x1: x, y1: y },
    reachMm,
    potential: cornerPotential(x, y, along, waterAngle),
  }));
}

/** r^(π/α)·sin(πθ/α) in the water of opening α at a corner (Jackson, Classical Electrodynamics, sect. 2.11). */
function cornerPotential(x0: number, y0: number, along: number, waterAngle: number): LocalPotential {
  const exponent = Math.PI / waterAngle;
  return (x, y) => {
    const theta = angleFromEdge(along, x - x0, y - y0);
    if (theta >= waterAngle) return 0;
    return Math.hypot(x - x0, y - y0) ** exponent * Math.sin(exponent * Math.max(0, theta));
  };
}

function barEnds(placed: Solid["placed"], lengthMm: number, thicknessMm: number, turnDeg: number): Feature[] {
  const c = Math.cos(radians(turnDeg));
  const s = Math.sin(radians(turnDeg));
  return [1, -1].map((side): Feature => {
    const x0 = placed.xMm + (side * c * lengthMm) / 2;
    const y0 = placed.yMm + (side * s * lengthMm) / 2;
    const potential: LocalPotential = (x, y) =>
      stripEndPotential(side * (c * (x - x0) + s * (y - y0)), c * (y - y0) - s * (x - x0), thicknessMm);
    const [halfX, halfY] = [(-s * thicknessMm) / 2, (c * thicknessMm) / 2];
    const core: Edge = { kind: "edge", x0: x0 - halfX, y0: y0 - halfY, x1: x0 + halfX, y1: y0 + halfY };
    return { core, reachMm: lengthMm / 4, potential };
  });
}

/** An arc's end is a strip's end in the logarithmic plane, where rings are straight; harmonic functions stay harmonic. */
function arcEnds(placed: Solid["placed"], outerMm: number, innerMm: number, sweepDeg: number): Feature[] {
  const middle = Math.sqrt(outerMm * innerMm) / 2;
  const thickness = Math.log(outerMm / innerMm);
  return [1, -1].map((side): Feature => {
    const end = radians(placed.turnDeg) + (side * radians(sweepDeg)) / 2;
    const potential: LocalPotential = (x, y) => {
      const dx = x - placed.xMm;
      const dy = y - placed.yMm;
      let beyond = side * (Math.atan2(dy, dx) - end);
      beyond -= 2 * Math.PI * Math.round(beyond / (2 * Math.PI));
      return stripEndPotential(beyond, Math.log(Math.hypot(dx, dy) / middle), thickness);
    };
    const at = (radius: number): readonly [number, number] => [placed.xMm + radius * Math.cos(end), placed.yMm + radius * Math.sin(end)];
    const [[x0, y0], [x1, y1]] = [at(innerMm / 2), at(outerMm / 2)];
    return { core: { kind: "edge", x0, y0, x1, y1 }, reachMm: Math.min((middle * radians(sweepDeg)) / 4, middle / 2), potential };
  });
}

/** How much longer than thick a strip must be for its ends not to feel each other. */
const SLENDER = 2.5;

/** A part this small (largest size in smallest circles) is seen from outside as a disc of like capacitance. */
const TINY_IN_LEAST = 0.5;
/** Discs smaller than this (radius in smallest circles) rule by their logarithm some way round them. */
const SMALL_DISC_IN_LEAST = 2;

/** The logarithm round a small disc, or round a part too small for its shape to matter; null for others. */
function smallDisc({ placed, bounds: [left, bottom, right, top] }: Solid, smallestReachMm: number): Feature | null {
  const tiny = Math.max(right - left, top - bottom) < TINY_IN_LEAST * smallestReachMm;
  const isDisc = placed.shape.kind === "disc";
  const radius = (right - left + top - bottom) / 4;
  if (!tiny && !(isDisc && radius < SMALL_DISC_IN_LEAST * smallestReachMm)) return null;
  const [x0, y0] = isDisc ? [placed.xMm, placed.yMm] : [(left + right) / 2, (bottom + top) / 2];
  return {
    core: { kind: "edge", x0, y0, x1: x0, y1: y0 },
    reachMm: radius + 2 * smallestReachMm,
    potential: (x, y) => Math.max(0, Math.log(Math.hypot(x - x0, y - y0) / radius)),
  };
}

function featuresOf(solid: Solid, smallestReachMm: number): Feature[] {
  const { placed } = solid;
  const { shape } = placed;
  const disc = smallDisc(solid, smallestReachMm);
  if (disc !== null) return [disc];
  if (shape.kind === "bar") {
    const long = Math.max(shape.lengthMm, shape.widthMm);
    const thick = Math.min(shape.lengthMm, shape.widthMm);
    if (long >= SLENDER * thick) return barEnds(placed, long, thick, placed.turnDeg + (shape.lengthMm >= shape.widthMm ? 0 : 90));
  }
  if (
    shape.kind === "arc" &&
    ((shape.outerMm + shape.innerMm) / 4) * radians(shape.sweepDeg) >= SLENDER * ((shape.outerMm - shape.innerMm) / 2)
  ) {
    return arcEnds(placed, shape.outerMm, shape.innerMm, shape.sweepDeg);
  }
  return solid.loops.flatMap(cornerFeatures);
}

/** The two corners of a strip's end, each by itself: for an end with a wall or another part at its back. */
function cornersOfEnd(solid: Solid, { core }: Feature): Feature[] {
  const isAt = (x: number, y: number): boolean =>
    Math.min(Math.hypot(x - core.x0, y - core.y0), Math.hypot(x - core.x1, y - core.y1)) < 1e-6;
  return solid.loops.flatMap(cornerFeatures).filter(({ core: corner }) => isAt(corner.x0, corner.y0));
}

function distanceToCore(core: Edge, x: number, y: number): number {
  return core.x0 === core.x1 && core.y0 === core.y1 ? Math.hypot(x - core.x0, y - core.y0) : distanceToPiece(core, x, y);
}

function edgePotential(edge: Edge): LocalPotential {
  const length = lengthOf(edge);
  const nx = (edge.y1 - edge.y0) / length;
  const ny = -(edge.x1 - edge.x0) / length;
  return (x, y) => nx * (x - edge.x0) + ny * (y - edge.y0);
}

function bowPotential(bow: Bow): LocalPotential {
  const sense = Math.sign(bow.sweepRad);
  return (x, y) => sense * bow.radius * Math.log(Math.hypot(x - bow.cx, y - bow.cy) / bow.radius);
}

function piecePotential(piece: Piece): LocalPotential {
  return piece.kind === "edge" ? edgePotential(piece) : bowPotential(piece);
}

/** Whether the point of a piece nearest to (x, y) lies within the piece and not at one of its ends. */
function facesPiece(piece: Piece, x: number, y: number): boolean {
  const distance = distanceToPiece(piece, x, y);
  const [x0, y0] = pointAlong(piece, 0);
  const [x1, y1] = pointAlong(piece, 1);
  if (piece.kind === "bow" && Math.abs(piece.sweepRad) > 6.28) return true;
  return Math.min(Math.hypot(x - x0, y - y0), Math.hypot(x - x1, y - y1)) > distance * (1 + 1e-9);
}

/** Beyond this multiple of the smallest circle a wider one gains nothing (measured on the reference cases) and costs time. */
const MOST_REACH_IN_LEAST = 12;

/**
 * Prepares the local potentials of a conductor.
 * @param smallestReachMm corners whose circle would be smaller than this are left to the plain scheme.
 * @param clearanceMm distance from a point to the nearest other part (mm): a corner's circle stays well inside it.
 */
export function localFieldOf(
  solid: Solid,
  setup: Setup,
  smallestReachMm: number,
  clearanceMm: (x: number, y: number) => number,
): LocalField {
  const wallMm = (x: number, y: number): number => Math.max(0, depthFromWallMm(setup.tray, x, y));
  const limited = (feature: Feature): Feature => {
    const { x0, y0, x1, y1 } = feature.core;
    const roomMm = Math.min(wallMm(x0, y0), wallMm(x1, y1), clearanceMm(x0, y0), clearanceMm(x1, y1));
    return { ...feature, reachMm: Math.min(feature.reachMm, 0.6 * roomMm, MOST_REACH_IN_LEAST * smallestReachMm) };
  };
  const isWide = ({ reachMm }: Feature): boolean => reachMm >= smallestReachMm;
  const features = featuresOf(solid, smallestReachMm).flatMap((feature) => {
    const whole = limited(feature);
    return isWide(whole) ? [whole] : cornersOfEnd(solid, feature).map(limited).filter(isWide);
  });
  const pieces = solid.loops.flat().map((piece) => ({ piece, potential: piecePotential(piece) }));

  function featureAt(x: number, y: number): Feature | null {
    let best: Feature | null = null;
    let nearest = Infinity;
    for (const feature of features) {
      const distance = distanceToCore(feature.core, x, y);
      if (distance < feature.reachMm && distance < nearest && feature.potential(x, y) > 0) {
        best = feature;
        nearest = distance;
      }
    }
    return best;
  }

  return {
    featureAt: (x, y) => featureAt(x, y)?.potential ?? null,
    widestReachMm: Math.max(0, ...features.map((feature) => feature.reachMm)),
    at: (x, y) => {
      const feature = featureAt(x, y);
      if (feature !== null) return feature.potential;
      let nearest = Infinity;
      let ruling: { piece: Piece; potential: LocalPotential } | null = null;
      for (const entry of pieces) {
        const distance = distanceToPiece(entry.piece, x, y);
        if (distance < nearest) {
          nearest = distance;
          ruling = entry;
        }
      }
      return ruling !== null && facesPiece(ruling.piece, x, y) ? ruling.potential : null;
    },
  };
}
