import { newSpectrum, type Spectrum } from '../statistics/blockSpectra';
import { conjugatePlace, sizeFor, type Transform, transformOf } from '../statistics/transform';
import type { Operator } from './conditionNumber';

/** A vector of unknowns by its parts, one an input, M values each. */
type Parts = readonly Float64Array[];

/**
 * A symmetric matrix with unknowns input by input: a block Toeplitz matrix T and, with L(g) the matrix whose columns
 * are g moved down by 0, 1, … M - 1 taps, `T + Σ_j L(plus_j) L(plus_j)ᵀ - Σ_j L(minus_j) L(minus_j)ᵀ`.
 */
export interface ShiftSum {
  inputs: number;
  length: number;
  /** `[r][s]`: first column of block (r, s); its first row is the first column of block (s, r). None: T is zero. */
  toeplitz: readonly Parts[] | null;
  /** As many of each sign. */
  plus: readonly Parts[];
  minus: readonly Parts[];
}

/**
 * Multiplies by such a matrix with transforms of the power of two from 2M - 1 on: two for each input and two for each
 * pair of columns. Error about 1e-15 times the sum of the norms of its terms.
 */
export function shiftSumOperator({ inputs, length, toeplitz, plus, minus }: ShiftSum): Operator {
  const size = sizeFor(2 * length - 1);
  const transform = transformOf(size);
  const blocks = toeplitz?.map((row, r) =>
    row.map((column, s) => circulant(column, toeplitz[s][r], transform)),
  );
  const pairs = plus.map((_, j) => {
    const back = plus[j].map((g, r) => difference(g, minus[j][r], transform));
    return { back, forth: back.map(mirrored) };
  });
  const given = Array.from({ length: inputs }, () => newSpectrum(size));
  const product = Array.from({ length: inputs }, () => newSpectrum(size));
  const between = newSpectrum(size);

  return (v, into = new Float64Array(inputs * length)) => {
    for (let r = 0; r < inputs; r++) {
      clear(product[r]);
      clear(given[r]);
      given[r].re.set(v.subarray(r * length, (r + 1) * length));
      transform.forward(given[r].re, given[r].im);
    }
    blocks?.forEach((row, r) => {
      row.forEach((block, s) => {
        addProduct(product[r], block, given[s]);
      });
    });
    for (const { back, forth } of pairs) {
      // Real part L(plus)ᵀ v, imaginary part L(minus)ᵀ v.
      clear(between);
      for (let s = 0; s < inputs; s++) addConjugateProduct(between, back[s], given[s]);
      transform.inverse(between.re, between.im);
      between.re.fill(0, length);
      between.im.fill(0, length);
      transform.forward(between.re, between.im);
      // The real part of the product with plus + i minus is what the pair adds; the imaginary part is left unused.
      for (let r = 0; r < inputs; r++) addProduct(product[r], forth[r], between);
    }
    for (let r = 0; r < inputs; r++) {
      transform.inverse(product[r].re, product[r].im);
      into.set(product[r].re.subarray(0, length), r * length);
    }
    return into;
  };
}

/** Spectrum of the circulant matrix that a Toeplitz block is the corner of. */
function circulant(column: Float64Array, row: Float64Array, transform: Transform): Spectrum {
  const spectrum = newSpectrum(transform.size);
  spectrum.re.set(column);
  for (let k = 1; k < row.length; k++) spectrum.re[transform.size - k] = row[k];
  transform.forward(spectrum.re, spectrum.im);
  return spectrum;
}

/** Spectrum of `g - i h`. */
function difference(g: Float64Array, h: Float64Array, transform: Transform): Spectrum {
  const spectrum = newSpectrum(transform.size);
  spectrum.re.set(g);
  for (let k = 0; k < h.length; k++) spectrum.im[k] = -h[k];
  transform.forward(spectrum.re, spectrum.im);
  return spectrum;
}

/** Spectrum of the conjugate signal, `g + i h`. */
function mirrored({ re, im }: Spectrum): Spectrum {
  return {
    re: re.map((_, p) => re[conjugatePlace(p)]),
    im: im.map((_, p) => -im[conjugatePlace(p)]),
  };
}

function clear({ re, im }: Spectrum): void {
  re.fill(0);
  im.fill(0);
}

function addProduct(sum: Spectrum, a: Spectrum, b: Spectrum): void {
  const { re, im } = sum;
  const { re: aRe, im: aIm } = a;
  const { re: bRe, im: bIm } = b;
  for (let p = 0; p < re.length; p++) {
    re[p] += aRe[p] * bRe[p] - aIm[p] * bIm[p];
    im[p] += aRe[p] * bIm[p] + aIm[p] * bRe[p];
  }
}

/** Adds conj(a) b. */
function addConjugateProduct(sum: Spectrum, a: Spectrum, b: Spectrum): void {
  const { re, im } = sum;
  const { re: aRe, im: aIm } = a;
  const { re: bRe, im: bIm } = b;
  for (let p = 0; p < re.length; p++) {
    re[p] += aRe[p] * bRe[p] + aIm[p] * bIm[p];
    im[p] += aRe[p] * bIm[p] - aIm[p] * bRe[p];
  }
}
