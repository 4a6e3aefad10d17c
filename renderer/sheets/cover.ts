import type { Plan } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import { current, shown } from "../engine/findings/wording";
import { traySizeMm } from "../engine/geometry/tray-outline";
import { fieldDrawing } from "./field-drawing";
import type { Block } from "./flow";
import type { SheetFonts } from "./font-metrics";
import type { ClippedItem, Item } from "./page";

/** A sheet of the pack and the pages that it takes. */
export interface ContentsEntry {
  readonly title: string;
  readonly first: number;
  readonly last: number;
}

const PICTURE_MM = 82;

/** The layout with its equipotentials, small, in the middle of the width. */
function picture(setup: Setup, plan: Plan, fonts: SheetFonts): Block {
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  return {
    kind: "picture",
    heightMm: PICTURE_MM + 4,
    draw: (left, top, width): Item[] => {
      const scale = Math.min(width / lengthMm, PICTURE_MM / widthMm, 1);
      const all = [[-Infinity, Infinity]] as const;
      const { bounds, items } = fieldDrawing(setup, plan, fonts, { scale, ink: "lines", fieldLines: false, labels: true }, all, all);
      const [west, south, east, north] = bounds;
      const offset = [left + (width - west - east) / 2, top - 1 - north] as const;
      const clipped: ClippedItem = {
        kind: "clipped",
        window: [west + offset[0], south + offset[1], east + offset[0], north + offset[1]],
        offset,
        items,
      };
      return [clipped];
    },
  };
}

const trayWords = (setup: Setup): string =>
  setup.tray.shape === "circle"
    ? `round, ⌀ ${shown(setup.tray.diameterMm, 5)} mm inside`
    : `${shown(setup.tray.lengthMm, 5)} × ${shown(setup.tray.widthMm, 5)} mm inside`;

/** @returns the cover: what the pack is for, a small picture, what matters in few numbers, and what it holds. */
export function cover(setup: Setup, plan: Plan, fonts: SheetFonts, contents: readonly ContentsEntry[], version: string): Block[] {
  const { supply, water } = setup;
  const count = (severity: string): number => plan.findings.filter((finding) => finding.severity === severity).length;
  const points = plan.probing.levels.reduce((sum, level) => sum + level.points.length, 0) + plan.probing.checks.length;
  return [
    picture(setup, plan, fonts),
    ...(setup.notes.trim() === ""
      ? []
      : [{ kind: "paragraph", words: [...setup.notes.trim()].slice(0, 700).join("") } as const, { kind: "gap", heightMm: 1 } as const]),
    {
      kind: "table",
      columns: [
        { head: "", share: 20, bold: true },
        { head: "", share: 80 },
      ],
      rows: [
        ["Setup", `${plan.setupId}. The id follows from the setup's content: a page with another id belongs to another setup.`],
        ["Tray", `${trayWords(setup)}; ${setup.session.trays} ${setup.session.trays === 1 ? "tray" : "trays"}`],
        [
          "Water",
          `${shown(water.depthMm, 4)} mm deep, ${shown(water.conductivityUsPerCm, 4)} µS/cm (25 °C), ${shown(water.temperatureC)} °C, salt: ${water.salt}`,
        ],
        [
          "Supply",
          `${supply.waveform === "ac" ? `AC ${shown(supply.frequencyHz, 4)} Hz` : "DC"}, ${shown(supply.volts, 4)} V, source: ${supply.source}`,
        ],
        [
          "Computed",
          `${plan.resistanceOhm === null ? "" : `${shown(plan.resistanceOhm.value, 4)} Ω between the electrodes, `}${current(plan.currentA.value)}, ${points} probe points on ${plan.probing.levels.length} lines`,
        ],
        ["Findings", `${count("stop")} stop, ${count("caution")} caution, ${count("note")} note: see the checklist`],
        ["Program", `Fieldtray ${version}, field solved at ${plan.quality} quality, pitch ${shown(plan.numerics.pitchMm)} mm`],
      ],
    },
    { kind: "heading", words: "Contents" },
    {
      kind: "table",
      columns: [
        { head: "", share: 80 },
        { head: "", share: 20, align: "end" },
      ],
      rows: contents.map(({ title, first, last }) => [title, first === last ? `page ${first}` : `pages ${first} to ${last}`]),
    },
  ];
}
