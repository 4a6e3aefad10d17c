import { beforeAll, describe, expect, it } from "vitest";
import { EXAMPLES } from "../../../renderer/examples/all-examples";
import { type NumberRow, numberRows } from "../../../renderer/sheets/checklist-numbers";
import type { Page } from "../../../renderer/sheets/page";
import { packPdfSteps } from "../../../renderer/sheets/pdf";
import { PRESETS, SHEET_NAMES, SHEETS, type SheetName } from "../../../renderer/sheets/sheets";
import type { Plan } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import { soundSetup } from "../../reference/solved";
import { FONT_FILES, packOf, pdfOf, planned } from "./packs";
import { readPdf } from "./printed";

/** What is said on the pages: read back from the PDF by a reader that knows nothing of what wrote it. */

const pagesOf = (setup: Setup, plan: Plan, sheets: readonly SheetName[], more = {}): string[] =>
  readPdf("pdftotext", pdfOf(packOf(setup, plan, { sheets, ...more })), ["-layout"])
    .split("\f")
    .filter((page) => page.trim() !== "");
/** Words in a row, however the page breaks them. */
const flat = (words: string): string => words.replace(/\s+/g, " ");

const textsOn = ({ items }: Page): string[] => items.flatMap((item) => (item.kind === "text" ? [item.text] : []));

const { setup } = EXAMPLES[1];
let plan: Plan;
beforeAll(async () => {
  plan = await planned(setup);
});

const direct = (): Setup =>
  soundSetup({
    ...setup,
    supply: { ...setup.supply, waveform: "dc", volts: 9 },
    session: { ...setup.session, minutes: 60, trays: 4 },
  });

describe("the tray certificate", () => {
  const points = () => [...plan.probing.levels.flatMap((level) => level.points), ...plan.probing.checks];
  const withRun = (offBands: number): Setup => ({
    ...setup,
    readings: {
      version: 1,
      runs: [
        {
          id: "r1",
          name: "Tray 1",
          takenBy: "Group 4",
          takenOn: "2026-12-01",
          setupId: plan.setupId,
          readings: points().map(({ n, xMm, yMm, volts, bandV }) => ({ n, xMm, yMm, volts: volts + (n === 7 ? offBands * bandV : 0) })),
          found: [],
        },
      ],
    },
  });

  it("passes a tray that reads as predicted, with every reading, who took it, and the setup that it belongs to", () => {
    const words = flat(pagesOf(withRun(0), plan, ["certificate"]).join(" "));
    for (const said of [
      "Tray certificate: Tray 1",
      "PASS: every value lies within its band",
      "Read by Group 4 on 2026-12-01",
      plan.setupId,
      "Signature",
    ])
      expect(words).toContain(said);
    expect(words.match(/ within /g)?.length).toBeGreaterThanOrEqual(points().length);
  });

  it("fails a tray whose point 7 is three bands off, and says which point and how far", () => {
    const words = flat(pagesOf(withRun(3), plan, ["certificate"]).join(" "));
    expect(words).toContain("FAIL");
    expect(words).toContain("The farthest is point 7, 3.00 half-widths of its band off.");
    expect(words).toMatch(/\b7 [\d.]+ [\d.]+ [\d.]+ [\d.]+ [\d.]+ \+[\d.]+ outside/);
  });

  it("stays out of a pack while nothing was read, and says so when asked for alone", () => {
    expect(packOf(setup, plan, { sheets: ["bench-list", "certificate"] }).pages.every(({ sheet }) => sheet === "bench-list")).toBe(true);
    expect(flat(pagesOf(setup, plan, ["certificate"]).join(" "))).toContain("No readings have been kept");
  });
});

