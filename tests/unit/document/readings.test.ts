import { expect, it } from "vitest";
import {
  addRun,
  clearReading,
  clearRun,
  describeRun,
  enterReading,
  freshRunId,
  removeFound,
  removeRun,
  runsOf,
  takeReadings,
} from "../../../renderer/document/commands/readings";
import { undoLabel } from "../../../renderer/document/document";
import { parseSetupText, setupText } from "../../../shared-types/parse-setup";
import { setupId } from "../../../shared-types/setup-id";
import { looseRing, openDocument } from "./fixtures";

const reading = (n: number, volts: number) => ({ n, xMm: 10 * n, yMm: 50, volts });

function withRun() {
  const document = openDocument();
  document.run(addRun("run-1", "Tray 1", "2026-12-01"));
  return document;
}

it("readings are steps that can be undone, each by its name", () => {
  const document = withRun();
  document.run(enterReading("run-1", reading(3, 1.2)));
  expect(undoLabel(document.getState())).toBe("enter reading 3");
  document.undo();
  expect(runsOf(document.getState().setup)[0].readings).toEqual([]);
  document.redo();
  expect(runsOf(document.getState().setup)[0].readings).toEqual([reading(3, 1.2)]);
  document.run(clearReading("run-1", reading(3, 0)));
  expect(undoLabel(document.getState())).toBe("clear reading 3");
  expect(runsOf(document.getState().setup)[0].readings).toEqual([]);
});

it("readings keep the order in which they were taken, also when one is entered anew", () => {
  const document = withRun();
  for (const n of [5, 2, 9, 2]) document.run(enterReading("run-1", reading(n, n === 2 ? document.getState().past.length : n)));
  expect(runsOf(document.getState().setup)[0].readings.map(({ n }) => n)).toEqual([5, 2, 9]);
});

it("the same reading entered twice is one step", () => {
  const document = withRun();
  document.run(enterReading("run-1", reading(3, 1.2)));
  const steps = document.getState().past.length;
  document.run(enterReading("run-1", reading(3, 1.2)));
  document.run(clearReading("run-1", reading(4, 0)));
  expect(document.getState().past.length).toBe(steps);
});

it("a table is taken as one step, found places behind those that are there", () => {
  const document = withRun();
  document.run(takeReadings("run-1", [reading(1, 1), reading(2, 2)], [{ volts: 3, xMm: 1, yMm: 2 }]));
  document.run(takeReadings("run-1", [], [{ volts: 3, xMm: 5, yMm: 6 }]));
  const [run] = runsOf(document.getState().setup);
  expect([run.readings.length, run.found.length]).toEqual([2, 2]);
  document.run(removeFound("run-1", 0));
  expect(runsOf(document.getState().setup)[0].found).toEqual([{ volts: 3, xMm: 5, yMm: 6 }]);
  document.run(clearRun("run-1", "Tray 1"));
  expect(runsOf(document.getState().setup)[0]).toMatchObject({ readings: [], found: [], name: "Tray 1" });
});

it("runs are kept apart, named, signed and removed; without the last the file has no readings", () => {
  const document = withRun();
  document.run(describeRun("run-1", { takenBy: "Prep room" }));
  document.run(addRun(freshRunId(document.getState().setup), "Tray 2", "2026-12-02"));
  document.run(enterReading("run-2", reading(1, 1)));
  expect(runsOf(document.getState().setup).map(({ id, takenBy, readings }) => [id, takenBy, readings.length])).toEqual([
    ["run-1", "Prep room", 0],
    ["run-2", "Prep room", 1],
  ]);
  document.run(describeRun("run-2", { name: "Tray B" }));
  expect(undoLabel(document.getState())).toBe("rename run Tray B");
  document.run(removeRun("run-1", "Tray 1"));
  document.run(removeRun("run-2", "Tray B"));
  expect("readings" in document.getState().setup).toBe(false);
});

it("readings leave the setup's id as it is, and a run keeps the id of its layout", () => {
  const document = withRun();
  document.run(enterReading("run-1", reading(3, 1.2)));
  const { setup } = document.getState();
  expect(setupId(setup)).toBe(setupId(looseRing));
  expect(runsOf(setup)[0].setupId).toBe(setupId(looseRing));
});

it("readings come back from the file as they were", () => {
  const document = withRun();
  document.run(takeReadings("run-1", [reading(1, -1.25)], [{ volts: 3, xMm: 1, yMm: 2 }]));
  const { setup } = document.getState();
  expect(parseSetupText(setupText(setup))).toEqual({ ok: true, value: setup });
});

it("wrong readings of a file are named with what is allowed", () => {
  const file = (readings: unknown) => parseSetupText(JSON.stringify({ ...looseRing, readings }));
  const messages = (readings: unknown) => {
    const parsed = file(readings);
    return parsed.ok ? [] : parsed.problems.map(({ message }) => message);
  };
  expect(messages({ version: 2, runs: [] }).join()).toContain("readings.version");
  expect(messages({ version: 1, runs: [{ id: "a" }, { id: "a" }] }).join()).toContain("an id that no other run has");
  expect(messages({ version: 1, runs: [{ id: "a", readings: [{ n: 1, xMm: 0, yMm: 0, volts: 9e9 }] }] }).join()).toContain("-2000 to 2000");
  expect(messages({ version: 1, runs: [{ id: "a", colour: "red" }] }).join()).toContain("not a key");
});
