import type { Setup } from "../../../shared-types/setup";
import { texts } from "../../texts/texts";
import { type Edit, namesOf, type Thing, thingsById } from "../edit";
import { freshGroup } from "../holding";

const words = texts.document.steps;

/** Edits of what holds things: groups and locks. Neither changes the field, the sheets or the setup's id. */

function change(setup: Setup, ids: readonly string[], held: <Kind extends Thing>(thing: Kind) => Kind): Setup {
  const changed = <Kind extends Thing>(thing: Kind): Kind => (ids.includes(thing.id) ? held(thing) : thing);
  const slabs = setup.water.slabs.some(({ id }) => ids.includes(id));
  return {
    ...setup,
    parts: setup.parts.map(changed),
    water: slabs ? { ...setup.water, slabs: setup.water.slabs.map(changed) } : setup.water,
  };
}

/** @returns whether all things with these ids are locked. */
export const allLocked = (setup: Setup, ids: readonly string[]): boolean => thingsById(setup, ids).every(({ locked }) => locked === true);

/** @returns whether the things with these ids are one whole group. */
export function oneGroup(setup: Setup, ids: readonly string[]): boolean {
  const [first, ...rest] = thingsById(setup, ids);
  return first?.group !== undefined && rest.length > 0 && rest.every(({ group }) => group === first.group);
}

/** @returns things locked where they lie, or unlocked where all of them are locked. */
export function toggleLock(setup: Setup, ids: readonly string[]): Edit {
  const unlock = allLocked(setup, ids);
  return {
    name: "lock",
    label: (unlock ? words.unlock : words.lock)(namesOf(setup, ids)),
    apply: (before) =>
      change(before, ids, (thing) => {
        if (!unlock) return { ...thing, locked: true };
        const { locked: _, ...free } = thing;
        return free as typeof thing;
      }),
  };
}

/** @returns two or more things joined into a group, or a whole group taken apart. */
export function toggleGroup(setup: Setup, ids: readonly string[]): Edit {
  const apart = oneGroup(setup, ids);
  return {
    name: "group",
    label: (apart ? words.ungroup : words.group)(namesOf(setup, ids)),
    apply: (before) => {
      if (thingsById(before, ids).length < 2) return before;
      const name = freshGroup(before);
      return change(before, ids, (thing) => {
        if (!apart) return { ...thing, group: name };
        const { group: _, ...free } = thing;
        return free as typeof thing;
      });
    },
  };
}
