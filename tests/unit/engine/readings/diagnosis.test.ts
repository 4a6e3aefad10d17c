import { beforeAll, describe, expect, it } from "vitest";
import { createPlanner } from "../../../../renderer/engine/plan";
import { diagnose, LEAST_READINGS } from "../../../../renderer/engine/readings/diagnose";
import { judgeReading, pointsOf } from "../../../../renderer/engine/readings/judge";
import { type Sensitivities, sensitivitiesOf, type VoltsIn } from "../../../../renderer/engine/readings/sensitivities";
import { threeElectrodes } from "../../../../renderer/examples/three-electrodes";
import type { Plan, ProbePoint } from "../../../../shared-types/plan";
import type { Diagnosis, FaultKind, JudgedReading } from "../../../../shared-types/readings";
import type { Setup } from "../../../../shared-types/setup";

/**
 * Simulated trays: each fault is put into the tray and the tray is solved anew, noise of the band's standard uncertainty is drawn for every
 * reading, and the diagnosis sees the readings alone. Strength is the r.m.s. of the fault's shifts in standard uncertainties; of one wrong
 * reading, its shift in half-widths of the band, and half a band more: among so many readings a smaller one is seldom told from chance.
 */

const STRENGTHS = [2.5, 3.5, 5] as const;
const TRAYS_PER_FAULT = 100;
const setup: Setup = threeElectrodes.setup;

let plan: Plan;
let points: readonly ProbePoint[];
let sensitivities: Sensitivities;
let voltsIn: VoltsIn;
const planner = createPlanner();
beforeAll(async () => {
  const outcome = await planner.plan(setup, "live");
  if (!outcome.ok) throw new Error(outcome.refusal.message);
  plan = outcome.plan;
  points = pointsOf(plan.probing);
  const places = points.map(({ xMm, yMm }) => [xMm, yMm] as const);
  const perturbed = createPlanner();
  voltsIn = async (changed) => {
    if (!(await perturbed.plan(changed, "live")).ok) return null;
    return perturbed.sample(changed, places)?.map(({ volts }) => volts) ?? null;
  };
  const known = await sensitivitiesOf(
    setup,
    voltsIn,
    () => {},
    () => false,
  );
  if (known === null) throw new Error("stopped");
  sensitivities = known;
}, 60_000);

/** Mulberry32 and Box and Muller's pair: the same noise every time. */
function noiseFrom(start: number): () => number {
  let state = start;
  const uniform = (): number => {
    state = (state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) / 4294967296;
  };
  return () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());
}

/** A run in which each point is off by `shift` volts and by noise. */
const readWith = (shift: (point: ProbePoint, index: number) => number, noise: () => number): JudgedReading[] =>
  points.map((point, index) => {
    const volts = point.volts + shift(point, index) + (noise() * point.bandV) / 2;
    return judgeReading({ n: point.n, xMm: point.xMm, yMm: point.yMm, volts }, point);
  });
const diagnosed = (readings: readonly JudgedReading[]): Diagnosis =>
  diagnose(readings, sensitivities, plan.bench.meter.digitVolts, plan.spanV);

const rms = (shifts: readonly number[]): number =>
  Math.sqrt(shifts.reduce((sum, shift, index) => sum + ((2 * shift) / points[index].bandV) ** 2, 0) / shifts.length);

const isRight = ({ best, inseparable }: Diagnosis, kind: FaultKind, partId: string | null): boolean =>
  [best, ...inseparable].some((one) => one !== null && one.kind === kind && one.partId === partId);

/** Share of right diagnoses among trays with these shifts (V). */
function shareRight(kind: FaultKind, partId: string | null, shifts: readonly number[]): number {
  const noise = noiseFrom(20261201);
  const right = Array.from({ length: TRAYS_PER_FAULT }, () => diagnosed(readWith((_, index) => shifts[index], noise)));
  return right.filter((one) => isRight(one, kind, partId)).length / TRAYS_PER_FAULT;
}

/** Shifts (V) of a solved tray with a fault that grows until its r.m.s. is `strength`, or as far as the tray allows. */
async function solvedShifts(change: (size: number) => Setup, firstSize: number, strength: number): Promise<readonly number[]> {
  let size = firstSize;
  let reached: readonly number[] = [];
  for (let round = 0; round < 4; round++) {
    const volts = await voltsIn(change(size));
    const shifts = volts === null || volts.includes(null) ? [] : volts.map((one, index) => (one ?? Number.NaN) - points[index].volts);
    if (shifts.length === 0) {
      size *= 0.7;
      continue;
    }
    reached = shifts;
    if (Math.abs(rms(shifts) / strength - 1) < 0.05) break;
    size *= strength / rms(shifts);
  }
  expect(rms(reached)).toBeGreaterThan(2);
  return reached;
}

it("a clean tray is told to be clean in at least 95 of 100", () => {
  const noise = noiseFrom(7);
  const trays = Array.from({ length: 400 }, () => diagnosed(readWith(() => 0, noise)));
  expect(trays.filter(({ best }) => best?.kind === "none").length / trays.length).toBeGreaterThanOrEqual(0.95);
});

