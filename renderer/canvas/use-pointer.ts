import { type KeyboardEvent, type PointerEvent, type RefObject, useEffect, useMemo, useRef, useState } from "react";
import { useStore } from "zustand";
import { createHand, type HandWorld, IDLE, type Modifiers } from "./hand";
import { createTapeHand, type Tape } from "./tape";
import type { TrayCanvasProps } from "./tray-canvas";
import { type Place, type TrayView, toTray, viewOf } from "./view";

/** A wheel's step in lines or pages, in pixels. */
const WHEEL_UNIT_PX = [1, 16, 400];
const ZOOM_PER_PX = 0.0015;
/** A trackpad's pinch comes as a wheel with small steps. */
const PINCH = 6;
const LEAST_SECTION_MM = 2;

/** How many pixels of the window one pixel of the element takes: the zoom of the interface. */
export function zoomOf(element: HTMLElement): number {
  const { width } = element.getBoundingClientRect();
  return width > 0 && element.clientWidth > 0 ? width / element.clientWidth : 1;
}

/** @returns a place of the screen on the element, the element's own px from its upper left corner. */
export function placeOn(element: HTMLElement | null, event: { readonly clientX: number; readonly clientY: number }): Place {
  if (element === null) return [event.clientX, event.clientY];
  const box = element.getBoundingClientRect();
  const zoom = zoomOf(element);
  return [(event.clientX - box.left) / zoom, (event.clientY - box.top) / zoom];
}

/** Keeps the view as large as the element, and lets the wheel zoom it. */
function useSurface(surface: RefObject<HTMLDivElement | null>, trayView: TrayView, onZoom: (zoom: number) => void): void {
  useEffect(() => {
    const element = surface.current;
    if (element === null) return;
    const measure = (): void => {
      trayView.setSize(element.clientWidth, element.clientHeight);
      onZoom(Number(zoomOf(element).toFixed(2)));
    };
    const onWheel = (event: WheelEvent): void => {
      event.preventDefault();
      const unit = WHEEL_UNIT_PX[event.deltaMode] ?? 1;
      if (event.shiftKey) {
        trayView.panBy(-(event.deltaX || event.deltaY) * unit, 0);
        return;
      }
      trayView.zoomBy(Math.exp(-event.deltaY * unit * ZOOM_PER_PX * (event.ctrlKey ? PINCH : 1)), placeOn(element, event));
      if (event.deltaX !== 0) trayView.panBy(-event.deltaX * unit, 0);
    };
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    measure();
    // React listens to wheels passively; zooming must keep the page from scrolling.
    element.addEventListener("wheel", onWheel, { passive: false });
    return () => {
      observer.disconnect();
      element.removeEventListener("wheel", onWheel);
    };
  }, [surface, trayView, onZoom]);
}

/** The pointer on the tray: hand or tape, panning with the space bar or the middle button. @returns what shows, and what to listen with. */
export function usePointer(props: TrayCanvasProps, surface: RefObject<HTMLDivElement | null>) {
  const { trayView } = props;
  const tool = useStore(trayView, (state) => state.tool);
  const [look, setLook] = useState(IDLE);
  const [tape, setTape] = useState<Tape | null>(null);
  const [place, setPlace] = useState<Place | null>(null);
  const cutFrom = useRef<Place | null>(null);
  const panKey = useRef(false);
  const latest = useRef(props);
  latest.current = props;
  const [zoom, setZoom] = useState(1);
  useSurface(surface, trayView, setZoom);

  const hand = useMemo(
    () =>
      createHand((): HandWorld => {
        const now = latest.current;
        return { ...now, view: viewOf(now.trayView.getState()), panBy: now.trayView.panBy };
      }, setLook),
    [],
  );
  const tapeHand = useMemo(
    () => createTapeHand(() => ({ setup: latest.current.setup, view: viewOf(latest.current.trayView.getState()) }), setTape),
    [],
  );
  useEffect(() => {
    if (tool === "hand") tapeHand.rollUp();
  }, [tool, tapeHand]);

  const modifiersOf = (event: PointerEvent): Modifiers => ({
    shift: event.shiftKey,
    fine: event.altKey,
    pan: panKey.current || event.button === 1 || (event.buttons & 4) !== 0,
  });
  /** @returns whether a tool was in hand. */
  function putToolAway(): boolean {
    if (tool === "hand") return false;
    cutFrom.current = null;
    if (!tapeHand.rollUp()) trayView.setTool("hand");
    return true;
  }
  /** Where on the tray, mm, to half a millimetre: as a probe is placed. */
  const whereOn = (at: Place): Place => {
    const [x, y] = toTray(viewOf(trayView.getState()), ...at);
    return [Math.round(2 * x) / 2, Math.round(2 * y) / 2];
  };
  /** Draws the section from where the pointer was pressed to where it is; a press without a way is none. */
  function cutTo(at: Place): void {
    const [from, to] = [cutFrom.current, whereOn(at)];
    if (from !== null && Math.hypot(to[0] - from[0], to[1] - from[1]) >= LEAST_SECTION_MM) props.closerActions.laySection({ from, to });
  }

  return {
    /** Pixels of the window for a pixel of the stage. */
    zoom,
    look,
    tape,
    /** Where the pointer is, px; null when it has left. */
    place,
    cursor: tool !== "hand" && look.cursor !== "grabbing" ? "crosshair" : look.cursor,
    /** Calls off what is under way, or puts the tape away. @returns whether there was anything. */
    cancel: (): boolean => hand.cancel() || putToolAway(),
    holdPan: (event: KeyboardEvent, held: boolean): boolean => {
      if (event.key === " ") panKey.current = held;
      return event.key === " ";
    },
    listeners: {
      onPointerDown: (event: PointerEvent<HTMLDivElement>): void => {
        if (event.button > 1) return;
        event.currentTarget.setPointerCapture(event.pointerId);
        const [at, modifiers] = [placeOn(surface.current, event), modifiersOf(event)];
        const { closerActions } = props;
        if (tool === "tape" && !modifiers.pan) tapeHand.press(at);
        else if (tool === "pin" && !modifiers.pan && event.button === 0) closerActions.addPin(whereOn(at));
        else if (tool === "section" && !modifiers.pan && event.button === 0) cutFrom.current = whereOn(at);
        else hand.press(at, modifiers);
      },
      onPointerMove: (event: PointerEvent): void => {
        const [at, modifiers] = [placeOn(surface.current, event), modifiersOf(event)];
        setPlace(at);
        if (tool === "tape" && !modifiers.pan) tapeHand.move(at);
        else if (cutFrom.current !== null) cutTo(at);
        else hand.move(at, modifiers);
        props.onPointer(toTray(viewOf(trayView.getState()), ...at));
      },
      onPointerUp: (event: PointerEvent): void => {
        const at = placeOn(surface.current, event);
        if (tool === "tape") tapeHand.release(at);
        if (cutFrom.current !== null) {
          cutFrom.current = null;
          trayView.setTool("hand");
        }
        hand.release(at, modifiersOf(event));
      },
      onPointerCancel: (): void => void hand.cancel(),
      onPointerLeave: (): void => {
        setPlace(null);
        hand.leave();
        props.onPointer(null);
      },
    },
  };
}
