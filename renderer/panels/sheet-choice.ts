import type { Printer, Settings } from "../../shared-types/host";
import type { Plan } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";

/** A page as the desk shows it: the very page that is printed. */
export interface PagePicture {
  /** Differs from page to page of a pack. */
  readonly id: string;
  readonly name: string;
  readonly widthMm: number;
  readonly heightMm: number;
  readonly svg: string;
}

export type DrawingKind = "dxf" | "svg";
export type Paper = Settings["paper"];

/** What is to be printed. */
export interface SheetChoice {
  readonly pages: readonly string[];
  readonly paper: Paper;
  readonly withPoints: boolean;
  readonly saveInk: boolean;
  readonly mirrored: boolean;
  /** The field key as large as the tray, not on one page. */
  readonly fieldFullSize: boolean;
  readonly grid: "fine" | "coarse";
  /** Thickness of the tray's wall, mm: draws the outside of the base too; 0 draws the inside alone. */
  readonly wallMm: number;
  /** What the printer leaves blank at every edge, mm, 4 to 20. */
  readonly edgeMm: number;
  /** What the printer makes of a true length along the short and the long side of the paper; 1 where it prints true. */
  readonly printerScale: readonly [number, number];
}

/** What the user chooses anew for each session; paper and printer are settings. */
export type PageChoice = Omit<SheetChoice, "paper" | "printerScale">;

export const FIRST_CHOICE: PageChoice = {
  pages: ["template", "probe-table", "bench-list"],
  withPoints: true,
  saveInk: false,
  mirrored: false,
  fieldFullSize: false,
  grid: "fine",
  wallMm: 0,
  edgeMm: 5,
};

/** Whoever waits for a pack: hears of every page done, and may give up between two pages. */
export interface PackWatch {
  readonly onPage: (done: number, count: number) => void;
  readonly signal: AbortSignal;
}

/** Whoever makes the sheets; loaded when first used. */
export interface SheetSource {
  /** Names of pages with their titles, in the order of the pack. */
  readonly pageNames: readonly (readonly [name: string, title: string])[];
  readonly presets: readonly (readonly [title: string, pages: readonly string[]])[];
  /** @returns why a printer's scale is not believed, or null. */
  readonly scaleFault: (scale: readonly [number, number]) => string | null;
  readonly pictures: (setup: Setup, plan: Plan, choice: SheetChoice) => Promise<readonly PagePicture[]>;
  /** The template in one piece at true size, for a cutter, a plotter or a drawing program. */
  readonly drawing: (kind: DrawingKind, setup: Setup, plan: Plan, choice: SheetChoice) => Promise<Uint8Array<ArrayBuffer>>;
  /** The pack as PDF, made in short turns so that the window answers meanwhile; null when given up. */
  readonly pdf: (setup: Setup, plan: Plan, choice: SheetChoice, watch: PackWatch) => Promise<Uint8Array<ArrayBuffer> | null>;
}

/** @returns the printer in use, or null where lengths are printed without correction. */
export const printerInUse = ({ printers, printer }: Settings): Printer | null => printers.find(({ name }) => name === printer) ?? null;

/** @returns settings in which the printer in use is another; the first measured printer gets a name of its own. */
export function withPrinter(settings: Settings, change: Partial<Printer>, firstName: string): Pick<Settings, "printers" | "printer"> {
  const used = printerInUse(settings);
  const next: Printer = { ...(used ?? { name: firstName, scaleX: 1, scaleY: 1 }), ...change };
  const others = settings.printers.filter(({ name }) => name !== used?.name && name !== next.name);
  return { printers: [...others, next], printer: next.name };
}

/** @returns settings without the printer in use. */
export const withoutPrinter = (settings: Settings): Pick<Settings, "printers" | "printer"> => ({
  printers: settings.printers.filter(({ name }) => name !== settings.printer),
  printer: null,
});

/** @returns what is to be printed: the pages chosen, on the paper and for the printer of the settings. */
export function sheetChoiceOf(pages: PageChoice, settings: Settings): SheetChoice {
  const printer = printerInUse(settings);
  return { ...pages, paper: settings.paper, printerScale: [printer?.scaleX ?? 1, printer?.scaleY ?? 1] };
}
