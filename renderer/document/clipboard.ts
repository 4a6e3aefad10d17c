import { z } from "zod";
import type { Problem, Result } from "../../shared-types/result";
import { failure, success } from "../../shared-types/result";
import type { Part, Setup, Slab } from "../../shared-types/setup";
import { texts } from "../texts/texts";
import { freshId } from "./commands/parts";
import { type Edit, isPart, thingsById, tidyMm } from "./edit";
import { freeCopies } from "./holding";

const words = texts.document.clipping;

/** Parts and slabs as text: what is copied can be read by a person, pasted into another window, or kept in a mail. */

const FORMAT = "fieldtray.things";

const held = { group: z.string().optional(), locked: z.boolean().optional() };
/** Only the frame is checked here; each thing is checked by the document, against the schema of setups, when it is pasted. */
const clippingSchema = z.strictObject({
  format: z.literal(FORMAT),
  version: z.literal(1),
  parts: z.array(z.looseObject({ id: z.string(), xMm: z.number(), yMm: z.number(), name: z.string().default(""), ...held })),
  slabs: z.array(z.looseObject({ id: z.string(), xMm: z.number(), yMm: z.number(), ...held })),
});
type Clipping = z.infer<typeof clippingSchema>;

/** @returns the things with these ids as indented JSON; null when there are none. */
export function thingsText(setup: Setup, ids: readonly string[]): string | null {
  const things = thingsById(setup, ids);
  if (things.length === 0) return null;
  const clipping = { format: FORMAT, version: 1, parts: things.filter(isPart), slabs: things.filter((thing) => !isPart(thing)) };
  return `${JSON.stringify(clipping, null, 2)}\n`;
}

/** @returns the clipping in a text; a failure without problems where the text is something else altogether. */
function readClipping(text: string): Result<Clipping> {
  let data: unknown;
  try {
    data = JSON.parse(text);
  } catch {
    return { ok: false, problems: [] };
  }
  if (typeof data !== "object" || data === null || Reflect.get(data, "format") !== FORMAT) return { ok: false, problems: [] };
  const parsed = clippingSchema.safeParse(data);
  if (parsed.success) return success(parsed.data);
  const problems: readonly Problem[] = parsed.error.issues.map(({ path, message }) => ({
    where: path.join("."),
    message: words.damagedAt(path.join("."), message),
  }));
  return problems.length > 0 ? { ok: false, problems } : failure("", words.damaged);
}

/** A pasted thing beside what already lies in its place, mm. */
const ASIDE_MM = [10, -10] as const;
const MOST_STEPS = 100;

/** How often things must step aside so that none comes to lie exactly on a thing that is there. */
function stepsAside(setup: Setup, things: readonly { readonly xMm: number; readonly yMm: number }[]): number {
  const there = [...setup.parts, ...setup.water.slabs];
  for (let steps = 0; steps < MOST_STEPS; steps++) {
    const hidden = things.some(({ xMm, yMm }) =>
      there.some((thing) => Math.hypot(thing.xMm - xMm - steps * ASIDE_MM[0], thing.yMm - yMm - steps * ASIDE_MM[1]) < 1),
    );
    if (!hidden) return steps;
  }
  return 0;
}

/**
 * @returns the edit that pastes copied things where they were copied, or beside it where something lies there already, with ids of
 * their own where theirs are taken; null for a text that holds none. They are selected afterwards.
 */
export function pasteThings(text: string): Result<Edit> | null {
  const read = readClipping(text);
  if (!read.ok) return read.problems.length === 0 ? null : read;
  const { parts, slabs } = read.value;
  if (parts.length + slabs.length === 0) return null;
  const count = parts.length + slabs.length;
  return success({
    name: "paste",
    label: texts.document.steps.paste(count, slabs.length === 0 ? "part" : parts.length === 0 ? "slab" : "thing"),
    apply: (before) => {
      const taken: string[] = [];
      const steps = stepsAside(before, [...parts, ...slabs]);
      const names = new Set(before.parts.map(({ name }) => name));
      const free = freeCopies(before);
      const placed = <Kind extends Clipping["parts"][number] | Clipping["slabs"][number]>(clipped: Kind) => {
        const thing = free(clipped);
        const used = [...before.parts, ...before.water.slabs].some(({ id }) => id === thing.id) || taken.includes(thing.id);
        const id = used ? freshId(before, taken) : thing.id;
        taken.push(id);
        return { ...thing, id, xMm: tidyMm(thing.xMm + steps * ASIDE_MM[0]), yMm: tidyMm(thing.yMm + steps * ASIDE_MM[1]) };
      };
      const renamed = <Kind extends { readonly id: string; readonly name: string }>(part: Kind): Kind =>
        names.has(part.name) ? { ...part, name: `${part.name.replace(/\s+[A-Z]{1,2}$/, "")} ${part.id}`.slice(0, 80) } : part;
      // Checked as a whole by the document, as every edit is.
      const newParts = parts.map((part) => renamed(placed(part))) as unknown as readonly Part[];
      const newSlabs = slabs.map(placed) as unknown as readonly Slab[];
      return {
        ...before,
        parts: [...before.parts, ...newParts],
        water: newSlabs.length === 0 ? before.water : { ...before.water, slabs: [...before.water.slabs, ...newSlabs] },
      };
    },
  });
}
