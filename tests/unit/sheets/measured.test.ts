import { beforeAll, describe, expect, it } from "vitest";
import { lengthOf, outlineOf, pointAlong } from "../../../renderer/engine/geometry/outline";
import { EXAMPLES } from "../../../renderer/examples/all-examples";
import type { ClippedItem, Pack } from "../../../renderer/sheets/page";
import { contentOf, EDGE_RANGE_MM, PAPERS, type PaperName, PRINTER_EDGE_MM } from "../../../renderer/sheets/paper";
import { pointsOf } from "../../../renderer/sheets/template-drawing";
import type { Plan } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import { randomSetup } from "../../reference/random-setups";
import { packOf, pdfOf, planned } from "./packs";
import { dotNear, lineAcross, type Print, printed } from "./printed";

/** A technician's ruler on the rendered paper: 300 dots an inch, and nothing farther off than this, mm. */
const ALLOWED_MM = 0.15;

/** Where the tray's origin lies on a page, and which part of the page shows the drawing. */
const windowOf = (pack: Pack, page: number): ClippedItem => {
  const found = pack.pages[page].items.find((item): item is ClippedItem => item.kind === "clipped");
  if (found === undefined) throw new Error("the page shows no drawing");
  return found;
};

const within = ([left, bottom, right, top]: ClippedItem["window"], x: number, y: number, marginMm: number): boolean =>
  x > left + marginMm && x < right - marginMm && y > bottom + marginMm && y < top - marginMm;

interface Measured {
  readonly outlines: number[];
  readonly unseen: number;
  readonly points: number[];
  readonly pointsUnseen: number;
}

/** Measures every part's outline and every probe point on the template's pages of a printed pack. */
function measure(setup: Setup, plan: Plan, pack: Pack, pages: readonly Print[]): Measured {
  const outlines: number[] = [];
  const seenPoints = new Map<number, number>();
  let unseen = 0;
  pack.pages.forEach((page, index) => {
    if (page.sheet !== "template") return;
    const [scaleX, scaleY] = page.printerScale;
    const { window, offset } = windowOf(pack, index);
    const onPaper = (x: number, y: number) => ({ x: (x + offset[0]) / scaleX, y: (y + offset[1]) / scaleY });
    for (const part of setup.parts) {
      for (const piece of outlineOf(part).flat()) {
        const count = Math.max(3, Math.min(24, Math.round(lengthOf(piece) / 8)));
        for (let k = 0; k < count; k++) {
          const share = (k + 0.5) / count;
          const [x, y] = pointAlong(piece, share);
          const [x1, y1] = pointAlong(piece, Math.min(1, share + 1e-4));
          const length = Math.hypot(x1 - x, y1 - y);
          if (!within(window, x + offset[0], y + offset[1], 1) || length === 0) continue;
          const place = onPaper(x, y);
          const off = lineAcross(pages[index], [place.x, place.y], [(y1 - y) / length, -(x1 - x) / length], 0.6);
          if (off === null) unseen++;
          else outlines.push(Math.abs(off));
        }
      }
    }
    for (const { n, xMm, yMm } of pointsOf(plan)) {
      if (!within(window, xMm + offset[0], yMm + offset[1], 2)) continue;
      const place = onPaper(xMm, yMm);
      const spot = dotNear(pages[index], [place.x, place.y], 0.6);
      if (spot !== null) seenPoints.set(n, Math.max(seenPoints.get(n) ?? 0, Math.hypot(spot[0] - place.x, spot[1] - place.y)));
    }
  });
  return { outlines, unseen, points: [...seenPoints.values()], pointsUnseen: pointsOf(plan).length - seenPoints.size };
}

const shareWithin = (values: readonly number[]): number => values.filter((value) => value <= ALLOWED_MM).length / values.length;

function expectTrue(measured: Measured): void {
  expect(measured.pointsUnseen).toBe(0);
  expect(Math.max(0, ...measured.points)).toBeLessThanOrEqual(ALLOWED_MM);
  // Labels and crosses may lie on an outline; what is seen of it lies where it should.
  expect(measured.unseen / (measured.unseen + measured.outlines.length)).toBeLessThan(0.2);
  expect(shareWithin(measured.outlines)).toBeGreaterThan(0.97);
}

function barLengths(page: Print): { x: number; y: number } {
  const edge = PRINTER_EDGE_MM;
  const at = (value: number | null): number => value ?? Number.NaN;
  const x0 = edge + 13 + at(lineAcross(page, [edge + 13, edge + 9], [1, 0], 1));
  const x1 = edge + 113 + at(lineAcross(page, [edge + 113, edge + 9], [1, 0], 6));
  const y0 = edge + 25 + at(lineAcross(page, [edge + 6.5, edge + 25], [0, 1], 1));
  const y1 = edge + 125 + at(lineAcross(page, [edge + 6.5, edge + 125], [0, 1], 6));
  return { x: x1 - x0, y: y1 - y0 };
}

describe.each(EXAMPLES.map((example) => [example.title, example.setup] as const))("the template of: %s", (_, setup) => {
  let plan: Plan;
  beforeAll(async () => {
    plan = await planned(setup);
  });

  it("on A4 has parts and probe points where the setup has them, on whichever tile", () => {
    const pack = packOf(setup, plan);
    expectTrue(measure(setup, plan, pack, printed(pdfOf(pack))));
  });

  it("has check bars of 100 mm on every page", () => {
    for (const page of printed(pdfOf(packOf(setup, plan)))) {
      const { x, y } = barLengths(page);
      expect(Math.abs(x - 100)).toBeLessThanOrEqual(ALLOWED_MM);
      expect(Math.abs(y - 100)).toBeLessThanOrEqual(ALLOWED_MM);
    }
  });
});

