import type { Setup } from "../../../shared-types/setup";
import { radians } from "../../../shared-types/units";
import { type Loop, type Piece, pointAlong } from "../geometry/outline";
import { covers, distanceToOutline } from "../geometry/signed-distance";
import { depthFromWallMm, traySizeMm } from "../geometry/tray-outline";
import { crossingsBetween, type ScanAxis } from "./crossings";
import type { Grid } from "./grid";
import { insulatorCorners, type Place } from "./insulator-corners";
import { type FieldLayout, type Solid, wallThicknessMm } from "./layout";
import { markDisc, markNear } from "./ownership";

const NEAR_INSULATOR = 1;
const NEAR_STEP = 2;
const NEAR_CORNER = 4;
/** Chords for which a bow is taken when its shadow on a link is worked out. */
const BOW_CHORDS = 64;
/** Cells round an insulator's corner in which its own flow is fitted. */
const MOST_REACH_CELLS = 16;
/** Within so many cells of the waterline the depth changes too fast for local potentials to hold. */
const WATERLINE_CELLS = 4;

/** A plane of depth: depth at (x, y) = at0 + slopeX·x + slopeY·y, mm. */
export interface BedPlane {
  readonly at0: number;
  readonly slopeX: number;
  readonly slopeY: number;
}

/** @returns the plane of water depth over the bed of a level or tilted tray. */
export function bedPlane(setup: Setup): BedPlane {
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  const slopeX = Math.tan(radians(setup.water.tiltXDeg));
  const slopeY = Math.tan(radians(setup.water.tiltYDeg));
  return { at0: setup.water.depthMm - (slopeX * lengthMm) / 2 - (slopeY * widthMm) / 2, slopeX, slopeY };
}

/** Conducts current between neighbouring nodes through the water; conductors are not looked at here. */
export interface Conduction {
  /** Flux per volt of the link from node (column, row) to its neighbour along the axis, mm (depth × width / length). */
  readonly along: (axis: ScanAxis, column: number, row: number) => number;
  /** Depth of the water at a place, mm; 0 where dry. */
  readonly depthAt: (x: number, y: number) => number;
  /** Thickness of the slabs at a place, mm. */
  readonly slabThicknessAt: (x: number, y: number) => number;
  /** Whether a place lies within a few cells of the waterline of a tilted tray, or beyond it. */
  readonly nearWaterline: (x: number, y: number) => boolean;
  /** Whether the tray stands level (slabs apart). */
  readonly isLevel: boolean;
  /** Whether a depth step lies within two cells of the node. */
  readonly nearStep: (node: number) => boolean;
  /** Whether a depth step runs between the node and its eight neighbours. */
  readonly stepAround: (node: number) => boolean;
  /** Whether an insulator's outline or a round tray's wall lies within two cells of the node. */
  readonly nearInsulator: (node: number) => boolean;
}

/** Mean of the positive part of a value that runs linearly from `a` to `b`. */
function meanWet(a: number, b: number): number {
  if (a >= 0 && b >= 0) return (a + b) / 2;
  if (a <= 0 && b <= 0) return 0;
  const wet = Math.max(a, b);
  return (wet * wet) / (2 * (wet - Math.min(a, b)));
}

interface Face {
  readonly axis: ScanAxis;
  /** Position of the link's first node along the axis, mm. */
  readonly start: number;
  readonly pitch: number;
  /** Position of the link across the axis, and the reach of its dual face there, mm. */
  readonly line: number;
  readonly from: number;
  readonly to: number;
}

/** The part of a dual face that no insulator blocks, as [from, to] intervals across the link. */
function openIntervals(
  face: Face,
  blockers: readonly Solid[],
  wall: Loop | null,
  insideWall: (x: number, y: number) => boolean,
): [number, number][] {
  const middle = face.start + face.pitch / 2;
  const scan: ScanAxis = face.axis === "row" ? "column" : "row";
  const cuts = [face.from, face.to];
  for (const blocker of blockers) cuts.push(...crossingsBetween(blocker.loops, scan, middle, face.from, face.to));
  if (wall !== null) cuts.push(...crossingsBetween([wall], scan, middle, face.from, face.to));
  cuts.sort((a, b) => a - b);
  const open: [number, number][] = [];
  for (let index = 0; index + 1 < cuts.length; index++) {
    if (cuts[index + 1] - cuts[index] <= 0) continue;
    const across = (cuts[index] + cuts[index + 1]) / 2;
    const [x, y] = face.axis === "row" ? [middle, across] : [across, middle];
    if (insideWall(x, y) && !blockers.some((blocker) => covers(blocker.placed, x, y))) open.push([cuts[index], cuts[index + 1]]);
  }
  return open;
}

