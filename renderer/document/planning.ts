import { createStore, type StoreApi } from "zustand/vanilla";
import type { Plan, PlanOutcome, PlanRefusal, ProbePlan, Quality } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import { type Later, onTheClock } from "./autosave";
import type { Document } from "./document";

/** Whoever makes plans: the field worker's client. A newer request makes the older one's answer null. */
export interface PlanSource {
  readonly plan: (setup: Setup, quality: Quality, onProgress?: (fraction: number) => void) => Promise<PlanOutcome | null>;
  /** The plan's points with the whole of their tolerance; null when overtaken. Absent: bands hold meter and placement alone. */
  readonly bands?: (setup: Setup, plan: Plan) => Promise<ProbePlan | null>;
}

export interface PlanningState {
  /** The newest plan, kept while another one is on its way and while the setup has none. */
  readonly plan: Plan | null;
  /** The very setup that `plan` belongs to. */
  readonly plannedSetup: Setup | null;
  /** Why the newest answered setup has no plan; null when it has. */
  readonly refusal: PlanRefusal | null;
  /** Whether an answer is outstanding. */
  readonly pending: boolean;
  /** Whether the plan's bands still hold meter and placement alone, and the rest of their causes is on its way. */
  readonly bandsPending: boolean;
  /** Whether the user has waited long enough to be told. */
  readonly busy: boolean;
  /** Share of the present solve that is done, 0 to 1. */
  readonly progress: number;
  /** A fault of ours: the worker failed twice on this setup. */
  readonly fault: string | null;
}

export interface Planning extends Pick<StoreApi<PlanningState>, "getState" | "subscribe" | "getInitialState"> {
  /** Asks again for the present setup, after a fault. */
  readonly retry: () => void;
  readonly stop: () => void;
}

/** Waiting shorter than this is not worth a word, ms. */
export const BUSY_AFTER_MS = 300;

/** @returns whether what `plan` shows is the document's present setup, neither out of date nor refused. */
export const isCurrent = (state: PlanningState, setup: Setup): boolean => state.plannedSetup === setup && state.refusal === null;

/**
 * Keeps a plan of the document's setup: `live` while a drag goes on, `print` once the hand lets go.
 * While a live solve runs, newer previews wait for it and only the newest of them is asked for, so that the picture moves on
 * even where a solve takes longer than a frame. A `print` solve is overtaken at once by any newer setup; a setup that
 * overtakes one (a held arrow key) is shown `live` first, and so is the very first one.
 */
export function createPlanning(document: Document, source: PlanSource, later: Later = onTheClock): Planning {
  const store = createStore<PlanningState>(() => ({
    plan: null,
    plannedSetup: null,
    refusal: null,
    pending: false,
    bandsPending: false,
    busy: false,
    progress: 0,
    fault: null,
  }));
  const { getState, setState } = store;
  let asked: { readonly setup: Setup; readonly quality: Quality } | null = null;
  let answered: { readonly setup: Setup; readonly quality: Quality } | null = null;
  let callOffBusy: (() => void) | null = null;
  let stopped = false;

  function rest(): void {
    callOffBusy?.();
    callOffBusy = null;
    setState({ pending: false, busy: false, progress: 0 });
  }

  function wait(): void {
    callOffBusy ??= later(() => setState({ busy: true }), BUSY_AFTER_MS);
    if (!getState().pending) setState({ pending: true });
  }

  async function ask(setup: Setup, quality: Quality): Promise<void> {
    const request = { setup, quality };
    asked = request;
    wait();
    try {
      const outcome = await source.plan(setup, quality, (progress) => {
        if (asked === request && !stopped) setState({ progress });
      });
      if (asked !== request || stopped) return;
      asked = null;
      if (outcome !== null) take(request, outcome);
    } catch (error) {
      if (asked !== request || stopped) return;
      asked = null;
      answered = request;
      setState({ fault: error instanceof Error ? error.message : String(error) });
    }
    follow();
  }

  function take(request: { readonly setup: Setup; readonly quality: Quality }, outcome: PlanOutcome): void {
    answered = request;
    if (!outcome.ok) {
      setState({ refusal: outcome.refusal, fault: null, bandsPending: false });
      return;
    }
    const { plan } = outcome;
    const bandsPending = source.bands !== undefined && request.quality === "print" && plan.probing.tolerance === undefined;
    setState({ plan, plannedSetup: request.setup, refusal: null, fault: null, bandsPending });
    if (bandsPending) void completeBands(request.setup, plan);
  }

  /** Replaces the quick bands of a plan, unless another plan has come meanwhile. A fault leaves the quick ones, which say what they hold. */
  async function completeBands(setup: Setup, plan: Plan): Promise<void> {
    const probing = await source.bands?.(setup, plan).catch(() => null);
    if (stopped || getState().plan !== plan) return;
    if (probing) setState({ plan: { ...plan, probing }, bandsPending: false });
    else setState({ bandsPending: false });
  }

  /** Asks for whatever is still missing for the document's present state. */
  function follow(): void {
    if (stopped) return;
    const { setup, drag } = document.getState();
    if (drag !== null) {
      if (asked?.quality === "live") return;
      if (answered?.setup === setup) rest();
      else void ask(setup, "live");
      return;
    }
    if (answered?.setup === setup && answered.quality === "print") {
      if (asked === null) rest();
      else if (asked.setup !== setup) void ask(setup, "print");
      return;
    }
    if (asked?.setup === setup && asked.quality === "print") return;
    const hurried = asked !== null && asked.setup !== setup && answered?.setup !== setup;
    if (hurried && asked?.quality === "live") return;
    // A window that has just opened shows something as soon as it can, and the careful solution after it.
    const first = answered === null && asked === null;
    void ask(setup, hurried || first ? "live" : "print");
  }

  const unsubscribe = document.subscribe((state, before) => {
    if (state.setup !== before.setup || state.drag !== before.drag) follow();
  });
  follow();

  return {
    getState,
    subscribe: store.subscribe,
    getInitialState: store.getInitialState,
    retry: () => {
      answered = null;
      setState({ fault: null });
      follow();
    },
    stop: () => {
      stopped = true;
      unsubscribe();
      callOffBusy?.();
    },
  };
}
