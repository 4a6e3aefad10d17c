import { QUALITIES, type Quality } from "../../shared-types/plan";
import { wrong } from "./refusal";

/** The options of each verb, and whether it must be given. */
const OPTIONS_OF = {
  solve: ["at", "quality"],
  probes: [],
  check: [],
  sheets: ["out", "paper", "only", "printer-scale", "date"],
} as const satisfies Readonly<Record<string, readonly string[]>>;

export type Verb = keyof typeof OPTIONS_OF;
export const VERBS = Object.keys(OPTIONS_OF) as readonly Verb[];

export const USAGE = `usage: npm run --silent headless -- VERB FILE [options]
  solve FILE [--at "x,y x,y …"] [--quality ${QUALITIES.join("|")}]
  probes FILE
  check FILE
  sheets FILE --out PACK.pdf [--paper a4|a3|a2|letter|tabloid] [--only NAME,…] [--printer-scale X,Y] [--date YYYY-MM-DD]`;

/** What was asked for, the options as they were typed. */
export interface Request {
  readonly verb: Verb;
  readonly file: string;
  readonly options: ReadonlyMap<string, string>;
}

const listed = (names: readonly string[]): string => (names.length === 0 ? "no option" : names.map((name) => `--${name}`).join(", "));

/** Takes one option with its value off the front. Values may begin with a minus, as places do. */
function takeOption(verb: Verb, args: string[], options: Map<string, string>): void {
  const [typed, ...joined] = (args.shift() ?? "").slice(2).split("=");
  const allowed: readonly string[] = OPTIONS_OF[verb];
  if (!allowed.includes(typed)) throw wrong(`--${typed} is no option of ${verb}, allowed: ${listed(allowed)}`);
  if (options.has(typed)) throw wrong(`--${typed} is given twice, allowed: once`);
  const value = joined.length > 0 ? joined.join("=") : args.shift();
  if (value === undefined) throw wrong(`--${typed} has no value`);
  options.set(typed, value);
}

/**
 * Reads what stands behind the command.
 * @returns the request; throws a refusal that names what is wrong and what is allowed.
 */
export function requestOf(given: readonly string[]): Request {
  const [typed, ...args] = given;
  const verb = VERBS.find((one) => one === typed);
  if (verb === undefined) {
    throw wrong(`${typed === undefined ? "no verb is given" : `"${typed}" is no verb`}, allowed: ${VERBS.join(", ")}\n${USAGE}`);
  }
  const options = new Map<string, string>();
  const files: string[] = [];
  while (args.length > 0) {
    if (args[0]?.startsWith("--")) takeOption(verb, args, options);
    else files.push(args.shift() ?? "");
  }
  const [file, more] = files;
  if (file === undefined || file === "") throw wrong(`${verb} needs a setup file\n${USAGE}`);
  if (more !== undefined) throw wrong(`"${more}" is one file too many, allowed: one setup file\n${USAGE}`);
  return { verb, file, options };
}

/** @returns two numbers divided by a comma, or null for anything else. */
export function pairOf(text: string): readonly [number, number] | null {
  const numbers = text.split(",").map((part) => (part.trim() === "" ? Number.NaN : Number(part)));
  const [first, second, ...more] = numbers;
  if (first === undefined || second === undefined || more.length > 0) return null;
  return Number.isFinite(first) && Number.isFinite(second) ? [first, second] : null;
}

/** @returns the places of `--at`, mm. */
export function placesOf(text: string | undefined): readonly (readonly [number, number])[] {
  const words = (text ?? "").split(/\s+/).filter((word) => word !== "");
  return words.map((word) => {
    const place = pairOf(word);
    if (place === null) throw wrong(`--at holds "${word}", allowed: places "x,y" in mm, divided by spaces, such as "150,100 20.5,30"`);
    return place;
  });
}

/** @returns the quality of `--quality`; print where none is given. */
export function qualityOf(text: string | undefined): Quality {
  const quality = QUALITIES.find((one) => one === (text ?? "print"));
  if (quality === undefined) throw wrong(`--quality is "${text}", allowed: ${QUALITIES.join(", ")}`);
  return quality;
}
