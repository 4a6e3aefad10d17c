import { stat } from "node:fs/promises";
import { dirname } from "node:path";
import regularFont from "../../node_modules/dejavu-fonts-ttf/ttf/DejaVuSansCondensed.ttf?inline";
import boldFont from "../../node_modules/dejavu-fonts-ttf/ttf/DejaVuSansCondensed-Bold.ttf?inline";
import { version } from "../../package.json";
import { readFontMetrics } from "../../renderer/sheets/font-metrics";
import { composePack, scaleFault } from "../../renderer/sheets/pack";
import { PAPERS, type PaperName } from "../../renderer/sheets/paper";
import { packPdf } from "../../renderer/sheets/pdf";
import { PRESETS, SHEET_NAMES, type SheetName } from "../../renderer/sheets/sheets";
import type { Plan } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import { saveWhole } from "../save-whole";
import { pairOf } from "./arguments";
import { wrong } from "./refusal";

/** The options of `sheets` as they are meant. */
export interface SheetOrder {
  readonly out: string;
  readonly paper: PaperName;
  readonly sheets: readonly SheetName[];
  readonly printerScale: readonly [number, number];
  /** ISO 8601. */
  readonly date: string;
}

const PAPER_NAMES = Object.keys(PAPERS) as readonly PaperName[];
const MONTHS = ["January", "February", "March", "April", "May", "June", "July", "August", "September", "October", "November", "December"];

/** @returns the day as it is printed: "1 December 2026". */
function printedDate(iso: string): string {
  const [year, month, day] = iso.split("-").map(Number);
  return `${day} ${MONTHS[(month ?? 1) - 1]} ${year}`;
}

async function outOf(typed: string | undefined): Promise<string> {
  if (typed === undefined || typed === "") throw wrong("sheets needs --out PACK.pdf, the file to write");
  const folder = await stat(dirname(typed)).catch(() => null);
  if (folder === null || !folder.isDirectory()) throw wrong(`--out is "${typed}", allowed: a file in a folder that exists`);
  const there = await stat(typed).catch(() => null);
  if (there !== null && !there.isFile()) throw wrong(`--out is "${typed}", allowed: a file, not a folder`);
  return typed;
}

/** Sheets may be named one by one or by a ready choice; the pack keeps its own order. */
function sheetsOf(typed: string | undefined): readonly SheetName[] {
  if (typed === undefined) return SHEET_NAMES;
  const presets = new Map(PRESETS.map(([title, sheets]): [string, readonly SheetName[]] => [title.toLowerCase(), sheets]));
  const chosen = new Set<SheetName>();
  for (const name of typed.split(",").map((one) => one.trim().toLowerCase())) {
    const sheets = SHEET_NAMES.filter((known) => known === name).concat(presets.get(name) ?? []);
    if (sheets.length === 0) throw wrong(`--only holds "${name}", allowed: ${[...SHEET_NAMES, ...presets.keys()].join(", ")}`);
    for (const sheet of sheets) chosen.add(sheet);
  }
  return SHEET_NAMES.filter((name) => chosen.has(name));
}

function printerScaleOf(typed: string | undefined): readonly [number, number] {
  const scale = pairOf(typed ?? "1,1");
  if (scale === null) throw wrong(`--printer-scale is "${typed}", allowed: two numbers X,Y such as 0.998,1.002`);
  const fault = scaleFault(scale);
  if (fault !== null) throw wrong(`--printer-scale is "${typed}": ${fault}`);
  return scale;
}

function dateOf(typed: string | undefined, today: Date): string {
  const twoDigits = (value: number): string => String(value).padStart(2, "0");
  const iso = typed ?? `${today.getFullYear()}-${twoDigits(today.getMonth() + 1)}-${twoDigits(today.getDate())}`;
  const day = new Date(`${iso}T12:00:00Z`);
  const isDay = /^\d{4}-\d{2}-\d{2}$/.test(iso) && !Number.isNaN(day.getTime()) && day.toISOString().startsWith(iso);
  if (!isDay) throw wrong(`--date is "${iso}", allowed: a day written as YYYY-MM-DD, such as 2026-12-01`);
  return iso;
}

/**
 * Reads the options of `sheets` before anything is solved.
 * @returns the order; throws a refusal that names the option, its value and what is allowed.
 */
export async function sheetOrder(options: ReadonlyMap<string, string>, today: Date): Promise<SheetOrder> {
  const typedPaper = options.get("paper");
  const paper = PAPER_NAMES.find((name) => name === (typedPaper ?? "a4").toLowerCase());
  if (paper === undefined) throw wrong(`--paper is "${typedPaper}", allowed: ${PAPER_NAMES.join(", ")}`);
  return {
    paper,
    sheets: sheetsOf(options.get("only")),
    printerScale: printerScaleOf(options.get("printer-scale")),
    date: dateOf(options.get("date"), today),
    out: await outOf(options.get("out")),
  };
}

const bytesOf = (dataUrl: string): Uint8Array => new Uint8Array(Buffer.from(dataUrl.slice(dataUrl.indexOf(",") + 1), "base64"));

/** Writes the printed pack: a whole file or none. @returns how many pages it has. */
export async function writeSheets(setup: Setup, plan: Plan, order: SheetOrder): Promise<number> {
  const files = { regular: bytesOf(regularFont), bold: bytesOf(boldFont) };
  const metrics = { regular: readFontMetrics(files.regular), bold: readFontMetrics(files.bold) };
  const pack = composePack(setup, plan, metrics, {
    sheets: order.sheets,
    paper: order.paper,
    printerScale: order.printerScale,
    date: printedDate(order.date),
    version,
    points: true,
    grid: "fine",
    saveInk: false,
    mirrored: false,
  });
  const pdf = packPdf(pack, files, order.date);
  await saveWhole(order.out, pdf, false).catch((error: unknown) => {
    throw wrong(`--out "${order.out}" cannot be written: ${error instanceof Error ? error.message : String(error)}`);
  });
  return pack.pages.length;
}
