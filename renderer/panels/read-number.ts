/**
 * Reads what people type into a number field: a number with either decimal sign, a sum such as `300/2` or `(20+5)*4`, and a
 * unit behind it where the field has one.
 */

/** Factors from a unit to the field's own. */
export type Units = Readonly<Record<string, number>>;

export const LENGTHS_IN_MM: Units = { mm: 1, cm: 10, m: 1000, in: 25.4, '"': 25.4 };
export const ANGLES_IN_DEG: Units = { "°": 1, deg: 1, rad: 180 / Math.PI };
export const NO_UNITS: Units = {};

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

/** @returns the number that a text stands for in the field's own unit, or null when it stands for none. */
export function readNumber(text: string, units: Units): number | null {
  let rest = text.trim().replace(/\s+$/, "");
  let factor = 1;
  for (const unit of Object.keys(units).sort((a, b) => b.length - a.length)) {
    if (rest.toLowerCase().endsWith(unit)) {
      rest = rest.slice(0, -unit.length);
      factor = units[unit];
      break;
    }
  }
  const tokens = tokensOf(rest.trimEnd());
  if (tokens === null || tokens.length === 0) return null;
  const value = sumOf(tokens);
  return value === null || !Number.isFinite(value * factor) ? null : value * factor;
}
