import { describe, expect, it } from "vitest";
import { benchOf } from "../../../../renderer/engine/bench/bench";
import { edgeLabels } from "../../../../renderer/panels/bench/edge-labels";
import { type ChartFrame, chartEnds } from "../../../../renderer/panels/bench/region-geometry";
import { channel, channelFacts } from "../../engine/bench/trays";

const labelsFor = (change: Parameters<typeof channel>[0]) => {
  const setup = channel(change);
  const { region } = benchOf(setup, channelFacts(setup));
  const frame: ChartFrame = { left: 42, top: 10, width: 320, height: 220, ...chartEnds(region, [setup.water.depthMm, setup.supply.volts]) };
  return edgeLabels(frame, region);
};

describe("names at the edges", () => {
  it("stand at every edge that the chart shows, and at no other", () => {
    const names = labelsFor({}).map((label) => label.text);
    expect(names).toEqual(
      expect.arrayContaining(["wet hands", "readable gradient", "tilt of the tray", "height of the parts", "freeboard"]),
    );
    // 1 A would take hundreds of volts.
    expect(names).not.toContain("supply current");
  });

  it("keep off one another where many edges meet", () => {
    const labels = labelsFor({
      supply: { waveform: "dc", volts: 20 },
      water: { conductivityUsPerCm: 9000, salt: "sodium-chloride" },
    }).filter((label) => !label.upright);
    expect(labels.length).toBeGreaterThan(3);
    for (const [index, one] of labels.entries()) {
      for (const other of labels.slice(index + 1)) {
        const apart = Math.abs(one.y - other.y) >= 12 || one.x < other.x - other.text.length * 6 || other.x < one.x - one.text.length * 6;
        expect(apart, `${one.text} and ${other.text}`).toBe(true);
      }
    }
  });
});
