import type { SheetFonts } from "./font-metrics";

/** Stands for a character that the sheets' fonts have no sign for: a reader sees that something was there. */
const MISSING = "□";

function printableWords(words: string, { regular, bold }: SheetFonts): string {
  const signs = [...words.normalize("NFC")].map((sign) => {
    if (/\p{M}|\p{Cf}/u.test(sign)) return "";
    if (/\s|\p{Cc}/u.test(sign)) return " ";
    return regular.has(sign) && bold.has(sign) ? sign : MISSING;
  });
  return signs.join("");
}

/**
 * A setup or a plan may carry words in any script; paper is set in one embedded family.
 * @returns the same data with every text in it printable; numbers and arrays of numbers are shared, not copied.
 */
export function printable<Data>(data: Data, fonts: SheetFonts): Data;
export function printable(data: unknown, fonts: SheetFonts): unknown {
  if (typeof data === "string") return printableWords(data, fonts);
  if (Array.isArray(data)) return data.map((one) => printable(one, fonts));
  if (typeof data !== "object" || data === null || ArrayBuffer.isView(data)) return data;
  return Object.fromEntries(Object.entries(data).map(([key, value]) => [key, printable(value, fonts)]));
}
