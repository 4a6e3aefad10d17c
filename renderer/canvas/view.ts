import { createStore, type StoreApi } from "zustand/vanilla";
import type { Tray } from "../../shared-types/setup";
import { traySizeMm } from "../engine/geometry/tray-outline";

/** How the tray lies on the screen: y grows upwards on the tray and downwards on the screen. */
export interface View {
  /** Pixels (of CSS) for a millimetre. */
  readonly scale: number;
  /** Where the tray's origin lies, pixels from the stage's upper left corner. */
  readonly originX: number;
  readonly originY: number;
  readonly widthPx: number;
  readonly heightPx: number;
}

export type Place = readonly [number, number];

/** @returns where a place of the tray (mm) lies on the stage (px). */
export const toScreen = (view: View, xMm: number, yMm: number): Place => [view.originX + xMm * view.scale, view.originY - yMm * view.scale];

/** @returns the place of the tray (mm) at a place of the stage (px). */
export const toTray = (view: View, xPx: number, yPx: number): Place => [
  (xPx - view.originX) / view.scale,
  (view.originY - yPx) / view.scale,
];

/** Room round the whole tray, px: rules lie at the left and below. */
export const MARGIN_PX = { left: 72, right: 36, top: 44, bottom: 100 };
const SMALLEST_SCALE = 0.1;
const LARGEST_SCALE = 60;
/** One press of a zoom key or button. */
export const ZOOM_STEP = 1.25;

/** What the pointer is on the tray: a hand that takes parts, a measuring tape, a pin for a probe, or the line of a section. */
export type Tool = "hand" | "tape" | "pin" | "section";

/** What the view is made from: the middle of the stage stays on one place of the tray while the window changes size. */
export interface TrayViewState {
  readonly widthPx: number;
  readonly heightPx: number;
  readonly lengthMm: number;
  readonly widthMm: number;
  readonly scale: number;
  readonly middleMm: Place;
  /** Whether the whole tray is kept in sight. */
  readonly fitted: boolean;
  readonly tool: Tool;
}

export interface TrayView extends Pick<StoreApi<TrayViewState>, "getState" | "subscribe" | "getInitialState"> {
  readonly setSize: (widthPx: number, heightPx: number) => void;
  readonly showTray: (tray: Tray) => void;
  /** Zooms by a factor; the tray stays under the given place of the stage (px), by default its middle. */
  readonly zoomBy: (factor: number, at?: Place) => void;
  readonly zoomIn: () => void;
  readonly zoomOut: () => void;
  /** Shows the whole tray, and keeps it in sight when the window or the tray changes size. */
  readonly fit: () => void;
  readonly setTool: (tool: TrayViewState["tool"]) => void;
  readonly panBy: (xPx: number, yPx: number) => void;
}

const clampScale = (scale: number): number => Math.min(LARGEST_SCALE, Math.max(SMALLEST_SCALE, scale));

/** @returns the view that a state describes. */
export function viewOf({ widthPx, heightPx, scale, middleMm }: TrayViewState): View {
  return {
    scale,
    originX: widthPx / 2 - middleMm[0] * scale,
    originY: heightPx / 2 + middleMm[1] * scale,
    widthPx,
    heightPx,
  };
}

/** Scale and middle at which the whole tray with its rules fills the stage. */
function fitting(state: TrayViewState): Pick<TrayViewState, "scale" | "middleMm"> {
  const { widthPx, heightPx, lengthMm, widthMm } = state;
  const { left, right, top, bottom } = MARGIN_PX;
  const scale = clampScale(Math.min(Math.max(40, widthPx - left - right) / lengthMm, Math.max(40, heightPx - top - bottom) / widthMm));
  return { scale, middleMm: [lengthMm / 2 + (right - left) / 2 / scale, widthMm / 2 + (top - bottom) / 2 / scale] };
}

/** Panning stops where the stage's middle would leave the tray: it can never be lost from sight. */
const kept = (middle: number, sizeMm: number): number => Math.min(sizeMm, Math.max(0, middle));

/** @returns a view that shows a whole tray. */
export function createTrayView(tray: Tray): TrayView {
  const [lengthMm, widthMm] = traySizeMm(tray);
  const store = createStore<TrayViewState>(() => {
    const state = {
      widthPx: 800,
      heightPx: 600,
      lengthMm,
      widthMm,
      scale: 1,
      middleMm: [0, 0] as const,
      fitted: true,
      tool: "hand" as const,
    };
    return { ...state, ...fitting(state) };
  });
  const { getState, setState } = store;

  function change(next: Partial<TrayViewState>): void {
    const state = { ...getState(), ...next };
    setState(state.fitted ? { ...state, ...fitting(state) } : state);
  }

  function zoomBy(factor: number, at?: Place): void {
    const state = getState();
    const [x, y] = at ?? [state.widthPx / 2, state.heightPx / 2];
    const [xMm, yMm] = toTray(viewOf(state), x, y);
    const scale = clampScale(state.scale * factor);
    const middleX = xMm + (state.widthPx / 2 - x) / scale;
    const middleY = yMm - (state.heightPx / 2 - y) / scale;
    setState({ scale, middleMm: [kept(middleX, state.lengthMm), kept(middleY, state.widthMm)], fitted: false });
  }

  return {
    getState,
    subscribe: store.subscribe,
    getInitialState: store.getInitialState,
    setSize: (widthPx, heightPx) => {
      const state = getState();
      if (widthPx > 0 && heightPx > 0 && (widthPx !== state.widthPx || heightPx !== state.heightPx)) change({ widthPx, heightPx });
    },
    showTray: (next) => {
      const [length, width] = traySizeMm(next);
      const state = getState();
      if (length !== state.lengthMm || width !== state.widthMm) change({ lengthMm: length, widthMm: width });
    },
    zoomBy,
    zoomIn: () => zoomBy(ZOOM_STEP),
    zoomOut: () => zoomBy(1 / ZOOM_STEP),
    setTool: (tool) => setState({ tool }),
    fit: () => change({ fitted: true }),
    panBy: (xPx, yPx) => {
      const { scale, middleMm, lengthMm: length, widthMm: width } = getState();
      setState({ middleMm: [kept(middleMm[0] - xPx / scale, length), kept(middleMm[1] + yPx / scale, width)], fitted: false });
    },
  };
}
