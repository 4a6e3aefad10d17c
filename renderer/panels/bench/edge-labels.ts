import type { OperatingRegion, RegionBoundary, RegionRule } from "../../../shared-types/bench";
import { boundAt, type ChartFrame, xOfDepth, yOfVolts } from "./region-geometry";

/** The rules by the names that people read. */
export const RULE_NAMES: Record<RegionRule, string> = {
  "supply-current": "supply current",
  power: "power",
  heating: "warming",
  "wet-hands": "wet hands",
  "readable-gradient": "readable gradient",
  "tilt-tolerance": "tilt of the tray",
  "electrode-height": "height of the parts",
  freeboard: "freeboard",
};

/** A name set beside its edge. */
export interface EdgeLabel {
  readonly rule: RegionRule;
  readonly text: string;
  readonly x: number;
  readonly y: number;
  readonly upright: boolean;
}

const LINE_HEIGHT = 13;
const isUpright = (boundary: RegionBoundary): boolean => boundary.forbids === "deeper" || boundary.forbids === "shallower";

/** Pushes labels apart that would print over one another, downwards, without leaving the frame. */
function apart(labels: readonly EdgeLabel[], bottom: number): readonly EdgeLabel[] {
  let last = -Infinity;
  return [...labels]
    .sort((a, b) => a.y - b.y)
    .map((label) => {
      const y = Math.min(bottom, Math.max(label.y, last + LINE_HEIGHT));
      last = y;
      return { ...label, y };
    });
}

/** @returns a label for every edge that the frame shows: level ones at the right end, upright ones along the line at the top. */
export function edgeLabels(frame: ChartFrame, region: OperatingRegion): readonly EdgeLabel[] {
  const right = frame.left + frame.width;
  const level: EdgeLabel[] = [];
  const upright: EdgeLabel[] = [];
  for (const boundary of region.boundaries) {
    const text = RULE_NAMES[boundary.rule];
    if (isUpright(boundary)) {
      const depthMm = boundary.path[0][0];
      if (depthMm <= 0 || depthMm > frame.depthEndMm) continue;
      const side = boundary.forbids === "deeper" ? 11 : -5;
      upright.push({ rule: boundary.rule, text, x: xOfDepth(frame, depthMm) + side, y: frame.top + 8, upright: true });
    } else {
      const volts = boundAt(boundary, frame.depthEndMm * 0.98);
      if (volts === null || volts > frame.voltsEnd || volts < 0) continue;
      const beside = boundary.forbids === "above" ? -5 : 12;
      level.push({ rule: boundary.rule, text, x: right - 6, y: yOfVolts(frame, volts) + beside, upright: false });
    }
  }
  return [...apart(level, frame.top + frame.height - 4), ...upright];
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
