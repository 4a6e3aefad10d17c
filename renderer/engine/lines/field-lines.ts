import type { FieldLine, Quality } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import type { PotentialField } from "../field/potential-field";
import { crossingsOf } from "../geometry/crossings-of-pieces";
import { type HoldsWater, openWaterOf } from "../geometry/open-water";
import { boundsOf, type Piece } from "../geometry/outline";
import { type Box, boxGapMm, outlined } from "../geometry/overlap";
import { traySizeMm } from "../geometry/tray-outline";
import { directionFromPicture, directionFromReadings, type FieldDirection } from "./field-direction";
import { leavesWaterAt } from "./line-ends";
import { lineStarts } from "./line-starts";
import { type SurfacePlace, surfaceFieldFromPicture, surfaceFieldFromReadings } from "./surface-field";

/** Longest step along a line, mm, and the turns (cosines of 3° and 8°) between which a step is neither lengthened nor halved. */
const LONGEST_STEP_MM = 4;
const LITTLE_TURN = Math.cos(Math.PI / 60);
const SHARP_TURN = Math.cos(Math.PI / 22.5);
/** A line that has not arrived after this many steps is going nowhere. */
const MOST_STEPS = 2000;
/** How far off the metal a line is first followed and its field read, in cells of the picture. */
const OFF_SURFACE_CELLS = 0.2;
/** A field weaker than this share of span over tray length has no direction worth drawing. */
const WEAK_SHARE = 1e-5;

interface Water {
  readonly directionAt: FieldDirection;
  readonly holdsWater: HoldsWater;
  readonly outlines: readonly { readonly box: Box; readonly pieces: readonly { readonly piece: Piece; readonly box: Box }[] }[];
  readonly shortestStepMm: number;
}

/** Where a straight step first meets a part, the wall or a dry bed; null when it stays in the water. */
function arrival(x: number, y: number, toX: number, toY: number, { outlines, holdsWater }: Water): readonly [number, number] | null {
  const stepBox: Box = [Math.min(x, toX), Math.min(y, toY), Math.max(x, toX), Math.max(y, toY)];
  let nearest: readonly [number, number] | null = null;
  for (const { box, pieces } of outlines) {
    if (boxGapMm(stepBox, box) > 0) continue;
    for (const { piece, box: pieceBox } of pieces) {
      if (boxGapMm(stepBox, pieceBox) > 0) continue;
      for (const place of crossingsOf({ kind: "edge", x0: x, y0: y, x1: toX, y1: toY }, piece)) {
        if (nearest === null || Math.hypot(place[0] - x, place[1] - y) < Math.hypot(nearest[0] - x, nearest[1] - y)) nearest = place;
      }
    }
  }
  if (nearest !== null || holdsWater(toX, toY)) return nearest;
  const length = Math.hypot(toX - x, toY - y);
  return leavesWaterAt(x, y, (toX - x) / length, (toY - y) / length, length, holdsWater) ?? [x, y];
}

/** The mean direction over a step by the classical Runge–Kutta formula of fourth order, or null when it leaves the field. */
function meanDirection(
  x: number,
  y: number,
  first: readonly [number, number],
  step: number,
  directionAt: FieldDirection,
): readonly [number, number] | null {
  const second = directionAt(x + (step / 2) * first[0], y + (step / 2) * first[1]);
  const third = second && directionAt(x + (step / 2) * second[0], y + (step / 2) * second[1]);
  const fourth = third && directionAt(x + step * third[0], y + step * third[1]);
  if (second === null || third === null || fourth === null) return null;
  return [(first[0] + 2 * second[0] + 2 * third[0] + fourth[0]) / 6, (first[1] + 2 * second[1] + 2 * third[1] + fourth[1]) / 6];
}

function traced(start: SurfacePlace, offMm: number, water: Water): FieldLine {
  const places = [start.x, start.y];
  let x = start.x + offMm * start.outX;
  let y = start.y + offMm * start.outY;
  let step = water.shortestStepMm * 2;
  let direction = water.directionAt(x, y);
  for (let count = 0; count < MOST_STEPS && direction !== null; count++) {
    // Next to a surface the formula's trial places may lie in it: the way on is straight then.
    const mean: readonly [number, number] = meanDirection(x, y, direction, step, water.directionAt) ?? direction;
    const turn = mean[0] * direction[0] + mean[1] * direction[1];
    if (turn < SHARP_TURN && step > water.shortestStepMm) {
      step /= 2;
      continue;
    }
    const toX = x + step * mean[0];
    const toY = y + step * mean[1];
    const end = arrival(x, y, toX, toY, water);
    places.push(...(end ?? [toX, toY]));
    if (end !== null) break;
    x = toX;
    y = toY;
    direction = water.directionAt(x, y);
    if (turn > LITTLE_TURN) step = Math.min(LONGEST_STEP_MM, 1.5 * step);
  }
  return Float64Array.from(places);
}

/**
 * Field lines from the higher to the lower potential. Neighbours on an electrode carry equal currents between them; lines
 * end at conductors, and a loose conductor sends as many on as it takes up.
 * @param lines how many the electrodes send out together, nearly.
 * @param quality `live` follows the picture's slope, otherwise readings of the field are followed.
 */
export function fieldLinesOf(field: PotentialField, setup: Setup, lines: number, quality: Quality): readonly FieldLine[] {
  const holdsWater = openWaterOf(setup);
  const pitchMm = Math.min(field.picture.pitchXMm, field.picture.pitchYMm);
  const weakestVPerM = (WEAK_SHARE * 1000 * (field.spanV[1] - field.spanV[0])) / Math.max(...traySizeMm(setup.tray));
  const water: Water = {
    directionAt: quality === "live" ? directionFromPicture(field, weakestVPerM) : directionFromReadings(field, weakestVPerM),
    holdsWater,
    outlines: setup.parts.map((part) => {
      const { box, loops } = outlined(part);
      return { box, pieces: loops.flat().map((piece) => ({ piece, box: boundsOf([[piece]]) })) };
    }),
    shortestStepMm: pitchMm / 4,
  };
  const offMm = OFF_SURFACE_CELLS * pitchMm;
  const surfaceField = (quality === "live" ? surfaceFieldFromPicture : surfaceFieldFromReadings)(field, holdsWater, offMm);
  const starts = lineStarts(field, setup, lines, surfaceField, quality === "live" ? 2 * pitchMm : pitchMm);
  return starts.map((start) => traced(start, offMm, water)).filter((line) => line.length > 4);
}
