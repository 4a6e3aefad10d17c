import type { Host } from "../../shared-types/host";
import type { Plan } from "../../shared-types/plan";
import { texts } from "../texts/texts";
import type { Printable } from "./print-plan";
import type { DrawingKind, PackWatch, SheetChoice, SheetSource } from "./sheet-choice";
import type { WindowStore } from "./window-state";

const words = texts.sheets;

/** Work that takes longer than this, ms, is shown while it goes on. */
const SHOWN_AFTER_MS = 400;

export interface HandOver {
  readonly savePdf: () => Promise<void>;
  readonly print: () => Promise<void>;
  readonly saveDrawing: (kind: DrawingKind) => Promise<void>;
  /** The probe table for a spreadsheet. */
  readonly saveTable: () => Promise<void>;
  /** The tray as the window shows it, as a picture. */
  readonly savePicture: () => Promise<void>;
}

/** A watch over one pack that shows its progress when it takes long. */
function watchOf(window: WindowStore): { readonly watch: PackWatch; readonly end: () => void } {
  const stop = new AbortController();
  const begun = performance.now();
  let shown: ReturnType<WindowStore["tellProgress"]> | null = null;
  const onPage = (done: number, count: number): void => {
    if (performance.now() - begun < SHOWN_AFTER_MS) return;
    shown ??= window.tellProgress(words.setting, words.stopSetting, () => stop.abort());
    shown.show(done / count);
  };
  return { watch: { onPage, signal: stop.signal }, end: () => shown?.end() };
}

/** Makes finished documents and hands them to a file or the printer; tells how that went. */
export function handOverOf(
  host: Host,
  window: WindowStore,
  printable: () => Promise<Printable | string>,
  choice: () => SheetChoice,
  loadSheets: () => Promise<SheetSource>,
  tableOf: (plan: Plan) => string,
  picture: { readonly png: () => Promise<Uint8Array<ArrayBuffer> | null>; readonly title: () => string },
): HandOver {
  const problem = (title: string, line: string): void => {
    window.tell({ tone: "problem", title, lines: [line], choices: [] });
  };

  async function hand(give: (from: Printable, title: string) => Promise<string | null>, failing: string): Promise<void> {
    const from = await printable();
    if (typeof from === "string") {
      problem(words.nothingYet, from);
      return;
    }
    try {
      const refusal = await give(from, from.setup.title === "" ? words.fileTitle : from.setup.title);
      if (refusal !== null) problem(failing, refusal);
    } catch (error) {
      problem(words.couldNotBeMade, error instanceof Error ? error.message : String(error));
    }
  }

  /** Sets the pages with the window answering meanwhile. @returns null when the user stopped it. */
  async function pdfOf({ setup, plan }: Printable): Promise<Uint8Array<ArrayBuffer> | null> {
    const source = await loadSheets();
    const { watch, end } = watchOf(window);
    try {
      return await source.pdf(setup, plan, choice(), watch);
    } finally {
      end();
    }
  }

  async function exported(
    suggestedName: string,
    kind: "pdf" | "csv" | "png" | DrawingKind,
    bytes: Uint8Array<ArrayBuffer>,
  ): Promise<string | null> {
    const outcome = await host.exportFile({ suggestedName: suggestedName.slice(0, 200), kind, bytes });
    if (outcome.kind === "saved") {
      window.tell({ tone: "done", title: words.saved(outcome.name), lines: kind === "pdf" ? [words.savedLine] : [], choices: [] });
    }
    return outcome.kind === "failed" ? outcome.message : null;
  }

  return {
    savePdf: () =>
      hand(async (from, title) => {
        const bytes = await pdfOf(from);
        return bytes === null ? null : exported(`${title}.pdf`, "pdf", bytes);
      }, words.notHandedOver),
    print: () =>
      hand(async (from, title) => {
        const bytes = await pdfOf(from);
        if (bytes === null) return null;
        const outcome = await host.printPdf({ title: title.slice(0, 300), bytes });
        return outcome.kind === "failed" ? outcome.message : null;
      }, words.notHandedOver),
    saveDrawing: (kind) =>
      hand(async ({ setup, plan }, title) => {
        const bytes = await (await loadSheets()).drawing(kind, setup, plan, choice());
        return exported(words.drawingName(title, kind), kind, bytes);
      }, words.notHandedOver),
    saveTable: () =>
      hand(({ plan }, title) => exported(words.tableName(title), "csv", new TextEncoder().encode(tableOf(plan))), words.notHandedOverTable),
    // Of whatever is there to be seen: a tray that cannot be planned has a picture too.
    savePicture: async () => {
      try {
        const png = await picture.png();
        const refusal = png === null ? words.noPicture : await exported(words.pictureName(picture.title() || words.fileTitle), "png", png);
        if (refusal !== null) problem(words.notHandedOverPicture, refusal);
      } catch (error) {
        problem(words.notHandedOverPicture, error instanceof Error ? error.message : String(error));
      }
    },
  };
}
