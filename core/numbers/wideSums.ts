import { type ExactSums, exactSums } from './exactSums';
import { limb, splitRows } from './limbs';

/** Like {@link ExactSums}, for sums that doubles cannot hold. */
export type WideSums = (inputs: readonly Float64Array[]) => bigint[];

/** A sum as `high · 2^32 + low`, 0 ≤ low < 2^32, both exact. */
export interface SplitSums {
  high: Float64Array;
  low: Float64Array;
}

/**
 * Exact sums of products of words of up to 32 bits: both factors are split at 16 bits, and the four sums of partial
 * products are exact in doubles (below 2^53 up to 2^20 products), as are their carries.
 */
export function splitSums(values: readonly Float64Array[]): (inputs: readonly Float64Array[]) => SplitSums {
  const [highTaps, lowTaps] = splitRows(values);
  const ofHigh: ExactSums = exactSums(highTaps, limb);
  const ofLow: ExactSums = exactSums(lowTaps, limb);
  return (inputs) => {
    const [highInputs, lowInputs] = splitRows(inputs);
    const high = ofHigh(highInputs);
    const highLow = ofHigh(lowInputs);
    const lowHigh = ofLow(highInputs);
    const low = ofLow(lowInputs);
    for (let n = 0; n < high.length; n++) {
      const carry = Math.floor(low[n] / limb);
      const middle = highLow[n] + lowHigh[n] + carry;
      const upper = Math.floor(middle / limb);
      low[n] = low[n] - limb * carry + limb * (middle - limb * upper);
      high[n] += upper;
    }
    return { high, low };
  };
}

/** The same sums as big integers. */
export function wideSums(values: readonly Float64Array[]): WideSums {
  const sums = splitSums(values);
  return (inputs) => {
    const { high, low } = sums(inputs);
    return Array.from(high, (top, n) => (BigInt(top) << 32n) + BigInt(low[n]));
  };
}
