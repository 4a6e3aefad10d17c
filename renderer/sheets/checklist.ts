import type { Plan } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import { isSaltSolution } from "../engine/bench/water-conductivity";
import { SAFETY_SENTENCE, wetHandsLimit } from "../engine/findings/limits";
import { current } from "../engine/findings/wording";
import { keptWords, numberRows } from "./checklist-numbers";
import type { Block } from "./flow";

/** The low-voltage checklist: what a safety officer reads, sees to and signs. */

/** What is to be looked at, in our words, with the source of what is a rule. */
function inspections(setup: Setup, plan: Plan): { title: string; ticks: string[] }[] {
  const { supply } = setup;
  const wet = wetHandsLimit(supply.waveform, isSaltSolution(setup.water.salt));
  const direct = supply.waveform === "dc";
  const unit = direct ? "V DC" : "V AC";
  return [
    {
      title: "Supply",
      ticks: [
        "Its plate says safety isolating transformer (IEC 61558-2-6), or it is a battery. The mains itself is never joined to a tray, not even through a resistor or a lamp.",
        `With nothing connected its terminals show ________ ${unit}, and that is no more than ${wet.value} ${wet.unit}.`,
        "No two supplies are in series or joined at one tray, and no instrument with earthed terminals touches the water: it would earth the circuit.",
        `The current limit is set to ${current(supply.currentLimitA)} or the fuse is no larger.`,
      ],
    },
    {
      title: "Mains side",
      ticks: [
        "The socket is behind an RCD of 30 mA or less, and its test button was pressed today (IEC 60364-4-41 cl. 411.3.3; check the current edition). It guards the mains side only, not the tray.",
        "Plugs, mains leads and cases are whole and show the date of their last inspection. Fixed wiring and repairs are for those who are licensed for them.",
        "Supply, sockets and mains leads stand higher than the tray or apart from it: a spill cannot run there.",
      ],
    },
    {
      title: "Tray and leads",
      ticks: [
        "The template under the tray carries the setup id of this page. The wiring was compared with it: + and − where it shows them.",
        "The tray is whole, level and dry outside; a cloth and a bucket are at hand.",
        "Low-voltage leads are insulated to the clip and cannot pull the tray over. Both probe and meter are on volts, never on amperes.",
      ],
    },
    {
      title: "People",
      ticks: [
        "Hands are dry when they touch supply, plug or meter. Nobody with broken skin on the hands reaches into the water.",
        "Before hands go into the water: switch off, and see that the meter shows zero.",
        "At the end, in this order: supply off, mains plug out, leads off, then the water.",
        "Everyone at the bench knows where the room's emergency switch is, and one named person switches.",
      ],
    },
    {
      title: "Air, salt and what is left over",
      ticks: [
        direct
          ? "DC makes hydrogen at the − electrode: the tray stays uncovered, the room is aired, no flame or spark is near."
          : "Should bubbles rise steadily on AC, the volts are lowered; the room is aired all the same.",
        "No chloride (table salt, sea water, hydrochloric acid) is in the water while DC is used: it makes chlorine. A smell as of a swimming bath means: switch off, open the windows, leave.",
        direct
          ? "DC dissolves metal from the + electrode: the water is collected and disposed of as the local rules for dissolved metals ask."
          : "The water goes where the local rules allow; water that has become coloured or cloudy is collected.",
        ...(plan.bench.water.saltToTarget === null ? [] : ["Salt is weighed, and its container is labelled and closed afterwards."]),
      ],
    },
  ];
}

/** @returns the checklist as blocks of text, tables, boxes to tick and lines to sign on. */
export function checklist(setup: Setup, plan: Plan): Block[] {
  const { findings } = plan;
  const words = { stop: "STOP", caution: "Caution", note: "Note" } as const;
  return [
    {
      kind: "paragraph",
      bold: true,
      sizeMm: 3.3,
      words: `For setup ${plan.setupId} and no other. ${SAFETY_SENTENCE} This list orders what was computed and what is to be looked at; it takes the place of no risk assessment, no regulation and no licensed work.`,
    },
    { kind: "heading", words: "Numbers and their limits" },
    {
      kind: "table",
      columns: [
        { head: "", share: 23, bold: true },
        { head: "this setup", share: 24 },
        { head: "limit", share: 23 },
        { head: "kept", share: 6, bold: true },
        { head: "source of the limit", share: 28 },
      ],
      rows: numberRows(setup, plan).map((row) => [row.quantity, row.here, row.limit, keptWords(row), row.source]),
    },
    { kind: "heading", words: findings.length === 0 ? "Findings: none" : "Findings" },
    ...(findings.length === 0
      ? []
      : [
          {
            kind: "table",
            columns: [
              { head: "", share: 14, bold: true },
              { head: "what was found", share: 36 },
              { head: "limit and its source", share: 26 },
              { head: "remedy", share: 28 },
            ],
            rows: findings.map(({ severity, message, limit, source, remedy }) => [words[severity], message, `${limit}: ${source}`, remedy]),
            signs: findings.map(({ severity }) => severity),
          } as const,
        ]),
    ...inspections(setup, plan).flatMap(({ title, ticks }): Block[] => [
      { kind: "heading", words: `To inspect: ${title.toLowerCase()}` },
      ...ticks.map((tick): Block => ({ kind: "tick", words: tick })),
    ]),
    { kind: "heading", words: "Signed" },
    { kind: "fields", labels: ["Inspected by", "Initials", "Date"] },
    { kind: "fields", labels: ["Competent person", "Initials", "Date"] },
    { kind: "fields", labels: ["Restrictions", "Next review"] },
    { kind: "gap", heightMm: 2 },
    {
      kind: "paragraph",
      words:
        "Void when the setup changes: its id changes with it. Limits marked “check the current edition” were not read in the standard itself.",
    },
  ];
}
