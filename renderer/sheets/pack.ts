import type { Plan } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import type { ContentsEntry } from "./cover";
import type { FieldInk } from "./field-drawing";
import type { SheetFonts } from "./font-metrics";
import { furniture } from "./furniture";
import type { Item, Pack, Page, Point } from "./page";
import { EDGE_RANGE_MM, PAPERS, type PaperName, PRINTER_EDGE_MM } from "./paper";
import { printable } from "./printable";
import { SHEETS, type Sheet, type SheetInput, type SheetName } from "./sheets";

/** What a pack is made of and for which printer. */
export interface PackOptions {
  readonly sheets: readonly SheetName[];
  readonly paper: PaperName;
  /** What the printer makes of a true length along the short and the long side of the paper; 1 where it prints true. */
  readonly printerScale: Point;
  /** Printed as given, such as "1 December 2026": no clock is read. */
  readonly date: string;
  readonly version: string;
  readonly points: boolean;
  readonly grid: "fine" | "coarse";
  readonly saveInk: boolean;
  readonly mirrored: boolean;
  /** How the field key shows the potential; absent: in colour, hatched when ink is saved. */
  readonly fieldInk?: FieldInk;
  /** The field key at full size on as many tiles as it needs; absent: fitted to one page. */
  readonly fieldFullSize?: boolean;
  /** What the printer leaves blank at every edge, mm, 4 to 20; absent: PRINTER_EDGE_MM. */
  readonly edgeMm?: number;
  /** Thickness of the tray's wall, mm: draws the outside of the base too; absent: the inside alone. */
  readonly wallMm?: number;
}

/** A sheet's page before it gets header, footer and number. */
export interface BarePage {
  readonly title: string;
  readonly widthMm: number;
  readonly heightMm: number;
  readonly items: readonly Item[];
}

/** The corrections that are believed: outside them something else is wrong than the printer's feed. */
export const LEAST_SCALE = 0.95;
export const MOST_SCALE = 1.05;

/** @returns why a printer's scale is refused, or null. */
export function scaleFault(scale: Point): string | null {
  const bad = scale.find((value) => !(value >= LEAST_SCALE && value <= MOST_SCALE));
  if (bad === undefined) return null;
  return `the printer's scale is ${bad}, allowed: ${LEAST_SCALE} to ${MOST_SCALE}; a bar that is farther off was printed “fit to page”`;
}

const titleOf = ({ title }: Setup): string => (title.trim() === "" ? "Untitled tray" : title);

/** @returns the first stop that the rules found, in words, and how many there are; or null. */
function doNotUse({ findings }: Plan): string | null {
  const stops = findings.filter(({ severity }) => severity === "stop");
  if (stops.length === 0) return null;
  return stops.length === 1 ? stops[0].message : `1 of ${stops.length} reasons: ${stops[0].message}`;
}

/** @returns the printer's scale along a page's own x and y: the long side of the paper keeps its scale when the page lies across. */
const scaleOn = ({ widthMm, heightMm }: BarePage, [short, long]: Point): Point => (widthMm > heightMm ? [long, short] : [short, long]);

/** Makes the pages of one sheet, before they are numbered. */
function pagesOf(
  name: SheetName,
  input: Omit<SheetInput, "paper">,
): (BarePage & { sheet: SheetName; scale: Point; uncorrected: boolean })[] {
  const sheet: Sheet = SHEETS[name];
  const scale: Point = sheet.uncorrected ? [1, 1] : input.options.printerScale;
  const [short, long] = PAPERS[input.options.paper];
  // A page is composed in the millimetres that come out; a printer that prints long therefore has more room on its sheet.
  const pages = sheet.pages({ ...input, paper: [short * scale[0], long * scale[1]] });
  return pages.map((page) => ({ ...page, sheet: name, scale: scaleOn(page, scale), uncorrected: sheet.uncorrected ?? false }));
}

/** What the cover lists: each sheet with its pages. */
function contentsOf(bare: readonly { sheet: SheetName }[], pagesBefore: number): ContentsEntry[] {
  const names = [...new Set(bare.map(({ sheet }) => sheet))];
  return names.map((name) => ({
    title: SHEETS[name].title,
    first: pagesBefore + 1 + bare.findIndex(({ sheet }) => sheet === name),
    last: pagesBefore + 1 + bare.findLastIndex(({ sheet }) => sheet === name),
  }));
}

/**
 * Composes the printed pack. Pure: the same input gives the same pages. Throws a RangeError for a printer scale that is not believed, and for an edge out of range.
 */
export function composePack(givenSetup: Setup, givenPlan: Plan, fonts: SheetFonts, options: PackOptions): Pack {
  const fault = scaleFault(options.printerScale);
  if (fault !== null) throw new RangeError(fault);
  const [setup, plan] = [printable(givenSetup, fonts), printable(givenPlan, fonts)];
  const reason = doNotUse(plan);
  const edgeMm = options.edgeMm ?? PRINTER_EDGE_MM;
  const [leastMm, mostMm] = EDGE_RANGE_MM;
  if (!(edgeMm >= leastMm && edgeMm <= mostMm)) throw new RangeError(`the blank edge is ${edgeMm} mm, allowed: ${leastMm} to ${mostMm} mm`);
  const input = { setup, plan, fonts, frame: { stopped: reason !== null, edgeMm }, options, contents: [] };
  const others = options.sheets.filter((name) => name !== "cover").flatMap((name) => pagesOf(name, input));
  const withContents = (pagesBefore: number) => pagesOf("cover", { ...input, contents: contentsOf(others, pagesBefore) });
  // The cover's own length does not depend on the page numbers that it lists.
  const covers = options.sheets.includes("cover") ? withContents(withContents(0).length) : [];
  const bare = [...covers, ...others];
  const pages = bare.map(({ sheet, title, widthMm, heightMm, items, scale, uncorrected }, index): Page => {
    const facts = {
      name: titleOf(setup),
      setupId: plan.setupId,
      date: options.date,
      version: options.version,
      title,
      number: index + 1,
      count: bare.length,
      correction: uncorrected ? null : options.printerScale,
      edgeMm,
      doNotUse: reason,
    };
    const { head, foot } = furniture(widthMm, heightMm, facts, fonts);
    return { sheet, title, widthMm, heightMm, printerScale: scale, items: [...head, ...items, ...foot] };
  });
  return { title: titleOf(givenSetup), setupId: plan.setupId, date: options.date, version: options.version, pages };
}
