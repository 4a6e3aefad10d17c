import { createStore, type StoreApi } from "zustand/vanilla";
import type { FileHandle } from "../../shared-types/host";
import { parseSetup } from "../../shared-types/parse-setup";
import type { Problem, Result } from "../../shared-types/result";
import type { Setup } from "../../shared-types/setup";
import { type Edit, thingsOf } from "./edit";
import { lockedProblems, withGroups } from "./holding";
import { inWords } from "./problem-wording";

/**
 * The open setup: one store that holds the setup, what is selected, the steps that can be undone, and whether the file is behind.
 * Every edit goes through `run` (one step) or through a drag (`startDrag`, `dragTo`, `finishDrag`: many previews, one step).
 * The result of each is validated; a refused edit changes nothing and its reasons are returned and kept in `refused`.
 */

/** Where the setup came from: its file, and what that file holds. */
interface Origin {
  readonly file: FileHandle | null;
  /** The setup that needs no saving: as it is on disk, or as it was opened; null for one brought back from a draft. */
  readonly saved: Setup | null;
}

/** A step that can be undone or redone: its name and the setup that going there brings back. */
interface Step {
  readonly label: string;
  readonly setup: Setup;
  readonly joins: string | undefined;
  /** Only for a step that replaced the whole setup: the other side's file. */
  readonly origin: Origin | null;
}

/** A drag under way: every preview starts again from `before`, so that rounding cannot creep. */
export interface Drag {
  readonly label: string;
  readonly before: Setup;
}

export interface DocumentState {
  readonly setup: Setup;
  /** Ids of the selected parts and slabs, in the order in which they were selected. */
  readonly selection: readonly string[];
  readonly file: FileHandle | null;
  readonly saved: Setup | null;
  readonly past: readonly Step[];
  readonly future: readonly Step[];
  readonly drag: Drag | null;
  /** Whether places and sizes snap to whole millimetres while dragging. */
  readonly snapping: boolean;
  /** Why the newest edit was refused; empty after an edit that went through. */
  readonly refused: readonly Problem[];
}

export interface Document extends Pick<StoreApi<DocumentState>, "getState" | "subscribe" | "getInitialState"> {
  /** Applies an edit as one step. @returns the new setup, or what was wrong with it (then nothing has changed). */
  readonly run: (edit: Edit) => Result<Setup>;
  /** Begins a drag, named as its undo step will be. */
  readonly startDrag: (label: string) => void;
  /** Shows an edit, applied to the setup at the drag's start. A refused one leaves the preview before. */
  readonly dragTo: (edit: Edit) => Result<Setup>;
  /** Ends the drag; what it changed becomes one step. */
  readonly finishDrag: () => void;
  /** Ends the drag and puts everything back. */
  readonly cancelDrag: () => void;
  /** Notes why something could not become an edit at all (a damaged clipping). */
  readonly refuse: (problems: readonly Problem[]) => void;
  /** Ends a run of joined edits (the arrow key was released). */
  readonly settle: () => void;
  readonly undo: () => void;
  readonly redo: () => void;
  readonly select: (ids: readonly string[]) => void;
  readonly setSnapping: (snapping: boolean) => void;
  /**
   * Replaces the whole setup: a file, an example, a new tray, or (`unsaved`) a draft brought back after a crash.
   * Can be undone too, and brings the old file back then.
   */
  readonly replace: (setup: Setup, from: { readonly label: string; readonly file: FileHandle | null; readonly unsaved?: boolean }) => void;
  /** Notes that `setup` has been written to `file`. */
  readonly markSaved: (setup: Setup, file: FileHandle) => void;
}

/** Steps kept for undo. Setups share what did not change, so that a step costs little. */
const KEPT_STEPS = 500;

/** @returns whether something would be lost without saving: the setup is not the one on disk, nor the one that was opened. */
export const isDirty = ({ setup, saved }: DocumentState): boolean => setup !== saved;
/** @returns the name of the step that undo would take back, or null. */
export const undoLabel = ({ past }: DocumentState): string | null => past.at(-1)?.label ?? null;
/** @returns the name of the step that redo would bring back, or null. */
export const redoLabel = ({ future }: DocumentState): string | null => future.at(-1)?.label ?? null;

const idsOf = (setup: Setup): ReadonlySet<string> => new Set(thingsOf(setup).map(({ id }) => id));

/** What an edit made is selected, so that the next key acts on it; what it took away no longer is. */
function selectionAfter(before: Setup, after: Setup, selection: readonly string[]): readonly string[] {
  const [old, now] = [idsOf(before), idsOf(after)];
  const made = [...now].filter((id) => !old.has(id));
  if (made.length > 0) return made;
  return selection.every((id) => now.has(id)) ? selection : selection.filter((id) => now.has(id));
}

