import type { Finding } from "../../../shared-types/plan";
import { electrodeMaterial } from "../bench/electrode-materials";
import type { PlanRule, SetupRule } from "./rule";
import { finding, listed, partLabel, shown } from "./wording";

const CORROSION = "electrochemistry of the metals; check the current edition of the safety data sheet";

/** Metals that do not belong into the water, and ones that we do not know. */
export const electrodeMetal: SetupRule = (setup) => {
  const findings: Finding[] = [];
  const conductors = setup.parts.filter((part) => part.role !== "insulator");
  for (const word of new Set(conductors.map((part) => part.material))) {
    const parts = conductors.filter((part) => part.material === word);
    const partIds = parts.map((part) => part.id);
    const { known, material } = electrodeMaterial(word);
    if (material.unsuitable !== null) {
      findings.push(
        finding({
          code: "metal-unsuitable",
          severity: "caution",
          partIds,
          message: `${listed(parts.map(partLabel))} ${parts.length === 1 ? "is" : "are"} of ${word}: ${material.unsuitable}.`,
          measured: word,
          limit: { text: "brass, copper, stainless steel or graphite", source: CORROSION },
          remedy: "Use brass, copper, stainless steel or graphite.",
        }),
      );
    } else if (!known) {
      findings.push(
        finding({
          code: "metal-unknown",
          severity: "note",
          partIds,
          message: `The material “${word}” of ${listed(parts.map(partLabel))} is not in our table; cautious values stand in for it.`,
          measured: word,
          limit: { text: "a metal of the table", source: "the table of electrode materials (a choice of ours)" },
          remedy: "Check the spelling, or enter the double layer or the electrode drop that you measured.",
        }),
      );
    }
  }
  return findings;
};

/** On DC a soluble anode dissolves by Faraday's law, and its metal stays in the water. */
export const solubleAnode: PlanRule = ({ setup, bench }) => {
  const dissolving = bench.gas?.anodes.filter((anode) => anode.lostG !== null) ?? [];
  if (dissolving.length === 0) return [];
  const grams = dissolving.reduce((sum, anode) => sum + (anode.lostG ?? 0), 0);
  const parts = setup.parts.filter((part) => dissolving.some((anode) => anode.id === part.id));
  const measured = `up to ${grams < 0.1 ? `${shown(grams * 1000, 2)} mg` : `${shown(grams, 2)} g`} over the session`;
  return [
    finding({
      code: "anode-dissolves",
      severity: "caution",
      partIds: parts.map((part) => part.id),
      about: "supply.waveform",
      message: `${listed(parts.map(partLabel))}, the positive side, dissolves: ${measured} goes into the water of each tray.`,
      measured,
      limit: { text: "no metal in the water", source: "Faraday's law, F = 96 485 C/mol (CODATA)" },
      remedy: "Use AC or graphite; collect the water and do not pour it away, since copper, zinc and chromium harm life.",
      edit: setup.supply.frequencyHz > 0 ? { path: "supply.waveform", value: "ac" } : null,
    }),
  ];
};