describe("the low-voltage checklist", () => {
  it("leaves the decision to local codes and a competent person, and belongs to its setup alone", () => {
    const words = flat(pagesOf(setup, plan, ["checklist"]).join(" "));
    expect(words).toContain("Local codes and a competent person decide.");
    expect(words).toContain(`For setup ${plan.setupId} and no other.`);
    for (const field of ["Inspected by", "Initials", "Date", "Next review"]) expect(words).toContain(field);
  });

  it("has the touch-voltage limit of wet hands beside the volts, with its source", () => {
    const words = flat(pagesOf(setup, plan, ["checklist"]).join(" "));
    expect(words).toContain("6 V AC");
    expect(words).toContain("at most 12 V AC, wet hands");
    expect(words).toContain("IEC 60364-4-41");
  });

  it("says of each limit whether it is kept, and of wet hands at 48 V that it is not", async () => {
    const cells = (rows: readonly NumberRow[]): string[] => rows.map(({ quantity, kept }) => `${quantity}: ${kept}`);
    const kept = cells(numberRows(setup, plan));
    expect(kept).toContain("Highest voltage anywhere: true");
    expect(kept.some((words) => words.endsWith("false"))).toBe(false);
    const strong = soundSetup({ ...setup, supply: { ...setup.supply, volts: 9, openCircuitVolts: 48, source: "unknown" } });
    const broken = cells(numberRows(strong, await planned(strong)));
    for (const quantity of ["Highest voltage anywhere", "", "Between any two metals that hands can touch", "Source of the supply"])
      expect(broken).toContain(`${quantity}: false`);
    expect(flat(pagesOf(strong, await planned(strong), ["checklist"]).join(" "))).toContain("NO");
  });

  it("is signed on one page, however many findings there are", () => {
    const [finding] = plan.findings;
    for (let count = 0; count <= 24; count++) {
      const { pages } = packOf(setup, { ...plan, findings: Array.from({ length: count }, () => finding) }, { sheets: ["checklist"] });
      const signed = pages.map(textsOn).filter((words) => words.includes("Signed"));
      expect(signed).toHaveLength(1);
      for (const field of ["Inspected by", "Competent person", "Next review"]) expect(signed[0], `${count} findings`).toContain(field);
    }
  });

  it("cautions about hydrogen and dissolved metal on DC, and has its numbers from the plan", async () => {
    const onDirect = direct();
    const directPlan = await planned(onDirect);
    const words = flat(pagesOf(onDirect, directPlan, ["checklist"]).join(" "));
    const { gas } = directPlan.bench;
    if (gas === null) throw new Error("DC makes gas");
    expect(words).toContain("DC makes hydrogen at the − electrode");
    expect(words).toContain("DC dissolves metal from the + electrode");
    expect(words).toContain(`${Number(gas.hydrogenMl.toPrecision(3))} mL a tray`);
    expect(words).toContain("30 V DC");
  });

  it("repeats every finding with its remedy", async () => {
    const onDirect = direct();
    const directPlan = await planned(onDirect);
    expect(directPlan.findings.length).toBeGreaterThan(1);
    const pack = packOf(onDirect, directPlan, { sheets: ["checklist"] });
    const words = flat(pack.pages.flatMap(({ items }) => items.flatMap((item) => (item.kind === "text" ? [item.text] : []))).join(" "));
    for (const { message, remedy } of directPlan.findings) {
      expect(words).toContain(flat(message.split(" ").slice(0, 3).join(" ")));
      expect(words).toContain(flat(remedy.split(" ").slice(0, 2).join(" ")));
    }
  });
});

describe("the bench list", () => {
  it("multiplies parts, leads, water and salt by the number of trays", async () => {
    const many = soundSetup({
      ...setup,
      water: { ...setup.water, targetConductivityUsPerCm: 900 },
      session: { ...setup.session, trays: 12 },
    });
    const manyPlan = await planned(many);
    const words = flat(pagesOf(many, manyPlan, ["bench-list"]).join(" "));
    expect(words).toContain("Parts, for 12 trays");
    const { volumeAllTraysL, saltToTarget } = manyPlan.bench.water;
    expect(words).toContain(`${Number(volumeAllTraysL.value.toPrecision(3))} L`);
    expect(words).toContain(`${Number((saltToTarget?.allTraysG ?? Number.NaN).toPrecision(3))} g`);
    for (const { name } of many.parts) expect(words).toContain(name);
  });
});

