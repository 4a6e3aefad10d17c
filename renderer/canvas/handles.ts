import type { Part, PlacedShape, Shape } from "../../shared-types/setup";
import { degrees, radians } from "../../shared-types/units";
import { tidyDeg, tidyMm } from "../document/edit";
import type { Place } from "./view";

/** Handles of a selected thing, and what dragging one of them makes of it. Pure: places in mm, in and out. */

export type HandleKind =
  | "turn"
  | "length+"
  | "length-"
  | "width+"
  | "width-"
  | "outer"
  | "inner"
  | "sweep+"
  | "sweep-"
  | "wall"
  | `corner ${number}`;

export interface Handle {
  readonly kind: HandleKind;
  /** The place on the part that it moves. */
  readonly xMm: number;
  readonly yMm: number;
  /** Where it is shown: a little off the part, so that a narrow part can still be taken by its middle. */
  readonly shownXMm: number;
  readonly shownYMm: number;
  /** Direction in which it moves, degrees on the tray; for the pointer's picture. */
  readonly alongDeg: number;
}

/** Room between a part and its turning handle, px. */
const STEM_PX = 30;
/** A size's handle stands off the edge by this, px. */
const STAND_OFF_PX = 10;
/** A part that looks smaller than this shows no handles for its size, px: zoom in first. */
const SMALLEST_SHOWN_PX = 24;
/** An outline with more corners than this shows none of them: exact numbers serve better. */
const MOST_CORNERS = 60;
/** Smallest size that a handle makes, mm. */
const SMALLEST_MM = 0.5;

/** @returns a place on the tray for one in the part's own axes, mm. */
function outward({ xMm, yMm, turnDeg }: PlacedShape, x: number, y: number): Place {
  const turn = radians(turnDeg);
  return [xMm + x * Math.cos(turn) - y * Math.sin(turn), yMm + x * Math.sin(turn) + y * Math.cos(turn)];
}

/** @returns a place in the part's own axes for one on the tray, mm. */
function inward({ xMm, yMm, turnDeg }: PlacedShape, [px, py]: Place): Place {
  const turn = radians(turnDeg);
  const [dx, dy] = [px - xMm, py - yMm];
  return [dx * Math.cos(turn) + dy * Math.sin(turn), dy * Math.cos(turn) - dx * Math.sin(turn)];
}

type OwnHandle = readonly [kind: HandleKind, x: number, y: number, alongDeg: number];

const round = (outerMm: number, kind: HandleKind): readonly OwnHandle[] => [
  [kind, outerMm / 2, 0, 0],
  [kind, -outerMm / 2, 0, 180],
];

function sizeHandles(shape: Shape): readonly OwnHandle[] {
  switch (shape.kind) {
    case "bar":
    case "frame": {
      const sides: OwnHandle[] = [
        ["length+", shape.lengthMm / 2, 0, 0],
        ["length-", -shape.lengthMm / 2, 0, 180],
        ["width+", 0, shape.widthMm / 2, 90],
        ["width-", 0, -shape.widthMm / 2, 270],
      ];
      const wall: OwnHandle[] =
        shape.kind === "frame" ? [["wall", shape.lengthMm / 2 - shape.wallMm, shape.widthMm / 2 - shape.wallMm, 225]] : [];
      return [...sides, ...wall];
    }
    case "disc":
      return round(shape.diameterMm, "outer");
    case "ring":
      return [...round(shape.outerMm, "outer"), ["inner", 0, shape.innerMm / 2, 270], ["inner", 0, -shape.innerMm / 2, 90]];
    case "arc": {
      const half = shape.sweepDeg / 2;
      const middle = (shape.outerMm + shape.innerMm) / 4;
      const end = (sign: 1 | -1): OwnHandle => [
        sign === 1 ? "sweep+" : "sweep-",
        middle * Math.cos(radians(half)),
        sign * middle * Math.sin(radians(half)),
        sign * (half + 90),
      ];
      return [["outer", shape.outerMm / 2, 0, 0], ["inner", shape.innerMm / 2, 0, 180], end(1), end(-1)];
    }
    case "polygon":
      return shape.pointsMm.length > MOST_CORNERS
        ? []
        : shape.pointsMm.map(([x, y], index): OwnHandle => [`corner ${index}`, x, y, degrees(Math.atan2(y, x))]);
  }
}

/** How far a shape reaches along its own y axis, mm. */
function reachUpMm(shape: Shape): number {
  switch (shape.kind) {
    case "bar":
    case "frame":
      return shape.widthMm / 2;
    case "disc":
      return shape.diameterMm / 2;
    case "ring":
      return shape.outerMm / 2;
    case "arc":
      return (shape.outerMm / 2) * (shape.sweepDeg >= 180 ? 1 : Math.sin(radians(shape.sweepDeg / 2)));
    case "polygon":
      return Math.max(...shape.pointsMm.map(([, y]) => y));
  }
}

/** The longest extent of a shape, mm. */
function extentMm(shape: Shape): number {
  switch (shape.kind) {
    case "bar":
    case "frame":
      return Math.max(shape.lengthMm, shape.widthMm);
    case "disc":
      return shape.diameterMm;
    case "ring":
    case "arc":
      return shape.outerMm;
    case "polygon":
      return 2 * Math.max(...shape.pointsMm.map(([x, y]) => Math.hypot(x, y)));
  }
}

