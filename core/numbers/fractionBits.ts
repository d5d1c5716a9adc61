import { powerOfTwo, roundHalfUp, type WordRange } from './words';

/**
 * The largest number of fraction bits, 0 ≤ F ≤ accumulator - 2, with which every coefficient fits the range of its word when
 * rounded; null where one does not fit even as a whole number.
 */
export function fittingFractionBits(
  coefficients: readonly Float64Array[],
  range: WordRange,
  accumulator: number,
): number | null {
  for (let bits = accumulator - 2; bits >= 0; bits--) {
    if (fits(coefficients, range, bits)) return bits;
  }
  return null;
}

/** Whether every coefficient, rounded with these fraction bits, fits the word. */
export function fits(
  coefficients: readonly Float64Array[],
  { min, max }: WordRange,
  fractionBits: number,
): boolean {
  const scale = powerOfTwo(fractionBits);
  return coefficients.every((row) =>
    row.every((c) => {
      const value = roundHalfUp(c * scale);
      return value >= min && value <= max;
    }),
  );
}
