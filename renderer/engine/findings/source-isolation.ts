import { SAFETY_SOURCE, sourceOf } from "./limits";
import type { SetupRule } from "./rule";
import { finding } from "./wording";

const SAFE_SOURCES: ReadonlySet<string> = new Set(["safety-isolated", "battery"]);

/** Nothing but a safety isolating transformer or a battery may feed water that hands reach into. */
export const sourceIsolation: SetupRule = (setup) => {
  const { source } = setup.supply;
  if (SAFE_SOURCES.has(source)) return [];
  return [
    finding({
      code: "source-not-isolated",
      severity: "stop",
      about: "supply.source",
      message: `The supply is given as “${source}”, which does not say that the mains is safely kept out of the water.`,
      measured: source,
      limit: { text: "safety-isolated or battery", source: sourceOf(SAFETY_SOURCE) },
      remedy: "Use a safety isolating transformer or a battery, and keep mains-earthed instruments off the tray.",
      edit: { path: "supply.source", value: "safety-isolated" },
      safety: true,
    }),
  ];
};
