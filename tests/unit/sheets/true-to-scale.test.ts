import { describe, expect, it } from "vitest";
import { outlineOf, pointAlong } from "../../../renderer/engine/geometry/outline";
import { traySizeMm } from "../../../renderer/engine/geometry/tray-outline";
import { EXAMPLES } from "../../../renderer/examples/all-examples";
import type { PackOptions } from "../../../renderer/sheets/pack";
import { PRINTER_EDGE_MM as EDGE, type PaperName } from "../../../renderer/sheets/paper";
import { pointsOf } from "../../../renderer/sheets/template-drawing";
import type { Plan } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import { randomSetup } from "../../reference/random-setups";
import { packOf, pdfOf, planned } from "./packs";
import { dotNear, lineAcross, onFaultyPrinter, type Print, printed } from "./printed";

/**
 * The main promise of the paper, checked on the paper: the PDF is rendered at 300 dots an inch, its tiles are joined by their
 * crosses alone, and all parts and points are where the setup has them.
 */

const WITHIN_MM = 0.15;
type Place = readonly [number, number];

/** Lengths of both check bars: the distance between their first and last tick. */
function checkBarsMm(print: Print): Place {
  const ends = (along: (at: number) => Place, direction: Place, from: number): number => {
    const [first, last] = [lineAcross(print, along(from), direction, 2), lineAcross(print, along(from + 100), direction, 2)];
    return first === null || last === null ? Number.NaN : 100 + last - first;
  };
  return [ends((at) => [at, EDGE + 7 + 2.2], [1, 0], EDGE + 13), ends((at) => [EDGE + 4.5 + 2.2, at], [0, 1], EDGE + 25)];
}

/** Where a tile's origin lies on its print, mm, and what the tile shows. */
interface PlacedTile {
  readonly print: Print;
  readonly origin: Place;
  readonly window: readonly [number, number, number, number];
}

/**
 * Prints a template and joins its tiles: the first one by the tray's own corner or by what its page says, every other one by
 * laying its crosses on those of a neighbour.
 */
function joined(setup: Setup, plan: Plan, order: Partial<PackOptions>): PlacedTile[] {
  const pack = packOf(setup, plan, order);
  const prints = printed(pdfOf(pack)).map((print) => onFaultyPrinter(print, order.printerScale ?? [1, 1]));
  const tiles = pack.pages.map(({ items }, index) => {
    const clipped = items.find((item) => item.kind === "clipped");
    if (clipped?.kind !== "clipped") throw new Error("a tile shows no drawing");
    const crosses = clipped.items.flatMap((item, place) => {
      const [across, upright, ring] = clipped.items.slice(place, place + 3);
      if (item.kind !== "path" || item.lineMm !== 0.12 || item.dashMm !== undefined || item.chains[0].length !== 2) return [];
      if (upright?.kind !== "path" || ring?.kind !== "path" || ring.chains[0].length < 24 || across !== item) return [];
      const [[x0, y], [x1]] = item.chains[0];
      return [[(x0 + x1) / 2, y] as Place];
    });
    return { print: prints[index], ...clipped, crosses };
  });
  const measuredCross = ({ print, offset, window: [left, bottom, right, top] }: (typeof tiles)[number], [x, y]: Place): Place | null => {
    const [px, py] = [x + offset[0], y + offset[1]];
    if (px < left + 4 || px > right - 4 || py < bottom + 4 || py > top - 4) return null;
    // Off the middle, where neither ring nor trim line disturbs.
    const shiftY = lineAcross(print, [px + 3.1, py], [0, 1], 0.5);
    const shiftX = lineAcross(print, [px, py + 3.1], [1, 0], 0.5);
    return shiftX === null || shiftY === null ? null : [px + shiftX, py + shiftY];
  };
  const placed = new Map<number, Place>([[0, tiles[0].offset]]);
  for (let round = 0; round < tiles.length && placed.size < tiles.length; round++) {
    tiles.forEach((tile, index) => {
      if (placed.has(index)) return;
      for (const [other, origin] of placed) {
        for (const cross of tile.crosses) {
          const [here, there] = [measuredCross(tile, cross), measuredCross(tiles[other], cross)];
          if (here === null || there === null) continue;
          placed.set(index, [origin[0] + here[0] - there[0], origin[1] + here[1] - there[1]]);
          return;
        }
      }
    });
  }
  return tiles.map(({ print, window }, index) => {
    const origin = placed.get(index);
    if (origin === undefined) throw new Error(`tile ${index + 1} shares no cross with a neighbour`);
    return { print, origin, window };
  });
}

