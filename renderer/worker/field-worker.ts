import type { WorkerAnswer, WorkerRequest } from "../../shared-types/worker-messages";
import { createPlanner } from "../engine/plan";

/** The message loop of the field worker: one planner, the newest plan request wins. */

const planner = createPlanner();
let running: AbortController | null = null;

const answer = (message: WorkerAnswer): void => postMessage(message);

/** Lets waiting messages in: a timer would be clamped to 4 ms, a message to ourselves is not. */
const doorbell = new MessageChannel();
const breathe = (): Promise<void> =>
  new Promise((resolve) => {
    doorbell.port1.onmessage = () => resolve();
    doorbell.port2.postMessage(null);
  });

async function plan(request: Extract<WorkerRequest, { kind: "plan" }>): Promise<void> {
  const { requestId } = request;
  running?.abort();
  const mine = new AbortController();
  running = mine;
  try {
    const outcome = await planner.plan(request.setup, request.quality, {
      signal: mine.signal,
      breathe,
      now: () => performance.now(),
      onProgress: (fraction) => answer({ kind: "progress", requestId, fraction }),
    });
    answer({ kind: "planned", requestId, outcome });
  } catch (error) {
    if (mine.signal.aborted) answer({ kind: "abandoned", requestId });
    else answer({ kind: "fault", requestId, message: error instanceof Error ? error.message : String(error) });
  }
}

self.onmessage = (event: MessageEvent<WorkerRequest>) => {
  const request = event.data;
  if (request.kind === "plan") void plan(request);
  else answer({ kind: "sampled", requestId: request.requestId, readings: planner.sample(request.setup, request.placesMm) });
};
