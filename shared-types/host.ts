import { z } from "zod";
import { commandSchema } from "./host-commands";
import { LARGEST_FILE_BYTES } from "./parse-setup";

/**
 * What the window asks of its surroundings, and what they tell it: one contract, kept by the desktop process (`electron/`) and by
 * a plain browser (`renderer/host/browser.ts`). Everything that crosses is validated by the schemas below, on the side that receives it.
 *
 * The window never names a path. It holds *handles*: opaque ids that stand for files which the user picked in a dialog, dropped
 * on the window, or opened from outside. A file that changed on disk since it was read or written is never overwritten silently:
 * `saveFile` answers `changed`, and only a second call with `overwrite` writes.
 */

const handleId = z.string().min(1).max(128);
/** Text of a setup file as it may cross, in UTF-16 units: never more than its bytes. */
export const fileTextSchema = z.string().max(LARGEST_FILE_BYTES);
const LARGEST_DOCUMENT_BYTES = 200 * 1024 * 1024;
/** A finished document of ours (PDF, CSV, SVG …): the limit is a hundred times what a pack holds. */
export const bytesSchema = z.instanceof(Uint8Array).refine((bytes) => bytes.byteLength <= LARGEST_DOCUMENT_BYTES, "is at most 200 MB");

/** A file that the user picked. `place` tells a person where it is (a folder), empty where that is not known. */
export const fileHandleSchema = z.strictObject({ handle: handleId, name: z.string().min(1).max(512), place: z.string().max(4096) });
export type FileHandle = Readonly<z.infer<typeof fileHandleSchema>>;

const cancelled = z.strictObject({ kind: z.literal("cancelled") });
/** `message` is one sentence for a person: which file, what went wrong, what to do. */
const failed = z.strictObject({ kind: z.literal("failed"), message: z.string().max(2000) });

export const openOutcomeSchema = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("opened"), file: fileHandleSchema, text: fileTextSchema }),
  cancelled,
  failed,
]);
export type OpenOutcome = Readonly<z.infer<typeof openOutcomeSchema>>;

export const saveRequestSchema = z.strictObject({
  /** The file to write to; null asks the user for one. */
  handle: handleId.nullable(),
  suggestedName: z.string().min(1).max(200),
  text: fileTextSchema,
  /** Write even if another program changed the file: only after the user said so. */
  overwrite: z.boolean(),
});
export type SaveRequest = Readonly<z.infer<typeof saveRequestSchema>>;

export const saveOutcomeSchema = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("saved"), file: fileHandleSchema }),
  /** Nothing was written: another program changed the file (or `gone`: took it away) since it was read or saved here. */
  z.strictObject({ kind: z.literal("changed"), file: fileHandleSchema, gone: z.boolean() }),
  cancelled,
  failed,
]);
export type SaveOutcome = Readonly<z.infer<typeof saveOutcomeSchema>>;

/** Other files, saved or read whole: what the sheets, the probe table, the stock and the readings need. */
export const documentKindSchema = z.enum(["pdf", "csv", "svg", "dxf", "png", "json"]);
export type DocumentKind = z.infer<typeof documentKindSchema>;

export const exportRequestSchema = z.strictObject({
  suggestedName: z.string().min(1).max(200),
  kind: documentKindSchema,
  bytes: bytesSchema,
});
export type ExportRequest = Readonly<z.infer<typeof exportRequestSchema>>;

export const exportOutcomeSchema = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("saved"), name: z.string().min(1).max(512) }),
  cancelled,
  failed,
]);
export type ExportOutcome = Readonly<z.infer<typeof exportOutcomeSchema>>;

export const printRequestSchema = z.strictObject({ title: z.string().max(300), bytes: bytesSchema });
export type PrintRequest = Readonly<z.infer<typeof printRequestSchema>>;

/** `shown`: the sheets are on screen in a viewer of their own, from which the user prints; the desktop opens the print dialog itself. */
export const printOutcomeSchema = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("printed") }),
  z.strictObject({ kind: z.literal("shown") }),
  cancelled,
  failed,
]);
export type PrintOutcome = Readonly<z.infer<typeof printOutcomeSchema>>;

/** A setup that was open lately. */
export const recentFileSchema = z.strictObject({ file: fileHandleSchema, openedAtMs: z.number().nonnegative() });
export type RecentFile = Readonly<z.infer<typeof recentFileSchema>>;

/** What is kept of an unsaved setup while it is being edited. `handle` is the file it was opened from, null for a new one. */
export const draftSchema = z.strictObject({ title: z.string().max(500), handle: handleId.nullable(), text: fileTextSchema });
export type Draft = Readonly<z.infer<typeof draftSchema>>;

/** A draft that a window left behind without saving. `file` is where it came from; null when it had none or that is gone. */
export const keptDraftSchema = z.strictObject({
  id: z.string().regex(/^[A-Za-z0-9-]{1,100}$/),
  title: z.string().max(500),
  keptAtMs: z.number().nonnegative(),
  file: fileHandleSchema.nullable(),
  text: fileTextSchema,
  /** What the file holds now, to be shown beside the draft; null where it has none, is gone, or may not be read without a question. */
  saved: fileTextSchema.nullable(),
});
export type KeptDraft = Readonly<z.infer<typeof keptDraftSchema>>;

/** What a printer makes of a true length, along x and along y; 1 where it prints true. Outside 0.95 to 1.05 something else is wrong. */
const printerScale = z.number().min(0.95).max(1.05);
export const printerSchema = z.strictObject({ name: z.string().min(1).max(100), scaleX: printerScale, scaleY: printerScale });
export type Printer = Readonly<z.infer<typeof printerSchema>>;

