import { crossingsOf } from "../geometry/crossings-of-pieces";
import { distanceToOutline } from "../geometry/signed-distance";
import type { FittedNetwork } from "./fit";
import { wallThicknessMm } from "./layout";
import { fitAtCentre, type ScatteredValues, scatteredValues } from "./local-polynomial";

/** Potential and its slope at a place in the water. */
export interface LocalValue {
  readonly volts: number;
  /** V/mm along x and y. */
  readonly slopeX: number;
  readonly slopeY: number;
}

/** Reads potentials between the nodes of one solved grid. */
export interface Reader {
  /** @returns the potential at a place in the water (mm), or null where the grid has no node near it. */
  readonly at: (xMm: number, yMm: number) => LocalValue | null;
}

/** What a reader needs beside the network and can share between voltages: which nodes need care. */
export interface ReadingMap {
  /** 0: plain water. 1: near an insulator, wall or step. 2 + b: near conductor b. */
  readonly care: Int16Array;
}

/** Cells round a conductor's contacts in which readings follow its local potential. */
const CARE_CELLS = 3;
/** Half-width of the window from which a careful reading takes its nodes. */
const WINDOW = 2;
const WINDOW_WIDTH = 2 * WINDOW + 2;

/** @returns the map of nodes near which a plain interpolation would not do. */
export function readingMap(network: FittedNetwork): ReadingMap {
  const { grid, contacts, conduction, active } = network;
  const { columns, rows } = grid;
  const care = new Int16Array(columns * rows);
  for (let node = 0; node < care.length; node++) {
    if (active[node] === 0 || conduction.nearStep(node) || conduction.nearInsulator(node)) care[node] = 1;
  }
  contacts.forEach((contact, body) => {
    for (const node of contact.nodes) {
      const column = node % columns;
      const row = Math.floor(node / columns);
      for (let j = Math.max(0, row - CARE_CELLS); j <= Math.min(rows - 1, row + CARE_CELLS); j++) {
        for (let i = Math.max(0, column - CARE_CELLS); i <= Math.min(columns - 1, column + CARE_CELLS); i++)
          care[j * columns + i] = 2 + body;
      }
    }
  });
  return { care };
}

/** Lagrange weights for nodes at -1, 0, 1, 2 and their slopes at t in [0, 1]. */
function cubicWeights(t: number, weights: Float64Array, slopes: Float64Array): void {
  weights[0] = (-t * (t - 1) * (t - 2)) / 6;
  weights[1] = ((t + 1) * (t - 1) * (t - 2)) / 2;
  weights[2] = (-(t + 1) * t * (t - 2)) / 2;
  weights[3] = ((t + 1) * t * (t - 1)) / 6;
  slopes[0] = -(3 * t * t - 6 * t + 2) / 6;
  slopes[1] = (3 * t * t - 4 * t - 1) / 2;
  slopes[2] = -(3 * t * t - 2 * t - 2) / 2;
  slopes[3] = (3 * t * t - 1) / 6;
}

/**
 * @param potentials volts at every node (row-major).
 * @param bodyVolts volts of every conductor of the layout.
 * @returns a reader: bicubic in open water; near a conductor the ratio to its local potential is interpolated, which is
 * smooth even at corners and tips; near insulators and steps a least-squares polynomial over nodes of the same water.
 */
