import { expect, it } from "vitest";
import { createPlanner } from "../../../../renderer/engine/plan";
import { trayWith } from "../../../reference/solved";

const bar = (id: string, xMm: number, tap: number) => ({
  id,
  role: "electrode",
  tap,
  xMm,
  yMm: 100,
  turnDeg: 90,
  shape: { kind: "bar", lengthMm: 80, widthMm: 8 },
});
const wall = (id: string, xMm: number) => ({ id, role: "insulator", xMm, yMm: 100, shape: { kind: "bar", lengthMm: 6, widthMm: 200 } });

it("electrodes with an insulating wall between them have no field: the plan is refused and says why", async () => {
  const outcome = await createPlanner().plan(trayWith({ parts: [bar("A", 60, 0), bar("B", 240, 1), wall("W", 150)] }), "live");
  expect(outcome.ok).toBe(false);
  if (!outcome.ok) {
    expect(outcome.refusal.code).toBe("no-current-path");
    expect(outcome.refusal.message).toContain("No water joins electrodes at different taps (A and B)");
    expect(outcome.refusal.findings[0].severity).toBe("stop");
  }
});

it("an electrode behind a wall carries no current and is named; the others are planned", async () => {
  const outcome = await createPlanner().plan(
    trayWith({ parts: [bar("A", 60, 0), bar("B", 150, 1), bar("C", 260, 1), wall("W", 210)] }),
    "live",
  );
  expect(outcome.ok).toBe(true);
  if (outcome.ok) {
    const found = outcome.plan.findings.find(({ code }) => code === "electrode-cut-off");
    expect(found?.partIds).toEqual(["C"]);
    const [, , c] = outcome.plan.conductors;
    expect(Math.abs(c.currentA)).toBeLessThan(1e-9 * outcome.plan.currentA.value);
  }
});

it("a loose part that an insulating ring shuts off has no determined potential, and the plan says so", async () => {
  const shut = [
    { id: "R", role: "insulator", xMm: 150, yMm: 100, shape: { kind: "ring", outerMm: 60, innerMm: 50 } },
    { id: "D", role: "floating", xMm: 150, yMm: 100, shape: { kind: "disc", diameterMm: 10 } },
  ];
  const outcome = await createPlanner().plan(trayWith({ parts: [bar("A", 60, 0), bar("B", 240, 1), ...shut] }), "live");
  expect(outcome.ok).toBe(true);
  if (outcome.ok) {
    expect(outcome.plan.findings.find(({ code }) => code === "potential-undetermined")?.partIds).toEqual(["D"]);
    expect(outcome.plan.conductors.find(({ id }) => id === "D")?.volts).toBeNaN();
  }
});

it("a loose bar that touches both electrodes is a short circuit through it", async () => {
  const parts = [
    { id: "A", role: "electrode", tap: 0, xMm: 60, yMm: 100, shape: { kind: "bar", lengthMm: 40, widthMm: 40 } },
    { id: "B", role: "electrode", tap: 1, xMm: 240, yMm: 100, shape: { kind: "bar", lengthMm: 40, widthMm: 40 } },
    { id: "C", role: "floating", xMm: 150, yMm: 100, shape: { kind: "bar", lengthMm: 140, widthMm: 10 } },
  ];
  const outcome = await createPlanner().plan(trayWith({ parts }), "live");
  expect(outcome.ok).toBe(false);
  if (!outcome.ok) expect(outcome.refusal).toMatchObject({ code: "short-circuit", partIds: expect.arrayContaining(["A", "B", "C"]) });
});
