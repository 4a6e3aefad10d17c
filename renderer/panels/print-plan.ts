import type { Plan } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import type { Document } from "../document/document";
import type { Planning } from "../document/planning";
import { isCurrent } from "../document/planning";

/** What finished documents are made from. */
export interface Printable {
  readonly setup: Setup;
  readonly plan: Plan;
}

/**
 * Waits until the setup that is open now has a plan fit for paper.
 * @returns it, or why there will be none: the refusal's or the fault's words.
 */
export function printPlanOf(document: Document, planning: Planning): Promise<Printable | string> {
  return new Promise((resolve) => {
    const answer = (): Printable | string | null => {
      const { setup } = document.getState();
      const state = planning.getState();
      if (state.fault !== null) return state.fault;
      if (state.pending || state.bandsPending) return null;
      if (state.refusal !== null) return state.refusal.message;
      return state.plan !== null && isCurrent(state, setup) && state.plan.quality !== "live" ? { setup, plan: state.plan } : null;
    };
    const now = answer();
    if (now !== null) {
      resolve(now);
      return;
    }
    const stop = planning.subscribe(() => {
      const then = answer();
      if (then === null) return;
      stop();
      resolve(then);
    });
  });
}
