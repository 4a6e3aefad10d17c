import type { Plan } from "../../shared-types/plan";
import type { JudgedRun, ReadingRun, Verdict, VerdictReason } from "../../shared-types/readings";
import type { Setup } from "../../shared-types/setup";
import { judgeRun } from "../engine/readings/judge";
import type { Block } from "./flow";

/** What was read in a filled tray beside what was predicted, with a verdict and room for the name of whoever vouches for it. */

const VERDICTS: Readonly<Record<Verdict, string>> = { pass: "PASS", doubtful: "DOUBTFUL", fail: "FAIL" };
const REASONS: Readonly<Record<VerdictReason, string>> = {
  "as-predicted": "every value lies within its band.",
  "none-read": "nothing was read.",
  "few-read": "fewer than half of the points were read.",
  "worst-point": "one value lies farther off than chance allows among so many.",
  "chi-squared": "together the values lie farther off than chance allows.",
  "some-outside": "some values lie outside their bands, no more than chance brings among so many.",
};
const ROWS: Readonly<Record<Verdict, string>> = { pass: "within", doubtful: "doubtful", fail: "outside" };

const plain = (value: number, decimals: number): string => value.toFixed(decimals).replace("-", "−");
/** With its sign, unless the digits shown are all zero. */
const signed = (value: number, decimals: number): string => {
  const shown = Number(value.toFixed(decimals));
  return shown === 0 ? plain(0, decimals) : `${shown > 0 ? "+" : ""}${plain(shown, decimals)}`;
};

/** @returns the runs of a setup in which something was read. */
export const certifiedRuns = ({ readings }: Setup): readonly ReadingRun[] =>
  (readings?.runs ?? []).filter(({ readings: read, found }) => read.length + found.length > 0);

function summaryOf(judged: JudgedRun): string {
  const { counts, chiSquared, degrees, chance, worst, planned, readings } = judged;
  const farthest =
    worst === null
      ? ""
      : ` The farthest is ${worst.n === null ? "a found place" : `point ${worst.n}`}, ${plain(Math.abs(worst.inBands), 2)} half-widths of its band off.`;
  return (
    `${readings.length} of ${planned} points read; ${counts.pass} values within, ${counts.doubtful} doubtful, ${counts.fail} outside their bands. ` +
    `χ² is ${plain(chiSquared, 1)} for ${degrees} values, which chance exceeds in ${chance < 0.001 ? "under 0.1" : plain(100 * chance, 1)} % of good trays.${farthest}`
  );
}

function runBlocks(run: ReadingRun, plan: Plan): Block[] {
  const judged = judgeRun(run, plan);
  const decimals = Math.max(0, Math.ceil(-Math.log10(plan.bench.meter.digitVolts) - 1e-9));
  const verdict = judged.verdict === null ? "NOT READ" : VERDICTS[judged.verdict];
  const otherLayout: Block[] =
    run.setupId === "" || run.setupId === plan.setupId
      ? []
      : [{ kind: "paragraph", words: `Begun on layout ${run.setupId}; compared with setup ${plan.setupId} as it is now.`, bold: true }];
  const strays: Block[] =
    judged.strays.length === 0
      ? []
      : [{ kind: "paragraph", words: `${judged.strays.length} readings at places that are no points of this plan were left out.` }];
  const found: Block[] =
    judged.places.length === 0
      ? []
      : [
          {
            kind: "table",
            columns: [
              { head: "Found V", share: 2, align: "end" },
              { head: "x mm", share: 2, align: "end" },
              { head: "y mm", share: 2, align: "end" },
              { head: "off the line mm", share: 3, align: "end" },
              { head: "± mm", share: 2, align: "end" },
              { head: "Verdict", share: 3 },
            ],
            rows: judged.places.map(({ volts, xMm, yMm, distanceMm, bandMm, verdict: own }) => [
              plain(volts, decimals),
              plain(xMm, 1),
              plain(yMm, 1),
              distanceMm === null ? "no such line" : signed(distanceMm, 1),
              bandMm === null ? "" : plain(bandMm, 1),
              own === null ? "" : ROWS[own],
            ]),
          },
        ];
  return [
    { kind: "heading", words: `Tray certificate: ${run.name === "" ? "unnamed run" : run.name}` },
    { kind: "paragraph", words: `${verdict}: ${REASONS[judged.reason]}`, bold: true, sizeMm: 4 },
    ...otherLayout,
    { kind: "paragraph", words: `Read by ${run.takenBy || "…………………………"} on ${run.takenOn || "…………………………"}. ${summaryOf(judged)}` },
    ...strays,
    {
      kind: "table",
      columns: [
        { head: "No.", share: 1, align: "end" },
        { head: "x mm", share: 2, align: "end" },
        { head: "y mm", share: 2, align: "end" },
        { head: "expected V", share: 2, align: "end" },
        { head: "± V (k = 2)", share: 2, align: "end" },
        { head: "read V", share: 2, align: "end" },
        { head: "difference V", share: 2, align: "end" },
        { head: "Verdict", share: 2 },
      ],
      rows: judged.readings.map(({ n, xMm, yMm, expectedVolts, bandVolts, readVolts, residualVolts, verdict: own }) => [
        String(n),
        plain(xMm, 1),
        plain(yMm, 1),
        plain(expectedVolts, decimals),
        plain(bandVolts, decimals + 1),
        plain(readVolts, decimals),
        signed(residualVolts, decimals),
        ROWS[own],
      ]),
    },
    ...found,
    { kind: "gap", heightMm: 3 },
    { kind: "fields", labels: ["Checked by", "Signature", "Date"] },
  ];
}

/** @returns the certificates of all runs that were read; a page that says so where there is none. */
export function certificates(setup: Setup, plan: Plan): Block[] {
  const runs = certifiedRuns(setup);
  if (runs.length === 0) {
    return [
      { kind: "heading", words: "Tray certificate" },
      { kind: "paragraph", words: "No readings have been kept with this setup yet: type or import them on the Readings desk." },
    ];
  }
  return runs.flatMap((run) => runBlocks(run, plan));
}
