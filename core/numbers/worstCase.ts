import type { IntegerFormat } from './scaling';
import { type WordRange, wordRange } from './words';

/** Extremes that the accumulator can reach with any input, and the two's-complement bits that hold them. */
export interface WorstCase {
  min: bigint;
  max: bigint;
  bits: number;
}

/**
 * The two-sided worst case of the accumulator, rounding term included:
 * `max = Σ⁺ v (2^(B-1)-1) + Σ⁻ |v| 2^(B-1)` and its mirror. No input whatever exceeds it, and one reaches it.
 * @param values integer coefficients, one row an input
 */
export function worstCase(values: readonly Float64Array[], format: IntegerFormat): WorstCase {
  const range = wordRange(format.inputWord);
  return accumulatorBound(
    values,
    format,
    values.map(() => range),
  );
}

/**
 * The same for inputs that keep to a range each, such as the extremes of the recordings.
 * @param ranges in counts, within the input word, one an input
 */
export function accumulatorBound(
  values: readonly Float64Array[],
  format: IntegerFormat,
  ranges: readonly WordRange[],
): WorstCase {
  const rounding = format.fractionBits > 0 ? 1n << BigInt(format.fractionBits - 1) : 0n;
  let max = 0n;
  let min = 0n;
  values.forEach((row, r) => {
    const low = BigInt(ranges[r].min);
    const high = BigInt(ranges[r].max);
    for (const value of row) {
      const v = BigInt(value);
      max += v > 0n ? v * high : v * low;
      min += v > 0n ? v * low : v * high;
    }
  });
  // Before the rounding term is added the sum can be lower than after it.
  const bits = Math.max(bitsFor(min), bitsFor(max + rounding));
  return { min: min + rounding, max: max + rounding, bits };
}

/** Two's-complement bits that hold a whole number. */
export function bitsFor(value: bigint): number {
  const magnitude = value < 0n ? -value - 1n : value;
  return magnitude === 0n ? 1 : magnitude.toString(2).length + 1;
}
