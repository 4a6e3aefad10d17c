/** The steps of the preconditioned conjugate gradients; the engine decides which comes next. */
import { solveCoarsest } from "./coarsest";
import { add, isBlack, placeInColour, readPotentials, spreadFromBlack, writePotentials } from "./finest";
import * as cycle from "./five-point";
import { addShares, borderOf, floatingDown, floatingUp, residualInShares } from "./floating";
import { coarsestIndex, levelAt, potentials } from "./hierarchy";
import { PADDING } from "./memory";
import { ninePointDown, ninePointProlong, ninePointUp } from "./nine-point";
import * as floating from "./reduced";
import * as system from "./system";
import { tieBody, tieConductance, tieCount, tieNode, tieX, tieY } from "./ties";

/**
 * Begins the solve with `electrode` at 1 V: solution 0, residual as driven.
 * @param guessed takes the first guess in `potentials` and `floatingPotentials` as the direction.
 */
export function beginSolve(electrode: i32, guessed: bool): void {
  const length = system.wholeLength();
  const bytes = floating.vectorBytes();
  memory.fill(system.wholeOf(system.direction), 0, length);
  if (guessed) {
    readPotentials(levelAt(0), potentials(), system.direction);
    memory.copy(floating.direction, floating.solution, bytes);
  } else memory.fill(floating.direction, 0, bytes);
  memory.fill(system.wholeOf(system.solution), 0, length);
  memory.fill(system.wholeOf(system.residual), 0, length);
  memory.fill(floating.solution, 0, bytes);
  floating.loadDrive(electrode);
  const body = -1 - electrode;
  for (let tie = 0; tie < tieCount; tie++) {
    if (tieBody(tie) !== body) continue;
    const x = tieX(tie);
    const y = tieY(tie);
    if (isBlack(x, y)) spreadFromBlack(x, y, tieConductance(tie), system.residual);
    else add(system.residual + placeInColour(x, y), tieConductance(tie));
  }
}

/** Adds a current that enters floating conductor f directly: through a bridge from the electrode at 1 V. */
export function driveFloating(f: i32, current: f64): void {
  add(floating.residual + (<usize>f << 3), current);
}

/** @returns residual · direction: the power of a first guess, before a step is taken. */
export function residualTimesDirection(): f64 {
  const a = system.wholeOf(system.residual);
  const b = system.wholeOf(system.direction);
  let sum = f64x2.splat(0);
  for (let i: usize = 0; i < system.wholeLength(); i += 16) sum = f64x2.add(sum, f64x2.mul(v128.load(a + i), v128.load(b + i)));
  let product = f64x2.extract_lane(sum, 0) + f64x2.extract_lane(sum, 1);
  for (let f: usize = 0; f < floating.vectorBytes(); f += 8) product += load<f64>(floating.residual + f) * load<f64>(floating.direction + f);
  return product;
}

/** image = A·direction with the direction as it is. @returns direction · image */
export function multiply(): f64 {
  return system.multiply(levelAt(0), false, 0, 0, 0) + floating.multiplyFloating();
}

/** direction = preconditioned residual + ratio·direction, image = A·direction. @returns direction · image */
export function turn(ratio: f64): f64 {
  const level = levelAt(0);
  for (let f: usize = 0; f < floating.vectorBytes(); f += 8)
    store<f64>(floating.direction + f, load<f64>(level.floatingSolution + f) + ratio * load<f64>(floating.direction + f));
  return system.multiply(level, true, cycle.solution, level.plane, ratio) + floating.multiplyFloating();
}

/** Takes a step along the direction (when `advances`) and goes down through the finest level with the residual. */
export function descend(advances: bool, step: f64): void {
  const level = levelAt(0);
  const coarse = levelAt(1);
  if (advances) floating.advanceFloating(step);
  cycle.fivePointDown(level, coarse, advances, step);
  for (let f = 0; f < floating.floaters; f++) {
    let sum = load<f64>(floating.residual + (<usize>f << 3)) + floating.columnTimes(f, cycle.solution);
    // Only the nodes in the middle of four have both a share and a residual here; there is one plane of residuals.
    sum += residualInShares(borderOf(level, f), 0, cycle.residual - 3 * level.plane);
    store<f64>(coarse.floatingSource + (<usize>f << 3), sum);
  }
}

/** One cycle through all coarser levels. */
export function cycleBelow(): void {
  const last = coarsestIndex();
  for (let k = 1; k < last; k++) {
    ninePointDown(levelAt(k), levelAt(k + 1));
    floatingDown(levelAt(k), levelAt(k + 1));
  }
  solveCoarsest(levelAt(last));
  for (let k = last - 1; k >= 1; k--) {
    ninePointProlong(levelAt(k), levelAt(k + 1));
    floatingUp(levelAt(k), levelAt(k + 1));
    ninePointUp(levelAt(k));
  }
}

/** Goes up through the finest level. @returns residual · preconditioned residual */
export function ascend(): f64 {
  const level = levelAt(0);
  const coarse = levelAt(1);
  cycle.fivePointProlong(level, coarse);
  let product: f64 = 0;
  for (let f = 0; f < floating.floaters; f++) {
    const volts = load<f64>(coarse.floatingSolution + (<usize>f << 3));
    store<f64>(level.floatingSolution + (<usize>f << 3), volts);
    addShares(borderOf(level, f), volts, 0, cycle.solution - 2 * level.plane);
    floating.addColumn(f, volts, cycle.source);
    product += volts * load<f64>(floating.residual + (<usize>f << 3));
  }
  product += cycle.fivePointUp(level);
  // The source held the floating conductors' currents too: they are no part of the residual.
  for (let f = 0; f < floating.floaters; f++)
    product -= load<f64>(level.floatingSolution + (<usize>f << 3)) * floating.columnTimes(f, cycle.solution);
  return product;
}

/** Writes the potentials of all nodes with the electrode at 1 V into `potentials`, row by row. */
export function finish(electrode: i32): void {
  writePotentials(levelAt(0), potentials());
  const body = -1 - electrode;
  for (let tie = 0; tie < tieCount; tie++) {
    const there = tieBody(tie);
    if (there < 0 && there !== body) continue;
    const x = tieX(tie);
    const y = tieY(tie);
    if (!isBlack(x, y)) continue;
    const volts: f64 = there < 0 ? 1 : load<f64>(floating.solution + (<usize>there << 3));
    add(
      potentials() + (<usize>tieNode(tie) << 3),
      volts * tieConductance(tie) * load<f64>(system.blackInverse + placeInColour(x, y)),
    );
  }
}

export function floatingPotentials(): usize {
  return floating.solution;
}

export function floatingResidual(): usize {
  return floating.residual;
}

/** The red parts of the solution, of the residual and (in single precision) of the preconditioned residual, padding included. */
export function redSolution(): usize {
  return system.wholeOf(system.solution);
}

export function redResidual(): usize {
  return system.wholeOf(system.residual);
}

export function redCorrection(): usize {
  return cycle.solution - levelAt(0).row - 4 * PADDING;
}

/** Numbers in each of them. */
export function redLength(): i32 {
  return <i32>(system.wholeLength() >> 3);
}
