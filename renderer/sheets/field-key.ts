import { traySizeMm } from "../engine/geometry/tray-outline";
import { fieldColour } from "./field-colours";
import { type FieldInk, fieldDrawing } from "./field-drawing";
import type { BarePage } from "./pack";
import { box, type ClippedItem, type Item, type Point, text } from "./page";
import { contentOf, tilingFor } from "./paper";
import type { SheetInput } from "./sheets";
import { drawingBounds } from "./template-drawing";
import { columnsOf, rowsOf, tilesOf } from "./tiles";

/** Scales that a reader can reckon with: paper to tray as 1 to one of these. */
const REDUCTIONS = [1, 1.25, 1.5, 2, 2.5, 3, 4, 5, 6, 8, 10, 12, 15, 20];
const LEGEND_MM = 12;

/** The cells of the colour scale with the volts at its ends and middle. */
function legend(left: number, bottom: number, width: number, [low, high]: Point): Item[] {
  const cells = 24;
  const volts = (share: number): string => `${Number((low + share * (high - low)).toPrecision(3))} V`.replace("-", "−");
  return [
    ...Array.from(
      { length: cells },
      (_, k): Item => box(left + (k * width) / cells, bottom + 4, width / cells + 0.05, 3, 0, null, fieldColour((k + 0.5) / cells)),
    ),
    box(left, bottom + 4, width, 3, 0.15),
    ...([0, 0.5, 1] as const).map((share) => text(left + share * width, bottom + 0.6, volts(share), 2.6, { anchor: "middle" })),
  ];
}

/** @returns the solved field: fitted to one page, or at full size on as many tiles as that needs. */
export function fieldKeyPages(input: SheetInput, ink: FieldInk, fullSize: boolean): BarePage[] {
  const { setup, plan, fonts, paper, frame } = input;
  const bounds = drawingBounds(setup);
  const size: Point = [bounds[2] - bounds[0], bounds[3] - bounds[1]];
  if (fullSize) {
    const tiling = tilingFor(size, paper, frame);
    const drawing = fieldDrawing(
      setup,
      plan,
      fonts,
      { scale: 1, ink, fieldLines: true, labels: true },
      columnsOf(bounds, tiling),
      rowsOf(bounds, tiling),
    );
    const [lengthMm, widthMm] = traySizeMm(setup.tray);
    const note = "solid: equal potential, volts as marked · dashed: field lines, arrows from high to low";
    const tiles = tilesOf(drawing, tiling, { lengthMm, widthMm, mirrored: false, note }, fonts);
    return tiles.map(({ label, ...page }) => ({ ...page, title: `Field key 1:1${tiles.length > 1 ? `, tile ${label}` : ""}` }));
  }
  const fits = [paper, [paper[1], paper[0]] as const].map(([widthMm, heightMm]) => {
    const [left, bottom, right, top] = contentOf({ widthMm, heightMm, ...frame });
    const room = Math.min((right - left) / size[0], (top - bottom - LEGEND_MM) / size[1]);
    const reduction = REDUCTIONS.find((one) => 1 / one <= room + 1e-9) ?? 1 / room;
    return { widthMm, heightMm, left, bottom, right, top, reduction };
  });
  const best = fits[1].reduction < fits[0].reduction ? fits[1] : fits[0];
  const scale = 1 / best.reduction;
  const all = [[-Infinity, Infinity]] as const;
  const drawing = fieldDrawing(setup, plan, fonts, { scale, ink, fieldLines: true, labels: true }, all, all);
  const [west, south, east, north] = drawing.bounds;
  const offset: Point = [
    (best.left + best.right - west - east) / 2,
    best.top - north - (best.top - best.bottom - LEGEND_MM - (north - south)) / 2,
  ];
  const clipped: ClippedItem = {
    kind: "clipped",
    window: [west + offset[0], south + offset[1], east + offset[0], north + offset[1]],
    offset,
    items: drawing.items,
  };
  const middle = (best.left + best.right) / 2;
  const note = `Scale 1 : ${Number(best.reduction.toFixed(2))} · solid: equal potential, volts as marked · dashed: field lines, arrows from high to low`;
  return [
    {
      title: best.reduction === 1 ? "Field key 1:1" : `Field key, fitted 1 : ${Number(best.reduction.toFixed(2))}`,
      widthMm: best.widthMm,
      heightMm: best.heightMm,
      items: [
        clipped,
        ...(ink === "colour" ? legend(middle - 40, south + offset[1] - LEGEND_MM + 1, 80, plan.spanV) : []),
        text(middle, best.bottom - 6, note, 2.5, { anchor: "middle" }),
      ],
    },
  ];
}
