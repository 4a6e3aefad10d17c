import type { OperatingRegion, RegionBoundary } from "../../../shared-types/bench";

/** Where the plane of depth and volts lies in the drawing, px. */
export interface ChartFrame {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
  readonly depthEndMm: number;
  readonly voltsEnd: number;
}

export const xOfDepth = (frame: ChartFrame, depthMm: number): number => frame.left + (depthMm / frame.depthEndMm) * frame.width;
export const yOfVolts = (frame: ChartFrame, volts: number): number => frame.top + (1 - volts / frame.voltsEnd) * frame.height;
export const depthOfX = (frame: ChartFrame, x: number): number => ((x - frame.left) / frame.width) * frame.depthEndMm;
export const voltsOfY = (frame: ChartFrame, y: number): number => (1 - (y - frame.top) / frame.height) * frame.voltsEnd;

/** @returns a round upper end for an axis. */
export function roundEnd(value: number): number {
  const decade = 10 ** Math.floor(Math.log10(value));
  const share = [1, 1.5, 2, 2.5, 3, 4, 5, 6, 8, 10].find((step) => step * decade >= value * (1 - 1e-9)) ?? 10;
  return share * decade;
}

/** @returns about `count` round values from 0 to `end` for an axis. */
export function axisTicks(end: number, count: number): readonly number[] {
  const rough = end / count;
  const decade = 10 ** Math.floor(Math.log10(rough));
  const step = ([1, 2, 5, 10].find((share) => share * decade >= rough * (1 - 1e-9)) ?? 10) * decade;
  return Array.from({ length: Math.floor(end / step + 1e-9) + 1 }, (_, index) => Number((index * step).toPrecision(12)));
}

/**
 * The part of the chart that the plan's numbers describe: enough to show the region, the present setting and every edge near them.
 * @returns the ends of both axes.
 */
export function chartEnds(
  region: OperatingRegion,
  present: readonly [number, number],
): { readonly depthEndMm: number; readonly voltsEnd: number } {
  const highest = Math.max(...region.columns.flatMap((column) => column.volts.map((run) => run[1])), 0);
  const upright = region.boundaries.filter((one) => one.forbids === "deeper").map((one) => one.path[0][0]);
  const deepest = Math.max(
    ...region.columns.map((column) => column.depthMm),
    ...upright.filter((depth) => depth < region.depthRangeMm[1]),
    0,
  );
  return {
    depthEndMm: roundEnd(Math.max(Math.min(deepest * 1.15, region.depthRangeMm[1]), present[0] * 1.1, 5)),
    voltsEnd: roundEnd(Math.max(highest > 0 ? highest * 1.2 : region.voltsRange[1], present[1] * 1.1)),
  };
}

/** @returns whether the region allows a setting: between two of its columns the bounds run straight. */
export function allowsSetting(region: OperatingRegion, depthMm: number, volts: number): boolean {
  const { columns } = region;
  const after = columns.findIndex((column) => column.depthMm >= depthMm - 1e-9);
  if (after < 0) return false;
  const right = columns[after];
  const left = after === 0 ? right : columns[after - 1];
  if (depthMm < left.depthMm - 1e-9) return false;
  const share = right.depthMm === left.depthMm ? 1 : (depthMm - left.depthMm) / (right.depthMm - left.depthMm);
  return right.volts.some(([low, high], run) => {
    const [leftLow, leftHigh] = left.volts[run] ?? [low, high];
    const slack = 1e-9 * Math.max(1, volts);
    return volts >= leftLow + share * (low - leftLow) - slack && volts <= leftHigh + share * (high - leftHigh) + slack;
  });
}

/** @returns the SVG path of the allowed region: for every run of volts one band from column to column. */
export function regionPath(frame: ChartFrame, region: OperatingRegion): string {
  const { columns } = region;
  const most = Math.max(0, ...columns.map((column) => column.volts.length));
  const place = (depthMm: number, volts: number): string =>
    `${xOfDepth(frame, depthMm).toFixed(1)} ${yOfVolts(frame, Math.min(volts, frame.voltsEnd)).toFixed(1)}`;
  const bands: string[] = [];
  for (let run = 0; run < most; run++) {
    const present = columns.filter((column) => column.volts[run] !== undefined);
    const upper = present.map((column) => place(column.depthMm, column.volts[run][1]));
    const lower = present.map((column) => place(column.depthMm, column.volts[run][0])).reverse();
    if (present.length > 0) bands.push(`M${[...upper, ...lower].join("L")}Z`);
  }
  return bands.join("");
}

/** @returns the bound that a rule sets at a depth: volts, or mm for the rules on depth; null where it draws nothing there. */
export function boundAt(boundary: RegionBoundary, depthMm: number): number | null {
  const { path, forbids } = boundary;
  if (forbids === "deeper" || forbids === "shallower") return path[0][0];
  const after = path.findIndex(([depth]) => depth >= depthMm);
  if (after < 0) return null;
  if (after === 0) return path[0][1];
  const [[d0, v0], [d1, v1]] = [path[after - 1], path[after]];
  return v0 + ((depthMm - d0) / (d1 - d0)) * (v1 - v0);
}

/** @returns whether a setting breaks the rule of a boundary. */
export function breaks(boundary: RegionBoundary, depthMm: number, volts: number): boolean {
  const bound = boundAt(boundary, depthMm);
  if (bound === null) return false;
  switch (boundary.forbids) {
    case "above":
      return volts > bound * (1 + 1e-9);
    case "below":
      return volts < bound * (1 - 1e-9);
    case "deeper":
      return depthMm > bound + 1e-9;
    case "shallower":
      return depthMm < bound - 1e-9;
  }
}
