import type { Point } from "./page";

/** Axis-parallel boxes [left, bottom, right, top] that nothing else may cover. */
export type Box = readonly [number, number, number, number];

const meets = (a: Box, b: Box): boolean => a[0] < b[2] && b[0] < a[2] && a[1] < b[3] && b[1] < a[3];

/** Directions in which a label is tried beside its point, the plainest first. */
const SIDES: readonly Point[] = [
  [1, 0],
  [-1, 0],
  [0, 1],
  [0, -1],
  [1, 1],
  [-1, 1],
  [1, -1],
  [-1, -1],
];

/** Keeps track of what is taken, and finds room for labels beside points. */
export interface LabelPlaces {
  readonly take: (box: Box) => void;
  /**
   * @returns the middle of a label of this size beside a point, in free room if there is any: first close by, then farther
   * off (`far` says so, and a leader line is due).
   */
  readonly beside: (at: Point, width: number, height: number, gap: number) => { readonly middle: Point; readonly far: boolean };
}

/** @returns an empty record of places within an area. */
export function labelPlaces(area: Box): LabelPlaces {
  const taken: Box[] = [];
  const boxAt = ([x, y]: Point, width: number, height: number): Box => [x - width / 2, y - height / 2, x + width / 2, y + height / 2];
  const isFree = (box: Box): boolean =>
    box[0] >= area[0] && box[1] >= area[1] && box[2] <= area[2] && box[3] <= area[3] && !taken.some((other) => meets(box, other));
  return {
    take: (box) => {
      taken.push(box);
    },
    beside: ([x, y], width, height, gap) => {
      for (const factor of [1, 2.2, 3.6, 5]) {
        for (const [dx, dy] of SIDES) {
          const middle: Point = [x + dx * (gap * factor + width / 2), y + dy * (gap * factor + height / 2)];
          const box = boxAt(middle, width, height);
          if (!isFree(box)) continue;
          taken.push(box);
          return { middle, far: factor > 1 };
        }
      }
      const middle: Point = [x + gap + width / 2, y];
      taken.push(boxAt(middle, width, height));
      return { middle, far: false };
    },
  };
}
