import type { Setup } from "../../shared-types/setup";
import { toggleGroup, toggleLock } from "../document/commands/holding";
import { duplicateThings, removeThings } from "../document/commands/parts";
import { moveThings, turnThings } from "../document/commands/placing";
import { type Edit, thingsOf } from "../document/edit";
import { boxOfThing } from "./hit";

/** What a key means on the tray. Undo, saving and the like belong to the window. */
export type KeyMeaning =
  | { readonly kind: "edit"; readonly edit: Edit }
  | { readonly kind: "select"; readonly ids: readonly string[] }
  | { readonly kind: "view"; readonly view: "zoom in" | "zoom out" | "fit" | "tape" | "pin" };

/** The facts of a keyboard event that matter here. */
export interface Key {
  readonly key: string;
  readonly shiftKey: boolean;
  readonly altKey: boolean;
  readonly ctrlKey: boolean;
  readonly metaKey: boolean;
}

const NUDGE_MM = 1;
const NUDGE_FAR_MM = 10;
const NUDGE_FINE_MM = 0.1;
const TURN_DEG = 5;
const TURN_FAR_DEG = 45;

const ARROWS: Readonly<Record<string, readonly [number, number]>> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, 1],
  ArrowDown: [0, -1],
};

const edit = (made: Edit): KeyMeaning => ({ kind: "edit", edit: made });

/** What a key does to the selected things; null when it does nothing to them. */
function onSelection(key: Key, setup: Setup, selection: readonly string[]): KeyMeaning | null {
  const command = key.ctrlKey || key.metaKey;
  if (key.key === "Delete" || key.key === "Backspace") return edit(removeThings(setup, selection));
  if (command) return key.key.toLowerCase() === "d" ? edit(duplicateThings(setup, selection)) : null;
  const arrow = ARROWS[key.key];
  if (arrow !== undefined) {
    const step = key.shiftKey ? NUDGE_FAR_MM : key.altKey ? NUDGE_FINE_MM : NUDGE_MM;
    return edit(moveThings(setup, selection, arrow[0] * step, arrow[1] * step, `nudge ${selection.join(" ")}`));
  }
  if (!key.altKey && key.key.toLowerCase() === "k") return edit(toggleLock(setup, selection));
  if (!key.altKey && key.key.toLowerCase() === "g") return edit(toggleGroup(setup, selection));
  const turn = { l: 1, r: -1 }[key.key.toLowerCase()];
  if (turn === undefined || key.altKey) return null;
  const byDeg = turn * (key.shiftKey ? TURN_FAR_DEG : TURN_DEG);
  return edit(turnThings(setup, selection, byDeg, boxOfThing, `turn ${selection.join(" ")}`));
}

/**
 * Arrows nudge the selected things by 1 mm (Shift 10, Alt 0.1), L and R turn them left and right by 5° (Shift 45°), Delete
 * takes them away, Ctrl or Cmd with D duplicates and with A selects all, Escape selects nothing, + − 0 zoom, M takes up the measuring
 * tape or puts it away, K locks and unlocks, G groups and takes apart, P the pins.
 * @returns what the key means, or null when it means nothing here.
 */
export function meaningOf(key: Key, setup: Setup, selection: readonly string[]): KeyMeaning | null {
  const command = key.ctrlKey || key.metaKey;
  if (command && key.key.toLowerCase() === "a") return { kind: "select", ids: thingsOf(setup).map(({ id }) => id) };
  if (!command && !key.altKey) {
    if (key.key === "+" || key.key === "=") return { kind: "view", view: "zoom in" };
    if (key.key === "-") return { kind: "view", view: "zoom out" };
    if (key.key === "0") return { kind: "view", view: "fit" };
    if (key.key.toLowerCase() === "m") return { kind: "view", view: "tape" };
    if (key.key.toLowerCase() === "p") return { kind: "view", view: "pin" };
    if (key.key === "Escape" && selection.length > 0) return { kind: "select", ids: [] };
  }
  return selection.length === 0 ? null : onSelection(key, setup, selection);
}
