import { powerOfTwo, roundHalfUp, wordRange } from './words';

/**
 * The largest number of fraction bits, 0 ≤ F ≤ accumulator - 2, with which every coefficient fits its word when
 * rounded; null where one does not fit even as a whole number.
 */
export function fittingFractionBits(
  coefficients: readonly Float64Array[],
  word: number,
  accumulator: number,
): number | null {
  for (let bits = accumulator - 2; bits >= 0; bits--) {
    if (fits(coefficients, word, bits)) return bits;
  }
  return null;
}

/** Whether every coefficient, rounded with these fraction bits, fits the word. */
export function fits(coefficients: readonly Float64Array[], word: number, fractionBits: number): boolean {
  const { min, max } = wordRange(word);
  const scale = powerOfTwo(fractionBits);
  return coefficients.every((row) =>
    row.every((c) => {
      const value = roundHalfUp(c * scale);
      return value >= min && value <= max;
    }),
  );
}

/** Each coefficient rounded on its own: `floor(c 2^F + ½)`. */
export function roundToNearest(coefficients: readonly Float64Array[], fractionBits: number): Float64Array[] {
  const scale = powerOfTwo(fractionBits);
  // Adding zero turns -0 into 0.
  return coefficients.map((row) => row.map((c) => roundHalfUp(c * scale) + 0));
}
