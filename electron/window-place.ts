import { z } from "zod";

/** Where a window was last: its outer rectangle in screen points. */
export const windowPlaceSchema = z.strictObject({
  x: z.int(),
  y: z.int(),
  width: z.int().positive(),
  height: z.int().positive(),
  maximized: z.boolean(),
});
export type WindowPlace = Readonly<z.infer<typeof windowPlaceSchema>>;

export interface Area {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

export const SMALLEST = { width: 800, height: 560 } as const;
const USUAL = { width: 1280, height: 800 } as const;
/** So much of the title bar must be on a screen for a hand to get hold of it, points. */
const GRIP = { width: 120, height: 40 } as const;

const overlap = (from: number, size: number, otherFrom: number, otherSize: number): number =>
  Math.min(from + size, otherFrom + otherSize) - Math.max(from, otherFrom);

/**
 * Where to open a window: as it was last, if enough of its title bar lies on a screen that still exists; else in the middle of the first.
 * @param areas the usable areas of the present screens, the main one first.
 */
export function placeOnScreen(last: WindowPlace | null, areas: readonly Area[]): WindowPlace {
  const fits = (place: Area, area: Area): boolean =>
    overlap(place.x, place.width, area.x, area.width) >= GRIP.width && overlap(place.y, GRIP.height, area.y, area.height) >= GRIP.height;
  const wanted = last ?? { ...USUAL, maximized: false };
  const sizeOn = (area: Area): { width: number; height: number } => ({
    width: Math.max(SMALLEST.width, Math.min(wanted.width, area.width)),
    height: Math.max(SMALLEST.height, Math.min(wanted.height, area.height)),
  });
  for (const area of last === null ? [] : areas) {
    const place = { ...wanted, x: last?.x ?? 0, y: last?.y ?? 0, ...sizeOn(area) };
    if (fits(place, area)) return place;
  }
  const main = areas[0] ?? { x: 0, y: 0, ...USUAL };
  const { width, height } = sizeOn(main);
  return {
    x: Math.round(main.x + Math.max(0, main.width - width) / 2),
    y: Math.round(main.y + Math.max(0, main.height - height) / 2),
    width,
    height,
    maximized: wanted.maximized,
  };
}
