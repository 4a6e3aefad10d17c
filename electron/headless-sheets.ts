import { rename, rm, stat, writeFile } from "node:fs/promises";
import { basename, dirname, join } from "node:path";
import regularFont from "../node_modules/dejavu-fonts-ttf/ttf/DejaVuSansCondensed.ttf?inline";
import boldFont from "../node_modules/dejavu-fonts-ttf/ttf/DejaVuSansCondensed-Bold.ttf?inline";
import { version } from "../package.json";
import { readFontMetrics } from "../renderer/sheets/font-metrics";
import { composePack, scaleFault } from "../renderer/sheets/pack";
import { PAPERS, type PaperName } from "../renderer/sheets/paper";
import { packPdf } from "../renderer/sheets/pdf";
import { SHEET_NAMES, type SheetName } from "../renderer/sheets/sheets";
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

/** Options of `sheets` as they are meant. */
export interface SheetOrder {
  readonly out: string;
  readonly paper: PaperName;
  readonly sheets: readonly SheetName[];
  readonly printerScale: readonly [number, number];
  /** ISO 8601. */
  readonly date: string;
}

const MONTHS = ["January", "February", "March", "April", "May", "June", "July", "August", "September", "October", "November", "December"];

function dateOf(typed: string | undefined, today: Date): string | null {
  const text =
    typed ?? `${today.getFullYear()}-${String(today.getMonth() + 1).padStart(2, "0")}-${String(today.getDate()).padStart(2, "0")}`;
  const date = new Date(`${text}T12:00:00Z`);
  return /^\d{4}-\d{2}-\d{2}$/.test(text) && !Number.isNaN(date.getTime()) && date.toISOString().startsWith(text) ? text : null;
}

/**
 * Reads the options before anything is solved.
 * @param wrong makes the refusal for an option that is wrong: it names the option, its value and what is allowed.
 */
export async function readSheetOptions(options: SheetOptions, wrong: (message: string) => Error, today: Date): Promise<SheetOrder> {
  if (options.out === undefined || options.out === "") throw wrong("sheets needs --out PACK.pdf, the file to write");
  const folder = await stat(dirname(options.out)).catch(() => null);
  if (folder === null || !folder.isDirectory()) throw wrong(`--out is "${options.out}", allowed: a file in a folder that is there`);
  const paper = (Object.keys(PAPERS) as PaperName[]).find((name) => name === (options.paper ?? "a4").toLowerCase());
  if (paper === undefined) throw wrong(`--paper is "${options.paper}", allowed: ${Object.keys(PAPERS).join(", ")}`);
  const names = options.only === undefined ? SHEET_NAMES : options.only.split(",").map((name) => name.trim());
  const unknown = names.find((name) => !SHEET_NAMES.some((known) => known === name));
  if (unknown !== undefined) throw wrong(`--only holds "${unknown}", allowed: ${SHEET_NAMES.join(", ")}`);
  const scale = (options["printer-scale"] ?? "1,1").split(",").map((part) => (part.trim() === "" ? Number.NaN : Number(part)));
  if (scale.length !== 2 || !scale.every(Number.isFinite))
    throw wrong(`--printer-scale is "${options["printer-scale"]}", allowed: two numbers X,Y`);
  const fault = scaleFault([scale[0], scale[1]]);
  if (fault !== null) throw wrong(`--printer-scale: ${fault}`);
  const date = dateOf(options.date, today);
  if (date === null) throw wrong(`--date is "${options.date}", allowed: a day such as 2026-12-01`);
  return { out: options.out, paper, sheets: SHEET_NAMES.filter((name) => names.includes(name)), printerScale: [scale[0], scale[1]], date };
}

const bytesOf = (dataUrl: string): Uint8Array => new Uint8Array(Buffer.from(dataUrl.slice(dataUrl.indexOf(",") + 1), "base64"));

/** Writes the printed pack: a whole file or none. @returns how many pages it has. */
export async function writeSheets(setup: Setup, plan: Plan, order: SheetOrder): Promise<number> {
  const files = { regular: bytesOf(regularFont), bold: bytesOf(boldFont) };
  const [year, month, day] = order.date.split("-").map(Number);
  const pack = composePack(
    setup,
    plan,
    { regular: readFontMetrics(files.regular), bold: readFontMetrics(files.bold) },
    {
      sheets: order.sheets,
      paper: order.paper,
      printerScale: order.printerScale,
      date: `${day} ${MONTHS[month - 1]} ${year}`,
      version,
      points: true,
      grid: "fine",
      saveInk: false,
      mirrored: false,
    },
  );
  const temporary = join(dirname(order.out), `.${basename(order.out)}.${process.pid}.part`);
  try {
    await writeFile(temporary, packPdf(pack, files, order.date));
    await rename(temporary, order.out);
  } catch (error) {
    await rm(temporary, { force: true });
    throw error;
  }
  return pack.pages.length;
}
