import type { Plan } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import type { SheetFonts } from "./font-metrics";
import type { BarePage, PackOptions } from "./pack";
import type { Point } from "./page";
import { probeTable } from "./probe-table";
import type { TablePage } from "./table";
import { trayDrawing } from "./template-drawing";
import { tilesOf } from "./tiles";

/** All that a sheet is made from. */
export interface SheetInput {
  readonly setup: Setup;
  readonly plan: Plan;
  readonly fonts: SheetFonts;
  /** The paper upright, mm. */
  readonly paper: Point;
  readonly options: PackOptions;
}

interface Sheet {
  readonly title: string;
  readonly pages: (input: SheetInput) => BarePage[];
}

const tabled = (title: string, [widthMm, heightMm]: Point, pages: readonly TablePage[]): BarePage[] =>
  pages.map(({ items }, index) => ({
    title: pages.length > 1 ? `${title}, ${index + 1} of ${pages.length}` : title,
    widthMm,
    heightMm,
    items,
  }));

const tiled = (title: string, input: SheetInput, answers: boolean): BarePage[] => {
  const { setup, plan, fonts, paper, options } = input;
  const drawing = trayDrawing(setup, plan, fonts, {
    points: answers && options.points,
    parts: true,
    grid: options.grid,
    saveInk: options.saveInk,
    mirrored: answers && options.mirrored,
  });
  const tiles = tilesOf(drawing, paper);
  return tiles.map(({ label, widthMm, heightMm, items }) => ({
    title: `${title} 1:1${answers && options.mirrored ? ", mirrored" : ""}${tiles.length > 1 ? `, tile ${label}` : ""}`,
    widthMm,
    heightMm,
    items,
  }));
};

/** Every sheet by its name: the order is that of the pack. */
export const SHEETS = {
  template: { title: "Tray template", pages: (input) => tiled("Tray template", input, true) },
  record: { title: "Record sheet", pages: (input) => tiled("Record sheet", input, false) },
  "probe-table": {
    title: "Probe table for staff",
    pages: ({ setup, plan, fonts, paper }) => tabled("Probe table", paper, probeTable(setup, plan, false, paper, fonts)),
  },
  "class-table": {
    title: "Probe table for the class",
    pages: ({ setup, plan, fonts, paper }) => tabled("Probe table for the class", paper, probeTable(setup, plan, true, paper, fonts)),
  },
} as const satisfies Readonly<Record<string, Sheet>>;

export type SheetName = keyof typeof SHEETS;

/** Sheet names in the order of the pack. */
export const SHEET_NAMES = Object.keys(SHEETS) as readonly SheetName[];

/** Ready choices of sheets for those who work from them. */
export const PRESETS: readonly (readonly [title: string, sheets: readonly SheetName[]])[] = [
  ["Technician", ["template", "probe-table"]],
  ["Class", ["record", "class-table"]],
];
