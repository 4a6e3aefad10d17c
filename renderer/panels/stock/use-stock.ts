import { useMemo } from "react";
import type { Host, Settings } from "../../../shared-types/host";
import { EMPTY_STOCK, parseStockText, type Stock, stockText } from "../../../shared-types/stock";
import { texts } from "../../texts/texts";
import type { WindowStore } from "../window-state";

/** The stock list as the window holds it: kept among the settings of the user. */
export interface StockKeeper {
  readonly stock: Stock;
  readonly keep: (stock: Stock) => void;
}

const KEY = "stock";
const words = texts.stock.files;

/** @returns the stock list of the settings, an empty one where there is none, and how to keep another. */
export function useStock(settings: Settings, onSettings: (change: Partial<Settings>) => void): StockKeeper {
  const { preferences } = settings;
  const text = preferences[KEY];
  const stock = useMemo(() => {
    const parsed = typeof text === "string" ? parseStockText(text) : null;
    return parsed?.ok === true ? parsed.value : EMPTY_STOCK;
  }, [text]);
  return useMemo(
    () => ({ stock, keep: (next) => onSettings({ preferences: { ...preferences, [KEY]: JSON.stringify(next) } }) }),
    [stock, preferences, onSettings],
  );
}

type Tells = Pick<WindowStore, "tell">;

/** Asks for a stock list and keeps it in place of the one before; a file that is none is told why. */
export async function importStock(host: Pick<Host, "importText">, window: Tells, keep: (stock: Stock) => void): Promise<void> {
  const chosen = await host.importText("json");
  if (chosen.kind === "cancelled") return;
  const read = chosen.kind === "opened" ? parseStockText(chosen.text) : null;
  if (read?.ok === true) {
    keep(read.value);
    return;
  }
  const name = chosen.kind === "opened" ? chosen.file.name : texts.files.noFileOpened;
  const lines = chosen.kind === "failed" ? [chosen.message] : (read?.problems ?? []).slice(0, 4).map(({ message }) => message);
  window.tell({ tone: "problem", title: words.notRead(name), lines, choices: [] });
}

/** Saves the stock list where the user says. */
export async function exportStock(host: Pick<Host, "exportFile">, window: Tells, stock: Stock): Promise<void> {
  const bytes = new TextEncoder().encode(stockText(stock));
  const outcome = await host.exportFile({ suggestedName: words.fileName, kind: "json", bytes });
  if (outcome.kind === "saved") window.tell({ tone: "done", title: words.saved(outcome.name), lines: [], choices: [] });
  if (outcome.kind === "failed") window.tell({ tone: "problem", title: words.notSaved, lines: [outcome.message], choices: [] });
}
