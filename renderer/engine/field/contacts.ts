import type { ScanAxis } from "./crossings";
import { crossPiece, reachAcross } from "./crossings";
import type { Grid } from "./grid";
import type { FieldLayout } from "./layout";
import type { Ownership } from "./ownership";
import { SURFACE_SHARE } from "./ownership";

/** Where a conductor's outline cuts the link from a node to its next neighbour along an axis. */
interface Cut {
  /** First node of the link. */
  readonly node: number;
  /** Share of the link from its first node to the cut, 0 to 1. */
  readonly share: number;
  readonly body: number;
}

/** The links along one axis that conductors cut. */
export interface CutLink {
  readonly node: number;
  /** The cuts in order of their share. */
  readonly cuts: readonly { readonly share: number; readonly body: number }[];
}

function cutsAlong(layout: FieldLayout, grid: Grid, axis: ScanAxis, ownership: Ownership): Cut[] {
  const { columns, rows, pitchXMm, pitchYMm } = grid;
  const isRow = axis === "row";
  const pitch = isRow ? pitchXMm : pitchYMm;
  const acrossPitch = isRow ? pitchYMm : pitchXMm;
  const links = (isRow ? columns : rows) - 1;
  const lines = isRow ? rows : columns;
  const slack = SURFACE_SHARE * acrossPitch;
  const cuts: Cut[] = [];
  layout.conductors.forEach((conductor, body) => {
    const nodeOf = (line: number, place: number): number => (isRow ? line * columns + place : place * columns + line);
    /** A cut this near to a node turns the node into metal, so that no link becomes vanishingly short. */
    const markMetal = (node: number): void => {
      if (ownership.body[node] >= 0) return;
      ownership.body[node] = body;
      ownership.owner[node] = conductor.index;
    };
    for (const loop of conductor.loops) {
      for (const piece of loop) {
        const [low, high] = reachAcross(piece, axis);
        const first = Math.max(0, Math.ceil((low - slack) / acrossPitch));
        const last = Math.min(lines - 1, Math.floor((high + slack) / acrossPitch));
        for (let line = first; line <= last; line++) {
          crossPiece(piece, axis, line * acrossPitch, slack, (position) => {
            const place = position / pitch;
            if (place < -SURFACE_SHARE || place > links + SURFACE_SHARE) return;
            const nearest = Math.round(place);
            if (Math.abs(place - nearest) < SURFACE_SHARE) markMetal(nodeOf(line, Math.min(links, Math.max(0, nearest))));
            const link = Math.min(links - 1, Math.max(0, Math.floor(place)));
            cuts.push({ node: nodeOf(line, link), share: Math.min(1, Math.max(0, place - link)), body });
          });
        }
      }
    }
  });
  return cuts;
}

/**
 * Finds every link that a conductor's outline cuts, exactly where it cuts it; a thin part between two nodes cuts a link
 * twice and so never vanishes. Nodes on a surface are turned into metal in `ownership`.
 * @returns for rows and for columns the cut links, ascending by node.
 */
export function cutLinks(layout: FieldLayout, grid: Grid, ownership: Ownership): Readonly<Record<ScanAxis, readonly CutLink[]>> {
  const grouped = (axis: ScanAxis): CutLink[] => {
    const cuts = cutsAlong(layout, grid, axis, ownership);
    cuts.sort((a, b) => a.node - b.node || a.share - b.share);
    const links: { node: number; cuts: { share: number; body: number }[] }[] = [];
    for (const { node, share, body } of cuts) {
      const newest = links.at(-1);
      if (newest?.node === node) newest.cuts.push({ share, body });
      else links.push({ node, cuts: [{ share, body }] });
    }
    return links;
  };
  return { row: grouped("row"), column: grouped("column") };
}
