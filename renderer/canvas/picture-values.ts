import { type FieldPicture, OWNER_WATER, type Plan } from "../../shared-types/plan";
import type { Quantity } from "../document/closer-look";

/** What the colours of the tray stand for: values on the picture's grid, and the two ends of their scale. */
export interface PictureValues {
  readonly quantity: Quantity;
  /** One value a node of the picture; NaN where there is none. */
  readonly values: Float32Array;
  readonly span: readonly [low: number, high: number];
  /** Some values lie beyond the upper end: at the edges of conductors the field has no bound. */
  readonly open: boolean;
}

const MM_PER_CM = 10;
const CM_PER_M = 100;
/** The scale of the field ends where so many of the nodes lie below: a few nodes at sharp edges would leave it without colour. */
const SHARE_BELOW = 0.98;
const MOST_LOOKED_AT = 4096;

/** Slope along one axis at a node, V/mm: from the water on both sides, else from the side that is water, else from what has a potential. */
function slope(volts: Float32Array, owner: Int16Array, node: number, before: number, after: number, pitchMm: number): number {
  const here = volts[node] as number;
  const [low, high] = [before < 0 ? Number.NaN : (volts[before] as number), after < 0 ? Number.NaN : (volts[after] as number)];
  const [lowWet, highWet] = [before >= 0 && owner[before] === OWNER_WATER, after >= 0 && owner[after] === OWNER_WATER];
  if (lowWet && highWet) return (high - low) / (2 * pitchMm);
  if (highWet) return (high - here) / pitchMm;
  if (lowWet) return (here - low) / pitchMm;
  if (!Number.isNaN(high)) return (high - here) / pitchMm;
  return Number.isNaN(low) ? 0 : (here - low) / pitchMm;
}

/** @returns the field's strength at every node in water, V/cm, by differences of the potential between nodes; NaN elsewhere. */
export function fieldStrengthVPerCm({ columns, rows, volts, owner, pitchXMm, pitchYMm }: FieldPicture): Float32Array {
  const strength = new Float32Array(columns * rows).fill(Number.NaN);
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      const node = row * columns + column;
      if (owner[node] !== OWNER_WATER || Number.isNaN(volts[node] as number)) continue;
      const x = slope(volts, owner, node, column === 0 ? -1 : node - 1, column === columns - 1 ? -1 : node + 1, pitchXMm);
      const y = slope(volts, owner, node, row === 0 ? -1 : node - columns, row === rows - 1 ? -1 : node + columns, pitchYMm);
      strength[node] = MM_PER_CM * Math.hypot(x, y);
    }
  }
  return strength;
}

/** The potential of another picture at a place of this tray, V: between its four nearest nodes; NaN where one of them has none. */
function voltsAt({ columns, rows, volts, pitchXMm, pitchYMm }: FieldPicture, xMm: number, yMm: number): number {
  const [x, y] = [xMm / pitchXMm, yMm / pitchYMm];
  const column = Math.min(columns - 2, Math.floor(x + 1e-9));
  const row = Math.min(rows - 2, Math.floor(y + 1e-9));
  if (column < 0 || row < 0 || x > columns - 1 + 1e-6 || y > rows - 1 + 1e-6) return Number.NaN;
  const [right, up] = [Math.min(1, x - column), Math.min(1, y - row)];
  const at = (dx: number, dy: number): number => volts[(row + dy) * columns + column + dx] as number;
  const low = right === 0 ? at(0, 0) : (1 - right) * at(0, 0) + right * at(1, 0);
  if (up === 0) return low;
  return (1 - up) * low + up * (right === 0 ? at(0, 1) : (1 - right) * at(0, 1) + right * at(1, 1));
}

/** @returns this potential less the other's at every node of this picture, V; NaN where one of the two has none. */
export function differenceVolts(here: FieldPicture, other: FieldPicture): Float32Array {
  const { columns, rows, volts, pitchXMm, pitchYMm } = here;
  return Float32Array.from({ length: columns * rows }, (_, node) => {
    const [column, row] = [node % columns, Math.floor(node / columns)];
    return (volts[node] as number) - voltsAt(other, column * pitchXMm, row * pitchYMm);
  });
}

/** Rounds up to two digits, so that the end of a scale is a number to read. */
export function rounded(value: number): number {
  if (!(value > 0)) return 1;
  const unit = 10 ** (Math.floor(Math.log10(value)) - 1);
  return Number((Math.ceil(value / unit - 1e-9) * unit).toPrecision(2));
}

function topOf(values: Float32Array): number {
  const stride = Math.max(1, Math.floor(values.length / MOST_LOOKED_AT));
  const looked: number[] = [];
  for (let index = 0; index < values.length; index += stride)
    if (!Number.isNaN(values[index] as number)) looked.push(values[index] as number);
  looked.sort((a, b) => a - b);
  return rounded(looked[Math.floor(SHARE_BELOW * (looked.length - 1))] ?? 1);
}

/** The largest value to either side of 0. */
function reachOf(values: Float32Array): number {
  let reach = 0;
  for (const value of values) if (Math.abs(value) > reach) reach = Math.abs(value);
  return reach;
}

/**
 * @param other the field to compare with; without it the difference is shown as the potential.
 * @returns what the picture's colours stand for: potential V, field V/cm, current density A/m², difference V.
 */
export function pictureValues(plan: Plan, quantity: Quantity, other: FieldPicture | null): PictureValues {
  const { picture } = plan;
  if (quantity === "difference" && other !== null) {
    const values = differenceVolts(picture, other);
    const reach = rounded(reachOf(values));
    return { quantity, values, span: [-reach, reach], open: false };
  }
  if (quantity === "field" || quantity === "current") {
    const strength = fieldStrengthVPerCm(picture);
    const factor = quantity === "field" ? 1 : CM_PER_M * plan.bench.water.conductivitySPerM;
    const values = factor === 1 ? strength : strength.map((value) => factor * value);
    return { quantity, values, span: [0, topOf(values)], open: true };
  }
  return { quantity: "potential", values: picture.volts, span: plan.spanV, open: false };
}
