import type { Setup, Shape } from "../../../shared-types/setup";
import { texts } from "../../texts/texts";
import { type BoxMm, type BoxOf, type Edit, namesOf, type Placing, placeThings, type Thing, thingsById, tidyDeg, tidyMm } from "../edit";

const words = texts.document.steps;

/** Edits of where things lie and how they are turned. Every `ids` may name parts and slabs alike; lengths in mm, angles in degrees. */

/** @returns the move of things by a distance. `joins` makes a run of moves one step. */
export function moveThings(setup: Setup, ids: readonly string[], byXMm: number, byYMm: number, joins?: string): Edit {
  return {
    name: "move",
    label: words.move(namesOf(setup, ids)),
    apply: (before) =>
      byXMm === 0 && byYMm === 0
        ? before
        : placeThings(before, ids, ({ xMm, yMm }) => ({ xMm: tidyMm(xMm + byXMm), yMm: tidyMm(yMm + byYMm) })),
    ...(joins === undefined ? {} : { joins }),
  };
}

/** @returns one thing set to exact numbers of place and turn; a key that is absent stays. */
export function placeThing(setup: Setup, id: string, place: Omit<Placing, "shape">): Edit {
  const turn = place.turnDeg === undefined ? {} : { turnDeg: tidyDeg(place.turnDeg) };
  return {
    name: "place",
    label: words.place(namesOf(setup, [id])),
    apply: (before) => placeThings(before, [id], () => ({ ...place, ...turn })),
  };
}

/** @returns one thing given another shape or other sizes, and the place where its centre then lies. */
export function resizeThing(setup: Setup, id: string, shape: Shape, centre: { readonly xMm?: number; readonly yMm?: number } = {}): Edit {
  return {
    name: "resize",
    label: words.resize(namesOf(setup, [id])),
    apply: (before) => placeThings(before, [id], () => ({ ...centre, shape })),
  };
}

/** @returns the box round several things, mm; null for none. */
export function boxOfAll(things: readonly Thing[], boxOf: BoxOf): BoxMm | null {
  if (things.length === 0) return null;
  const boxes = things.map(boxOf);
  return [
    Math.min(...boxes.map((box) => box[0])),
    Math.min(...boxes.map((box) => box[1])),
    Math.max(...boxes.map((box) => box[2])),
    Math.max(...boxes.map((box) => box[3])),
  ];
}

/** The point round which things turn or mirror: a single thing's own centre, else the middle of the box round them. */
function pivotOf(things: readonly Thing[], boxOf: BoxOf): readonly [number, number] {
  const [only] = things;
  if (only !== undefined && things.length === 1) return [only.xMm, only.yMm];
  const [left, bottom, right, top] = boxOfAll(things, boxOf) ?? [0, 0, 0, 0];
  return [(left + right) / 2, (bottom + top) / 2];
}

/** @returns the turn of things together, counter-clockwise, round their middle. */
export function turnThings(setup: Setup, ids: readonly string[], byDeg: number, boxOf: BoxOf, joins?: string): Edit {
  return {
    name: "turn",
    label: words.turn(namesOf(setup, ids)),
    apply: (before) => {
      const [px, py] = pivotOf(thingsById(before, ids), boxOf);
      const turn = (byDeg * Math.PI) / 180;
      const [c, s] = [Math.cos(turn), Math.sin(turn)];
      return placeThings(before, ids, ({ xMm, yMm, turnDeg }) => ({
        xMm: tidyMm(px + c * (xMm - px) - s * (yMm - py)),
        yMm: tidyMm(py + s * (xMm - px) + c * (yMm - py)),
        turnDeg: tidyDeg(turnDeg + byDeg),
      }));
    },
    ...(joins === undefined ? {} : { joins }),
  };
}

/** A polygon reflected in its own x axis; all other shapes are their own reflection there. */
const reflected = (shape: Shape): Shape =>
  shape.kind === "polygon" ? { ...shape, pointsMm: shape.pointsMm.map(([x, y]): readonly [number, number] => [x, -y]) } : shape;

