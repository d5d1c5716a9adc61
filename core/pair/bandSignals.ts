import { sizeFor, type Transform, transformOf } from '../statistics/transform';
import type { BandFilter } from './bandFilter';
import type { SignalReader } from './signals';

/**
 * A reader of the same signals passed through a band filter, all alike, so that no path between them changes. The filter
 * looks back only: sample n takes up to `filter.history` samples before it and none after, so that what was held out
 * stays unseen.
 * @param read must be able to give that much more history of every signal
 */
export function bandReader(read: SignalReader, filter: BandFilter): SignalReader {
  const pass = bandPass(filter);
  return async (from, to, history = 0) => {
    const raw = await read(from - filter.history, to, history);
    const [desired, ...inputs] = pass([raw.desired, ...raw.inputs]);
    return { inputs, desired };
  };
}

/** Filters rows of samples, each by `filter.history` shorter than it was. Rows may differ in length. */
export type BandPass = (rows: readonly Float64Array[]) => Float64Array[];

/**
 * By a transform of each whole row, not two rows in one, so that a large signal leaves no rounding in a small one. Error
 * about 1e-15 of the row's largest sample.
 */
export function bandPass({ taps, history }: BandFilter): BandPass {
  if (history === 0) return (rows) => rows.map((row) => row.slice());
  let transform: Transform | null = null;
  const response = { re: new Float64Array(0), im: new Float64Array(0) };

  function transformFor(length: number): Transform {
    const size = sizeFor(length, 1024);
    if (transform?.size === size) return transform;
    transform = transformOf(size);
    response.re = new Float64Array(size);
    response.im = new Float64Array(size);
    response.re.set(taps);
    transform.forward(response.re, response.im);
    return transform;
  }

  return (rows) =>
    rows.map((row) => {
      const fitting = transformFor(row.length);
      const re = new Float64Array(fitting.size);
      const im = new Float64Array(fitting.size);
      re.set(row);
      fitting.forward(re, im);
      multiply(re, im, response);
      fitting.inverse(re, im);
      // What wraps around falls on the history, which is cut off.
      return re.slice(history, row.length);
    });
}

function multiply(re: Float64Array, im: Float64Array, by: { re: Float64Array; im: Float64Array }): void {
  for (let p = 0; p < re.length; p++) {
    const real = re[p] * by.re[p] - im[p] * by.im[p];
    im[p] = re[p] * by.im[p] + im[p] * by.re[p];
    re[p] = real;
  }
}
