import { newSpectrum, type Spectrum } from '../statistics/blockSpectra';
import type { NormalSums } from '../statistics/normalSums';
import { sizeFor, type Transform, transformOf } from '../statistics/transform';

/**
 * A covariance sum for transforms of one size: a Toeplitz matrix and what its shift updates add,
 * `R = T + Σ_{j≥1} F^j (b bᵀ - a aᵀ) F^jᵀ`, b and a the samples at the edges.
 */
export interface OutputTables {
  inputs: number;
  transform: Transform;
  /** `[r][s]`: spectrum of the circulant matrix that Toeplitz block (r, s) is the corner of. */
  blocks: Spectrum[][];
  /** Samples at each edge, tap by tap, their spectra by input, and the sign with which they count. */
  edges: { sign: number; samples: Float64Array; rows: Spectrum[] }[];
  /** Room for the spectra of what is given, one an input. */
  given: Spectrum[];
  scratch: Spectrum;
  /** Room for what is to be given back, likewise. */
  sums: Spectrum[];
}

/** Tables that suit filters of a length; each size is made once. */
export function outputTables(sums: NormalSums): (length: number) => OutputTables {
  const made = new Map<number, OutputTables>();
  return (length) => {
    const size = sizeFor(2 * length);
    const tables = made.get(size) ?? newTables(sums, size);
    made.set(size, tables);
    return tables;
  };
}

function newTables({ inputs, length, correlations, edges }: NormalSums, size: number): OutputTables {
  const transform = transformOf(size);
  // Lags from half the size on belong to no filter of this size.
  const lags = Math.min(length, size / 2);
  const spectrumOf = (fill: (re: Float64Array) => void) => {
    const spectrum = newSpectrum(size);
    fill(spectrum.re);
    transform.forward(spectrum.re, spectrum.im);
    return spectrum;
  };
  const side = (rows: readonly Float64Array[], sign: number) => {
    const samples = new Float64Array((size / 2) * inputs);
    rows.forEach((row, r) => {
      for (let k = 0; k < lags - 1; k++) samples[k * inputs + r] = row[k];
    });
    return { sign, samples, rows: rows.map((row) => spectrumOf((re) => re.set(row.subarray(0, lags - 1)))) };
  };
  return {
    inputs,
    transform,
    blocks: correlations.map((row, r) =>
      row.map((column, s) =>
        spectrumOf((re) => {
          for (let k = 0; k < lags; k++) re[k] = column[k];
          for (let k = 1; k < lags; k++) re[size - k] = correlations[s][r][k];
        }),
      ),
    ),
    edges: edges.flatMap(({ before, after }) => [side(before, 1), side(after, -1)]),
    given: Array.from({ length: inputs }, () => newSpectrum(size)),
    scratch: newSpectrum(size),
    sums: Array.from({ length: inputs }, () => newSpectrum(size)),
  };
}

/** Transforms two vectors of so many taps, tap by tap, as real and imaginary part of one, into `given`. */
export function transformTwo(
  { inputs, transform, given }: OutputTables,
  first: Float64Array,
  second: Float64Array | null,
  length: number,
): void {
  for (let r = 0; r < inputs; r++) {
    const { re, im } = given[r];
    re.fill(0);
    im.fill(0);
    for (let k = 0; k < length; k++) re[k] = first[k * inputs + r];
    if (second !== null) for (let k = 0; k < length; k++) im[k] = second[k * inputs + r];
    transform.forward(re, im);
  }
}

/** The correlation of what is given with the samples of an edge, in `scratch`. */
export function correlateEdge(
  { inputs, transform, given, scratch }: OutputTables,
  rows: readonly Spectrum[],
): void {
  setCorrelation(scratch, given[0], rows[0]);
  for (let r = 1; r < inputs; r++) addCorrelation(scratch, given[r], rows[r]);
  transform.inverse(scratch.re, scratch.im);
}

// Parts are named outside the loops: looking them up inside takes half as long again.

/** `z conj(b)` */
function setCorrelation({ re, im }: Spectrum, z: Spectrum, b: Spectrum): void {
  const { re: zRe, im: zIm } = z;
  const { re: bRe, im: bIm } = b;
  for (let p = 0; p < re.length; p++) {
    re[p] = zRe[p] * bRe[p] + zIm[p] * bIm[p];
    im[p] = zIm[p] * bRe[p] - zRe[p] * bIm[p];
  }
}

/** Adds the same. */
function addCorrelation({ re, im }: Spectrum, z: Spectrum, b: Spectrum): void {
  const { re: zRe, im: zIm } = z;
  const { re: bRe, im: bIm } = b;
  for (let p = 0; p < re.length; p++) {
    re[p] += zRe[p] * bRe[p] + zIm[p] * bIm[p];
    im[p] += zIm[p] * bRe[p] - zRe[p] * bIm[p];
  }
}