/** Where a strip ends: the middles of a bar's or an arc's end faces. */
function tipsOf({ shape, xMm, yMm, turnDeg }: Solid["placed"]): readonly (readonly [number, number])[] {
  const at = (radius: number, angleDeg: number): readonly [number, number] => [
    xMm + radius * Math.cos(radians(turnDeg + angleDeg)),
    yMm + radius * Math.sin(radians(turnDeg + angleDeg)),
  ];
  if (shape.kind === "bar") {
    const across = shape.widthMm > shape.lengthMm ? 90 : 0;
    const half = Math.max(shape.lengthMm, shape.widthMm) / 2;
    return [at(half, across), at(half, across + 180)];
  }
  if (shape.kind !== "arc") return [];
  const middle = (shape.outerMm + shape.innerMm) / 4;
  return [at(middle, shape.sweepDeg / 2), at(middle, -shape.sweepDeg / 2)];
}

/** What a piece of an outline spans across a link's axis between two positions along it, mm. */
function shadowOf(piece: Piece, axis: ScanAxis, from: number, to: number): [number, number][] {
  const chords = piece.kind === "edge" ? 1 : BOW_CHORDS;
  const spans: [number, number][] = [];
  for (let k = 0; k < chords; k++) {
    const [a, b] = [pointAlong(piece, k / chords), pointAlong(piece, (k + 1) / chords)];
    const [along0, across0, along1, across1] = axis === "row" ? [a[0], a[1], b[0], b[1]] : [a[1], a[0], b[1], b[0]];
    if (Math.max(along0, along1) < from || Math.min(along0, along1) > to) continue;
    const at = (position: number): number => {
      const share = along0 === along1 ? 0 : Math.min(1, Math.max(0, (position - along0) / (along1 - along0)));
      return across0 + share * (across1 - across0);
    };
    const ends = along0 === along1 ? [across0, across1] : [at(from), at(to)];
    spans.push([Math.min(...ends), Math.max(...ends)]);
  }
  return spans;
}

/** The intervals across a link's axis that a plate covers at one position along it, within the link's band. */
function coveredAlong(plate: Solid, face: Face, position: number): [number, number][] {
  const scan: ScanAxis = face.axis === "row" ? "column" : "row";
  const cuts = [face.from, ...crossingsBetween(plate.loops, scan, position, face.from, face.to), face.to];
  return cuts.slice(1).flatMap((to, index): [number, number][] => {
    const across = (cuts[index] + to) / 2;
    const [x, y] = face.axis === "row" ? [position, across] : [across, position];
    return covers(plate.placed, x, y) ? [[cuts[index], to]] : [];
  });
}

const GAUSS_2 = 0.5 / Math.sqrt(3);

/**
 * Prepares the conduction between nodes: one depth-weighted equation for level, tilted, stepped and partly dry water.
 * A link's flux per volt is the depth averaged over the open part of its dual face; across depth steps the resistances
 * in series along the link are added up first (flux and potential are continuous at a step).
 * @param isInsulated says whether a node lies inside an insulator.
 */
