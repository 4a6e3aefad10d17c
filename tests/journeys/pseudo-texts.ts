import { texts as english } from "../../renderer/texts/texts";

/**
 * The catalogue in a language that nobody speaks: every word of it is marked, accented and longer by two fifths, as German or Finnish may
 * be. What stays plain on the page is not in the catalogue; what no longer fits has too little room.
 */

const ACCENTED: Readonly<Record<string, string>> = { a: "á", e: "ë", i: "ï", o: "ö", u: "ü", A: "Å", E: "É", I: "Î", O: "Ø", U: "Û" };

/** @returns a text with accents and two fifths longer; one without letters (a dash, a unit) stays. */
export function pseudo(text: string): string {
  if (!/[A-Za-z]{3}/.test(text)) return text;
  const accented = [...text].map((letter) => ACCENTED[letter] ?? letter).join("");
  return `${accented}${"·".repeat(Math.ceil(0.4 * text.length))}`;
}

const CODES = new Set(["fileName"]);

function translated(value: unknown, key = ""): unknown {
  if (CODES.has(key)) return value;
  if (typeof value === "string") return pseudo(value);
  if (typeof value === "function") return (...given: unknown[]) => translated(Reflect.apply(value, undefined, given));
  if (Array.isArray(value)) return value.map((one) => translated(one));
  if (value !== null && typeof value === "object")
    return Object.fromEntries(Object.entries(value).map(([name, one]) => [name, translated(one, name)]));
  return value;
}

export const texts = translated(english) as typeof english;
