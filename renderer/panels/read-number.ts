/**
 * Reads what people type into a number field: a number with either decimal sign, a sum such as `300/2` or `(20+5)*4`, and a
 * unit behind it where the field has one.
 */

/** Factors from a unit, in small letters, to the field's own. */
export type Units = Readonly<Record<string, number>>;

export const LENGTHS_IN_MM: Units = { mm: 1, cm: 10, m: 1000, in: 25.4, '"': 25.4 };

const KNOWN: Readonly<Record<string, Units>> = {
  mm: LENGTHS_IN_MM,
  "°": { "°": 1, deg: 1, rad: 180 / Math.PI },
  V: { v: 1, mv: 1e-3, kv: 1e3 },
  A: { a: 1, ma: 1e-3 },
  Hz: { hz: 1, khz: 1e3 },
  min: { min: 1, h: 60 },
  "µS/cm": { "µs/cm": 1, "us/cm": 1, "ms/cm": 1e3, "s/m": 1e4, "ms/m": 10 },
};

/** @returns the units that a field in `unit` understands behind a number; its own at least. */
export const unitsFor = (unit: string): Units => KNOWN[unit] ?? (unit === "" ? {} : { [unit.toLowerCase()]: 1 });

type Token = number | string;

function tokensOf(text: string): Token[] | null {
  const tokens: Token[] = [];
  const pattern = /\s*(?:(\d+(?:[.,]\d*)?|[.,]\d+)|([-+*/()×÷−]))/y;
  while (pattern.lastIndex < text.length) {
    const match = pattern.exec(text);
    if (match === null) return null;
    const [, number, sign] = match;
    if (number !== undefined) tokens.push(Number(number.replace(",", ".")));
    else tokens.push({ "×": "*", "÷": "/", "−": "-" }[sign] ?? sign);
  }
  return tokens;
}

/** Recursive descent over + − × ÷ and brackets. @returns the value, or null for a malformed sum. */
function sumOf(tokens: readonly Token[]): number | null {
  let at = 0;
  const take = (...signs: string[]): string | null => {
    const token = tokens[at];
    if (typeof token !== "string" || !signs.includes(token)) return null;
    at++;
    return token;
  };
  function factor(): number | null {
    if (take("-") !== null) {
      const value = factor();
      return value === null ? null : -value;
    }
    if (take("+") !== null) return factor();
    if (take("(") !== null) {
      const value = sum();
      return take(")") === null ? null : value;
    }
    const token = tokens[at];
    if (typeof token !== "number") return null;
    at++;
    return token;
  }
  function product(): number | null {
    let value = factor();
    for (let sign = take("*", "/"); value !== null && sign !== null; sign = take("*", "/")) {
      const next = factor();
      value = next === null ? null : sign === "*" ? value * next : value / next;
    }
    return value;
  }
  function sum(): number | null {
    let value = product();
    for (let sign = take("+", "-"); value !== null && sign !== null; sign = take("+", "-")) {
      const next = product();
      value = next === null ? null : sign === "+" ? value + next : value - next;
    }
    return value;
  }
  const value = sum();
  return at === tokens.length ? value : null;
}

/**
 * @param bare what a number without a unit is to be multiplied by: mm in an inch where the user thinks in inches.
 * @returns the number that a text stands for in the field's own unit, or null when it stands for none.
 */
export function readNumber(text: string, units: Units, bare = 1): number | null {
  let rest = text.trim();
  let factor = bare;
  for (const unit of Object.keys(units).sort((a, b) => b.length - a.length)) {
    if (rest.toLowerCase().replace("μ", "µ").endsWith(unit)) {
      rest = rest.slice(0, -unit.length);
      factor = units[unit];
      break;
    }
  }
  const tokens = tokensOf(rest.trimEnd());
  if (tokens === null || tokens.length === 0) return null;
  const value = sumOf(tokens);
  return value === null || !Number.isFinite(value * factor) ? null : Number((value * factor).toPrecision(12));
}