/** @returns the handles of a thing at a zoom: one that turns it (a disc and a ring need none) and those of its sizes. */
export function handlesOf(thing: PlacedShape, pixelsPerMm: number): readonly Handle[] {
  const { shape } = thing;
  const turns = shape.kind !== "disc" && shape.kind !== "ring";
  const turning: readonly OwnHandle[] = turns ? [["turn", 0, reachUpMm(shape) + STEM_PX / pixelsPerMm, 0]] : [];
  const sizes = extentMm(shape) * pixelsPerMm < SMALLEST_SHOWN_PX ? [] : sizeHandles(shape);
  return [...turning, ...sizes].map(([kind, x, y, alongDeg]) => {
    const [xMm, yMm] = outward(thing, x, y);
    const offMm = kind === "turn" ? 0 : STAND_OFF_PX / pixelsPerMm;
    const [shownXMm, shownYMm] = outward(thing, x + offMm * Math.cos(radians(alongDeg)), y + offMm * Math.sin(radians(alongDeg)));
    return { kind, xMm, yMm, shownXMm, shownYMm, alongDeg: tidyDeg(alongDeg + thing.turnDeg) };
  });
}

/** How the hand asks for a size: to which step it snaps (0: not), and whether the middle stays where it is. */
export interface HandleDrag {
  readonly stepMm: number;
  readonly stepDeg: number;
  readonly aboutMiddle: boolean;
}

export type Placed = Pick<Part, "xMm" | "yMm" | "turnDeg" | "shape">;

const snapped = (value: number, step: number): number => (step === 0 ? tidyMm(value) : Math.round(value / step) * step);
const sized = (value: number, step: number): number => Math.max(step === 0 ? SMALLEST_MM : step, snapped(value, step));

/** One side of a bar or frame pulled to `reach` from the middle, in the part's own axes; the far side stays unless `aboutMiddle`. */
function pulledSide(thing: PlacedShape, kind: HandleKind, own: Place, drag: HandleDrag, leastMm: number): Placed {
  const { shape } = thing;
  if (shape.kind !== "bar" && shape.kind !== "frame") return thing;
  const key = kind.startsWith("length") ? "lengthMm" : "widthMm";
  const sign = kind.endsWith("+") ? 1 : -1;
  const reach = sign * (key === "lengthMm" ? own[0] : own[1]);
  const before = shape[key];
  const now = Math.max(leastMm, sized(drag.aboutMiddle ? 2 * reach : reach + before / 2, drag.stepMm));
  const shift = drag.aboutMiddle ? 0 : (sign * (now - before)) / 2;
  const [xMm, yMm] = key === "lengthMm" ? outward(thing, shift, 0) : outward(thing, 0, shift);
  return { ...thing, xMm: tidyMm(xMm), yMm: tidyMm(yMm), shape: { ...shape, [key]: now } };
}

function pulledRadius(shape: Shape, kind: "outer" | "inner", radiusMm: number, stepMm: number): Shape {
  const diameter = sized(2 * radiusMm, stepMm);
  const leastWall = Math.max(SMALLEST_MM, stepMm);
  if (shape.kind === "disc") return { ...shape, diameterMm: diameter };
  if (shape.kind !== "ring" && shape.kind !== "arc") return shape;
  return kind === "outer"
    ? { ...shape, outerMm: Math.max(diameter, shape.innerMm + leastWall) }
    : { ...shape, innerMm: Math.max(SMALLEST_MM, Math.min(diameter, shape.outerMm - leastWall)) };
}

/**
 * What a thing becomes when one of its handles is dragged.
 * @param thing as it was when the drag began.
 * @param at where the hand is now, mm on the tray.
 * @returns its place, turn and shape.
 */
export function draggedHandle(thing: PlacedShape, kind: HandleKind, at: Place, drag: HandleDrag): Placed {
  const { shape } = thing;
  const own = inward(thing, at);
  if (kind === "turn") {
    const turn = degrees(Math.atan2(at[1] - thing.yMm, at[0] - thing.xMm)) - 90;
    return { ...thing, turnDeg: tidyDeg(snapped(turn, drag.stepDeg)) };
  }
  if (kind === "outer" || kind === "inner") return { ...thing, shape: pulledRadius(shape, kind, Math.hypot(...own), drag.stepMm) };
  if ((kind === "sweep+" || kind === "sweep-") && shape.kind === "arc") {
    const angle = degrees(Math.atan2(own[1], own[0])) * (kind === "sweep+" ? 1 : -1);
    const sweep = snapped(2 * (angle < 0 ? angle + 360 : angle), drag.stepDeg);
    return { ...thing, shape: { ...shape, sweepDeg: Math.min(359, Math.max(1, sweep)) } };
  }
  if (kind === "wall" && shape.kind === "frame") {
    const most = Math.min(shape.lengthMm, shape.widthMm) / 2 - SMALLEST_MM;
    const wall = sized(Math.min(shape.lengthMm / 2 - own[0], shape.widthMm / 2 - own[1]), drag.stepMm);
    return { ...thing, shape: { ...shape, wallMm: Math.min(most, wall) } };
  }
  if (kind.startsWith("corner") && shape.kind === "polygon") {
    const moved = Number(kind.slice("corner ".length));
    const corner: Place = [snapped(own[0], drag.stepMm), snapped(own[1], drag.stepMm)];
    return { ...thing, shape: { ...shape, pointsMm: shape.pointsMm.map((point, index) => (index === moved ? corner : point)) } };
  }
  const leastMm = shape.kind === "frame" ? 2 * shape.wallMm + SMALLEST_MM : 0;
  return pulledSide(thing, kind, own, drag, leastMm);
}
