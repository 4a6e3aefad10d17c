import { describe, expect, it } from "vitest";
import type { PotentialField } from "../../../../renderer/engine/field/potential-field";
import { outlineOf } from "../../../../renderer/engine/geometry/outline";
import { signedDistance } from "../../../../renderer/engine/geometry/signed-distance";
import { depthFromWallMm } from "../../../../renderer/engine/geometry/tray-outline";
import { waterDepthMm } from "../../../../renderer/engine/geometry/water-depth";
import { equipotentialsOf } from "../../../../renderer/engine/lines/equipotentials";
import { evenLevels } from "../../../../renderer/engine/probing/levels";
import { planProbes } from "../../../../renderer/engine/probing/plan-probes";
import type { ProbePlan, ProbePoint } from "../../../../shared-types/plan";
import type { Setup } from "../../../../shared-types/setup";
import { randomSetup } from "../../../reference/random-setups";
import { solved, soundSetup, trayWith } from "../../../reference/solved";
import { analyticField, coaxialVolts, discInRing, fullWidthBars, setupWith, uniformVolts } from "../lines/analytic-field";

function planned(setup: Setup, field: PotentialField): ProbePlan {
  return planProbes(setup, field, equipotentialsOf(field, setup, evenLevels(field.spanV, setup.probing.levels), "print"));
}

const pointsOf = (plan: ProbePlan): readonly ProbePoint[] => plan.levels.flatMap(({ points }) => points);
const apartMm = (a: ProbePoint, b: ProbePoint): number => Math.hypot(a.xMm - b.xMm, a.yMm - b.yMm);

/** What every plan keeps, whatever the layout. */
function expectSound(setup: Setup, field: PotentialField, plan: ProbePlan): void {
  const { probing } = setup;
  const [low, high] = plan.spanV;
  const span = high - low;
  const step = span / (probing.levels + 1);
  plan.levels.forEach((level, index) => {
    expect(Math.abs(level.volts - (low + (index + 1) * step))).toBeLessThan(1e-3 * span);
    expect(level.points.length).toBeLessThanOrEqual(probing.pointsPerLevel);
    expect(level.note === null).toBe(level.points.length === probing.pointsPerLevel);
  });
  const points = pointsOf(plan);
  expect([...points, ...plan.checks].map(({ n }) => n)).toEqual([...points, ...plan.checks].map((_, index) => index + 1));
  const leastMm = Math.max(1, probing.probeTipMm, 2 * probing.placementMm);
  for (const level of plan.levels) {
    for (const point of level.points) {
      const { xMm, yMm } = point;
      expect(2 * xMm).toBe(Math.round(2 * xMm));
      expect(2 * yMm).toBe(Math.round(2 * yMm));
      expect(point.inside).toBeNull();
      expect(waterDepthMm(setup, xMm, yMm)).toBeGreaterThan(0);
      expect(depthFromWallMm(setup.tray, xMm, yMm)).toBeGreaterThanOrEqual(probing.wallClearanceMm + probing.probeTipMm / 2 - 1e-9);
      for (const part of setup.parts) {
        const clear = signedDistance(part, xMm, yMm, outlineOf(part));
        expect(clear).toBeGreaterThanOrEqual(probing.partClearanceMm + probing.probeTipMm / 2 - 1e-9);
      }
      expect(point.volts).toBe(field.read(xMm, yMm).volts);
      expect(Math.abs(point.volts - level.volts)).toBeLessThanOrEqual(point.voltsPerMm * 0.36 * 1.1 + point.voltsError + 1e-4 * span);
    }
  }
  points.forEach((point, index) => {
    for (const other of points.slice(0, index)) expect(apartMm(point, other)).toBeGreaterThanOrEqual(leastMm - 1e-9);
  });
}

