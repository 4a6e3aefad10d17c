import type { Part, PartRole, Setup, Shape } from "../../../shared-types/setup";
import { texts } from "../../texts/texts";
import {
  type BoxMm,
  type BoxOf,
  changeParts,
  type Edit,
  isPart,
  namesOf,
  type Thing,
  thingById,
  thingsById,
  thingsOf,
  tidyMm,
} from "../edit";
import { freeCopies } from "../holding";
import type { ShelfPart } from "../shelf-part";

const { kinds, steps } = texts.document;

/** Edits that add or take away parts, and those of what a part is. */

/** @returns the first of A, B … Z, AA, AB … that no part or slab has, nor any of `taken`. */
export function freshId(setup: Setup, taken: readonly string[] = []): string {
  const used = new Set([...thingsOf(setup).map(({ id }) => id), ...taken]);
  for (let number = 0; ; number++) {
    let id = "";
    for (let rest = number; rest >= 0; rest = Math.floor(rest / 26) - 1) id = String.fromCharCode(65 + (rest % 26)) + id;
    if (!used.has(id)) return id;
  }
}

/** An electrode is what a tray lacks first: one at each lead; what comes after floats. */
function firstRole(setup: Setup): PartRole {
  return setup.parts.filter(({ role }) => role === "electrode").length < 2 ? "electrode" : "floating";
}

/** The lead that no electrode uses yet: common first, then live. */
function firstTap(setup: Setup): number {
  const taps = setup.parts.flatMap((part) => (part.role === "electrode" ? [part.tap] : []));
  return taps.includes(0) && !taps.includes(1) ? 1 : 0;
}

const withRole = (part: Omit<Part, "role" | "tap">, role: PartRole, tap: number): Part =>
  role === "electrode" ? { ...part, role, tap } : { ...part, role };

/** @returns a new part from the shelf with its centre at a place (mm). It is selected afterwards. */
export function addPart(setup: Setup, from: ShelfPart, xMm: number, yMm: number): Edit {
  const name = kinds[from.shape.kind];
  return {
    name: "add",
    label: steps.add(from.shape.kind),
    apply: (before) => {
      const id = freshId(before);
      const part = {
        id,
        name: `${name} ${id}`,
        xMm: tidyMm(xMm),
        yMm: tidyMm(yMm),
        turnDeg: 0,
        heightMm: from.heightMm ?? before.parts[0]?.heightMm ?? 24,
        material: from.material ?? (from.role === "insulator" ? "acrylic" : "brass"),
        shape: from.shape,
      };
      return { ...before, parts: [...before.parts, withRole(part, from.role ?? firstRole(setup), firstTap(before))] };
    },
  };
}

/** Room that a part put down by key leaves to others, mm. */
const ROOM_MM = 4;
const meet = (a: BoxMm, b: BoxMm, roomMm: number): boolean =>
  a[0] < b[2] + roomMm && b[0] < a[2] + roomMm && a[1] < b[3] + roomMm && b[1] < a[3] + roomMm;

/**
 * A place for a shape that is put down by key: as near to the tray's middle as it lies clear of everything, on whole millimetres.
 * @param within the tray's box, mm.
 * @returns [x, y] in mm; the middle of the tray when there is no free place.
 */
export function freePlaceMm(setup: Setup, shape: Shape, boxOf: BoxOf, within: BoxMm): readonly [number, number] {
  const [left, bottom, right, top] = boxOf({ id: "", xMm: 0, yMm: 0, turnDeg: 0, thicknessMm: 1, shape });
  const [middleX, middleY] = [Math.round((within[0] + within[2]) / 2), Math.round((within[1] + within[3]) / 2)];
  const others = setup.parts.map(boxOf);
  const free = (x: number, y: number): boolean => {
    const box: BoxMm = [x + left, y + bottom, x + right, y + top];
    const inside = box[0] >= within[0] && box[1] >= within[1] && box[2] <= within[2] && box[3] <= within[3];
    return inside && others.every((other) => !meet(box, other, ROOM_MM));
  };
  const stepMm = Math.max(5, Math.round((within[2] - within[0]) / 80));
  const reach = Math.ceil(Math.hypot(within[2] - within[0], within[3] - within[1]) / 2 / stepMm);
  for (let ring = 0; ring <= reach; ring++) {
    for (let i = -ring; i <= ring; i++) {
      for (const [across, up] of [
        [i, ring],
        [i, -ring],
        [ring, i],
        [-ring, i],
      ] as const) {
        const [x, y] = [middleX + across * stepMm, middleY + up * stepMm];
        if (free(x, y)) return [x, y];
      }
    }
  }
  return [middleX, middleY];
}

