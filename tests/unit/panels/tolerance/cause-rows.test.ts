import { expect, it } from "vitest";
import { causeRows } from "../../../../renderer/panels/tolerance/cause-rows";
import type { RankedCause } from "../../../../shared-types/tolerance";

const cause = (key: RankedCause["key"], share: number, partId: string | null = null): RankedCause => ({
  key,
  partId,
  unit: "mm",
  halfWidth: 0.5,
  share,
});
const PARTS = [{ id: "A", name: "Left bar" }];

it("both directions of a placing are one cause, told by how much and of what", () => {
  const rows = causeRows([cause("probe-x", 0.4), cause("probe-y", 0.21), cause("part-x", 0.3, "A"), cause("part-y", 0.09, "A")], PARTS, 6);
  expect(rows.map(({ text }) => text)).toEqual(["0.5 mm of probe placement: 61 %", "0.5 mm of place of Left bar: 39 %"]);
});

it("what needs no bar of its own is told together, and nothing is left out", () => {
  const rows = causeRows([cause("probe-x", 0.9), cause("part-x", 0.005, "A"), cause("depth", 0.095)], PARTS, 1);
  expect(rows.map(({ key }) => key)).toEqual(["probe ", "rest"]);
  expect(rows.reduce((sum, { share }) => sum + share, 0)).toBeCloseTo(1, 9);
});
