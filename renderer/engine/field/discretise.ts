import { OWNER_NOTHING, OWNER_WATER } from "../../../shared-types/plan";
import { trayOutline } from "../geometry/tray-outline";
import { type Conduction, conductionOf } from "./conduction";
import { type CutLink, cutLinks } from "./contacts";
import type { ScanAxis } from "./crossings";
import type { Grid } from "./grid";
import type { FieldLayout } from "./layout";
import { type Ownership, ownNodes, SURFACE_SHARE } from "./ownership";

/** Conductance between one conductor and the nodes next to it. */
export interface Contact {
  /** Node indices, ascending. */
  readonly nodes: number[];
  /** Flux per volt from the conductor to each node, mm. */
  readonly conductances: number[];
}

/** Water between two conductors that are nearer to each other than a link is long. */
export interface Bridge {
  readonly bodyA: number;
  readonly bodyB: number;
  readonly conductanceMm: number;
}

/**
 * The discrete field: a network of conductances (flux per volt, mm of depth) between grid nodes and conductors.
 * `east[n]` links node n with n + 1, `north[n]` with n + columns.
 */
export interface Network {
  readonly layout: FieldLayout;
  readonly grid: Grid;
  readonly ownership: Ownership;
  readonly conduction: Conduction;
  /** 1 where the node's potential is unknown. */
  readonly active: Uint8Array;
  readonly east: Float64Array;
  readonly north: Float64Array;
  readonly contacts: readonly Contact[];
  readonly bridges: readonly Bridge[];
  /**
   * For each conductor the body of water that it stands in, as a number shared by all conductors that are joined through
   * water or each other; -1 where no electrode reaches it and its potential is undetermined.
   */
  readonly waters: readonly number[];
  /** Nodes in water that no electrode's potential reaches. */
  readonly lostNodes: number;
}

type ContactMap = readonly Map<number, number>[];

/** Links along one axis: plain ones between nodes, cut ones to conductors, and bridges across narrow gaps. */
function linkNodes(
  axis: ScanAxis,
  links: Float64Array,
  cut: readonly CutLink[],
  context: { layout: FieldLayout; grid: Grid; ownership: Ownership; conduction: Conduction },
  contacts: ContactMap,
  bridges: Bridge[],
): void {
  const { grid, ownership, conduction } = context;
  const { columns, rows } = grid;
  const { body } = ownership;
  const step = axis === "row" ? 1 : columns;
  const lastColumn = axis === "row" ? columns - 1 : columns;
  const lastRow = axis === "row" ? rows : rows - 1;
  for (let row = 0; row < lastRow; row++) {
    for (let column = 0; column < lastColumn; column++) {
      const node = row * columns + column;
      if (body[node] < 0 && body[node + step] < 0) links[node] = conduction.along(axis, column, row);
    }
  }
  const touch = (number: number, node: number, conductance: number): void => {
    if (conductance > 0) contacts[number].set(node, (contacts[number].get(node) ?? 0) + conductance);
  };
  const done = new Set<number>();
  for (const { node, cuts } of cut) {
    const other = node + step;
    done.add(node);
    links[node] = 0;
    const whole = conduction.along(axis, node % columns, Math.floor(node / columns));
    if (whole <= 0) continue;
    const marks = [...cuts];
    if (body[node] >= 0) marks.unshift({ share: 0, body: body[node] });
    else touch(marks[0].body, node, whole / Math.max(SURFACE_SHARE, marks[0].share));
    if (body[other] >= 0) marks.push({ share: 1, body: body[other] });
    else touch(marks[marks.length - 1].body, other, whole / Math.max(SURFACE_SHARE, 1 - marks[marks.length - 1].share));
    for (let index = 0; index + 1 < marks.length; index++) {
      const [a, b] = [marks[index], marks[index + 1]];
      if (a.body !== b.body)
        bridges.push({ bodyA: a.body, bodyB: b.body, conductanceMm: whole / Math.max(SURFACE_SHARE, b.share - a.share) });
    }
  }
  // Links that end on metal without a cut of their own: the surface runs through the far node itself.
  for (let row = 0; row < lastRow; row++) {
    for (let column = 0; column < lastColumn; column++) {
      const node = row * columns + column;
      const here = body[node];
      const there = body[node + step];
      if (here === there || done.has(node)) continue;
      const whole = conduction.along(axis, column, row);
      if (whole <= 0) continue;
      if (here >= 0 && there >= 0) bridges.push({ bodyA: here, bodyB: there, conductanceMm: whole });
      else touch(Math.max(here, there), here >= 0 ? node + step : node, whole);
    }
  }
}

/** Smallest ratio of a cell's effective radius to a part's for which a part is tied to a single node. */
const LEAST_WELL_RATIO = 1.5;

/**
 * A conductor so small that no link meets it is tied to its nearest node like a well to its cell, so that it never vanishes:
 * flux 2πk/ln(r₀/a) with r₀ = 0.2 pitch (D. W. Peaceman, SPE J. 18 (1978) 183).
 */
