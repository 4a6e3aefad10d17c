import { describe, expect, it } from "vitest";
import { EXAMPLES } from "../../../renderer/examples/all-examples";
import { type Page, plateOf, type TextItem } from "../../../renderer/sheets/page";
import { PAPERS, type PaperName, PRINTER_EDGE_MM } from "../../../renderer/sheets/paper";
import { SHEET_NAMES } from "../../../renderer/sheets/sheets";
import { pointsOf } from "../../../renderer/sheets/template-drawing";
import type { Setup } from "../../../shared-types/setup";
import { randomSetup } from "../../reference/random-setups";
import { soundSetup } from "../../reference/solved";
import { FONTS, packOf, planned } from "./packs";

/** The pages as data: everything lies where printers print, no text covers another, and tiles show all of the tray. */

type Corner = readonly [number, number];
interface PlacedText {
  readonly words: string;
  /** Corners of the text's box on the page, mm, turned with it. */
  readonly corners: readonly Corner[];
}

/** The box of a text: figures and capitals are 0.73 of the size high, descenders 0.2 deep. */
function placedText(item: TextItem, [dx, dy]: Corner): PlacedText {
  const { x, y, text, sizeMm, anchor, bold, turnDeg } = item;
  const width = (bold ? FONTS.bold : FONTS.regular).widthOf(text, sizeMm);
  const from = anchor === "start" ? 0 : anchor === "middle" ? -width / 2 : -width;
  const angle = ((turnDeg ?? 0) * Math.PI) / 180;
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const digitsOnly = /^[\d.]+$/.test(text);
  const [low, high] = [digitsOnly ? 0 : -0.2 * sizeMm, 0.73 * sizeMm];
  const corners = [
    [from, low],
    [from + width, low],
    [from + width, high],
    [from, high],
  ].map(([along, up]): Corner => [x + dx + c * along - s * up, y + dy + s * along + c * up]);
  return { words: text, corners };
}

const textsOn = (page: Page): PlacedText[] =>
  page.items.flatMap((item): PlacedText[] => {
    if (item.kind === "text") return item.backdrop || item.text === "" ? [] : [placedText(item, [0, 0])];
    if (item.kind === "clipped") return item.items.flatMap((one) => (one.kind === "text" ? [placedText(one, item.offset)] : []));
    return [];
  });

const reach = (corners: readonly Corner[], axis: 0 | 1): Corner => {
  const values = corners.map((corner) => corner[axis]);
  return [Math.min(...values), Math.max(...values)];
};

/** Texts whose boxes overlap by more than a hair. */
function overlaps(texts: readonly PlacedText[]): string[] {
  const boxes = texts.map(({ words, corners }) => ({ words, x: reach(corners, 0), y: reach(corners, 1) })).sort((a, b) => a.x[0] - b.x[0]);
  const found: string[] = [];
  const hair = 0.05;
  boxes.forEach((a, index) => {
    for (let k = index + 1; k < boxes.length && boxes[k].x[0] < a.x[1] - hair; k++) {
      const b = boxes[k];
      if (a.y[0] < b.y[1] - hair && b.y[0] < a.y[1] - hair) found.push(`“${a.words}” and “${b.words}”`);
    }
  });
  return found;
}

const outsidePrint = (page: Page, edgeMm: number): string[] =>
  textsOn(page).flatMap(({ words, corners }) => {
    const [x, y] = [reach(corners, 0), reach(corners, 1)];
    return x[0] < edgeMm || x[1] > page.widthMm - edgeMm || y[0] < edgeMm || y[1] > page.heightMm - edgeMm
      ? [`“${words}” on ${page.title}`]
      : [];
  });

/** Paths, drawing windows and pictures that reach beyond what printers print. */
const shapesOutside = (page: Page, edgeMm: number): string[] =>
  page.items.flatMap((item) => {
    const corners =
      item.kind === "path"
        ? item.chains.flat()
        : item.kind === "clipped"
          ? [item.window.slice(0, 2), item.window.slice(2)].map(([x, y]): Corner => [x, y])
          : [];
    const out = corners.some(([x, y]) => x < edgeMm || x > page.widthMm - edgeMm || y < edgeMm || y > page.heightMm - edgeMm);
    return out ? [`${item.kind} on ${page.title}`] : [];
  });

const trayWith = (parts: readonly object[], more: object): Setup =>
  soundSetup({
    format: "fieldtray.setup",
    version: 1,
    tray: { shape: "rectangle", lengthMm: 300, widthMm: 200 },
    water: { depthMm: 10, conductivityUsPerCm: 500 },
    supply: { waveform: "ac", volts: 6 },
    parts,
    ...more,
  });

const crowded = (): Setup =>
  trayWith(
    Array.from({ length: 64 }, (_, k) => ({
      id: `part-${k}`,
      name: k % 7 === 0 ? "A conductor with a name that is far too long to stand beside it on any paper" : "",
      role: k < 2 ? "electrode" : "floating",
      ...(k < 2 ? { tap: k } : {}),
      xMm: 30 + 48 * (k % 8),
      yMm: 30 + 48 * Math.floor(k / 8),
      turnDeg: 11 * k,
      shape: k % 3 === 0 ? { kind: "disc", diameterMm: 14 } : { kind: "bar", lengthMm: 24, widthMm: 6 },
    })),
    { tray: { shape: "rectangle", lengthMm: 400, widthMm: 400 }, probing: { levels: 12, pointsPerLevel: 20 } },
  );

