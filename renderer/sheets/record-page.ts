import type { Setup } from "../../shared-types/setup";
import { AIR_MM, type Block } from "./flow";
import { type Item, line, text } from "./page";
import { contentOf, type Sheet } from "./paper";

/** The page beside the record sheet on which a group writes who measured what, under which conditions. */

const ROW_MM = 7;
const LANE_GAP_MM = 6;
/** Heights of what stands over the readings: four rows of fields and a sentence. */
const ABOVE_MM = 4 * 9.4 + 8;
const COLUMNS = [
  ["No.", 0.14],
  ["x mm", 0.24],
  ["y mm", 0.24],
  ["reading V", 0.38],
] as const;

/** Ruled rows for readings in lanes beside each other, as many as the height holds. */
function readings(left: number, top: number, width: number, heightMm: number): Item[] {
  const lanes = Math.max(1, Math.floor(width / 85));
  const laneMm = (width - (lanes - 1) * LANE_GAP_MM) / lanes;
  const rows = Math.floor(heightMm / ROW_MM) - 1;
  return Array.from({ length: lanes }, (_, lane) => left + lane * (laneMm + LANE_GAP_MM)).flatMap((x): Item[] => {
    const bottom = top - (rows + 1) * ROW_MM;
    const edges = COLUMNS.map((_, k) => COLUMNS.slice(0, k).reduce((sum, [, share]) => sum + share * laneMm, 0));
    return [
      ...COLUMNS.map(([head], k) => text(x + edges[k] + 1.5, top - 4.6, head, 2.8, { bold: true })),
      ...Array.from({ length: rows + 1 }, (_, k) => {
        const y = top - (k + 1) * ROW_MM;
        return line(
          [
            [x, y],
            [x + laneMm, y],
          ],
          k === 0 ? 0.3 : 0.1,
          k === 0 ? 0 : 0.45,
        );
      }),
      ...edges.slice(1).map((edge) =>
        line(
          [
            [x + edge, top - 1],
            [x + edge, bottom],
          ],
          0.08,
          0.55,
        ),
      ),
    ];
  });
}

/** @returns blocks that fill one page. */
export function recordPage(setup: Setup, sheet: Sheet): Block[] {
  const [, bottom, , top] = contentOf(sheet);
  const heightMm = top - bottom + 5 - AIR_MM - ABOVE_MM - 1;
  const frequency = setup.supply.waveform === "ac" ? ["Frequency Hz"] : [];
  return [
    { kind: "fields", labels: ["Names", "Group"] },
    { kind: "fields", labels: ["Date", "From", "To"] },
    { kind: "fields", labels: [`Supply V ${setup.supply.waveform.toUpperCase()}`, ...frequency, "Current mA", "Meter range V"] },
    { kind: "fields", labels: ["Water depth mm", "Temperature °C", "Conductivity µS/cm"] },
    { kind: "gap", heightMm: 2 },
    {
      kind: "paragraph",
      words: "Mark each place on the record sheet, give it a number, and write down its place and what the meter reads.",
    },
    { kind: "picture", heightMm, draw: (left, y, width) => readings(left, y, width, heightMm) },
  ];
}
