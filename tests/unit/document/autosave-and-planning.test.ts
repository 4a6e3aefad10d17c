import { describe, expect, it } from "vitest";
import { DRAFT_AFTER_MS, keepDraft } from "../../../renderer/document/autosave";
import { setTitle } from "../../../renderer/document/commands/bench";
import { moveThings } from "../../../renderer/document/commands/placing";
import { BUSY_AFTER_MS, createPlanning, isCurrent, type PlanSource } from "../../../renderer/document/planning";
import { printPlanOf } from "../../../renderer/panels/print-plan";
import type { Draft } from "../../../shared-types/host";
import { parseSetupText } from "../../../shared-types/parse-setup";
import type { Plan, PlanOutcome, ProbePlan, Quality } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import { handClock, looseRing, openDocument } from "./fixtures";

describe("the draft", () => {
  const store = () => {
    const kept: { draft: Draft | null; writes: number } = { draft: null, writes: 0 };
    return {
      kept,
      writeDraft: async (draft: Draft) => {
        kept.draft = draft;
        kept.writes++;
      },
      clearDraft: async () => {
        kept.draft = null;
      },
    };
  };
  const fail = (reason: unknown) => {
    throw reason;
  };

  it("is written within 2 s of the first change, even while changes go on, and once for many", async () => {
    const [document, drafts, clock] = [openDocument(), store(), handClock()];
    const stop = keepDraft(document, drafts, fail, clock.later);
    for (let ms = 0; ms < DRAFT_AFTER_MS; ms += 50) {
      document.run(moveThings(document.getState().setup, ["A"], 1, 0));
      clock.pass(50);
    }
    await stop();
    expect(DRAFT_AFTER_MS).toBeLessThanOrEqual(2000);
    expect(parseSetupText(drafts.kept.draft?.text ?? "")).toEqual({ ok: true, value: document.getState().setup });
    expect(drafts.kept.writes).toBe(1);
  });

  it("goes away once the setup is saved, and stopping writes what is outstanding", async () => {
    const [document, drafts, clock] = [openDocument(), store(), handClock()];
    const stop = keepDraft(document, drafts, fail, clock.later);
    document.run(setTitle("Ring"));
    await stop();
    expect(drafts.kept.draft?.title).toBe("Ring");
    const again = keepDraft(document, drafts, fail, clock.later);
    document.markSaved(document.getState().setup, { name: "ring.fieldtray.json", handle: "h1", place: "" });
    await again();
    expect(drafts.kept.draft).toBeNull();
  });

  it("reports a store that fails and keeps trying at the next change", async () => {
    const [document, clock] = [openDocument(), handClock()];
    const faults: unknown[] = [];
    const full = { writeDraft: () => Promise.reject(new Error("disk full")), clearDraft: () => Promise.resolve() };
    const stop = keepDraft(document, full, (reason) => faults.push(reason), clock.later);
    document.run(setTitle("one"));
    clock.pass(DRAFT_AFTER_MS);
    document.run(setTitle("two"));
    await stop();
    expect(faults).toHaveLength(2);
  });
});

/** A source that answers when told to, as the worker does: a newer request voids the older. */
function handSource() {
  const asked: { setup: Setup; quality: Quality; answer: (outcome: PlanOutcome | null) => void; fail: (reason: Error) => void }[] = [];
  const source: PlanSource = {
    plan: (setup, quality) =>
      new Promise((answer, fail) => {
        asked.at(-1)?.answer(null);
        asked.push({ setup, quality, answer, fail });
      }),
  };
  const settled = () => new Promise((resolve) => setTimeout(resolve, 0));
  const planFor = (id: string) => ({ ok: true, plan: { setupId: id } as Plan }) as const;
  return { asked, source, settled, planFor };
}

type Asked = ReturnType<typeof handSource>;

/** A window that has just opened is shown the quick solution first; what is asked for from then on is left to the test. */
async function firstLook(asked: Asked["asked"], settled: Asked["settled"], planFor: Asked["planFor"]): Promise<void> {
  expect(asked.map(({ quality }) => quality)).toEqual(["live"]);
  asked[0]?.answer(planFor("first look"));
  await settled();
  asked.shift();
  expect(asked.map(({ quality }) => quality)).toEqual(["print"]);
}

