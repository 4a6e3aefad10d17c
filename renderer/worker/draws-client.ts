import type { Plan } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import type { DrawnBands } from "../../shared-types/tolerance";
import { drawnPoints } from "../engine/tolerance/drawn-points";
import type { DrawAnswer, DrawRequest } from "./draw-messages";

export interface DrawOptions {
  readonly draws: number;
  readonly seed: number;
  readonly signal: AbortSignal;
  /** Told how many trays are done. */
  readonly onProgress: (done: number) => void;
}

/** Draws trays within the stated tolerances and sums up what they read at the plan's points. */
export interface DrawsClient {
  /** @returns the drawn bands, or null when called off or the plan has no bands to compare with. Rejects on a fault of ours. */
  readonly draw: (setup: Setup, plan: Plan, options: DrawOptions) => Promise<DrawnBands | null>;
}

/**
 * Shares the draws among workers, one a core, that live as long as the run. Calling off ends them at once.
 * @param cores how many workers may run beside each other.
 */
export function createDrawsClient(startWorker: () => Worker, cores: number, now: () => number): DrawsClient {
  return {
    draw: (setup, plan, { draws, seed, signal, onProgress }) => {
      const { tolerance, levels, checks } = plan.probing;
      if (tolerance === undefined || signal.aborted) return Promise.resolve(null);
      const { circuit, meter, water, interface: surfaces } = plan.bench;
      const readings = [...levels.flatMap(({ points }) => points), ...checks];
      const task = { setup, bench: { circuit, meter, water, interface: surfaces }, readings, seed };
      const began = now();
      const rows: Float64Array[] = new Array<Float64Array>(draws);
      const workers = Array.from({ length: Math.max(1, Math.min(cores, draws)) }, startWorker);
      let done = 0;
      return new Promise<DrawnBands | null>((resolve, reject) => {
        const end = (): void => {
          for (const worker of workers) worker.terminate();
          signal.removeEventListener("abort", callOff);
        };
        const callOff = (): void => {
          end();
          resolve(null);
        };
        const fail = (message: string): void => {
          end();
          reject(new Error(message));
        };
        signal.addEventListener("abort", callOff);
        workers.forEach((worker, index) => {
          const first = Math.floor((draws * index) / workers.length);
          const next = Math.floor((draws * (index + 1)) / workers.length);
          worker.onerror = (event) => fail(event.message || "a worker stopped");
          worker.onmessage = ({ data }: MessageEvent<DrawAnswer>) => {
            if ("fault" in data) {
              fail(data.fault);
              return;
            }
            rows[data.draw] = data.row;
            onProgress(++done);
            if (done < draws) return;
            end();
            resolve({ draws, seed, elapsedMs: now() - began, points: drawnPoints(rows, tolerance.points) });
          };
          const request: DrawRequest = { task, first, count: next - first };
          worker.postMessage(request);
        });
      });
    },
  };
}
