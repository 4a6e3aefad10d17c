import { beforeAll, describe, expect, it } from "vitest";
import { A4_FREE_MM } from "../../../renderer/engine/findings/limits";
import { EXAMPLES } from "../../../renderer/examples/all-examples";
import type { Item, Page } from "../../../renderer/sheets/page";
import { OVERLAP_MM, PRINTER_EDGE_MM, tilingFor } from "../../../renderer/sheets/paper";
import { tagsOf } from "../../../renderer/sheets/part-marks";
import { SHEET_NAMES } from "../../../renderer/sheets/sheets";
import { pageSvg } from "../../../renderer/sheets/svg";
import { drawingBounds } from "../../../renderer/sheets/template-drawing";
import type { Plan } from "../../../shared-types/plan";
import { trayWith } from "../../reference/solved";
import { FONTS as fonts, packOf, pdfOf, planned } from "./packs";
import { readPdf } from "./printed";

const { setup } = EXAMPLES[1];
let plan: Plan;
beforeAll(async () => {
  plan = await planned(setup);
});

/** The box of a text on its page, mm; only upright texts. */
const boxesOf = (items: readonly Item[]) =>
  items.flatMap((item) => {
    if (item.kind !== "text" || item.turnDeg !== undefined) return [];
    const width = (item.bold ? fonts.bold : fonts.regular).widthOf(item.text, item.sizeMm);
    const left = item.x - (item.anchor === "start" ? 0 : item.anchor === "middle" ? width / 2 : width);
    return [{ text: item.text, left, right: left + width, bottom: item.y - 0.2 * item.sizeMm, top: item.y + 0.75 * item.sizeMm }];
  });

const overlapsOf = (page: Page): string[] => {
  const boxes = boxesOf(page.items);
  return boxes.flatMap((a, index) =>
    boxes
      .slice(index + 1)
      .filter((b) => a.left < b.right - 0.05 && b.left < a.right - 0.05 && a.bottom < b.top - 0.05 && b.bottom < a.top - 0.05)
      .map((b) => `“${a.text}” over “${b.text}” on ${page.title}`),
  );
};

describe("the pack of an example, all sheets", () => {
  it("keeps text inside what printers print, and no text covers another", () => {
    for (const paper of ["a4", "a3", "letter"] as const) {
      for (const page of packOf(setup, plan, { sheets: SHEET_NAMES, paper }).pages) {
        for (const box of boxesOf(page.items)) {
          expect(box.left, box.text).toBeGreaterThanOrEqual(PRINTER_EDGE_MM - 0.1);
          expect(box.right, box.text).toBeLessThanOrEqual(page.widthMm - PRINTER_EDGE_MM + 0.1);
          expect(box.bottom, box.text).toBeGreaterThanOrEqual(PRINTER_EDGE_MM - 1.5);
          expect(box.top, box.text).toBeLessThanOrEqual(page.heightMm - PRINTER_EDGE_MM + 0.1);
        }
        expect(overlapsOf(page)).toEqual([]);
      }
    }
  });

  it("has signs in its font for everything that it prints", () => {
    for (const page of packOf(setup, plan, { sheets: SHEET_NAMES }).pages) {
      for (const item of page.items) {
        if (item.kind === "text") for (const sign of item.text) expect(fonts.regular.has(sign) || sign === " ", sign).toBe(true);
      }
    }
    for (const sign of "Ωµ²°−±×σφ") expect(fonts.regular.has(sign)).toBe(true);
  });

  it("says on every page what it is, whose it is, and how to print it", () => {
    const pack = packOf(setup, plan, { sheets: SHEET_NAMES });
    const pages = readPdf("pdftotext", pdfOf(pack), ["-layout"])
      .split("\f")
      .filter((page) => page.trim() !== "");
    expect(pages).toHaveLength(pack.pages.length);
    pages.forEach((page, index) => {
      expect(page).toContain(plan.setupId);
      expect(page).toContain(`page ${index + 1} of ${pages.length}`);
      expect(page).toContain("Print at 100 %");
      expect(page).toContain("1 December 2026");
      expect(page).toContain(setup.title);
    });
  });

  it("embeds its fonts, stays small, asks not to be scaled, and is the same bytes each time", () => {
    const pdf = pdfOf(packOf(setup, plan, { sheets: SHEET_NAMES }));
    const rows = readPdf("pdffonts", pdf).trim().split("\n").slice(2);
    expect(rows.length).toBeGreaterThan(0);
    for (const row of rows) expect(row).toMatch(/\byes\b/);
    expect(pdf.byteLength).toBeLessThan(2 * 1024 * 1024);
    const text = Buffer.from(pdf).toString("latin1");
    expect(text).toMatch(/\/PrintScaling\s*\/None/);
    expect(text).toContain("/Lang (en-GB)");
    expect(Buffer.from(pdfOf(packOf(setup, plan, { sheets: SHEET_NAMES }))).equals(Buffer.from(pdf))).toBe(true);
  });

  it("can be read aloud: titled, tagged, each page's heading first, its text in order, its drawings in words", () => {
    const pack = packOf(setup, plan, { sheets: SHEET_NAMES });
    const pdf = pdfOf(pack);
    const facts = readPdf("pdfinfo", pdf);
    expect(facts).toMatch(/Tagged:\s+yes/);
    expect(facts).toContain(`Title:           ${setup.title} (${plan.setupId})`);
    expect(facts).toMatch(/Creator:\s+Fieldtray 0\.1\.0/);
    const spoken = readPdf("pdfinfo", pdf, ["-struct-text"]);
    const sections = spoken.split(/^ {2}Sect/m).slice(1);
    expect(sections).toHaveLength(pack.pages.length);
    sections.forEach((section, index) => {
      const page = pack.pages[index];
      expect(section.split("\n").find((line) => line.includes("H1"))).toBeDefined();
      // Only the words that stand outside drawings: those are told in words of their own.
      const words = section.replace(/\s+/g, "");
      let from = 0;
      for (const item of page.items) {
        if (item.kind !== "text" || item.text.trim() === "") continue;
        const at = words.indexOf(item.text.replace(/\s+/g, "").replaceAll('"', "").slice(0, 12), from);
        expect(at, `“${item.text}” on ${page.title}`).toBeGreaterThanOrEqual(from);
        from = at;
      }
      const drawings = page.items.filter(({ kind }) => kind === "clipped").length;
      expect(section.match(/^ +Figure/gm)?.length ?? 0).toBe(drawings);
    });
  });

  it("is drawn on screen from the same data", () => {
    const [page] = packOf(setup, plan).pages;
    const svg = pageSvg(page);
    expect(svg).toContain(`viewBox="0 0 ${page.widthMm} ${page.heightMm}"`);
    for (const item of page.items) if (item.kind === "text") expect(svg).toContain(item.text.replace(/&/g, "&amp;"));
  });

  it("lists every probe point with what the meter reads", () => {
    const text = readPdf("pdftotext", pdfOf(packOf(setup, plan, { sheets: ["probe-table"] })), ["-layout"]);
    for (const { points } of plan.probing.levels)
      for (const { n, xMm } of points) expect(text).toMatch(new RegExp(`\\b${n}\\s+${xMm.toFixed(1)}\\b`));
  });
});

