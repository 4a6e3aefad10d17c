import { isPart, type Thing, thingName } from "../document/edit";
import { sizeText, trimmed } from "../document/number-text";

/** @returns where a thing lies, for a reader or a listener: "x 65, y 100 mm, turned 90°". */
export function placeWords({ xMm, yMm, turnDeg, shape }: Thing): string {
  const round = shape.kind === "disc" || shape.kind === "ring";
  return `x ${trimmed(xMm, 2)}, y ${trimmed(yMm, 2)} mm${round || turnDeg === 0 ? "" : `, turned ${trimmed(turnDeg, 2)}°`}`;
}

/** @returns what a thing does in the tray: "electrode at 6 V", "floating conductor", "insulator", "slab 4 mm thick". */
export function roleWords(thing: Thing, supplyVolts: number): string {
  if (!isPart(thing)) return `slab ${trimmed(thing.thicknessMm, 2)} mm thick`;
  switch (thing.role) {
    case "electrode":
      return `electrode at ${trimmed(thing.tap * supplyVolts, 3)} V`;
    case "floating":
      return "floating conductor";
    case "insulator":
      return "insulator";
  }
}

/** @returns a thing in one line: name, role, kind and sizes, place. */
export const describeThing = (thing: Thing, supplyVolts: number): string =>
  `${thingName(thing)}: ${roleWords(thing, supplyVolts)}, ${thing.shape.kind} ${sizeText(thing.shape)}, ${placeWords(thing)}`;
