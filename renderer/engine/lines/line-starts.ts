import type { Setup } from "../../../shared-types/setup";
import type { PotentialField } from "../field/potential-field";
import { lengthOf, outlineOf, type Piece, pointAlong } from "../geometry/outline";
import { waterDepthMm } from "../geometry/water-depth";
import type { SurfaceField, SurfacePlace } from "./surface-field";

/** A short stretch of a conductor's outline and the current that leaves it. */
interface Outflow {
  readonly piece: Piece;
  readonly fromShare: number;
  readonly toShare: number;
  /** Depth × field × length; what enters the metal counts as 0. */
  readonly flux: number;
}

/** A loop's weakest stretch below this share of the mean is where the count of lines begins; else its first stretch is. */
const CLEARLY_WEAK = 0.8;

/** A place on a piece, and the direction from it into the water (the solid lies on the left). */
function placeOn(piece: Piece, share: number): SurfacePlace {
  const [x, y] = pointAlong(piece, share);
  if (piece.kind === "edge") {
    const length = lengthOf(piece);
    return { x, y, outX: (piece.y1 - piece.y0) / length, outY: (piece.x0 - piece.x1) / length };
  }
  const outward = Math.sign(piece.sweepRad) / piece.radius;
  return { x, y, outX: outward * (x - piece.cx), outY: outward * (y - piece.cy) };
}

function outflowsOf(loop: readonly Piece[], setup: Setup, metalVolts: number, surfaceField: SurfaceField, stepMm: number): Outflow[] {
  return loop.flatMap((piece) => {
    const count = Math.max(1, Math.ceil(lengthOf(piece) / stepMm));
    return Array.from({ length: count }, (_, index): Outflow => {
      const place = placeOn(piece, (index + 0.5) / count);
      const outward = Math.max(0, surfaceField(place, metalVolts));
      const flux = outward === 0 ? 0 : (outward * Math.max(0, waterDepthMm(setup, place.x, place.y)) * lengthOf(piece)) / count;
      return { piece, fromShare: index / count, toShare: (index + 1) / count, flux };
    });
  });
}

/**
 * The stretches of a loop, beginning where the least current leaves: a mirror axis of the layout, if there is one, runs
 * through that place, so that the lines come out mirrored as well.
 */
function fromWeakest(outflows: readonly Outflow[]): Outflow[] {
  const mean = outflows.reduce((sum, { flux }) => sum + flux, 0) / outflows.length;
  let weakest = 0;
  outflows.forEach(({ flux }, index) => {
    if (flux < outflows[weakest].flux) weakest = index;
  });
  const least = outflows[weakest];
  if (least.flux > CLEARLY_WEAK * mean) return [...outflows];
  const before = outflows[(weakest + outflows.length - 1) % outflows.length].flux;
  const after = outflows[(weakest + 1) % outflows.length].flux;
  const bend = before - 2 * least.flux + after;
  // The lowest point of the parabola through the three stretches.
  const split = bend > 0 ? 0.5 + (before - after) / (2 * bend) : 0.5;
  const splitShare = least.fromShare + split * (least.toShare - least.fromShare);
  return [
    { ...least, fromShare: splitShare, flux: (1 - split) * least.flux },
    ...outflows.slice(weakest + 1),
    ...outflows.slice(0, weakest),
    { ...least, toShare: splitShare, flux: split * least.flux },
  ];
}

const totalOf = (outflows: readonly Outflow[]): number => outflows.reduce((sum, { flux }) => sum + flux, 0);

function startsOf(outflows: readonly Outflow[], count: number): SurfacePlace[] {
  const total = totalOf(outflows);
  const starts: SurfacePlace[] = [];
  let passed = 0;
  for (const { piece, fromShare, toShare, flux } of outflows) {
    // A line in the middle of each equal portion of the current.
    while (starts.length < count && ((starts.length + 0.5) / count) * total <= passed + flux) {
      const within = (((starts.length + 0.5) / count) * total - passed) / flux;
      starts.push(placeOn(piece, fromShare + within * (toShare - fromShare)));
    }
    passed += flux;
  }
  return starts;
}

/**
 * Where field lines leave electrodes and loose conductors, so that neighbours on a surface have equal currents between them.
 * @param lines how many lines the electrodes send out together, nearly.
 * @param stepMm length of the stretches in which the current is summed.
 */
export function lineStarts(
  field: PotentialField,
  setup: Setup,
  lines: number,
  surfaceField: SurfaceField,
  stepMm: number,
): readonly SurfacePlace[] {
  const surfaces = field.conductors.flatMap(({ id, role, volts }) => {
    const part = setup.parts.find((each) => each.id === id);
    if (part === undefined || Number.isNaN(volts)) return [];
    return outlineOf(part).map((loop) => {
      const outflows = fromWeakest(outflowsOf(loop, setup, volts, surfaceField, stepMm));
      return { role, outflows, flux: totalOf(outflows) };
    });
  });
  const sent = surfaces.reduce((sum, { role, flux }) => sum + (role === "electrode" ? flux : 0), 0);
  if (!(sent > 0)) return [];
  // No surface sends more than all electrodes together; where the grid hardly resolves one, its sum may say so all the same.
  return surfaces.flatMap(({ outflows, flux }) => startsOf(outflows, Math.min(lines, Math.round((lines * flux) / sent))));
}
