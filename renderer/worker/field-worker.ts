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

type Planning = Extract<WorkerRequest, { kind: "plan" | "bands" }>;

async function answered(request: Planning, signal: AbortSignal): Promise<WorkerAnswer> {
  const { requestId, setup } = request;
  const options = {
    signal,
    breathe,
    now: () => performance.now(),
    onProgress: (fraction: number) => answer({ kind: "progress", requestId, fraction }),
  };
  if (request.kind === "plan") return { kind: "planned", requestId, outcome: await planner.plan(setup, request.quality, options) };
  return { kind: "banded", requestId, probing: await planner.bands(setup, request.plan, options) };
}

/** Does this and gives up what was being done; the bands of an older plan never hold up a newer one. */
async function take(request: Planning): Promise<void> {
  const { requestId } = request;
  running?.abort();
  const mine = new AbortController();
  running = mine;
  try {
    answer(await answered(request, mine.signal));
  } catch (error) {
    if (mine.signal.aborted) answer({ kind: "abandoned", requestId });
    else answer({ kind: "fault", requestId, message: error instanceof Error ? error.message : String(error) });
  }
}

self.onmessage = (event: MessageEvent<WorkerRequest>) => {
  const request = event.data;
  if (request.kind === "sample")
    answer({ kind: "sampled", requestId: request.requestId, readings: planner.sample(request.setup, request.placesMm) });
  else void take(request);
};
