import type { Later } from "../../../renderer/document/autosave";
import { createDocument, type Document } from "../../../renderer/document/document";
import type { BoxOf } from "../../../renderer/document/edit";
import { outlined } from "../../../renderer/engine/geometry/overlap";
import { barsWithLooseRing } from "../../../renderer/examples/bars-with-loose-ring";

/** A tray with two bars (A, B) and a loose ring (C). */
export const looseRing = barsWithLooseRing.setup;
export const TRAY_BOX = [0, 0, 300, 200] as const;
export const boxOf: BoxOf = (thing) => outlined(thing).box;
export const openDocument = (): Document => createDocument(looseRing);

/** A clock that only moves when told to. */
export function handClock(): { readonly later: Later; readonly pass: (ms: number) => void } {
  let nowMs = 0;
  let due: { at: number; run: () => void }[] = [];
  return {
    later: (run, afterMs) => {
      const entry = { at: nowMs + afterMs, run };
      due.push(entry);
      return () => {
        due = due.filter((other) => other !== entry);
      };
    },
    pass: (ms) => {
      nowMs += ms;
      const ripe = due.filter(({ at }) => at <= nowMs);
      due = due.filter(({ at }) => at > nowMs);
      for (const { run } of ripe) run();
    },
  };
}

/** @returns the part or fails the test. */
export function part(document: Document, id: string) {
  const found = document.getState().setup.parts.find((one) => one.id === id);
  if (found === undefined) throw new Error(`there is no part ${id}`);
  return found;
}
