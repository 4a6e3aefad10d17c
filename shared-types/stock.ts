import { z } from "zod";
import { LARGEST_FILE_BYTES, parseProblems } from "./parse-setup";
import { failure, type Result, success } from "./result";
import { shapeSchema, traySchema } from "./setup";

/**
 * A stock list: what a prep room owns. It belongs to the user, not to a setup: it is kept among the settings, and travels between rooms as
 * a JSON file of its own. Lengths in mm.
 */

const LARGEST_COUNT = 9999;
const count = z
  .number({ error: `0 to ${LARGEST_COUNT}` })
  .int()
  .min(0)
  .max(LARGEST_COUNT);
const name = z.string().min(1).max(80);

export const stockSchema = z.strictObject({
  format: z.literal("fieldtray.stock"),
  version: z.literal(1),
  owner: z.string().max(120).default(""),
  trays: z
    .array(z.strictObject({ name, count, tray: traySchema }))
    .max(100)
    .default([]),
  parts: z
    .array(
      z.strictObject({
        name,
        count,
        /** An insulator, or metal that a setup wires or leaves floating. */
        insulates: z.boolean().default(false),
        material: z.string().min(1).max(60),
        heightMm: z.number().min(0.1).max(500),
        shape: shapeSchema,
      }),
    )
    .max(300)
    .default([]),
  supplies: z
    .array(
      z.strictObject({
        name,
        count,
        waveform: z.enum(["ac", "dc"]),
        mostVolts: z.number().min(0.001).max(1000),
        mostAmperes: z.number().min(0.0001).max(1000),
        source: z.string().min(1).max(60).default("safety-isolated"),
      }),
    )
    .max(100)
    .default([]),
});

type DeepReadonly<T> = T extends object ? { readonly [Key in keyof T]: DeepReadonly<T[Key]> } : T;
export type Stock = DeepReadonly<z.output<typeof stockSchema>>;
export type StockTray = Stock["trays"][number];
export type StockPart = Stock["parts"][number];
export type StockSupply = Stock["supplies"][number];

export const EMPTY_STOCK: Stock = { format: "fieldtray.stock", version: 1, owner: "", trays: [], parts: [], supplies: [] };

/** @returns the stock list in a text, or what is wrong with it: which key, its value, what is allowed. */
export function parseStockText(text: string): Result<Stock> {
  if (text.length > LARGEST_FILE_BYTES)
    return failure("", `the stock list holds ${text.length} bytes, allowed: at most ${LARGEST_FILE_BYTES}`);
  let data: unknown;
  try {
    data = JSON.parse(text.replace(/^\uFEFF/, ""));
  } catch (error) {
    return failure("", `the stock list is not valid JSON (${error instanceof Error ? error.message : String(error)})`);
  }
  if (typeof data !== "object" || data === null || Reflect.get(data, "format") !== "fieldtray.stock") {
    return failure("format", 'this is not a Fieldtray stock list: format must be "fieldtray.stock"');
  }
  const parsed = stockSchema.safeParse(data);
  return parsed.success ? success(parsed.data) : { ok: false, problems: parseProblems(parsed.error, data) };
}

/** @returns the text that is saved for a stock list. */
export const stockText = (stock: Stock): string => `${JSON.stringify(stock, null, 2)}\n`;