/** What outlives a session. `preferences` is the window's own: small facts by name. */
export const settingsSchema = z.strictObject({
  theme: z.enum(["system", "light", "dark", "contrast"]).default("system"),
  lengthUnit: z.enum(["mm", "cm", "in"]).default("mm"),
  interfaceZoom: z.number().min(0.5).max(3).default(1),
  paper: z.enum(["a4", "a3", "a2", "letter", "tabloid"]).default("a4"),
  printers: z.array(printerSchema).max(50).default([]),
  /** Name of the printer in use; null prints without correction. */
  printer: z.string().max(100).nullable().default(null),
  preferences: z.record(z.string().min(1).max(100), z.union([z.string().max(1_000_000), z.number(), z.boolean()])).default({}),
});
export type Settings = Readonly<z.infer<typeof settingsSchema>>;

/** What the title bar shows: the setup's name, and a mark while something of it is unsaved. */
export const windowTitleSchema = z.strictObject({ name: z.string().max(500), handle: handleId.nullable(), unsaved: z.boolean() });
export type WindowTitle = Readonly<z.infer<typeof windowTitleSchema>>;

export const logEntrySchema = z.strictObject({
  level: z.enum(["info", "warning", "error"]),
  /** What happened, never a file's contents. */
  message: z.string().max(8000),
});
export type LogEntry = Readonly<z.infer<typeof logEntrySchema>>;

/** What the surroundings tell the window. */
export const hostEventSchema = z.discriminatedUnion("kind", [
  /** A menu item or its key. The window does what its own button of that name does. */
  z.strictObject({ kind: z.literal("command"), command: commandSchema }),
  /** A file came from outside: dropped on the window, opened in the file manager, given to a second start, picked from the recent list. */
  z.strictObject({ kind: z.literal("file-arrived"), file: fileHandleSchema, text: fileTextSchema }),
  /** A file that came from outside cannot be read; the sentence says why. */
  z.strictObject({ kind: z.literal("file-refused"), message: z.string().max(2000) }),
  /** Another program changed the open file (or `gone`: took it away). The window asks whether to read it again or to keep its own. */
  z.strictObject({ kind: z.literal("changed-on-disk"), file: fileHandleSchema, gone: z.boolean() }),
  /** The user wants to close and chose to save first: save, then call `closeWindow`; when saving fails or is cancelled, stay. */
  z.strictObject({ kind: z.literal("save-and-close") }),
]);
export type HostEvent = Readonly<z.infer<typeof hostEventSchema>>;

/** Facts about where the window runs that do not change. */
export interface Surroundings {
  readonly system: "linux" | "windows" | "mac" | "other";
  readonly version: string;
  /** "Save" writes to the opened file itself; where false, each save is a download. */
  readonly canOverwrite: boolean;
  /** A native menu bar shows the commands, so that the window needs no menu of its own. */
  readonly hasMenuBar: boolean;
}

/** Surroundings of the window. Promises reject only on faults of ours or a full disk under a draft; what a user can cause is an outcome. */
export interface Host {
  readonly kind: "desktop" | "browser";
  readonly surroundings: Surroundings;
  /** Begins to receive events; those that came earlier (a file given at the start) follow at once. @returns a way to stop. */
  readonly listen: (take: (event: HostEvent) => void) => () => void;

  /** Asks the user for a setup file. */
  readonly openFile: () => Promise<OpenOutcome>;
  /** Reads a file that a handle stands for: a recent one, or the open one again after a change on disk. */
  readonly readFile: (handle: string) => Promise<OpenOutcome>;
  readonly saveFile: (request: SaveRequest) => Promise<SaveOutcome>;
  /** Saves a finished document (a pack of sheets, a probe table) where the user says. */
  readonly exportFile: (request: ExportRequest) => Promise<ExportOutcome>;
  /** Asks the user for a text file to read whole, such as readings as CSV. It is not noted among the recent files. */
  readonly importText: (kind: "csv" | "json") => Promise<OpenOutcome>;
  /** Hands a PDF to the system's print dialog at actual size. */
  readonly printPdf: (request: PrintRequest) => Promise<PrintOutcome>;

  /** @returns setups that were open lately, newest first, at most ten. */
  readonly recentFiles: () => Promise<readonly RecentFile[]>;
  readonly forgetRecent: (handle: string) => Promise<void>;

  /** Keeps this window's draft in place of the one before. Rejects when it cannot be kept, so that the user can be told. */
  readonly writeDraft: (draft: Draft) => Promise<void>;
  /** Takes this window's own draft away: saved, or given up. */
  readonly clearDraft: () => Promise<void>;
  /** @returns drafts of windows that went down without saving, newest first; never those of a window that is open. */
  readonly keptDrafts: () => Promise<readonly KeptDraft[]>;
  /** Takes away a kept draft: brought back into this window, or not wanted. */
  readonly discardDraft: (id: string) => Promise<void>;

  readonly readSettings: () => Promise<Settings>;
  readonly writeSettings: (settings: Settings) => Promise<void>;

  /** Shows name and unsaved mark in the title; while `unsaved`, closing asks. */
  readonly setTitle: (title: WindowTitle) => void;
  /** Closes the window without asking. */
  readonly closeWindow: () => void;
  /** Puts text on the clipboard. @returns whether that was allowed. */
  readonly copyText: (text: string) => Promise<boolean>;
  readonly log: (entry: LogEntry) => void;
  /** @returns what a report of a fault should carry: versions, system, the log's last lines; no file contents. */
  readonly details: () => Promise<string>;
}
