import { describe, expect, it } from "vitest";
import { createPlanner } from "../../../renderer/engine/plan";
import type { FieldReading, Plan, PlanRefusal } from "../../../shared-types/plan";
import { ODD_NAMES, type OddName, oddSetup } from "./odd-setups";
import { expectSoundOrRefused } from "./sound-or-refused";

interface Answer {
  readonly plan: Plan;
  readonly read: (...places: readonly (readonly [number, number])[]) => readonly FieldReading[];
}

async function planned(name: OddName): Promise<Answer> {
  const planner = createPlanner();
  const setup = oddSetup(name);
  const outcome = await planner.plan(setup, "live");
  if (!outcome.ok) throw new Error(outcome.refusal.message);
  return { plan: outcome.plan, read: (...places) => planner.sample(setup, places) ?? [] };
}

async function refused(name: OddName): Promise<PlanRefusal> {
  const outcome = await createPlanner().plan(oddSetup(name), "live");
  if (outcome.ok) throw new Error("planned");
  return outcome.refusal;
}

const conductor = ({ plan }: Answer, id: string) => {
  const found = plan.conductors.find((one) => one.id === id);
  if (found === undefined) throw new Error(`no conductor ${id}`);
  return found;
};
const codes = (findings: Plan["findings"]): string[] => findings.map(({ code }) => code);

describe("whatever is drawn", () => {
  it.each(ODD_NAMES)("%s is planned with sound numbers, or refused in words", async (name) => {
    await expectSoundOrRefused(oddSetup(name));
  });
});

describe("no water between the electrodes is refused, and the reason is named:", () => {
  it.each([
    "an insulating plate of 0.5 mm across the whole tray",
    "an insulating plate across the tray, turned",
    "a wedge that runs dry under one electrode",
    "a tray tilted by 45° both ways",
    "one of two electrodes inside an insulating frame",
    "a dry slab from wall to wall",
    "an electrode outside the tray",
  ] as const)("%s", async (name) => {
    expect((await refused(name)).code).toBe("no-current-path");
  });

  it.each(["a loose bar that joins both electrodes", "electrodes that touch at a corner"] as const)(
    "%s is a short circuit",
    async (name) => {
      expect((await refused(name)).code).toBe("short-circuit");
    },
  );
});

describe("metal", () => {
  it("across the whole tray divides the voltage midway", async () => {
    const answer = await planned("a loose bar across the whole tray");
    expect(conductor(answer, "C").volts).toBeCloseTo(3, 5);
    const [quarter] = answer.read([77.5, 60]);
    expect(quarter?.volts).toBeCloseTo(1.5, 5);
  });

  it("as rings in rings keeps the water between and inside them at the outermost ring's potential", async () => {
    const answer = await planned("a ring in a ring round a disc");
    const { volts } = conductor(answer, "R1");
    // Off the middle of the tray, so that half of the supply is not the answer by symmetry alone.
    expect(volts).toBeLessThan(2.9);
    for (const id of ["R2", "D"]) expect(conductor(answer, id).volts).toBeCloseTo(volts, 5);
    for (const { volts: inside } of answer.read([150, 140], [145, 125], [160, 82])) expect(inside).toBeCloseTo(volts, 5);
  });

  it("drawn as a polygon of 500 vertices acts as the disc that it is", async () => {
    const [drawn, round] = [await planned("a loose disc drawn as a polygon of 500 vertices"), await planned("the same disc as a disc")];
    // The polygon's area is 2π²/(3·500²) = 2.6e-5 smaller than the disc's.
    expect((drawn.plan.shapeFactor?.value ?? 0) / (round.plan.shapeFactor?.value ?? 1)).toBeCloseTo(1, 4);
  });

  it("closed but for one degree acts as a ring outside, and the water inside is nearly at its potential", async () => {
    const [open, closed] = [await planned("a loose arc closed but for one degree"), await planned("the same arc closed to a ring")];
    expect((open.plan.shapeFactor?.value ?? 0) / (closed.plan.shapeFactor?.value ?? 1)).toBeCloseTo(1, 3);
    const [inside] = open.read([150, 110]);
    expect(Math.abs((inside?.volts ?? Number.NaN) - conductor(open, "C").volts)).toBeLessThan(0.01);
  });

  it("too small for the grid still draws the current of a disc of its size", async () => {
    // By images: a line source at (150.3, 100.2), a plate at x = 10 mm, insulating walls elsewhere; disc radius 0.05 mm (derived).
    const { shapeFactor } = (await planned("an electrode disc of 0.1 mm")).plan;
    expect(Math.abs((shapeFactor?.value ?? 0) - 0.578362)).toBeLessThanOrEqual(Math.max(shapeFactor?.error ?? 0, 0.002 * 0.578362));
  });

  it("a hair's breadth apart draws the current of the gap", async () => {
    // 100 mm by 0.02 mm, edge effects some per mille.
    const { shapeFactor } = (await planned("electrodes 0.02 mm apart")).plan;
    expect(shapeFactor?.value).toBeGreaterThan(5000);
    expect(shapeFactor?.value).toBeLessThan(5100);
  });

  it("that touches at the same tap shares the current and does not upset the balance", async () => {
    const { plan } = await planned("electrodes that touch at the same tap");
    const sum = plan.conductors.reduce((total, { currentA }) => total + currentA, 0);
    expect(Math.abs(sum)).toBeLessThanOrEqual(1e-6 * plan.currentA.value);
  });
});

