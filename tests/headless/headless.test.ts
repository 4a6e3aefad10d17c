import { existsSync, readdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { barsWithBlock, barsWithLooseRing, bench, differences, headless, headlessByNpm } from "./command";

/** The headless command as a child process, held to the contract of the setup file and the command. */

const place = bench();
let ringFile = "";
let blockFile = "";

beforeAll(() => {
  ringFile = place.file("ring.fieldtray.json", barsWithLooseRing);
  blockFile = place.file("block.fieldtray.json", barsWithBlock);
  // Builds what is stale, so that the tests below run the command of this source.
  expect(headlessByNpm("--help").exitCode).toBe(0);
}, 180_000);
afterAll(() => place.clear());

const report = (...args: string[]) => {
  const { exitCode, stdout, stderr } = headless(...args);
  expect(exitCode, stderr).toBe(0);
  return JSON.parse(stdout);
};

describe("solve", () => {
  const sample = {
    setupId: "K7Q2-9F3A",
    quality: "print",
    numerics: { pitchMm: 0.5, unknowns: 240000, iterations: 7, relativeResidual: 3e-10, elapsedMs: 180 },
    resistanceOhm: 812.4,
    resistanceErrorOhm: 0.2,
    currentA: 0.00739,
    shapeFactor: 2.051,
    conductors: [{ id: "A", role: "electrode", volts: 0, currentA: -0.00739 }],
    at: [{ xMm: 150, yMm: 100, inside: null, volts: null, voltsError: null, fieldVPerM: null, directionDeg: null }],
  };

  it("through npm prints the contract's keys and nothing but JSON, at print quality unless told otherwise", () => {
    const { exitCode, stdout, stderr } = headlessByNpm("solve", ringFile, "--at", "150,100 100,30");
    expect(exitCode, stderr).toBe(0);
    const solved = JSON.parse(stdout);
    expect(differences(solved, sample)).toEqual([]);
    expect(solved.quality).toBe("print");
    expect(solved.setupId).toMatch(/^[0-9A-HJKMNP-TV-Z]{4}-[0-9A-HJKMNP-TV-Z]{4}$/);
    expect(solved.at).toHaveLength(2);
  });

  it("gives a resistance that agrees with volts, current and shape factor: R = V/I = 1/(σ h S)", () => {
    const { resistanceOhm, currentA, shapeFactor } = report("solve", ringFile, "--quality", "live");
    expect(resistanceOhm).toBeCloseTo(6 / currentA, 4);
    expect(resistanceOhm).toBeCloseTo(1 / (0.05 * 0.012 * shapeFactor), 4);
  });

  it("lets the current in at one bar and out at the other, and none through the loose ring", () => {
    const { conductors, currentA } = report("solve", ringFile, "--quality", "live");
    expect(conductors.map(({ id, role }: { id: string; role: string }) => [id, role])).toEqual([
      ["A", "electrode"],
      ["B", "electrode"],
      ["C", "floating"],
    ]);
    const [a, b, c] = conductors;
    expect(b.currentA).toBe(currentA);
    expect(a.currentA).toBe(-currentA);
    expect(c.currentA).toBe(0);
    expect([a.volts, b.volts]).toEqual([0, 6]);
    // Midway between equal bars, by symmetry.
    expect(Math.abs(c.volts - 3)).toBeLessThanOrEqual(c.voltsError);
  });

  it("reads volts in metal, in the water of a ring and in open water, and null in an insulator and outside the tray", () => {
    const inRing = report("solve", ringFile, "--quality", "live", "--at", "65,100 121.5,100 150,110 100,30 -5,-5 310,100").at;
    const [bar, ring, water, open, left, right] = inRing;
    expect(bar).toMatchObject({ inside: "A", volts: 0, fieldVPerM: 0 });
    expect(ring).toMatchObject({ inside: "C", fieldVPerM: 0 });
    expect(water.inside).toBeNull();
    expect(Math.abs(water.volts - ring.volts)).toBeLessThanOrEqual(water.voltsError + ring.voltsError);
    expect(open.inside).toBeNull();
    expect(open.volts).toBeGreaterThan(0);
    expect(open.volts).toBeLessThan(3);
    expect(open.fieldVPerM).toBeGreaterThan(0);
    // The field points from the positive bar to the negative one: to the left.
    expect(Math.abs(open.directionDeg)).toBeGreaterThan(90);
    expect(left).toMatchObject({ inside: null, volts: null });
    expect(right).toMatchObject({ xMm: 310, yMm: 100, inside: null, volts: null });
    const [block] = report("solve", blockFile, "--quality", "live", "--at=150,100").at;
    expect(block).toMatchObject({ inside: "D", volts: null });
  });

  it("gives no resistance between more than two potentials, but every current", () => {
    const three = structuredClone(barsWithLooseRing);
    Object.assign(three.parts[2], { role: "electrode", tap: 0.25 });
    const solved = report("solve", place.file("three.json", three), "--quality", "live");
    expect(solved.resistanceOhm).toBeNull();
    expect(solved.resistanceErrorOhm).toBeNull();
    expect(solved.shapeFactor).toBeNull();
    const currents: number[] = solved.conductors.map((conductor: { currentA: number }) => conductor.currentA);
    expect(Math.abs(currents.reduce((sum, current) => sum + current, 0))).toBeLessThan(1e-6 * solved.currentA);
  });

  it("takes the qualities by name, finer ones with smaller bounds", () => {
    const [live, print] = ["live", "print"].map((quality) => report("solve", blockFile, "--quality", quality));
    expect([live.quality, print.quality]).toEqual(["live", "print"]);
    expect(print.numerics.pitchMm).toBeLessThan(live.numerics.pitchMm);
    expect(print.resistanceErrorOhm).toBeLessThan(live.resistanceErrorOhm);
  });
});

describe("probes", () => {
  it("prints the contract's keys: even levels, numbered points with what the meter should read, and checks of the loose ring", () => {
    const point = { n: 1, xMm: 83.5, yMm: 100, volts: 0.748, voltsError: 0.0003, voltsPerMm: 0.037, bandV: 0.06 };
    const plan = report("probes", ringFile);
    const sample = {
      setupId: "K7Q2-9F3A",
      spanV: [0, 6],
      levels: [{ volts: 0.75, note: null, points: [point] }],
      checks: [{ ...point, inside: null }],
    };
    expect(differences(plan, sample)).toEqual([]);
    expect(plan.spanV).toEqual([0, 6]);
    expect(plan.levels.map((level: { volts: number }) => level.volts)).toEqual([0.75, 1.5, 2.25, 3, 3.75, 4.5, 5.25]);
    const points: { n: number }[] = [...plan.levels.flatMap((level: { points: { n: number }[] }) => level.points), ...plan.checks];
    expect(points.map(({ n }) => n).sort((a, b) => a - b)).toEqual(points.map((_, index) => index + 1));
    expect(plan.checks.map((check: { inside: string | null }) => check.inside)).toContain("C");
  });

  it("tells what solve tells at the same place", () => {
    const [{ xMm, yMm, volts }] = report("probes", blockFile).levels[2].points;
    expect(report("solve", blockFile, "--at", `${xMm},${yMm}`).at[0].volts).toBe(volts);
  });
});

describe("check", () => {
  const countsLine = /^\d+ stop, \d+ caution, \d+ note$/;

  it("prints findings with the contract's keys and closes on the count by severity", () => {
    const direct = structuredClone(barsWithLooseRing);
    direct.supply.waveform = "dc";
    const { exitCode, stdout, stderr } = headless("check", place.file("dc.json", direct));
    expect(exitCode).toBe(0);
    const checked = JSON.parse(stdout);
    const text = "text";
    const finding = { code: text, severity: text, message: text, measured: text, limit: text, source: text, remedy: text, partIds: [text] };
    expect(differences(checked, { setupId: "K7Q2-9F3A", counts: { stop: 0, caution: 1, note: 2 }, findings: [finding] })).toEqual([]);
    expect(checked.findings.map(({ code }: { code: string }) => code)).toContain("dc-polarises");
    const lastLine = stderr.trimEnd().split("\n").at(-1) ?? "";
    expect(lastLine).toMatch(countsLine);
    const { stop, caution, note } = checked.counts;
    expect(lastLine).toBe(`${stop} stop, ${caution} caution, ${note} note`);
    expect(stop + caution + note).toBe(checked.findings.length);
  });

  it("of a setup that cannot be planned still prints what is wrong, and is done", () => {
    const lone = { ...barsWithLooseRing, parts: barsWithLooseRing.parts.slice(0, 1) };
    const { exitCode, stdout, stderr } = headless("check", place.file("lone.json", lone));
    expect(exitCode).toBe(0);
    expect(JSON.parse(stdout).findings[0]).toMatchObject({ code: "no-potential-difference", severity: "stop" });
    expect(stderr.trimEnd().split("\n").at(-1)).toMatch(countsLine);
  });
});

describe("sheets", () => {
  it("writes a PDF that begins and ends as one, and says what it holds", () => {
    const out = join(place.folder, "pack.pdf");
    const said = report("sheets", ringFile, "--out", out, "--paper", "a3", "--only", "template,probe-table", "--date", "2026-12-01");
    expect(said).toMatchObject({ out, paper: "a3", sheets: ["template", "probe-table"], printerScale: [1, 1], date: "2026-12-01" });
    const pdf = readFileSync(out).toString("latin1");
    expect(pdf.startsWith("%PDF-")).toBe(true);
    expect(pdf.trimEnd().endsWith("%%EOF")).toBe(true);
    expect(pdf.match(/\/Type \/Page\b/g)).toHaveLength(said.pages);
  });

  it("writes the same bytes again for the same setup and date, over the older file", () => {
    const out = join(place.folder, "same.pdf");
    writeFileSync(out, "older");
    const packs = [0, 1].map(() => {
      report("sheets", ringFile, "--out", out, "--only", "template", "--date", "2026-12-01");
      return readFileSync(out);
    });
    expect(packs[0]?.equals(packs[1] ?? new Uint8Array())).toBe(true);
    expect(readdirSync(place.folder).filter((name) => name.includes(".part"))).toEqual([]);
  });

  it.each([
    ["no file to write", [], "--out"],
    ["a folder that does not exist", ["--out", "{folder}/nowhere/pack.pdf"], "a folder that exists"],
    ["a folder instead of a file", ["--out", "{folder}"], "not a folder"],
    ["an unknown paper", ["--out", "{folder}/wrong.pdf", "--paper", "a5"], "a4, a3, a2, letter, tabloid"],
    ["an unknown sheet", ["--out", "{folder}/wrong.pdf", "--only", "template,poster"], '"poster"'],
    ["a printer that is too far off", ["--out", "{folder}/wrong.pdf", "--printer-scale", "0.9,1"], "0.95 to 1.05"],
    ["a scale that is no pair", ["--out", "{folder}/wrong.pdf", "--printer-scale", "1"], "two numbers X,Y"],
    ["a day that is none", ["--out", "{folder}/wrong.pdf", "--date", "2026-02-30"], "YYYY-MM-DD"],
  ])("with %s ends with 2, names the option and writes nothing", (_, options, words) => {
    const before = readdirSync(place.folder);
    const { exitCode, stdout, stderr } = headless("sheets", ringFile, ...options.map((word) => word.replace("{folder}", place.folder)));
    expect(exitCode).toBe(2);
    expect(stdout).toBe("");
    expect(stderr).toContain(words);
    expect(readdirSync(place.folder)).toEqual(before);
  });
});

describe("a setup that is valid but cannot be planned", () => {
  const overlapping = {
    ...barsWithLooseRing,
    parts: barsWithLooseRing.parts.map((part) => (part.id === "C" ? { ...part, xMm: 70 } : part)),
  };
  it.each(["solve", "probes", "sheets"])("ends %s with 3 and says why", (verb) => {
    const file = place.file("overlapping.json", overlapping);
    const out = join(place.folder, "never.pdf");
    const { exitCode, stdout, stderr } = headless(verb, file, ...(verb === "sheets" ? ["--out", out] : []));
    expect(exitCode).toBe(3);
    expect(stdout).toBe("");
    expect(stderr).toMatch(/Left bar.*Loose ring.* overlap/);
    expect(existsSync(out)).toBe(false);
  });
});
