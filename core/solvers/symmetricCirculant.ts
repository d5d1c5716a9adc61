import { cosineAt, quarterCosines } from '../statistics/cosines';
import { conjugatePlace, frequencyAt, transformOf } from '../statistics/transform';
import type { Operator } from './conditionNumber';

/** For each size: cosine and sine of 2πf/size for the first frequency f of every pair. */
const made = new Map<number, Float64Array>();

/**
 * Multiplies by a corner of a symmetric circulant matrix, or of its inverse: two complex transforms of half its size,
 * even samples as real and odd ones as imaginary part. The eigenvalues are real, so that a pair of conjugate frequencies
 * takes one pass over three numbers. Error about 1e-16 · log2(size) times the largest eigenvalue.
 * @param column first column, even (`column[k] = column[size - k]`); a power of two from 8 on
 * @param length rows and columns of the corner
 * @param eigenvalue what each eigenvalue is replaced by; as it is where it is not given
 */
export function symmetricCirculant(
  column: Float64Array,
  length: number,
  eigenvalue: (value: number) => number = (value) => value,
): Operator {
  const size = column.length;
  const half = size / 2;
  const transform = transformOf(half);
  const re = new Float64Array(half);
  const im = new Float64Array(half);
  const factors = pairFactors(column, eigenvalue);
  return (vector, into = new Float64Array(length)) => {
    split(vector, length, re, im);
    transform.forward(re, im);
    multiplyPairs(factors, re, im);
    transform.inverse(re, im);
    join(re, im, length, into);
    return into;
  };
}

/** Even samples into the real part, odd ones into the imaginary part, zeros behind. */
export function split(vector: Float64Array, length: number, re: Float64Array, im: Float64Array): void {
  const pairs = length >> 1;
  for (let n = 0; n < pairs; n++) {
    re[n] = vector[2 * n];
    im[n] = vector[2 * n + 1];
  }
  re.fill(0, pairs);
  im.fill(0, pairs);
  if (length % 2 === 1) re[pairs] = vector[length - 1];
}

/** The first samples back from {@link split}. */
export function join(re: Float64Array, im: Float64Array, length: number, into: Float64Array): void {
  for (let k = 0, n = 0; k < length; k += 2, n++) into[k] = re[n];
  for (let k = 1, n = 0; k < length; k += 2, n++) into[k] = im[n];
}

/**
 * With eigenvalues λ at f and μ at f + size/2: ¼(λ + μ) and ¼(λ - μ) times cosine and sine of 2πf/size, three numbers for
 * each pair in the order of {@link multiplyPairs}.
 */
export function pairFactors(column: Float64Array, eigenvalue: (value: number) => number): Float64Array {
  const half = column.length / 2;
  const re = new Float64Array(half);
  const im = new Float64Array(half);
  split(column, column.length, re, im);
  transformOf(half).forward(re, im);
  const turns = turnsOf(column.length);
  const factors = new Float64Array(3 * (half / 2 + 1));
  let at = 0;
  for (let p = 0; p < half; p++) {
    const q = conjugatePlace(p);
    if (q < p) continue;
    const cosine = turns[2 * at];
    const sine = turns[2 * at + 1];
    const even = 0.5 * (re[p] + re[q]);
    const odd = 0.5 * ((im[p] + im[q]) * cosine - (re[p] - re[q]) * sine);
    const first = eigenvalue(even + odd);
    const second = eigenvalue(even - odd);
    factors[3 * at] = 0.25 * (first + second);
    factors[3 * at + 1] = 0.25 * (first - second) * cosine;
    factors[3 * at + 2] = 0.25 * (first - second) * sine;
    at++;
  }
  return factors;
}

function turnsOf(size: number): Float64Array {
  let turns = made.get(size);
  if (turns === undefined) {
    const half = size / 2;
    const quarter = quarterCosines(size);
    turns = new Float64Array(2 * (half / 2 + 1));
    let at = 0;
    for (let p = 0; p < half; p++) {
      if (conjugatePlace(p) < p) continue;
      const f = frequencyAt(p, half);
      turns[at++] = cosineAt(quarter, f);
      turns[at++] = cosineAt(quarter, f - size / 4);
    }
    made.set(size, turns);
  }
  return turns;
}

/**
 * Multiplies the spectrum of {@link split} samples by a symmetric circulant matrix. Places p and q hold a frequency and its
 * conjugate; within [2^b, 2^(b+1)) they lie mirrored, places 0 and 1 alone.
 */
export function multiplyPairs(factors: Float64Array, re: Float64Array, im: Float64Array): void {
  const half = re.length;
  const zeroRe = re[0];
  const zeroIm = im[0];
  re[0] = 2 * (factors[0] * zeroRe + factors[1] * zeroIm);
  im[0] = 2 * (factors[0] * zeroIm + factors[1] * zeroRe);
  re[1] *= 2 * factors[3];
  im[1] *= 2 * factors[3];
  let at = 6;
  for (let from = 2; from < half; from *= 2) {
    for (let p = from, q = 2 * from - 1; p < q; p++, q--, at += 3) {
      const own = factors[at];
      const cosine = factors[at + 1];
      const sine = factors[at + 2];
      const pRe = re[p];
      const pIm = im[p];
      const qRe = re[q];
      const qIm = im[q];
      // Spectra of the even and of the odd samples, twice.
      const evenRe = pRe + qRe;
      const evenIm = pIm - qIm;
      const oddRe = pIm + qIm;
      const oddIm = qRe - pRe;
      const nextEvenRe = own * evenRe + cosine * oddRe + sine * oddIm;
      const nextEvenIm = own * evenIm + cosine * oddIm - sine * oddRe;
      const nextOddRe = own * oddRe + cosine * evenRe - sine * evenIm;
      const nextOddIm = own * oddIm + cosine * evenIm + sine * evenRe;
      re[p] = nextEvenRe - nextOddIm;
      im[p] = nextEvenIm + nextOddRe;
      re[q] = nextEvenRe + nextOddIm;
      im[q] = nextOddRe - nextEvenIm;
    }
  }
}
