import type { Place } from "./rounded-place";

/** Places that are taken, found by neighbourhood: plans of thousands of points stay quick. */
export interface TakenPlaces {
  readonly add: (place: Place) => void;
  /** @returns whether a taken place is nearer than `withinMm`; at most the cell size given at the start. */
  readonly anyWithin: (place: Place, withinMm: number) => boolean;
}

/** Rounding of distances must not decide. */
const SLACK_MM = 1e-9;

/** @param cellMm the largest distance that will be asked about. */
export function takenPlaces(cellMm: number): TakenPlaces {
  const cells = new Map<string, Place[]>();
  return {
    add: (place) => {
      const key = `${Math.floor(place[0] / cellMm)} ${Math.floor(place[1] / cellMm)}`;
      const cell = cells.get(key);
      if (cell === undefined) cells.set(key, [place]);
      else cell.push(place);
    },
    anyWithin: ([x, y], withinMm) => {
      if (cells.size === 0) return false;
      const column = Math.floor(x / cellMm);
      const row = Math.floor(y / cellMm);
      for (let i = column - 1; i <= column + 1; i++) {
        for (let j = row - 1; j <= row + 1; j++) {
          for (const [px, py] of cells.get(`${i} ${j}`) ?? []) if (Math.hypot(px - x, py - y) < withinMm - SLACK_MM) return true;
        }
      }
      return false;
    },
  };
}
