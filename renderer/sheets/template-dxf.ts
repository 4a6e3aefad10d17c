import type { Plan } from "../../shared-types/plan";
import type { Setup } from "../../shared-types/setup";
import { degrees } from "../../shared-types/units";
import { type Loop, outlineOf, type Piece } from "../engine/geometry/outline";
import { trayOutline } from "../engine/geometry/tray-outline";
import { pointsOf } from "./template-drawing";

/**
 * The template for a laser cutter or a plotter: DXF of release 12 (AC1009) as plain text, lines, arcs and circles in
 * millimetres, y away from the reader, origin in the tray's lower left inner corner. Group codes from memory of the published
 * reference; release 12 knows no units, so a comment (group 999) names them.
 */

type Group = readonly [code: number, value: string | number];

const LAYERS = ["TRAY", "SLABS", "ELECTRODES", "LOOSE", "INSULATORS", "POINTS", "NUMBERS"] as const;
type Layer = (typeof LAYERS)[number];

const FULL_TURN = 2 * Math.PI;
/** Radius of a probe point's mark, mm: the template's ring. */
const MARK_RADIUS_MM = 1.3;
const NUMBER_MM = 2.5;

const mm = (value: number): string => value.toFixed(6);

function pieceGroups(piece: Piece, layer: Layer): Group[] {
  if (piece.kind === "edge") {
    return [
      [0, "LINE"],
      [8, layer],
      [10, mm(piece.x0)],
      [20, mm(piece.y0)],
      [11, mm(piece.x1)],
      [21, mm(piece.y1)],
    ];
  }
  const { cx, cy, radius, startRad, sweepRad } = piece;
  const centre: Group[] = [
    [8, layer],
    [10, mm(cx)],
    [20, mm(cy)],
    [40, mm(radius)],
  ];
  if (Math.abs(sweepRad) >= FULL_TURN - 1e-12) return [[0, "CIRCLE"], ...centre];
  // An arc always runs counter-clockwise from its first angle to its second.
  const from = sweepRad > 0 ? startRad : startRad + sweepRad;
  const turned = (angleRad: number): string => (((degrees(angleRad) % 360) + 360) % 360).toFixed(9);
  return [[0, "ARC"], ...centre, [50, turned(from)], [51, turned(from + Math.abs(sweepRad))]];
}

const loopGroups = (loops: readonly Loop[], layer: Layer): Group[] => loops.flat().flatMap((piece) => pieceGroups(piece, layer));

const ROLE_LAYERS = { electrode: "ELECTRODES", floating: "LOOSE", insulator: "INSULATORS" } as const;

/** @returns the template as a DXF file: exact outlines, and the probe points with their numbers when `points` is set. */
export function templateDxf(setup: Setup, plan: Plan, points: boolean): string {
  const layers = LAYERS.flatMap((name, index): Group[] => [
    [0, "LAYER"],
    [2, name],
    [70, 0],
    [62, index + 1],
    [6, "CONTINUOUS"],
  ]);
  const marks = points
    ? pointsOf(plan).flatMap(({ n, xMm, yMm }): Group[] => [
        [0, "CIRCLE"],
        [8, "POINTS"],
        [10, mm(xMm)],
        [20, mm(yMm)],
        [40, mm(MARK_RADIUS_MM)],
        [0, "POINT"],
        [8, "POINTS"],
        [10, mm(xMm)],
        [20, mm(yMm)],
        [0, "TEXT"],
        [8, "NUMBERS"],
        [10, mm(xMm + MARK_RADIUS_MM + 0.6)],
        [20, mm(yMm - NUMBER_MM / 2)],
        [40, mm(NUMBER_MM)],
        [1, n],
      ])
    : [];
  const groups: Group[] = [
    [999, `Fieldtray template, setup ${plan.setupId}, millimetres`],
    [0, "SECTION"],
    [2, "HEADER"],
    [9, "$ACADVER"],
    [1, "AC1009"],
    [0, "ENDSEC"],
    [0, "SECTION"],
    [2, "TABLES"],
    [0, "TABLE"],
    [2, "LAYER"],
    [70, LAYERS.length],
    ...layers,
    [0, "ENDTAB"],
    [0, "ENDSEC"],
    [0, "SECTION"],
    [2, "ENTITIES"],
    ...loopGroups([trayOutline(setup.tray)], "TRAY"),
    ...setup.water.slabs.flatMap((slab) => loopGroups(outlineOf(slab), "SLABS")),
    ...setup.parts.flatMap((part) => loopGroups(outlineOf(part), ROLE_LAYERS[part.role])),
    ...marks,
    [0, "ENDSEC"],
    [0, "EOF"],
  ];
  return groups.map(([code, value]) => `${code}\r\n${value}\r\n`).join("");
}
