import type { Plan } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import type { SheetFonts } from "./font-metrics";
import { furniture } from "./furniture";
import type { Item, Pack, Page, Point } from "./page";
import { PAPERS, type PaperName } from "./paper";
import { SHEETS, type SheetName } from "./sheets";

/** What a pack is made of and for which printer. */
export interface PackOptions {
  readonly sheets: readonly SheetName[];
  readonly paper: PaperName;
  /** What the printer makes of a true length along x and y; 1 where it prints true. */
  readonly printerScale: Point;
  /** Printed as given, such as "1 December 2026": no clock is read. */
  readonly date: string;
  readonly version: string;
  readonly points: boolean;
  readonly grid: "fine" | "coarse";
  readonly saveInk: boolean;
  readonly mirrored: boolean;
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

/** @returns the first stop that the rules found, in words, or null. */
const doNotUse = (plan: Plan): string | null => plan.findings.find(({ severity }) => severity === "stop")?.message ?? null;

/**
 * Composes the printed pack. Pure: the same input gives the same pages. Throws a RangeError for a printer scale that is not believed.
 */
export function composePack(setup: Setup, plan: Plan, fonts: SheetFonts, options: PackOptions): Pack {
  const fault = scaleFault(options.printerScale);
  if (fault !== null) throw new RangeError(fault);
  const [scaleX, scaleY] = options.printerScale;
  // A page is composed in the millimetres that come out; a printer that prints long therefore has more room on its sheet.
  const paper: Point = [PAPERS[options.paper][0] * scaleX, PAPERS[options.paper][1] * scaleY];
  const reason = doNotUse(plan);
  const input = { setup, plan, fonts, paper, stopped: reason !== null, options };
  const bare = options.sheets.flatMap((name) => SHEETS[name].pages(input).map((page) => ({ ...page, sheet: name })));
  const pages = bare.map(({ sheet, title, widthMm, heightMm, items }, index): Page => {
    const facts = {
      name: titleOf(setup),
      setupId: plan.setupId,
      date: options.date,
      version: options.version,
      title,
      number: index + 1,
      count: bare.length,
      printerScale: options.printerScale,
      doNotUse: reason,
    };
    const { head, foot } = furniture(widthMm, heightMm, facts, fonts);
    return { sheet, title, widthMm, heightMm, printerScale: options.printerScale, items: [...head, ...items, ...foot] };
  });
  return {
    title: titleOf(setup),
    setupId: plan.setupId,
    date: options.date,
    version: options.version,
    pages,
  };
}
