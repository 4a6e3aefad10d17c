import type { Plan } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import type { SheetFonts } from "./font-metrics";
import type { ClippedItem, Page } from "./page";
import { pageSvg } from "./svg";
import { type DrawingChoice, trayDrawing } from "./template-drawing";

/** Room round the drawing, mm. */
const MARGIN_MM = 2;

/** @returns the template in one piece as an SVG of its true size in millimetres, for a plotter or a drawing program. */
export function templateSvg(setup: Setup, plan: Plan, fonts: SheetFonts, choice: DrawingChoice): string {
  const everywhere = [[-Infinity, Infinity]] as const;
  const { bounds, items } = trayDrawing(setup, plan, fonts, choice, everywhere, everywhere);
  const [left, bottom, right, top] = bounds;
  const [widthMm, heightMm] = [right - left + 2 * MARGIN_MM, top - bottom + 2 * MARGIN_MM];
  const drawing: ClippedItem = {
    kind: "clipped",
    window: [0, 0, widthMm, heightMm],
    offset: [MARGIN_MM - left, MARGIN_MM - bottom],
    items,
  };
  const page: Page = {
    sheet: "template",
    title: `Tray template 1:1, setup ${plan.setupId}`,
    widthMm,
    heightMm,
    printerScale: [1, 1],
    items: [drawing],
  };
  return pageSvg(page);
}
