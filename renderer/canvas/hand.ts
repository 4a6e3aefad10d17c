import type { Setup } from "../../shared-types/setup";
import { boxOfAll, moveThings, placeThing, resizeThing } from "../document/commands/placing";
import type { Document } from "../document/document";
import { type BoxMm, isPart, namesOf, type Thing, thingById, thingsById, thingsOf, tidyMm } from "../document/edit";
import { LOCKED, toggled } from "../document/holding";
import { sizeText, trimmed } from "../document/number-text";
import { traySizeMm } from "../engine/geometry/tray-outline";
import { texts } from "../texts/texts";
import { type Gap, gapsAround } from "./gaps";
import { type EqualGap, type Guide, snappedMove } from "./guides";
import { draggedHandle, type Handle, handlesOf, type Placed } from "./handles";
import { boxOfThing, handleAt, thingAt, thingsWithin } from "./hit";
import { type Place, toTray, type View } from "./view";

const { steps } = texts.document;
const words = texts.canvas.hand;

/** What the pointer does on the tray: select, frame, move, turn, resize, pan. No DOM: places in px of the stage come in, edits go out. */

/** The part of the document that a hand and a key use. */
export type CanvasActions = Pick<Document, "run" | "startDrag" | "dragTo" | "finishDrag" | "cancelDrag" | "settle" | "select" | "refuse">;

/** What the hand looks at; asked afresh at every event. */
export interface HandWorld {
  readonly setup: Setup;
  readonly selection: readonly string[];
  readonly snapping: boolean;
  readonly view: View;
  /** Whether parts may be picked up; else the hand only selects and pans. */
  readonly editable: boolean;
  readonly actions: CanvasActions;
  readonly panBy: (xPx: number, yPx: number) => void;
}

export interface Modifiers {
  /** Adds to the selection; keeps to one axis while moving; keeps the middle while resizing. */
  readonly shift: boolean;
  /** Places finely: no snapping while it is held. */
  readonly fine: boolean;
  /** The pointer pans. */
  readonly pan: boolean;
}

/** What the screen shows of the hand. */
export interface HandLook {
  readonly hovered: string | null;
  readonly cursor: "default" | "grab" | "grabbing" | "move" | "ew-resize" | "ns-resize" | "nesw-resize" | "nwse-resize" | "crosshair";
  /** The frame being pulled up, between two places of the stage (px). */
  readonly frame: readonly [Place, Place] | null;
  readonly activeHandle: Handle["kind"] | null;
  /** Lines that a moved part has snapped to. */
  readonly guides: readonly Guide[];
  /** Gaps of a row that are equal now. */
  readonly equalGaps: readonly EqualGap[];
  /** Clear gaps round a moved part. */
  readonly gaps: readonly Gap[];
  /** The number that changes under the hand, such as "45°". */
  readonly live: string | null;
}

export interface Hand {
  readonly press: (at: Place, modifiers: Modifiers) => void;
  readonly move: (at: Place, modifiers: Modifiers) => void;
  readonly release: (at: Place, modifiers: Modifiers) => void;
  /** Calls off whatever is under way and puts it back. @returns whether there was anything. */
  readonly cancel: () => boolean;
  readonly leave: () => void;
}

export const IDLE: HandLook = {
  hovered: null,
  cursor: "default",
  frame: null,
  activeHandle: null,
  guides: [],
  equalGaps: [],
  gaps: [],
  live: null,
};

/** A press that strays less is a click, px. */
const CLICK_PX = 3;
/** A thin wire is caught within this, px. */
const REACH_PX = 6;
const GRID_MM = 1;
/** With snapping off, a hand still places no finer than it can see. */
const FREE_MM = 0.1;
/** An edge or a middle draws a part to itself from so far away: never so far that the next millimetre cannot be had. */
const LINE_REACH_PX = 4;
const LINE_REACH_MM = 0.9;
const GRID_DEG = 5;
const FREE_DEG = 0.1;

type Doing =
  | { readonly kind: "nothing" }
  | { readonly kind: "pressed"; readonly at: Place; readonly thing: Thing; readonly wasSelected: boolean }
  | { readonly kind: "moving"; readonly from: Place; readonly lead: Thing; readonly ids: readonly string[]; readonly before: Setup }
  | { readonly kind: "handling"; readonly handle: Handle; readonly thing: Thing; readonly off: Place; readonly before: Setup }
  | { readonly kind: "framing"; readonly from: Place; readonly kept: readonly string[] }
  | { readonly kind: "panning"; readonly last: Place };

const trayBox = ({ tray }: Setup): BoxMm => [0, 0, ...traySizeMm(tray)];

