import type { FieldReading } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import type { Place } from "./view";

/** Where the pointer is, and what a probe would read there. */
export interface PointerReadout {
  readonly xMm: number;
  readonly yMm: number;
  readonly volts: number | null;
  readonly voltsError: number;
  readonly fieldVPerCm: number;
  readonly directionDeg: number;
  /** Id of the part that the pointer is on. */
  readonly inside: string | null;
}

/** Whoever can read the field: the field worker's client. */
export interface SampleSource {
  readonly sample: (setup: Setup, placesMm: readonly (readonly [number, number])[]) => Promise<readonly FieldReading[] | null>;
}

const CM_PER_M = 100;

export interface Readout {
  /** Asks for a reading; while one is outstanding only the newest place is kept. `setup` is the one that has been planned. */
  readonly at: (setup: Setup | null, place: Place) => void;
  readonly leave: () => void;
}

/** @returns a readout that reports the place at once and the reading when it comes; null when the pointer has left. */
export function createReadout(source: SampleSource, report: (readout: PointerReadout | null) => void): Readout {
  let asking = false;
  let next: { readonly setup: Setup; readonly place: Place } | null = null;
  let here: Place | null = null;
  let last: FieldReading | null = null;
  /** Counts the moments from which an answer still on its way says nothing any more. */
  let voided = 0;

  function tell(): void {
    if (here === null) {
      report(null);
      return;
    }
    const [xMm, yMm] = here;
    report({
      xMm,
      yMm,
      volts: last?.volts ?? null,
      voltsError: last?.voltsError ?? 0,
      fieldVPerCm: (last?.fieldVPerM ?? 0) / CM_PER_M,
      directionDeg: last?.directionDeg ?? 0,
      inside: last?.inside ?? null,
    });
  }

  async function ask(): Promise<void> {
    if (asking || next === null) return;
    const { setup, place } = next;
    next = null;
    asking = true;
    const asked = voided;
    // The plan itself reports a worker that fails; here there is just nothing to read.
    const readings = await source.sample(setup, [place]).catch(() => null);
    asking = false;
    if (asked === voided) {
      last = readings?.[0] ?? null;
      tell();
    }
    void ask();
  }

  return {
    at: (setup, place) => {
      here = place;
      if (setup === null) {
        voided++;
        next = null;
        last = null;
      } else next = { setup, place };
      tell();
      void ask();
    },
    leave: () => {
      voided++;
      here = null;
      next = null;
      last = null;
      report(null);
    },
  };
}