export function conductionOf(layout: FieldLayout, grid: Grid, wall: Loop | null, isInsulated: (node: number) => boolean): Conduction {
  const { setup } = layout;
  const { columns, rows, pitchXMm, pitchYMm } = grid;
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  const plane = bedPlane(setup);
  const flags = new Uint8Array(columns * rows);
  for (const insulator of layout.insulators) markNear(flags, NEAR_INSULATOR, grid, insulator.loops);
  if (wall !== null) markNear(flags, NEAR_INSULATOR, grid, [wall]);
  for (const slab of layout.slabs) markNear(flags, NEAR_STEP, grid, slab.loops);
  const radius = Math.min(lengthMm, widthMm) / 2;
  const insideWall = (x: number, y: number): boolean => wall === null || Math.hypot(x - radius, y - radius) < radius;
  const pitch = Math.max(pitchXMm, pitchYMm);
  const thin = layout.insulators.filter((one) => wallThicknessMm(one.placed.shape) < 2 * pitch);
  const corners = insulatorCorners(layout.insulators, 1 * pitch, MOST_REACH_CELLS * pitch, (solid, [x, y]) => {
    const others = [...layout.conductors, ...layout.insulators].filter((other) => other !== solid);
    return Math.min(Math.max(0, depthFromWallMm(setup.tray, x, y)), ...others.map((other) => distanceToOutline(other.loops, x, y)));
  });
  for (const { x, y, reachMm } of corners.corners) markDisc(flags, NEAR_CORNER, grid, x, y, reachMm);
  const bedAt = (x: number, y: number): number => plane.at0 + plane.slopeX * x + plane.slopeY * y;
  const slabThicknessAt = (x: number, y: number): number => {
    let thickness = 0;
    for (const slab of layout.slabs) if (covers(slab.placed, x, y)) thickness += slab.thicknessMm;
    return thickness;
  };
  const depthAt = (x: number, y: number): number => Math.max(0, bedAt(x, y) - slabThicknessAt(x, y));

  function steppedFlux(face: Face, open: readonly [number, number][]): number {
    const middle = face.start + face.pitch / 2;
    const scan: ScanAxis = face.axis === "row" ? "column" : "row";
    let flux = 0;
    for (const [from, to] of open) {
      const cuts = [from, to];
      for (const slab of layout.slabs) cuts.push(...crossingsBetween(slab.loops, scan, middle, from, to));
      cuts.sort((a, b) => a - b);
      for (let index = 0; index + 1 < cuts.length; index++) {
        const width = cuts[index + 1] - cuts[index];
        for (const offset of [-GAUSS_2, GAUSS_2])
          flux += (width / 2) * seriesFlux(face, (cuts[index] + cuts[index + 1]) / 2 + offset * width);
      }
    }
    return flux;
  }

  /** Flux per volt and mm of width along one line from node to node: 1 / sum of length / depth. */
  function seriesFlux(face: Face, across: number): number {
    const end = face.start + face.pitch;
    const cuts = [face.start, end];
    for (const slab of layout.slabs) cuts.push(...crossingsBetween(slab.loops, face.axis, across, face.start, end));
    cuts.sort((a, b) => a - b);
    let resistance = 0;
    for (let index = 0; index + 1 < cuts.length; index++) {
      const length = cuts[index + 1] - cuts[index];
      if (length <= 0) continue;
      const along = (cuts[index] + cuts[index + 1]) / 2;
      const depth = face.axis === "row" ? depthAt(along, across) : depthAt(across, along);
      if (depth <= 0) return 0;
      resistance += length / depth;
    }
    return 1 / resistance;
  }

  /**
   * What thin plates leave of a link. A plate thinner than two cells may lie beside the dual face, so a link that a plate
   * crosses is shut whole: any share left open would join the two sides through a node between them. Only where a plate
   * ends within the link's band is the band narrowed to what the plate's shadow leaves, so that slits have their true width.
   */
  function besideThinPlates(face: Face, open: readonly [number, number][]): [number, number][] {
    const end = face.start + face.pitch;
    const near = thin.filter(({ bounds: [left, bottom, right, top] }) => {
      const [low, high, near0, near1] = face.axis === "row" ? [left, right, bottom, top] : [bottom, top, left, right];
      return low <= end && high >= face.start && near0 <= face.to && near1 >= face.from;
    });
    if (near.length === 0) return [...open];
    const hasTip = near.some(({ placed }) =>
      tipsOf(placed).some(([x, y]) => {
        const [along, across] = face.axis === "row" ? [x, y] : [y, x];
        return along >= face.start && along <= end && across >= face.from && across <= face.to;
      }),
    );
    if (!hasTip) {
      return near.some((plate) => crossingsBetween(plate.loops, face.axis, face.line, face.start, end).length > 0) ? [] : [...open];
    }
    // The shadow of a plate on the band: what its outline spans between the nodes, and what it covers at the two ends.
    const blocked = near.flatMap((plate) => [
      ...plate.loops.flat().flatMap((piece) => shadowOf(piece, face.axis, face.start, end)),
      ...[face.start, end].flatMap((position) => coveredAlong(plate, face, position)),
    ]);
    return blocked.reduce<[number, number][]>(
      (free, [low, high]) =>
        free.flatMap(([from, to]): [number, number][] => {
          const parts: [number, number][] = [
            [from, Math.min(to, low)],
            [Math.max(from, high), to],
          ];
          return parts.filter(([a, b]) => b > a);
        }),
      [...open],
    );
  }

  function along(axis: ScanAxis, column: number, row: number): number {
    const isRow = axis === "row";
    const node = row * columns + column;
    const other = isRow ? node + 1 : node + columns;
    const pitch = isRow ? pitchXMm : pitchYMm;
    const acrossPitch = isRow ? pitchYMm : pitchXMm;
    const acrossSize = isRow ? widthMm : lengthMm;
    const start = (isRow ? column : row) * pitch;
    const centre = (isRow ? row : column) * acrossPitch;
    const from = Math.max(0, centre - acrossPitch / 2);
    const to = Math.min(acrossSize, centre + acrossPitch / 2);
    const flag = flags[node] | flags[other];
    const middle = start + pitch / 2;
    const bed = (across: number): number => (isRow ? bedAt(middle, across) : bedAt(across, middle));
    if (flag === 0) {
      if (isInsulated(node) || (wall !== null && !insideWall(column * pitchXMm, row * pitchYMm))) return 0;
      let depth = meanWet(bed(from), bed(to));
      if (depth > 0 && layout.slabs.length > 0) depth = isRow ? depthAt(middle, centre) : depthAt(centre, middle);
      return (depth * (to - from)) / pitch;
    }
    const face: Face = { axis, start, pitch, line: centre, from, to };
    let open: [number, number][] = [[from, to]];
    if (flag & NEAR_INSULATOR) {
      open = openIntervals(face, layout.insulators, wall, insideWall);
      if (thin.length > 0) open = besideThinPlates(face, open);
    }
    if (flag & NEAR_STEP) return steppedFlux(face, open);
    let flux = 0;
    let width = 0;
    for (const [low, high] of open) {
      width += high - low;
      const depth =
        layout.slabs.length > 0
          ? isRow
            ? depthAt(middle, (low + high) / 2)
            : depthAt((low + high) / 2, middle)
          : meanWet(bed(low), bed(high));
      flux += (depth * (high - low)) / pitch;
    }
    return flag & NEAR_CORNER && flux > 0 ? flux * cornerFactor(face, width / pitch) : flux;
  }

  /** What a link next to an insulator's corner conducts, as a multiple of the plain finite volume. */
  function cornerFactor({ axis, start, pitch, line, from, to }: Face, plainShape: number): number {
    const place = (along: number, across: number): Place => (axis === "row" ? [along, across] : [across, along]);
    const middle = start + pitch / 2;
    return corners.shapeOf(place(start, line), place(start + pitch, line), place(middle, from), place(middle, to), plainShape) / plainShape;
  }

  return {
    along,
    depthAt,
    slabThicknessAt,
    nearWaterline: (x, y) => bedAt(x, y) < WATERLINE_CELLS * (Math.abs(plane.slopeX) * pitchXMm + Math.abs(plane.slopeY) * pitchYMm),
    isLevel: plane.slopeX === 0 && plane.slopeY === 0,
    nearStep: (node) => (flags[node] & NEAR_STEP) !== 0,
    stepAround: (node) => {
      if ((flags[node] & NEAR_STEP) === 0) return false;
      const x = (node % columns) * pitchXMm;
      const y = Math.floor(node / columns) * pitchYMm;
      const here = slabThicknessAt(x, y);
      return [-1, 0, 1].some((b) => [-1, 0, 1].some((a) => slabThicknessAt(x + a * pitchXMm, y + b * pitchYMm) !== here));
    },
    nearInsulator: (node) => (flags[node] & NEAR_INSULATOR) !== 0,
  };
}
