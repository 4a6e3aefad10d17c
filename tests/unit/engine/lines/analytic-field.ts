import type { PotentialField } from "../../../../renderer/engine/field/potential-field";
import { covers } from "../../../../renderer/engine/geometry/signed-distance";
import { depthFromWallMm, traySizeMm } from "../../../../renderer/engine/geometry/tray-outline";
import { waterDepthMm } from "../../../../renderer/engine/geometry/water-depth";
import { parseSetup } from "../../../../shared-types/parse-setup";
import { type ConductorReading, type FieldReading, OWNER_NOTHING, OWNER_WATER } from "../../../../shared-types/plan";
import type { Setup } from "../../../../shared-types/setup";
import { degrees } from "../../../../shared-types/units";

/** @returns a setup of a test: 300 mm × 200 mm, 10 mm of water, 8 V, overridden where said; a fault of the test throws. */
export function setupWith(parts: readonly object[], rest: { tray?: object; water?: object; probing?: object; meter?: object } = {}): Setup {
  const parsed = parseSetup({
    format: "fieldtray.setup",
    version: 1,
    tray: rest.tray ?? { shape: "rectangle", lengthMm: 300, widthMm: 200 },
    water: { depthMm: 10, conductivityUsPerCm: 500, ...rest.water },
    supply: { waveform: "ac", volts: 8 },
    meter: rest.meter ?? {},
    probing: rest.probing ?? {},
    parts,
  });
  if (!parsed.ok) throw new Error(parsed.problems.map(({ message }) => message).join("; "));
  return parsed.value;
}

/**
 * A field known in closed form, in the dress of a solved one.
 * @param voltsAt potential in the water, V.
 * @param floatingVolts potentials of the loose conductors by id.
 */
export function analyticField(
  setup: Setup,
  voltsAt: (xMm: number, yMm: number) => number,
  pitchMm: number,
  floatingVolts: Readonly<Record<string, number>> = {},
): PotentialField {
  const [lengthMm, widthMm] = traySizeMm(setup.tray);
  const columns = Math.round(lengthMm / pitchMm) + 1;
  const rows = Math.round(widthMm / pitchMm) + 1;
  const [pitchXMm, pitchYMm] = [lengthMm / (columns - 1), widthMm / (rows - 1)];
  const metalVolts = (index: number): number => {
    const part = setup.parts[index];
    return part.role === "electrode" ? part.tap * setup.supply.volts : part.role === "floating" ? floatingVolts[part.id] : Number.NaN;
  };
  const volts = new Float32Array(columns * rows);
  const owner = new Int16Array(columns * rows);
  for (let node = 0; node < volts.length; node++) {
    const x = (node % columns) * pitchXMm;
    const y = Math.floor(node / columns) * pitchYMm;
    const part = setup.parts.findIndex((each) => covers(each, x, y));
    const wet = depthFromWallMm(setup.tray, x, y) >= -1e-9 && waterDepthMm(setup, x, y) > 0;
    owner[node] = part >= 0 ? part : wet ? OWNER_WATER : OWNER_NOTHING;
    volts[node] = part >= 0 ? metalVolts(part) : wet ? voltsAt(x, y) : Number.NaN;
  }
  const read = (xMm: number, yMm: number): FieldReading => {
    const place = { xMm, yMm, voltsError: 0, fieldVPerM: 0, directionDeg: 0 };
    if (depthFromWallMm(setup.tray, xMm, yMm) < -1e-9) return { ...place, inside: null, volts: null };
    const part = setup.parts.findIndex((each) => covers(each, xMm, yMm));
    if (part >= 0) return { ...place, inside: setup.parts[part].id, volts: Number.isNaN(metalVolts(part)) ? null : metalVolts(part) };
    if (waterDepthMm(setup, xMm, yMm) <= 0) return { ...place, inside: null, volts: null };
    const step = 1e-4;
    const slopeX = (voltsAt(xMm + step, yMm) - voltsAt(xMm - step, yMm)) / (2 * step);
    const slopeY = (voltsAt(xMm, yMm + step) - voltsAt(xMm, yMm - step)) / (2 * step);
    return {
      ...place,
      inside: null,
      volts: voltsAt(xMm, yMm),
      fieldVPerM: 1000 * Math.hypot(slopeX, slopeY),
      directionDeg: degrees(Math.atan2(-slopeY, -slopeX)),
    };
  };
  const taps = setup.parts.flatMap((part) => (part.role === "electrode" ? [part.tap * setup.supply.volts] : []));
  const conductors = setup.parts.flatMap((part, index): ConductorReading[] => {
    if (part.role === "insulator") return [];
    return [
      {
        id: part.id,
        role: part.role,
        volts: metalVolts(index),
        voltsError: 0,
        currentA: 0,
        currentErrorA: 0,
        largestCurrentDensityAPerM2: 0,
      },
    ];
  });
  return {
    numerics: { pitchMm, unknowns: 0, iterations: 0, relativeResidual: 0, elapsedMs: 0 },
    spanV: [Math.min(...taps), Math.max(...taps)],
    picture: { columns, rows, pitchXMm, pitchYMm, volts, owner },
    conductors,
    read,
  };
}

/** Full-width bars at the ends of the tray, faces at x = 50 and 250 mm: the field between them is uniform, 0.04 V/mm. */
export const fullWidthBars: readonly object[] = [
  { id: "A", name: "Left bar", role: "electrode", tap: 0, xMm: 45, yMm: 100, shape: { kind: "bar", lengthMm: 10, widthMm: 200 } },
  { id: "B", name: "Right bar", role: "electrode", tap: 1, xMm: 255, yMm: 100, shape: { kind: "bar", lengthMm: 10, widthMm: 200 } },
];

/** The uniform field of those bars; behind them the potential is theirs. */
export const uniformVolts = (x: number): number => Math.min(8, Math.max(0, 0.04 * (x - 50)));

/** A disc of 20 mm at 8 V in a ring of inner diameter 160 mm at 0 V, both round (150, 100): φ falls with the logarithm of r. */
export const discInRing: readonly object[] = [
  { id: "A", name: "Disc", role: "electrode", tap: 1, xMm: 150, yMm: 100, shape: { kind: "disc", diameterMm: 20 } },
  { id: "B", name: "Ring", role: "electrode", tap: 0, xMm: 150, yMm: 100, shape: { kind: "ring", outerMm: 170, innerMm: 160 } },
];
export const coaxialVolts = (x: number, y: number): number => Math.max(0, (8 * Math.log(80 / Math.hypot(x - 150, y - 100))) / Math.log(8));
