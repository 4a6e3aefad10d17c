import type { OperatingRegion, RegionBoundary, RegionRule } from "../../../shared-types/bench";
import { texts } from "../../texts/texts";
import { boundAt, type ChartFrame, depthOfX, xOfDepth, yOfVolts } from "./region-geometry";

/** A name set beside its edge. */
export interface EdgeLabel {
  readonly rule: RegionRule;
  readonly text: string;
  readonly x: number;
  readonly y: number;
  readonly upright: boolean;
}

/** Room that a letter takes, px: a little more than the font's mean, so that names never touch. */
const LETTER_WIDTH = 6.4;
const LINE_HEIGHT = 14;
/** A name that finds its place taken is tried so much farther left, px. */
const SIDE_STEP = 12;

const isUpright = (boundary: RegionBoundary): boolean => boundary.forbids === "deeper" || boundary.forbids === "shallower";

/** left, top, right, bottom of a name, px. */
type Box = readonly [number, number, number, number];

const boxOf = ({ x, y, text, upright }: EdgeLabel): Box =>
  upright
    ? [x - LINE_HEIGHT, y - 2, x + 3, y + text.length * LETTER_WIDTH]
    : [x - text.length * LETTER_WIDTH, y - LINE_HEIGHT + 2, x, y + 3];

const collide = (a: Box, b: Box): boolean => a[0] < b[2] && b[0] < a[2] && a[1] < b[3] && b[1] < a[3];

/** Names of upright edges: along the line at the top, on the side that the rule forbids. */
function uprightLabels(frame: ChartFrame, region: OperatingRegion): readonly EdgeLabel[] {
  return region.boundaries
    .filter((boundary) => isUpright(boundary) && boundary.path[0][0] > 0 && boundary.path[0][0] <= frame.depthEndMm)
    .map((boundary) => {
      const side = boundary.forbids === "deeper" ? 12 : -5;
      return {
        rule: boundary.rule,
        text: texts.bench.rules[boundary.rule],
        x: xOfDepth(frame, boundary.path[0][0]) + side,
        y: frame.top + 8,
        upright: true,
      };
    });
}

/** The name of a level or sloping edge: beside it as far right as there is room, following it to the left where there is none. */
function levelLabel(frame: ChartFrame, boundary: RegionBoundary, taken: readonly Box[]): EdgeLabel | null {
  const text = texts.bench.rules[boundary.rule];
  const beside = boundary.forbids === "above" ? -5 : 13;
  const right = frame.left + frame.width - 6;
  let first: EdgeLabel | null = null;
  // A name over a falling edge must clear it at its left end, where the edge is higher; in a corner it may lie across it.
  for (const clearing of boundary.forbids === "above" ? [text.length * LETTER_WIDTH, 0] : [0]) {
    for (let x = right; x - text.length * LETTER_WIDTH > frame.left; x -= SIDE_STEP) {
      const volts = boundAt(boundary, depthOfX(frame, x - clearing));
      if (volts === null || volts < 0 || volts > frame.voltsEnd) continue;
      const y = Math.min(frame.top + frame.height - 4, Math.max(frame.top + 11, yOfVolts(frame, volts) + beside));
      const label = { rule: boundary.rule, text, x, y, upright: false };
      if (!taken.some((box) => collide(box, boxOf(label)))) return label;
      first ??= label;
    }
  }
  return first;
}

/** @returns a label for every edge that the frame shows, kept off one another as far as there is room. */
export function edgeLabels(frame: ChartFrame, region: OperatingRegion): readonly EdgeLabel[] {
  const labels: EdgeLabel[] = [...uprightLabels(frame, region)];
  for (const boundary of region.boundaries) {
    if (isUpright(boundary)) continue;
    const label = levelLabel(frame, boundary, labels.map(boxOf));
    if (label !== null) labels.push(label);
  }
  return labels;
}

/** @returns the points of an edge in the drawing, as an SVG polyline. */
export function edgePoints(frame: ChartFrame, boundary: RegionBoundary): string {
  const tall = 3 * frame.voltsEnd;
  return boundary.path
    .map(
      ([depthMm, volts]) =>
        `${xOfDepth(frame, depthMm).toFixed(1)},${yOfVolts(frame, isUpright(boundary) && volts > 0 ? frame.voltsEnd : Math.min(volts, tall)).toFixed(1)}`,
    )
    .join(" ");
}