describe("the plan on screen", () => {
  it("is asked for live during a drag, one at a time and always the newest, and for print on release", async () => {
    const document = openDocument();
    const { asked, source, settled, planFor } = handSource();
    const planning = createPlanning(document, source, handClock().later);
    await firstLook(asked, settled, planFor);
    asked[0]?.answer(planFor("start"));
    await settled();
    document.startDrag("move Left bar");
    for (let by = 1; by <= 5; by++) document.dragTo(moveThings(looseRing, ["A"], by, 0));
    expect(asked.slice(1).map(({ quality, setup }) => [quality, setup.parts[0]?.xMm])).toEqual([["live", 66]]);
    asked[1]?.answer(planFor("live 1"));
    await settled();
    expect(asked.slice(2).map(({ quality, setup }) => [quality, setup.parts[0]?.xMm])).toEqual([["live", 70]]);
    expect(planning.getState().plan?.setupId).toBe("live 1");
    asked[2]?.answer(planFor("live 5"));
    await settled();
    expect(planning.getState().pending).toBe(false);
    document.finishDrag();
    expect(asked.slice(3).map(({ quality, setup }) => [quality, setup.parts[0]?.xMm])).toEqual([["print", 70]]);
    asked[3]?.answer(planFor("print 5"));
    await settled();
    expect(isCurrent(planning.getState(), document.getState().setup)).toBe(true);
    planning.stop();
  });

  it("gets its whole bands after the print plan, and those of an older plan are let go", async () => {
    const document = openDocument();
    const { asked, source, settled, planFor } = handSource();
    const probing: ProbePlan = { spanV: [0, 6], levels: [], checks: [] };
    const planWith = (setupId: string) => ({ ok: true, plan: { setupId, quality: "print", probing } as unknown as Plan }) as const;
    const told: ((whole: ProbePlan | null) => void)[] = [];
    const planning = createPlanning(document, { ...source, bands: () => new Promise((tell) => told.push(tell)) }, handClock().later);
    await firstLook(asked, settled, planFor);
    asked[0]?.answer(planWith("first"));
    await settled();
    expect(planning.getState().bandsPending).toBe(true);
    const printed = printPlanOf(document, planning);
    told[0]?.({ ...probing, tolerance: { points: [], ranking: [] } });
    await settled();
    expect(planning.getState()).toMatchObject({ bandsPending: false, plan: { probing: { tolerance: { points: [] } } } });
    expect(await printed).toMatchObject({ plan: { probing: { tolerance: { points: [] } } } });
    document.run(moveThings(looseRing, ["A"], 1, 0));
    asked[1]?.answer(planWith("second"));
    await settled();
    document.run(moveThings(document.getState().setup, ["A"], 1, 0));
    asked[2]?.answer(planWith("third"));
    await settled();
    told[1]?.({ ...probing, tolerance: { points: [], ranking: [] } });
    await settled();
    expect(planning.getState()).toMatchObject({ bandsPending: true, plan: { setupId: "third" } });
    expect(planning.getState().plan?.probing.tolerance).toBeUndefined();
    told[2]?.(null);
    await settled();
    expect(planning.getState().bandsPending).toBe(false);
    planning.stop();
  });

  it("stays while a newer one is coming and while the setup has none; the refusal says why", async () => {
    const document = openDocument();
    const { asked, source, settled, planFor } = handSource();
    const planning = createPlanning(document, source, handClock().later);
    await firstLook(asked, settled, planFor);
    asked[0]?.answer(planFor("start"));
    await settled();
    document.run(moveThings(looseRing, ["A"], 85, 0));
    expect(planning.getState().plan?.setupId).toBe("start");
    expect(planning.getState().plannedSetup).toBe(looseRing);
    asked[1]?.answer({ ok: false, refusal: { code: "overlap", message: "they overlap", partIds: ["A", "C"], findings: [] } });
    await settled();
    expect(planning.getState()).toMatchObject({ plan: { setupId: "start" }, refusal: { code: "overlap" }, pending: false });
    document.undo();
    asked[2]?.answer(planFor("again"));
    await settled();
    expect(planning.getState()).toMatchObject({ plan: { setupId: "again" }, refusal: null });
    planning.stop();
  });

  it("is called late only after 300 ms, and not at all when it comes sooner", async () => {
    const document = openDocument();
    const clock = handClock();
    const { asked, source, settled, planFor } = handSource();
    const planning = createPlanning(document, source, clock.later);
    await firstLook(asked, settled, planFor);
    clock.pass(BUSY_AFTER_MS - 1);
    expect(planning.getState().busy).toBe(false);
    clock.pass(1);
    expect(planning.getState().busy).toBe(true);
    asked[0]?.answer(planFor("start"));
    await settled();
    expect(planning.getState().busy).toBe(false);
    clock.pass(10_000);
    expect(planning.getState().busy).toBe(false);
    planning.stop();
  });

  it("moves on under a held arrow key: edits that overtake a careful solve are shown live first", async () => {
    const document = openDocument();
    const { asked, source, settled, planFor } = handSource();
    const planning = createPlanning(document, source, handClock().later);
    await firstLook(asked, settled, planFor);
    const nudge = () => document.run(moveThings(document.getState().setup, ["A"], 1, 0, "nudge"));
    nudge();
    nudge();
    nudge();
    expect(asked.map(({ quality }) => quality)).toEqual(["print", "live"]);
    asked[1]?.answer(planFor("on the way"));
    await settled();
    expect(planning.getState().plan?.setupId).toBe("on the way");
    expect(asked.at(-1)).toMatchObject({ quality: "print", setup: { parts: [{ xMm: 68 }, {}, {}] } });
    planning.stop();
  });

  it("reports a fault of ours once, does not hammer the worker, and can be asked again", async () => {
    const document = openDocument();
    const { asked, source, settled, planFor } = handSource();
    const planning = createPlanning(document, source, handClock().later);
    await firstLook(asked, settled, planFor);
    asked[0]?.fail(new Error("the field worker stopped"));
    await settled();
    expect(planning.getState()).toMatchObject({ fault: "the field worker stopped", pending: false });
    expect(asked).toHaveLength(1);
    planning.retry();
    asked[1]?.answer(planFor("at last"));
    await settled();
    expect(planning.getState()).toMatchObject({ fault: null, plan: { setupId: "at last" } });
    planning.stop();
  });
});
