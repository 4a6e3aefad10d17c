/** A source of chance that gives the same numbers for the same start. */
export interface Chance {
  /** Even between −1 and 1: a limit of which no more is known. */
  readonly rectangular: () => number;
  /** Normal with mean 0 and standard deviation 1. */
  readonly normal: () => number;
}

/**
 * The chance of one draw. Every draw has its own, so that results do not hang on who computes which draw.
 * A 32-bit counter run through two rounds of multiply and shift (a hash of the counter; from memory), normal numbers by
 * G. E. P. Box and M. E. Muller, Ann. Math. Statist. 29, 610 (1958).
 */
export function chanceOf(seed: number, draw: number): Chance {
  let state = (Math.imul(seed ^ 0x9e3779b9, 0x85ebca6b) + Math.imul(draw + 1, 0x27d4eb2f)) >>> 0;
  function even(): number {
    state = (state + 0x9e3779b9) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 16), 0x21f0aaad);
    mixed = Math.imul(mixed ^ (mixed >>> 15), 0x735a2d97);
    return (((mixed ^ (mixed >>> 15)) >>> 0) + 0.5) / 2 ** 32;
  }
  return {
    rectangular: () => 2 * even() - 1,
    normal: () => Math.sqrt(-2 * Math.log(even())) * Math.cos(2 * Math.PI * even()),
  };
}
