import type { IntegerFormat } from './scaling';

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
  const low = 1n << BigInt(format.inputWord - 1);
  const high = low - 1n;
  const rounding = format.fractionBits > 0 ? 1n << BigInt(format.fractionBits - 1) : 0n;
  let max = rounding;
  let min = rounding;
  // Before the rounding term is added the sum can be lower than after it.
  let minBefore = 0n;
  for (const row of values) {
    for (const value of row) {
      const v = BigInt(value);
      max += v > 0n ? v * high : -v * low;
      min -= v > 0n ? v * low : -v * high;
      minBefore -= v > 0n ? v * low : -v * high;
    }
  }
  return { min, max, bits: Math.max(bitsFor(minBefore), bitsFor(max)) };
}

/** Two's-complement bits that hold a whole number. */
export function bitsFor(value: bigint): number {
  const magnitude = value < 0n ? -value - 1n : value;
  return magnitude === 0n ? 1 : magnitude.toString(2).length + 1;
}
