import type { Finding } from "../../shared-types/plan";
import type { Part, Setup, Shape, Tray } from "../../shared-types/setup";
import type { Stock, StockPart, StockSupply, StockTray } from "../../shared-types/stock";
import { texts } from "../texts/texts";
import { sizeText, trimmed } from "./number-text";

/** What a plan needs and the stock does not hold. A list without an entry of a kind says nothing about that kind. */

const words = texts.stock.findings;
/** Sizes that differ by less are the same thing in a box of parts, mm. */
const SAME_MM = 0.25;

/** @returns whether two shapes are of one kind and size. */
export function sameShape(a: Shape, b: Shape): boolean {
  if (a.kind !== b.kind) return false;
  const [first, second] = [Object.values(a).flat(2), Object.values(b).flat(2)];
  return (
    first.length === second.length &&
    first.every((value, index) => {
      const other = second[index];
      return typeof value === "number" && typeof other === "number" ? Math.abs(value - other) <= SAME_MM : value === other;
    })
  );
}

/** @returns whether a part of a setup can be taken from an entry of the stock. */
export const isOf = (part: Part, entry: StockPart): boolean =>
  (part.role === "insulator") === entry.insulates &&
  part.material === entry.material &&
  Math.abs(part.heightMm - entry.heightMm) <= SAME_MM &&
  sameShape(part.shape, entry.shape);

/** @returns whether a tray is of the stock's kind: shape, inner size and the material of its base. */
export function sameTray(a: Tray, b: Tray): boolean {
  if (a.baseMaterial !== b.baseMaterial) return false;
  if (a.shape === "circle" || b.shape === "circle")
    return a.shape === "circle" && b.shape === "circle" && Math.abs(a.diameterMm - b.diameterMm) <= SAME_MM;
  return Math.abs(a.lengthMm - b.lengthMm) <= SAME_MM && Math.abs(a.widthMm - b.widthMm) <= SAME_MM;
}

/** @returns whether a supply of the stock can give what a setup asks for. */
export const canGive = ({ supply }: Setup, entry: StockSupply): boolean =>
  supply.waveform === entry.waveform && supply.volts <= entry.mostVolts && supply.source === entry.source;

/** @returns how many of an entry's parts one tray of the setup takes. */
export const usedOf = (setup: Setup, entry: StockPart): number => setup.parts.filter((part) => isOf(part, entry)).length;

const held = (entries: readonly { readonly count: number }[]): number => entries.reduce((sum, { count }) => sum + count, 0);

const traySizes = (tray: Tray): string =>
  tray.shape === "circle" ? `⌀ ${trimmed(tray.diameterMm, 1)} mm` : `${trimmed(tray.lengthMm, 1)} × ${trimmed(tray.widthMm, 1)} mm`;

function finding(
  code: string,
  thing: string,
  needed: number,
  stock: number,
  trays: number,
  partIds: readonly string[],
  about: string | null,
): Finding {
  return {
    code,
    severity: "caution",
    partIds,
    about,
    message: stock === 0 ? words.none(thing) : words.few(thing, needed, stock),
    measured: words.needed(needed, trays),
    limit: words.held(stock),
    source: words.source,
    remedy: words.remedy,
    edit: null,
  };
}

function partFindings(setup: Setup, entries: readonly StockPart[]): readonly Finding[] {
  const { trays } = setup.session;
  const kinds: Part[][] = [];
  for (const part of setup.parts) {
    const alike = kinds.find(([first]) => first !== undefined && isOf(part, { ...first, insulates: first.role === "insulator", count: 0 }));
    if (alike === undefined) kinds.push([part]);
    else alike.push(part);
  }
  return kinds.flatMap((parts) => {
    const [first] = parts;
    if (first === undefined) return [];
    const stock = held(entries.filter((entry) => isOf(first, entry)));
    const needed = parts.length * trays;
    if (needed <= stock) return [];
    const thing = words.part(first.shape.kind, sizeText(first.shape), first.material, trimmed(first.heightMm, 1));
    return [
      finding(
        "stock-parts",
        thing,
        needed,
        stock,
        trays,
        parts.map(({ id }) => id),
        null,
      ),
    ];
  });
}

const trayFindings = (setup: Setup, entries: readonly StockTray[]): readonly Finding[] => {
  const { trays } = setup.session;
  const stock = held(entries.filter(({ tray }) => sameTray(setup.tray, tray)));
  return trays <= stock
    ? []
    : [finding("stock-trays", words.tray(traySizes(setup.tray), setup.tray.baseMaterial), trays, stock, trays, [], "session.trays")];
};

const supplyFindings = (setup: Setup, entries: readonly StockSupply[]): readonly Finding[] => {
  const { supply, session } = setup;
  const stock = held(entries.filter((entry) => canGive(setup, entry)));
  if (session.trays <= stock) return [];
  const thing = words.supply(supply.waveform, trimmed(supply.volts, 2));
  return [finding("stock-supplies", thing, session.trays, stock, session.trays, [], "supply.volts")];
};

/** @returns a caution for each kind of thing of which the session's trays need more than the stock holds. */
export function stockFindings(setup: Setup, stock: Stock): readonly Finding[] {
  return [
    ...(stock.trays.length > 0 ? trayFindings(setup, stock.trays) : []),
    ...(stock.parts.length > 0 ? partFindings(setup, stock.parts) : []),
    ...(stock.supplies.length > 0 ? supplyFindings(setup, stock.supplies) : []),
  ];
}
