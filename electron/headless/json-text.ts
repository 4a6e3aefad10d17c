/** Lists and objects that fit on a line of this many characters stand on one: a probe point a line. */
const LINE_LENGTH = 150;

type Entries = readonly (readonly [prefix: string, value: unknown])[];

/** @returns what stands in a list or an object, each with what is written before it; null for a plain value. */
function entriesOf(value: unknown): Entries | null {
  if (Array.isArray(value)) return value.map((item) => ["", item]);
  if (typeof value !== "object" || value === null) return null;
  return Object.entries(value)
    .filter(([, item]) => item !== undefined)
    .map(([key, item]) => [`${JSON.stringify(key)}: `, item]);
}

const holdsOnlyPlain = (entries: Entries): boolean => entries.every(([, value]) => typeof value !== "object" || value === null);

/** @returns JSON in which whatever holds only plain values stands on one line. */
export function jsonText(value: unknown, indent = ""): string {
  const entries = entriesOf(value);
  if (entries === null) return JSON.stringify(value);
  const [open, close] = Array.isArray(value) ? ["[", "]"] : ["{", "}"];
  if (entries.length === 0) return open + close;
  if (holdsOnlyPlain(entries)) {
    const inside = entries.map(([prefix, item]) => prefix + JSON.stringify(item)).join(", ");
    const line = open === "[" ? `[${inside}]` : `{ ${inside} }`;
    if (indent.length + line.length <= LINE_LENGTH) return line;
  }
  const deeper = `${indent}  `;
  return `${open}\n${entries.map(([prefix, item]) => deeper + prefix + jsonText(item, deeper)).join(",\n")}\n${indent}${close}`;
}
