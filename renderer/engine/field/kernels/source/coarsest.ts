/** The coarsest level, with the floating conductors, is solved by its inverse: it has a few dozen unknowns. */
import { borderOf, count, RECORD, valueOf } from "./floating";
import { Level, place, take } from "./memory";

let size: i32 = 0;
let nodes: i32 = 0;
/** Row-major, rows padded to an even length. */
let inverse: usize = 0;
let stride: usize = 0;
let source: usize = 0;
let solution: usize = 0;
/** Work of the elimination: the matrix beside a unit matrix. */
let work: usize = 0;

export function takeCoarsest(level: Level, floaters: i32): void {
  nodes = level.columns * level.rows;
  size = nodes + floaters;
  stride = <usize>((size + 1) & ~1) << 3;
  inverse = take(<usize>size * stride);
  source = take(stride);
  solution = take(stride);
  work = take(<usize>size * stride);
}

@inline
function entry(matrix: usize, i: i32, j: i32): usize {
  return matrix + <usize>i * stride + (<usize>j << 3);
}

function symmetric(i: i32, j: i32, value: f64): void {
  store<f64>(entry(work, i, j), load<f64>(entry(work, i, j)) - value);
  store<f64>(entry(work, j, i), load<f64>(entry(work, j, i)) - value);
  store<f64>(entry(work, i, i), load<f64>(entry(work, i, i)) + value);
  store<f64>(entry(work, j, j), load<f64>(entry(work, j, j)) + value);
}

function assemble(level: Level): void {
  memory.fill(work, 0, <usize>size * stride);
  const columns = level.columns;
  for (let y = 0; y < level.rows; y++) {
    for (let x = 0; x < columns; x++) {
      const o = place(level, x, y);
      const n = y * columns + x;
      store<f64>(entry(work, n, n), load<f64>(entry(work, n, n)) + <f64>load<f32>(level.excess + o));
      if (x + 1 < columns) symmetric(n, n + 1, <f64>load<f32>(level.east + o));
      if (y + 1 >= level.rows) continue;
      symmetric(n, n + columns, <f64>load<f32>(level.north + o));
      if (x + 1 < columns) symmetric(n, n + columns + 1, <f64>load<f32>(level.northEast + o));
      if (x > 0) symmetric(n, n + columns - 1, <f64>load<f32>(level.northWest + o));
    }
  }
  for (let f = 0; f < count; f++) {
    const border = borderOf(level, f);
    const end = border.ties + <usize>border.tieCount * RECORD;
    for (let tie = border.ties; tie < end; tie += RECORD) {
      const n = <i32>((load<u32>(tie, 4) >> 16) * columns + (load<u32>(tie, 4) & 0xffff));
      store<f64>(entry(work, nodes + f, n), load<f64>(entry(work, nodes + f, n)) - valueOf(tie));
      store<f64>(entry(work, n, nodes + f), load<f64>(entry(work, n, nodes + f)) - valueOf(tie));
    }
    for (let g = 0; g < count; g++) store<f64>(entry(work, nodes + f, nodes + g), load<f64>(level.floating + (<usize>(f * count + g) << 3)));
  }
}

/** Inverts the coarsest system by Gauss–Jordan elimination; it is symmetric and positive, so that no pivoting is needed. */
export function invertCoarsest(level: Level): void {
  assemble(level);
  memory.fill(inverse, 0, <usize>size * stride);
  let largest: f64 = 0;
  for (let i = 0; i < size; i++) {
    store<f64>(entry(inverse, i, i), 1);
    largest = max(largest, load<f64>(entry(work, i, i)));
  }
  for (let k = 0; k < size; k++) {
    const pivot = load<f64>(entry(work, k, k));
    // Nothing ties this unknown to any other or to an electrode: it stays at zero.
    if (!(pivot > 1e-12 * largest)) {
      memory.fill(entry(inverse, k, 0), 0, stride);
      memory.fill(entry(work, k, 0), 0, stride);
      continue;
    }
    const scale = f64x2.splat(1 / pivot);
    for (let j: usize = 0; j < stride; j += 16) {
      v128.store(entry(work, k, 0) + j, f64x2.mul(scale, v128.load(entry(work, k, 0) + j)));
      v128.store(entry(inverse, k, 0) + j, f64x2.mul(scale, v128.load(entry(inverse, k, 0) + j)));
    }
    for (let i = 0; i < size; i++) {
      if (i === k) continue;
      const factor = load<f64>(entry(work, i, k));
      if (factor === 0) continue;
      const factors = f64x2.splat(factor);
      for (let j: usize = 0; j < stride; j += 16) {
        const inWork = entry(work, i, 0) + j;
        const inInverse = entry(inverse, i, 0) + j;
        v128.store(inWork, f64x2.sub(v128.load(inWork), f64x2.mul(factors, v128.load(entry(work, k, 0) + j))));
        v128.store(inInverse, f64x2.sub(v128.load(inInverse), f64x2.mul(factors, v128.load(entry(inverse, k, 0) + j))));
      }
    }
  }
}

export function solveCoarsest(level: Level): void {
  const columns = level.columns;
  for (let n = 0; n < nodes; n++) store<f64>(source + (<usize>n << 3), <f64>load<f32>(level.source + place(level, n % columns, n / columns)));
  memory.copy(source + (<usize>nodes << 3), level.floatingSource, <usize>count << 3);
  for (let i = 0; i < size; i++) {
    let sum = f64x2.splat(0);
    const line = entry(inverse, i, 0);
    for (let j: usize = 0; j < stride; j += 16) sum = f64x2.add(sum, f64x2.mul(v128.load(line + j), v128.load(source + j)));
    store<f64>(solution + (<usize>i << 3), f64x2.extract_lane(sum, 0) + f64x2.extract_lane(sum, 1));
  }
  for (let n = 0; n < nodes; n++) store<f32>(level.solution + place(level, n % columns, n / columns), <f32>load<f64>(solution + (<usize>n << 3)));
  memory.copy(level.floatingSolution, solution + (<usize>nodes << 3), <usize>count << 3);
}
