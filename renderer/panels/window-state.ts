import { createStore, type StoreApi } from "zustand/vanilla";
import type { JudgedRun } from "../../shared-types/readings";
import type { Pictured } from "./tray-picture";

/** What the tray shows of the plan. */
export interface Shown {
  readonly picture: boolean;
  readonly equipotentials: boolean;
  readonly fieldLines: boolean;
  readonly points: boolean;
  readonly tags: boolean;
}

/** What a probe would read under the pointer. */
export interface PointerReadout {
  readonly xMm: number;
  readonly yMm: number;
  readonly volts: number | null;
  readonly fieldVPerCm: number;
}

/** The places of work round the tray. */
export type Desk = "lay-out" | "bench" | "probe-plan" | "sheets" | "readings";

export const DESKS: readonly Desk[] = ["lay-out", "bench", "probe-plan", "sheets", "readings"];

/** Desks that are about the points. */
const WITH_POINTS: ReadonlySet<Desk> = new Set(["probe-plan", "readings"]);

/** Something to tell the user that stays until it is dismissed or answered. */
export interface Message {
  readonly id: number;
  readonly tone: "problem" | "question" | "done" | "working";
  readonly title: string;
  readonly lines: readonly string[];
  readonly choices: readonly { readonly label: string; readonly choose: () => void }[];
  /** Small pictures of trays, side by side, each with what it is. */
  readonly pictures?: readonly { readonly caption: string; readonly pictured: Pictured }[];
  /** Share of the work that is done, 0 to 1. */
  readonly progress?: number;
}

export interface WindowState {
  readonly desk: Desk;
  readonly startPage: boolean;
  readonly keysShown: boolean;
  readonly settingsShown: boolean;
  readonly closerShown: boolean;
  readonly stockShown: boolean;
  readonly findingsShown: boolean;
  readonly shown: Shown;
  readonly readout: PointerReadout | null;
  readonly markedPoints: ReadonlySet<number>;
  /** Id of the run of readings on show; null for the newest. */
  readonly run: string | null;
  /** The run whose residuals the tray shows, while its desk is open. */
  readonly judged: JudgedRun | null;
  readonly messages: readonly Message[];
}

/** What the window shows beside the document: no part of a setup. */
export interface WindowStore extends Pick<StoreApi<WindowState>, "getState" | "subscribe" | "getInitialState"> {
  readonly set: (change: Partial<WindowState>) => void;
  readonly goTo: (desk: Desk) => void;
  /** Shows a message. @returns how to take it away again. */
  readonly tell: (message: Omit<Message, "id">) => () => void;
  readonly dismiss: (id: number) => void;
  /** Shows work under way, with a way to stop it. @returns how to say what share (0 to 1) is done, and how to take it away. */
  readonly tellProgress: (title: string, stop: string, onStop: () => void) => { show: (share: number) => void; end: () => void };
}

/** @returns the state of a window that opens on the tray. */
export function createWindowStore(): WindowStore {
  const store = createStore<WindowState>(() => ({
    desk: "lay-out",
    startPage: false,
    keysShown: false,
    settingsShown: false,
    closerShown: false,
    stockShown: false,
    findingsShown: false,
    shown: { picture: true, equipotentials: true, fieldLines: false, points: false, tags: true },
    readout: null,
    markedPoints: new Set(),
    run: null,
    judged: null,
    messages: [],
  }));
  const { getState, setState } = store;
  let next = 1;
  const dismiss = (id: number): void => setState({ messages: getState().messages.filter((message) => message.id !== id) });
  const show = (message: Omit<Message, "id">): number => {
    const id = next++;
    setState({ messages: [...getState().messages.slice(-3), { ...message, id }] });
    return id;
  };
  return {
    getState,
    subscribe: store.subscribe,
    getInitialState: store.getInitialState,
    set: setState,
    goTo: (desk) =>
      setState(({ desk: from, shown }) => ({
        desk,
        startPage: false,
        // The points come and go with their desk, unless the user has them shown elsewhere too.
        shown: { ...shown, points: WITH_POINTS.has(desk) || (shown.points && !WITH_POINTS.has(from)) },
      })),
    tell: (message) => {
      const id = show(message);
      return () => dismiss(id);
    },
    dismiss,
    tellProgress: (title, stop, onStop) => {
      const id = show({ tone: "working", title, lines: [], choices: [{ label: stop, choose: onStop }], progress: 0 });
      return {
        show: (progress) => setState({ messages: getState().messages.map((one) => (one.id === id ? { ...one, progress } : one)) }),
        end: () => dismiss(id),
      };
    },
  };
}
