import { cosineAt, quarterCosines } from '../statistics/cosines';
import { transformOf } from '../statistics/transform';
import { nearestCirculant } from './circulant';
import type { Operator } from './conditionNumber';
import { join, multiplyPairs, pairFactors, split } from './symmetricCirculant';

/** A Toeplitz matrix and its preconditioner on spectra: n numbers, n/2 real parts and n/2 imaginary parts. */
export interface SpectralToeplitz {
  multiply: Operator;
  precondition: Operator;
  /** The spectrum of a vector, and back. Lengths and angles of vectors stay what they are but for a factor. */
  toSpectrum: Operator;
  toVector: Operator;
}

/**
 * A symmetric Toeplitz matrix of a power of two rows as half the sum of a circulant and a skew-circulant one (Chan & Ng,
 * *SIAM Review* 38, 1996, from memory), for conjugate gradients that stay in the spectrum: there the circulant one and
 * T. Chan's preconditioner take no transform, the skew-circulant one four of n/2 points (by numbers
 * `(v[k] + i v[k + n/2]) e^(iπk/n)`). Two thirds of the transforms of {@link quickToeplitzOperator} and {@link circulantInverse}.
 * @param column first column; a power of two from 16 on
 */
export function spectralToeplitz(column: Float64Array): SpectralToeplitz {
  const n = column.length;
  const half = n / 2;
  const transform = transformOf(half);
  const round = column.map((value, k) => 0.5 * (k === 0 ? value : value + column[n - k]));
  const skew = column.map((value, k) => 0.5 * (k === 0 ? value : value - column[n - k]));
  const factors = pairFactors(round, (eigenvalue) => eigenvalue);
  const inverses = pairFactors(nearestCirculant(column), (eigenvalue) => 1 / eigenvalue);
  const quarter = quarterCosines(2 * n);
  const cosines = Float64Array.from({ length: half }, (_, k) => cosineAt(quarter, k));
  const sines = Float64Array.from({ length: half }, (_, k) => cosineAt(quarter, k - half));
  // Even and odd samples, and the numbers of the skew-circulant product.
  const [even, odd, re, im, kernelRe, kernelIm] = Array.from({ length: 6 }, () => new Float64Array(half));
  split(skew, n, even, odd);
  twist(even, odd, cosines, sines, kernelRe, kernelIm);
  transform.forward(kernelRe, kernelIm);

  return {
    multiply(spectrum, into = new Float64Array(n)) {
      even.set(spectrum.subarray(0, half));
      odd.set(spectrum.subarray(half));
      transform.inverse(even, odd);
      twist(even, odd, cosines, sines, re, im);
      transform.forward(re, im);
      multiplyBy(kernelRe, kernelIm, re, im);
      transform.inverse(re, im);
      untwist(re, im, cosines, sines, even, odd);
      transform.forward(even, odd);
      into.set(spectrum);
      multiplyPairs(factors, into.subarray(0, half), into.subarray(half));
      for (let p = 0; p < half; p++) into[p] += even[p];
      for (let p = 0; p < half; p++) into[half + p] += odd[p];
      return into;
    },
    precondition(spectrum, into = new Float64Array(n)) {
      into.set(spectrum);
      multiplyPairs(inverses, into.subarray(0, half), into.subarray(half));
      return into;
    },
    toSpectrum(vector, into = new Float64Array(n)) {
      const parts = [into.subarray(0, half), into.subarray(half)] as const;
      split(vector, n, ...parts);
      transform.forward(...parts);
      return into;
    },
    toVector(spectrum, into = new Float64Array(n)) {
      even.set(spectrum.subarray(0, half));
      odd.set(spectrum.subarray(half));
      transform.inverse(even, odd);
      join(even, odd, n, into);
      return into;
    },
  };
}

/** From even and odd samples to `(v[k] + i v[k + n/2]) e^(iπk/n)`, which products modulo x^n + 1 are cyclic in. */
function twist(
  even: Float64Array,
  odd: Float64Array,
  cosines: Float64Array,
  sines: Float64Array,
  re: Float64Array,
  im: Float64Array,
): void {
  const quarter = even.length >> 1;
  for (let m = 0, k = 0; m < quarter; m++, k += 2) {
    const a = even[m];
    const b = even[m + quarter];
    const c = odd[m];
    const d = odd[m + quarter];
    re[k] = a * cosines[k] - b * sines[k];
    im[k] = a * sines[k] + b * cosines[k];
    re[k + 1] = c * cosines[k + 1] - d * sines[k + 1];
    im[k + 1] = c * sines[k + 1] + d * cosines[k + 1];
  }
}

function untwist(
  re: Float64Array,
  im: Float64Array,
  cosines: Float64Array,
  sines: Float64Array,
  even: Float64Array,
  odd: Float64Array,
): void {
  const quarter = even.length >> 1;
  for (let m = 0, k = 0; m < quarter; m++, k += 2) {
    even[m] = re[k] * cosines[k] + im[k] * sines[k];
    even[m + quarter] = im[k] * cosines[k] - re[k] * sines[k];
    odd[m] = re[k + 1] * cosines[k + 1] + im[k + 1] * sines[k + 1];
    odd[m + quarter] = im[k + 1] * cosines[k + 1] - re[k + 1] * sines[k + 1];
  }
}

function multiplyBy(
  kernelRe: Float64Array,
  kernelIm: Float64Array,
  re: Float64Array,
  im: Float64Array,
): void {
  for (let p = 0; p < re.length; p++) {
    const a = re[p];
    const b = im[p];
    re[p] = kernelRe[p] * a - kernelIm[p] * b;
    im[p] = kernelRe[p] * b + kernelIm[p] * a;
  }
}
