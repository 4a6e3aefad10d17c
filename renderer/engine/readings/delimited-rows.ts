/** Rows and cells of a table as text, by RFC 4180 (2005), and as spreadsheets hand it over: tabs or semicolons too. */

export interface TextRow {
  /** The line on which the row begins, from 1. */
  readonly line: number;
  readonly cells: readonly string[];
  /** The row as it stood. */
  readonly text: string;
  /** A quote was opened and never closed. */
  readonly openQuote: boolean;
}

export type Delimiter = "\t" | ";" | ",";

/** @returns what separates cells: a tab wherever one stands outside quotes, else a semicolon, else a comma, so that decimal commas survive. */
export function delimiterOf(text: string): Delimiter {
  const bare = text.replace(/"(?:[^"]|"")*"/g, "");
  return bare.includes("\t") ? "\t" : bare.includes(";") ? ";" : ",";
}

/**
 * @returns the rows that hold anything. Quotes may hold delimiters, line ends and doubled quotes (RFC 4180, section 2, rules 5 to 7);
 * CR LF, LF and CR all end a row.
 */
export function rowsOf(text: string, delimiter: Delimiter): readonly TextRow[] {
  const rows: TextRow[] = [];
  let cells: string[] = [];
  let cell = "";
  let quoted = false;
  let line = 1;
  let startLine = 1;
  let startAt = 0;
  const endRow = (end: number): void => {
    cells.push(cell);
    if (cells.some((one) => one.trim() !== "")) rows.push({ line: startLine, cells, text: text.slice(startAt, end), openQuote: quoted });
    cells = [];
    cell = "";
  };
  for (let at = 0; at < text.length; at++) {
    const sign = text[at];
    const newLine = sign === "\n" || sign === "\r";
    const end = at;
    if (newLine) {
      if (sign === "\r" && text[at + 1] === "\n") at++;
      line++;
    }
    if (quoted) {
      if (sign !== '"') cell += newLine ? "\n" : sign;
      else if (text[at + 1] === '"') {
        cell += '"';
        at++;
      } else quoted = false;
    } else if (newLine) {
      endRow(end);
      startLine = line;
      startAt = at + 1;
    } else if (sign === '"' && cell.trim() === "") {
      quoted = true;
      cell = "";
    } else if (sign === delimiter) {
      cells.push(cell);
      cell = "";
    } else cell += sign;
  }
  endRow(text.length);
  return rows;
}

/** @returns a cell as RFC 4180 wants it: in quotes where it holds a comma, a quote or a line's end; quotes doubled. */
export const quotedCell = (cell: string): string => (/[",\r\n]/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell);

/** @returns the number that a cell holds with either decimal sign, and perhaps V or mV behind it for volts; null for none. */
export function numberIn(cell: string): number | null {
  const match = /^([+\-−]?(?:\d+(?:[.,]\d*)?|[.,]\d+)(?:[eE][+-]?\d+)?)\s*(mV|V)?$/.exec(cell.trim());
  if (match === null) return null;
  const value = Number((match[1] as string).replace("−", "-").replace(",", "."));
  return match[2] === "mV" ? value / 1000 : value;
}
