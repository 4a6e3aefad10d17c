/** How a long computation is paced from outside: it yields every few milliseconds, and the caller decides what happens then. */
export interface Pace {
  readonly signal?: AbortSignal;
  /** Lets the caller's other work run. Absent: the computation is driven in one go. */
  readonly breathe?: () => Promise<void>;
  /** A clock in ms; without it every yield breathes. */
  readonly now?: () => number;
}

/** Computes at most this long between two breaths, ms: a newer request is then taken within 20 ms. */
const BREATH_MS = 8;

/**
 * Drives a yielding computation to its end.
 * @returns its result; rejects with the signal's reason as soon as the signal is aborted.
 */
export async function drive<Value>(steps: Generator<void, Value>, pace: Pace): Promise<Value> {
  let last = pace.now?.() ?? 0;
  try {
    for (;;) {
      pace.signal?.throwIfAborted();
      const step = steps.next();
      if (step.done === true) return step.value;
      if (pace.breathe === undefined) continue;
      const now = pace.now?.() ?? Number.POSITIVE_INFINITY;
      if (now - last < BREATH_MS) continue;
      await pace.breathe();
      last = pace.now?.() ?? 0;
    }
  } finally {
    // A computation that was stopped gives back what it had borrowed.
    steps.return(undefined as Value);
  }
}
