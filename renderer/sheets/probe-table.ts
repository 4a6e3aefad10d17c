import type { Plan, ProbePoint } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import type { SheetFonts } from "./font-metrics";
import type { Sheet } from "./paper";
import { type Column, type Row, type TablePage, tablePages } from "./table";

const plain = (value: number, decimals: number): string => value.toFixed(decimals).replace("-", "−");

const STAFF: readonly Column[] = [
  { head: "No.", widthMm: 10, align: "end" },
  { head: "x mm", widthMm: 15, align: "end" },
  { head: "y mm", widthMm: 15, align: "end" },
  { head: "reads V", widthMm: 18, align: "end" },
  { head: "± V", widthMm: 14, align: "end" },
  { head: "mV/mm", widthMm: 15, align: "end" },
];
const CLASS: readonly Column[] = [
  { head: "No.", widthMm: 10, align: "end" },
  { head: "x mm", widthMm: 16, align: "end" },
  { head: "y mm", widthMm: 16, align: "end" },
  { head: "read V", widthMm: 40, align: "middle" },
];

/** What the printed band takes into account. */
const bandHolds = ({ probing }: Plan): string => (probing.tolerance === undefined ? "meter and placement" : "all stated tolerances");

/**
 * The probe table: for staff with what the meter should read and its tolerance band (k = 2), for the class with blanks.
 * @returns one entry a page.
 */
export function probeTable(setup: Setup, plan: Plan, forClass: boolean, page: Sheet, fonts: SheetFonts): TablePage[] {
  const { digitVolts, rangeVolts } = plan.bench.meter;
  const decimals = Math.max(0, Math.ceil(-Math.log10(digitVolts) - 1e-9));
  const cells = (point: ProbePoint): Row => ({
    cells: forClass
      ? [String(point.n), plain(point.xMm, 1), plain(point.yMm, 1), ""]
      : [
          String(point.n),
          plain(point.xMm, 1),
          plain(point.yMm, 1),
          plain(point.volts, decimals),
          // Rounded up: the printed band is never narrower than the computed one.
          plain(Math.ceil(point.bandV / digitVolts - 1e-6) * digitVolts, decimals),
          plain(1000 * point.voltsPerMm, 0),
        ],
  });
  const rows = plan.probing.levels.flatMap((level, index): Row[] => [
    {
      heading: forClass ? `Line ${index + 1}` : `${plain(level.volts, 3).replace(/0+$/, "").replace(/\.$/, "")} V`,
      ...(level.note === null ? {} : { note: level.note }),
    },
    ...level.points.map(cells),
  ]);
  if (plan.probing.checks.length > 0) rows.push({ heading: "On and in loose conductors" }, ...plan.probing.checks.map(cells));
  const kind = setup.supply.waveform === "ac" ? "AC" : "DC";
  const range = `Meter: ${kind} volts, range ${plain(rangeVolts, 3).replace(/\.?0+$/, "")} V, common lead on the − electrode. Origin: lower left inner corner of the tray.`;
  const intro = forClass
    ? [range, "Hold the probe upright, its tip just touching the water at the numbered point, and write down what the meter reads."]
    : [
        range,
        `‘reads’ is what the meter should show exactly at the point; a reading within ± is as predicted (k = 2, ${bandHolds(plan)}).`,
      ];
  return tablePages(forClass ? CLASS : STAFF, rows, page, fonts, intro);
}
