import type { Pace } from '../pace';
import type { Interval } from '../pair/intervals';
import type { SignalReader } from '../pair/signals';
import { blockFor, newBlockSpectra, newSpectrum, type Spectrum } from '../statistics/blockSpectra';

/** What a filter made of one block of n. */
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
  let before: Float64Array[] | null = null;

  for (let from = stretch.from; from < stretch.to; from += block) {
    const to = Math.min(stretch.to, from + block);
    const signals = await read(from, to, history);
    if (before === null) {
      before = signals.inputs.map((x) => x.subarray(0, history));
      spectra.push(before.map((x) => late(x, block)));
    }
    spectra.push(signals.inputs.map((x) => x.subarray(history)));
    sum.re.fill(0);
    sum.im.fill(0);
    for (let r = 0; r < inputs; r++) {
      spectra.joined(r, joined);
      addProduct(sum, joined, responses[r]);
    }
    transform.inverse(sum.re, sum.im);
    await visit({
      from,
      inputs: signals.inputs,
      desired: signals.desired,
      output: sum.re.slice(block, block + to - from),
    });
    await pace.step('filtering', to - stretch.from, stretch.to - stretch.from);
  }

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
