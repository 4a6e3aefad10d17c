import type { z } from "zod";
import { failure, type Problem, type Result, success } from "./result";
import { type Setup, setupSchema } from "./setup";

/** Largest setup file that is read, bytes (the file contract). */
export const LARGEST_FILE_BYTES = 5 * 1024 * 1024;
/** Deepest nesting of arrays and objects that is read; version 1 needs 6. */
const DEEPEST_NESTING = 32;

const shown = (value: unknown): string => {
  if (value === undefined) return "missing";
  const text = typeof value === "number" ? String(value) : (JSON.stringify(value) ?? String(value));
  return text.length > 60 ? `${text.slice(0, 57)}…` : text;
};

function valueAt(data: unknown, path: readonly PropertyKey[]): unknown {
  let value: unknown = data;
  for (const key of path) {
    if (typeof value !== "object" || value === null) return undefined;
    value = Reflect.get(value, key);
  }
  return value;
}

const dotted = (path: readonly PropertyKey[]): string =>
  path.map((key, index) => (typeof key === "number" ? `[${key}]` : index === 0 ? String(key) : `.${String(key)}`)).join("");

/** The count of a text's characters or a list's entries; numbers carry their range as message (setup.ts). */
function allowedCount(bound: "least" | "most", limit: number | bigint, origin: string, message: string): string {
  if (origin === "string") return `at ${bound} ${limit} characters`;
  return origin === "array" ? `at ${bound} ${limit} entries` : message;
}

function allowed(issue: z.core.$ZodIssue): string {
  switch (issue.code) {
    case "too_small":
      return allowedCount("least", issue.minimum, issue.origin, issue.message);
    case "too_big":
      return allowedCount("most", issue.maximum, issue.origin, issue.message);
    case "invalid_type":
      return issue.expected === "number" || issue.expected === "int" ? issue.message : `a ${issue.expected}`;
    case "invalid_value":
      return issue.values.map((value) => JSON.stringify(value)).join(" or ");
    default:
      return issue.message;
  }
}

function problemsOf(issue: z.core.$ZodIssue, data: unknown): Problem[] {
  const where = dotted(issue.path);
  if (issue.code === "unrecognized_keys") {
    return issue.keys.map((key) => {
      const path = where === "" ? key : `${where}.${key}`;
      return { where: path, message: `${path} is not a key of a setup, allowed: the keys that the README lists` };
    });
  }
  if (issue.code === "custom") return [{ where, message: `${where} ${issue.message}` }];
  if (issue.code === "invalid_union") {
    return [{ where, message: `${where} is ${shown(valueAt(data, issue.path))}, allowed: ${choices(where)}` }];
  }
  return [{ where, message: `${where === "" ? "the setup" : where} is ${shown(valueAt(data, issue.path))}, allowed: ${allowed(issue)}` }];
}

const choices = (where: string): string =>
  where.endsWith(".kind")
    ? '"bar", "disc", "ring", "arc", "frame" or "polygon"'
    : where.endsWith(".role")
      ? '"electrode", "floating" or "insulator"'
      : where === "tray.shape"
        ? '"rectangle" or "circle"'
        : "a known kind";

function deeperThan(data: unknown, limit: number): boolean {
  if (typeof data !== "object" || data === null) return false;
  if (limit === 0) return true;
  return Object.values(data).some((value) => deeperThan(value, limit - 1));
}

/**
 * Validates a setup that was already parsed from JSON, filling in the defaults of absent optional keys.
 * @returns the setup, or one problem for each key that is wrong.
 */
export function parseSetup(data: unknown): Result<Setup> {
  if (typeof data !== "object" || data === null || Array.isArray(data)) {
    return failure("", "this is not a Fieldtray setup: the file holds no JSON object");
  }
  if (Reflect.get(data, "format") !== "fieldtray.setup") {
    return failure("format", `format is ${shown(Reflect.get(data, "format"))}, allowed: "fieldtray.setup"`);
  }
  const version = Reflect.get(data, "version");
  if (typeof version === "number" && version > 1) {
    return failure("version", `version is ${version}, allowed: 1; this setup was saved by a newer Fieldtray`);
  }
  if (deeperThan(data, DEEPEST_NESTING)) return failure("", `the setup is nested more than ${DEEPEST_NESTING} levels deep`);
  const parsed = setupSchema.safeParse(data);
  if (parsed.success) return success(parsed.data);
  return { ok: false, problems: parsed.error.issues.flatMap((issue) => problemsOf(issue, data)) };
}

/** A problem of a file; where it lies inside a part or slab, with the id by which its user knows it. */
function withOwner(problem: Problem, data: unknown): Problem {
  const inList = /^(parts|water\.slabs)\[(\d+)\](?!\.id$)/.exec(problem.where);
  if (inList === null) return problem;
  const id = valueAt(data, [...inList[1].split("."), Number(inList[2]), "id"]);
  return typeof id === "string" && id !== "" ? { ...problem, message: `${problem.message}, in ${shown(id)}` } : problem;
}

/**
 * Reads the text of a setup file.
 * @returns the setup, or what is wrong with it; never throws.
 */
export function parseSetupText(text: string): Result<Setup> {
  if (text.length > LARGEST_FILE_BYTES) {
    return failure("", `the file holds ${text.length} bytes, allowed: at most ${LARGEST_FILE_BYTES} (5 MB)`);
  }
  let data: unknown;
  try {
    data = JSON.parse(text.replace(/^\uFEFF/, ""));
  } catch (error) {
    return failure("", `the file is not valid JSON (${error instanceof Error ? error.message : String(error)})`);
  }
  const parsed = parseSetup(data);
  return parsed.ok ? parsed : { ok: false, problems: parsed.problems.map((problem) => withOwner(problem, data)) };
}

/** @returns the text that is saved for a setup: indented JSON with a final line feed. */
export function setupText(setup: Setup): string {
  return `${JSON.stringify(setup, null, 2)}\n`;
}

/** @returns what is wrong with data of ours, in the words of a refused setup. */
export const parseProblems = (error: z.ZodError, data: unknown): readonly Problem[] =>
  error.issues.flatMap((issue) => problemsOf(issue, data));
