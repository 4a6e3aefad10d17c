import type { Setup } from "../../../shared-types/setup";
import { texts } from "../../texts/texts";
import { type BoxOf, type Edit, isPart, namesOf, type Thing, thingsById, tidyDeg, tidyMm } from "../edit";
import { freeCopies } from "../holding";
import { freshId } from "./parts";
import { boxOfAll } from "./placing";

/** Copies of things in a regular order: along a row, or around a centre. Counts include the original; lengths in mm, angles in degrees. */

type Placed = Pick<Thing, "xMm" | "yMm" | "turnDeg">;

function copies(
  setup: Setup,
  ids: readonly string[],
  count: number,
  label: (names: string) => string,
  placeOf: (thing: Thing, copy: number, all: readonly Thing[]) => Placed,
): Edit {
  return {
    name: "copies",
    label: label(namesOf(setup, ids)),
    apply: (before) => {
      const things = thingsById(before, ids);
      if (things.length === 0 || count < 2) return before;
      const taken: string[] = [];
      const groups: string[] = [];
      const made = Array.from({ length: count - 1 }, (_, index) => index + 1).flatMap((copy) => {
        const free = freeCopies(before, groups);
        return things.map((original): Thing => {
          const thing = free(original);
          const id = freshId(before, taken);
          taken.push(id);
          const { xMm, yMm, turnDeg } = placeOf(thing, copy, things);
          const place = { id, xMm: tidyMm(xMm), yMm: tidyMm(yMm), turnDeg: tidyDeg(turnDeg) };
          return isPart(thing)
            ? { ...thing, ...place, name: thing.name === "" ? "" : `${thing.name} ${copy + 1}`.slice(0, 80) }
            : { ...thing, ...place };
        });
      });
      const slabs = made.flatMap((thing) => (isPart(thing) ? [] : [thing]));
      return {
        ...before,
        parts: [...before.parts, ...made.filter(isPart)],
        water: slabs.length === 0 ? before.water : { ...before.water, slabs: [...before.water.slabs, ...slabs] },
      };
    },
  };
}

/** @returns `count` things in a row, each set off from the one before by a distance. */
export const copyAlongRow = (setup: Setup, ids: readonly string[], count: number, byXMm: number, byYMm: number): Edit =>
  copies(setup, ids, count, texts.document.steps.row, ({ xMm, yMm, turnDeg }, copy) => ({
    xMm: xMm + copy * byXMm,
    yMm: yMm + copy * byYMm,
    turnDeg,
  }));

/** @returns `count` things evenly around a centre, each turned to face it as the first does. */
export function copyAroundCentre(setup: Setup, ids: readonly string[], count: number, centreMm: readonly [number, number]): Edit {
  return copies(setup, ids, count, texts.document.steps.ring, ({ xMm, yMm, turnDeg }, copy) => {
    const angle = (2 * Math.PI * copy) / count;
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    const [dx, dy] = [xMm - centreMm[0], yMm - centreMm[1]];
    return { xMm: centreMm[0] + c * dx - s * dy, yMm: centreMm[1] + s * dx + c * dy, turnDeg: turnDeg + (360 * copy) / count };
  });
}

/** @returns how far apart copies in a row must be set so that so much stays clear between their boxes, mm along x. */
export function rowStepMm(setup: Setup, ids: readonly string[], clearMm: number, boxOf: BoxOf): number {
  const box = boxOfAll(thingsById(setup, ids), boxOf);
  return box === null ? clearMm : box[2] - box[0] + clearMm;
}
