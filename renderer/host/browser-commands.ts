import { type Command, commandEntries } from "../../shared-types/host-commands";

/** What of a key press tells one command's key from another's. */
type Pressed = Pick<KeyboardEvent, "key" | "ctrlKey" | "metaKey" | "shiftKey" | "altKey">;

/** @returns whether a key press is the one written as `Mod+Shift+S`; Mod is ⌘ on a Mac and Ctrl elsewhere. */
export function isKey(written: string, pressed: Pressed, onMac: boolean): boolean {
  const parts = written.split("+");
  const name = parts.at(-1) === "" ? "+" : parts.at(-1) === "Plus" ? "+" : (parts.at(-1) ?? "");
  const modifier = onMac ? pressed.metaKey : pressed.ctrlKey;
  const other = onMac ? pressed.ctrlKey : pressed.metaKey;
  return (
    pressed.key.toLowerCase() === name.toLowerCase() &&
    modifier === parts.includes("Mod") &&
    pressed.shiftKey === parts.includes("Shift") &&
    !pressed.altKey &&
    !other
  );
}

/** Sends the commands whose keys the host hears, in place of what the browser would do for them. @returns a way to stop. */
export function listenForCommandKeys(page: Window, onMac: boolean, send: (command: Command) => void): () => void {
  const heard = commandEntries().filter(({ heardBy }) => heardBy === "host");
  const press = (event: KeyboardEvent): void => {
    const entry = heard.find(({ keys }) => keys !== null && isKey(keys, event, onMac));
    if (entry === undefined || event.defaultPrevented) return;
    event.preventDefault();
    if (!event.repeat) send(entry.command);
  };
  page.addEventListener("keydown", press);
  return () => page.removeEventListener("keydown", press);
}
