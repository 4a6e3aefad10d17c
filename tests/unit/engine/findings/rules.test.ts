import { describe, expect, it } from "vitest";
import { benchOf } from "../../../../renderer/engine/bench/bench";
import { findingsOf, geometryFindings } from "../../../../renderer/engine/findings/all-findings";
import { SAFETY_SENTENCE } from "../../../../renderer/engine/findings/limits";
import type { Finding, ProbePlan, ProbePoint } from "../../../../shared-types/plan";
import { channel, channelFacts } from "../bench/trays";
import { bars, type Change, dc, floatingAt, TABLE } from "./rule-cases";

const disc = (id: string, xMm: number, more: object) => ({ id, xMm, yMm: 100, shape: { kind: "disc", diameterMm: 20 }, ...more });

/** The probe plan of a rule that does not look at it. */
const NO_PROBING: ProbePlan = { spanV: [0, 6], levels: [], checks: [] };

function findings(change: Change, probing: ProbePlan = NO_PROBING): readonly Finding[] {
  const setup = channel(change);
  const facts = channelFacts(setup);
  return findingsOf(setup, benchOf(setup, facts), facts, probing);
}

/** What a person would stumble over. */
function readable(text: string): void {
  expect(text).not.toMatch(/NaN|undefined|null|Infinity|e-\d|\d\.\d{5}/);
  expect(text).toMatch(/^[A-Z0-9“]/);
  expect(text).toMatch(/[.”]$/);
  expect(text.length).toBeLessThan(280);
}

describe("each rule", () => {
  it.each(TABLE.map((row) => [row.code, row.severity, row] as const))(
    "%s (%s) is silent just inside its limit and speaks just outside",
    (_code, _severity, row) => {
      const of = (change: Change) => findings(change).filter((finding) => finding.code === row.code && finding.severity === row.severity);
      expect(of(row.inside)).toEqual([]);
      const [found] = of(row.outside);
      expect(found).toBeDefined();
      expect(found.message).toMatch(row.says);
      readable(found.message);
      readable(found.remedy);
      for (const text of [found.measured, found.limit, found.source]) {
        expect(text).not.toBe("");
        expect(text).not.toMatch(/NaN|undefined|null|Infinity/);
      }
      expect(found.remedy.endsWith(SAFETY_SENTENCE)).toBe(row.safety === true);
    },
  );

  it("a part of exactly the tray's width, wall to wall, is legal", () => {
    expect(geometryFindings(channel()).filter((finding) => finding.severity === "stop")).toEqual([]);
  });

  it("a sound bench at 6 V AC has nothing said of it, but that its template needs tiles", () => {
    expect(findings({}).map((finding) => finding.code)).toEqual(["template-tiles"]);
  });

  it("two loose conductors that touch are not two", () => {
    const parts = [...floatingAt(100), disc("D", 120, { role: "floating" })];
    expect(findings({ parts }).find((finding) => finding.code === "floating-touches")?.partIds).toEqual(["C", "D"]);
  });

  it("an insulator may touch metal", () => {
    const parts = [...bars, disc("I", 60, { role: "insulator" })];
    expect(findings({ parts }).filter((finding) => finding.severity === "stop")).toEqual([]);
  });

  it("weak sources ask for the current edition", () => {
    const found = findings({ supply: { volts: 9.5 } }).find((finding) => finding.code === "open-circuit-unknown");
    expect(found?.source).toMatch(/check the current edition$/);
  });

  it("lists the gravest first", () => {
    const order = findings(dc(70, { water: { salt: "sodium-chloride" } })).map((finding) =>
      ["stop", "caution", "note"].indexOf(finding.severity),
    );
    expect(order).toEqual([...order].sort((a, b) => a - b));
    expect(order.length).toBeGreaterThan(3);
  });
});

describe("levels that the probe cannot serve", () => {
  const point: ProbePoint = {
    n: 1,
    xMm: 100,
    yMm: 100,
    inside: null,
    volts: 3,
    voltsError: 0,
    voltsPerMm: 0.04,
    directionDeg: 0,
    bandV: 0.1,
  };
  const plan = (counts: readonly number[]): ProbePlan => ({
    spanV: [0, 6],
    levels: counts.map((count, index) => ({ volts: index + 1, note: null, points: Array.from({ length: count }, () => point) })),
    checks: [],
  });

  it.each([
    ["nothing", [7, 7], undefined],
    ["too-few-points", [7, 6], "note"],
    ["level-unreachable", [7, 0], "caution"],
  ] as const)("%s is said of lines with %j points", (code, counts, severity) => {
    const found = findings({}, plan(counts)).filter((finding) => /points|level/.test(finding.code));
    expect(found.map((finding) => finding.severity)).toEqual(severity === undefined ? [] : [severity]);
    if (severity === undefined) return;
    expect(found[0].code).toBe(code);
    expect(found[0].message).toContain("2 V");
    readable(found[0].message);
  });
});