describe("tiles", () => {
  it("lie so that the fewest are needed, and together cover the drawing", () => {
    const tiling = tilingFor([302, 202], [210, 297], { stopped: false, edgeMm: PRINTER_EDGE_MM });
    expect(tiling.columns * tiling.rows).toBe(2);
    expect(tilingFor([302, 202], [297, 420], { stopped: false, edgeMm: PRINTER_EDGE_MM })).toMatchObject({ columns: 1, rows: 1 });
    for (const size of [
      [600, 400],
      [1000, 30],
      [2000, 2000],
    ] as const) {
      const { columns, rows, window } = tilingFor(size, [210, 297], { stopped: false, edgeMm: PRINTER_EDGE_MM });
      expect(columns * (window[0] - OVERLAP_MM) + OVERLAP_MM).toBeGreaterThanOrEqual(size[0] - 1e-9);
      expect(rows * (window[1] - OVERLAP_MM) + OVERLAP_MM).toBeGreaterThanOrEqual(size[1] - 1e-9);
    }
  });
});

describe("a tray that the findings say fits one A4 sheet", () => {
  it("has a template of one page, and one that is 1 mm longer or wider has not", () => {
    const pagesOf = (lengthMm: number, widthMm: number): number => {
      const [left, bottom, right, top] = drawingBounds({ ...setup, tray: { ...setup.tray, shape: "rectangle", lengthMm, widthMm } });
      const { columns, rows } = tilingFor([right - left, top - bottom], [210, 297], { stopped: false, edgeMm: PRINTER_EDGE_MM });
      return columns * rows;
    };
    for (const [alongX, alongY] of A4_FREE_MM) {
      expect(pagesOf(alongX, alongY)).toBe(1);
      expect(pagesOf(alongX + 1, alongY)).toBe(2);
      expect(pagesOf(alongX, alongY + 1)).toBe(2);
    }
  });
});

describe("every part of every example", () => {
  it("carries its sign and volts, or what it is, on the template, the cover and the field key", async () => {
    for (const example of EXAMPLES) {
      const pack = packOf(example.setup, await planned(example.setup), { sheets: ["cover", "template", "field-key"], paper: "a3" });
      for (const sheet of ["cover", "template", "field-key"]) {
        const words = pack.pages
          .filter((page) => page.sheet === sheet)
          .flatMap(({ items }) => items.flatMap((item) => (item.kind === "clipped" ? item.items : [item])))
          .flatMap((item) => (item.kind === "text" ? [item.text] : []));
        for (const part of example.setup.parts) {
          const tags = tagsOf(part, example.setup.supply.volts);
          expect(
            words.some((one) => tags.includes(one)),
            `${part.id} on the ${sheet} of ${example.title}`,
          ).toBe(true);
        }
      }
    }
  });
});

describe("a setup that may not be used", () => {
  it("carries DO NOT USE on every page", async () => {
    const dangerous = trayWith({
      supply: { waveform: "ac", volts: 48 },
      parts: [
        { id: "A", role: "electrode", tap: 0, xMm: 60, yMm: 100, shape: { kind: "disc", diameterMm: 30 } },
        { id: "B", role: "electrode", tap: 1, xMm: 240, yMm: 100, shape: { kind: "disc", diameterMm: 30 } },
      ],
    });
    const dangerousPlan = await planned(dangerous);
    expect(dangerousPlan.findings.some(({ severity }) => severity === "stop")).toBe(true);
    const pages = readPdf("pdftotext", pdfOf(packOf(dangerous, dangerousPlan)), ["-layout"])
      .split("\f")
      .filter((page) => page.trim() !== "");
    for (const page of pages) expect(page).toContain("DO NOT USE");
  });
});

describe("a printer's scale", () => {
  it.each([0.949, 1.051, Number.NaN])("of %d is refused with the reason", (scale) => {
    expect(() => packOf(setup, plan, { printerScale: [scale, 1] })).toThrow(/allowed: 0.95 to 1.05/);
  });
});
