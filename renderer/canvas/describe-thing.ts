import { isPart, type Thing, thingName } from "../document/edit";
import { sizeText, trimmed } from "../document/number-text";
import { texts } from "../texts/texts";

const words = texts.canvas.thing;

/** @returns where a thing lies, for a reader or a listener: "x 65, y 100 mm, turned 90°". */
export function placeWords({ xMm, yMm, turnDeg, shape }: Thing): string {
  const round = shape.kind === "disc" || shape.kind === "ring";
  const place = words.place(trimmed(xMm, 2), trimmed(yMm, 2));
  return round || turnDeg === 0 ? place : words.turned(place, trimmed(turnDeg, 2));
}

/** @returns what a thing does in the tray: "electrode at 6 V", "floating conductor", "insulator", "slab 4 mm thick". */
export function roleWords(thing: Thing, supplyVolts: number): string {
  if (!isPart(thing)) return words.slab(trimmed(thing.thicknessMm, 2));
  switch (thing.role) {
    case "electrode":
      return words.electrode(trimmed(thing.tap * supplyVolts, 3));
    case "floating":
    case "insulator":
      return words.roles[thing.role];
  }
}

/** @returns a thing in one line: name, role, kind and sizes, place. */
export function describeThing(thing: Thing, supplyVolts: number): string {
  const whole = words.whole(thingName(thing), roleWords(thing, supplyVolts), thing.shape.kind, sizeText(thing.shape), placeWords(thing));
  const held = [thing.group === undefined ? [] : [words.inGroup(thing.group)], thing.locked === true ? [words.locked] : []].flat();
  return [whole, ...held].join(", ");
}
