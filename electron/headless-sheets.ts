import type { Plan } from "../shared-types/plan";
import type { Setup } from "../shared-types/setup";

/** Options of `sheets` as they were typed. */
export interface SheetOptions {
  readonly out?: string;
  readonly paper?: string;
  readonly only?: string;
  readonly "printer-scale"?: string;
  readonly date?: string;
}

/** Writes the printed pack. @param wrong makes the refusal for options that are wrong. */
export async function writeSheets(_setup: Setup, _plan: Plan, options: SheetOptions, wrong: (message: string) => Error): Promise<void> {
  if (options.out === undefined) throw wrong("sheets needs --out PACK.pdf, the file to write");
  throw new Error("the sheets are not built yet");
}
