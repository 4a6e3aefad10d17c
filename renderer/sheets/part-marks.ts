import type { Part, PlacedShape } from "../../shared-types/setup";
import { radians } from "../../shared-types/units";
import { boundsOf, chainOf, outlineOf } from "../engine/geometry/outline";
import { distanceToOutline } from "../engine/geometry/signed-distance";
import { besideBox, besideOutline } from "./label-places";
import { line, outline, type PathItem, type Point } from "./page";

/** Chords stray at most this from true arcs, mm: less than a printer's dot. */
export const CHORD_MM = 0.005;
/** Half length of a centre cross where there is room for it, mm. */
const CROSS_ARM_MM = 3;
const HATCH_STEP_MM = 3;

/** @returns the chains of a part's outline, fine enough to print. */
export const chainsOf = (part: Part): readonly (readonly Point[])[] => outlineOf(part).map((loop) => chainOf(loop, CHORD_MM));

const plain = (value: number): string => String(Number(value.toFixed(2))).replace("-", "−");

/** @returns what stands beside a part, the fullest wording first: sign and volts or what it is, and its name. */
export function tagsOf(part: Part, volts: number): string[] {
  const name = part.name === "" ? part.id : part.name;
  const short = [...name].length > 24 ? `${[...name].slice(0, 22).join("").trimEnd()}…` : name;
  const kind =
    part.role === "electrode"
      ? `${part.tap === 0 ? "−" : part.tap === 1 ? "+" : "tap"} ${plain(part.tap * volts)} V`
      : part.role === "floating"
        ? "floating"
        : "insulator";
  return [`${kind} · ${short}`, `${kind} · ${part.id}`, kind];
}

/** Oblique lines inside a closed outline: where a line passes an odd number of edges it lies inside. */
function hatching(chains: readonly (readonly Point[])[], [left, bottom, right, top]: readonly [number, number, number, number]): PathItem {
  const lines: Point[][] = [];
  // On the line y − x = c an edge is passed where its ends lie on opposite sides of c.
  for (let c = bottom - right + HATCH_STEP_MM / 2; c < top - left; c += HATCH_STEP_MM * Math.SQRT2) {
    const passes: number[] = [];
    for (const chain of chains) {
      chain.forEach(([x0, y0], index) => {
        const [x1, y1] = chain[(index + 1) % chain.length];
        const [from, to] = [y0 - x0 - c, y1 - x1 - c];
        if (from > 0 !== to > 0) passes.push(x0 + (from / (from - to)) * (x1 - x0));
      });
    }
    passes.sort((a, b) => a - b);
    for (let k = 0; k + 1 < passes.length; k += 2) {
      lines.push([
        [passes[k], passes[k] + c],
        [passes[k + 1], passes[k + 1] + c],
      ]);
    }
  }
  return { kind: "path", chains: lines, closed: false, stroke: 0.4, fill: null, lineMm: 0.1 };
}

/** @returns half the length of a part's centre cross, mm: its arms keep off the outline, so that neither is taken for the other. */
export const crossArmMm = (part: Part): number =>
  Math.min(CROSS_ARM_MM, Math.max(1, 0.6 * distanceToOutline(outlineOf(part), part.xMm, part.yMm)));

/** @returns a cross at a part's centre, with a small open arrow on the arm that points along the part's own +x. */
function centreCross(part: Part): PathItem[] {
  const { xMm, yMm, turnDeg } = part;
  const turn = radians(turnDeg);
  const [c, s] = [Math.cos(turn), Math.sin(turn)];
  const at = (along: number, across: number): Point => [xMm + along * c - across * s, yMm + along * s + across * c];
  const arm = crossArmMm(part);
  return [
    line([at(-arm, 0), at(arm, 0)], 0.15),
    line([at(0, -arm), at(0, arm)], 0.15),
    line([at(arm - 1.1, 0.7), at(arm, 0), at(arm - 1.1, -0.7)], 0.15),
  ];
}

/** @returns outline, filling and centre cross of a part. Electrodes are grey, loose conductors paler, insulators hatched. */
export function partMarks(part: Part, saveInk: boolean): PathItem[] {
  const chains = chainsOf(part);
  const fill = part.role === "insulator" || saveInk ? null : part.role === "electrode" ? 0.85 : 0.93;
  return [
    ...(fill === null ? [] : [outline(chains, 0, null, fill)]),
    ...(part.role === "insulator" ? [hatching(chains, boundsOf(outlineOf(part)))] : []),
    outline(chains, 0.3),
    ...centreCross(part),
  ];
}

const TAG_GAP_MM = 1.2;

/**
 * @param scale paper mm for a tray mm.
 * @returns middles for a tag of this size (paper mm) beside a part or slab: round its box where it fills it, else along its outline; last within its opening.
 */
export function* besidePlaced(placed: PlacedShape, scale: number, width: number, height: number, farMm: number): Iterable<Point> {
  const { shape, turnDeg } = placed;
  const fillsItsBox =
    shape.kind === "disc" || shape.kind === "ring" || (shape.kind !== "polygon" && shape.kind !== "arc" && turnDeg % 90 === 0);
  const loops = outlineOf(placed);
  if (fillsItsBox) {
    const [left, bottom, right, top] = boundsOf(loops).map((value) => value * scale);
    yield* besideBox([left, bottom, right, top], width, height, TAG_GAP_MM, farMm);
  }
  // A ring close to the tray's wall has its room inside.
  for (const loop of fillsItsBox ? loops.slice(1) : loops) {
    const chain = chainOf(loop, 0.2).map(([x, y]): Point => [x * scale, y * scale]);
    yield* besideOutline(chain, width, height, TAG_GAP_MM, farMm);
  }
}