export function readerOf(network: FittedNetwork, map: ReadingMap, potentials: Float64Array, bodyVolts: readonly number[]): Reader {
  const { grid, active, east, north, conduction, layout, localFields } = network;
  const { columns, rows, pitchXMm, pitchYMm } = grid;
  const { care } = map;
  const plates = layout.insulators.filter(({ placed }) => wallThicknessMm(placed.shape) < 2 * Math.max(pitchXMm, pitchYMm));
  const weightsX = new Float64Array(4);
  const slopesX = new Float64Array(4);
  const weightsY = new Float64Array(4);
  const slopesY = new Float64Array(4);
  const values = scatteredValues(WINDOW_WIDTH * WINDOW_WIDTH);
  const reached = new Uint8Array(WINDOW_WIDTH * WINDOW_WIDTH);
  const queue = new Int32Array(WINDOW_WIDTH * WINDOW_WIDTH);

  /** Index of a node beyond the wall, reflected back: no current crosses a straight wall. */
  const reflected = (index: number, count: number): number => (index < 0 ? -index : index >= count ? 2 * (count - 1) - index : index);

  function bicubic(column: number, row: number, u: number, v: number): LocalValue {
    cubicWeights(u, weightsX, slopesX);
    cubicWeights(v, weightsY, slopesY);
    let volts = 0;
    let slopeX = 0;
    let slopeY = 0;
    for (let b = 0; b < 4; b++) {
      const line = reflected(row + b - 1, rows) * columns;
      let value = 0;
      let slope = 0;
      for (let a = 0; a < 4; a++) {
        const potential = potentials[line + reflected(column + a - 1, columns)];
        value += weightsX[a] * potential;
        slope += slopesX[a] * potential;
      }
      volts += weightsY[b] * value;
      slopeX += weightsY[b] * slope;
      slopeY += slopesY[b] * value;
    }
    return { volts, slopeX: slopeX / pitchXMm, slopeY: slopeY / pitchYMm };
  }

  /** Marks the window's nodes that the water connects with the node nearest to the place. */
  function flood(column0: number, row0: number, start: number): void {
    reached.fill(0);
    let tail = 0;
    const visit = (column: number, row: number): void => {
      const a = column - column0;
      const b = row - row0;
      if (a < 0 || b < 0 || a >= WINDOW_WIDTH || b >= WINDOW_WIDTH || column >= columns || row >= rows || column < 0 || row < 0) return;
      if (reached[b * WINDOW_WIDTH + a] === 1) return;
      reached[b * WINDOW_WIDTH + a] = 1;
      queue[tail++] = row * columns + column;
    };
    visit(start % columns, Math.floor(start / columns));
    for (let head = 0; head < tail; head++) {
      const node = queue[head];
      const column = node % columns;
      const row = (node - column) / columns;
      if (east[node] > 0) visit(column + 1, row);
      if (column > 0 && east[node - 1] > 0) visit(column - 1, row);
      if (north[node] > 0) visit(column, row + 1);
      if (row > 0 && north[node - columns] > 0) visit(column, row - 1);
    }
  }

  /** The active node nearest to a place among those of its cell and the next ring; -1 when there is none. */
  function nearestActive(x: number, y: number, column: number, row: number, body: number): number {
    let best = -1;
    let nearest = Infinity;
    for (let j = Math.max(0, row - 1); j <= Math.min(rows - 1, row + 2); j++) {
      for (let i = Math.max(0, column - 1); i <= Math.min(columns - 1, column + 2); i++) {
        const node = j * columns + i;
        if (active[node] === 0) continue;
        const distance = Math.hypot(i * pitchXMm - x, j * pitchYMm - y);
        if (distance < nearest && sameSide(x, y, i * pitchXMm, j * pitchYMm, body)) {
          nearest = distance;
          best = node;
        }
      }
    }
    return best;
  }

  /** Whether a thin insulating plate stands between two places. */
  function passesPlate(x0: number, y0: number, x1: number, y1: number): boolean {
    if (x0 === x1 && y0 === y1) return false;
    const way = { kind: "edge", x0, y0, x1, y1 } as const;
    const [left, bottom, right, top] = [Math.min(x0, x1), Math.min(y0, y1), Math.max(x0, x1), Math.max(y0, y1)];
    return plates.some(
      ({ bounds, loops }) =>
        bounds[0] <= right &&
        bounds[2] >= left &&
        bounds[1] <= top &&
        bounds[3] >= bottom &&
        loops.some((loop) => loop.some((piece) => crossingsOf(way, piece).length > 0)),
    );
  }

  /** Whether a node sees the place past a thin conductor: the middle of the way must be in the water as well. */
  function sameSide(x: number, y: number, nodeX: number, nodeY: number, body: number): boolean {
    if (plates.length > 0 && passesPlate(x, y, nodeX, nodeY)) return false;
    if (body < 0) return true;
    const potential = localFields[body].at(x, y);
    return potential === null || (potential(nodeX, nodeY) > 0 && potential((x + nodeX) / 2, (y + nodeY) / 2) > 0);
  }

  function careful(x: number, y: number, column: number, row: number, body: number): LocalValue | null {
    const start = nearestActive(x, y, column, row, body);
    if (start < 0) return null;
    const column0 = column - WINDOW;
    const row0 = row - WINDOW;
    flood(column0, row0, start);
    const depth = layout.slabs.length > 0 ? conduction.slabThicknessAt(x, y) : 0;
    const potential = body >= 0 && !conduction.nearWaterline(x, y) ? localFields[body].at(x, y) : null;
    const level = conduction.isLevel;
    values.count = 0;
    for (let b = 0; b < WINDOW_WIDTH; b++) {
      for (let a = 0; a < WINDOW_WIDTH; a++) {
        if (reached[b * WINDOW_WIDTH + a] === 0) continue;
        const nodeX = (column0 + a) * pitchXMm;
        const nodeY = (row0 + b) * pitchYMm;
        if (layout.slabs.length > 0 && conduction.slabThicknessAt(nodeX, nodeY) !== depth) continue;
        let value = potentials[(row0 + b) * columns + column0 + a];
        if (potential !== null) {
          let local = potential(nodeX, nodeY);
          if (!level) local /= Math.sqrt(Math.max(1e-6, conduction.depthAt(nodeX, nodeY)));
          if (!(local > 0)) continue;
          value = (value - bodyVolts[body]) / local;
        }
        put(values, (nodeX - x) / pitchXMm, (nodeY - y) / pitchYMm, value);
      }
    }
    const fitted = fitAtCentre(values);
    if (fitted === null) return null;
    if (potential === null) return { volts: fitted[0], slopeX: fitted[1] / pitchXMm, slopeY: fitted[2] / pitchYMm };
    return fromRatio(x, y, fitted, potential, bodyVolts[body], level);
  }

  function fromRatio(
    x: number,
    y: number,
    [ratio, ratioX, ratioY]: readonly [number, number, number],
    potential: (x: number, y: number) => number,
    volts: number,
    level: boolean,
  ): LocalValue {
    const step = 1e-4 * pitchXMm;
    const scaled = (px: number, py: number): number =>
      potential(px, py) / (level ? 1 : Math.sqrt(Math.max(1e-6, conduction.depthAt(px, py))));
    const here = scaled(x, y);
    const localX = (scaled(x + step, y) - scaled(x - step, y)) / (2 * step);
    const localY = (scaled(x, y + step) - scaled(x, y - step)) / (2 * step);
    return {
      volts: volts + here * ratio,
      slopeX: localX * ratio + (here * ratioX) / pitchXMm,
      slopeY: localY * ratio + (here * ratioY) / pitchYMm,
    };
  }

  /** The conductor whose surface is nearest among those that the cell's nodes name. */
  function bodyNear(x: number, y: number, node: number): number {
    let best = -1;
    let nearest = Infinity;
    for (const corner of [node, node + 1, node + columns, node + columns + 1]) {
      const body = care[corner] - 2;
      if (body < 0 || body === best) continue;
      const distance = distanceToOutline(layout.conductors[body].loops, x, y);
      if (distance < nearest) {
        nearest = distance;
        best = body;
      }
    }
    return best;
  }

  return {
    at: (x, y) => {
      const column = Math.min(columns - 2, Math.max(0, Math.floor(x / pitchXMm)));
      const row = Math.min(rows - 2, Math.max(0, Math.floor(y / pitchYMm)));
      const node = row * columns + column;
      const worst = Math.max(care[node], care[node + 1], care[node + columns], care[node + columns + 1]);
      const plain = worst === 0 && blockIsPlain(column, row);
      if (plain) return bicubic(column, row, x / pitchXMm - column, y / pitchYMm - row);
      return careful(x, y, column, row, bodyNear(x, y, node));
    },
  };

  function blockIsPlain(column: number, row: number): boolean {
    for (let b = -1; b <= 2; b++) {
      const line = reflected(row + b, rows) * columns;
      for (let a = -1; a <= 2; a++) if (care[line + reflected(column + a, columns)] === 1) return false;
    }
    return true;
  }
}

function put(values: ScatteredValues, dx: number, dy: number, value: number): void {
  values.dx[values.count] = dx;
  values.dy[values.count] = dy;
  values.value[values.count] = value;
  values.count++;
}
