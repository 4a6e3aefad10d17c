import type { Plan } from "../shared-types/plan";
import type { Diagnosis, JudgedRun } from "../shared-types/readings";
import type { Setup } from "../shared-types/setup";
import { diagnose } from "./engine/readings/diagnose";
import { sensitivitiesOf } from "./engine/readings/sensitivities";
import type { FieldClient } from "./worker/field-client";

/** Joins the diagnosis to a worker: the tray is solved with each fault put in, aside from the open setup's planning. */

/**
 * @param openClient starts a worker that is closed again at the end.
 * @returns the diagnosis of a run; null when it was stopped. Rejects on a fault of ours.
 */
export async function diagnoseAside(
  openClient: () => FieldClient,
  setup: Setup,
  plan: Plan,
  run: JudgedRun,
  onProgress: (share: number) => void,
  signal: AbortSignal,
): Promise<Diagnosis | null> {
  const places = run.readings.map(({ xMm, yMm }) => [xMm, yMm] as const);
  const client = openClient();
  try {
    const sensitivities = await sensitivitiesOf(
      setup,
      async (changed) => {
        const outcome = await client.plan(changed, "print");
        if (outcome === null || !outcome.ok) return null;
        return (await client.sample(changed, places))?.map(({ volts }) => volts) ?? null;
      },
      onProgress,
      () => signal.aborted,
    );
    return sensitivities === null || signal.aborted ? null : diagnose(run.readings, sensitivities, plan.bench.meter.digitVolts, plan.spanV);
  } finally {
    client.close();
  }
}
