import { readFileSync } from "node:fs";
import { expect, it } from "vitest";
import { z } from "zod";
import { createPlanner } from "../../renderer/engine/plan";
import { parseSetupText } from "../../shared-types/parse-setup";
import { setupSchema } from "../../shared-types/setup";

/** The README shows a setup, a real answer and every key: all three are held to the program. */

const readme = readFileSync(new URL("../../README.md", import.meta.url), "utf8");

function blockAfter(mark: string): string {
  const start = readme.indexOf(mark);
  expect(start, mark).toBeGreaterThan(0);
  const from = readme.indexOf("\n", start) + 1;
  return readme.slice(from, readme.indexOf("```", from));
}

it("the README's setup solves to the README's answer", async () => {
  const shown = JSON.parse(blockAfter("$ npm run --silent headless -- solve"));
  const parsed = parseSetupText(blockAfter("```json"));
  expect(parsed.ok).toBe(true);
  if (!parsed.ok) return;
  const planner = createPlanner();
  const outcome = await planner.plan(parsed.value, "print");
  expect(outcome.ok).toBe(true);
  if (!outcome.ok) return;
  const { plan } = outcome;
  expect(plan.setupId).toBe(shown.setupId);
  expect(Math.abs((plan.resistanceOhm?.value ?? 0) - shown.resistanceOhm)).toBeLessThanOrEqual(2 * shown.resistanceErrorOhm);
  expect(Math.abs((plan.shapeFactor?.value ?? 0) - shown.shapeFactor)).toBeLessThanOrEqual(2 * shown.shapeFactorError);
  expect(plan.conductors.map(({ id }) => id)).toEqual(shown.conductors.map(({ id }: { id: string }) => id));
  const places = shown.at.map(({ xMm, yMm }: { xMm: number; yMm: number }) => [xMm, yMm]);
  planner.sample(parsed.value, places)?.forEach(({ volts }, index) => {
    expect(Math.abs((volts ?? Number.NaN) - shown.at[index].volts)).toBeLessThanOrEqual(2 * shown.at[index].voltsError);
  });
});

function* keysOf(schema: unknown): Generator<string> {
  if (typeof schema !== "object" || schema === null) return;
  for (const [word, value] of Object.entries(schema)) {
    if (word === "properties") yield* Object.keys(value);
    yield* keysOf(value);
  }
}

it("the README names every key of the setup file", () => {
  const keys = new Set(keysOf(z.toJSONSchema(setupSchema, { io: "input" })));
  expect(keys.size).toBeGreaterThan(50);
  expect([...keys].filter((key) => !readme.includes(`\`${key}\``) && !readme.includes(`\`${key}[]\``))).toEqual([]);
});
