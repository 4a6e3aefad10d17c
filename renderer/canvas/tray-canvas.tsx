import {
  type ClipboardEvent,
  type DragEvent,
  type KeyboardEvent,
  type PointerEvent,
  useCallback,
  useEffect,
  useMemo,
  useRef,
  useState,
} from "react";
import { Stage } from "react-konva";
import { useStore } from "zustand";
import type { Finding, Plan } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import { pasteThings, thingsText } from "../document/clipboard";
import { addPart, removeThings } from "../document/commands/parts";
import { readShelfPart, SHELF_PART_TYPE } from "../document/shelf-part";
import { type CanvasActions, createHand, type HandWorld, IDLE, type Modifiers, shownHandles } from "./hand";
import { meaningOf } from "./keys";
import { paintGaps, paintGuides } from "./paint/guides";
import { paintFrame, paintHandles } from "./paint/hand";
import type { Pen } from "./paint/pen";
import { PaintedLayer } from "./painted-layer";
import { PartNotes } from "./part-notes";
import { PartsList } from "./parts-list";
import type { CanvasTheme } from "./theme";
import { themeProperties, useLoadedTheme } from "./use-loaded-theme";
import { type PlannedField, type Shown, useBenchPaint, useFieldPaint, usePartsPaint } from "./use-paints";
import { type Place, type TrayView, toTray, viewOf } from "./view";
import { VoltScale } from "./volt-scale";

export interface TrayCanvasProps {
  readonly setup: Setup;
  readonly selection: readonly string[];
  readonly snapping: boolean;
  /** The field on show, or null while there is none. */
  readonly field: PlannedField | null;
  readonly findings: readonly Finding[];
  readonly trayView: TrayView;
  readonly theme: CanvasTheme;
  readonly shown: Shown;
  /** Numbers of probe points to bring out, because a list has them selected. */
  readonly markedPoints: ReadonlySet<number>;
  /** Whether parts may be moved and changed here. */
  readonly editable: boolean;
  readonly actions: CanvasActions;
  /** Where the pointer is over the tray, mm; null when it has left. */
  readonly onPointer: (place: Place | null) => void;
}

const NO_FINE: Pick<Modifiers, "fine"> = { fine: false };
/** A wheel's step in lines or pages, in pixels. */
const WHEEL_UNIT_PX = [1, 16, 400];
const ZOOM_PER_PX = 0.0015;

/** Numbers that a tag shows come from the plan of this very water; a stale plan would show another tray's volts. */
const planForTags = (field: PlannedField | null): Plan | null => (field === null || field.outOfDate ? null : field.plan);

/** The browser turns these keys into copy, cut and paste by itself; nobody further out may take them for something else. */
function leaveClipboardKeys(event: KeyboardEvent): void {
  if ((event.ctrlKey || event.metaKey) && ["c", "x", "v"].includes(event.key.toLowerCase())) event.stopPropagation();
}