const pair = (x: number, apart: number, y: number, diameterMm: number): object[] =>
  [0, 1].map((tap) => ({ id: `E${tap}`, role: "electrode", tap, xMm: x + apart * tap, yMm: y, shape: { kind: "disc", diameterMm } }));

const tiny = (): Setup =>
  trayWith(pair(8, 24, 15, 6), {
    title: "A title that goes on and on and on, as titles of trays in a physics prep room are apt to do when nobody stops them in time",
    tray: { shape: "rectangle", lengthMm: 40, widthMm: 30 },
    probing: { levels: 5, pointsPerLevel: 5, wallClearanceMm: 1, partClearanceMm: 1 },
  });

const large = (): Setup =>
  trayWith(pair(300, 600, 450, 60), {
    tray: { shape: "rectangle", lengthMm: 1200, widthMm: 900 },
    supply: { waveform: "dc", volts: 70, currentLimitA: 0.01, source: "bench" },
    water: { depthMm: 12, conductivityUsPerCm: 500, salt: "NaCl" },
    notes: "Four tables pushed together. ".repeat(60),
  });

const endless = (sign: string, count: number): string => sign.repeat(count);

/** Words without a place to break them, and words in scripts that the sheets' font lacks. */
const oddWords = (): Setup => {
  const [first, second] = pair(80, 130, 100, 30);
  return trayWith(
    [
      { ...first, name: endless("W", 80), material: endless("m", 60) },
      { ...second, id: endless("電", 40), name: "電極 🙂" },
    ],
    {
      title: endless("W", 200),
      notes: `${endless("x", 690)}\n電場`,
      water: { depthMm: 10, conductivityUsPerCm: 500, salt: endless("s", 60), slabs: [slab] },
      supply: { waveform: "ac", volts: 6, source: endless("S", 60) },
    },
  );
};
const slab = { id: endless("b", 40), xMm: 150, yMm: 170, thicknessMm: 4, shape: { kind: "bar", lengthMm: 60, widthMm: 20 } };

const SETUPS: readonly (readonly [string, () => Setup])[] = [
  ...EXAMPLES.map((example) => [`‘${example.title}’`, () => example.setup] as const),
  ...[11, 12, 13, 14, 15, 16].map(
    (seed) => [`random tray ${seed}`, () => randomSetup(seed, { insulators: true, slabs: true, tilt: true })] as const,
  ),
  ["64 parts and 240 points asked for", crowded],
  ["a tray like a matchbox", tiny],
  ["words that cannot be broken or set", oddWords],
  ["a tray like a table, with stop findings", large],
];

describe.each(SETUPS)("the whole pack of %s", (_, make) => {
  it("keeps on the printable part of every paper, and no text covers another", async () => {
    const setup = make();
    const plan = await planned(setup);
    for (const paper of Object.keys(PAPERS) as PaperName[]) {
      const scaled = paper === "a4" ? ([1, 1] as const) : ([0.97, 1.03] as const);
      const { pages } = packOf(setup, plan, { sheets: SHEET_NAMES, paper, printerScale: scaled });
      for (const page of pages) {
        expect(overlaps(textsOn(page)), `${paper}: ${page.title}`).toEqual([]);
        expect([...outsidePrint(page, PRINTER_EDGE_MM - 0.6), ...shapesOutside(page, PRINTER_EDGE_MM - 0.6)], paper).toEqual([]);
      }
    }
  });

  it("shows every millimetre of the tray and every point, whole, on some tile", async () => {
    const setup = make();
    const plan = await planned(setup);
    for (const mirrored of [false, true]) {
      const { pages } = packOf(setup, plan, { mirrored });
      const windows = pages.flatMap(({ items }) =>
        items.flatMap((item) => {
          if (item.kind !== "clipped") return [];
          const [left, bottom, right, top] = item.window;
          return [{ x: [left - item.offset[0], right - item.offset[0]], y: [bottom - item.offset[1], top - item.offset[1]], item }];
        }),
      );
      const [lengthMm, widthMm] =
        setup.tray.shape === "circle" ? [setup.tray.diameterMm, setup.tray.diameterMm] : [setup.tray.lengthMm, setup.tray.widthMm];
      const shown = (x: number, y: number, marginMm: number): boolean =>
        windows.some(
          (seen) => x >= seen.x[0] + marginMm && x <= seen.x[1] - marginMm && y >= seen.y[0] + marginMm && y <= seen.y[1] - marginMm,
        );
      const step = Math.max(lengthMm, widthMm) / 150;
      for (let x = 0; x <= lengthMm; x += step)
        for (let y = 0; y <= widthMm; y += step) if (!shown(x, y, 0)) throw new Error(`no tile shows ${x}, ${y}`);
      for (const { n, xMm, yMm } of pointsOf(plan)) expect(shown(mirrored ? lengthMm - xMm : xMm, yMm, 1.4), `point ${n}`).toBe(true);
      // A label that one tile cannot show whole would be on none.
      const numbers = new Set(
        windows.flatMap(({ item }) => item.items.flatMap((one) => (one.kind === "text" && plateOf(one) !== null ? [one.text] : []))),
      );
      const note = pages.flatMap(({ items }) => items).find((item) => item.kind === "text" && item.text.includes("found no room"));
      if (note === undefined) for (const { n } of pointsOf(plan)) expect(numbers.has(String(n)), `number ${n}`).toBe(true);
    }
  });
});
