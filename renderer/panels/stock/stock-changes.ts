import type { Part, Setup, Tray } from "../../../shared-types/setup";
import type { Stock } from "../../../shared-types/stock";
import { thingName } from "../../document/edit";
import { trimmed } from "../../document/number-text";
import { isOf, sameTray } from "../../document/stock-findings";
import { texts } from "../../texts/texts";

const words = texts.stock.card;

/** What changes a stock list: pure, from list to list. A kind that is listed already is counted, not listed twice. */

/** @returns a tray's size in words. */
export const traySize = (tray: Tray): string =>
  tray.shape === "circle" ? `⌀ ${trimmed(tray.diameterMm, 1)} mm` : `${trimmed(tray.lengthMm, 1)} × ${trimmed(tray.widthMm, 1)} mm`;

/** @returns the list with one more tray of the setup's kind. */
export function withTray(stock: Stock, { tray }: Setup): Stock {
  const known = stock.trays.some((entry) => sameTray(tray, entry.tray));
  return {
    ...stock,
    trays: known
      ? stock.trays.map((entry) => (sameTray(tray, entry.tray) ? { ...entry, count: entry.count + 1 } : entry))
      : [...stock.trays, { name: words.trayName(traySize(tray)), count: 1, tray }],
  };
}

/** @returns the list with one more part of that kind. */
function withPart(stock: Stock, part: Part): Stock {
  const known = stock.parts.some((entry) => isOf(part, entry));
  const { material, heightMm, shape } = part;
  return {
    ...stock,
    parts: known
      ? stock.parts.map((entry) => (isOf(part, entry) ? { ...entry, count: entry.count + 1 } : entry))
      : [...stock.parts, { name: thingName(part), count: 1, insulates: part.role === "insulator", material, heightMm, shape }],
  };
}

/** @returns the list with one more of each of these parts. */
export const withParts = (stock: Stock, parts: readonly Part[]): Stock => parts.reduce(withPart, stock);

/** @returns the list with one more supply such as the setup asks for. */
export function withSupply(stock: Stock, { supply }: Setup): Stock {
  const { waveform, volts: mostVolts, currentLimitA: mostAmperes, source } = supply;
  const same = (entry: Stock["supplies"][number]): boolean =>
    entry.waveform === waveform && entry.mostVolts === mostVolts && entry.mostAmperes === mostAmperes && entry.source === source;
  return {
    ...stock,
    supplies: stock.supplies.some(same)
      ? stock.supplies.map((entry) => (same(entry) ? { ...entry, count: entry.count + 1 } : entry))
      : [
          ...stock.supplies,
          { name: words.supplyName(waveform, trimmed(mostVolts, 2)), count: 1, waveform, mostVolts, mostAmperes, source },
        ],
  };
}

type Kind = "trays" | "parts" | "supplies";

/** @returns the list with one entry changed, or struck off where `change` is null. */
export function withEntry(
  stock: Stock,
  kind: Kind,
  index: number,
  change: { readonly name?: string; readonly count?: number } | null,
): Stock {
  const changed = <Entry>(entries: readonly Entry[]): readonly Entry[] =>
    change === null
      ? entries.filter((_, one) => one !== index)
      : entries.map((entry, one) => (one === index ? { ...entry, ...change } : entry));
  if (kind === "trays") return { ...stock, trays: changed(stock.trays) };
  return kind === "parts" ? { ...stock, parts: changed(stock.parts) } : { ...stock, supplies: changed(stock.supplies) };
}
