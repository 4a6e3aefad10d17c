import type { Plan, ProbePoint } from "../../shared-types/plan";

/** The probe plan for a spreadsheet: comma-separated values (RFC 4180), decimal points, units in the heads. */

const HEADS = ["n", "level_V", "x_mm", "y_mm", "inside", "expected_V", "error_V", "band_V", "V_per_mm"];

const cell = (words: string): string => (/[",\r\n]/.test(words) ? `"${words.replaceAll('"', '""')}"` : words);
const number = (value: number): string => String(Number(value.toPrecision(7)));

/** @returns one line a point in visiting order; checks of loose conductors have no level. */
export function probeCsv({ probing }: Plan): string {
  const row = (
    level: string,
    { n, xMm, yMm, inside, volts, voltsError, bandV, voltsPerMm }: ProbePoint,
  ): { n: number; cells: string[] } => ({
    n,
    cells: [String(n), level, number(xMm), number(yMm), inside ?? "", ...[volts, voltsError, bandV, voltsPerMm].map(number)],
  });
  const rows = [
    ...probing.levels.flatMap(({ volts, points }) => points.map((point) => row(number(volts), point))),
    ...probing.checks.map((point) => row("", point)),
  ].sort((a, b) => a.n - b.n);
  return [HEADS, ...rows.map(({ cells }) => cells)].map((cells) => `${cells.map(cell).join(",")}\r\n`).join("");
}