describe.each(STRENGTHS)("with a fault of %s times the noise the diagnosis is right in at least 90 of 100", (strength) => {
  it("supply off: all readings by one share", () => {
    const volts = points.map((point) => point.volts);
    expect(
      shareRight(
        "scale",
        null,
        volts.map((one) => (one * strength) / rms(volts)),
      ),
    ).toBeGreaterThanOrEqual(0.9);
  });

  it.each(setup.parts.filter(({ role }) => role === "electrode").map(({ id }) => id))("volts lost at electrode %s", async (id) => {
    const lost = (size: number): Setup => ({
      ...setup,
      parts: setup.parts.map((part) => (part.id === id && part.role === "electrode" ? { ...part, tap: part.tap + size } : part)),
    });
    const tap = setup.parts.flatMap((part) => (part.id === id && part.role === "electrode" ? [part.tap] : []))[0];
    expect(shareRight("electrode", id, await solvedShifts(lost, tap > 0.5 ? -0.02 : 0.02, strength))).toBeGreaterThanOrEqual(0.9);
  });

  it.each(["x", "y"] as const)("a tray that tilts along %s", async (axis) => {
    const key = axis === "x" ? "tiltXDeg" : "tiltYDeg";
    const tilted = (size: number): Setup => ({ ...setup, water: { ...setup.water, [key]: size } });
    expect(shareRight(`tilt-${axis}`, null, await solvedShifts(tilted, 1, strength))).toBeGreaterThanOrEqual(0.9);
  });

  it.each(setup.parts.map(({ id }) => id))("part %s displaced", async (id) => {
    const moved = (size: number): Setup => ({
      ...setup,
      parts: setup.parts.map((part) => (part.id === id ? { ...part, xMm: part.xMm + 0.8 * size, yMm: part.yMm + 0.6 * size } : part)),
    });
    expect(shareRight("displaced", id, await solvedShifts(moved, 1, strength))).toBeGreaterThanOrEqual(0.9);
  });

  it("metal that polarises while readings are taken", () => {
    const [low, high] = plan.spanV;
    const drift = points.map(({ volts }, turn) => (turn / (points.length - 1)) * ((low + high) / 2 - volts));
    expect(
      shareRight(
        "drift",
        null,
        drift.map((one) => (one * strength) / rms(drift)),
      ),
    ).toBeGreaterThanOrEqual(0.9);
  });

  it("one wrong reading, and which one", () => {
    const noise = noiseFrom(99);
    const right = Array.from({ length: TRAYS_PER_FAULT }, (_, tray) => {
      const wrong = tray % points.length;
      const { best } = diagnosed(
        readWith((point, index) => (index === wrong ? (tray % 2 === 0 ? 1 : -1) * (strength + 0.5) * point.bandV : 0), noise),
      );
      return best?.kind === "wrong-reading" && best.points[0] === points[wrong].n;
    });
    expect(right.filter(Boolean).length / TRAYS_PER_FAULT).toBeGreaterThanOrEqual(0.9);
  });

  it("readings of two points written into each other's row", () => {
    const noise = noiseFrom(5);
    let [tried, right] = [0, 0];
    for (let a = 0; a < points.length && tried < TRAYS_PER_FAULT; a++) {
      for (let b = a + 1; b < points.length && tried < TRAYS_PER_FAULT; b += 2) {
        const apart = Math.abs(points[a].volts - points[b].volts);
        const far = strength * Math.max(points[a].bandV, points[b].bandV);
        if (apart < far || apart > Math.max(2 * far, 1)) continue;
        tried++;
        const readings = readWith((_, index) => {
          if (index === a) return points[b].volts - points[a].volts;
          return index === b ? points[a].volts - points[b].volts : 0;
        }, noise);
        const { best } = diagnosed(readings);
        if (best?.kind === "swapped-points" && best.points.includes(points[a].n) && best.points.includes(points[b].n)) right++;
      }
    }
    expect(tried).toBeGreaterThan(20);
    expect(right / tried).toBeGreaterThanOrEqual(0.9);
  });
});

describe("what is said of a diagnosis", () => {
  it("two digits changed over are recognised in the reading that is off", () => {
    const at = points.findIndex(({ volts }) => Math.abs(volts - 1.5) < 0.04);
    const meant = Number(points[at].volts.toFixed(2));
    const digits = meant.toFixed(2);
    const written = Number(`${digits[2]}.${digits[0]}${digits[3]}`);
    const readings = readWith(
      (_, index) => (index === at ? written - points[at].volts : 0),
      () => 0,
    );
    const { best } = diagnosed(readings.map((one, index) => (index === at ? judgeReading({ ...one, volts: written }, points[at]) : one)));
    expect(best).toMatchObject({ kind: "wrong-reading", points: [points[at].n] });
    expect(best?.swappedDigitsVolts).toBeCloseTo(meant, 9);
  });

  it("a few readings explain nothing", () => {
    const few = readWith(
      (point) => point.bandV * 3,
      () => 0,
    ).slice(0, LEAST_READINGS - 1);
    expect(diagnosed(few).best).toBeNull();
  });

  it("the fitted size of a fault lies within its own uncertainty of the true one", () => {
    const noise = noiseFrom(3);
    const { best, clearness } = diagnosed(readWith((point) => -0.06 * point.volts, noise));
    expect(best?.kind).toBe("scale");
    const [{ value, uncertainty }] = best?.values ?? [];
    expect(Math.abs(value + 0.06)).toBeLessThan(3 * uncertainty);
    expect(clearness).not.toBe("hardly");
  });

  it("what no explanation fits is told so", () => {
    const { leavesChance } = diagnosed(
      readWith(
        (point, index) => (index % 2 === 0 ? 3 : -3) * point.bandV,
        () => 0,
      ),
    );
    expect(leavesChance).toBe(false);
  });
});