/** @returns things swapped left for right, or top for bottom, about the middle of the box round them. */
export function mirrorThings(setup: Setup, ids: readonly string[], swap: "left-right" | "top-bottom", boxOf: BoxOf): Edit {
  return {
    name: "mirror",
    label: words.mirror(namesOf(setup, ids)),
    apply: (before) => {
      const box = boxOfAll(thingsById(before, ids), boxOf);
      if (box === null) return before;
      // A reflection of the tray is a reflection in the shape's own x axis followed by a turn: 180° − turn across, −turn up and down.
      return placeThings(before, ids, ({ xMm, yMm, turnDeg, shape }) =>
        swap === "left-right"
          ? { xMm: tidyMm(box[0] + box[2] - xMm), turnDeg: tidyDeg(180 - turnDeg), shape: reflected(shape) }
          : { yMm: tidyMm(box[1] + box[3] - yMm), turnDeg: tidyDeg(-turnDeg), shape: reflected(shape) },
      );
    },
  };
}

export type AlignTo = "left" | "centre" | "right" | "top" | "middle" | "bottom";

function alignedBy(box: BoxMm, all: BoxMm, to: AlignTo): readonly [number, number] {
  switch (to) {
    case "left":
      return [all[0] - box[0], 0];
    case "right":
      return [all[2] - box[2], 0];
    case "centre":
      return [(all[0] + all[2] - box[0] - box[2]) / 2, 0];
    case "bottom":
      return [0, all[1] - box[1]];
    case "top":
      return [0, all[3] - box[3]];
    case "middle":
      return [0, (all[1] + all[3] - box[1] - box[3]) / 2];
  }
}

/** @returns things brought to one line: an edge or the middle of the box round them. A single thing is aligned with `within`, the tray. */
export function alignThings(setup: Setup, ids: readonly string[], to: AlignTo, boxOf: BoxOf, within: BoxMm): Edit {
  return {
    name: "align",
    label: words.align(namesOf(setup, ids)),
    apply: (before) => {
      const things = thingsById(before, ids);
      const all = things.length === 1 ? within : boxOfAll(things, boxOf);
      if (all === null) return before;
      return placeThings(before, ids, (thing) => {
        const [byX, byY] = alignedBy(boxOf(thing), all, to);
        return { xMm: tidyMm(thing.xMm + byX), yMm: tidyMm(thing.yMm + byY) };
      });
    },
  };
}

/** @returns three or more things with equal clear gaps between them along x or y; the outermost two stay. */
export function distributeThings(setup: Setup, ids: readonly string[], along: "x" | "y", boxOf: BoxOf): Edit {
  const [low, high] = along === "x" ? ([0, 2] as const) : ([1, 3] as const);
  return {
    name: "distribute",
    label: words.distribute(namesOf(setup, ids)),
    apply: (before) => {
      const boxed = thingsById(before, ids).map((thing) => ({ id: thing.id, box: boxOf(thing) }));
      boxed.sort((a, b) => a.box[low] + a.box[high] - b.box[low] - b.box[high]);
      const [first, last] = [boxed[0], boxed.at(-1)];
      if (first === undefined || last === undefined || boxed.length < 3) return before;
      const filled = boxed.reduce((sum, { box }) => sum + box[high] - box[low], 0);
      const gap = (last.box[high] - first.box[low] - filled) / (boxed.length - 1);
      const shifts = new Map<string, number>();
      let next = first.box[low];
      for (const { id, box } of boxed) {
        shifts.set(id, next - box[low]);
        next += box[high] - box[low] + gap;
      }
      return placeThings(before, ids, ({ id, xMm, yMm }) => {
        const by = shifts.get(id) ?? 0;
        return along === "x" ? { xMm: tidyMm(xMm + by) } : { yMm: tidyMm(yMm + by) };
      });
    },
  };
}