function tieSmallConductors(layout: FieldLayout, grid: Grid, ownership: Ownership, conduction: Conduction, contacts: ContactMap): void {
  layout.conductors.forEach(({ bounds }, body) => {
    if (contacts[body].size > 0 || ownership.body.includes(body)) return;
    const [left, bottom, right, top] = bounds;
    const column = Math.round((left + right) / 2 / grid.pitchXMm);
    const row = Math.round((bottom + top) / 2 / grid.pitchYMm);
    if (column < 0 || row < 0 || column >= grid.columns || row >= grid.rows) return;
    const node = row * grid.columns + column;
    if (ownership.owner[node] !== OWNER_WATER) return;
    const radius = (right - left + top - bottom) / 4;
    const ratio = Math.max(LEAST_WELL_RATIO, (0.2 * Math.min(grid.pitchXMm, grid.pitchYMm)) / radius);
    const depth = conduction.depthAt(column * grid.pitchXMm, row * grid.pitchYMm);
    contacts[body].set(node, (2 * Math.PI * depth) / Math.log(ratio));
  });
}

interface Reach {
  readonly nodes: Uint8Array;
  readonly bodies: readonly number[];
}

/** What an electrode's potential reaches, through water and through floating conductors. */
function reachOfElectrodes(
  network: { grid: Grid; east: Float64Array; north: Float64Array },
  electrodeCount: number,
  contacts: ContactMap,
  bridges: readonly Bridge[],
): Reach {
  const { east, north } = network;
  const { columns } = network.grid;
  const nodes = new Uint8Array(east.length);
  const bodies = contacts.map(() => -1);
  let water = 0;
  const touching = new Map<number, number[]>();
  contacts.forEach((contact, body) => {
    for (const node of contact.keys()) touching.set(node, [...(touching.get(node) ?? []), body]);
  });
  const queue = new Int32Array(east.length);
  let tail = 0;
  const visit = (node: number): void => {
    if (nodes[node] === 1) return;
    nodes[node] = 1;
    queue[tail++] = node;
  };
  const visitBody = (body: number): void => {
    if (bodies[body] >= 0) return;
    bodies[body] = water;
    for (const node of contacts[body].keys()) visit(node);
    for (const { bodyA, bodyB } of bridges) {
      if (bodyA === body) visitBody(bodyB);
      else if (bodyB === body) visitBody(bodyA);
    }
  };
  let head = 0;
  for (let electrode = 0; electrode < electrodeCount; electrode++) {
    if (bodies[electrode] >= 0) continue;
    visitBody(electrode);
    for (; head < tail; head++) {
      const node = queue[head];
      if (east[node] > 0) visit(node + 1);
      if (node > 0 && east[node - 1] > 0) visit(node - 1);
      if (north[node] > 0) visit(node + columns);
      if (node >= columns && north[node - columns] > 0) visit(node - columns);
      for (const body of touching.get(node) ?? []) visitBody(body);
    }
    water++;
  }
  return { nodes, bodies };
}

/**
 * Turns a layout into a network on a grid by finite volumes. Conductors cut the links where their outline is (second order
 * whatever the part's place on the grid); insulators and walls narrow the dual faces; depth weighs every link.
 */
export function* discretise(layout: FieldLayout, grid: Grid): Generator<void, Network> {
  const { columns, rows } = grid;
  const ownership = ownNodes(layout, grid);
  const wall = layout.setup.tray.shape === "circle" ? trayOutline(layout.setup.tray) : null;
  const isInsulated = (node: number): boolean => ownership.owner[node] >= 0 && ownership.body[node] < 0;
  yield;
  const cut = cutLinks(layout, grid, ownership);
  yield;
  const conduction = conductionOf(layout, grid, wall, isInsulated);
  const east = new Float64Array(columns * rows);
  const north = new Float64Array(columns * rows);
  const contactMaps = layout.conductors.map(() => new Map<number, number>());
  const bridges: Bridge[] = [];
  const context = { layout, grid, ownership, conduction };
  yield;
  linkNodes("row", east, cut.row, context, contactMaps, bridges);
  yield;
  linkNodes("column", north, cut.column, context, contactMaps, bridges);
  yield;
  tieSmallConductors(layout, grid, ownership, conduction, contactMaps);
  const reach = reachOfElectrodes({ grid, east, north }, layout.electrodeCount, contactMaps, bridges);
  let lostNodes = 0;
  // What no electrode reaches has no determined potential: its nodes and conductors leave the network.
  for (let node = 0; node < reach.nodes.length; node++) {
    if (reach.nodes[node] === 1) continue;
    east[node] = 0;
    north[node] = 0;
    if (ownership.owner[node] !== OWNER_WATER) continue;
    ownership.owner[node] = OWNER_NOTHING;
    lostNodes++;
  }
  const contacts = contactMaps.map((map, body): Contact => {
    const nodes = reach.bodies[body] >= 0 ? [...map.keys()].sort((a, b) => a - b) : [];
    return { nodes, conductances: nodes.map((node) => map.get(node) ?? 0) };
  });
  return {
    layout,
    grid,
    ownership,
    conduction,
    active: reach.nodes,
    east,
    north,
    contacts,
    bridges: bridges.filter(({ bodyA }) => reach.bodies[bodyA] >= 0),
    waters: reach.bodies,
    lostNodes,
  };
}
