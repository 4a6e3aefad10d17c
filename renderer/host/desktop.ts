import { type Host, type HostEvent, hostEventSchema, type Surroundings } from "../../shared-types/host";
import type { Bridge, ChannelName } from "../../shared-types/host-channel-names";
import { type Answer, CHANNELS, type Request } from "../../shared-types/host-channels";
import type { Command } from "../../shared-types/host-commands";
import { listenForDrops } from "./browser-drops";

const SYSTEMS: Readonly<Record<string, Surroundings["system"]>> = { linux: "linux", win32: "windows", darwin: "mac" };

/** Menu commands that mean the text itself while a text field has the focus. */
const TEXT_COMMANDS: ReadonlySet<Command> = new Set(["undo", "redo", "delete", "select-all"]);
/** Menu commands that the page hears as clipboard events, wherever the focus is. */
const CLIPBOARD_COMMANDS: ReadonlySet<Command> = new Set(["cut", "copy", "paste"]);

function textHasFocus(page: Window): boolean {
  const element = page.document.activeElement;
  if (element instanceof HTMLTextAreaElement) return true;
  if (element instanceof HTMLInputElement) return !["checkbox", "radio", "range", "button", "color"].includes(element.type);
  return element instanceof HTMLElement && element.isContentEditable;
}

/** @returns the desktop's surroundings over the preload's bridge; answers that do not fit their schema reject. */
export function desktopHost(page: Window, bridge: Bridge, version: string): Host {
  async function ask<Name extends ChannelName>(name: Name, request?: Request<Name>): Promise<Answer<Name>> {
    return CHANNELS[name].answer.parse(await bridge.ask[name](request)) as Answer<Name>;
  }
  const tell = <Name extends ChannelName>(name: Name, request?: Request<Name>): void => {
    void ask(name, request).catch(() => {});
  };

  function receive(event: HostEvent, take: (event: HostEvent) => void): void {
    const isEdit =
      event.kind === "command" && (CLIPBOARD_COMMANDS.has(event.command) || (TEXT_COMMANDS.has(event.command) && textHasFocus(page)));
    if (isEdit) {
      tell("editText", CHANNELS.editText.request.parse(event.command));
    } else take(event);
  }

  return {
    kind: "desktop",
    surroundings: { system: SYSTEMS[bridge.platform] ?? "other", version, canOverwrite: true, hasMenuBar: true },
    listen: (take) => {
      const stops = [
        bridge.onEvent((event) => receive(hostEventSchema.parse(event), take)),
        listenForDrops(page, (file) => bridge.dropped(file)),
      ];
      tell("ready");
      return () => {
        for (const stop of stops) stop();
      };
    },
    openFile: () => ask("openFile"),
    readFile: (handle) => ask("readFile", handle),
    saveFile: (request) => ask("saveFile", request),
    exportFile: (request) => ask("exportFile", request),
    importText: (kind) => ask("importText", kind),
    printPdf: (request) => ask("printPdf", request),
    recentFiles: () => ask("recentFiles"),
    forgetRecent: (handle) => ask("forgetRecent", handle),
    writeDraft: (draft) => ask("writeDraft", draft),
    clearDraft: () => ask("clearDraft"),
    keptDrafts: () => ask("keptDrafts"),
    discardDraft: (id) => ask("discardDraft", id),
    readSettings: () => ask("readSettings"),
    writeSettings: (settings) => ask("writeSettings", settings),
    setTitle: (title) => tell("setTitle", title),
    closeWindow: () => tell("closeWindow"),
    copyText: (text) => ask("copyText", text),
    log: (entry) => tell("log", entry),
    details: () => ask("details"),
  };
}
