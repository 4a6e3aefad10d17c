import { z } from "zod";

/**
 * What the window asks of its surroundings, desktop or plain browser, and what may cross between the desktop process and
 * the window. Every message is checked against these schemas on the side that receives it. The window never names a path:
 * it holds handles, opaque ids of files that the user picked.
 */

/** Text files are refused above this size before they are parsed (the file contract says 5 MB). */
const LARGEST_TEXT = 6 * 1024 * 1024;
const LARGEST_PDF = 200 * 1024 * 1024;

const handle = z.string().min(1).max(100);
const fileName = z.string().min(1).max(255);
const text = z.string().max(LARGEST_TEXT);
const bytes = z.instanceof(Uint8Array).refine((value) => value.byteLength <= LARGEST_PDF, "is larger than 200 MB");

/** A file that the user picked, with its text. */
export const pickedFileSchema = z.strictObject({ handle, name: fileName, text });
export type PickedFile = z.infer<typeof pickedFileSchema>;

/** How saving ended. `changed`: another program wrote the file since it was read; ask, then save with `overwrite`. */
export const saveOutcomeSchema = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("saved"), handle, name: fileName }),
  z.strictObject({ kind: z.literal("cancelled") }),
  z.strictObject({ kind: z.literal("changed"), name: fileName }),
  z.strictObject({ kind: z.literal("failed"), message: z.string().max(2000) }),
]);
export type SaveOutcome = z.infer<typeof saveOutcomeSchema>;

export const saveRequestSchema = z.strictObject({
  /** The file to write to; null asks the user for one. */
  handle: handle.nullable(),
  suggestedName: fileName,
  text,
  /** Write even if another program changed the file. */
  overwrite: z.boolean(),
});
export type SaveRequest = z.infer<typeof saveRequestSchema>;

/** A file of the user's choice for other outputs: PDF, SVG, DXF, CSV, PNG. */
export const exportRequestSchema = z.strictObject({ suggestedName: fileName, kind: z.enum(["pdf", "svg", "dxf", "csv", "png"]), bytes });
export type ExportRequest = z.infer<typeof exportRequestSchema>;

export const exportOutcomeSchema = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("saved"), name: fileName }),
  z.strictObject({ kind: z.literal("cancelled") }),
  z.strictObject({ kind: z.literal("failed"), message: z.string().max(2000) }),
]);
export type ExportOutcome = z.infer<typeof exportOutcomeSchema>;

export const printRequestSchema = z.strictObject({ title: z.string().max(300), bytes });
export type PrintRequest = z.infer<typeof printRequestSchema>;

/** Work that was not saved when the window went down. */
export const draftSchema = z.strictObject({
  id: z.string().regex(/^[a-z0-9-]{1,60}$/),
  /** ISO 8601. */
  writtenAt: z.string().max(40),
  title: z.string().max(300),
  /** Name of the file that it belongs to, or null for a setup that was never saved. */
  fileName: fileName.nullable(),
  handle: handle.nullable(),
  text,
});
export type Draft = z.infer<typeof draftSchema>;
export const draftsSchema = z.array(draftSchema).max(50);

export const recentFileSchema = z.strictObject({ handle, name: fileName, openedAt: z.string().max(40) });
export type RecentFile = z.infer<typeof recentFileSchema>;
export const recentFilesSchema = z.array(recentFileSchema).max(20);

/** Correction of one printer: what a printed millimetre measures along x and y (JCGM wording: a scale factor). */
const printerScale = z.number().min(0.95).max(1.05);
export const settingsSchema = z.strictObject({
  theme: z.enum(["system", "light", "dark", "contrast"]).default("system"),
  lengthUnit: z.enum(["mm", "cm", "in"]).default("mm"),
  interfaceZoom: z.number().min(0.5).max(3).default(1),
  paper: z.enum(["a4", "a3", "a2", "letter", "tabloid"]).default("a4"),
  printers: z
    .array(z.strictObject({ name: z.string().min(1).max(100), scaleX: printerScale, scaleY: printerScale }))
    .max(50)
    .default([]),
  printer: z.string().max(100).nullable().default(null),
});
export type Settings = z.infer<typeof settingsSchema>;

/** Commands that come from the desktop's menus and accelerators. */
export const MENU_COMMANDS = [
  "new",
  "open",
  "save",
  "save-as",
  "print",
  "save-pdf",
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
  "zoom-fit",
  "start-page",
  "keyboard",
] as const;
export const menuCommandSchema = z.enum(MENU_COMMANDS);
export type MenuCommand = z.infer<typeof menuCommandSchema>;

