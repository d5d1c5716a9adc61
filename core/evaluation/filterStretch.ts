import type { Pace } from '../pace';
import type { Interval } from '../pair/intervals';
import { eachBlock } from '../pair/pieces';
import type { SignalReader } from '../pair/signals';
import { blockFor, newBlockSpectra, newSpectrum, type Spectrum } from '../statistics/blockSpectra';

/** What a filter made of one block of n; its arrays hold until the next block. */
export interface FilteredBlock {
  from: number;
  /** x_r[n - (M-1)] onwards: the block with M-1 samples of history before it. */
  inputs: Float64Array[];
  desired: Float64Array;
  output: Float64Array;
}

/**
 * Filters a stretch of n block by block (overlap-save) with the samples before it as history.
 * Error about 1e-16 · log2(block) relative to the largest output.
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
  const inputs = coefficients.length;
  const history = coefficients[0].length - 1;
  const spectra = newBlockSpectra(inputs, blockFor(history + 1));
  const { block, transform } = spectra;
  const responses = coefficients.map((row) => responseOf(row, transform.size));
  const joined = newSpectrum(transform.size);
  const sum = newSpectrum(transform.size);
  let first = true;

  await eachBlock(read, stretch, block, history, async (signals, from, to) => {
    if (first) spectra.push(signals.inputs.map((x) => late(x.subarray(0, history), block)));
    first = false;
    spectra.push(signals.inputs.map((x) => x.subarray(history)));
    sum.re.fill(0);
    sum.im.fill(0);
    for (let r = 0; r < inputs; r++) {
      spectra.joined(r, joined);
      addProduct(sum, joined, responses[r]);
    }
    transform.inverse(sum.re, sum.im);
    const { inputs: x, desired } = signals;
    const output = sum.re.subarray(block, block + to - from);
    const pending = visit({ from, inputs: x, desired, output });
    if (pending !== undefined) await pending;
    await pace.step('filtering', to - stretch.from, stretch.to - stretch.from);
  });

  function responseOf(row: Float64Array, size: number): Spectrum {
    const response = newSpectrum(size);
    response.re.set(row);
    transform.forward(response.re, response.im);
    return response;
  }
}

function addProduct(sum: Spectrum, a: Spectrum, b: Spectrum): void {
  for (let p = 0; p < sum.re.length; p++) {
    sum.re[p] += a.re[p] * b.re[p] - a.im[p] * b.im[p];
    sum.im[p] += a.re[p] * b.im[p] + a.im[p] * b.re[p];
  }
}

function late(samples: Float64Array, block: number): Float64Array {
  const whole = new Float64Array(block);
  whole.set(samples, block - samples.length);
  return whole;
}
