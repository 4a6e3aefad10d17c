import type { Settings } from "../../shared-types/host";
import { parseSetupText, setupText } from "../../shared-types/parse-setup";
import type { Setup } from "../../shared-types/setup";
import { type Pictured, picturedOf } from "./tray-picture";

/**
 * The pictures of recent setups: kept among the preferences when a setup is opened or saved, so that the start page need not read files
 * that may be gone, or that a browser lets a page read only after a question.
 */

const KEY = "tray-picture ";
/** As many as there are recent files, and some in hand. */
const MOST_KEPT = 12;
/** A setup of many long polygons has no picture kept. */
const LONGEST_TEXT = 60_000;

/** @returns preferences that hold the picture of a file's setup; the oldest beyond a dozen are dropped. */
export function withPicture(preferences: Settings["preferences"], handle: string, setup: Setup): Settings["preferences"] {
  const text = setupText({ ...setup, notes: "" });
  const others = Object.entries(preferences).filter(([key]) => key !== KEY + handle);
  if (text.length > LONGEST_TEXT) return Object.fromEntries(others);
  const pictures = others.filter(([key]) => key.startsWith(KEY));
  const dropped = new Set(pictures.slice(0, Math.max(0, pictures.length + 1 - MOST_KEPT)).map(([key]) => key));
  return Object.fromEntries([...others.filter(([key]) => !dropped.has(key)), [KEY + handle, text]]);
}

/** @returns what a recent file's picture is drawn from, or null when nothing is kept of it. */
export function pictureOf(preferences: Settings["preferences"], handle: string): Pictured | null {
  const text = preferences[KEY + handle];
  if (typeof text !== "string") return null;
  const parsed = parseSetupText(text);
  return parsed.ok ? picturedOf(parsed.value) : null;
}