describe("other papers and printers", () => {
  it.each(["a3", "letter", "tabloid"] as const)("random setups are true on %s", async (paper) => {
    for (const seed of [41, 42]) {
      const setup = randomSetup(seed, { insulators: true, slabs: false, tilt: false });
      const plan = await planned(setup);
      const pack = packOf(setup, plan, { paper, sheets: ["template"] });
      expectTrue(measure(setup, plan, pack, printed(pdfOf(pack))));
    }
  });

  it("a printer that prints 2 % long and 1 % short is corrected: its paper comes out true", async () => {
    const { setup } = EXAMPLES[1];
    const plan = await planned(setup);
    const pack = packOf(setup, plan, { printerScale: [1.02, 0.99] });
    const pages = printed(pdfOf(pack));
    expectTrue(measure(setup, plan, pack, pages));
    // In the file a true 100 mm is 100/1.02 along x and 100/0.99 along y.
    const [page] = pages;
    const edge = PRINTER_EDGE_MM;
    const from = lineAcross(page, [(edge + 13) / 1.02, (edge + 9) / 0.99], [1, 0], 1);
    const to = lineAcross(page, [(edge + 113) / 1.02, (edge + 9) / 0.99], [1, 0], 1);
    expect(Math.abs((to ?? Number.NaN) - (from ?? Number.NaN))).toBeLessThanOrEqual(ALLOWED_MM);
  });

  it("neighbouring tiles show the same crosses, so that they can be laid on each other", async () => {
    const { setup } = EXAMPLES[1];
    const pack = packOf(setup, await planned(setup), { sheets: ["template"] });
    const pages = printed(pdfOf(pack));
    expect(pages).toHaveLength(2);
    const seen = pack.pages.map((_, index) => {
      const { window, offset, items } = windowOf(pack, index);
      const found: string[] = [];
      for (const item of items) {
        if (item.kind !== "path" || item.closed || item.lineMm !== 0.12 || item.dashMm !== undefined) continue;
        const [[x0, y0], [x1, y1]] = item.chains[0];
        const [x, y] = [(x0 + x1) / 2, (y0 + y1) / 2];
        if (!within(window, x + offset[0], y + offset[1], 4.5)) continue;
        const across: readonly [number, number] = y0 === y1 ? [0, 1] : [1, 0];
        const along: readonly [number, number] = y0 === y1 ? [1, 0] : [0, 1];
        const off = lineAcross(pages[index], [x + 3 * along[0] + offset[0], y + 3 * along[1] + offset[1]], across, 0.4);
        expect(Math.abs(off ?? Number.NaN)).toBeLessThanOrEqual(ALLOWED_MM);
        found.push(`${x.toFixed(3)} ${y.toFixed(3)}`);
      }
      return found.sort();
    });
    expect(seen[0].length).toBeGreaterThan(2);
    expect(seen[1]).toEqual(seen[0]);
  });
});

describe("the page that a printer is corrected by", () => {
  const { setup } = EXAMPLES[1];
  const order = { sheets: ["calibration"], printerScale: [0.97, 1.02] } as const;

  it.each(["a4", "letter", "a3"] as const)("has bars of 150 and 200 mm on %s, whatever the correction in use", async (paper) => {
    const [page] = printed(pdfOf(packOf(setup, await planned(setup), { ...order, paper })));
    const [x, y] = [PRINTER_EDGE_MM + 13 + 4, PRINTER_EDGE_MM + 25 + 4];
    for (const [place, across] of [
      [
        [x, y - 2],
        [1, 0],
      ],
      [
        [x + 150, y - 2],
        [1, 0],
      ],
      [
        [x - 2, y],
        [0, 1],
      ],
      [
        [x - 2, y + 200],
        [0, 1],
      ],
    ] as const)
      expect(Math.abs(lineAcross(page, place, across, 1) ?? Number.NaN)).toBeLessThanOrEqual(ALLOWED_MM);
  });

  it("keeps within its page under a band that forbids the use and with the widest blank edge", async () => {
    const plan = await planned(setup);
    const finding = { ...plan.findings[0], severity: "stop" } as const;
    for (const paper of Object.keys(PAPERS) as PaperName[]) {
      const stopped = { ...plan, findings: [finding] };
      const [{ items, widthMm, heightMm }] = packOf(setup, stopped, { ...order, paper, edgeMm: EDGE_RANGE_MM[1] }).pages;
      const [left, bottom, right, top] = contentOf({ widthMm, heightMm, edgeMm: EDGE_RANGE_MM[1], stopped: true });
      // The bars' ticks are 0.12 or 0.15 mm thick, the diagonal too: nothing else on the page is.
      const drawn = items.flatMap((item) => (item.kind === "path" && item.fill === null && item.lineMm <= 0.15 ? item.chains.flat() : []));
      const inside = drawn.filter(([x, y]) => x >= left && x <= right && y >= bottom && y <= top);
      const wide = inside.filter(([x]) => x > left + 100);
      expect(wide.length, paper).toBeGreaterThan(5);
      for (const [x, y] of drawn) expect(x <= right && y <= top && x >= EDGE_RANGE_MM[1] && y >= EDGE_RANGE_MM[1], paper).toBe(true);
    }
  });
});
