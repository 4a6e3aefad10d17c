/** The levels of one network, and how they are built. Memory is laid out anew only when the grid's size changes. */
import { coarsenFivePoint, coarsenNinePoint } from "./coarsening";
import { invertCoarsest, takeCoarsest } from "./coarsest";
import { addUpCentres, splitLinks, tieToConductor } from "./finest";
import { takeFivePoint } from "./five-point";
import { beginTies, coarsenFloating, putTie, takeFloating, useFields } from "./floating";
import { clearMemory, giveBack, Level, makeLevel, mark, take, takeNinePoint, takeWeights } from "./memory";
import { joinThroughBlack, reduceColumns, takeReduced } from "./reduced";
import { takeSystem } from "./system";
import { takeTies, tieBody, tieConductance, tieCount, tieX, tieY } from "./ties";

/** A grid of at most this many nodes is solved directly. */
const COARSEST_NODES: i32 = 48;
const MOST_LEVELS: i32 = 16;

let columns: i32 = 0;
let rows: i32 = 0;
let floaters: i32 = 0;
let electrodes: i32 = 0;
let levelCount: i32 = 0;
let levels: usize = 0;
/** Where the arrays end that depend on the grid's size alone. */
let fixedEnd: usize = 0;
/** Row-major fields of the grid's size with a ring round them: links on their way in, potentials on their way in and out. */
let fieldA: usize = 0;
let fieldB: usize = 0;
let coarseField: usize = 0;

@inline
export function levelAt(index: i32): Level {
  return changetype<Level>(load<usize>(levels + (<usize>index << 2)));
}

@inline
export function coarsestIndex(): i32 {
  return levelCount - 1;
}

function fieldBytes(): usize {
  return (<usize>(columns + 2) * <usize>(rows + 2)) << 3;
}

function layOut(): void {
  clearMemory();
  levels = take(<usize>MOST_LEVELS << 2);
  levelCount = 0;
  let width = columns;
  let height = rows;
  for (;;) {
    const level = makeLevel(width, height);
    store<usize>(levels + (<usize>levelCount << 2), changetype<usize>(level));
    if (levelCount === 0) {
      takeSystem(level);
      takeFivePoint(level);
    } else takeNinePoint(level);
    levelCount++;
    if (width * height <= COARSEST_NODES || levelCount === MOST_LEVELS) break;
    takeWeights(level);
    width = (width + 1) >> 1;
    height = (height + 1) >> 1;
  }
  fieldA = take(fieldBytes());
  fieldB = take(fieldBytes());
  coarseField = take((<usize>((columns >> 1) + 3) * <usize>((rows >> 1) + 3)) << 3);
  fixedEnd = mark();
}

/** Makes room for a network. Memory may grow: it is to be looked at afresh afterwards. */
export function prepare(newColumns: i32, newRows: i32, newElectrodes: i32, newFloaters: i32, newTies: i32): void {
  if (newColumns !== columns || newRows !== rows) {
    columns = newColumns;
    rows = newRows;
    layOut();
  }
  giveBack(fixedEnd);
  electrodes = newElectrodes;
  floaters = newFloaters;
  takeTies(newTies, columns);
  takeReduced(electrodes, floaters);
  for (let k = 0; k < levelCount; k++) takeFloating(levelAt(k), floaters);
  takeCoarsest(levelAt(levelCount - 1), floaters);
}

/** Row-major conductances from each node to the next column's, to be filled in before `buildFinest`. */
export function eastLinks(): usize {
  return fieldA;
}

/** The same to the next row's. */
export function northLinks(): usize {
  return fieldB;
}

/** Row-major potentials: a first guess before `beginSolve`, the answer after `finish`. */
export function potentials(): usize {
  return fieldB;
}

/** The matrix of the floating conductors among themselves, row-major, to be filled in before `buildFinest`. */
export function floatingMatrix(): usize {
  return levelAt(0).floating;
}

export function levelsToBuild(): i32 {
  return levelCount;
}

/** Builds the finest level from the links and ties that were put in. */
export function buildFinest(): void {
  const level = levelAt(0);
  splitLinks(level, fieldA, fieldB);
  addUpCentres(level);
  for (let tie = 0; tie < tieCount; tie++) tieToConductor(level, tieX(tie), tieY(tie), tieConductance(tie));
  if (floaters === 0) return;
  let tie = 0;
  for (let f = 0; f < floaters; f++) {
    beginTies(level, f);
    while (tie < tieCount && tieBody(tie) < f) tie++;
    for (; tie < tieCount && tieBody(tie) === f; tie++) putTie(level, f, tieX(tie), tieY(tie), tieConductance(tie));
  }
  reduceColumns(level.floating);
  joinThroughBlack(fieldA);
  memory.fill(fieldA, 0, fieldBytes());
  memory.fill(fieldB, 0, fieldBytes());
  useFields(columns, fieldA, fieldB, coarseField);
}

/** Builds level `index` + 1 from level `index`; the coarsest is inverted with it. */
export function buildBelow(index: i32): void {
  const level = levelAt(index);
  const coarse = levelAt(index + 1);
  if (index === 0) coarsenFivePoint(level, coarse);
  else coarsenNinePoint(level, coarse);
  coarsenFloating(level, coarse);
  if (index + 2 === levelCount) invertCoarsest(coarse);
}
