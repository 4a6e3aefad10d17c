import { createStore, type StoreApi } from "zustand/vanilla";
import type { FieldReading, Plan } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import { tidyMm } from "./edit";
import type { Planning } from "./planning";

/** What the user looks at more closely: which picture, pinned probes, a section across the tray, another setup to compare with. No part of a setup. */

export type PlaceMm = readonly [xMm: number, yMm: number];
/** What the colours show. */
export type Quantity = "potential" | "field" | "current" | "difference";

/** A probe that stays where it was put. */
export interface Pin {
  readonly number: number;
  readonly at: PlaceMm;
}

/** A straight line across the tray, mm. */
export interface Section {
  readonly from: PlaceMm;
  readonly to: PlaceMm;
}

/** Another setup with its field, beside which the present one is seen. */
export interface Comparison {
  readonly name: string;
  readonly setup: Setup;
  readonly plan: Plan;
}

export interface CloserLookState {
  readonly quantity: Quantity;
  readonly colours: "hues" | "greys";
  /** Bands of one colour each instead of a smooth run. */
  readonly steps: boolean;
  readonly pins: readonly Pin[];
  readonly section: Section | null;
  readonly comparison: Comparison | null;
  /** What each pin reads, in the order of the pins; empty while there is nothing to read. */
  readonly pinReadings: readonly FieldReading[];
  /** Readings evenly along the section, both ends included; empty while there is nothing to read. */
  readonly sectionReadings: readonly FieldReading[];
}

export interface CloserLook extends Pick<StoreApi<CloserLookState>, "getState" | "subscribe" | "getInitialState"> {
  readonly look: (change: Partial<Pick<CloserLookState, "quantity" | "colours" | "steps">>) => void;
  readonly addPin: (at: PlaceMm) => void;
  readonly movePin: (number: number, at: PlaceMm) => void;
  readonly dropPin: (number: number) => void;
  readonly laySection: (section: Section | null) => void;
  /** Takes a setup to compare with and shows the difference; null ends the comparison. */
  readonly compare: (comparison: Comparison | null) => void;
  readonly stop: () => void;
}

/** Whoever can read the field: the field worker's client. */
export interface PlaceReader {
  readonly sample: (setup: Setup, placesMm: readonly PlaceMm[]) => Promise<readonly FieldReading[] | null>;
}

/** Pins at a time: more would hide the tray, and a list of them serves nobody. */
export const MOST_PINS = 12;
/** Places read along a section: every hundredth of its length. */
export const SECTION_STEPS = 100;

const tidy = ([x, y]: PlaceMm): PlaceMm => [tidyMm(x), tidyMm(y)];

/** @returns the places at which a section is read, both ends included, mm. */
export function placesAlong({ from, to }: Section): readonly PlaceMm[] {
  return Array.from({ length: SECTION_STEPS + 1 }, (_, index): PlaceMm => {
    const share = index / SECTION_STEPS;
    return [from[0] + share * (to[0] - from[0]), from[1] + share * (to[1] - from[1])];
  });
}

/** @returns the length of a section, mm. */
export const lengthMm = ({ from, to }: Section): number => Math.hypot(to[0] - from[0], to[1] - from[1]);

/** @returns a closer look without pins; its readings follow the plan. */
export function createCloserLook(planning: Planning, reader: PlaceReader): CloserLook {
  const store = createStore<CloserLookState>(() => ({
    quantity: "potential",
    colours: "hues",
    steps: false,
    pins: [],
    section: null,
    comparison: null,
    pinReadings: [],
    sectionReadings: [],
  }));
  const { getState, setState } = store;
  let asking = false;
  let wanted = false;
  let stopped = false;

  /** One request at a time; what changed meanwhile is read afterwards. */
  async function read(): Promise<void> {
    wanted = true;
    if (asking || stopped) return;
    asking = true;
    while (wanted && !stopped) {
      wanted = false;
      const { pins, section } = getState();
      const { plannedSetup, refusal } = planning.getState();
      const places = [...pins.map(({ at }) => at), ...(section === null ? [] : placesAlong(section))];
      const readable = plannedSetup !== null && refusal === null && places.length > 0;
      // The plan itself reports a worker that fails; here there is just nothing to read.
      const readings = readable ? await reader.sample(plannedSetup, places).catch(() => null) : null;
      if (wanted || stopped) continue;
      setState({ pinReadings: readings?.slice(0, pins.length) ?? [], sectionReadings: readings?.slice(pins.length) ?? [] });
    }
    asking = false;
  }

  function change(next: Partial<CloserLookState>): void {
    setState(next);
    void read();
  }

  const unsubscribe = planning.subscribe((state, before) => {
    if (state.plan !== before.plan || state.refusal !== before.refusal) void read();
  });

  return {
    getState,
    subscribe: store.subscribe,
    getInitialState: store.getInitialState,
    look: setState,
    addPin: (at) => {
      const { pins } = getState();
      if (pins.length >= MOST_PINS) return;
      const number = Array.from({ length: MOST_PINS }, (_, index) => index + 1).find((one) => !pins.some((pin) => pin.number === one)) ?? 1;
      change({ pins: [...pins, { number, at: tidy(at) }].sort((a, b) => a.number - b.number), pinReadings: [] });
    },
    movePin: (number, at) => change({ pins: getState().pins.map((pin) => (pin.number === number ? { ...pin, at: tidy(at) } : pin)) }),
    dropPin: (number) => change({ pins: getState().pins.filter((pin) => pin.number !== number), pinReadings: [] }),
    laySection: (section) => change({ section: section === null ? null : { from: tidy(section.from), to: tidy(section.to) } }),
    compare: (comparison) => {
      const { quantity } = getState();
      setState({ comparison, quantity: comparison !== null ? "difference" : quantity === "difference" ? "potential" : quantity });
    },
    stop: () => {
      stopped = true;
      unsubscribe();
    },
  };
}
