import { type ConductorReading, type FieldPicture, type FieldReading, OWNER_NOTHING, OWNER_WATER } from "../../../shared-types/plan";
import type { Setup } from "../../../shared-types/setup";
import { degrees, MM_PER_M } from "../../../shared-types/units";
import { gapMm } from "../geometry/clearance";
import { boxGapMm, outlined } from "../geometry/overlap";
import { covers, distanceToOutline } from "../geometry/signed-distance";
import { depthFromWallMm } from "../geometry/tray-outline";
import { waterDepthMm } from "../geometry/water-depth";
import { type FieldLayout, isEvenlyDeep, wallThicknessMm } from "./layout";
import type { PotentialField } from "./potential-field";
import { type LocalValue, type Reader, readerOf } from "./reading";
import type { FieldSolution, SolvedGrid } from "./solve-field";

/**
 * Share of the grids' typical difference over the whole tray that every bound contains beside the difference at its own
 * place: where the two grids happen to agree the error need not vanish. Calibrated on random setups (tests/reference/bounds).
 */
const TYPICAL_SHARE = 0.05;
/**
 * What the grids' difference is multiplied by where they do not converge evenly: plates a few cells thick are seen one way
 * by one grid and another way by the other, and next to depth steps nothing is fitted. Calibrated like the share above.
 */
const THIN_PLATE_FACTOR = 1.5;
const UNSEEN_PLATE_FACTOR = 4;
const DEPTH_STEP_FACTOR = 2;
const THIN_PLATE_CELLS = 4;
/** What rounding and the unfinished iteration may add to any potential, as a share of the span. */
const FLOOR_SHARE = 1e-6;
/** The bound (share of the span) where the coarser grid has no value to compare with, such as in a gap that it cannot see. */
const UNSEEN_SHARE = 0.02;

/** Bound of a potential from the same potential on the coarser grid: their whole difference, never less than the floor. */
function voltsBound(
  near: number,
  far: number | undefined,
  span: number,
  { typicalShare, factor }: Pick<PerVolt, "typicalShare" | "factor">,
): number {
  const difference = far === undefined || !Number.isFinite(far) ? UNSEEN_SHARE * span : Math.abs(near - far);
  const bound = factor * difference + (TYPICAL_SHARE * typicalShare + FLOOR_SHARE) * span;
  return Number.isFinite(bound) ? bound : UNSEEN_SHARE * span;
}

function convergenceFactor({ network }: SolvedGrid): number {
  const { layout, grid } = network;
  const thinMm = THIN_PLATE_CELLS * Math.max(grid.pitchXMm, grid.pitchYMm);
  const thinnest = Math.min(Number.POSITIVE_INFINITY, ...layout.insulators.map(({ placed }) => wallThicknessMm(placed.shape)));
  if (thinnest < thinMm / 2) return UNSEEN_PLATE_FACTOR;
  if (thinnest < thinMm) return THIN_PLATE_FACTOR;
  return layout.slabs.length > 0 ? DEPTH_STEP_FACTOR : 1;
}

/**
 * The potential in a gap too narrow for the grid: it falls evenly from the nearest conductor to the next one.
 * Null where there are no two conductors with a potential.
 */
function acrossGap({ network }: SolvedGrid, { bodyVolts }: Superposed, xMm: number, yMm: number): LocalValue | null {
  const { pitchXMm, pitchYMm } = network.grid;
  const near = network.layout.conductors
    .map(({ loops }, body) => ({ volts: bodyVolts[body], distance: distanceToOutline(loops, xMm, yMm) }))
    .filter(({ volts, distance }) => !Number.isNaN(volts) && distance < 2 * Math.max(pitchXMm, pitchYMm))
    .sort((a, b) => a.distance - b.distance);
  if (near.length < 2) return null;
  const [a, b] = near;
  const gap = a.distance + b.distance;
  if (gap === 0) return { volts: a.volts, slopeX: 0, slopeY: 0 };
  return { volts: (a.volts * b.distance + b.volts * a.distance) / gap, slopeX: (b.volts - a.volts) / gap, slopeY: 0 };
}

/** Electrodes in a body of water where all electrodes stand at one tap: nothing drives a current there. */
function cutOffOf(layout: FieldLayout, waters: readonly number[], taps: readonly number[], setup: Setup): string[] {
  return taps.flatMap((tap, electrode) => {
    const driven = taps.some((other, index) => other !== tap && waters[index] === waters[electrode]);
    return driven ? [] : [setup.parts[layout.conductors[electrode].index].id];
  });
}

