import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { createPlanner } from "../../../renderer/engine/plan";
import { readFontMetrics, type SheetFonts } from "../../../renderer/sheets/font-metrics";
import { composePack, type PackOptions } from "../../../renderer/sheets/pack";
import type { Pack } from "../../../renderer/sheets/page";
import { type FontFiles, packPdf } from "../../../renderer/sheets/pdf";
import type { Plan } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";

/** Packs as the window and the headless command make them, for the tests of paper. */

const fontFile = (name: string): Uint8Array =>
  new Uint8Array(readFileSync(fileURLToPath(new URL(`../../../node_modules/dejavu-fonts-ttf/ttf/${name}.ttf`, import.meta.url))));

export const FONT_FILES: FontFiles = { regular: fontFile("DejaVuSansCondensed"), bold: fontFile("DejaVuSansCondensed-Bold") };
export const FONTS: SheetFonts = { regular: readFontMetrics(FONT_FILES.regular), bold: readFontMetrics(FONT_FILES.bold) };

/** @returns the plan of a setup; throws when it cannot be planned. */
export async function planned(setup: Setup, quality: "live" | "print" = "live"): Promise<Plan> {
  const outcome = await createPlanner().plan(setup, quality);
  if (!outcome.ok) throw new Error(outcome.refusal.message);
  return outcome.plan;
}

export const ORDER: PackOptions = {
  sheets: ["template"],
  paper: "a4",
  printerScale: [1, 1],
  date: "1 December 2026",
  version: "0.1.0",
  points: true,
  grid: "fine",
  saveInk: false,
  mirrored: false,
};

/** @returns a pack of a planned setup; `order` says what differs from a plain template on A4. */
export const packOf = (setup: Setup, plan: Plan, order: Partial<PackOptions> = {}): Pack =>
  composePack(setup, plan, FONTS, { ...ORDER, ...order });

/** @returns the PDF of a pack. */
export const pdfOf = (pack: Pack): Uint8Array => packPdf(pack, FONT_FILES, "2026-12-01");
