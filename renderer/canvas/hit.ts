import type { Setup } from "../../shared-types/setup";
import type { BoxMm, Thing } from "../document/edit";
import { type OutlinedShape, outlined } from "../engine/geometry/overlap";
import { covers, distanceToOutline } from "../engine/geometry/signed-distance";
import type { Handle } from "./handles";
import { type Place, toScreen, type View } from "./view";

/** A thing with its outline, worked out once for as long as the thing stays the same object. */
const known = new WeakMap<Thing, OutlinedShape>();

/** @returns a thing's outline and box; things are immutable, so that it is worked out once. */
export function outlinedThing(thing: Thing): OutlinedShape {
  const before = known.get(thing);
  if (before !== undefined) return before;
  const now = outlined(thing);
  known.set(thing, now);
  return now;
}

/** @returns the box that a thing covers, mm: what the document's commands measure by. */
export const boxOfThing = (thing: Thing): BoxMm => outlinedThing(thing).box;

/** @returns parts and slabs in the order in which they lie on each other, the topmost first. */
export const topDown = (setup: Setup): readonly Thing[] => [...[...setup.parts].reverse(), ...[...setup.water.slabs].reverse()];

/**
 * @param reachMm how near counts as on it, so that a thin wire can be caught.
 * @returns the thing under a place (mm): the topmost that covers it, else the nearest within reach, else null.
 */
export function thingAt(setup: Setup, [x, y]: Place, reachMm: number): Thing | null {
  let nearest: Thing | null = null;
  let nearestMm = reachMm;
  for (const thing of topDown(setup)) {
    const { box, loops } = outlinedThing(thing);
    if (x < box[0] - reachMm || y < box[1] - reachMm || x > box[2] + reachMm || y > box[3] + reachMm) continue;
    if (covers(thing, x, y)) return thing;
    const distance = distanceToOutline(loops, x, y);
    if (distance < nearestMm) {
      nearest = thing;
      nearestMm = distance;
    }
  }
  return nearest;
}

/** @returns the ids of the things that lie wholly within a box (mm). */
export function thingsWithin(setup: Setup, [left, bottom, right, top]: BoxMm): readonly string[] {
  return [...setup.parts, ...setup.water.slabs]
    .filter((thing) => {
      const box = boxOfThing(thing);
      return box[0] >= left && box[1] >= bottom && box[2] <= right && box[3] <= top;
    })
    .map(({ id }) => id);
}

/** A fingertip or a shaky hand hits a handle within this, px (WCAG 2.2 asks for targets of 24 px). */
export const HANDLE_REACH_PX = 12;

/** @returns the handle nearest to a place on the stage (px) within reach, or null. */
export function handleAt(handles: readonly Handle[], view: View, [x, y]: Place): Handle | null {
  let nearest: Handle | null = null;
  let nearestPx = HANDLE_REACH_PX;
  for (const handle of handles) {
    const [hx, hy] = toScreen(view, handle.shownXMm, handle.shownYMm);
    const distance = Math.hypot(hx - x, hy - y);
    if (distance <= nearestPx) {
      nearest = handle;
      nearestPx = distance;
    }
  }
  return nearest;
}
