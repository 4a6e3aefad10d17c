import type { PlacedShape, Setup, Shape } from "../../../shared-types/setup";
import { boundsOf, type Loop, outlineOf } from "../geometry/outline";

/** A part or slab as the field sees it: its outline at hand, its place in the setup's list remembered. */
export interface Solid {
  readonly placed: PlacedShape;
  /** Index in `setup.parts` (or `setup.water.slabs`). */
  readonly index: number;
  readonly loops: readonly Loop[];
  /** left, bottom, right, top, mm. */
  readonly bounds: readonly [number, number, number, number];
}

export interface SlabSolid extends Solid {
  readonly thicknessMm: number;
}

/** The geometry of a setup sorted by what it does to the field. */
export interface FieldLayout {
  readonly setup: Setup;
  /** Electrodes first, in the order of the setup, then floating conductors. */
  readonly conductors: readonly Solid[];
  readonly electrodeCount: number;
  readonly insulators: readonly Solid[];
  readonly slabs: readonly SlabSolid[];
}

function solid(placed: PlacedShape, index: number): Solid {
  const loops = outlineOf(placed);
  return { placed, index, loops, bounds: boundsOf(loops) };
}

/** @returns the geometry of a setup sorted by what it does to the field. */
export function fieldLayout(setup: Setup): FieldLayout {
  const solids = setup.parts.map((part, index) => ({ role: part.role, solid: solid(part, index) }));
  const ofRole = (role: string): Solid[] => solids.filter((entry) => entry.role === role).map((entry) => entry.solid);
  const electrodes = ofRole("electrode");
  return {
    setup,
    conductors: [...electrodes, ...ofRole("floating")],
    electrodeCount: electrodes.length,
    insulators: ofRole("insulator"),
    slabs: setup.water.slabs.map((slab, index) => ({ ...solid(slab, index), thicknessMm: slab.thicknessMm })),
  };
}

/** @returns the thickness (mm) of the thinnest wall of a shape; of a polygon twice its area over its perimeter. */
export function wallThicknessMm(shape: Shape): number {
  switch (shape.kind) {
    case "bar":
      return Math.min(shape.lengthMm, shape.widthMm);
    case "disc":
      return shape.diameterMm;
    case "ring":
    case "arc":
      return (shape.outerMm - shape.innerMm) / 2;
    case "frame":
      return shape.wallMm;
    case "polygon": {
      let twiceArea = 0;
      let perimeter = 0;
      shape.pointsMm.forEach(([x, y], index) => {
        const [nextX, nextY] = shape.pointsMm[(index + 1) % shape.pointsMm.length];
        twiceArea += x * nextY - nextX * y;
        perimeter += Math.hypot(nextX - x, nextY - y);
      });
      return Math.abs(twiceArea) / perimeter;
    }
  }
}

/** @returns whether the water is equally deep everywhere: another depth then scales the currents and leaves the potentials. */
export const isEvenlyDeep = ({ water }: Setup): boolean => water.tiltXDeg === 0 && water.tiltYDeg === 0 && water.slabs.length === 0;

/**
 * A text that is equal for setups with the same field per volt: whatever changes it needs a new solve, nothing else does.
 * Volts, taps, conductivity, heights, names, supply, meter and probing are left out.
 */
export function geometryKey(setup: Setup): string {
  const { tray, water, parts } = setup;
  const size = tray.shape === "rectangle" ? [tray.lengthMm, tray.widthMm] : [tray.diameterMm];
  return JSON.stringify([
    size,
    isEvenlyDeep(setup) ? "even depth" : water.depthMm,
    water.tiltXDeg,
    water.tiltYDeg,
    water.slabs.map(({ xMm, yMm, turnDeg, thicknessMm, shape }) => [xMm, yMm, turnDeg, thicknessMm, shape]),
    parts.map(({ role, xMm, yMm, turnDeg, shape }) => [role, xMm, yMm, turnDeg, shape]),
  ]);
}
