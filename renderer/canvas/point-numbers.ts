import type { ProbePoint } from "../../shared-types/plan";
import { toScreen, type View } from "./view";

/** A probe point on the stage (px), and the box of its number beside the ring; null where the crowd leaves no room for it. */
export interface PlacedPoint {
  readonly point: ProbePoint;
  readonly x: number;
  readonly y: number;
  readonly number: PixelBox | null;
}

/** Left, top, right, bottom, px. */
export type PixelBox = readonly [number, number, number, number];

/** Radius of a point's ring, px. */
export const RING_PX = 5;
const NUMBER_HEIGHT_PX = 12;
const GAP_PX = 2;
/** Sides on which a number may stand, the most readable first: x and y of its middle in half widths and half heights. */
const SIDES: readonly (readonly [number, number])[] = [
  [1, -1],
  [1, 1],
  [-1, -1],
  [-1, 1],
  [1, 0],
  [-1, 0],
  [0, -1],
  [0, 1],
];

export const boxesMeet = (a: PixelBox, b: PixelBox): boolean => a[0] < b[2] && b[0] < a[2] && a[1] < b[3] && b[1] < a[3];

/** @returns whether a disc (px) touches a box. */
export const discMeetsBox = (x: number, y: number, radius: number, box: PixelBox): boolean =>
  Math.hypot(Math.max(box[0] - x, 0, x - box[2]), Math.max(box[1] - y, 0, y - box[3])) < radius;

const SQUARE_PX = 48;
/** More squares than any stage is high. */
const SQUARES_UP = 65_536;

/** Boxes that are taken, sorted into squares of the stage, so that neighbours are found without asking all. */
export interface Crowd {
  readonly add: (box: PixelBox) => void;
  readonly meets: (box: PixelBox) => boolean;
}

/** @returns a crowd without boxes. */
export function createCrowd(): Crowd {
  const squares = new Map<number, PixelBox[]>();
  /** The numbers of the squares that a box touches. */
  function squaresOf(box: PixelBox): number[] {
    const touched: number[] = [];
    for (let x = Math.floor(box[0] / SQUARE_PX); x <= Math.floor(box[2] / SQUARE_PX); x++) {
      for (let y = Math.floor(box[1] / SQUARE_PX); y <= Math.floor(box[3] / SQUARE_PX); y++) touched.push(x * SQUARES_UP + y);
    }
    return touched;
  }
  return {
    add: (box) => {
      for (const square of squaresOf(box)) {
        const held = squares.get(square);
        if (held === undefined) squares.set(square, [box]);
        else held.push(box);
      }
    },
    meets: (box) => squaresOf(box).some((square) => squares.get(square)?.some((other) => boxesMeet(box, other)) ?? false),
  };
}

/**
 * Finds a place for each point's number: beside its ring, clear of all rings and of the numbers before it.
 * @param widthOf how wide a text is, px.
 */
export function placeNumbers(points: readonly ProbePoint[], view: View, widthOf: (text: string) => number): readonly PlacedPoint[] {
  const crowd = createCrowd();
  const placed = points.map((point) => {
    const [x, y] = toScreen(view, point.xMm, point.yMm);
    crowd.add([x - RING_PX, y - RING_PX, x + RING_PX, y + RING_PX]);
    return { point, x, y };
  });
  return placed.map(({ point, x, y }) => {
    const halfWidth = widthOf(String(point.n)) / 2;
    const halfHeight = NUMBER_HEIGHT_PX / 2;
    for (const [sideX, sideY] of SIDES) {
      const straight = sideX === 0 || sideY === 0;
      const off = straight ? RING_PX + GAP_PX : RING_PX * 0.7 + GAP_PX / 2;
      const [middleX, middleY] = [x + sideX * (off + halfWidth), y + sideY * (straight ? off + halfHeight : off + halfHeight / 2)];
      const box: PixelBox = [middleX - halfWidth, middleY - halfHeight, middleX + halfWidth, middleY + halfHeight];
      if (crowd.meets(box)) continue;
      crowd.add(box);
      return { point, x, y, number: box };
    }
    return { point, x, y, number: null };
  });
}
