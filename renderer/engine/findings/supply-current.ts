import type { PlanRule } from "./rule";
import { current, finding, roundedDown, shown } from "./wording";

/** The tray asks for more current than the supply gives: its volts would sag and every expected reading with them. */
export const supplyCurrent: PlanRule = ({ setup, bench }) => {
  const { currentA, shareOfLimit, currentLimitA } = bench.circuit;
  if (shareOfLimit <= 1) return [];
  const volts = roundedDown(setup.supply.volts / shareOfLimit);
  return [
    finding({
      code: "current-above-limit",
      severity: "stop",
      about: "supply.currentLimitA",
      message: `The water would draw ${current(currentA.value)}, the supply gives ${current(currentLimitA)}: its volts sag and no reading holds.`,
      measured: `${current(currentA.value)}`,
      limit: { text: `${current(currentLimitA)}`, source: "the supply's own current limit" },
      remedy: `Set ${shown(volts)} V or less, use water that conducts less, or less of it, or a stronger supply.`,
      edit: volts >= 0.001 ? { path: "supply.volts", value: volts } : null,
    }),
  ];
};
