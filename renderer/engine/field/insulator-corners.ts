import { angleFromEdge, type Corner, cornersOf } from "./corners";
import type { Solid } from "./layout";

/**
 * Round a corner of an insulator that sticks out into the water the potential goes like r^m·cos(mθ), m = π/α < 1, and its
 * stream function like r^m·sin(mθ) (Jackson, Classical Electrodynamics, sect. 2.11, with no flux through the edges). A link
 * that conducts (stream through its dual face) / (potential difference of its nodes) carries that flow exactly: the streams
 * through the faces of a cell add up to nothing by themselves. This is what takes the corner's error out of the scheme.
 */
export interface InsulatorCorners {
  readonly corners: readonly Corner[];
  /**
   * @param a, b the link's nodes; p, q the ends of its dual face (mm).
   * @param plain width over length of the link as the plain scheme has it.
   * @returns width over length of the link that carries the corner's flow; `plain` where no corner rules.
   */
  readonly shapeOf: (a: Place, b: Place, p: Place, q: Place, plain: number) => number;
}

export type Place = readonly [number, number];

/** Where the flow runs along the face, its stream and difference are both small: beyond these multiples of the plain link it is left plain. */
const LEAST_OF_PLAIN = 0.2;
const MOST_OF_PLAIN = 5;
/** A difference of this share of the corner's own field over the link's length says enough for a link to be all but shut. */
const TELLING = 0.3;

function streamAt({ x: x0, y: y0, along, waterAngle }: Corner, [x, y]: Place): number {
  const exponent = Math.PI / waterAngle;
  const theta = angleFromEdge(along, x - x0, y - y0);
  return theta >= waterAngle ? 0 : Math.hypot(x - x0, y - y0) ** exponent * Math.sin(exponent * Math.max(0, theta));
}

/** Potential; inside the solid it is carried on across the nearer edge, as the scheme's own nodes there do. */
function potentialAt({ x: x0, y: y0, along, waterAngle }: Corner, [x, y]: Place): number {
  const exponent = Math.PI / waterAngle;
  const theta = angleFromEdge(along, x - x0, y - y0);
  const pastFirst = theta - waterAngle > 2 * Math.PI - theta;
  return Math.hypot(x - x0, y - y0) ** exponent * Math.cos(exponent * (pastFirst ? theta - 2 * Math.PI : theta));
}

/**
 * @param leastReachMm corners that rule over less than this are left to the plain scheme.
 * @param mostReachMm no corner is given more than this.
 * @param roomMm distance from a place to the nearest other part or wall, mm.
 */
export function insulatorCorners(
  insulators: readonly Solid[],
  leastReachMm: number,
  mostReachMm: number,
  roomMm: (solid: Solid, place: Place) => number,
): InsulatorCorners {
  const corners = insulators.flatMap((solid) =>
    solid.loops
      .flatMap(cornersOf)
      .filter(({ waterAngle }) => waterAngle > 1.02 * Math.PI)
      .map((corner) => ({ ...corner, reachMm: Math.min(corner.reachMm, mostReachMm, 0.6 * roomMm(solid, [corner.x, corner.y])) }))
      .filter(({ reachMm }) => reachMm >= leastReachMm),
  );
  return {
    corners,
    shapeOf: (a, b, p, q, plain) => {
      const x = (a[0] + b[0]) / 2;
      const y = (a[1] + b[1]) / 2;
      const corner = corners.find((one) => Math.hypot(x - one.x, y - one.y) < one.reachMm);
      if (corner === undefined) return plain;
      const stream = Math.abs(streamAt(corner, q) - streamAt(corner, p));
      const difference = Math.abs(potentialAt(corner, b) - potentialAt(corner, a));
      const shape = stream / difference;
      if (!(shape < MOST_OF_PLAIN * plain)) return plain;
      const exponent = Math.PI / corner.waterAngle;
      const field = exponent * Math.hypot(x - corner.x, y - corner.y) ** (exponent - 1);
      const tells = difference > TELLING * field * Math.hypot(b[0] - a[0], b[1] - a[1]);
      return tells || shape > LEAST_OF_PLAIN * plain ? shape : plain;
    },
  };
}
