import { spawnSync } from "node:child_process";
import { writeFileSync } from "node:fs";
import { join } from "node:path";
import type { FittedNetwork } from "../../renderer/engine/field/fit";
import { FINE_TOLERANCE, solveUnitPotentials } from "../../renderer/engine/field/unit-potentials";
import { finished } from "./solved";

/** What a sparse direct solver needed for one unit potential of a network, or why it was not asked. */
export type PeerAnswer =
  | { readonly missing: string }
  | { readonly name: string; readonly factoriseMs: number; readonly solveMs: number; readonly largestDifference: number };

/** SuperLU by SciPy: reads the matrix, factorises, solves, compares with our potentials, and prints one line of JSON. */
const PYTHON = `
import json, sys, time
import numpy as np
try:
    import scipy
    from scipy.sparse import coo_matrix
    from scipy.sparse.linalg import splu
except ImportError:
    print(json.dumps({"missing": "python3-scipy is not on this machine: no comparison"}))
    sys.exit(0)
folder = sys.argv[1]
read = lambda name, kind: np.fromfile(folder + "/" + name, dtype=kind)
rows, columns, values = read("rows", np.int32), read("columns", np.int32), read("values", np.float64)
drive, ours = read("drive", np.float64), read("potentials", np.float64)
matrix = coo_matrix((values, (rows, columns)), shape=(len(drive), len(drive))).tocsc()
start = time.perf_counter()
factors = splu(matrix, permc_spec="MMD_AT_PLUS_A", options={"SymmetricMode": True})
middle = time.perf_counter()
found = factors.solve(drive)
end = time.perf_counter()
print(json.dumps({
    "name": "SuperLU of SciPy " + scipy.__version__,
    "factoriseMs": 1e3 * (middle - start),
    "solveMs": 1e3 * (end - middle),
    "largestDifference": float(np.abs(found - ours).max()),
}))
`;

interface Matrix {
  readonly rows: number[];
  readonly columns: number[];
  readonly values: number[];
  readonly drive: Float64Array;
}

/** The matrix of a network's unknowns (nodes, then floating conductors) and what drives it with the first electrode at 1 V. */
function matrixOf({ grid, active, east, north, contacts, bridges, layout }: FittedNetwork, numbers: Int32Array, size: number): Matrix {
  const matrix: Matrix = { rows: [], columns: [], values: [], drive: new Float64Array(size) };
  const first = layout.electrodeCount;
  const floatingFrom = size - (layout.conductors.length - first);
  const add = (row: number, column: number, value: number): void => {
    matrix.rows.push(row);
    matrix.columns.push(column);
    matrix.values.push(value);
  };
  const link = (a: number, b: number, conductance: number): void => {
    add(a, a, conductance);
    add(b, b, conductance);
    add(a, b, -conductance);
    add(b, a, -conductance);
  };
  const tie = (unknown: number, body: number, conductance: number): void => {
    if (body >= first) link(unknown, floatingFrom + body - first, conductance);
    else {
      add(unknown, unknown, conductance);
      if (body === 0) matrix.drive[unknown] += conductance;
    }
  };
  for (let node = 0; node < active.length; node++) {
    if (active[node] === 0) continue;
    if (east[node] > 0) link(numbers[node], numbers[node + 1], east[node]);
    if (north[node] > 0) link(numbers[node], numbers[node + grid.columns], north[node]);
  }
  contacts.forEach(({ nodes, conductances }, body) => {
    nodes.forEach((node, k) => {
      tie(numbers[node], body, conductances[k]);
    });
  });
  for (const { bodyA, bodyB, conductanceMm } of bridges) {
    if (bodyA >= first) tie(floatingFrom + bodyA - first, bodyB, conductanceMm);
    else if (bodyB >= first) tie(floatingFrom + bodyB - first, bodyA, conductanceMm);
  }
  return matrix;
}

/** Has SciPy solve the very matrix of a network; files go to `folder`. */
export function askPeer(network: FittedNetwork, folder: string): PeerAnswer {
  const numbers = new Int32Array(network.active.length);
  let size = 0;
  for (let node = 0; node < numbers.length; node++) if (network.active[node] === 1) numbers[node] = size++;
  const floaters = network.layout.conductors.length - network.layout.electrodeCount;
  const { rows, columns, values, drive } = matrixOf(network, numbers, size + floaters);
  const units = finished(solveUnitPotentials(network, { tolerance: FINE_TOLERANCE }));
  const ours = new Float64Array(size + floaters);
  for (let node = 0; node < numbers.length; node++) if (network.active[node] === 1) ours[numbers[node]] = units.potentials[0][node];
  ours.set(units.floating[0], size);
  const files = {
    rows: Int32Array.from(rows),
    columns: Int32Array.from(columns),
    values: Float64Array.from(values),
    drive,
    potentials: ours,
  };
  for (const [name, data] of Object.entries(files)) writeFileSync(join(folder, name), data);
  const { stdout, error } = spawnSync("python3", ["-c", PYTHON, folder], {
    encoding: "utf8",
    env: { ...process.env, OMP_NUM_THREADS: "1" },
  });
  if (error !== undefined || stdout.trim() === "") return { missing: "python3 is not on this machine: no comparison" };
  return JSON.parse(stdout) as PeerAnswer;
}
