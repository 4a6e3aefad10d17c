import type { Part } from "../../../shared-types/setup";
import { outlinedThing } from "../hit";
import type { CanvasTheme } from "../theme";
import type { View } from "../view";
import { type Pen, trace } from "./pen";

/** Hatching for insulators: a tile that repeats, made once for each pair of colours. */
const hatches = new Map<string, CanvasPattern>();
const TILE_PX = 8;

function hatch(pen: Pen, ground: string, ink: string): CanvasPattern | string {
  const key = `${ground} ${ink}`;
  const before = hatches.get(key);
  if (before !== undefined) return before;
  const sharpness = 2;
  const tile = window.document.createElement("canvas");
  tile.width = TILE_PX * sharpness;
  tile.height = TILE_PX * sharpness;
  const own = tile.getContext("2d");
  if (own === null) return ground;
  own.scale(sharpness, sharpness);
  own.fillStyle = ground;
  own.fillRect(0, 0, TILE_PX, TILE_PX);
  own.strokeStyle = ink;
  own.lineWidth = 1.1;
  own.beginPath();
  for (const off of [-TILE_PX, 0, TILE_PX]) {
    own.moveTo(off - 1, TILE_PX + 1);
    own.lineTo(off + TILE_PX + 1, -1);
  }
  own.stroke();
  const pattern = pen.createPattern(tile, "repeat");
  if (pattern === null) return ground;
  pattern.setTransform(new DOMMatrix().scale(1 / sharpness));
  hatches.set(key, pattern);
  return pattern;
}

function paintPart(pen: Pen, part: Part, view: View, theme: CanvasTheme): void {
  pen.beginPath();
  trace(pen, outlinedThing(part).loops, view);
  if (part.role === "insulator") {
    pen.fillStyle = hatch(pen, theme.insulator, theme.insulatorInk);
    pen.fill("evenodd");
    pen.strokeStyle = theme.insulatorInk;
    pen.lineWidth = 1.5;
    pen.stroke();
    return;
  }
  pen.fillStyle = theme.metal;
  pen.fill("evenodd");
  // A light edge inside a thin dark one: the part stands off from light and dark water alike.
  pen.strokeStyle = theme.dark ? theme.metalEdge : theme.metal;
  pen.lineWidth = 1;
  pen.stroke();
  pen.save();
  pen.clip("evenodd");
  pen.strokeStyle = theme.metalEdge;
  pen.lineWidth = 3;
  pen.stroke();
  pen.restore();
}

/** Parts, in the order of the setup. */
export function paintParts(pen: Pen, parts: readonly Part[], view: View, theme: CanvasTheme): void {
  pen.lineJoin = "round";
  for (const part of parts) paintPart(pen, part, view, theme);
}
