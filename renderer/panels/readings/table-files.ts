import type { Host } from "../../../shared-types/host";
import { texts } from "../../texts/texts";
import type { WindowStore } from "../window-state";

const words = texts.readings.table;

/** Asks for a CSV file. @returns its text; null when the user thought better of it, or after telling why it could not be read. */
export async function importedText(host: Pick<Host, "importText">, window: Pick<WindowStore, "tell">): Promise<string | null> {
  const chosen = await host.importText("csv");
  if (chosen.kind === "opened") return chosen.text;
  if (chosen.kind === "failed") window.tell({ tone: "problem", title: words.notImported, lines: [chosen.message], choices: [] });
  return null;
}

/** Hands a table to a file of the user's choice, and tells how that went. */
export async function exportTable(
  host: Pick<Host, "exportFile">,
  window: Pick<WindowStore, "tell">,
  suggestedName: string,
  csv: string,
): Promise<void> {
  const outcome = await host.exportFile({ suggestedName: suggestedName.slice(-200), kind: "csv", bytes: new TextEncoder().encode(csv) });
  if (outcome.kind === "saved") window.tell({ tone: "done", title: words.saved(outcome.name), lines: [], choices: [] });
  else if (outcome.kind === "failed") window.tell({ tone: "problem", title: words.notSaved, lines: [outcome.message], choices: [] });
}
