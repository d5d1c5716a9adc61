import { largestEigenvalue } from '../../solvers/conditionNumber';
import { type CrossSpectra, frequenciesOf } from '../../spectra/crossSpectra';
import { type Band, bandsWhere, smooth } from './bands';

/** How well the inputs excite what the filter can do. */
export interface Excitation {
  /** For each input the bands in which it has no energy. */
  emptyBands: Band[][];
  /**
   * Bounds of the eigenvalues of the normal matrix made free of units (each input of power 1), whatever the filter's
   * length: the spectrum's smallest and largest value.
   */
  smallest: number;
  largest: number;
}

/**
 * An input has no energy where it lies this far below its own peak (60 dB): below that a recording shows what sensor
 * and converter add rather than the signal (common practice).
 */
const belowPeak = 1e-6;

/** Or where it lies within 6 dB of what rounding to the converter's steps adds. */
const aboveConverter = 4;

/**
 * @param length M: bands narrower than half of what M taps can part do not matter
 * @param noise density of the converter's noise on each input, in unit²/Hz; 0 where it is not known
 */
export function excitationOf(spectra: CrossSpectra, length: number, noise: readonly number[]): Excitation {
  const inputs = spectra.signals - 1;
  const frequencies = frequenciesOf(spectra);
  const least = Math.max(3, Math.floor(spectra.segment / (2 * length)));
  const emptyBands = Array.from({ length: inputs }, (_, r) => {
    const power = spectra.between[r][r].re;
    // As the filter sees it: a single line does not make everything else empty.
    const peak = smooth(power.subarray(1), least).reduce((most, value) => Math.max(most, value), 0);
    const empty = Math.max(belowPeak * peak, aboveConverter * noise[r]);
    return bandsWhere(
      power.map((value) => (value < empty ? 1 : 0)),
      frequencies,
      least,
    );
  });
  return { emptyBands, ...eigenvalueBounds(spectra) };
}

/**
 * The eigenvalues of a Toeplitz matrix of correlations lie between the smallest and the largest value of the spectrum
 * they belong to, and come near both as it grows (Grenander & Szegő, *Toeplitz Forms*; Gray, *Toeplitz and Circulant
 * Matrices: A Review*); for several inputs, of the eigenvalues of the spectral matrix. The bin at 0 Hz, which may hold
 * what the removal of the mean has left, is no smallest value: a filter parts no bands as narrow.
 * @returns for inputs of power 1 and densities for which white noise is 1
 */
export function eigenvalueBounds(spectra: CrossSpectra): { smallest: number; largest: number } {
  const inputs = spectra.signals - 1;
  const half = spectra.segment / 2;
  const scale = Array.from({ length: inputs }, (_, r) => {
    const power = spectra.between[r][r].re;
    let sum = 0;
    for (let f = 0; f <= half; f++) sum += power[f];
    return sum > 0 ? Math.sqrt(half / sum) : 0;
  });
  let smallest = Number.POSITIVE_INFINITY;
  let largest = 0;
  for (let f = 0; f <= half; f++) {
    // One-sided densities are those of both sides together, but at the ends.
    const sides = f === 0 || f === half ? 2 : 1;
    const { low, high } = extremes(spectra, f, scale);
    if (f > 0) smallest = Math.min(smallest, sides * low);
    largest = Math.max(largest, sides * high);
  }
  return { smallest, largest };
}

/** Extreme eigenvalues of the spectral matrix of the inputs at one frequency. */
function extremes(
  { between, signals }: CrossSpectra,
  f: number,
  scale: readonly number[],
): { low: number; high: number } {
  const inputs = signals - 1;
  const at = (r: number, s: number) => scale[r] * scale[s];
  if (inputs === 1) {
    const value = between[0][0].re[f] * at(0, 0);
    return { low: value, high: value };
  }
  // A Hermitian matrix A + iB has the eigenvalues of [[A, -B], [B, A]], each twice.
  const apply = (v: Float64Array, shift: number, sign: number) => {
    const product = v.map((value) => shift * value);
    for (let r = 0; r < inputs; r++) {
      for (let s = 0; s < inputs; s++) {
        const { re, im } = between[Math.min(r, s)][Math.max(r, s)];
        const a = sign * re[f] * at(r, s);
        const b = sign * im[f] * at(r, s) * (r < s ? 1 : r > s ? -1 : 0);
        product[r] += a * v[s] - b * v[inputs + s];
        product[inputs + r] += b * v[s] + a * v[inputs + s];
      }
    }
    return product;
  };
  const high = largestEigenvalue((v) => apply(v, 0, 1), 2 * inputs);
  const gap = largestEigenvalue((v) => apply(v, high, -1), 2 * inputs);
  return { low: Math.max(0, high - gap), high };
}