/** @param drawn what is printed, `setup` what is expected. @returns places of outlines and points that were looked for, and how far (mm) each was off; Infinity where nothing was found. */
function misplacements(setup: Setup, plan: Plan, order: Partial<PackOptions>, drawn: Setup = setup): { what: string; offMm: number }[] {
  const tiles = joined(drawn, plan, order);
  const mirrored = order.mirrored ?? false;
  const [lengthMm] = traySizeMm(setup.tray);
  const seen = ([x, y]: Place): Place => (mirrored ? [lengthMm - x, y] : [x, y]);
  const onPaper = ([x, y]: Place, edgeMm: number): { tile: PlacedTile; at: Place }[] =>
    tiles.flatMap((tile) => {
      const at: Place = [x + tile.origin[0], y + tile.origin[1]];
      const [left, bottom, right, top] = tile.window;
      return at[0] > left + edgeMm && at[0] < right - edgeMm && at[1] > bottom + edgeMm && at[1] < top - edgeMm ? [{ tile, at }] : [];
    });
  const found: { what: string; offMm: number }[] = [];
  const points = pointsOf(plan);
  for (const part of setup.parts) {
    const pieces = outlineOf(part).flat();
    pieces.forEach((piece, number) => {
      for (const share of [0.23, 0.5, 0.77]) {
        const place = pointAlong(piece, share);
        const [before, after] = [pointAlong(piece, share - 0.001), pointAlong(piece, share + 0.001)];
        const length = Math.hypot(after[0] - before[0], after[1] - before[1]);
        const normal: Place = [((mirrored ? 1 : -1) * (after[1] - before[1])) / length, (after[0] - before[0]) / length];
        // A point's own ring may lie over an outline.
        if (points.some(({ xMm, yMm }) => Math.hypot(xMm - place[0], yMm - place[1]) < 2.2)) continue;
        for (const { tile, at } of onPaper(seen(place), 1.5)) {
          const off = lineAcross(tile.print, at, normal, 0.6);
          found.push({ what: `${part.id} piece ${number} at ${share}`, offMm: off === null ? Infinity : Math.abs(off) });
        }
      }
    });
  }
  for (const { n, xMm, yMm } of points) {
    const spots = onPaper(seen([xMm, yMm]), 2);
    if (spots.length === 0) found.push({ what: `point ${n} on no tile`, offMm: Infinity });
    for (const { tile, at } of spots) {
      const dot = dotNear(tile.print, at, 0.6);
      found.push({ what: `point ${n}`, offMm: dot === null ? Infinity : Math.hypot(dot[0] - at[0], dot[1] - at[1]) });
    }
  }
  return found;
}

const offenders = (found: readonly { what: string; offMm: number }[]): string[] =>
  found.filter(({ offMm }) => !(offMm <= WITHIN_MM)).map(({ what, offMm }) => `${what}: ${offMm.toFixed(3)} mm`);

const PAPERS: readonly PaperName[] = ["a4", "a3", "a2", "letter", "tabloid"];

