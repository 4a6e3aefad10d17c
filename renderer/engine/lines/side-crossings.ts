import type { Setup } from "../../../shared-types/setup";
import { radians } from "../../../shared-types/units";
import type { PotentialField } from "../field/potential-field";
import { crossingsOf } from "../geometry/crossings-of-pieces";
import type { Edge, Piece } from "../geometry/outline";
import { boxGapMm, outlined } from "../geometry/overlap";
import type { Side } from "./grid-stretches";

/** A correction below this is applied without another reading: Newton's next one would be of its square. Mm. */
const LAST_CORRECTION_MM = 0.05;
const MOST_READINGS = 6;

/** Finds where lines cross the sides between grid nodes. */
export interface SideCrossings {
  /** @returns whether a line can cross the side: false where an insulator thinner than a cell lies across it. */
  readonly passable: (side: Side) => boolean;
  /** @returns x and y (mm) of the place on the side where the potential has the level. */
  readonly place: (side: Side, level: number) => readonly [number, number];
}

/** Share of the way from the start of a side at which the nearest piece crosses it; 1 when none does. */
function firstCrossing(way: Edge, pieces: readonly Piece[]): number {
  const length = Math.hypot(way.x1 - way.x0, way.y1 - way.y0);
  let first = 1;
  for (const piece of pieces)
    for (const [x, y] of crossingsOf(way, piece)) first = Math.min(first, Math.hypot(x - way.x0, y - way.y0) / length);
  return first;
}

/**
 * @param exact whether each place is found with readings of the field; else it is interpolated between the nodes,
 * from the metal's true surface where one of them lies in a conductor.
 */
export function sideCrossings(field: PotentialField, setup: Setup, exact: boolean): SideCrossings {
  const { columns, pitchXMm, pitchYMm, volts, owner } = field.picture;
  const parts = setup.parts.map((part) => ({ ...outlined(part), role: part.role }));
  const pieces = parts.map(({ loops }) => loops.flat());
  const insulators = parts.flatMap(({ role, box }, index) => (role === "insulator" ? [{ box, pieces: pieces[index] }] : []));

  const wayOf = (side: Side): Edge => {
    const node = side >> 1;
    const x0 = (node % columns) * pitchXMm;
    const y0 = Math.floor(node / columns) * pitchYMm;
    return (side & 1) === 0 ? { kind: "edge", x0, y0, x1: x0 + pitchXMm, y1: y0 } : { kind: "edge", x0, y0, x1: x0, y1: y0 + pitchYMm };
  };

  const passable = (side: Side): boolean => {
    if (insulators.length === 0) return true;
    const way = wayOf(side);
    return insulators.every(({ box, pieces: outline }) => {
      if (boxGapMm([way.x0, way.y0, way.x1, way.y1], box) > 0) return true;
      return outline.every((piece) => crossingsOf(way, piece).length === 0);
    });
  };

  const place = (side: Side, level: number): readonly [number, number] => {
    const first = side >> 1;
    const second = first + ((side & 1) === 0 ? 1 : columns);
    const way = wayOf(side);
    const dx = way.x1 - way.x0;
    const dy = way.y1 - way.y0;
    // In metal the potential is that of its surface: the change happens in the water between.
    let low = 0;
    let high = 1;
    if (owner[first] >= 0) low = 1 - firstCrossing({ kind: "edge", x0: way.x1, y0: way.y1, x1: way.x0, y1: way.y0 }, pieces[owner[first]]);
    if (owner[second] >= 0) high = firstCrossing(way, pieces[owner[second]]);
    const rising = volts[second] > volts[first];
    let share = low + ((high - low) * (level - volts[first])) / (volts[second] - volts[first]);
    if (exact) {
      for (let count = 0; count < MOST_READINGS; count++) {
        const reading = field.read(way.x0 + share * dx, way.y0 + share * dy);
        if (reading.volts === null || reading.inside !== null) break;
        const excess = reading.volts - level;
        if (excess > 0 === rising) high = share;
        else low = share;
        const angle = radians(reading.directionDeg);
        const perShare = (-reading.fieldVPerM / 1000) * (Math.cos(angle) * dx + Math.sin(angle) * dy);
        const corrected = share - excess / perShare;
        const inBracket = corrected >= low && corrected <= high;
        const change = Math.abs(corrected - share) * (dx + dy);
        share = inBracket ? corrected : (low + high) / 2;
        if (inBracket && change < LAST_CORRECTION_MM) break;
      }
    }
    return [way.x0 + share * dx, way.y0 + share * dy];
  };

  return { passable, place };
}
