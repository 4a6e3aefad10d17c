import { z } from "zod";

/**
 * The commands of the menu bar, with their names and keys: the desktop's menu shows them, the browser host listens for their keys,
 * and the window may show the same names and keys in its own hints.
 */

export const commandSchema = z.enum([
  "new-setup",
  "open",
  "save",
  "save-as",
  "print",
  "save-sheets",
  "undo",
  "redo",
  "cut",
  "copy",
  "paste",
  "duplicate",
  "delete",
  "select-all",
  "zoom-in",
  "zoom-out",
  "zoom-to-tray",
  "desk-lay-out",
  "desk-bench",
  "desk-probe-plan",
  "desk-sheets",
  "desk-readings",
  "start-page",
  "keys",
]);
export type Command = z.infer<typeof commandSchema>;

export interface CommandEntry {
  readonly command: Command;
  readonly label: string;
  /** Written as `Mod+Shift+S`, where Mod is Ctrl, or ⌘ on a Mac; null where there is none. */
  readonly keys: string | null;
  /**
   * Who acts on the key. `host`: the menu bar, or the browser host, sends the command. `window`: the window itself listens, because the
   * key means something else in a text field; the menu bar only shows it.
   */
  readonly heardBy: "host" | "window";
}

export interface CommandMenu {
  readonly label: string;
  /** Groups are divided by a line. */
  readonly groups: readonly (readonly CommandEntry[])[];
}

const entry = (command: Command, label: string, keys: string | null, heardBy: CommandEntry["heardBy"] = "host"): CommandEntry => ({
  command,
  label,
  keys,
  heardBy,
});

export const COMMAND_MENUS: readonly CommandMenu[] = [
  {
    label: "File",
    groups: [
      [entry("new-setup", "New setup", "Mod+N"), entry("open", "Open…", "Mod+O"), entry("start-page", "Examples and recent setups", null)],
      [entry("save", "Save", "Mod+S"), entry("save-as", "Save as…", "Mod+Shift+S")],
      [entry("save-sheets", "Save sheets as PDF…", "Mod+E"), entry("print", "Print sheets…", "Mod+P")],
    ],
  },
  {
    label: "Edit",
    groups: [
      [entry("undo", "Undo", "Mod+Z", "window"), entry("redo", "Redo", "Mod+Shift+Z", "window")],
      [
        entry("cut", "Cut", "Mod+X", "window"),
        entry("copy", "Copy", "Mod+C", "window"),
        entry("paste", "Paste", "Mod+V", "window"),
        entry("duplicate", "Duplicate", "Mod+D", "window"),
        entry("delete", "Delete", "Delete", "window"),
      ],
      [entry("select-all", "Select all", "Mod+A", "window")],
    ],
  },
  {
    label: "Desk",
    groups: [
      [
        entry("desk-lay-out", "Lay out", "Mod+1"),
        entry("desk-bench", "Bench", "Mod+2"),
        entry("desk-probe-plan", "Probe plan", "Mod+3"),
        entry("desk-sheets", "Sheets", "Mod+4"),
      ],
      [
        entry("zoom-in", "Closer", "Mod+Plus", "window"),
        entry("zoom-out", "Further away", "Mod+-", "window"),
        entry("zoom-to-tray", "Whole tray", "Mod+0", "window"),
      ],
    ],
  },
  { label: "Help", groups: [[entry("keys", "Keys…", "F1")]] },
];

/** @returns every entry of the menus, in their order. */
export const commandEntries = (): readonly CommandEntry[] => COMMAND_MENUS.flatMap(({ groups }) => groups.flat());