const RESIZE_CURSORS = ["ew-resize", "nesw-resize", "ns-resize", "nwse-resize"] as const;

/** The pointer's picture over a handle: along the direction in which it moves. */
function cursorOf(handle: Handle): HandLook["cursor"] {
  if (handle.kind === "turn") return "grab";
  if (handle.kind.startsWith("corner")) return "move";
  return RESIZE_CURSORS[Math.round(handle.alongDeg / 45) % 4] ?? "ew-resize";
}

/** @returns the handles on show: those of a single selected thing. */
export function shownHandles({
  setup,
  selection,
  view,
  editable,
}: Pick<HandWorld, "setup" | "selection" | "view" | "editable">): readonly Handle[] {
  const [only] = selection;
  const thing = only === undefined || selection.length > 1 || !editable ? undefined : thingById(setup, only);
  return thing === undefined || thing.locked === true ? [] : handlesOf(thing, view.scale);
}

/**
 * @param world gives what the hand looks at now.
 * @param show takes what the screen should show of it.
 */
export function createHand(world: () => HandWorld, show: (look: HandLook) => void): Hand {
  let doing: Doing = { kind: "nothing" };

  const onTray = (at: Place): Place => toTray(world().view, ...at);
  const under = (at: Place): Thing | null => thingAt(world().setup, onTray(at), REACH_PX / world().view.scale);
  const snaps = ({ fine }: Modifiers): boolean => world().snapping && !fine;

  function press(at: Place, modifiers: Modifiers): void {
    const { setup, selection, actions, view } = world();
    if (modifiers.pan) {
      doing = { kind: "panning", last: at };
      show({ ...IDLE, cursor: "grabbing" });
      return;
    }
    const handle = handleAt(shownHandles(world()), view, at);
    const [only] = selection;
    const handled = handle === null || only === undefined ? undefined : thingById(setup, only);
    if (handle !== null && handled !== undefined) {
      const [x, y] = onTray(at);
      doing = { kind: "handling", handle, thing: handled, off: [handle.xMm - x, handle.yMm - y], before: setup };
      actions.startDrag((handle.kind === "turn" ? steps.turn : steps.resize)(namesOf(setup, [handled.id])));
      show({ ...IDLE, cursor: handle.kind === "turn" ? "grabbing" : cursorOf(handle), activeHandle: handle.kind });
      return;
    }
    const thing = under(at);
    if (thing === null) {
      doing = { kind: "framing", from: at, kept: modifiers.shift ? selection : [] };
      if (!modifiers.shift) actions.select([]);
      return;
    }
    const wasSelected = selection.includes(thing.id);
    if (modifiers.shift) actions.select(toggled(setup, selection, thing.id));
    else if (!wasSelected) actions.select([thing.id]);
    doing = { kind: "pressed", at, thing, wasSelected };
  }

  function lookAt(at: Place, modifiers: Modifiers): HandLook {
    if (modifiers.pan) return { ...IDLE, cursor: "grab" };
    const handle = handleAt(shownHandles(world()), world().view, at);
    if (handle !== null) return { ...IDLE, cursor: cursorOf(handle) };
    const thing = under(at);
    return thing === null ? IDLE : { ...IDLE, hovered: thing.id, cursor: world().editable && thing.locked !== true ? "move" : "default" };
  }

  function hover(at: Place, modifiers: Modifiers): void {
    show(lookAt(at, modifiers));
  }

  function moveOn(at: Place, { from, lead, ids, before }: Extract<Doing, { kind: "moving" }>, modifiers: Modifiers): void {
    const { actions, view } = world();
    const [fromX, fromY] = onTray(from);
    const [x, y] = onTray(at);
    const step = snaps(modifiers) ? GRID_MM : FREE_MM;
    const alongX = Math.abs(x - fromX) >= Math.abs(y - fromY);
    const shift: Place = [modifiers.shift && !alongX ? 0 : x - fromX, modifiers.shift && alongX ? 0 : y - fromY];
    const start = boxOfAll(thingsById(before, ids), boxOfThing) ?? boxOfThing(lead);
    const others = thingsOf(before).filter(({ id }) => !ids.includes(id));
    const reach = snaps(modifiers) ? Math.min(LINE_REACH_MM, LINE_REACH_PX / view.scale) : -1;
    const snapped = snappedMove(start, [lead.xMm, lead.yMm], shift, others.map(boxOfThing), trayBox(before), step, reach);
    const [byX, byY] = [
      shift[0] === 0 && modifiers.shift ? 0 : tidyMm(snapped.byXMm),
      shift[1] === 0 && modifiers.shift ? 0 : tidyMm(snapped.byYMm),
    ];
    const moved = actions.dragTo(moveThings(before, ids, byX, byY));
    if (!moved.ok && moved.problems.some(({ where }) => where === LOCKED)) {
      show({ ...IDLE, live: texts.canvas.hand.locked });
      return;
    }
    const alone = ids.length === 1 && moved.ok ? thingById(moved.value, lead.id) : undefined;
    const { equalGaps } = snapped;
    const gaps = (alone === undefined || !isPart(alone) ? [] : gapsAround(alone, before)).filter(
      // An equal gap says its millimetres itself.
      ({ gapMm }) => !equalGaps.some(({ fromMm, toMm }) => Math.abs(toMm - fromMm - gapMm) < 0.02),
    );
    const live =
      ids.length === 1 ? words.place(trimmed(lead.xMm + byX, 2), trimmed(lead.yMm + byY, 2)) : words.by(trimmed(byX, 2), trimmed(byY, 2));
    show({ ...IDLE, cursor: "move", live, guides: reach < 0 ? [] : snapped.guides, equalGaps, gaps });
  }

  function handleOn(at: Place, { handle, thing, off, before }: Extract<Doing, { kind: "handling" }>, modifiers: Modifiers): void {
    const { actions } = world();
    const [x, y] = onTray(at);
    const drag = {
      stepMm: snaps(modifiers) ? GRID_MM : FREE_MM,
      stepDeg: snaps(modifiers) ? GRID_DEG : FREE_DEG,
      aboutMiddle: modifiers.shift,
    };
    const now: Placed = draggedHandle(thing, handle.kind, [x + off[0], y + off[1]], drag);
    const turning = handle.kind === "turn";
    actions.dragTo(
      turning
        ? { ...placeThing(before, thing.id, { turnDeg: now.turnDeg }), label: steps.turn(namesOf(before, [thing.id])) }
        : resizeThing(before, thing.id, now.shape, { xMm: now.xMm, yMm: now.yMm }),
    );
    const live = turning ? words.angle(trimmed(now.turnDeg, 2)) : sizeText(now.shape);
    show({ ...IDLE, cursor: turning ? "grabbing" : cursorOf(handle), activeHandle: handle.kind, live });
  }

  function frameOn(at: Place, { from, kept }: Extract<Doing, { kind: "framing" }>): void {
    const { setup, actions } = world();
    const [x0, y0] = onTray(from);
    const [x1, y1] = onTray(at);
    const box: BoxMm = [Math.min(x0, x1), Math.min(y0, y1), Math.max(x0, x1), Math.max(y0, y1)];
    actions.select([...kept, ...thingsWithin(setup, box)]);
    show({ ...IDLE, cursor: "crosshair", frame: [from, at] });
  }

  function move(at: Place, modifiers: Modifiers): void {
    const { actions, setup, selection, editable, panBy } = world();
    switch (doing.kind) {
      case "nothing":
        hover(at, modifiers);
        break;
      case "pressed": {
        const { at: from, thing } = doing;
        if (!editable || Math.hypot(at[0] - from[0], at[1] - from[1]) < CLICK_PX) return;
        const ids = selection.includes(thing.id) ? selection : [thing.id];
        doing = { kind: "moving", from, lead: thing, ids, before: setup };
        actions.startDrag(steps.move(namesOf(setup, ids)));
        moveOn(at, doing, modifiers);
        break;
      }
      case "moving":
        moveOn(at, doing, modifiers);
        break;
      case "handling":
        handleOn(at, doing, modifiers);
        break;
      case "framing":
        frameOn(at, doing);
        break;
      case "panning":
        panBy(at[0] - doing.last[0], at[1] - doing.last[1]);
        doing = { kind: "panning", last: at };
    }
  }

  function release(at: Place, modifiers: Modifiers): void {
    const { actions } = world();
    if (doing.kind === "moving" || doing.kind === "handling") actions.finishDrag();
    // A plain click on one of several selected things picks it out.
    if (doing.kind === "pressed" && doing.wasSelected && !modifiers.shift) actions.select([doing.thing.id]);
    doing = { kind: "nothing" };
    hover(at, modifiers);
  }

  function cancel(): boolean {
    if (doing.kind === "nothing") return false;
    if (doing.kind === "moving" || doing.kind === "handling") world().actions.cancelDrag();
    doing = { kind: "nothing" };
    show(IDLE);
    return true;
  }

  return {
    press,
    move,
    release,
    cancel,
    leave: () => {
      if (doing.kind === "nothing") show(IDLE);
    },
  };
}
