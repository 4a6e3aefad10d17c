import type { Finding } from "../../../shared-types/plan";
import type { Part, Setup } from "../../../shared-types/setup";
import type { PlanRule } from "./rule";
import { finding, listed, partLabel } from "./wording";

const SOURCE = "continuity of the current: dry bed, insulators and walls carry none";

const named = (setup: Setup, ids: readonly string[]): string =>
  listed(setup.parts.filter(({ id }) => ids.includes(id)).map((part: Part) => partLabel(part)));

/** @returns the finding that no electrode is joined to one at another tap: there is no field to plan. */
export const noCurrentPath = (setup: Setup): Finding =>
  finding({
    code: "no-current-path",
    severity: "stop",
    partIds: setup.parts.filter(({ role }) => role === "electrode").map(({ id }) => id),
    message: `No water joins electrodes at different taps (${named(
      setup,
      setup.parts.filter(({ role }) => role === "electrode").map(({ id }) => id),
    )}): they stand in separate water, on the dry bed or outside the tray.`,
    measured: "no path",
    limit: { text: "water from one tap to another", source: SOURCE },
    remedy: "Open a way through the insulators, move the electrodes into the water, or level the tray.",
  });

/** Electrodes that carry no current, and what has no determined potential. */
export const currentPaths: PlanRule = ({ setup, field }) => {
  const found: Finding[] = [];
  if (field.cutOff.length > 0) {
    found.push(
      finding({
        code: "electrode-cut-off",
        severity: "caution",
        partIds: [...field.cutOff],
        message: `${named(setup, field.cutOff)} carries no current: no water joins it to an electrode at another tap.`,
        measured: "no path",
        limit: { text: "water from one tap to another", source: SOURCE },
        remedy: "Move it into the water of the other electrodes, or take it away.",
      }),
    );
  }
  if (field.undetermined.ids.length > 0 || field.undetermined.water) {
    const { ids } = field.undetermined;
    found.push(
      finding({
        code: "potential-undetermined",
        severity: "note",
        partIds: [...ids],
        message:
          ids.length > 0
            ? `Nothing ties ${named(setup, ids)} to an electrode, so its potential is undetermined and readings there mean nothing.`
            : "Some enclosed water touches no electrode: its potential is undetermined and readings there mean nothing.",
        measured: "not joined",
        limit: { text: "joined to an electrode through water or metal", source: SOURCE },
        remedy: "Open the enclosure, or do not probe inside it.",
      }),
    );
  }
  return found;
};