/** A slit between thin plates is seen to half a cell at each side; below this many cells that is told as a bound of its own. */
const SLIT_CELLS = 8;

/** Share of current and span that an ill-resolved slit between insulating plates may cost: half a cell over its width. */
function slitShare({ network }: SolvedGrid): number {
  const { layout, grid } = network;
  const pitch = Math.max(grid.pitchXMm, grid.pitchYMm);
  const shapes = layout.insulators.map(({ placed }) => ({
    shape: outlined(placed),
    thin: wallThicknessMm(placed.shape) < THIN_PLATE_CELLS * pitch,
  }));
  let share = 0;
  shapes.forEach((first, index) => {
    for (const second of shapes.slice(index + 1)) {
      if (!first.thin && !second.thin) continue;
      if (boxGapMm(first.shape.box, second.shape.box) > SLIT_CELLS * pitch) continue;
      const gap = gapMm(first.shape, second.shape);
      if (gap > 0 && gap < SLIT_CELLS * pitch) share = Math.max(share, (0.5 * pitch) / gap);
    }
  });
  return Math.min(0.5, share);
}

/** Root mean square of the grids' difference over the nodes that both have, as a share of the span. */
function typicalDifference(fine: SolvedGrid, near: Superposed, coarse: SolvedGrid, far: Superposed): number {
  const { columns, rows } = coarse.network.grid;
  const fineColumns = fine.network.grid.columns;
  let sum = 0;
  let count = 0;
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      const here = row * columns + column;
      const there = 2 * row * fineColumns + 2 * column;
      if (coarse.network.active[here] === 0 || fine.network.active[there] === 0) continue;
      const difference = far.potentials[here] - near.potentials[there];
      sum += difference * difference;
      count++;
    }
  }
  const taps = near.bodyVolts.slice(0, near.fluxes.length);
  return count === 0 ? UNSEEN_SHARE : Math.sqrt(sum / count) / (Math.max(...taps) - Math.min(...taps));
}

/** One solved grid at given electrode potentials. */
interface Superposed {
  readonly potentials: Float64Array;
  readonly bodyVolts: readonly number[];
  /** Current of each electrode per σ, V·mm (flux per volt times volts). */
  readonly fluxes: readonly number[];
  readonly reader: Reader;
}

function superpose({ network, units, map }: SolvedGrid, electrodeVolts: readonly number[]): Superposed {
  const { grid, layout } = network;
  const count = electrodeVolts.length;
  const potentials = new Float64Array(grid.columns * grid.rows);
  units.potentials.forEach((unit, electrode) => {
    const volts = electrodeVolts[electrode];
    if (volts !== 0) for (let node = 0; node < potentials.length; node++) potentials[node] += volts * unit[node];
  });
  const floatingVolts = layout.conductors.slice(count).map((_, f) => {
    if (network.waters[count + f] < 0) return Number.NaN;
    return units.floating.reduce((sum, shares, electrode) => sum + shares[f] * electrodeVolts[electrode], 0);
  });
  const bodyVolts = [...electrodeVolts, ...floatingVolts];
  const fluxes = electrodeVolts.map((_, e) =>
    electrodeVolts.reduce((sum, volts, f) => sum + units.conductanceMm[e * count + f] * volts, 0),
  );
  return { potentials, bodyVolts, fluxes, reader: readerOf(network, map, potentials, bodyVolts) };
}

/** Largest field at each conductor's wetted face, V/mm: the mean over about one pitch next to the metal. */
function largestSurfaceFields({ network }: SolvedGrid, { potentials, bodyVolts }: Superposed): number[] {
  const { columns, pitchXMm, pitchYMm } = network.grid;
  const pitch = Math.max(pitchXMm, pitchYMm);
  return network.contacts.map((contact, body) => {
    let largest = 0;
    for (const node of contact.nodes) {
      const distance = distanceToOutline(
        network.layout.conductors[body].loops,
        (node % columns) * pitchXMm,
        Math.floor(node / columns) * pitchYMm,
      );
      if (distance > 0.3 * pitch && distance < 1.5 * pitch)
        largest = Math.max(largest, Math.abs(bodyVolts[body] - potentials[node]) / distance);
    }
    return largest;
  });
}

