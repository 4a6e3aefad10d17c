/**
 * The floating conductors' part of the reduced system. With the black nodes eliminated a tie to a black node passes to its red
 * neighbours, and conductors beside the same black node conduct to each other.
 */
import { add, isBlack, placeInColour } from "./finest";
import { RECORD, valueOf } from "./floating";
import { mark, take, takeNext } from "./memory";
import * as system from "./system";
import { tieBody, tieConductance, tieCount, tieNode, tieX, tieY } from "./ties";

export let floaters: i32 = 0;
let electrodes: i32 = 0;
/** The floating conductors among themselves. */
let floatingMatrix: usize = 0;
/** First record of each column and end of the last: place in a red vector, –, value. */
let columnStarts: usize = 0;
/** For each electrode and floating conductor what black nodes beside both conduct between them. */
let shared: usize = 0;
/** Floating parts of the gradients' vectors. */
export let solution: usize = 0;
export let residual: usize = 0;
export let direction: usize = 0;
let image: usize = 0;

export function takeReduced(newElectrodes: i32, newFloaters: i32): void {
  electrodes = newElectrodes;
  floaters = newFloaters;
  const vector = <usize>floaters << 3;
  floatingMatrix = take(vector * <usize>floaters);
  columnStarts = take(<usize>(floaters + 1) << 2);
  shared = take(vector * <usize>electrodes);
  solution = take(vector);
  residual = take(vector);
  direction = take(vector);
  image = take(vector);
}

@inline
function entry(row: i32, column: i32): usize {
  return floatingMatrix + (<usize>(row * floaters + column) << 3);
}

@inline
export function vectorBytes(): usize {
  return <usize>floaters << 3;
}

/** The currents into the floating conductors when electrode `electrode` stands at 1 V (bridges apart). */
export function loadDrive(electrode: i32): void {
  memory.copy(residual, shared + <usize>electrode * vectorBytes(), vectorBytes());
}

@inline
function columnStart(f: i32): usize {
  return load<usize>(columnStarts + (<usize>f << 2));
}

function putReduced(place: usize, value: f64): void {
  const record = takeNext(RECORD);
  store<u32>(record, <u32>place);
  store<f64>(record, value, 8);
}

/** The border columns of the reduced system: a tie to a black node passes to its red neighbours. */
export function reduceColumns(matrix: usize): void {
  const row = system.row;
  const plane = system.plane;
  memory.copy(floatingMatrix, matrix, (<usize>(floaters * floaters)) << 3);
  take(0);
  let tie = 0;
  for (let f = 0; f < floaters; f++) {
    store<usize>(columnStarts + (<usize>f << 2), mark());
    while (tie < tieCount && tieBody(tie) < f) tie++;
    for (; tie < tieCount && tieBody(tie) === f; tie++) {
      const x = tieX(tie);
      const y = tieY(tie);
      const o = placeInColour(x, y);
      const value = tieConductance(tie);
      if (!isBlack(x, y)) {
        putReduced(o, value);
        continue;
      }
      const share = value * load<f64>(system.blackInverse + o);
      const n = <usize>(y >> 1) * row + (<usize>(x >> 1) << 3);
      if (y & 1) {
        putReduced(plane + n - 8, share * load<f64>(system.east + 3 * plane + n - 8));
        putReduced(plane + n, share * load<f64>(system.east + 2 * plane + n));
        putReduced(n, share * load<f64>(system.north + n));
        putReduced(n + row, share * load<f64>(system.north + 2 * plane + n));
      } else {
        putReduced(n, share * load<f64>(system.east + n));
        putReduced(n + 8, share * load<f64>(system.east + plane + n));
        putReduced(plane + n - row, share * load<f64>(system.north + 3 * plane + n - row));
        putReduced(plane + n, share * load<f64>(system.north + plane + n));
      }
    }
  }
  store<usize>(columnStarts + (<usize>floaters << 2), mark());
}

/** What black nodes beside two conductors conduct between them: lists of the ties at each node, in a field of the grid's size. */
export function joinThroughBlack(field: usize): void {
  memory.fill(shared, 0, (<usize>(electrodes * floaters)) << 3);
  const next = take(<usize>tieCount << 2);
  for (let tie = 0; tie < tieCount; tie++) store<i32>(field + (<usize>tieNode(tie) << 2), -1);
  for (let tie = 0; tie < tieCount; tie++) {
    const x = tieX(tie);
    const y = tieY(tie);
    if (!isBlack(x, y)) continue;
    const head = field + (<usize>tieNode(tie) << 2);
    store<i32>(next + (<usize>tie << 2), load<i32>(head));
    store<i32>(head, tie);
    const body = tieBody(tie);
    const share = tieConductance(tie) * load<f64>(system.blackInverse + placeInColour(x, y));
    for (let other = tie; other >= 0; other = load<i32>(next + (<usize>other << 2))) {
      const there = tieBody(other);
      const value = share * tieConductance(other);
      if (body >= 0 && there >= 0) {
        add(entry(body, there), -value);
        if (other !== tie) add(entry(there, body), -value);
      } else if (body >= 0) add(shared + (<usize>((-1 - there) * floaters + body) << 3), value);
      else if (there >= 0) add(shared + (<usize>((-1 - body) * floaters + there) << 3), value);
    }
  }
}

/** Takes the border columns' part into image = A·direction; @returns its share of direction · image. */
export function multiplyFloating(): f64 {
  let product: f64 = 0;
  for (let f = 0; f < floaters; f++) {
    const volts = load<f64>(direction + (<usize>f << 3));
    let through: f64 = 0;
    const end = columnStart(f + 1);
    for (let record = columnStart(f); record < end; record += RECORD) {
      const o = <usize>load<u32>(record);
      through += valueOf(record) * load<f64>(system.direction + o);
      add(system.image + o, -valueOf(record) * volts);
    }
    let own: f64 = 0;
    for (let g = 0; g < floaters; g++) own += load<f64>(entry(f, g)) * load<f64>(direction + (<usize>g << 3));
    store<f64>(image + (<usize>f << 3), own - through);
    product += volts * (own - 2 * through);
  }
  return product;
}

/** The floating part of a step along the direction. */
export function advanceFloating(step: f64): void {
  for (let f: usize = 0; f < vectorBytes(); f += 8) {
    add(solution + f, step * load<f64>(direction + f));
    add(residual + f, -step * load<f64>(image + f));
  }
}

/** Column of conductor f times two red planes of single precision: places there are half of those in double precision. */
export function columnTimes(f: i32, red: usize): f64 {
  let sum: f64 = 0;
  const end = columnStart(f + 1);
  for (let record = columnStart(f); record < end; record += RECORD)
    sum += valueOf(record) * <f64>load<f32>(red + (<usize>load<u32>(record) >> 1));
  return sum;
}

/** Adds `volts` times the column of conductor f to two red planes of single precision. */
export function addColumn(f: i32, volts: f64, red: usize): void {
  const end = columnStart(f + 1);
  for (let record = columnStart(f); record < end; record += RECORD) {
    const there = red + (<usize>load<u32>(record) >> 1);
    store<f32>(there, load<f32>(there) + <f32>(valueOf(record) * volts));
  }
}
