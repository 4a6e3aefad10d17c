import type { JudgedRun } from "../../../shared-types/readings";
import { quotedCell } from "./delimited-rows";

const LINE_END = "\r\n";
const HEAD = ["n", "x_mm", "y_mm", "expected_V", "band_V", "reading_V", "residual_V", "verdict"];
const FOUND_HEAD = ["found_V", "x_mm", "y_mm", "distance_mm", "band_mm", "verdict"];

/** A number with at most so many decimals, without needless zeros. */
const plain = (value: number, decimals: number): string => String(Number(value.toFixed(decimals)));
const perhaps = (value: number | null, decimals: number): string => (value === null ? "" : plain(value, decimals));
const table = (rows: readonly (readonly string[])[]): string => rows.map((row) => row.map(quotedCell).join(",") + LINE_END).join("");

/**
 * @returns a run's readings by RFC 4180 with a header and decimal points, in the order taken; readings as they were written down.
 * `readTable` takes it back.
 */
export function readingsCsv(run: JudgedRun): string {
  const judged = run.readings.map((one) => [
    String(one.n),
    plain(one.xMm, 2),
    plain(one.yMm, 2),
    plain(one.expectedVolts, 5),
    plain(one.bandVolts, 5),
    plain(one.readVolts, 9),
    plain(one.residualVolts, 5),
    one.verdict,
  ]);
  const strays = run.strays.map((one) => [String(one.n), plain(one.xMm, 2), plain(one.yMm, 2), "", "", plain(one.volts, 9), "", ""]);
  return table([HEAD, ...judged, ...strays]);
}

/** @returns a run's found places in the same way, each with its distance from the predicted line. */
export function foundPlacesCsv(run: JudgedRun): string {
  const rows = run.places.map((one) => [
    plain(one.volts, 9),
    plain(one.xMm, 2),
    plain(one.yMm, 2),
    perhaps(one.distanceMm, 3),
    perhaps(one.bandMm, 3),
    one.verdict ?? "",
  ]);
  return table([FOUND_HEAD, ...rows]);
}