function pictureOf({ network }: SolvedGrid, { potentials, bodyVolts }: Superposed): FieldPicture {
  const { owner, body } = network.ownership;
  const { columns, rows, pitchXMm, pitchYMm } = network.grid;
  const volts = new Float32Array(columns * rows);
  for (let node = 0; node < volts.length; node++) {
    volts[node] = body[node] >= 0 ? bodyVolts[body[node]] : owner[node] === OWNER_WATER ? potentials[node] : Number.NaN;
  }
  return { columns, rows, pitchXMm, pitchYMm, volts, owner };
}

/** A field with the electrical totals that need the conductivity. */
export interface SuperposedField extends PotentialField {
  /** Ids of electrodes that no water or metal joins to an electrode at another tap. */
  readonly cutOff: readonly string[];
  /** Ids of floating conductors whose potential is undetermined, and whether some water is too. */
  readonly undetermined: { readonly ids: readonly string[]; readonly water: boolean };
  /** Current leaving the higher electrodes over σ, with its numerical bound: V·mm. */
  readonly totalFlux: { readonly value: number; readonly error: number };
}

/** The field of a solution at a supply of 1 V and given taps; any volts are a multiple of it. */
interface PerVolt {
  readonly near: Superposed;
  readonly far: Superposed;
  readonly picture: FieldPicture;
  readonly surfaceFields: readonly number[];
  readonly typicalShare: number;
  readonly factor: number;
}

/** Gives the fields of one solution; the newest taps are remembered, so that other volts cost a multiplication. */
export type Superposer = (setup: Setup, conductivitySPerM: number) => SuperposedField;

const tapsOf = (layout: FieldLayout, setup: Setup): number[] =>
  layout.conductors.slice(0, layout.electrodeCount).map(({ index }) => {
    const part = setup.parts[index];
    return part.role === "electrode" ? part.tap : 0;
  });

const sumOfPositive = (fluxes: readonly number[]): number => fluxes.reduce((sum, flux) => sum + Math.max(0, flux), 0);

/** @returns readings of the field at `volts` times the potentials per volt. */
function readingsOf(
  solution: FieldSolution,
  setup: Setup,
  perVolt: PerVolt,
  conductors: readonly ConductorReading[],
): PotentialField["read"] {
  const { volts } = setup.supply;
  const span = volts * tapSpan(perVolt);
  const nothing = (xMm: number, yMm: number, inside: string | null): FieldReading => ({
    xMm,
    yMm,
    inside,
    volts: null,
    voltsError: 0,
    fieldVPerM: 0,
    directionDeg: 0,
  });
  return (xMm, yMm) => {
    if (!(depthFromWallMm(setup.tray, xMm, yMm) >= -1e-9)) return nothing(xMm, yMm, null);
    const index = setup.parts.findIndex((part) => covers(part, xMm, yMm));
    if (index >= 0) {
      const conductor = conductors.find(({ id }) => id === setup.parts[index].id);
      if (conductor === undefined || Number.isNaN(conductor.volts)) return nothing(xMm, yMm, setup.parts[index].id);
      const { id, volts: bodyVolts, voltsError } = conductor;
      return { xMm, yMm, inside: id, volts: bodyVolts, voltsError, fieldVPerM: 0, directionDeg: 0 };
    }
    if (waterDepthMm(setup, xMm, yMm) <= 0 || nearestIsLost(solution.fine, xMm, yMm)) return nothing(xMm, yMm, null);
    const here = perVolt.near.reader.at(xMm, yMm) ?? acrossGap(solution.fine, perVolt.near, xMm, yMm);
    if (here === null) return nothing(xMm, yMm, null);
    const coarser = perVolt.far.reader.at(xMm, yMm);
    if (!Number.isFinite(here.volts)) return nothing(xMm, yMm, null);
    const slope = Math.hypot(here.slopeX, here.slopeY);
    const fieldVPerM = Number.isFinite(slope) ? volts * slope * MM_PER_M : 0;
    return {
      xMm,
      yMm,
      inside: null,
      volts: volts * here.volts,
      voltsError: voltsBound(volts * here.volts, coarser === null ? undefined : volts * coarser.volts, span, perVolt),
      fieldVPerM,
      directionDeg: fieldVPerM === 0 ? 0 : degrees(Math.atan2(-here.slopeY, -here.slopeX)),
    };
  };
}

