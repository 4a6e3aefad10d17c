import type { Setup } from "../../shared-types/setup";
import { trimmed } from "../document/number-text";
import { pointAlong } from "../engine/geometry/outline";
import { texts } from "../texts/texts";
import { closestOnOutline } from "./gaps";
import { outlinedThing, topDown } from "./hit";
import { type Place, toScreen, toTray, type View } from "./view";

const words = texts.canvas.tape;

/** The measuring tape: pulled from one place to another, it holds to corners, edges and middles of what lies there. */

/** Both ends on the tray, mm. */
export interface Tape {
  readonly from: Place;
  readonly to: Place;
}

export interface TapeWorld {
  readonly setup: Setup;
  readonly view: View;
}

export interface TapeHand {
  readonly press: (at: Place) => void;
  readonly move: (at: Place) => void;
  readonly release: (at: Place) => void;
  /** Rolls the tape up. @returns whether there was one. */
  readonly rollUp: () => boolean;
}

/** A corner or a middle draws the tape's end from so far, an edge from half of it, px. */
const POINT_REACH_PX = 10;
const EDGE_REACH_PX = 6;
const FREE_MM = 0.1;

/**
 * @param at a place of the stage, px.
 * @returns the place that a tape's end takes there, mm: a corner or a middle within reach, else an edge, else the place itself.
 */
export function tapeEnd({ setup, view }: TapeWorld, at: Place): Place {
  const [x, y] = toTray(view, ...at);
  const distancePx = (place: Place): number => Math.hypot(place[0] - x, place[1] - y) * view.scale;
  let edge: Place | null = null;
  for (const thing of topDown(setup)) {
    const { loops, placed } = outlinedThing(thing);
    const corners = loops.flat().flatMap((piece) => (piece.kind === "edge" ? [pointAlong(piece, 0)] : []));
    const point = [...corners, [placed.xMm, placed.yMm] as const].find((place) => distancePx(place) <= POINT_REACH_PX);
    if (point !== undefined) return point;
    const close = closestOnOutline(loops, [x, y]);
    if (edge === null && distancePx(close) <= EDGE_REACH_PX) edge = close;
  }
  return edge ?? [Math.round(x / FREE_MM) * FREE_MM, Math.round(y / FREE_MM) * FREE_MM];
}

/** @returns the tape's reading: its length, and how far it goes along x and y. */
export function tapeText({ from, to }: Tape): string {
  const [dx, dy] = [to[0] - from[0], to[1] - from[1]];
  const length = words.length(trimmed(Math.hypot(dx, dy), 1));
  const slanted = Math.abs(dx) > 0.05 && Math.abs(dy) > 0.05;
  return slanted ? words.slanted(length, trimmed(Math.abs(dx), 1), trimmed(Math.abs(dy), 1)) : length;
}

/**
 * @param world gives what the tape lies on now.
 * @param show takes the tape to be shown; null when it is rolled up.
 */
export function createTapeHand(world: () => TapeWorld, show: (tape: Tape | null) => void): TapeHand {
  let tape: Tape | null = null;
  let pulling = false;
  const lay = (next: Tape | null): void => {
    tape = next;
    show(next);
  };
  return {
    press: (at) => {
      const from = tapeEnd(world(), at);
      pulling = true;
      lay({ from, to: from });
    },
    move: (at) => {
      if (pulling && tape !== null) lay({ from: tape.from, to: tapeEnd(world(), at) });
    },
    release: (at) => {
      pulling = false;
      if (tape === null) return;
      const [x, y] = toScreen(world().view, ...tape.from);
      if (Math.hypot(at[0] - x, at[1] - y) < POINT_REACH_PX / 2) lay(null);
    },
    rollUp: () => {
      const lying = tape !== null;
      pulling = false;
      if (lying) lay(null);
      return lying;
    },
  };
}
