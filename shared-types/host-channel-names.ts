/** The doors of the bridge between the window and the desktop process: plain names, so that the preload carries no schema. */
export const CHANNEL_NAMES = [
  "ready",
  "openFile",
  "readFile",
  "saveFile",
  "exportFile",
  "importText",
  "printPdf",
  "recentFiles",
  "forgetRecent",
  "writeDraft",
  "clearDraft",
  "keptDrafts",
  "discardDraft",
  "readSettings",
  "writeSettings",
  "setTitle",
  "closeWindow",
  "copyText",
  "editText",
  "log",
  "details",
] as const;
export type ChannelName = (typeof CHANNEL_NAMES)[number];

/** The name under which a door is known to both processes. */
export const channelOf = (name: ChannelName): string => `fieldtray:${name}`;
/** The channel on which the desktop process tells the window something. */
export const EVENT_CHANNEL = "fieldtray:event";
/** The channel on which the preload tells the process of a dropped file. */
export const DROP_CHANNEL = "fieldtray:dropped";
/** Where the preload puts the bridge on the window. */
export const BRIDGE_NAME = "fieldtrayBridge";

/** What the preload hands to the window. Nothing that comes through it is trusted: both sides validate. */
export interface Bridge {
  /** Node's name of the system: `linux`, `win32`, `darwin`. */
  readonly platform: string;
  readonly ask: Readonly<Record<ChannelName, (request?: unknown) => Promise<unknown>>>;
  /** @returns a way to stop. */
  readonly onEvent: (take: (event: unknown) => void) => () => void;
  /** A file that the user dropped on the window. The process learns its path from the engine; the page never sees it. */
  readonly dropped: (file: File) => void;
}
