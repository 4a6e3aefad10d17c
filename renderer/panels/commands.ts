import type { Host } from "../../shared-types/host";
import { type Command, commandEntries } from "../../shared-types/host-commands";
import { duplicateThings, removeThings } from "../document/commands/parts";
import type { Document } from "../document/document";
import { thingsOf } from "../document/edit";
import type { Files } from "./files";
import type { Desk, WindowStore } from "./window-state";

/** Does what a command of the menus, or its key, says. */
export type Act = (command: Command) => void;

/** How the tray is looked at. */
export interface Zoom {
  readonly zoomIn: () => void;
  readonly zoomOut: () => void;
  readonly fit: () => void;
}

export interface CommandSurroundings {
  readonly host: Host;
  readonly document: Document;
  readonly window: WindowStore;
  readonly files: Files;
  readonly trayView: Zoom;
  /** Sheets to a file, and to the printer. */
  readonly save: () => void;
  readonly print: () => void;
}

export function commandsOf({ document, window, files, trayView, save, print }: CommandSurroundings): Act {
  const onSelection = (edit: typeof removeThings): void => {
    const { setup, selection } = document.getState();
    if (selection.length > 0) document.run(edit(setup, selection));
  };
  const go = (desk: Desk) => () => window.goTo(desk);
  const acts: Partial<Record<Command, () => void>> = {
    "new-setup": files.newSetup,
    open: () => void files.open(),
    save: () => void files.save(),
    "save-as": () => void files.save(true),
    print,
    "save-sheets": save,
    undo: document.undo,
    redo: document.redo,
    duplicate: () => onSelection((setup, ids) => duplicateThings(setup, ids)),
    delete: () => onSelection(removeThings),
    "select-all": () => document.select(thingsOf(document.getState().setup).map(({ id }) => id)),
    "zoom-in": trayView.zoomIn,
    "zoom-out": trayView.zoomOut,
    "zoom-to-tray": trayView.fit,
    "desk-lay-out": go("lay-out"),
    "desk-bench": go("bench"),
    "desk-probe-plan": go("probe-plan"),
    "desk-sheets": go("sheets"),
    "start-page": () => window.set({ startPage: true }),
    keys: () => window.set({ keysShown: !window.getState().keysShown, settingsShown: false, findingsShown: false }),
  };
  return (command) => acts[command]?.();
}

/** A field in which nothing is half typed keeps no undo of its own. */
const isCleanField = (target: EventTarget | null): boolean => target instanceof HTMLElement && target.dataset.clean === "true";
const isTextField = (target: EventTarget | null): boolean =>
  target instanceof HTMLElement && (target.matches("input:not([type=checkbox]), textarea, select") || target.isContentEditable);

/** Keys that the window itself hears: those that mean something else in a text field. Text fields keep them while something is typed. */
export function actOnKey(event: KeyboardEvent, act: Act): void {
  if (event.defaultPrevented) return;
  const mod = event.ctrlKey || event.metaKey;
  const pressed = `${mod ? "Mod+" : ""}${event.shiftKey ? "Shift+" : ""}${event.key.length === 1 ? event.key.toUpperCase() : event.key}`;
  const meant = pressed === "Mod+Y" ? "Mod+Shift+Z" : pressed;
  const entry = commandEntries().find(({ keys, heardBy }) => heardBy === "window" && keys === meant);
  if (entry === undefined) return;
  const travels = entry.command === "undo" || entry.command === "redo";
  if (isTextField(event.target) && !(travels && isCleanField(event.target))) return;
  event.preventDefault();
  act(entry.command);
}
