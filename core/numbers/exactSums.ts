import { newSpectrum, type Spectrum } from '../statistics/blockSpectra';
import { sizeFor, type Transform, transformOf } from '../statistics/transform';
import { powerOfTwo, roundHalfUp } from './words';

/**
 * `Σ_r Σ_k v_r[k] x_r[n-k]` for every n, exactly, as whole numbers in doubles. The inputs begin with M-1 samples of
 * history: `inputs[r][n + M - 1]` is x_r[n].
 */
export type ExactSums = (inputs: readonly Float64Array[]) => Float64Array;

/** Taps from which transforms are faster than the sum itself. */
const shortest = 32;

/**
 * Exact sums of whole numbers, all of which, partial sums included, are below 2^53 in magnitude. Long filters go by
 * transforms where the rounding of their result to whole numbers is certain to give the exact sum: the error of a
 * transform of size N is at most `4 ε log2(N) ‖v‖₂ ‖x‖₂` (Higham, *Accuracy and Stability of Numerical Algorithms*,
 * ch. 24, from memory, with room to spare), which must stay below a quarter.
 * @param values whole numbers, one row an input
 * @param largest no input exceeds this magnitude
 */
export function exactSums(values: readonly Float64Array[], largest: number): ExactSums {
  const length = values[0].length;
  if (length < shortest) return directSums(values);
  const size = transformSize(length);
  const taps = values.reduce((sum, row) => sum + row.reduce((s, v) => s + v * v, 0), 0);
  const input = Math.sqrt(size * values.length) * largest;
  const epsilon = powerOfTwo(-52);
  const error = 4 * epsilon * (31 - Math.clz32(size)) * Math.sqrt(taps) * input;
  return error < 0.25 ? transformedSums(values, transformOf(size), roundHalfUp) : directSums(values);
}

/** The same sums for any numbers, with an error of about 1e-16 · log2(size) relative to the largest. */
export function realSums(values: readonly Float64Array[]): ExactSums {
  const length = values[0].length;
  if (length < shortest) return directSums(values);
  return transformedSums(values, transformOf(transformSize(length)), (value) => value);
}

/** Four filters long, so that three quarters of a transform are new. */
function transformSize(length: number): number {
  return sizeFor(4 * length, 2048);
}

function directSums(values: readonly Float64Array[]): ExactSums {
  const length = values[0].length;
  return (inputs) => {
    const sums = new Float64Array(inputs[0].length - length + 1);
    values.forEach((row, r) => {
      const x = inputs[r];
      for (let n = 0; n < sums.length; n++) {
        let sum = 0;
        for (let k = 0, i = n + length - 1; k < length; k++, i--) sum += row[k] * x[i];
        sums[n] += sum;
      }
    });
    return sums;
  };
}

function transformedSums(
  values: readonly Float64Array[],
  transform: Transform,
  finish: (value: number) => number,
): ExactSums {
  const { size } = transform;
  const history = values[0].length - 1;
  const step = size - history;
  const responses = values.map((row) => {
    const response = newSpectrum(size);
    response.re.set(row);
    transform.forward(response.re, response.im);
    return response;
  });
  const signal = newSpectrum(size);
  const total = newSpectrum(size);
  return (inputs) => {
    const sums = new Float64Array(inputs[0].length - history);
    // Two stretches at a time, as real and imaginary part: the responses are those of real filters.
    for (let from = 0; from < sums.length; from += 2 * step) {
      total.re.fill(0);
      total.im.fill(0);
      responses.forEach((response, r) => {
        load(signal.re, inputs[r], from);
        load(signal.im, inputs[r], from + step);
        transform.forward(signal.re, signal.im);
        addProduct(total, signal, response);
      });
      transform.inverse(total.re, total.im);
      store(sums, from, total.re, history, finish);
      store(sums, from + step, total.im, history, finish);
    }
    return sums;
  };
}

function load(part: Float64Array, samples: Float64Array, from: number): void {
  part.fill(0);
  if (from < samples.length) part.set(samples.subarray(from, from + part.length));
}

function store(
  sums: Float64Array,
  from: number,
  part: Float64Array,
  history: number,
  finish: (value: number) => number,
): void {
  const count = Math.min(part.length - history, sums.length - from);
  for (let n = 0; n < count; n++) sums[from + n] = finish(part[history + n]);
}

function addProduct(total: Spectrum, a: Spectrum, b: Spectrum): void {
  for (let p = 0; p < total.re.length; p++) {
    total.re[p] += a.re[p] * b.re[p] - a.im[p] * b.im[p];
    total.im[p] += a.re[p] * b.im[p] + a.im[p] * b.re[p];
  }
}
