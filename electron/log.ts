import { appendFileSync, existsSync, mkdirSync, readFileSync, renameSync, statSync } from "node:fs";
import { dirname } from "node:path";
import type { LogEntry } from "../shared-types/host";

const LARGEST_LOG_BYTES = 512 * 1024;
const OLD_LOGS = 2;
const LINES_IN_DETAILS = 100;

/** The program's log: what happened, without file contents. It is written at once, so that a crash does not take its reason along. */
export interface Log {
  readonly write: (entry: LogEntry) => void;
  /** @returns the newest lines. */
  readonly newest: () => readonly string[];
  readonly path: string;
}

/** A log at `path` that is put aside as `.1`, `.2` when it has grown to half a megabyte. */
export function openLog(path: string, now: () => Date): Log {
  function turn(): void {
    if (!existsSync(path) || statSync(path).size < LARGEST_LOG_BYTES) return;
    for (let number = OLD_LOGS; number >= 1; number--) {
      const from = number === 1 ? path : `${path}.${number - 1}`;
      if (existsSync(from)) renameSync(from, `${path}.${number}`);
    }
  }
  return {
    path,
    write: ({ level, message }) => {
      try {
        mkdirSync(dirname(path), { recursive: true });
        turn();
        appendFileSync(path, `${now().toISOString()} ${level} ${message.replace(/\s*\n\s*/g, " | ")}\n`, { mode: 0o600 });
      } catch {
        // A log that cannot be written must not stop the work that it tells of.
      }
    },
    newest: () => {
      try {
        return readFileSync(path, "utf8").trimEnd().split("\n").slice(-LINES_IN_DETAILS);
      } catch {
        return [];
      }
    },
  };
}
