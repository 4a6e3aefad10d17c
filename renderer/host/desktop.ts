import type { z } from "zod";
import { type Bridge, EVENT_CHANNELS, type Host, INVOKE_CHANNELS, type InvokeChannel } from "../../shared-types/host";

type Answer<Channel extends InvokeChannel> = z.output<(typeof INVOKE_CHANNELS)[Channel]["answer"]>;

/** @returns the desktop's surroundings over the preload's bridge; answers that do not fit their schema reject. */
export function desktopHost(bridge: Bridge): Host {
  async function ask<Channel extends InvokeChannel>(channel: Channel, request: unknown): Promise<Answer<Channel>> {
    const answer = await bridge.invoke(channel, request);
    return INVOKE_CHANNELS[channel].answer.parse(answer ?? (channel in ANSWERS_NULL ? null : undefined)) as Answer<Channel>;
  }
  return {
    kind: "desktop",
    openFile: () => ask("openFile", undefined),
    openRecent: (handle) => ask("openRecent", handle),
    recentFiles: () => ask("recentFiles", undefined),
    saveFile: (request) => ask("saveFile", request),
    exportFile: (request) => ask("exportFile", request),
    printPdf: (request) => ask("printPdf", request),
    drafts: () => ask("drafts", undefined),
    writeDraft: (draft) => ask("writeDraft", draft),
    discardDraft: (id) => ask("discardDraft", id),
    readSettings: () => ask("readSettings", undefined),
    writeSettings: (settings) => ask("writeSettings", settings),
    setTitle: (title) => bridge.send("setTitle", title),
    log: (entry) => bridge.send("log", entry),
    details: () => ask("details", undefined),
    onFileArrived: (take) => bridge.listen("fileArrived", (message) => take(EVENT_CHANNELS.fileArrived.parse(message))),
    onMenuCommand: (take) => bridge.listen("menuCommand", (message) => take(EVENT_CHANNELS.menuCommand.parse(message))),
    onCloseAsked: (decide) =>
      bridge.listen("closeAsked", () => {
        void decide().then((answer) => bridge.send("closeAnswer", answer));
      }),
  };
}

/** Channels whose answer may be null; the bridge hands an absent answer on as undefined. */
const ANSWERS_NULL: Readonly<Partial<Record<InvokeChannel, true>>> = { openFile: true, openRecent: true };