describe("the cover", () => {
  it("lists each sheet with the pages that carry its title", () => {
    const pack = packOf(setup, plan, { sheets: SHEET_NAMES });
    const words = flat(pagesOf(setup, plan, SHEET_NAMES)[0]);
    // The certificate is left out of a pack while nothing was read.
    for (const name of SHEET_NAMES.filter((one) => one !== "cover" && one !== "certificate")) {
      const first = 1 + pack.pages.findIndex(({ sheet }) => sheet === name);
      const last = 1 + pack.pages.findLastIndex(({ sheet }) => sheet === name);
      expect(words).toContain(`${SHEETS[name].title} ${first === last ? `page ${first}` : `pages ${first} to ${last}`}`);
    }
    expect(words).toContain(setup.notes.split(" ").slice(0, 5).join(" "));
    expect(words).toContain("Fieldtray 0.1.0");
  });
});

describe("class sheets", () => {
  it("give no answers away: no expected reading, no level in volts", () => {
    const words = pagesOf(setup, plan, ["class-table"]).join("\n");
    for (const { volts } of plan.probing.levels) expect(words).not.toContain(`${volts} V`);
    const texts = packOf(setup, plan, { sheets: ["class-table"] }).pages.flatMap(({ items }) =>
      items.flatMap((item) => (item.kind === "text" ? [item.text] : [])),
    );
    // Places have one decimal, readings on this meter two.
    expect(texts).toContain(String(plan.probing.levels[0].points[0].xMm.toFixed(1)));
    expect(texts.filter((one) => /^\d+\.\d\d+$/.test(one))).toEqual([]);
    expect(flat(pagesOf(setup, plan, ["record"]).join(" "))).not.toContain("reads V");
  });
});

describe("every page", () => {
  it("prints which correction it carries; the calibration page carries none", () => {
    const pages = pagesOf(setup, plan, SHEET_NAMES, { printerScale: [0.97, 1.015] });
    pages.forEach((page) => {
      if (page.includes("Printer calibration") && flat(page).includes("Measure both bars"))
        expect(page).toContain("Printed without correction");
      else
        expect(flat(page)).toContain(
          "Corrected for a printer that makes 100 mm 97.00 mm along the paper’s short side, 101.50 mm along its long side.",
        );
    });
  });

  it("forbids the use while a finding says stop", async () => {
    const salty = soundSetup({ ...direct(), water: { ...setup.water, salt: "NaCl" } });
    const saltyPlan = await planned(salty);
    expect(saltyPlan.findings.some(({ severity }) => severity === "stop")).toBe(true);
    const pages = pagesOf(salty, saltyPlan, SHEET_NAMES);
    expect(pages.length).toBeGreaterThan(8);
    for (const page of pages) expect(page).toContain("DO NOT USE");
    for (const page of pagesOf(setup, plan, SHEET_NAMES)) expect(page).not.toContain("DO NOT USE");
  });
});

describe("a pack", () => {
  it("can be ordered by who works from it", () => {
    expect(PRESETS.map(([title]) => title)).toEqual(["Technician", "Teacher", "Class", "Safety", "Everything"]);
    for (const [, sheets] of PRESETS) for (const name of sheets) expect(SHEET_NAMES).toContain(name);
  });

  it("is made page by page for whoever shows progress, in the same bytes", () => {
    const pack = packOf(setup, plan, { sheets: SHEET_NAMES });
    const steps = packPdfSteps(pack, FONT_FILES, "2026-12-01");
    const done: number[] = [];
    let step = steps.next();
    while (step.done !== true) {
      done.push(step.value);
      step = steps.next();
    }
    expect(done).toEqual(pack.pages.map((_, index) => index + 1));
    expect(Buffer.from(step.value).equals(Buffer.from(pdfOf(pack)))).toBe(true);
  });

  it.each([3, 21, Number.NaN])("with a blank edge of %d mm is refused with the reason", (edgeMm) => {
    expect(() => packOf(setup, plan, { edgeMm })).toThrow(/allowed: 4 to 20 mm/);
  });
});
