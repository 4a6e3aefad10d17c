/** The ties between conductors and the nodes beside them, as they are put in: ordered by conductor, floating ones last. */
import { take } from "./memory";

export let tieCount: i32 = 0;
let columns: i32 = 0;
let nodes: usize = 0;
let bodies: usize = 0;
let conductances: usize = 0;

export function takeTies(count: i32, gridColumns: i32): void {
  tieCount = count;
  columns = gridColumns;
  nodes = take(<usize>count << 2);
  bodies = take(<usize>count << 2);
  conductances = take(<usize>count << 3);
}

/** Row-major index of each tie's node. */
export function tieNodes(): usize {
  return nodes;
}

/** Conductor of each tie: floating ones count from 0, electrodes are -1, -2, … */
export function tieBodies(): usize {
  return bodies;
}

export function tieConductances(): usize {
  return conductances;
}

@inline
export function tieNode(tie: i32): i32 {
  return load<i32>(nodes + (<usize>tie << 2));
}

@inline
export function tieX(tie: i32): i32 {
  return tieNode(tie) % columns;
}

@inline
export function tieY(tie: i32): i32 {
  return tieNode(tie) / columns;
}

@inline
export function tieBody(tie: i32): i32 {
  return load<i32>(bodies + (<usize>tie << 2));
}

@inline
export function tieConductance(tie: i32): f64 {
  return load<f64>(conductances + (<usize>tie << 3));
}
