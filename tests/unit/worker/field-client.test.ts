import { expect, it, vi } from "vitest";
import { createFieldClient } from "../../../renderer/worker/field-client";
import type { WorkerAnswer, WorkerRequest } from "../../../shared-types/worker-messages";
import { trayWith } from "../../reference/solved";

/** A worker whose answers the test decides. */
class ScriptedWorker extends EventTarget {
  onmessage: ((event: MessageEvent<WorkerAnswer>) => void) | null = null;
  onerror: ((event: ErrorEvent) => void) | null = null;
  onmessageerror = null;
  readonly asked: WorkerRequest[] = [];
  ended = false;
  postMessage(request: WorkerRequest): void {
    this.asked.push(request);
  }
  terminate(): void {
    this.ended = true;
  }
  answer(data: WorkerAnswer): void {
    this.onmessage?.({ data } as MessageEvent<WorkerAnswer>);
  }
  die(message: string): void {
    this.onerror?.({ message, preventDefault: () => {} } as ErrorEvent);
  }
}

function startedClient() {
  const workers: ScriptedWorker[] = [];
  const client = createFieldClient(() => {
    const worker = new ScriptedWorker();
    workers.push(worker);
    return worker as unknown as Worker;
  });
  return { client, workers };
}

const setup = trayWith({ parts: [] });
const refusal: WorkerAnswer = {
  kind: "planned",
  requestId: 1,
  outcome: { ok: false, refusal: { code: "no-potential-difference", message: "nothing is wired", partIds: [], findings: [] } },
};

it("an overtaken request ends with null, the newest with its plan", async () => {
  const { client, workers } = startedClient();
  const older = client.plan(setup, "live");
  const newer = client.plan(setup, "live");
  workers[0].answer({ kind: "abandoned", requestId: 1 });
  workers[0].answer({ ...refusal, requestId: 2 });
  expect(await older).toBeNull();
  expect((await newer)?.ok).toBe(false);
});

it("a worker that dies is started again and asked once more", async () => {
  const { client, workers } = startedClient();
  const waiting = client.plan(setup, "print");
  workers[0].die("out of memory");
  expect(workers).toHaveLength(2);
  expect(workers[0].ended).toBe(true);
  expect(workers[1].asked).toEqual(workers[0].asked);
  workers[1].answer(refusal);
  expect((await waiting)?.ok).toBe(false);
});

it("a request that faults twice is refused with the reason, and the next one goes through", async () => {
  const { client, workers } = startedClient();
  const waiting = client.plan(setup, "print");
  workers[0].answer({ kind: "fault", requestId: 1, message: "first" });
  workers[1].answer({ kind: "fault", requestId: 1, message: "second" });
  await expect(waiting).rejects.toThrow("second");
  const next = client.plan(setup, "print");
  workers[2].answer({ ...refusal, requestId: 2 });
  expect((await next)?.ok).toBe(false);
});

it("a worker that ends without a word is replaced, asked once more, and then given up with the reason", async () => {
  vi.useFakeTimers();
  try {
    const { client, workers } = startedClient();
    const outcome = client.plan(setup, "print").catch((reason: Error) => reason.message);
    await vi.advanceTimersByTimeAsync(15_000);
    workers[0].answer({ kind: "progress", requestId: 1, fraction: 0.2 });
    await vi.advanceTimersByTimeAsync(15_000);
    expect(workers).toHaveLength(1);
    await vi.advanceTimersByTimeAsync(6_000);
    expect(workers).toHaveLength(2);
    expect(workers[0].ended).toBe(true);
    expect(workers[1].asked).toEqual([{ kind: "plan", requestId: 1, setup, quality: "print" }]);
    await vi.advanceTimersByTimeAsync(21_000);
    expect(await outcome).toBe("the field worker went silent");
    // Nothing is owed any more: silence is no fault.
    await vi.advanceTimersByTimeAsync(60_000);
    expect(workers).toHaveLength(3);
    const next = client.plan(setup, "live");
    workers[2].answer({ ...refusal, requestId: 2 });
    expect(await next).toMatchObject({ ok: false });
  } finally {
    vi.useRealTimers();
  }
});

it("tells progress of the request that it belongs to", async () => {
  const { client, workers } = startedClient();
  const seen: number[] = [];
  const waiting = client.plan(setup, "print", (share) => seen.push(share));
  workers[0].answer({ kind: "progress", requestId: 1, fraction: 0.5 });
  workers[0].answer(refusal);
  await waiting;
  expect(seen).toEqual([0.5]);
});
