import type { Plan } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import { traySizeMm } from "../engine/geometry/tray-outline";
import { benchList } from "./bench-list";
import { calibrationItems } from "./calibration";
import { certificates, certifiedRuns } from "./certificate";
import { checklist } from "./checklist";
import { type ContentsEntry, cover } from "./cover";
import { fieldKeyPages } from "./field-key";
import { type Block, flowPages } from "./flow";
import type { SheetFonts } from "./font-metrics";
import type { BarePage, PackOptions } from "./pack";
import type { Point } from "./page";
import { type Frame, type Sheet as PaperSheet, tilingFor } from "./paper";
import { probeTable } from "./probe-table";
import { recordPage } from "./record-page";
import type { TablePage } from "./table";
import { drawingBounds, trayDrawing } from "./template-drawing";
import { columnsOf, rowsOf, tilesOf } from "./tiles";

/** All that a sheet is made from. */
export interface SheetInput {
  readonly setup: Setup;
  readonly plan: Plan;
  readonly fonts: SheetFonts;
  /** The paper upright, mm. */
  readonly paper: Point;
  readonly frame: Frame;
  readonly options: PackOptions;
  /** What the pack holds, for the cover; empty while the other sheets are made. */
  readonly contents: readonly ContentsEntry[];
}

export interface Sheet {
  readonly title: string;
  readonly pages: (input: SheetInput) => BarePage[];
  /** Printed as the printer will have it, whatever its correction. */
  readonly uncorrected?: boolean;
}

const upright = ({ paper: [widthMm, heightMm], frame }: SheetInput): PaperSheet => ({ widthMm, heightMm, ...frame });

const tabled = (title: string, { paper: [widthMm, heightMm] }: SheetInput, pages: readonly TablePage[]): BarePage[] =>
  pages.map(({ items }, index) => ({
    title: pages.length > 1 ? `${title}, ${index + 1} of ${pages.length}` : title,
    widthMm,
    heightMm,
    items,
  }));

const flowed = (title: string, input: SheetInput, blocks: readonly Block[]): BarePage[] =>
  tabled(title, input, flowPages(blocks, upright(input), input.fonts));

/** In a pack with other sheets the certificate waits until something was read. */
function certificatePages(input: SheetInput): BarePage[] {
  if (input.options.sheets.length > 1 && certifiedRuns(input.setup).length === 0) return [];
  return flowed("Tray certificate", input, certificates(input.setup, input.plan));
}

/** A 1:1 sheet of the tray, on as many tiles as it needs. */
const tiled = (title: string, { setup, plan, fonts, paper, frame, options }: SheetInput, answers: boolean): BarePage[] => {
  const mirrored = answers && options.mirrored;
  const wallMm = options.wallMm ?? 0;
  const bounds = drawingBounds(setup, wallMm);
  const tiling = tilingFor([bounds[2] - bounds[0], bounds[3] - bounds[1]], paper, frame);
  const choice = { points: answers && options.points, grid: options.grid, saveInk: options.saveInk, mirrored, wallMm };
  const drawing = trayDrawing(setup, plan, fonts, choice, columnsOf(bounds, tiling), rowsOf(bounds, tiling));
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  const reader = mirrored ? "mirrored: lay it face down, ▼ this side towards the reader" : "▼ this side towards the reader";
  const missing = drawing.leftOut === 0 ? "" : ` · ${drawing.leftOut} numbers or names found no room: see the probe table`;
  const note = `${reader} · thick outline: inside of the wall (0, 0 at its lower ${mirrored ? "right" : "left"} corner)${wallMm > 0 ? "; thin: its outside" : ""}${missing}`;
  const tiles = tilesOf(drawing, tiling, { lengthMm, widthMm, mirrored, note }, fonts);
  return tiles.map(({ label, widthMm, heightMm, items }) => ({
    title: `${title} 1:1${mirrored ? ", mirrored" : ""}${tiles.length > 1 ? `, tile ${label}` : ""}`,
    widthMm,
    heightMm,
    items,
  }));
};

/** Every sheet by its name: the order is that of the pack. */
export const SHEETS = {
  cover: {
    title: "Cover",
    pages: (input) => flowed("Session pack", input, cover(input.setup, input.plan, input.fonts, input.contents, input.options.version)),
  },
  template: { title: "Tray template", pages: (input) => tiled("Tray template", input, true) },
  record: {
    title: "Record sheet",
    pages: (input) => [
      ...tiled("Record sheet", input, false),
      ...flowed("Record sheet, readings", input, recordPage(input.setup, upright(input))),
    ],
  },
  "probe-table": {
    title: "Probe table for staff",
    pages: (input) => tabled("Probe table for staff", input, probeTable(input.setup, input.plan, false, upright(input), input.fonts)),
  },
  "class-table": {
    title: "Probe table for the class",
    pages: (input) => tabled("Probe table for the class", input, probeTable(input.setup, input.plan, true, upright(input), input.fonts)),
  },
  "field-key": {
    title: "Field key",
    pages: (input) =>
      fieldKeyPages(input, input.options.fieldInk ?? (input.options.saveInk ? "hatched" : "colour"), input.options.fieldFullSize ?? false),
  },
  checklist: {
    title: "Low-voltage checklist",
    pages: (input) => flowed("Low-voltage checklist", input, checklist(input.setup, input.plan)),
  },
  certificate: { title: "Tray certificate", pages: certificatePages },
  "bench-list": { title: "Bench list", pages: (input) => flowed("Bench list", input, benchList(input.setup, input.plan)) },
  calibration: {
    title: "Printer calibration",
    uncorrected: true,
    pages: (input) => [
      {
        title: "Printer calibration",
        widthMm: input.paper[0],
        heightMm: input.paper[1],
        items: calibrationItems(upright(input), input.fonts),
      },
    ],
  },
} as const satisfies Readonly<Record<string, Sheet>>;

export type SheetName = keyof typeof SHEETS;

/** Sheet names in the order of the pack. */
export const SHEET_NAMES = Object.keys(SHEETS) as readonly SheetName[];

/** Ready choices of sheets for those who work from them. */
export const PRESETS: readonly (readonly [title: string, sheets: readonly SheetName[]])[] = [
  ["Technician", ["template", "probe-table", "bench-list"]],
  ["Teacher", ["cover", "template", "probe-table", "field-key", "bench-list"]],
  ["Class", ["record", "class-table"]],
  ["Safety", ["cover", "checklist"]],
  ["Everything", SHEET_NAMES],
];
