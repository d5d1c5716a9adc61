import { newSpectrum, type Spectrum } from '../statistics/blockSpectra';
import { sizeFor, type Transform, transformOf } from '../statistics/transform';
import { limb, splitRows } from './limbs';
import { powerOfTwo, roundHalfUp } from './words';

/**
 * `Σ_r Σ_k v_r[k] x_r[n-k]` for every n, exactly, as whole numbers in doubles. The inputs begin with M-1 samples of
 * history: `inputs[r][n + M - 1]` is x_r[n]. The sums belong to the caller.
 */
export type ExactSums = (inputs: readonly Float64Array[]) => Float64Array;

/** Taps from which transforms are faster than the sum itself. */
const shortest = 32;

/**
 * Exact sums of whole numbers, all of which, partial sums included, are below 2^53 in magnitude. Long filters go by
 * transforms where the rounding of their result to whole numbers is certain to give the exact sum: the error of a
 * transform of size N is at most `4 ε log2(N) ‖v‖₂ ‖x‖₂` (Higham, *Accuracy and Stability of Numerical Algorithms*,
 * ch. 24, from memory, with room to spare), which must stay below a quarter. Where it does not, the values are cut into
 * an upper and a lower part, and only where that does not help either each sum is taken term by term.
 * @param values whole numbers, one row an input
 * @param largest no input exceeds this magnitude
 */
export function exactSums(values: readonly Float64Array[], largest: number): ExactSums {
  const length = values[0].length;
  if (length < shortest) return directSums(values);
  const size = transformSize(length);
  if (errorBound(values, largest, size) < 0.25)
    return roundedSums(transformedSums(values, transformOf(size)));
  const [high, low] = splitRows(values);
  if (errorBound(high, largest, size) >= 0.25 || errorBound(low, largest, size) >= 0.25)
    return directSums(values);
  const ofHigh = exactSums(high, largest);
  const ofLow = exactSums(low, largest);
  return (inputs) => {
    const sums = ofHigh(inputs);
    const rest = ofLow(inputs);
    for (let n = 0; n < sums.length; n++) sums[n] = limb * sums[n] + rest[n];
    return sums;
  };
}

/** Of sums by a transform of a size. */
function errorBound(values: readonly Float64Array[], largest: number, size: number): number {
  const taps = values.reduce((sum, row) => sum + row.reduce((s, v) => s + v * v, 0), 0);
  const input = Math.sqrt(size * values.length) * largest;
  const epsilon = powerOfTwo(-52);
  return 4 * epsilon * (31 - Math.clz32(size)) * Math.sqrt(taps) * input;
}

function roundedSums(sumsOf: ExactSums): ExactSums {
  return (inputs) => {
    const sums = sumsOf(inputs);
    for (let n = 0; n < sums.length; n++) sums[n] = roundHalfUp(sums[n]);
    return sums;
  };
}

/** The same sums for any numbers, with an error of about 1e-16 · log2(size) relative to the largest. */
export function realSums(values: readonly Float64Array[]): ExactSums {
  const length = values[0].length;
  if (length < shortest) return directSums(values);
  return transformedSums(values, transformOf(transformSize(length)));
}

/** Four filters long, so that three quarters of a transform are new. */
function transformSize(length: number): number {
  return sizeFor(4 * length, 2048);
}

/** Four n at a time: they share what is loaded, and their additions need not wait for each other. */
function directSums(values: readonly Float64Array[]): ExactSums {
  const length = values[0].length;
  return (inputs) => {
    const sums = new Float64Array(inputs[0].length - length + 1);
    values.forEach((row, r) => {
      const x = inputs[r];
      let n = 0;
      for (; n + 4 <= sums.length; n += 4) addFour(sums, n, row, x);
      for (; n < sums.length; n++) {
        let sum = 0;
        for (let k = 0, i = n + length - 1; k < length; k++, i--) sum += row[k] * x[i];
        sums[n] += sum;
      }
    });
    return sums;
  };
}

function addFour(sums: Float64Array, n: number, row: Float64Array, x: Float64Array): void {
  const { length } = row;
  let a = 0;
  let b = 0;
  let c = 0;
  let d = 0;
  for (let k = 0, i = n + length - 1; k < length; k++, i--) {
    const v = row[k];
    a += v * x[i];
    b += v * x[i + 1];
    c += v * x[i + 2];
    d += v * x[i + 3];
  }
  sums[n] += a;
  sums[n + 1] += b;
  sums[n + 2] += c;
  sums[n + 3] += d;
}

function transformedSums(values: readonly Float64Array[], transform: Transform): ExactSums {
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
      responses.forEach((response, r) => {
        load(signal.re, inputs[r], from);
        load(signal.im, inputs[r], from + step);
        transform.forward(signal.re, signal.im);
        if (r === 0) setProduct(total, signal, response);
        else addProduct(total, signal, response);
      });
      transform.inverse(total.re, total.im);
      store(sums, from, total.re, history);
      store(sums, from + step, total.im, history);
    }
    return sums;
  };
}

function load(part: Float64Array, samples: Float64Array, from: number): void {
  const there = samples.subarray(from, from + part.length);
  part.set(there);
  part.fill(0, there.length);
}

function store(sums: Float64Array, from: number, part: Float64Array, history: number): void {
  const count = Math.min(part.length - history, sums.length - from);
  if (count > 0) sums.set(part.subarray(history, history + count), from);
}

function setProduct({ re, im }: Spectrum, a: Spectrum, b: Spectrum): void {
  const { re: aRe, im: aIm } = a;
  const { re: bRe, im: bIm } = b;
  for (let p = 0; p < re.length; p++) {
    re[p] = aRe[p] * bRe[p] - aIm[p] * bIm[p];
    im[p] = aRe[p] * bIm[p] + aIm[p] * bRe[p];
  }
}

function addProduct({ re, im }: Spectrum, a: Spectrum, b: Spectrum): void {
  const { re: aRe, im: aIm } = a;
  const { re: bRe, im: bIm } = b;
  for (let p = 0; p < re.length; p++) {
    re[p] += aRe[p] * bRe[p] - aIm[p] * bIm[p];
    im[p] += aRe[p] * bIm[p] + aIm[p] * bRe[p];
  }
}
