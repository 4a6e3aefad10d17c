import { mkdir, readFile, rename } from "node:fs/promises";
import { dirname } from "node:path";
import type { z } from "zod";
import { saveWhole } from "./save-whole";

/** A file of the program's own (settings, window place, recent setups): JSON behind a schema. */
export interface OwnFile<Value> {
  /** @returns the value; the fallback when there is none, or none that can be used (then the damaged file is put aside). */
  readonly read: () => Promise<Value>;
  readonly write: (value: Value) => Promise<void>;
  /** Resolves once everything that was to be written is on the disk or has failed. */
  readonly settled: () => Promise<void>;
}

/** @param onDamaged is told when a file that is there could not be used. */
export function ownFile<Schema extends z.ZodType>(
  path: string,
  schema: Schema,
  fallback: z.output<Schema>,
  onDamaged: (message: string) => void,
): OwnFile<z.output<Schema>> {
  let writing: Promise<void> = Promise.resolve();

  async function read(): Promise<z.output<Schema>> {
    await writing.catch(() => {});
    let text: string;
    try {
      text = await readFile(path, "utf8");
    } catch {
      return fallback;
    }
    try {
      return schema.parse(JSON.parse(text));
    } catch (error) {
      onDamaged(`${path} cannot be used and is put aside: ${error instanceof Error ? error.message.slice(0, 300) : String(error)}`);
      await rename(path, `${path}.damaged`).catch(() => {});
      return fallback;
    }
  }

  return {
    read,
    settled: () => writing.catch(() => {}),
    write: (value) => {
      writing = writing
        .catch(() => {})
        .then(async () => {
          await mkdir(dirname(path), { recursive: true });
          await saveWhole(path, `${JSON.stringify(value, null, 2)}\n`, false);
        });
      return writing;
    },
  };
}