export const titleSchema = z.strictObject({ name: z.string().max(300), unsaved: z.boolean() });
export type WindowTitle = z.infer<typeof titleSchema>;

export const logEntrySchema = z.strictObject({ level: z.enum(["info", "warning", "error"]), message: z.string().max(4000) });
export type LogEntry = z.infer<typeof logEntrySchema>;

/** What an error card copies: versions and the newest log lines, never the contents of files. */
export const detailsSchema = z.string().max(200_000);

/** How the user answered when the window was about to close with unsaved work. */
export type CloseAnswer = "close" | "stay";
export const closeAnswerSchema = z.enum(["close", "stay"]);

/** Surroundings of the window. Promises reject only on faults of ours; what a user can cause is an outcome. */
export interface Host {
  readonly kind: "desktop" | "browser";
  /** Asks for a setup file. @returns it with its text, null when the user changed their mind. */
  readonly openFile: () => Promise<PickedFile | null>;
  readonly openRecent: (handle: string) => Promise<PickedFile | null>;
  readonly recentFiles: () => Promise<readonly RecentFile[]>;
  readonly saveFile: (request: SaveRequest) => Promise<SaveOutcome>;
  readonly exportFile: (request: ExportRequest) => Promise<ExportOutcome>;
  /** Hands a PDF to the system's print dialog at actual size. */
  readonly printPdf: (request: PrintRequest) => Promise<ExportOutcome>;
  readonly drafts: () => Promise<readonly Draft[]>;
  readonly writeDraft: (draft: Draft) => Promise<void>;
  readonly discardDraft: (id: string) => Promise<void>;
  readonly readSettings: () => Promise<Settings>;
  readonly writeSettings: (settings: Settings) => Promise<void>;
  readonly setTitle: (title: WindowTitle) => void;
  readonly log: (entry: LogEntry) => void;
  readonly details: () => Promise<string>;
  /** Files that arrive by themselves: dropped, opened from the file manager or by a second start. @returns a way to stop listening. */
  readonly onFileArrived: (take: (file: PickedFile) => void) => () => void;
  readonly onMenuCommand: (take: (command: MenuCommand) => void) => () => void;
  /** Called before the window closes while work is unsaved. @returns a way to stop listening. */
  readonly onCloseAsked: (decide: () => Promise<CloseAnswer>) => () => void;
}

/** Channels between window and desktop process: requests with an answer. Arguments and answers in their schemas. */
export const INVOKE_CHANNELS = {
  openFile: { request: z.undefined(), answer: pickedFileSchema.nullable() },
  openRecent: { request: handle, answer: pickedFileSchema.nullable() },
  recentFiles: { request: z.undefined(), answer: recentFilesSchema },
  saveFile: { request: saveRequestSchema, answer: saveOutcomeSchema },
  exportFile: { request: exportRequestSchema, answer: exportOutcomeSchema },
  printPdf: { request: printRequestSchema, answer: exportOutcomeSchema },
  drafts: { request: z.undefined(), answer: draftsSchema },
  writeDraft: { request: draftSchema, answer: z.undefined() },
  discardDraft: { request: draftSchema.shape.id, answer: z.undefined() },
  readSettings: { request: z.undefined(), answer: settingsSchema },
  writeSettings: { request: settingsSchema, answer: z.undefined() },
  details: { request: z.undefined(), answer: detailsSchema },
} as const;
export type InvokeChannel = keyof typeof INVOKE_CHANNELS;

/** Messages from the window without an answer. */
export const SEND_CHANNELS = { setTitle: titleSchema, log: logEntrySchema, closeAnswer: closeAnswerSchema } as const;
export type SendChannel = keyof typeof SEND_CHANNELS;

/** Messages from the desktop process to the window. */
export const EVENT_CHANNELS = { fileArrived: pickedFileSchema, menuCommand: menuCommandSchema, closeAsked: z.undefined() } as const;
export type EventChannel = keyof typeof EVENT_CHANNELS;

/** The narrow bridge that the preload puts on the window as `fieldtrayBridge`. */
export interface Bridge {
  readonly invoke: (channel: InvokeChannel, request: unknown) => Promise<unknown>;
  readonly send: (channel: SendChannel, message: unknown) => void;
  readonly listen: (channel: EventChannel, take: (message: unknown) => void) => () => void;
}
export const BRIDGE_NAME = "fieldtrayBridge";
