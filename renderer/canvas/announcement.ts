import type { DocumentState } from "../document/document";
import { thingById, thingName, thingsOf } from "../document/edit";
import { sizeText } from "../document/number-text";
import { texts } from "../texts/texts";
import { placeWords } from "./describe-thing";

const words = texts.canvas.said;

/** The one thing whose place or size a step changed, in its new state; "" where it was another kind of step. */
function newState(now: DocumentState, before: DocumentState): string {
  const changed = thingsOf(now.setup).filter((thing) => thingById(before.setup, thing.id) !== thing);
  const [only] = changed;
  if (only === undefined || changed.length > 1) return "";
  const old = thingById(before.setup, only.id);
  const resized = old !== undefined && old.shape !== only.shape;
  return `${resized ? `${sizeText(only.shape)}, ` : ""}${placeWords(only)}`;
}

/**
 * What a listener should hear after the document changed: finished steps, undo and redo, refusals, and what is selected.
 * Previews of a drag are silent; its end is heard.
 * @returns a sentence, or null when there is nothing to say.
 */
export function announcement(now: DocumentState, before: DocumentState): string | null {
  const [refusal] = now.refused;
  if (refusal !== undefined && now.refused !== before.refused) return words.refused(refusal.message);
  if (now.drag !== null) return null;
  const start = before.drag === null ? before : { ...before, setup: before.drag.before };
  if (now.setup !== start.setup) {
    const undone = now.future.length > start.future.length;
    const label = undone ? now.future.at(-1)?.label : now.past.at(-1)?.label;
    if (label === undefined) return null;
    const redone = !undone && now.future.length < start.future.length && start.future.at(-1)?.label === label;
    if (undone) return words.undone(label);
    const done = redone ? words.redone(label) : words.done(label);
    const state = newState(now, start);
    return state === "" ? done : words.withState(done, state);
  }
  if (now.selection === before.selection) return null;
  const [id] = now.selection;
  const thing = id === undefined ? undefined : thingById(now.setup, id);
  if (thing === undefined) return words.nothingSelected;
  return now.selection.length === 1 ? words.selected(thingName(thing), placeWords(thing)) : words.manySelected(now.selection.length);
}
