import type { PartInWater, WaterGeometry } from "../../../shared-types/bench";
import type { Part, Setup } from "../../../shared-types/setup";
import { radians } from "../../../shared-types/units";
import { boundsOf, outlineOf, pointAlong } from "../geometry/outline";
import { trayOutline, traySizeMm } from "../geometry/tray-outline";
import { waterDepthMm } from "../geometry/water-depth";
import { refractiveIndex, WATER_REFRACTIVE_INDEX } from "./base-materials";

/** The tilt of a table that nobody notices, degrees: what the plan is tested against. */
export const UNNOTICED_TILT_DEG = 0.2;

/**
 * Shallowest and deepest water over the bed, mm, slabs not counted: at the wall, since the bed is plane.
 * The shallowest is 0 where part of the bed is dry.
 */
export function depthRangeMm(setup: Setup): readonly [number, number] {
  const { tray, water } = setup;
  const slope = [Math.tan(radians(water.tiltXDeg)), Math.tan(radians(water.tiltYDeg))];
  const [lengthMm, widthMm] = traySizeMm(tray);
  const reach =
    tray.shape === "circle"
      ? (tray.diameterMm / 2) * Math.hypot(slope[0], slope[1])
      : (Math.abs(slope[0]) * lengthMm + Math.abs(slope[1]) * widthMm) / 2;
  return [Math.max(0, water.depthMm - reach), water.depthMm + reach];
}

/** @returns the deepest water that a part stands in, mm: at the places where its outline turns. */
export function depthAtPartMm(setup: Setup, part: Part): number {
  const level = setup.water.tiltXDeg === 0 && setup.water.tiltYDeg === 0 && setup.water.slabs.length === 0;
  if (level) return setup.water.depthMm;
  let deepest = 0;
  for (const piece of outlineOf(part).flat()) {
    for (const share of [0, 0.25, 0.5, 0.75]) deepest = Math.max(deepest, waterDepthMm(setup, ...pointAlong(piece, share)));
  }
  return deepest;
}

function partInWater(setup: Setup, part: Part): PartInWater {
  const depthMm = depthAtPartMm(setup, part);
  return { id: part.id, depthMm, proudMm: part.heightMm - depthMm, immersedShare: Math.min(1, depthMm / part.heightMm) };
}

/** @returns the distance over which a tilt acts on the readings, mm: the longer side of the box that holds all electrodes. */
export function tiltBaseMm(setup: Setup): number {
  const loops = setup.parts.filter((part) => part.role === "electrode").flatMap((part) => outlineOf(part));
  const [left, bottom, right, top] = boundsOf(loops.length > 0 ? loops : [trayOutline(setup.tray)]);
  return Math.max(right - left, top - bottom);
}

/**
 * Shift of the reading midway between two facing plates when the bed tilts along the current, as a share of the span. With the
 * depth h(1 ± δ) at the plates the potential runs as ln h, so that the middle reads −ln(1 − δ)/ln((1 + δ)/(1 − δ)), not ½.
 * Derived from div(σ h grad φ) = 0; about δ/4. A tray that runs dry (δ ≥ 1) gives ½.
 */
export function tiltReadingShare(depthShare: number): number {
  if (depthShare >= 1) return 0.5;
  if (depthShare < 1e-6) return depthShare / 4;
  return -Math.log1p(-depthShare) / (Math.log1p(depthShare) - Math.log1p(-depthShare)) - 0.5;
}

/** @returns the least depth (mm) at which the unnoticed tilt shifts readings by no more than `readingShare` of the span. */
export function leastDepthForTiltMm(baseMm: number, readingShare: number): number {
  let low = 0;
  let high = 1;
  for (let step = 0; step < 60; step++) {
    const middle = (low + high) / 2;
    if (tiltReadingShare(middle) < readingShare) low = middle;
    else high = middle;
  }
  return (Math.tan(radians(UNNOTICED_TILT_DEG)) * baseMm) / 2 / ((low + high) / 2);
}

/**
 * Apparent shift (mm) of a mark under the tray for an eye that looks at `angleDeg` from the vertical, against looking through air
 * alone at the surface's point: Σ t·sin θ/√(n² − sin² θ) over water and base (Snell's law; water 1.333, acrylic 1.49 published).
 */
export function parallaxMm(setup: Setup, angleDeg: number): number {
  const sine = Math.sin(radians(angleDeg));
  const through = (thicknessMm: number, index: number): number => (thicknessMm * sine) / Math.sqrt(index ** 2 - sine ** 2);
  return through(setup.water.depthMm, WATER_REFRACTIVE_INDEX) + through(setup.tray.baseMm, refractiveIndex(setup.tray.baseMaterial));
}

/** @returns freeboard, parts standing in the water, what an unnoticed tilt does, and the shift of marks seen aslant. */
export function waterGeometry(setup: Setup): WaterGeometry {
  const baseMm = tiltBaseMm(setup);
  const depthShare = (Math.tan(radians(UNNOTICED_TILT_DEG)) * baseMm) / 2 / setup.water.depthMm;
  return {
    freeboardMm: setup.tray.wallHeightMm - depthRangeMm(setup)[1],
    parts: setup.parts.map((part) => partInWater(setup, part)),
    tiltDeg: UNNOTICED_TILT_DEG,
    tiltBaseMm: baseMm,
    tiltDepthShare: depthShare,
    tiltReadingShare: tiltReadingShare(depthShare),
    parallaxAt10DegMm: parallaxMm(setup, 10),
    parallaxAt30DegMm: parallaxMm(setup, 30),
  };
}