describe("the probe plan between full-width bars", () => {
  const setup = setupWith(fullWidthBars);
  const field = analyticField(setup, uniformVolts, 1);
  const plan = planned(setup, field);

  it("has seven levels at even steps of an eighth of the span, seven points on each", () => {
    expect(plan.levels.map(({ volts, points, note }) => [volts, points.length, note])).toEqual(
      [1, 2, 3, 4, 5, 6, 7].map((volts) => [volts, 7, null]),
    );
    expectSound(setup, field, plan);
  });

  it("spreads the points of a level evenly and mirrored about the tray's middle", () => {
    for (const { points } of plan.levels) {
      const heights = points.map(({ yMm }) => yMm).sort((a, b) => a - b);
      expect(heights).toEqual(heights.map((_, index) => 200 - heights[heights.length - 1 - index]));
      const gaps = heights.slice(1).map((y, index) => y - heights[index]);
      expect(Math.max(...gaps) - Math.min(...gaps)).toBeLessThanOrEqual(1);
    }
    const columns = plan.levels.map(({ points }) => points[0].xMm);
    expect(columns).toEqual([75, 100, 125, 150, 175, 200, 225]);
  });

  it("is numbered to and fro: the next level begins where the hand is", () => {
    plan.levels.slice(1).forEach(({ points }, index) => {
      const before = plan.levels[index].points;
      expect(points[0].yMm).toBe(before[before.length - 1].yMm);
    });
    expect(plan.levels[0].points[0].yMm).toBeLessThan(plan.levels[0].points[6].yMm);
  });

  it("tells the change per millimetre and the direction of the field", () => {
    for (const { voltsPerMm, directionDeg } of pointsOf(plan)) {
      expect(voltsPerMm).toBeCloseTo(0.04, 6);
      expect(Math.abs(directionDeg)).toBeCloseTo(180, 4);
    }
  });

  it("has bands from meter accuracy and placement, combined as variances", () => {
    // 2000 counts show 8 V on the 20 V range, one digit 10 mV: at 4 V ± (40 + 30) mV; 0.04 V/mm times ± 0.5 mm is ± 20 mV.
    const point = plan.levels[3].points[0];
    expect(point.volts).toBeCloseTo(4, 6);
    expect(point.bandV).toBeCloseTo((2 * Math.hypot(0.07, 0.02)) / Math.sqrt(3), 6);
  });

  it("offers fewer points on lines that are short, and says why", () => {
    const narrow = setupWith(fullWidthBars, { probing: { wallClearanceMm: 97, levels: 3 } });
    const short = planned(narrow, analyticField(narrow, uniformVolts, 1));
    for (const { points, note } of short.levels) {
      expect(points.length).toBeGreaterThan(0);
      expect(points.length).toBeLessThan(7);
      expect(note).toMatch(/^Only \d of 7 points: the probe reaches \d\.\d mm of this line .* too near to the wall\.$/);
    }
    expectSound(narrow, analyticField(narrow, uniformVolts, 1), short);
  });

  it("leaves a level without points where the probe cannot come, and says what is in the way", () => {
    const wide = setupWith(fullWidthBars, { probing: { partClearanceMm: 40 } });
    const outer = planned(wide, analyticField(wide, uniformVolts, 1)).levels;
    expect(outer[0]).toMatchObject({ points: [], note: "No point: all of this line is too near to Left bar." });
    expect(outer[6]).toMatchObject({ points: [], note: "No point: all of this line is too near to Right bar." });
    expect(outer[3].points).toHaveLength(7);
  });

  it("keeps points apart that a thick probe could not tell apart, also on neighbouring levels", () => {
    const thick = setupWith(fullWidthBars, { probing: { probeTipMm: 12, levels: 30, pointsPerLevel: 30 } });
    const thickField = analyticField(thick, uniformVolts, 1);
    const crowded = planned(thick, thickField);
    expectSound(thick, thickField, crowded);
    expect(pointsOf(crowded).length).toBeGreaterThan(60);
  });
});

describe("the probe plan of a disc in a ring", () => {
  const setup = setupWith(discInRing, { probing: { pointsPerLevel: 8, levels: 3 } });
  const field = analyticField(setup, coaxialVolts, 1);
  const plan = planned(setup, field);

  it("puts points at equal angles on each circle, one on the axis of symmetry", () => {
    expectSound(setup, field, plan);
    for (const { points } of plan.levels) {
      const angles = points.map(({ xMm, yMm }) => Math.atan2(yMm - 100, xMm - 150)).sort((a, b) => a - b);
      expect(angles.some((angle) => Math.abs(angle) < 1e-9)).toBe(true);
      for (const { xMm, yMm } of points) {
        expect(points.some((other) => other.xMm === xMm && other.yMm === 200 - yMm)).toBe(true);
        expect(points.some((other) => other.xMm === 300 - xMm && other.yMm === yMm)).toBe(true);
      }
    }
  });

  it("goes round each circle without jumping across", () => {
    for (const { points } of plan.levels) {
      const radius = Math.hypot(points[0].xMm - 150, points[0].yMm - 100);
      points.slice(1).forEach((point, index) => {
        expect(apartMm(point, points[index])).toBeLessThan(2 * radius * Math.sin(Math.PI / 8) + 1);
      });
    }
  });
});

