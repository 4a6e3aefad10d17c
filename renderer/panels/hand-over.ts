import type { Host } from "../../shared-types/host";
import type { Plan } from "../../shared-types/plan";
import { texts } from "../texts/texts";
import type { Printable } from "./print-plan";
import type { DrawingKind, SheetChoice, SheetSource } from "./sheet-choice";
import type { WindowStore } from "./window-state";

const words = texts.sheets;

export interface HandOver {
  readonly savePdf: () => Promise<void>;
  readonly print: () => Promise<void>;
  readonly saveDrawing: (kind: DrawingKind) => Promise<void>;
  /** The probe table for a spreadsheet. */
  readonly saveTable: () => Promise<void>;
}

/** Makes finished documents and hands them to a file or the printer; tells how that went. */
export function handOverOf(
  host: Host,
  window: WindowStore,
  printable: () => Promise<Printable | string>,
  choice: () => SheetChoice,
  loadSheets: () => Promise<SheetSource>,
  tableOf: (plan: Plan) => string,
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

  const pdfOf = async ({ setup, plan }: Printable) => (await loadSheets()).pdf(setup, plan, choice());

  async function exported(
    suggestedName: string,
    kind: "pdf" | "csv" | DrawingKind,
    bytes: Uint8Array<ArrayBuffer>,
  ): Promise<string | null> {
    const outcome = await host.exportFile({ suggestedName: suggestedName.slice(0, 200), kind, bytes });
    if (outcome.kind === "saved") {
      window.tell({ tone: "done", title: words.saved(outcome.name), lines: kind === "pdf" ? [words.savedLine] : [], choices: [] });
    }
    return outcome.kind === "failed" ? outcome.message : null;
  }

  return {
    savePdf: () => hand(async (from, title) => exported(`${title}.pdf`, "pdf", await pdfOf(from)), words.notHandedOver),
    print: () =>
      hand(async (from, title) => {
        const outcome = await host.printPdf({ title: title.slice(0, 300), bytes: await pdfOf(from) });
        return outcome.kind === "failed" ? outcome.message : null;
      }, words.notHandedOver),
    saveDrawing: (kind) =>
      hand(async ({ setup, plan }, title) => {
        const bytes = await (await loadSheets()).drawing(kind, setup, plan, choice());
        return exported(words.drawingName(title, kind), kind, bytes);
      }, words.notHandedOver),
    saveTable: () =>
      hand(({ plan }, title) => exported(words.tableName(title), "csv", new TextEncoder().encode(tableOf(plan))), words.notHandedOverTable),
  };
}
