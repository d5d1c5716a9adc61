import { realSums } from '../numbers/exactSums';
import type { Pace } from '../pace';
import type { Interval } from '../pair/intervals';
import { eachBlock } from '../pair/pieces';
import type { SignalReader } from '../pair/signals';

/** What a filter made of one block of n; its arrays hold until the next block. */
export interface FilteredBlock {
  from: number;
  /** x_r[n - (M-1)] onwards: the block with M-1 samples of history before it. */
  inputs: Float64Array[];
  desired: Float64Array;
  output: Float64Array;
}

/** Samples of a block: what is read at a time. */
const blockSamples = 65536;

/**
 * Filters a stretch of n block by block (overlap-save) with the samples before it as history.
 * Error about 1e-16 · log2(M) relative to the largest output.
 * @param coefficients one row an input, newest-first
 * @param visit called with each block in turn
 */
export async function filterStretch(
  read: SignalReader,
  stretch: Interval,
  coefficients: readonly Float64Array[],
  pace: Pace,
  visit: (block: FilteredBlock) => void | Promise<void>,
): Promise<void> {
  const sums = realSums(coefficients);
  const history = coefficients[0].length - 1;
  await eachBlock(read, stretch, blockSamples, history, async ({ inputs, desired }, from, to) => {
    await visit({ from, inputs, desired, output: sums(inputs) });
    await pace.step('filtering', to - stretch.from, stretch.to - stretch.from);
  });
}
