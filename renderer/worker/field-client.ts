import type { FieldReading, Plan, PlanOutcome, ProbePlan, Quality } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import type { WorkerAnswer, WorkerRequest } from "../../shared-types/worker-messages";

/** What the window knows of the field worker. */
export interface FieldClient {
  /** @returns the plan's outcome, or null when a newer request overtook this one. Rejects on a fault of ours. */
  readonly plan: (setup: Setup, quality: Quality, onProgress?: (fraction: number) => void) => Promise<PlanOutcome | null>;
  /** @returns readings at places (mm) from the newest field planned for this geometry, or null when there is none. */
  readonly sample: (setup: Setup, placesMm: readonly (readonly [number, number])[]) => Promise<readonly FieldReading[] | null>;
  /** @returns the plan's points with the whole of their tolerance, or null when another plan was asked for meanwhile. */
  readonly bands: (setup: Setup, plan: Plan) => Promise<ProbePlan | null>;
  readonly close: () => void;
}

interface Waiting {
  readonly request: WorkerRequest;
  readonly settle: (answer: WorkerAnswer) => void;
  readonly refuse: (reason: Error) => void;
  readonly onProgress: ((fraction: number) => void) | undefined;
  repeated: boolean;
}

/**
 * A worker that is waited for and says nothing for so long, ms, is taken for dead: one that runs out of memory may end without a word.
 * While it computes it tells of its progress every few milliseconds.
 */
const SILENCE_MS = 20_000;

/**
 * Starts a field worker and speaks with it. A worker that dies or faults is started again and asked once more;
 * a second fault of the same request rejects its promise.
 * @param startWorker makes a fresh worker.
 */
export function createFieldClient(startWorker: () => Worker): FieldClient {
  const waiting = new Map<number, Waiting>();
  let nextId = 1;
  let worker = open();
  let silence: ReturnType<typeof setTimeout> | undefined;

  /** Waits anew for a word of the worker, as long as one is owed. */
  function listen(): void {
    clearTimeout(silence);
    if (waiting.size > 0) silence = setTimeout(() => restart("the field worker went silent"), SILENCE_MS);
  }

  function open(): Worker {
    const fresh = startWorker();
    fresh.onmessage = (event: MessageEvent<WorkerAnswer>) => {
      take(event.data);
      listen();
    };
    fresh.onmessageerror = () => restart("the field worker's answer could not be read");
    fresh.onerror = (event) => {
      event.preventDefault();
      restart(event.message || "the field worker stopped");
    };
    return fresh;
  }

  function take(answer: WorkerAnswer): void {
    const entry = waiting.get(answer.requestId);
    if (entry === undefined) return;
    if (answer.kind === "progress") {
      entry.onProgress?.(answer.fraction);
    } else if (answer.kind === "fault") {
      restart(answer.message);
    } else {
      waiting.delete(answer.requestId);
      entry.settle(answer);
    }
  }

  function restart(reason: string): void {
    worker.terminate();
    worker = open();
    for (const [id, entry] of waiting) {
      if (entry.repeated) {
        waiting.delete(id);
        entry.refuse(new Error(reason));
      } else {
        entry.repeated = true;
        worker.postMessage(entry.request);
      }
    }
    listen();
  }

  function ask(request: WorkerRequest, onProgress?: (fraction: number) => void): Promise<WorkerAnswer> {
    return new Promise((settle, refuse) => {
      waiting.set(request.requestId, { request, settle, refuse, onProgress, repeated: false });
      worker.postMessage(request);
      listen();
    });
  }

  return {
    plan: async (setup, quality, onProgress) => {
      const answer = await ask({ kind: "plan", requestId: nextId++, setup, quality }, onProgress);
      return answer.kind === "planned" ? answer.outcome : null;
    },
    sample: async (setup, placesMm) => {
      const answer = await ask({ kind: "sample", requestId: nextId++, setup, placesMm });
      return answer.kind === "sampled" ? answer.readings : null;
    },
    bands: async (setup, { probing, bench }) => {
      const answer = await ask({ kind: "bands", requestId: nextId++, setup, plan: { probing, bench } });
      return answer.kind === "banded" ? answer.probing : null;
    },
    close: () => {
      worker.terminate();
      clearTimeout(silence);
      for (const entry of waiting.values()) entry.refuse(new Error("the field worker was closed"));
      waiting.clear();
    },
  };
}
