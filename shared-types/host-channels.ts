import { z } from "zod";
import {
  draftSchema,
  exportOutcomeSchema,
  exportRequestSchema,
  fileHandleSchema,
  keptDraftSchema,
  logEntrySchema,
  openOutcomeSchema,
  printOutcomeSchema,
  printRequestSchema,
  recentFileSchema,
  saveOutcomeSchema,
  saveRequestSchema,
  settingsSchema,
  windowTitleSchema,
} from "./host";
import type { ChannelName } from "./host-channel-names";

/**
 * What crosses between the window and the desktop process, channel by channel: the request that the process accepts, and the answer
 * that the window accepts. Each side checks what it receives.
 */

const nothing = z.undefined();
const handle = fileHandleSchema.shape.handle;

export const CHANNELS = {
  ready: { request: nothing, answer: nothing },
  openFile: { request: nothing, answer: openOutcomeSchema },
  readFile: { request: handle, answer: openOutcomeSchema },
  saveFile: { request: saveRequestSchema, answer: saveOutcomeSchema },
  exportFile: { request: exportRequestSchema, answer: exportOutcomeSchema },
  importText: { request: z.enum(["csv", "json"]), answer: openOutcomeSchema },
  printPdf: { request: printRequestSchema, answer: printOutcomeSchema },
  recentFiles: { request: nothing, answer: z.array(recentFileSchema).max(10) },
  forgetRecent: { request: handle, answer: nothing },
  writeDraft: { request: draftSchema, answer: nothing },
  clearDraft: { request: nothing, answer: nothing },
  keptDrafts: { request: nothing, answer: z.array(keptDraftSchema).max(50) },
  discardDraft: { request: keptDraftSchema.shape.id, answer: nothing },
  readSettings: { request: nothing, answer: settingsSchema },
  writeSettings: { request: settingsSchema, answer: nothing },
  setTitle: { request: windowTitleSchema, answer: nothing },
  closeWindow: { request: nothing, answer: nothing },
  copyText: { request: z.string().max(20_000_000), answer: z.boolean() },
  editText: { request: z.enum(["undo", "redo", "cut", "copy", "paste", "delete", "select-all"]), answer: nothing },
  log: { request: logEntrySchema, answer: nothing },
  details: { request: nothing, answer: z.string().max(500_000) },
} as const satisfies Record<ChannelName, { readonly request: z.ZodType; readonly answer: z.ZodType }>;

/** A file that the user dropped on the window: its path, as the preload learned it from the browser's engine, never from the page. */
export const droppedPathSchema = z.string().min(1).max(4096);

export type Request<Name extends ChannelName> = z.output<(typeof CHANNELS)[Name]["request"]>;
export type Answer<Name extends ChannelName> = z.output<(typeof CHANNELS)[Name]["answer"]>;