function tapSpan({ near }: PerVolt): number {
  const taps = near.bodyVolts.slice(0, near.fluxes.length);
  return Math.max(...taps) - Math.min(...taps);
}

/**
 * Prepares the fields of a solution at any volts, taps and conductivity: the unit potentials are added up. No solve is needed.
 * The setups given to it must have the geometry of the solution.
 */
export function superposerOf(solution: FieldSolution): Superposer {
  const { fine, coarse, layout } = solution;
  let remembered: { readonly key: string; readonly perVolt: PerVolt } | null = null;

  function perVoltFor(taps: readonly number[]): PerVolt {
    const key = taps.join(" ");
    if (remembered?.key === key) return remembered.perVolt;
    const near = superpose(fine, taps);
    const far = superpose(coarse, taps);
    const perVolt = {
      near,
      far,
      picture: pictureOf(fine, near),
      surfaceFields: largestSurfaceFields(fine, near),
      factor: convergenceFactor(fine),
      typicalShare: convergenceFactor(fine) * typicalDifference(fine, near, coarse, far) + slitShare(fine) / TYPICAL_SHARE,
    };
    remembered = { key, perVolt };
    return perVolt;
  }

  return (setup, conductivitySPerM) => {
    const taps = tapsOf(layout, setup);
    const perVolt = perVoltFor(taps);
    const { near, far, picture, surfaceFields, typicalShare, factor } = perVolt;
    const fluxShare = TYPICAL_SHARE * typicalShare + FLOOR_SHARE;
    const { volts } = setup.supply;
    const span = volts * tapSpan(perVolt);
    // In evenly deep water the currents grow as the depth: div(σ h grad φ) = 0 with one h.
    const deeper = isEvenlyDeep(setup) ? setup.water.depthMm / layout.setup.water.depthMm : 1;
    const total = sumOfPositive(near.fluxes);
    const amperes = (flux: number): number => (volts * deeper * flux * conductivitySPerM) / MM_PER_M;
    const conductors = layout.conductors.map(({ index }, body): ConductorReading => {
      const electrode = body < layout.electrodeCount;
      const flux = electrode ? near.fluxes[body] : 0;
      return {
        id: setup.parts[index].id,
        role: electrode ? "electrode" : "floating",
        volts: volts * near.bodyVolts[body],
        voltsError: electrode ? 0 : voltsBound(volts * near.bodyVolts[body], volts * far.bodyVolts[body], span, perVolt),
        currentA: amperes(flux),
        currentErrorA: electrode ? amperes(factor * Math.abs(flux - far.fluxes[body]) + fluxShare * total) : 0,
        largestCurrentDensityAPerM2: volts * conductivitySPerM * surfaceFields[body] * MM_PER_M,
      };
    });
    const { network, units } = fine;
    return {
      numerics: {
        pitchMm: Math.max(network.grid.pitchXMm, network.grid.pitchYMm),
        unknowns: units.unknowns,
        iterations: units.record.iterations,
        relativeResidual: units.record.relativeResidual,
        elapsedMs: 0,
      },
      spanV: [volts * Math.min(...taps), volts * Math.max(...taps)],
      picture: { ...picture, volts: picture.volts.map((value) => volts * value) },
      conductors,
      totalFlux: {
        value: volts * deeper * total,
        error: volts * deeper * (Math.abs(total - sumOfPositive(far.fluxes)) + fluxShare * total),
      },
      read: readingsOf(solution, setup, perVolt, conductors),
      cutOff: cutOffOf(layout, network.waters, taps, setup),
      undetermined: {
        ids: conductors.flatMap(({ id, volts: potential }) => (Number.isNaN(potential) ? [id] : [])),
        water: network.lostNodes > 0,
      },
    };
  };
}
/** Whether all nodes round a place lie where no electrode's potential reaches. */
function nearestIsLost({ network }: SolvedGrid, xMm: number, yMm: number): boolean {
  const { columns, rows, pitchXMm, pitchYMm } = network.grid;
  const column = Math.min(columns - 2, Math.max(0, Math.floor(xMm / pitchXMm)));
  const row = Math.min(rows - 2, Math.max(0, Math.floor(yMm / pitchYMm)));
  return [0, 1, columns, columns + 1].every((step) => network.ownership.owner[row * columns + column + step] === OWNER_NOTHING);
}
