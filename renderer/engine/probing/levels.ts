/**
 * Potentials of the levels: evenly spaced, strictly between the lowest and the highest electrode.
 * @returns `count` values in V, ascending; none where the electrodes are all at one potential.
 */
export function evenLevels([lowest, highest]: readonly [number, number], count: number): readonly number[] {
  if (!(highest > lowest)) return [];
  return Array.from({ length: count }, (_, index) => lowest + ((highest - lowest) * (index + 1)) / (count + 1));
}
