import type { Host } from "../../shared-types/host";
import { setupText } from "../../shared-types/parse-setup";
import { type Document, isDirty } from "./document";

/** Where the draft of this window's setup is kept in case the window goes down: the host is one. */
export type DraftStore = Pick<Host, "writeDraft" | "clearDraft">;

/** Runs something later. @returns a way to call it off. */
export type Later = (run: () => void, afterMs: number) => () => void;

/** @returns a Later on the clock of the window. */
export const onTheClock: Later = (run, afterMs) => {
  const timer = setTimeout(run, afterMs);
  return () => clearTimeout(timer);
};

/** A draft is never older than this while the setup is being edited, ms (the promise to the user is 2 s). */
export const DRAFT_AFTER_MS = 1000;

/**
 * Keeps a draft of the unsaved setup, and takes it away once the setup is saved. Edits in quick succession make one draft.
 * @returns stop: writes what is still outstanding and ends the keeping.
 */
export function keepDraft(
  document: Document,
  drafts: DraftStore,
  onFault: (reason: unknown) => void,
  later: Later = onTheClock,
): () => Promise<void> {
  let callOff: (() => void) | null = null;
  let writing: Promise<void> = Promise.resolve();

  function write(): Promise<void> {
    callOff?.();
    callOff = null;
    const state = document.getState();
    const task = (): Promise<void> =>
      isDirty(state)
        ? drafts.writeDraft({ title: state.setup.title, handle: state.file?.handle ?? null, text: setupText(state.setup) })
        : drafts.clearDraft();
    // One after the other, so that an older draft can never overtake a newer one.
    writing = writing.then(task).catch(onFault);
    return writing;
  }

  const unsubscribe = document.subscribe((state, before) => {
    if (state.setup === before.setup && state.saved === before.saved && state.file === before.file) return;
    callOff ??= later(() => void write(), DRAFT_AFTER_MS);
  });
  return () => {
    unsubscribe();
    return callOff === null ? writing : write();
  };
}