/** @returns copies of things, set off by a distance (mm), with ids and names of their own. They are selected afterwards. */
export function duplicateThings(setup: Setup, ids: readonly string[], byXMm = 10, byYMm = -10): Edit {
  return {
    name: "duplicate",
    label: steps.duplicate(namesOf(setup, ids)),
    apply: (before) => {
      const taken: string[] = [];
      const free = freeCopies(before);
      const copied = <Kind extends Thing>(original: Kind): Kind => {
        const thing = free(original);
        const id = freshId(before, taken);
        taken.push(id);
        const place = { id, xMm: tidyMm(thing.xMm + byXMm), yMm: tidyMm(thing.yMm + byYMm) };
        return isPart(thing) ? { ...thing, ...place, name: copyName(before, thing, id) } : { ...thing, ...place };
      };
      const things = thingsById(before, ids);
      if (things.length === 0) return before;
      const parts = things.filter(isPart).map(copied);
      const slabs = before.water.slabs.filter((slab) => ids.includes(slab.id)).map(copied);
      return {
        ...before,
        parts: [...before.parts, ...parts],
        water: slabs.length === 0 ? before.water : { ...before.water, slabs: [...before.water.slabs, ...slabs] },
      };
    },
  };
}

/** "Bar A" becomes "Bar C"; "Left bar" becomes "Left bar C": no two parts on paper share a name. */
function copyName(setup: Setup, part: Part, id: string): string {
  const stem = part.name.replace(new RegExp(`\\s+(?:${part.id.replace(/[^\w]/g, "\\$&")}|[A-Z]{1,2})$`), "") || kinds[part.shape.kind];
  const name = `${stem} ${id}`.slice(0, 80);
  return setup.parts.some((other) => other.name === name) ? "" : name;
}

/** @returns the removal of parts and slabs. */
export function removeThings(setup: Setup, ids: readonly string[]): Edit {
  return {
    name: "delete",
    label: steps.delete(namesOf(setup, ids)),
    apply: (before) => {
      if (!ids.some((id) => thingById(before, id) !== undefined)) return before;
      const slabs = before.water.slabs.filter(({ id }) => !ids.includes(id));
      return {
        ...before,
        parts: before.parts.filter(({ id }) => !ids.includes(id)),
        water: slabs.length === before.water.slabs.length ? before.water : { ...before.water, slabs },
      };
    },
  };
}

const edit = (
  setup: Setup,
  ids: readonly string[],
  name: string,
  label: (names: string) => string,
  change: (part: Part) => Part,
): Edit => ({
  name,
  label: label(namesOf(setup, ids)),
  apply: (before) => changeParts(before, ids, change),
});

/** @returns parts made electrodes, floating conductors or insulators. A new electrode takes the lead that is not in use yet. */
export function setRole(setup: Setup, ids: readonly string[], role: PartRole): Edit {
  return edit(
    setup,
    ids,
    "role",
    (names) => steps.role(names, role),
    (part) => {
      if (part.role === role) return part;
      const { role: _, ...same } = part;
      if (!("tap" in same)) return withRole(same, role, firstTap(setup));
      const { tap: __, ...untapped } = same;
      return withRole(untapped, role, firstTap(setup));
    },
  );
}

/** @returns electrodes wired to a tap (0 = common or negative lead, 1 = live or positive lead); other parts stay as they are. */
export function setTap(setup: Setup, ids: readonly string[], tap: number): Edit {
  return edit(setup, ids, "tap", steps.wire, (part) => (part.role === "electrode" ? { ...part, tap } : part));
}

/** @returns parts made of another material. */
export const setMaterial = (setup: Setup, ids: readonly string[], material: string): Edit =>
  edit(setup, ids, "material", steps.material, (part) => ({ ...part, material }));

/** @returns parts of another height, mm. */
export const setHeight = (setup: Setup, ids: readonly string[], heightMm: number): Edit =>
  edit(setup, ids, "height", steps.height, (part) => ({ ...part, heightMm }));

/** @returns one part with another name. */
export const setName = (setup: Setup, id: string, name: string): Edit =>
  edit(setup, [id], "name", steps.rename, (part) => ({ ...part, name }));