const barsWith = (...more: object[]): Setup =>
  trayWith({
    parts: [
      { id: "A", role: "electrode", tap: 0, xMm: 65, yMm: 100, turnDeg: 90, shape: { kind: "bar", lengthMm: 100, widthMm: 10 } },
      { id: "B", role: "electrode", tap: 1, xMm: 235, yMm: 100, turnDeg: 90, shape: { kind: "bar", lengthMm: 100, widthMm: 10 } },
      ...more,
    ],
  });

describe("check points", () => {
  it("stand on a loose ring's metal and in the water inside it, where all is at one potential", () => {
    const setup = barsWith({ id: "C", role: "floating", xMm: 120, yMm: 85, shape: { kind: "ring", outerMm: 60, innerMm: 54 } });
    const field = solved(setup, "live");
    const { checks } = planned(setup, field);
    expect(checks.map(({ inside }) => inside)).toEqual(["C", null]);
    expect(checks[1]).toMatchObject({ xMm: 120, yMm: 85 });
    for (const check of checks) {
      expect(check.volts).toBeCloseTo(field.conductors[2].volts, 6);
      expect(check.voltsPerMm).toBeLessThan(1e-6);
    }
  });

  it("avoid a part that lies inside a loose frame", () => {
    const setup = barsWith(
      { id: "C", role: "floating", xMm: 150, yMm: 100, turnDeg: 20, shape: { kind: "frame", lengthMm: 80, widthMm: 60, wallMm: 3 } },
      { id: "D", role: "insulator", xMm: 150, yMm: 100, shape: { kind: "disc", diameterMm: 20 } },
    );
    const { checks } = planned(setup, solved(setup, "live"));
    expect(checks.map(({ inside }) => inside)).toEqual(["C", null]);
    expect(Math.hypot(checks[1].xMm - 150, checks[1].yMm - 100)).toBeGreaterThan(13);
  });

  it("are only on the metal of a loose disc, and there are none without loose conductors", () => {
    const disc = barsWith({ id: "C", role: "floating", xMm: 150.2, yMm: 100, shape: { kind: "disc", diameterMm: 30 } });
    expect(planned(disc, solved(disc, "live")).checks).toMatchObject([{ xMm: 150, yMm: 100, inside: "C" }]);
    const none = barsWith();
    expect(planned(none, solved(none, "live")).checks).toEqual([]);
  });
});

describe("a small move of a part", () => {
  const planFor = (xMm: number, yMm: number): readonly ProbePoint[] => {
    const setup = barsWith({ id: "C", role: "insulator", xMm, yMm, shape: { kind: "disc", diameterMm: 50 } });
    return pointsOf(planned(setup, solved(setup, "live")));
  };

  it("by 1 mm moves the points a little and keeps their numbers", () => {
    for (const [x, y] of [
      [140, 90],
      [150, 110],
      [165, 80],
    ]) {
      const before = planFor(x, y);
      for (const after of [planFor(x + 1, y), planFor(x, y - 1)]) {
        expect(after).toHaveLength(before.length);
        const moved = after.filter((point, index) => apartMm(point, before[index]) > 5);
        expect(moved.map(({ n }) => n)).toEqual([]);
      }
    }
  });
});

describe("probe plans of random setups", () => {
  it.each([31, 32, 33, 34, 35, 36, 37, 38, 39, 40, 41, 42])("(%i) are sound", (number) => {
    const plain = randomSetup(number, { insulators: true, slabs: number % 3 === 0, tilt: number % 2 === 0 });
    const setup = soundSetup({ ...plain, probing: { ...plain.probing, levels: 3 + (number % 9), pointsPerLevel: 1 + (number % 11) } });
    const field = solved(setup, "live");
    const plan = planned(setup, field);
    expectSound(setup, field, plan);
    expect(pointsOf(plan).length).toBeGreaterThan(0);
  });
});
