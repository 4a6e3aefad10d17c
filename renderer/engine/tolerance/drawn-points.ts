import type { DrawnPoint, PointBand } from "../../../shared-types/tolerance";

/** Linear and drawn bands within this share of each other agree. */
export const AGREEMENT = 0.1;

/** The value below which `share` of sorted values lie, between neighbours in proportion. */
function quantile(sorted: Float64Array, share: number): number {
  const at = share * (sorted.length - 1);
  const below = Math.floor(at);
  const above = Math.min(sorted.length - 1, below + 1);
  return sorted[below] + (at - below) * (sorted[above] - sorted[below]);
}

/**
 * Sums up what was drawn at every point: mean and standard deviation (JCGM 101:2008, 7.6) and the probabilistically symmetric
 * 95 % interval (7.7), beside the linear band. The standard deviation of N draws is itself known to 1/√(2N).
 * @param rows one row of readings a draw, in the order of `bands`; at least two.
 */
export function drawnPoints(rows: readonly Float64Array[], bands: readonly PointBand[]): readonly DrawnPoint[] {
  const count = rows.length;
  const unsure = 2 / Math.sqrt(2 * count);
  return bands.map(({ standardVolts: linear }, index): DrawnPoint => {
    const values = Float64Array.from(rows, (row) => row[index]).sort();
    const meanVolts = values.reduce((sum, value) => sum + value, 0) / count;
    const standardVolts = Math.sqrt(values.reduce((sum, value) => sum + (value - meanVolts) ** 2, 0) / (count - 1));
    const departure = linear === 0 ? 0 : standardVolts / linear - 1;
    const agrees = Math.abs(departure) <= AGREEMENT;
    return {
      meanVolts,
      standardVolts,
      lowVolts: quantile(values, 0.025),
      highVolts: quantile(values, 0.975),
      departure,
      reason: agrees ? null : Math.abs(departure) - unsure <= AGREEMENT ? "few-draws" : "curved",
    };
  });
}
