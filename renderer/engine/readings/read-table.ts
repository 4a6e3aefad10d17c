import type { ProbePoint } from "../../../shared-types/plan";
import {
  type FoundPlace,
  MOST_READ_VOLTS,
  type Reading,
  type ReadTable,
  type RowFault,
  samePlace,
  type WrongRow,
} from "../../../shared-types/readings";
import { delimiterOf, numberIn, rowsOf, type TextRow } from "./delimited-rows";

/**
 * Readings from a table of text: a file or a spreadsheet's clipping. A header names the columns in any order; without one, one column is
 * volts in the order of the points, two are number and volts, three x, y and volts, four number, x, y and volts. Rows whose place is no
 * point of the plan are taken as found places where the header says so.
 */

type Column = "n" | "x" | "y" | "volts" | "found";

/** Words of a header, small, without units and signs, and what they head; the program's own tables among them. */
const HEADS: readonly (readonly [Column, RegExp])[] = [
  ["found", /^(found|found v|looked for|level found v)$/],
  ["volts", /^(reading|reading v|read|read v|reads v|measured|measured v|volts|v|u|u v|voltage|voltage v)$/],
  ["n", /^(n|no|nr|number|point|point no)$/],
  ["x", /^(x|x mm)$/],
  ["y", /^(y|y mm)$/],
];
const WITHOUT_HEADER: Readonly<Record<number, readonly Column[]>> = {
  1: ["volts"],
  2: ["n", "volts"],
  3: ["x", "y", "volts"],
  4: ["n", "x", "y", "volts"],
};

const plainHead = (cell: string): string =>
  cell
    .toLowerCase()
    .replace(/[^\p{L}\p{N}]+/gu, " ")
    .trim();

function headedColumns(row: TextRow): ReadonlyMap<Column, number> | null {
  if (row.cells.some((cell) => numberIn(cell) !== null)) return null;
  const columns = new Map<Column, number>();
  row.cells.forEach((cell, index) => {
    const column = HEADS.find(([, pattern]) => pattern.test(plainHead(cell)))?.[0];
    if (column !== undefined && !columns.has(column)) columns.set(column, index);
  });
  return columns.size === 0 ? null : columns;
}

/** Whole numbers round a comma may be two columns or one decimal number: neither is guessed. */
const isAmbiguous = (rows: readonly TextRow[]): boolean =>
  rows.some(({ cells }) => cells.length === 2) &&
  rows.every(({ cells }) => cells.length <= 2 && cells.every((cell) => /^\s*[-−+]?\d+\s*$/.test(cell)));

type RowOutcome = { readonly reading: Reading } | { readonly found: FoundPlace } | { readonly fault: RowFault } | "blank";

/** Reads one row. `turn` is its number among the rows, from 0: the point of a table that holds volts alone. */
function rowOutcome(row: TextRow, columns: ReadonlyMap<Column, number>, points: readonly ProbePoint[], turn: number): RowOutcome {
  if (row.openQuote) return { fault: "open-quote" };
  const cellOf = (column: Column): string | null => {
    const index = columns.get(column);
    return index === undefined ? null : (row.cells[index]?.trim() ?? "");
  };
  const isFound = columns.has("found");
  const voltsCell = cellOf(isFound ? "found" : "volts");
  if (voltsCell === null) return { fault: "no-volts" };
  if (voltsCell === "") return "blank";
  const numbers = { volts: numberIn(voltsCell), n: cellOf("n"), x: cellOf("x"), y: cellOf("y") };
  const [x, y, n] = [numbers.x, numbers.y, numbers.n].map((cell) => (cell === null || cell === "" ? undefined : numberIn(cell)));
  const { volts } = numbers;
  if (volts === null || x === null || y === null || n === null) return { fault: "not-a-number" };
  if (Math.abs(volts) > MOST_READ_VOLTS) return { fault: "out-of-range" };
  if (isFound) {
    if (x === undefined || y === undefined) return { fault: "columns" };
    return Math.abs(x) > 10_000 || Math.abs(y) > 10_000 ? { fault: "out-of-range" } : { found: { volts, xMm: x, yMm: y } };
  }
  if (x !== undefined && y !== undefined) {
    const point = points.find((one) => samePlace(one, { xMm: x, yMm: y }));
    return point === undefined ? { fault: "no-such-place" } : { reading: { n: point.n, xMm: point.xMm, yMm: point.yMm, volts } };
  }
  const point = n === undefined ? (columns.has("n") ? undefined : points[turn]) : points.find((one) => one.n === n);
  return point === undefined ? { fault: "no-such-point" } : { reading: { n: point.n, xMm: point.xMm, yMm: point.yMm, volts } };
}

/**
 * @param points the plan's points in the order of their numbers. @param from the index of the point that a table of volts alone begins at.
 * @returns what could be read, and each row that could not with its line and the reason; never throws.
 */
export function readTable(text: string, points: readonly ProbePoint[], from = 0): ReadTable {
  const delimiter = delimiterOf(text.replace(/^\uFEFF/, ""));
  const rows = rowsOf(text.replace(/^\uFEFF/, ""), delimiter);
  const readings: Reading[] = [];
  const found: FoundPlace[] = [];
  const wrong: WrongRow[] = [];
  let blank = 0;
  if (rows.length === 0) return { readings, found, wrong, blank };
  const wrongRow = (row: TextRow, fault: RowFault): void => {
    wrong.push({ line: row.line, fault, text: row.text.length > 60 ? `${row.text.slice(0, 59)}…` : row.text });
  };
  const headed = headedColumns(rows[0]);
  const body = headed === null ? rows : rows.slice(1);
  if (headed === null && delimiter === "," && isAmbiguous(rows)) {
    for (const row of rows) wrongRow(row, "ambiguous");
    return { readings, found, wrong, blank };
  }
  body.forEach((row, turn) => {
    const plain = WITHOUT_HEADER[row.cells.length];
    const columns = headed ?? (plain === undefined ? null : new Map(plain.map((column, index): [Column, number] => [column, index])));
    // More cells than the header has: a decimal comma between commas, most often.
    const tooMany = headed !== null && row.cells.slice(rows[0].cells.length).some((cell) => cell.trim() !== "");
    const outcome = columns === null || tooMany ? { fault: "columns" as const } : rowOutcome(row, columns, points, from + turn);
    if (outcome === "blank") blank++;
    else if ("fault" in outcome) wrongRow(row, outcome.fault);
    else if ("found" in outcome) found.push(outcome.found);
    else if (readings.some((one) => samePlace(one, outcome.reading))) wrongRow(row, "twice");
    else readings.push(outcome.reading);
  });
  return { readings, found, wrong, blank };
}
