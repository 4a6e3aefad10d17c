import { describe, expect, it } from "vitest";
import { benchOf } from "../../../../renderer/engine/bench/bench";
import { probingWithInterface } from "../../../../renderer/engine/bench/probing-with-interface";
import { createPlanner } from "../../../../renderer/engine/plan";
import type { ProbePlan, ProbePoint } from "../../../../shared-types/plan";
import { trayWith } from "../../../reference/solved";
import { BARS } from "../odd-setups";
import { channel, channelFacts } from "./trays";

const point = (volts: number): ProbePoint => ({
  n: 1,
  xMm: 130,
  yMm: 100,
  inside: null,
  volts,
  voltsError: 0.001,
  voltsPerMm: 0.0375,
  directionDeg: 180,
  bandV: 0.1,
});
const PROBING: ProbePlan = {
  spanV: [0, 6],
  levels: [1.5, 3, 4.5].map((volts) => ({ volts, note: null, points: [point(volts)] })),
  checks: [point(3)],
};

const adjusted = (change: Parameters<typeof channel>[0]): ProbePlan => {
  const setup = channel(change);
  return probingWithInterface(setup, PROBING, benchOf(setup, channelFacts(setup)));
};

describe("readings that allow for the volts lost at the surfaces", () => {
  it("are the field's own unless they are asked for", () => {
    expect(adjusted({ supply: { waveform: "dc" } })).toBe(PROBING);
  });

  it("on DC with 2 V lost run from 1 V to 5 V, and a millimetre counts two thirds", () => {
    const plan = adjusted({ supply: { waveform: "dc" }, interface: { electrodeDropVolts: 2, inReadings: true } });
    expect(plan.levels.map((level) => level.volts)).toEqual([2, 3, 4]);
    expect(plan.levels[0].points[0].volts).toBeCloseTo(2, 12);
    expect(plan.levels[0].points[0].voltsPerMm).toBeCloseTo((0.0375 * 4) / 6, 9);
    expect(plan.checks[0].volts).toBeCloseTo(3, 12);
  });

  it("on AC in tap water hardly differ, since the lost volts stand at right angles", () => {
    const plan = adjusted({ interface: { inReadings: true } });
    expect(plan.levels[1].points[0].volts).toBeCloseTo(3, 3);
    expect(plan.levels[2].points[0].volts).toBeCloseTo(4.5, 2);
    expect(plan.levels[2].points[0].volts).not.toBe(4.5);
  });

  it("leave every place where it was", () => {
    const plan = adjusted({ interface: { inReadings: true } });
    expect(plan.levels.map((level) => level.points.map(({ xMm, yMm, n }) => [xMm, yMm, n]))).toEqual(
      PROBING.levels.map((level) => level.points.map(({ xMm, yMm, n }) => [xMm, yMm, n])),
    );
  });

  it("are what pointer and command tell at the same places; the electrode's metal stands before the loss", async () => {
    const loss = { interface: { electrodeDropVolts: 2, inReadings: true } };
    const setup = trayWith({ supply: { waveform: "dc" }, parts: BARS, ...loss });
    const planner = createPlanner();
    const outcome = await planner.plan(setup, "live");
    if (!outcome.ok) throw new Error(outcome.refusal.message);
    const points = outcome.plan.probing.levels.flatMap((level) => level.points);
    expect(points.length).toBeGreaterThan(10);
    const readings =
      planner.sample(
        setup,
        points.map(({ xMm, yMm }) => [xMm, yMm] as const),
      ) ?? [];
    readings.forEach(({ volts, voltsError }, index) => {
      expect(volts).toBeCloseTo(points[index].volts, 9);
      expect(voltsError).toBeCloseTo(points[index].voltsError, 9);
    });
    const [metal, water] =
      planner.sample(setup, [
        [235, 100],
        [150, 100],
      ]) ?? [];
    expect(metal?.volts).toBe(6);
    expect(water?.volts).toBeCloseTo(3, 4);
    const before = await planner.plan({ ...setup, interface: { ...setup.interface, inReadings: false } }, "live");
    if (!before.ok) throw new Error(before.refusal.message);
    const first = before.plan.probing.levels[0].points[0];
    expect(points[0].volts - 1).toBeCloseTo((first.volts * 4) / 6, 6);
  });
});
