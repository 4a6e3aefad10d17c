import { beforeAll, describe, expect, it } from "vitest";
import { createPlanner } from "../../../../renderer/engine/plan";
import { chanceOfChiSquared, chanceOfWorst } from "../../../../renderer/engine/readings/chi-squared";
import { judgeRun, pointsOf } from "../../../../renderer/engine/readings/judge";
import { readTable } from "../../../../renderer/engine/readings/read-table";
import { foundPlacesCsv, readingsCsv } from "../../../../renderer/engine/readings/write-table";
import { barsWithLooseRing } from "../../../../renderer/examples/bars-with-loose-ring";
import type { Plan, ProbePoint } from "../../../../shared-types/plan";
import type { ReadingRun } from "../../../../shared-types/readings";

let plan: Plan;
let points: readonly ProbePoint[];
beforeAll(async () => {
  const outcome = await createPlanner().plan(barsWithLooseRing.setup, "live");
  if (!outcome.ok) throw new Error(outcome.refusal.message);
  plan = outcome.plan;
  points = pointsOf(plan.probing);
});

const EMPTY: ReadingRun = { id: "run-1", name: "Tray 1", takenBy: "", takenOn: "", setupId: "", readings: [], found: [] };
/** A run in which point n reads `bands(n)` half-widths of its band off what is expected. */
const readOff = (bands: (n: number) => number, only = points): ReadingRun => ({
  ...EMPTY,
  readings: only.map(({ n, xMm, yMm, volts, bandV }) => ({ n, xMm, yMm, volts: volts + bands(n) * bandV })),
});

describe("chances", () => {
  it("of χ² are those of the tables (M. Abramowitz, I. A. Stegun, 1964, table 26.8)", () => {
    for (const [chiSquared, degrees, chance] of [
      [3.84146, 1, 0.05],
      [6.6349, 1, 0.01],
      [18.307, 10, 0.05],
      [23.2093, 10, 0.01],
      [67.5048, 50, 0.05],
      [29.7067, 50, 0.99],
    ] as const)
      expect(chanceOfChiSquared(chiSquared, degrees)).toBeCloseTo(chance, 5);
  });

  it("of the worst among many grow with their number", () => {
    expect(chanceOfWorst(1.959964, 1)).toBeCloseTo(0.05, 6);
    expect(chanceOfWorst(1.959964, 20)).toBeCloseTo(1 - 0.95 ** 20, 6);
    expect(chanceOfWorst(12, 50)).toBeLessThan(1e-28);
  });
});

describe("a reading against its band", () => {
  it("passes up to the edge, is doubtful to half a band beyond, and fails farther off, either way", () => {
    const judged = judgeRun(
      readOff((n) => [0.99, -1.01, 1.49, -1.51, 0][n % 5]),
      plan,
    );
    for (const { n, verdict } of judged.readings) expect(verdict).toBe(["pass", "doubtful", "doubtful", "fail", "pass"][n % 5]);
  });

  it("at a place that is no point of the plan is put aside, not judged", () => {
    const run = { ...EMPTY, readings: [{ n: 1, xMm: 1, yMm: 1, volts: 3 }] };
    expect(judgeRun(run, plan)).toMatchObject({ strays: run.readings, readings: [], verdict: null, reason: "none-read" });
  });
});

describe("the tray", () => {
  it("that reads as predicted passes", () => {
    expect(
      judgeRun(
        readOff((n) => (n % 2 === 0 ? 0.4 : -0.4)),
        plan,
      ),
    ).toMatchObject({ verdict: "pass", reason: "as-predicted" });
  });

  it("passes with one of many points a little outside its band, as chance has it", () => {
    const judged = judgeRun(
      readOff((n) => (n === 20 ? 1.1 : 0.3)),
      plan,
    );
    expect(judged).toMatchObject({ verdict: "pass", reason: "some-outside", counts: { doubtful: 1, fail: 0 }, worst: { n: 20 } });
  });

  it("fails by one point far off, and names it", () => {
    const judged = judgeRun(
      readOff((n) => (n === 7 ? -3 : 0.2)),
      plan,
    );
    expect(judged).toMatchObject({ verdict: "fail", reason: "worst-point", worst: { n: 7 } });
    expect(judged.worst?.inBands).toBeCloseTo(-3, 9);
  });

  it("fails by χ² where every point is off within its band", () => {
    expect(
      judgeRun(
        readOff(() => 0.9),
        plan,
      ),
    ).toMatchObject({ verdict: "fail", reason: "chi-squared", counts: { fail: 0, doubtful: 0 } });
  });

  it("is in doubt while fewer than half of its points are read", () => {
    expect(
      judgeRun(
        readOff(() => 0, points.slice(0, 5)),
        plan,
      ),
    ).toMatchObject({ verdict: "doubtful", reason: "few-read" });
  });
});

describe("places where a potential was found", () => {
  /** The middle line of two bars runs straight across at x = 150 where the ring leaves it. */
  const found = (xMm: number, yMm: number, volts = 3) => judgeRun({ ...EMPTY, found: [{ volts, xMm, yMm }] }, plan).places[0];

  it("on the line pass with no distance", () => expect(found(150, 30)).toMatchObject({ verdict: "pass" }));

  it("off the line have their distance in millimetres, positive towards the higher potential", () => {
    expect(found(154, 30).distanceMm).toBeCloseTo(4, 1);
    expect(found(145, 30).distanceMm).toBeCloseTo(-5, 1);
    expect(found(145, 30).nearestMm?.[0]).toBeCloseTo(150, 1);
  });

  it("have a band in millimetres that is the probe point's in volts over the gradient there", () => {
    const level = plan.probing.levels.find(({ volts }) => Math.abs(volts - 3) < 1e-9);
    const bands = level?.points.map(({ bandV, voltsPerMm }) => bandV / voltsPerMm) ?? [];
    expect(bands.some((band) => Math.abs(band - (found(150, 30).bandMm ?? 0)) < 1e-12)).toBe(true);
    const far = 150 + 1.6 * (found(150, 30).bandMm ?? 0);
    expect(found(far, 30).verdict).toBe("fail");
  });

  it("of a potential that no line is drawn for get no verdict", () => {
    expect(found(150, 30, 2.9)).toMatchObject({ distanceMm: null, verdict: null });
  });
});

it("a run written as CSV comes back as it was, readings and found places", () => {
  const run = { ...readOff((n) => 0.1 * (n % 7)), found: [{ volts: 3, xMm: 150.5, yMm: 40 }] };
  const judged = judgeRun(run, plan);
  const back = readTable(readingsCsv(judged), points);
  expect(back.wrong).toEqual([]);
  expect(back.readings.map(({ n }) => n)).toEqual(run.readings.map(({ n }) => n));
  for (const [index, { volts }] of back.readings.entries()) expect(volts).toBeCloseTo(run.readings[index].volts, 8);
  expect(readTable(foundPlacesCsv(judged), points).found).toEqual(run.found);
});
