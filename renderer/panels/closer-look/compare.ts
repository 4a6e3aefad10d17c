import type { Host } from "../../../shared-types/host";
import { parseSetupText } from "../../../shared-types/parse-setup";
import type { PlanOutcome } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import type { CloserLook } from "../../document/closer-look";
import { texts } from "../../texts/texts";
import type { WindowStore } from "../window-state";

const words = texts.closer.compare;

/** Asks for a setup file, solves it aside, and shows how the open setup differs from it; a file that cannot be planned is told why. */
export async function compareWithFile(
  host: Pick<Host, "importText">,
  window: Pick<WindowStore, "tell">,
  closerLook: Pick<CloserLook, "compare">,
  planAside: (setup: Setup) => Promise<PlanOutcome | null>,
): Promise<void> {
  const chosen = await host.importText("json");
  if (chosen.kind === "cancelled") return;
  const tell = (name: string, lines: readonly string[]): void => {
    window.tell({ tone: "problem", title: words.failed(name), lines, choices: [] });
  };
  if (chosen.kind === "failed") {
    tell(texts.files.noFileOpened, [chosen.message]);
    return;
  }
  const { name } = chosen.file;
  const parsed = parseSetupText(chosen.text);
  if (!parsed.ok) {
    tell(
      name,
      parsed.problems.slice(0, 4).map(({ message }) => message),
    );
    return;
  }
  const outcome = await planAside(parsed.value).catch(() => null);
  if (outcome === null) tell(name, [words.overtaken]);
  else if (!outcome.ok) tell(name, [outcome.refusal.message]);
  else closerLook.compare({ name, setup: parsed.value, plan: outcome.plan });
}