/** @returns a document that holds `setup`, with nothing to undo. */
export function createDocument(setup: Setup, file: FileHandle | null = null): Document {
  const store = createStore<DocumentState>(() => ({
    setup,
    selection: [],
    file,
    saved: setup,
    past: [],
    future: [],
    drag: null,
    snapping: true,
    refused: [],
  }));
  const { getState, setState } = store;

  /** The edit's result as it would be kept: the object that `apply` made, so that untouched parts stay the same objects. */
  function tried(edit: Edit, on: Setup): Result<Setup> {
    const after = edit.apply(on);
    if (after === on) return { ok: true, value: on };
    const held = lockedProblems(on, after);
    if (held.length > 0) return { ok: false, problems: held };
    const checked = parseSetup(after);
    return checked.ok ? { ok: true, value: after } : { ok: false, problems: checked.problems.map((problem) => inWords(problem, after)) };
  }

  function step(label: string, before: Setup, after: Setup, joins: string | undefined): void {
    const { past, selection } = getState();
    const joined = joins !== undefined && past.at(-1)?.joins === joins;
    setState({
      setup: after,
      selection: selectionAfter(before, after, selection),
      past: joined ? past : [...past.slice(1 - KEPT_STEPS), { label, setup: before, joins, origin: null }],
      future: [],
      drag: null,
      refused: [],
    });
  }

  function run(edit: Edit): Result<Setup> {
    finishDrag();
    const before = getState().setup;
    const result = tried(edit, before);
    if (!result.ok) setState({ refused: result.problems });
    else if (result.value !== before) step(edit.label, before, result.value, edit.joins);
    else if (getState().refused.length > 0) setState({ refused: [] });
    return result;
  }

  function startDrag(label: string): void {
    finishDrag();
    setState({ drag: { label, before: getState().setup } });
  }

  function dragTo(edit: Edit): Result<Setup> {
    const { drag } = getState();
    if (drag === null) return run(edit);
    const result = tried(edit, drag.before);
    setState(result.ok ? { setup: result.value, drag: { ...drag, label: edit.label }, refused: [] } : { refused: result.problems });
    return result;
  }

  function finishDrag(): void {
    const { drag, setup: after } = getState();
    if (drag === null) return;
    if (after === drag.before) setState({ drag: null });
    else step(drag.label, drag.before, after, undefined);
  }

  function cancelDrag(): void {
    const { drag } = getState();
    if (drag !== null) setState({ setup: drag.before, drag: null, refused: [] });
  }

  function settle(): void {
    const { past } = getState();
    const last = past.at(-1);
    if (last?.joins !== undefined) setState({ past: [...past.slice(0, -1), { ...last, joins: undefined }] });
  }

  /** Goes to the newest step of one list and notes the way back on the other. */
  function travel(from: "past" | "future", to: "past" | "future"): void {
    cancelDrag();
    const state = getState();
    const target = state[from].at(-1);
    if (target === undefined) return;
    const origin = target.origin === null ? null : { file: state.file, saved: state.saved };
    const back: Step = { label: target.label, setup: state.setup, joins: undefined, origin };
    setState({
      setup: target.setup,
      selection: target.origin === null ? selectionAfter(state.setup, target.setup, state.selection) : [],
      ...(target.origin ?? {}),
      [from]: state[from].slice(0, -1),
      [to]: [...state[to], back],
      refused: [],
    });
  }

  function replace(next: Setup, from: { label: string; file: FileHandle | null; unsaved?: boolean }): void {
    cancelDrag();
    const { setup: before, file: oldFile, saved, past } = getState();
    setState({
      setup: next,
      selection: [],
      file: from.file,
      saved: from.unsaved === true ? null : next,
      past: [...past.slice(1 - KEPT_STEPS), { label: from.label, setup: before, joins: undefined, origin: { file: oldFile, saved } }],
      future: [],
      drag: null,
      refused: [],
    });
  }

  return {
    getState,
    subscribe: store.subscribe,
    getInitialState: store.getInitialState,
    run,
    startDrag,
    dragTo,
    finishDrag,
    cancelDrag,
    refuse: (problems) => setState({ refused: problems }),
    settle,
    undo: () => travel("past", "future"),
    redo: () => travel("future", "past"),
    select: (ids) => {
      const known = idsOf(getState().setup);
      const whole = withGroups(
        getState().setup,
        [...new Set(ids)].filter((id) => known.has(id)),
      );
      setState(getState().refused.length > 0 ? { selection: whole, refused: [] } : { selection: whole });
      settle();
    },
    setSnapping: (snapping) => setState({ snapping }),
    replace,
    markSaved: (saved, savedFile) => setState({ saved, file: savedFile }),
  };
}
