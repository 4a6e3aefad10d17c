import type { ProbePlan, ProbePoint } from "../../../shared-types/plan";

/** The columns, each with its unit; the last is left empty for what is read. */
const COLUMNS = [
  "n",
  "level_V",
  "x_mm",
  "y_mm",
  "expected_V",
  "band_V",
  "lowest_V",
  "highest_V",
  "V_per_mm",
  "field_direction_deg",
  "inside",
  "reading_V",
] as const;

const LINE_END = "\r\n";

/** A field as RFC 4180 (2005), section 2, wants it: in quotes where it holds a comma, a quote or a line's end; quotes doubled. */
function quoted(field: string): string {
  return /[",\r\n]/.test(field) ? `"${field.replaceAll('"', '""')}"` : field;
}

/** Decimals that show one digit of the meter, such as 2 for 10 mV. */
const decimalsOf = (digitVolts: number): number => Math.max(0, Math.ceil(-Math.log10(digitVolts) - 1e-9));

/**
 * The probe plan as a table for a spreadsheet: level points in visiting order, then check points, whose level is empty.
 * @param digitVolts one digit of the meter: expected readings are rounded to it, bands to a tenth of it.
 * @returns text by RFC 4180 with a header, decimal points and CR LF at every line's end.
 */
export function probeTableCsv(plan: ProbePlan, digitVolts: number): string {
  const decimals = decimalsOf(digitVolts);
  const row = (level: number | null, point: ProbePoint): string =>
    [
      String(point.n),
      level === null ? "" : level.toFixed(decimals + 1),
      point.xMm.toFixed(1),
      point.yMm.toFixed(1),
      point.volts.toFixed(decimals),
      point.bandV.toFixed(decimals + 1),
      (point.volts - point.bandV).toFixed(decimals + 1),
      (point.volts + point.bandV).toFixed(decimals + 1),
      point.voltsPerMm.toFixed(decimals + 2),
      point.directionDeg.toFixed(0),
      point.inside ?? "",
      "",
    ]
      .map(quoted)
      .join(",");
  const rows = [
    COLUMNS.join(","),
    ...plan.levels.flatMap(({ volts, points }) => points.map((point) => row(volts, point))),
    ...plan.checks.map((point) => row(null, point)),
  ];
  return rows.map((line) => line + LINE_END).join("");
}
