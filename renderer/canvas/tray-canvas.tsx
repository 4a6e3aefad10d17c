import { type KeyboardEvent, useCallback, useEffect, useMemo, useRef } from "react";
import { Stage } from "react-konva";
import { useStore } from "zustand";
import type { Finding, Plan } from "../../shared-types/plan";
import type { JudgedRun } from "../../shared-types/readings";
import type { Setup } from "../../shared-types/setup";
import type { CloserLook, CloserLookState } from "../document/closer-look";
import { texts } from "../texts/texts";
import { type CanvasActions, shownHandles } from "./hand";
import { actOnKey, useClipboard, useDrop } from "./input";
import { paintPins, paintSection } from "./paint/closer-look";
import { paintEqualGaps, paintGaps, paintGuides, paintLength } from "./paint/guides";
import { paintFrame, paintHandles } from "./paint/hand";
import type { Pen } from "./paint/pen";
import { paintResiduals } from "./paint/residuals";
import { PaintedLayer } from "./painted-layer";
import { PartNotes } from "./part-notes";
import { PartsList } from "./parts-list";
import { PictureScale } from "./picture-scale";
import { tapeText } from "./tape";
import type { CanvasTheme } from "./theme";
import { themeProperties, useLoadedTheme } from "./use-loaded-theme";
import { type PlannedField, type Shown, useBenchPaint, useFieldPaint, usePartsPaint, useShownPicture } from "./use-paints";
import { usePointer } from "./use-pointer";
import { type Place, type TrayView, toScreen, viewOf } from "./view";

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
  /** Which picture, and what is pinned and cut through. */
  readonly closer: CloserLookState;
  readonly closerActions: Pick<CloserLook, "addPin" | "laySection">;
  /** Numbers of probe points to bring out, because a list has them selected. */
  readonly markedPoints: ReadonlySet<number>;
  /** The run whose residuals are drawn at their points; null for none. */
  readonly judged: JudgedRun | null;
  /** Whether parts may be moved and changed here. */
  readonly editable: boolean;
  readonly actions: CanvasActions;
  /** Where the pointer is over the tray, mm; null when it has left. */
  readonly onPointer: (place: Place | null) => void;
}

const NONE: readonly string[] = [];

/** Numbers that a tag shows come from the plan of this very water; a stale plan would show another tray's volts. */
const planForTags = (field: PlannedField | null): Plan | null => (field === null || field.outOfDate ? null : field.plan);

/** The tray on its bench, drawn to scale, with everything that hands and keys can do to it. Takes data and callbacks only. */
export function TrayCanvas(props: TrayCanvasProps) {
  const { setup, selection, field, findings, trayView, shown, closer, editable, actions, judged } = props;
  const theme = useLoadedTheme(props.theme);
  const viewState = useStore(trayView);
  const view = useMemo(() => viewOf(viewState), [viewState]);
  const surface = useRef<HTMLDivElement>(null);
  const { zoom, look, tape, place, cursor, cancel, holdPan, listeners } = usePointer(props, surface);
  const clipboard = useClipboard(props);
  const drop = useDrop(props, surface);
  useEffect(() => trayView.showTray(setup.tray), [trayView, setup.tray]);

  const takeKey = (event: KeyboardEvent): boolean => actOnKey(event, props);
  function onKeyDown(event: KeyboardEvent): void {
    if (!holdPan(event, true) && !(event.key === "Escape" && cancel()) && !takeKey(event)) return;
    event.preventDefault();
    event.stopPropagation();
  }
  function onKeyUp(event: KeyboardEvent): void {
    holdPan(event, false);
    actions.settle();
  }

  const bench = useBenchPaint(setup, view, theme);
  const shownPicture = useShownPicture(field, closer, theme, shown.picture);
  const paints = useFieldPaint(field, setup, view, theme, shown, shownPicture, props.markedPoints);
  const { hovered } = look;
  const emphasis = useMemo(() => ({ selection, hovered, findings }), [selection, hovered, findings]);
  const dragged = look.live === null ? NONE : selection;
  const sheets = usePartsPaint(setup, planForTags(field), view, theme, emphasis, shown.tags, paints.placed, look.gaps, dragged);
  const moving = look.live !== null && look.activeHandle === null;
  const handles = useMemo(
    () => (moving ? [] : shownHandles({ setup, selection, view, editable })),
    [setup, selection, view, editable, moving],
  );
  const { section, pins, pinReadings } = closer;
  const handPaint = useCallback(
    (pen: Pen) => {
      if (judged !== null) paintResiduals(pen, judged, view, theme);
      if (section !== null) paintSection(pen, section, view, theme);
      paintPins(pen, pins, pinReadings, view, theme);
      paintHandles(pen, handles, view, theme, look.activeHandle);
      paintGuides(pen, look.guides, view, theme);
      paintEqualGaps(pen, look.equalGaps, view, theme);
      paintGaps(pen, look.gaps, view, theme);
      if (tape !== null) paintLength(pen, toScreen(view, ...tape.from), toScreen(view, ...tape.to), tapeText(tape), theme);
      if (look.frame !== null) paintFrame(pen, look.frame[0], look.frame[1], theme);
    },
    [handles, view, theme, look.activeHandle, look.frame, look.guides, look.equalGaps, look.gaps, tape, section, pins, pinReadings, judged],
  );
  const attended = useMemo(() => new Set([...selection, ...(look.hovered === null ? [] : [look.hovered])]), [selection, look.hovered]);
  const count = setup.parts.length;

  return (
    <div
      className="tray-canvas"
      data-field={field === null ? "none" : field.outOfDate ? "pale" : "shown"}
      style={themeProperties(theme)}
      {...clipboard}
    >
      <PartsList setup={setup} selection={selection} onSelect={actions.select} onEnter={() => surface.current?.focus()} onKey={takeKey} />
      <div
        ref={surface}
        className={`tray-surface${drop.over ? " dropping" : ""}`}
        role="application"
        aria-label={texts.canvas.tray(count)}
        // biome-ignore lint/a11y/noNoninteractiveTabindex: the keys act here.
        tabIndex={0}
        style={{ cursor }}
        {...listeners}
        onKeyDown={onKeyDown}
        onKeyUp={onKeyUp}
        onBlur={() => actions.settle()}
        {...drop.listeners}
      >
        <Stage width={view.widthPx} height={view.heightPx} listening={false} aria-hidden="true">
          <PaintedLayer name="bench" zoom={zoom} paint={bench} />
          <PaintedLayer name="field" zoom={zoom} paint={paints.field} />
          <PaintedLayer name="parts" zoom={zoom} paint={sheets.parts} />
          <PaintedLayer name="tags" zoom={zoom} paint={sheets.tags} />
          <PaintedLayer name="points" zoom={zoom} paint={paints.points} />
          <PaintedLayer name="hand" zoom={zoom} paint={handPaint} />
        </Stage>
      </div>
      {field !== null && shownPicture !== null && !field.outOfDate && (
        <PictureScale plan={field.plan} shown={shownPicture.values} scale={shownPicture.scale} steps={closer.steps} />
      )}
      {count === 0 && <p className="tray-empty">{texts.canvas.empty}</p>}
      <PartNotes findings={findings} setup={setup} view={view} attended={attended} />
      {look.live !== null && place !== null && (
        <output className="live-number" style={{ transform: `translate(${place[0] + 16}px, ${place[1] + 22}px)` }} aria-hidden="true">
          {look.live}
        </output>
      )}
    </div>
  );
}
