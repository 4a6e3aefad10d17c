/**
 * Marching squares by table (W. E. Lorensen and H. E. Cline, SIGGRAPH 1987, in two dimensions).
 * A cell's corners are numbered 0 lower left, 1 lower right, 2 upper right, 3 upper left; bit n of a case is set where
 * corner n lies above the level. Sides: the four names below. Each pair in a case is a stretch of line from one side to
 * another with the higher potential on its left.
 */
export const SOUTH = 0;
export const EAST = 1;
export const NORTH = 2;
export const WEST = 3;

type Stretches = readonly number[];

export const STRETCHES: readonly Stretches[] = [
  [],
  [SOUTH, WEST],
  [EAST, SOUTH],
  [EAST, WEST],
  [NORTH, EAST],
  [SOUTH, WEST, NORTH, EAST],
  [NORTH, SOUTH],
  [NORTH, WEST],
  [WEST, NORTH],
  [SOUTH, NORTH],
  [EAST, SOUTH, WEST, NORTH],
  [EAST, NORTH],
  [WEST, EAST],
  [SOUTH, EAST],
  [WEST, SOUTH],
  [],
];

/** Cases 5 and 10, with high corners across from each other, when the middle of the cell is high as well. */
export const STRETCHES_JOINED: Readonly<Record<number, Stretches>> = {
  5: [SOUTH, EAST, NORTH, WEST],
  10: [WEST, SOUTH, EAST, NORTH],
};
