import type { Setup } from "../../../shared-types/setup";
import { texts } from "../../texts/texts";
import { type Edit, namesOf, placeThings, type Thing, thingById, tidyMm } from "../edit";

/** The exact clear gap between two things, mm; 0 where they touch or overlap. The geometry lives in the engine. */
export type GapOf = (a: Thing, b: Thing) => number;

/** Beyond any tray, mm. */
const FAR_MM = 8000;
const HALVINGS = 60;

/** The direction from one thing to another: straight along an axis where their middles lie on a line with it, else between the middles. */
function directionFrom(fixed: Thing, moving: Thing): readonly [number, number] {
  const [dx, dy] = [moving.xMm - fixed.xMm, moving.yMm - fixed.yMm];
  const distance = Math.hypot(dx, dy);
  return distance === 0 ? [1, 0] : [dx / distance, dy / distance];
}

const shifted = (thing: Thing, [ux, uy]: readonly [number, number], byMm: number): Thing => ({
  ...thing,
  xMm: thing.xMm + ux * byMm,
  yMm: thing.yMm + uy * byMm,
});

/**
 * @returns the move of one thing, along the line between their middles, that leaves exactly `wantedMm` clear between it and another;
 * the other stays. The very setup where that line knows no such place (a disc inside a ring).
 */
export function moveToGap(setup: Setup, movingId: string, fixedId: string, wantedMm: number, gapOf: GapOf): Edit {
  return {
    name: "gap",
    label: texts.document.steps.gap(namesOf(setup, [movingId])),
    apply: (before) => {
      const [moving, fixed] = [thingById(before, movingId), thingById(before, fixedId)];
      if (moving === undefined || fixed === undefined || !(wantedMm >= 0)) return before;
      const direction = directionFrom(fixed, moving);
      const gapAt = (byMm: number): number => gapOf(shifted(moving, direction, byMm), fixed);
      // From where both middles meet outwards the gap only grows once they are clear of each other.
      let near = -Math.hypot(moving.xMm - fixed.xMm, moving.yMm - fixed.yMm);
      let far = FAR_MM;
      for (let halving = 0; halving < HALVINGS; halving++) {
        const middle = (near + far) / 2;
        if (gapAt(middle) > wantedMm) far = middle;
        else near = middle;
      }
      if (Math.abs(gapAt(far) - wantedMm) > 0.05) return before;
      const { xMm, yMm } = shifted(moving, direction, far);
      return placeThings(before, [movingId], () => ({ xMm: tidyMm(xMm), yMm: tidyMm(yMm) }));
    },
  };
}
