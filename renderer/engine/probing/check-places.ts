import type { Part, Setup } from "../../../shared-types/setup";
import { radians } from "../../../shared-types/units";
import { type HoldsWater, openWaterOf } from "../geometry/open-water";
import { boxGapMm, type OutlinedShape, outlined } from "../geometry/overlap";
import { distanceToOutline, signedDistance } from "../geometry/signed-distance";
import { type Place, roundedPlace } from "./rounded-place";

/** Looks across a hollow or a solid, to find its roomiest place. */
const LOOKS = 24;
/** The probe stands on metal when its middle is at least this far inside, mm. */
const ON_METAL_MM = 0.2;
/** An open ring encloses water when it goes at least half round. */
const ENCLOSING_SWEEP_DEG = 180;

/** A place of the part's own coordinates (mm) in the tray. */
function inTray(part: Part, x: number, y: number): Place {
  const turn = radians(part.turnDeg);
  return [part.xMm + Math.cos(turn) * x - Math.sin(turn) * y, part.yMm + Math.sin(turn) * x + Math.cos(turn) * y];
}

/** Half-sizes (mm) of the box in the part's own coordinates in which its enclosed water lies; null when it encloses none. */
function hollowHalves(part: Part): Place | null {
  const { shape } = part;
  switch (shape.kind) {
    case "ring":
      return [shape.innerMm / 2, shape.innerMm / 2];
    case "arc":
      return shape.sweepDeg >= ENCLOSING_SWEEP_DEG ? [shape.innerMm / 2, shape.innerMm / 2] : null;
    case "frame":
      return [shape.lengthMm / 2 - shape.wallMm, shape.widthMm / 2 - shape.wallMm];
    default:
      return null;
  }
}

/** The rounded place with the most room, the middle of the list's first when others are hardly roomier; null when none has enough. */
function roomiest(setup: Setup, places: readonly Place[], roomAt: (place: Place) => number, leastMm: number): Place | null {
  let best: Place | null = null;
  let most = leastMm;
  for (const place of places) {
    const rounded = roundedPlace(setup.tray, place);
    const room = roomAt(rounded);
    // A clearly roomier place only: what comes first is the natural choice.
    if (room > (best === null ? most : 1.25 * most)) {
      best = rounded;
      most = room;
    }
  }
  return best;
}

function inHollow(setup: Setup, part: Part, shapes: readonly OutlinedShape[], holdsWater: HoldsWater): Place | null {
  const halves = hollowHalves(part);
  if (halves === null) return null;
  const places: Place[] = [[0, 0]];
  for (let i = 1; i < LOOKS; i++) for (let j = 1; j < LOOKS; j++) places.push([(2 * i) / LOOKS - 1, (2 * j) / LOOKS - 1]);
  const round = part.shape.kind !== "frame";
  const candidates = places.filter(([u, v]) => !round || Math.hypot(u, v) < 1).map(([u, v]) => inTray(part, u * halves[0], v * halves[1]));
  const roomAt = ([x, y]: Place): number => (holdsWater(x, y) ? Math.min(...shapes.map(({ loops }) => distanceToOutline(loops, x, y))) : 0);
  return roomiest(setup, candidates, roomAt, setup.probing.probeTipMm / 2);
}

/** Places on the metal that a person would choose, the most natural first. */
function metalCandidates(part: Part): readonly Place[] {
  const { shape } = part;
  switch (shape.kind) {
    case "bar":
    case "disc":
      return [inTray(part, 0, 0)];
    case "ring":
    case "arc": {
      const middle = (shape.outerMm + shape.innerMm) / 4;
      const half = shape.kind === "ring" ? 180 : shape.sweepDeg / 2;
      return Array.from({ length: 2 * LOOKS }, (_, index) => {
        // From the part's own +x outwards to both sides.
        const angle = radians((Math.ceil(index / 2) * (index % 2 === 0 ? 1 : -1) * half) / LOOKS);
        return inTray(part, middle * Math.cos(angle), middle * Math.sin(angle));
      });
    }
    case "frame": {
      const a = (shape.lengthMm - shape.wallMm) / 2;
      const b = (shape.widthMm - shape.wallMm) / 2;
      return [inTray(part, a, 0), inTray(part, 0, b), inTray(part, -a, 0), inTray(part, 0, -b), inTray(part, a, b), inTray(part, -a, -b)];
    }
    case "polygon": {
      const xs = shape.pointsMm.map(([x]) => x);
      const ys = shape.pointsMm.map(([, y]) => y);
      const [left, right, bottom, top] = [Math.min(...xs), Math.max(...xs), Math.min(...ys), Math.max(...ys)];
      const places: Place[] = [];
      for (let i = 1; i < LOOKS; i++) {
        for (let j = 1; j < LOOKS; j++)
          places.push(inTray(part, left + ((right - left) * i) / LOOKS, bottom + ((top - bottom) * j) / LOOKS));
      }
      return places;
    }
  }
}

/**
 * Places (mm, rounded) that check the loose conductors: on the metal of each, and in the water that a ring, a frame or an
 * open ring of at least half a turn encloses, where all is at the metal's potential. A part too thin or too small gets none.
 */
export function checkPlaces(setup: Setup): readonly Place[] {
  const shapes = setup.parts.map(outlined);
  const holdsWater = openWaterOf(setup);
  return setup.parts.flatMap((part, index) => {
    if (part.role !== "floating") return [];
    const { placed, loops, box } = shapes[index];
    const onMetal = roomiest(setup, metalCandidates(part), ([x, y]) => -signedDistance(placed, x, y, loops), ON_METAL_MM);
    // What lies outside the part's box is farther from its hollow than the part itself.
    const nearby = shapes.filter(({ box: other }) => boxGapMm(other, box) === 0);
    const within = inHollow(setup, part, nearby, holdsWater);
    return [onMetal, within].filter((place) => place !== null);
  });
}
