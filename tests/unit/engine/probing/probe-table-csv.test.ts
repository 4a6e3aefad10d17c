import { describe, expect, it } from "vitest";
import { probeTableCsv } from "../../../../renderer/engine/probing/probe-table-csv";
import type { ProbePlan, ProbePoint } from "../../../../shared-types/plan";

const point = (n: number, inside: string | null): ProbePoint => ({
  n,
  xMm: 83.5,
  yMm: 100,
  inside,
  volts: 0.748,
  voltsError: 0.0003,
  voltsPerMm: 0.0371,
  directionDeg: 180,
  bandV: 0.0484,
});

const plan: ProbePlan = {
  spanV: [0, 6],
  levels: [{ volts: 0.75, note: null, points: [point(1, null)] }],
  checks: [point(2, 'ring "C", loose')],
};

describe("the probe table for a spreadsheet", () => {
  const lines = probeTableCsv(plan, 0.01).split("\r\n");

  it("has a header, a row a point and ends every line with CR LF (RFC 4180, section 2)", () => {
    expect(lines).toHaveLength(4);
    expect(lines[3]).toBe("");
    expect(lines[0].split(",")).toHaveLength(12);
    expect(lines[0]).toMatch(/^n,level_V,x_mm,y_mm,expected_V,/);
  });

  it("shows the expected reading to one digit of the meter and the band to a tenth of it", () => {
    expect(lines[1]).toBe("1,0.750,83.5,100.0,0.75,0.048,0.700,0.796,0.0371,180,,");
  });

  it("puts names with commas and quotes in quotes, and leaves the level of a check point empty", () => {
    expect(lines[2]).toBe('2,,83.5,100.0,0.75,0.048,0.700,0.796,0.0371,180,"ring ""C"", loose",');
  });
});
