import type { Problem } from "../../shared-types/result";
import type { Setup } from "../../shared-types/setup";
import { texts } from "../texts/texts";
import { isPart, type Thing, thingName, thingsById, thingsOf } from "./edit";

/** Parts and slabs that are held: grouped ones are selected and moved as one, locked ones stay where they are until they are unlocked. */

/** @returns the ids with those of every thing that is in a group with one of them, in the setup's order after the given ones. */
export function withGroups(setup: Setup, ids: readonly string[]): readonly string[] {
  const groups = new Set(thingsById(setup, ids).flatMap(({ group }) => (group === undefined ? [] : [group])));
  if (groups.size === 0) return ids;
  const joined = thingsOf(setup).filter(({ id, group }) => group !== undefined && groups.has(group) && !ids.includes(id));
  return [...ids, ...joined.map(({ id }) => id)];
}

/** @returns the selection with a thing (and its group) added, or dropped where it was selected. */
export function toggled(setup: Setup, selection: readonly string[], id: string): readonly string[] {
  const own = withGroups(setup, [id]);
  return selection.includes(id) ? selection.filter((one) => !own.includes(one)) : [...selection, ...own];
}

/** @returns a group's name that no thing of the setup bears yet, nor any of `taken`: "1", "2" … */
export function freshGroup(setup: Setup, taken: readonly string[] = []): string {
  const used = new Set([...thingsOf(setup).map(({ group }) => group), ...taken]);
  for (let number = 1; ; number++) if (!used.has(String(number))) return String(number);
}

/**
 * @param taken names of groups that other copies bear already; those given here are added.
 * @returns a function that makes copies free: unlocked, and in groups of their own that hold together as the originals do.
 */
export function freeCopies(
  setup: Setup,
  taken: string[] = [],
): <Kind extends { readonly group?: string | undefined; readonly locked?: boolean | undefined }>(thing: Kind) => Kind {
  const groups = new Map<string, string>();
  return (thing) => {
    const { group, locked: _, ...free } = thing;
    if (group === undefined) return free as typeof thing;
    const own = groups.get(group) ?? freshGroup(setup, taken);
    if (!groups.has(group)) taken.push(own);
    groups.set(group, own);
    return { ...free, group: own } as typeof thing;
  };
}

const moved = (before: Thing, after: Thing): boolean =>
  before.xMm !== after.xMm || before.yMm !== after.yMm || before.turnDeg !== after.turnDeg || before.shape !== after.shape;

/** Where a refusal about a locked thing says it is. */
export const LOCKED = "locked";

/** @returns why an edit is refused that moves, resizes or takes away what is locked; empty where it does not. */
export function lockedProblems(before: Setup, after: Setup): readonly Problem[] {
  const locked = thingsOf(before).filter((thing) => thing.locked === true);
  if (locked.length === 0) return [];
  const now = new Map(thingsOf(after).map((thing) => [thing.id, thing]));
  const touched = locked.filter((thing) => {
    const next = now.get(thing.id);
    return (
      next === undefined ||
      (next !== thing && moved(thing, next)) ||
      (!isPart(thing) && !isPart(next) && next.thicknessMm !== thing.thicknessMm)
    );
  });
  return touched.map((thing) => ({ where: LOCKED, message: texts.document.locked(thingName(thing)) }));
}