describe("a printed template", () => {
  for (const [index, example] of EXAMPLES.entries()) {
    const paper = PAPERS[index % PAPERS.length];
    it(`of ‘${example.title}’ on ${paper} has parts and points where the setup has them`, async () => {
      const plan = await planned(example.setup);
      const found = misplacements(example.setup, plan, { paper });
      expect(found.length).toBeGreaterThan(30);
      expect(offenders(found)).toEqual([]);
    });
  }

  for (let seed = 1; seed <= 30; seed++) {
    const paper = PAPERS[seed % PAPERS.length];
    it(`of random tray ${seed} on ${paper} joins by its crosses and is true`, async () => {
      const setup = randomSetup(seed, { insulators: true, slabs: true, tilt: true });
      expect(offenders(misplacements(setup, await planned(setup), { paper }))).toEqual([]);
    });
  }

  it("comes out true from a printer that makes 100 mm 97 mm across and 102 mm along, upright and across alike", async () => {
    const printerScale = [0.97, 1.02] as const;
    for (const [number, paper] of [
      [1, "a4"],
      [1, "a3"],
      [3, "letter"],
    ] as const) {
      const { setup } = EXAMPLES[number];
      expect(offenders(misplacements(setup, await planned(setup), { paper, printerScale })), paper).toEqual([]);
    }
  });

  it("keeps the paper's own size, whatever the correction", async () => {
    const { setup } = EXAMPLES[1];
    const plan = await planned(setup);
    const pack = packOf(setup, plan, {
      paper: "a3",
      sheets: ["template", "probe-table", "field-key", "calibration"],
      printerScale: [0.97, 1.02],
    });
    const sizes = printed(pdfOf(pack)).map(({ widthMm, heightMm }) => [widthMm, heightMm].map(Math.round).sort((a, b) => a - b));
    expect(pack.pages.some(({ widthMm, heightMm }) => widthMm > heightMm)).toBe(true);
    for (const size of sizes) expect(size).toEqual([297, 420]);
  });

  it("can show the outside of the wall, and keep a wider edge", async () => {
    const { setup } = EXAMPLES[1];
    const plan = await planned(setup);
    const order = { paper: "a3", wallMm: 4, edgeMm: 12 } as const;
    expect(offenders(misplacements(setup, plan, order))).toEqual([]);
    const [tile] = joined(setup, plan, order);
    const [x, y] = tile.origin;
    for (const [place, across] of [
      [
        [x - 4, y + 90],
        [1, 0],
      ],
      [
        [x + 304, y + 90],
        [1, 0],
      ],
      [
        [x + 80, y - 4],
        [0, 1],
      ],
      [
        [x + 80, y + 204],
        [0, 1],
      ],
    ] as const)
      expect(Math.abs(lineAcross(tile.print, place, across, 1) ?? Number.NaN)).toBeLessThan(WITHIN_MM);
    const { widthMm, heightMm, darkness } = tile.print;
    for (let share = 0; share <= 1; share += 0.002)
      for (const depth of [1, 6, 11]) {
        expect(darkness(share * widthMm, depth) + darkness(share * widthMm, heightMm - depth)).toBe(0);
        expect(darkness(depth, share * heightMm) + darkness(widthMm - depth, share * heightMm)).toBe(0);
      }
  });

  it("mirrored is the same seen from below", async () => {
    const { setup } = EXAMPLES[1];
    expect(offenders(misplacements(setup, await planned(setup), { mirrored: true }))).toEqual([]);
  });

  it("has check bars of 100 mm on every page", async () => {
    const { setup } = EXAMPLES[1];
    const plan = await planned(setup);
    for (const print of printed(pdfOf(packOf(setup, plan, { sheets: ["template", "probe-table"] })))) {
      for (const lengthMm of checkBarsMm(print)) expect(Math.abs(lengthMm - 100)).toBeLessThan(WITHIN_MM);
    }
  });

  it("for a printer that prints 96.8 mm along x and 101.2 mm along y is larger and smaller by just that", async () => {
    const { setup } = EXAMPLES[1];
    const pack = packOf(setup, await planned(setup), { printerScale: [0.968, 1.012] });
    const [print] = printed(pdfOf(pack));
    const at = (x: number, y: number): Place => [x / 0.968, y / 1.012];
    const ticks = [
      [at(EDGE + 13, EDGE + 9.2), [1, 0]],
      [at(EDGE + 113, EDGE + 9.2), [1, 0]],
      [at(EDGE + 6.7, EDGE + 25), [0, 1]],
      [at(EDGE + 6.7, EDGE + 125), [0, 1]],
    ] as const;
    const places = ticks.map(
      ([place, direction]) => (lineAcross(print, place, direction, 1) ?? Number.NaN) + place[direction[0] === 1 ? 0 : 1],
    );
    expect(Math.abs(places[1] - places[0] - 100 / 0.968)).toBeLessThan(WITHIN_MM);
    expect(Math.abs(places[3] - places[2] - 100 / 1.012)).toBeLessThan(WITHIN_MM);
  });

  it("is measured finely enough to notice a part that lies 0.25 mm off", async () => {
    const { setup } = EXAMPLES[0];
    const [first, ...others] = setup.parts;
    const shifted: Setup = { ...setup, parts: [{ ...first, xMm: first.xMm + 0.25 }, ...others] };
    const found = misplacements(setup, await planned(setup), { paper: "a3" }, shifted);
    expect(offenders(found).some((words) => words.startsWith(first.id))).toBe(true);
  });
});