describe("water", () => {
  it("that no electrode reaches has no potential, and a finding says so", async () => {
    const answer = await planned("water inside an insulating ring");
    const [inside] = answer.read([150, 100]);
    expect(inside).toMatchObject({ inside: null, volts: null });
    expect(codes(answer.plan.findings).join(" ")).toMatch(/undetermined|enclosed/);
  });

  it("over a slab larger than the tray is merely shallower", async () => {
    const [plain, raised] = [await planned("no slab"), await planned("a slab larger than the tray")];
    expect((raised.plan.currentA.value / plain.plan.currentA.value) * (12 / 7)).toBeCloseTo(1, 6);
    const places = [
      [100, 40],
      [180, 130],
    ] as const;
    const [before, after] = [plain.read(...places), raised.read(...places)];
    for (const [index, { volts }] of after.entries()) expect(volts).toBeCloseTo(before[index]?.volts ?? Number.NaN, 6);
  });

  it("does not flow over a slab that stands dry, however thick it is", async () => {
    const [thick, flush] = [await planned("a slab that stands out of the water"), await planned("a slab as thick as the water is deep")];
    expect(thick.plan.currentA.value).toBe(flush.plan.currentA.value);
    expect(thick.read([150, 100])[0]?.volts).toBeNull();
    expect(thick.plan.currentA.value).toBeLessThan(0.7 * (await planned("no slab")).plan.currentA.value);
  });

  it("through a slit is driven by half the voltage on either side", async () => {
    const answer = await planned("an insulating plate with a slit");
    const [slit, plate, before, behind] = answer.read([150, 100], [150, 50], [100, 100], [200, 100]);
    expect(Math.abs((slit?.volts ?? Number.NaN) - 3)).toBeLessThanOrEqual(slit?.voltsError ?? 0);
    expect(plate).toMatchObject({ inside: "W1", volts: null });
    expect(before?.volts).toBeLessThan(0.6);
    expect(behind?.volts).toBeGreaterThan(5.4);
  });
});

it("a layout a hundred times as large has the same shape factor", async () => {
  const [small, large] = [await planned("a tray of 20 mm"), await planned("a tray of 2000 mm")];
  expect((large.plan.shapeFactor?.value ?? 0) / (small.plan.shapeFactor?.value ?? 1)).toBeCloseTo(1, 9);
  expect(conductor(large, "R").volts).toBeCloseTo(conductor(small, "R").volts, 8);
});