/** The tray on its bench, drawn to scale, with everything that hands and keys can do to it. Takes data and callbacks only. */
export function TrayCanvas(props: TrayCanvasProps) {
  const { setup, selection, field, findings, trayView, shown, editable, actions } = props;
  const theme = useLoadedTheme(props.theme);
  const viewState = useStore(trayView);
  const view = useMemo(() => viewOf(viewState), [viewState]);
  const [look, setLook] = useState(IDLE);
  const [dropping, setDropping] = useState(false);
  const surface = useRef<HTMLDivElement>(null);
  const panKey = useRef(false);
  const pointer = useRef<Place | null>(null);

  const latest = useRef({ props, view });
  latest.current = { props, view };
  const hand = useMemo(
    () =>
      createHand((): HandWorld => {
        const { props: now, view: nowView } = latest.current;
        return { ...now, view: viewOf(now.trayView.getState()) ?? nowView, panBy: now.trayView.panBy };
      }, setLook),
    [],
  );

  useEffect(() => {
    const element = surface.current;
    if (element === null) return;
    const observer = new ResizeObserver(() => trayView.setSize(element.clientWidth, element.clientHeight));
    observer.observe(element);
    trayView.setSize(element.clientWidth, element.clientHeight);
    return () => observer.disconnect();
  }, [trayView]);
  useEffect(() => trayView.showTray(setup.tray), [trayView, setup.tray]);
  useEffect(() => {
    // React listens to wheels passively; zooming must keep the page from scrolling.
    const element = surface.current;
    const onWheel = (event: WheelEvent): void => {
      event.preventDefault();
      const unit = WHEEL_UNIT_PX[event.deltaMode] ?? 1;
      const box = element?.getBoundingClientRect();
      if (event.shiftKey) {
        trayView.panBy(-(event.deltaX || event.deltaY) * unit, 0);
        return;
      }
      const pinch = event.ctrlKey ? 6 : 1;
      trayView.zoomBy(Math.exp(-event.deltaY * unit * ZOOM_PER_PX * pinch), [
        event.clientX - (box?.left ?? 0),
        event.clientY - (box?.top ?? 0),
      ]);
      if (event.deltaX !== 0) trayView.panBy(-event.deltaX * unit, 0);
    };
    element?.addEventListener("wheel", onWheel, { passive: false });
    return () => element?.removeEventListener("wheel", onWheel);
  }, [trayView]);

  const placeOf = (event: PointerEvent | DragEvent): Place => {
    const box = surface.current?.getBoundingClientRect();
    return [event.clientX - (box?.left ?? 0), event.clientY - (box?.top ?? 0)];
  };
  const modifiersOf = (event: PointerEvent): Modifiers => ({
    shift: event.shiftKey,
    fine: event.altKey,
    pan: panKey.current || event.button === 1 || (event.buttons & 4) !== 0,
  });

  function onPointerDown(event: PointerEvent<HTMLDivElement>): void {
    if (event.button > 1) return;
    event.currentTarget.setPointerCapture(event.pointerId);
    hand.press(placeOf(event), modifiersOf(event));
  }
  function onPointerMove(event: PointerEvent): void {
    const at = placeOf(event);
    pointer.current = at;
    hand.move(at, modifiersOf(event));
    props.onPointer(toTray(viewOf(trayView.getState()), ...at));
  }
  function onPointerLeave(): void {
    pointer.current = null;
    hand.leave();
    props.onPointer(null);
  }

  /** @returns whether the key meant something here. */
  function takeKey(event: KeyboardEvent): boolean {
    const meaning = meaningOf(event, setup, selection);
    if (meaning === null) return false;
    if (meaning.kind === "select") actions.select(meaning.ids);
    else if (meaning.kind === "view") ({ "zoom in": trayView.zoomIn, "zoom out": trayView.zoomOut, fit: trayView.fit })[meaning.view]();
    else if (!editable) return false;
    else actions.run(meaning.edit);
    return true;
  }
  function onKeyDown(event: KeyboardEvent): void {
    if (event.key === " ") panKey.current = true;
    else if (!(event.key === "Escape" && hand.cancel()) && !takeKey(event)) return;
    event.preventDefault();
    event.stopPropagation();
  }
  function onKeyUp(event: KeyboardEvent): void {
    if (event.key === " ") panKey.current = false;
    actions.settle();
  }

  function onCopy(event: ClipboardEvent, cut: boolean): void {
    const text = thingsText(setup, selection);
    if (text === null) return;
    event.clipboardData.setData("text/plain", text);
    event.preventDefault();
    if (cut && editable) actions.run(removeThings(setup, selection));
  }
  function onPaste(event: ClipboardEvent): void {
    const pasted = editable ? pasteThings(event.clipboardData.getData("text/plain")) : null;
    if (pasted === null) return;
    event.preventDefault();
    if (pasted.ok) actions.run(pasted.value);
    else actions.refuse(pasted.problems);
  }

  function onDragOver(event: DragEvent): void {
    if (!editable || !event.dataTransfer.types.includes(SHELF_PART_TYPE)) return;
    event.preventDefault();
    event.dataTransfer.dropEffect = "copy";
    setDropping(true);
  }
  function onDrop(event: DragEvent): void {
    setDropping(false);
    const part = readShelfPart(event.dataTransfer.getData(SHELF_PART_TYPE));
    if (part === null || !editable) return;
    event.preventDefault();
    const [xMm, yMm] = toTray(view, ...placeOf(event));
    const step = props.snapping ? 1 : 0.1;
    actions.run(addPart(setup, part, Math.round(xMm / step) * step, Math.round(yMm / step) * step));
    surface.current?.focus({ preventScroll: true });
  }

  const bench = useBenchPaint(setup, view, theme);
  const paints = useFieldPaint(field, setup, view, theme, shown, props.markedPoints);
  const { hovered } = look;
  const emphasis = useMemo(() => ({ selection, hovered, findings }), [selection, hovered, findings]);
  const parts = usePartsPaint(setup, planForTags(field), view, theme, emphasis, shown.tags, paints.placed);
  const moving = look.live !== null && look.activeHandle === null;
  const handles = useMemo(
    () => (moving ? [] : shownHandles({ setup, selection, view, editable })),
    [setup, selection, view, editable, moving],
  );
  const handPaint = useCallback(
    (pen: Pen) => {
      paintHandles(pen, handles, view, theme, look.activeHandle);
      paintGuides(pen, look.guides, view, theme);
      paintGaps(pen, look.gaps, view, theme);
      if (look.frame !== null) paintFrame(pen, look.frame[0], look.frame[1], theme);
    },
    [handles, view, theme, look.activeHandle, look.frame, look.guides, look.gaps],
  );
  const attended = useMemo(() => new Set([...selection, ...(look.hovered === null ? [] : [look.hovered])]), [selection, look.hovered]);
  const count = setup.parts.length;

  return (
    // biome-ignore lint/a11y/noStaticElementInteractions: list and tray share what the clipboard does.
    <div
      className="tray-canvas"
      style={themeProperties(theme)}
      onCopy={(event) => onCopy(event, false)}
      onCut={(event) => onCopy(event, true)}
      onPaste={onPaste}
      onKeyDown={leaveClipboardKeys}
    >
      <PartsList setup={setup} selection={selection} onSelect={actions.select} onEnter={() => surface.current?.focus()} onKey={takeKey} />
      <div
        ref={surface}
        className={`tray-surface${dropping ? " dropping" : ""}`}
        role="application"
        aria-label={`Tray with ${count} ${count === 1 ? "part" : "parts"}. Arrow keys move what is selected.`}
        // biome-ignore lint/a11y/noNoninteractiveTabindex: the keys act here.
        tabIndex={0}
        style={{ cursor: look.cursor }}
        onPointerDown={onPointerDown}
        onPointerMove={onPointerMove}
        onPointerUp={(event) => hand.release(placeOf(event), { ...modifiersOf(event), ...NO_FINE })}
        onPointerCancel={() => hand.cancel()}
        onPointerLeave={onPointerLeave}
        onKeyDown={onKeyDown}
        onKeyUp={onKeyUp}
        onBlur={() => actions.settle()}
        onDragOver={onDragOver}
        onDragLeave={() => setDropping(false)}
        onDrop={onDrop}
      >
        <Stage width={view.widthPx} height={view.heightPx} listening={false} aria-hidden="true">
          <PaintedLayer name="bench" paint={bench} />
          <PaintedLayer name="field" paint={paints.field} />
          <PaintedLayer name="parts" paint={parts} />
          <PaintedLayer name="points" paint={paints.points} />
          <PaintedLayer name="hand" paint={handPaint} />
        </Stage>
      </div>
      {field !== null && shown.picture && !field.outOfDate && <VoltScale plan={field.plan} dark={theme.dark} />}
      {count === 0 && <p className="tray-empty">Drag a bar or a disc from the shelf onto the tray, or press Enter on one there.</p>}
      <PartNotes findings={findings} setup={setup} view={view} attended={attended} />
      {look.live !== null && pointer.current !== null && (
        <output className="live-number" style={{ left: pointer.current[0] + 16, top: pointer.current[1] + 22 }} aria-hidden="true">
          {look.live}
        </output>
      )}
    </div>
  );
}
