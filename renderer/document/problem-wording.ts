import type { Problem } from "../../shared-types/result";
import type { Setup } from "../../shared-types/setup";
import { texts } from "../texts/texts";
import { thingName } from "./edit";

const { keys: WORDS, part: PART } = texts.document;
const UNITS: readonly (readonly [ending: RegExp, unit: string])[] = [
  [/UsPerCm$/, "µS/cm"],
  [/UfPerCm2$/, "µF/cm²"],
  [/CubicMetres$/, "m³"],
  [/Megohm$/, "MΩ"],
  [/Picofarad$/, "pF"],
  [/Percent$/, "%"],
  [/Litres$/, "L"],
  [/Mm$/, "mm"],
  [/Deg$/, "°"],
  [/Hz$/, "Hz"],
  [/[vV]olts$/, "V"],
  [/A$/, "A"],
  [/C$/, "°C"],
];

const unitOf = (key: string): string => UNITS.find(([ending]) => ending.test(key))?.[1] ?? "";

function wordsOf(key: string): string {
  const known = WORDS[key];
  if (known !== undefined) return known;
  const ending = UNITS.find(([pattern]) => pattern.test(key))?.[0];
  const bare = ending === undefined || /[vV]olts$/.test(key) ? key : key.replace(ending, "");
  return bare.replace(/([a-z])([A-Z])/g, "$1 $2").toLowerCase();
}

/** The thing that a path points into, and the rest of the path. */
function ownerOf(where: string, setup: Setup): readonly [owner: string, rest: string] {
  const match = /^(?:parts|water\.slabs)\[(\d+)\]\.?(.*)$/.exec(where);
  if (match === null) {
    const [room = "", ...rest] = where.split(".");
    return rest.length === 0 ? ["", room] : [room, rest.join(".")];
  }
  const things = where.startsWith("parts") ? setup.parts : setup.water.slabs;
  const thing = things[Number(match[1])];
  return [thing === undefined ? PART : thingName(thing), match[2] ?? ""];
}

/**
 * A problem of the file contract as a person who edits on screen should read it.
 * @param setup the refused setup, for the names of its parts.
 * @returns the same problem, its message in words: "Left bar, length is 5000 mm, allowed: 0.1 mm to 4000 mm".
 */
export function inWords(problem: Problem, setup: Setup): Problem {
  const { where, message } = problem;
  if (where === "" || !message.startsWith(where)) return problem;
  const [owner, rest] = ownerOf(where, setup);
  const key = rest.split(".").at(-1) ?? "";
  const unit = unitOf(key);
  const withUnits = unit === "" ? message : message.replace(/(?<![\w.])-?\d+(?:\.\d+)?(?:e[+-]?\d+)?(?![\w.[\]])/g, `$& ${unit}`);
  const said = withUnits.slice(where.length).replace(/\b[a-z]+[A-Z]\w*\b/g, wordsOf);
  const thing = [owner, key === "" ? "" : wordsOf(key)].filter((word) => word !== "").join(", ");
  return { where, message: `${thing.charAt(0).toUpperCase()}${thing.slice(1)}${said}` };
}
