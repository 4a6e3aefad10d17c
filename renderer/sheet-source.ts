import regularUrl from "../node_modules/dejavu-fonts-ttf/ttf/DejaVuSansCondensed.ttf?url";
import boldUrl from "../node_modules/dejavu-fonts-ttf/ttf/DejaVuSansCondensed-Bold.ttf?url";
import { version } from "../package.json";
import type { Plan } from "../shared-types/plan";
import type { Setup } from "../shared-types/setup";
import type { SheetChoice, SheetSource } from "./panels/sheet-choice";
import { readFontMetrics } from "./sheets/font-metrics";
import { composePack, scaleFault } from "./sheets/pack";
import { packPdfSteps } from "./sheets/pdf";
import { PRESETS, SHEET_NAMES, SHEETS } from "./sheets/sheets";
import { pageSvg } from "./sheets/svg";
import { templateDxf } from "./sheets/template-dxf";
import { templateSvg } from "./sheets/template-svg";

/** Joins the sheets to the window: brings the fonts and today's date, which the pure code does not know. */

const bytesOf = async (url: string): Promise<Uint8Array> => new Uint8Array(await (await fetch(url)).arrayBuffer());

/** After this long, ms, the window has its turn before the next page is set. */
const TURN_MS = 30;
const windowsTurn = (): Promise<void> => new Promise((resolve) => setTimeout(resolve));

/** @returns today as it is printed, and as it is written into the file. */
function today(): { readonly printed: string; readonly iso: string } {
  const now = new Date();
  return {
    printed: now.toLocaleDateString("en-GB", { day: "numeric", month: "long", year: "numeric" }),
    iso: `${now.getFullYear()}-${String(now.getMonth() + 1).padStart(2, "0")}-${String(now.getDate()).padStart(2, "0")}`,
  };
}

/** @returns whoever makes the sheets: pages, pictures and PDF from the same page data. */
export async function createSheetSource(): Promise<SheetSource> {
  const [regular, bold] = await Promise.all([bytesOf(regularUrl), bytesOf(boldUrl)]);
  const metrics = { regular: readFontMetrics(regular), bold: readFontMetrics(bold) };
  const pack = (setup: Setup, plan: Plan, choice: SheetChoice) =>
    composePack(setup, plan, metrics, {
      sheets: SHEET_NAMES.filter((name) => choice.pages.includes(name)),
      paper: choice.paper,
      printerScale: choice.printerScale,
      date: today().printed,
      version,
      points: choice.withPoints,
      grid: choice.grid,
      saveInk: choice.saveInk,
      mirrored: choice.mirrored,
      fieldFullSize: choice.fieldFullSize,
      edgeMm: choice.edgeMm,
      wallMm: choice.wallMm,
    });
  return {
    pageNames: SHEET_NAMES.map((name) => [name, SHEETS[name].title]),
    presets: PRESETS,
    scaleFault,
    pictures: async (setup, plan, choice) =>
      pack(setup, plan, choice).pages.map((page, index) => ({
        id: `${page.sheet} ${index}`,
        name: page.title,
        widthMm: page.widthMm,
        heightMm: page.heightMm,
        svg: pageSvg(page),
      })),
    drawing: async (kind, setup, plan, choice) => {
      const { withPoints: points, grid, saveInk, mirrored, wallMm } = choice;
      const text =
        kind === "dxf" ? templateDxf(setup, plan, points) : templateSvg(setup, plan, metrics, { points, grid, saveInk, mirrored, wallMm });
      return new TextEncoder().encode(text);
    },
    pdf: async (setup, plan, choice, { onPage, signal }) => {
      const made = pack(setup, plan, choice);
      await windowsTurn();
      if (signal.aborted) return null;
      const steps = packPdfSteps(made, { regular, bold }, today().iso);
      let turnBegan = performance.now();
      for (;;) {
        const step = steps.next();
        if (step.done === true) return step.value;
        onPage(step.value, made.pages.length);
        if (performance.now() - turnBegan < TURN_MS) continue;
        await windowsTurn();
        if (signal.aborted) return null;
        turnBegan = performance.now();
      }
    },
  };
}
