import { describe, expect, it } from "vitest";
import { createPlanner } from "../../../renderer/engine/plan";
import type { Quality } from "../../../shared-types/plan";
import { trayWith } from "../../reference/solved";

/** An insulating plate from wall to wall between two electrodes, thinner than the grid's cells, turned by so many degrees. */
const dividedTray = (thicknessMm: number, turnDeg: number) =>
  trayWith({
    parts: [
      { id: "A", role: "electrode", tap: 0, xMm: 10, yMm: 100, turnDeg: 90, shape: { kind: "bar", lengthMm: 10, widthMm: 6 } },
      { id: "B", role: "electrode", tap: 1, xMm: 290, yMm: 100, turnDeg: 90, shape: { kind: "bar", lengthMm: 10, widthMm: 6 } },
      { id: "W", role: "insulator", xMm: 150.13, yMm: 100, turnDeg, shape: { kind: "bar", lengthMm: 300, widthMm: thicknessMm } },
    ],
  });

const TURNS = [90, 89, 80, 67, 53, 45, 128];
const THICKNESSES = [0.1, 0.3, 1, 2];

describe("a thin plate from wall to wall lets no current through", () => {
  it.each(TURNS.flatMap((turn) => THICKNESSES.map((thickness) => [thickness, turn] as const)))(
    "%d mm thick, turned by %d°",
    async (thickness, turn) => {
      const qualities: readonly Quality[] = turn === 53 ? ["live", "print"] : ["live"];
      for (const quality of qualities) {
        const outcome = await createPlanner().plan(dividedTray(thickness, turn), quality);
        expect(outcome.ok ? `planned with ${outcome.plan.currentA.value} A at ${quality}` : outcome.refusal.code).toBe("no-current-path");
      }
    },
  );
});
