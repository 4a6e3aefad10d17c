import { KERNELS } from "./compiled";

/** What is used of WebAssembly: it is everywhere that the engine runs, but not everywhere are there types for it. */
declare const WebAssembly: {
  readonly Module: new (bytes: Uint8Array) => object;
  readonly Instance: new (module: object) => { readonly exports: object };
};

/**
 * The solver's kernels: WebAssembly compiled from `source`. One instance serves one network at a time and keeps its memory for
 * the next one. Addresses are bytes in `memory`, which may grow in `prepare` and while levels are built: views are to be made
 * afresh afterwards.
 */
export interface Kernels {
  readonly memory: { readonly buffer: ArrayBuffer };
  readonly prepare: (columns: number, rows: number, electrodes: number, floaters: number, ties: number) => void;
  /** Where links go (row-major doubles), ties (32-bit integers and doubles) and the floating conductors' matrix (doubles). */
  readonly eastLinks: () => number;
  readonly northLinks: () => number;
  readonly tieNodes: () => number;
  readonly tieBodies: () => number;
  readonly tieConductances: () => number;
  readonly floatingMatrix: () => number;
  readonly buildFinest: () => void;
  readonly levelsToBuild: () => number;
  /** Builds level `index` + 1 from level `index`. */
  readonly buildBelow: (index: number) => void;
  readonly beginSolve: (electrode: number, guessed: boolean) => void;
  readonly driveFloating: (floater: number, current: number) => void;
  readonly residualTimesDirection: () => number;
  readonly multiply: () => number;
  readonly turn: (ratio: number) => number;
  readonly descend: (advances: boolean, step: number) => void;
  readonly cycleBelow: () => void;
  readonly ascend: () => number;
  readonly finish: (electrode: number) => void;
  /** Row-major doubles, and one double for each floating conductor. */
  readonly potentials: () => number;
  readonly floatingPotentials: () => number;
  readonly floatingResidual: () => number;
  /** `redLength` doubles each; the correction in single precision. */
  readonly redSolution: () => number;
  readonly redResidual: () => number;
  readonly redCorrection: () => number;
  readonly redLength: () => number;
}

const module = new WebAssembly.Module(Uint8Array.from(atob(KERNELS), (character) => character.charCodeAt(0)));

/** @returns fresh kernels with next to no memory. */
export function startKernels(): Kernels {
  return new WebAssembly.Instance(module).exports as Kernels;
}
