import type { Part, Setup, Slab } from "../../shared-types/setup";
import { texts } from "../texts/texts";

const words = texts.document.things;

/** One edit of a setup: pure, so that undo, redo and a drag's preview need nothing but the setups before and after. */
export interface Edit {
  /** What kind of edit it is, such as "move". */
  readonly name: string;
  /** What a person reads beside Undo, such as "move Left bar". */
  readonly label: string;
  /** @returns the changed setup; the very same object when nothing changes. Not yet validated: the document does that. */
  readonly apply: (setup: Setup) => Setup;
  /** Edits in a row with the same word become one step (a held arrow key); absent: a step of its own. */
  readonly joins?: string;
}

/** What lies in the tray and can be picked up: a part or a slab. Their ids never collide. */
export type Thing = Part | Slab;

/** Left, bottom, right and top of what a shape covers, mm. */
export type BoxMm = readonly [number, number, number, number];
/** Measures a thing; the geometry lives in the engine, so that callers hand it in. */
export type BoxOf = (thing: Thing) => BoxMm;

/** @returns whether a thing is a part (else it is a slab). */
export const isPart = (thing: Thing): thing is Part => "role" in thing;

/** @returns all parts, then all slabs, of a setup. */
export const thingsOf = (setup: Setup): readonly Thing[] => [...setup.parts, ...setup.water.slabs];

/** @returns the part or slab with that id, or undefined. */
export const thingById = (setup: Setup, id: string): Thing | undefined => thingsOf(setup).find((thing) => thing.id === id);

/** @returns the things with these ids, in the setup's order. */
export const thingsById = (setup: Setup, ids: readonly string[]): readonly Thing[] => thingsOf(setup).filter(({ id }) => ids.includes(id));

/** @returns what a person calls a thing: its name, else its kind and id. */
export function thingName(thing: Thing): string {
  if (isPart(thing)) return thing.name.trim() || words.nameless(thing.shape.kind, thing.id);
  return words.slab(thing.id);
}

/** @returns "Left bar", "Left bar and Right bar", "4 parts": the things with these ids, for a label. */
export function namesOf(setup: Setup, ids: readonly string[]): string {
  const things = thingsById(setup, ids);
  const [first, second] = things;
  if (first !== undefined && things.length === 1) return thingName(first);
  if (first !== undefined && second !== undefined && things.length === 2) return words.both(thingName(first), thingName(second));
  const slabs = things.filter((thing) => !isPart(thing)).length;
  return words.many(things.length, slabs === things.length ? "slabs" : slabs === 0 ? "parts" : "both");
}

/** What of a thing an edit of its place or shape may change. */
export type Placing = Partial<Pick<Part, "xMm" | "yMm" | "turnDeg" | "shape">>;

/** @returns the setup with the place or shape of the things with these ids changed; all else is shared with the setup before. */
export function placeThings(setup: Setup, ids: readonly string[], change: (thing: Thing) => Placing): Setup {
  const slabs = setup.water.slabs.some(({ id }) => ids.includes(id))
    ? setup.water.slabs.map((slab) => (ids.includes(slab.id) ? { ...slab, ...change(slab) } : slab))
    : setup.water.slabs;
  return {
    ...setup,
    parts: setup.parts.map((part) => (ids.includes(part.id) ? { ...part, ...change(part) } : part)),
    water: slabs === setup.water.slabs ? setup.water : { ...setup.water, slabs },
  };
}

/** @returns the setup with the parts with these ids changed. */
export function changeParts(setup: Setup, ids: readonly string[], change: (part: Part) => Part): Setup {
  return { ...setup, parts: setup.parts.map((part) => (ids.includes(part.id) ? change(part) : part)) };
}

/** Finer than any hand places a part: keeps the file free of digits that mean nothing, mm. */
const FINEST_MM = 0.01;
const FINEST_DEG = 0.01;

/** @returns a length rounded to 0.01 mm. */
export const tidyMm = (lengthMm: number): number => Math.round(lengthMm / FINEST_MM) / (1 / FINEST_MM);

/** @returns an angle brought to 0 ≤ angle < 360 and rounded to 0.01°. */
export function tidyDeg(angleDeg: number): number {
  const rounded = Math.round(angleDeg / FINEST_DEG) / (1 / FINEST_DEG);
  return ((rounded % 360) + 360) % 360;
}
