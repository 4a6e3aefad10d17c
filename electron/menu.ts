import { Menu, type MenuItemConstructorOptions } from "electron";
import type { RecentFile } from "../shared-types/host";
import { COMMAND_MENUS, type Command, type CommandEntry } from "../shared-types/host-commands";

/** What the menu bar sets going in the desktop process itself. */
export interface MenuActions {
  readonly command: (command: Command) => void;
  readonly openRecent: (handle: string) => void;
  readonly newWindow: () => void;
  readonly copyDetails: () => void;
  readonly showLog: () => void;
  readonly about: () => void;
}

const SEPARATOR: MenuItemConstructorOptions = { type: "separator" };

/** A Mac takes each key of the menu bar from the page, so that one without ⌘ (Delete) would no longer reach a text field. */
const mayHold = (keys: string | null, onMac: boolean): keys is string =>
  keys !== null && (!onMac || keys.includes("Mod") || /^F\d/.test(keys));

function itemOf({ command, label, keys, heardBy }: CommandEntry, act: MenuActions, onMac: boolean): MenuItemConstructorOptions {
  const accelerator = !mayHold(keys, onMac)
    ? {}
    : { accelerator: keys.replace("Mod", "CmdOrCtrl"), registerAccelerator: heardBy === "host" };
  return { id: command, label, ...accelerator, click: () => act.command(command) };
}

function recentMenu(recent: readonly RecentFile[], act: MenuActions): MenuItemConstructorOptions {
  const items = recent.map(({ file }) => ({ label: `${file.name}  (${file.place})`, click: () => act.openRecent(file.handle) }));
  return { id: "recent", label: "Open recent", enabled: items.length > 0, submenu: items };
}

/**
 * The menu bar: the commands of the contract in their groups, and beside them what belongs to windows and the system.
 * @param onMac a Mac has a menu for the program itself.
 */
export function menuTemplate(recent: readonly RecentFile[], act: MenuActions, onMac: boolean): MenuItemConstructorOptions[] {
  const menus = COMMAND_MENUS.map(({ label, groups }) => ({
    label,
    submenu: groups.flatMap((group, index) => [...(index === 0 ? [] : [SEPARATOR]), ...group.map((entry) => itemOf(entry, act, onMac))]),
  }));
  const within = (label: string): MenuItemConstructorOptions[] => menus.find((menu) => menu.label === label)?.submenu ?? [];
  const file = within("File");
  file.splice(1, 0, { id: "new-window", label: "New window", accelerator: "CmdOrCtrl+Shift+N", click: act.newWindow });
  const open = file.findIndex(({ id }) => id === "open");
  file.splice(open + 1, 0, recentMenu(recent, act));
  file.push(SEPARATOR, onMac ? { role: "close" } : { role: "quit", label: "Quit", accelerator: "CmdOrCtrl+Q" });
  within("Help").push(
    SEPARATOR,
    { id: "copy-details", label: "Copy details for a report", click: act.copyDetails },
    { id: "show-log", label: "Show the log file", click: act.showLog },
    { id: "about", label: "About Fieldtray", click: act.about },
  );
  const ofWindow: MenuItemConstructorOptions[] = [
    { role: "togglefullscreen", label: "Full screen" },
    { role: "minimize", label: "Minimise" },
    ...(onMac ? [] : [{ role: "close" as const, label: "Close window" }]),
  ];
  menus.splice(menus.length - 1, 0, { label: "Window", submenu: ofWindow });
  return onMac ? [{ role: "appMenu" }, ...menus] : menus;
}

export const showMenu = (recent: readonly RecentFile[], act: MenuActions, onMac: boolean): void =>
  Menu.setApplicationMenu(Menu.buildFromTemplate(menuTemplate(recent, act, onMac)));
