import { expect } from "vitest";
import { createPlanner } from "../../../renderer/engine/plan";
import type { Setup } from "../../../shared-types/setup";

/**
 * Plans a setup at live quality and expects sound numbers everywhere or a refusal in words.
 * @returns whether it was planned.
 */
export async function expectSoundOrRefused(setup: Setup): Promise<boolean> {
  const planner = createPlanner();
  const outcome = await planner.plan(setup, "live");
  if (!outcome.ok) {
    const { refusal } = outcome;
    expect(refusal.message.length).toBeGreaterThan(20);
    expect(refusal.findings.map(({ code }) => code)).toContain(refusal.code);
    for (const id of refusal.partIds) expect(setup.parts.map((part) => part.id)).toContain(id);
    return false;
  }
  const { plan } = outcome;
  const [low, high] = plan.spanV;
  const slack = 1e-3 * (high - low);
  expect(plan.currentA.value).toBeGreaterThan(0);
  expect(Number.isFinite(plan.currentA.error)).toBe(true);
  expect(Math.abs(plan.conductors.reduce((sum, { currentA }) => sum + currentA, 0))).toBeLessThanOrEqual(1e-6 * plan.currentA.value);
  if (plan.resistanceOhm !== null) {
    expect(plan.resistanceOhm.value).toBeGreaterThan(0);
    expect(Number.isFinite(plan.resistanceOhm.error)).toBe(true);
  }
  for (const { volts, voltsError, role } of plan.conductors) {
    if (Number.isNaN(volts)) expect(role).toBe("floating");
    else {
      expect(volts).toBeGreaterThanOrEqual(low - slack);
      expect(volts).toBeLessThanOrEqual(high + slack);
      expect(Number.isFinite(voltsError)).toBe(true);
    }
  }
  const [lengthMm, widthMm] = [plan.picture.pitchXMm * (plan.picture.columns - 1), plan.picture.pitchYMm * (plan.picture.rows - 1)];
  const places = Array.from(
    { length: 400 },
    (_, k) => [((k % 20) + 0.37) * (lengthMm / 20), (Math.floor(k / 20) + 0.41) * (widthMm / 20)] as const,
  );
  for (const { volts, voltsError, fieldVPerM } of planner.sample(setup, places) ?? []) {
    if (volts === null) continue;
    expect(volts).toBeGreaterThanOrEqual(low - slack);
    expect(volts).toBeLessThanOrEqual(high + slack);
    expect(Number.isFinite(voltsError) && Number.isFinite(fieldVPerM)).toBe(true);
  }
  for (const point of [...plan.probing.levels.flatMap(({ points }) => points), ...plan.probing.checks]) {
    expect(Number.isFinite(point.volts) && Number.isFinite(point.bandV)).toBe(true);
  }
  return true;
}
