import type { FieldPicture } from "../../../shared-types/plan";
import { STRETCHES, STRETCHES_JOINED } from "./marching-cases";

/** A side between two neighbouring nodes is named by one number: 2·node towards +x from a node, 2·node + 1 towards +y. */
export type Side = number;

/** Rank of nodes where there is neither water nor metal. */
const NOTHING = 255;

/** For each node how many levels its potential exceeds; NOTHING where there is none. */
function ranksOf(volts: Float32Array, levels: Float64Array): Uint8Array {
  const ranks = new Uint8Array(volts.length);
  let rank = 0;
  for (let node = 0; node < volts.length; node++) {
    const value = volts[node];
    if (Number.isNaN(value)) {
      ranks[node] = NOTHING;
      continue;
    }
    // Neighbours differ little, so that the search begins at the last node's rank.
    while (rank < levels.length && value > levels[rank]) rank++;
    while (rank > 0 && value <= levels[rank - 1]) rank--;
    ranks[node] = rank;
  }
  return ranks;
}

/**
 * The stretches of every level's line in the cells of a picture, by marching squares. A cell with a corner in an
 * insulator, on a dry bed or outside the tray holds none. Where metal or the water that it encloses sits at the level
 * itself (within `plateauVolts`), there is an area and no line: the line ends there.
 * @param levels ascending, at most 254.
 * @returns for each level pairs of sides: where a stretch begins and ends, the higher potential on its left.
 */
export function stretchesOf(picture: FieldPicture, levels: Float64Array, plateauVolts: number): readonly Side[][] {
  const { columns, rows, volts, owner } = picture;
  const ranks = ranksOf(volts, levels);
  const stretches = Array.from(levels, (): Side[] => []);
  const flat = (node: number, level: number): boolean => Math.abs(volts[node] - level) <= plateauVolts;
  for (let row = 0; row + 1 < rows; row++) {
    for (let column = 0; column + 1 < columns; column++) {
      const a = row * columns + column;
      const b = a + 1;
      const c = b + columns;
      const d = a + columns;
      const ra = ranks[a];
      const rb = ranks[b];
      const rc = ranks[c];
      const rd = ranks[d];
      if (ra === rb && rb === rc && rc === rd) continue;
      const highest = Math.max(ra, rb, rc, rd);
      if (highest === NOTHING) continue;
      const sides = [2 * a, 2 * b + 1, 2 * d, 2 * a + 1];
      for (let k = Math.min(ra, rb, rc, rd); k < highest; k++) {
        const level = levels[k];
        const corners = [a, b, c, d];
        if (corners.some((node) => owner[node] >= 0 && flat(node, level)) || corners.every((node) => flat(node, level))) continue;
        const which = (ra > k ? 1 : 0) | (rb > k ? 2 : 0) | (rc > k ? 4 : 0) | (rd > k ? 8 : 0);
        const joined = (which === 5 || which === 10) && (volts[a] + volts[b] + volts[c] + volts[d]) / 4 > level;
        for (const side of joined ? STRETCHES_JOINED[which] : STRETCHES[which]) stretches[k].push(sides[side]);
      }
    }
  }
  return stretches;
}

/** A run of sides that a line crosses one after the other; a closed run does not repeat its first side. */
export interface SideRun {
  readonly sides: readonly Side[];
  readonly closed: boolean;
}

/**
 * Joins the stretches of one level to the longest possible runs.
 * @param passable whether a line can cross a side; stretches that touch another side are left out.
 */
export function runsOf(stretches: readonly Side[], passable: (side: Side) => boolean): readonly SideRun[] {
  const next = new Map<Side, Side>();
  const arrived = new Set<Side>();
  for (let index = 0; index < stretches.length; index += 2) {
    if (!passable(stretches[index]) || !passable(stretches[index + 1])) continue;
    next.set(stretches[index], stretches[index + 1]);
    arrived.add(stretches[index + 1]);
  }
  const runs: SideRun[] = [];
  const follow = (start: Side): void => {
    const sides = [start];
    for (let side = next.get(start); side !== undefined && side !== start; side = next.get(side)) sides.push(side);
    const closed = next.get(sides[sides.length - 1]) === start;
    for (const side of sides) next.delete(side);
    runs.push({ sides, closed });
  };
  for (const start of [...next.keys()]) if (!arrived.has(start)) follow(start);
  // What is left has no beginning.
  for (const start of [...next.keys()]) if (next.has(start)) follow(start);
  return runs;
}
