import { type Kernels, startKernels } from "./kernels/kernels";

/** Potentials near those looked for, such as those before a part was moved a little. */
export interface FirstGuess {
  readonly potentials: Float64Array;
  readonly floating: Float64Array;
}

/**
 * What solving keeps from one network to the next: kernels whose memory is laid out for a grid already, and the newest live
 * potentials as first guesses. A solve borrows kernels and gives them back; two solves at once get kernels of their own.
 */
export interface SolverMemory {
  /** @returns kernels, if possible such as worked on a grid of this size last. */
  readonly borrow: (columns: number, rows: number) => Kernels;
  readonly giveBack: (columns: number, rows: number, kernels: Kernels) => void;
  /** Keeps the potentials of a network, one guess for each electrode. */
  readonly remember: (columns: number, rows: number, guesses: readonly FirstGuess[]) => void;
  /** @returns guesses for a network on a grid of this size with as many conductors, if there are any. */
  readonly recall: (columns: number, rows: number, electrodes: number, floaters: number) => readonly FirstGuess[] | undefined;
}

/** A live solve works on two grids; more kernels than that are not kept. */
const MOST_KEPT = 2;
/** Kernels larger than this are let go after use: a `reference` solve must not hold a hundred megabytes for good. */
const LARGEST_KEPT_BYTES = 48 * 1024 * 1024;

/** @returns an empty memory. */
export function createSolverMemory(): SolverMemory {
  const kept: { readonly size: string; readonly kernels: Kernels }[] = [];
  const remembered: { readonly size: string; readonly guesses: readonly FirstGuess[] }[] = [];
  const sizeOf = (columns: number, rows: number): string => `${columns} × ${rows}`;
  return {
    borrow: (columns, rows) => {
      const fitting = kept.findIndex(({ size }) => size === sizeOf(columns, rows));
      return fitting < 0 ? startKernels() : kept.splice(fitting, 1)[0].kernels;
    },
    giveBack: (columns, rows, kernels) => {
      if (kernels.memory.buffer.byteLength > LARGEST_KEPT_BYTES) return;
      kept.push({ size: sizeOf(columns, rows), kernels });
      if (kept.length > MOST_KEPT) kept.shift();
    },
    remember: (columns, rows, guesses) => {
      const size = sizeOf(columns, rows);
      const before = remembered.findIndex((one) => one.size === size);
      if (before >= 0) remembered.splice(before, 1);
      remembered.push({ size, guesses });
      if (remembered.length > MOST_KEPT) remembered.shift();
    },
    recall: (columns, rows, electrodes, floaters) => {
      const size = sizeOf(columns, rows);
      const guesses = remembered.find((one) => one.size === size)?.guesses;
      return guesses?.length === electrodes && guesses[0]?.floating.length === floaters ? guesses : undefined;
    },
  };
}
