import type { Electrode } from "../../../shared-types/setup";
import type { SetupRule } from "./rule";
import { finding, listed, partLabel, partPath, shown } from "./wording";

/** Current needs two potentials, and both of the supply's leads should end in the water. */
export const tapsInUse: SetupRule = (setup) => {
  const electrodes = setup.parts.filter((part): part is Electrode => part.role === "electrode");
  const taps = new Set(electrodes.map((electrode) => electrode.tap));
  const ids = electrodes.map((electrode) => electrode.id);
  if (taps.size < 2) {
    const last = electrodes.at(-1);
    return [
      finding({
        code: "no-potential-difference",
        severity: "stop",
        partIds: ids,
        message:
          electrodes.length === 0
            ? "No part is an electrode, so nothing drives a current."
            : electrodes.length === 1
              ? `Only ${partLabel(electrodes[0])} is wired; a current needs a second electrode.`
              : `${listed(electrodes.map(partLabel))} are all wired to the same tap, so no current flows.`,
        measured: `${taps.size} tap in use`,
        limit: { text: "2 taps", source: "Ohm's law" },
        remedy: electrodes.length < 2 ? "Wire two parts to different taps." : "Wire one of them to the other lead.",
        edit:
          electrodes.length >= 2 && last !== undefined ? { path: partPath(setup, last.id, "tap"), value: last.tap >= 0.5 ? 0 : 1 } : null,
      }),
    ];
  }
  const missing = [0, 1].filter((tap) => !taps.has(tap));
  return missing.map((tap) => {
    const nearest = electrodes.reduce((best, one) => (Math.abs(one.tap - tap) < Math.abs(best.tap - tap) ? one : best));
    const lead = tap === 0 ? "negative" : "positive";
    return finding({
      code: "lead-unused",
      severity: "caution",
      partIds: ids,
      about: partPath(setup, nearest.id, "tap"),
      message: `No electrode hangs on the ${lead} lead; only part of the supply's ${shown(setup.supply.volts)} V stands across the water.`,
      measured: `nearest tap ${shown(nearest.tap)}`,
      limit: { text: `tap ${tap}`, source: "both leads of the supply in use (a choice of ours)" },
      remedy: `Wire ${partLabel(nearest)} to the ${lead} lead, unless the divider is meant.`,
      edit: { path: partPath(setup, nearest.id, "tap"), value: tap },
    });
  });
};
