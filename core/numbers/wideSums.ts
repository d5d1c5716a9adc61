import { type ExactSums, exactSums } from './exactSums';

/** Like {@link ExactSums}, for sums that doubles cannot hold. */
export type WideSums = (inputs: readonly Float64Array[]) => bigint[];

const limb = 65536;
const limbBits = 16n;

/** The upper part of whole numbers, `floor(v / 2^16)`, and what is left, 0..65535. */
function split(rows: readonly Float64Array[]): [Float64Array[], Float64Array[]] {
  const high = rows.map((row) => row.map((v) => Math.floor(v / limb)));
  return [high, rows.map((row, r) => row.map((v, k) => v - limb * high[r][k]))];
}

/**
 * Exact sums of products of words of up to 32 bits: both factors are split at 16 bits, the four sums of partial products
 * are exact in doubles (below 2^53 up to 2^21 products), and only their total needs big integers.
 */
export function wideSums(values: readonly Float64Array[]): WideSums {
  const [highTaps, lowTaps] = split(values);
  const ofHigh: ExactSums = exactSums(highTaps, limb);
  const ofLow: ExactSums = exactSums(lowTaps, limb);
  return (inputs) => {
    const [high, low] = split(inputs);
    const highHigh = ofHigh(high);
    const highLow = ofHigh(low);
    const lowHigh = ofLow(high);
    const lowLow = ofLow(low);
    return Array.from(highHigh, (top, n) => {
      // The middle sums stay below 2^53 together, each being below 2^52.
      const upper = (BigInt(top) << limbBits) + BigInt(highLow[n] + lowHigh[n]);
      return (upper << limbBits) + BigInt(lowLow[n]);
    });
  };
}
