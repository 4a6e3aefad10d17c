import type { Finding, RemedyEdit, Severity } from "../../../shared-types/plan";
import type { Part, Setup } from "../../../shared-types/setup";
import { type Limit, SAFETY_SENTENCE, sourceOf } from "./limits";

/** @returns a number for a sentence: so many significant digits, without an exponent or trailing zeros. */
export function shown(value: number, digits = 3): string {
  if (!Number.isFinite(value)) return value > 0 ? "unbounded" : "none";
  if (value === 0) return "0";
  const places = Math.max(0, digits - 1 - Math.floor(Math.log10(Math.abs(value))));
  return String(Number(value.toFixed(Math.min(12, places))));
}

/** @returns a current for a sentence: in mA below 1 A. */
export const current = (amperes: number): string => (Math.abs(amperes) < 1 ? `${shown(amperes * 1000)} mA` : `${shown(amperes)} A`);

/** @returns a share as a percentage for a sentence. */
export const percent = (share: number, digits = 2): string => `${shown(share * 100, digits)} %`;

/** @returns what people call a part: its name with its id, or the id alone. */
export const partLabel = (part: Part): string => (part.name === "" || part.name === part.id ? part.id : `${part.name} (${part.id})`);

/** @returns names in a row: A, B and C. */
export function listed(names: readonly string[]): string {
  return names.length < 2 ? names.join("") : `${names.slice(0, -1).join(", ")} and ${names[names.length - 1]}`;
}

export const limitText = (limit: Limit): string => `${limit.value} ${limit.unit}`;

/** @returns the path of a part's key in the setup, for a remedy. */
export const partPath = (setup: Setup, id: string, key: string): string =>
  `parts[${setup.parts.findIndex((part) => part.id === id)}].${key}`;

/** @returns a value lowered to two digits after the leading one, so that the remedy stays inside its limit. */
export function roundedDown(value: number): number {
  const step = 10 ** (Math.floor(Math.log10(value)) - 1);
  return Number((Math.floor(value / step + 1e-9) * step).toPrecision(6));
}

export const roundedUp = (value: number, step: number): number => Number((Math.ceil(value / step - 1e-9) * step).toPrecision(9));

interface Said {
  readonly code: string;
  readonly severity: Severity;
  readonly partIds?: readonly string[];
  readonly about?: string;
  readonly message: string;
  readonly measured: string;
  readonly limit: Limit | { readonly text: string; readonly source: string };
  readonly remedy: string;
  readonly edit?: RemedyEdit | null;
  /** About people's safety: the remedy then ends in the sentence that all of these share. */
  readonly safety?: boolean;
}

/** @returns the finding, with its limit and source in words and the closing sentence of safety. */
export function finding(said: Said): Finding {
  const { limit } = said;
  return {
    code: said.code,
    severity: said.severity,
    partIds: said.partIds ?? [],
    about: said.about ?? null,
    message: said.message,
    measured: said.measured,
    limit: "text" in limit ? limit.text : limitText(limit),
    source: "text" in limit ? limit.source : sourceOf(limit),
    remedy: said.safety === true ? `${said.remedy} ${SAFETY_SENTENCE}` : said.remedy,
    edit: said.edit ?? null,
  };
}
