import { newSpectrum, type Spectrum } from '../statistics/blockSpectra';
import { sizeFor, transformOf } from '../statistics/transform';
import type { ShiftStructure } from './displacement';

/**
 * The block Toeplitz matrix that stands close to `A + ρ I`: correlations of each stretch with the M - 1 samples before
 * it, all others counted as zero. Positive definite wherever `A + ρ I` is, since it has the products of the samples
 * before and behind that are missing there; the closer to it the longer the stretches are against the filter.
 * @returns `[r][s][k]`: first columns of its blocks
 */
export function zeroExtended(
  { inputs, length, columns, edges }: ShiftStructure,
  regularisation: number,
): Float64Array[][] {
  const size = sizeFor(2 * length - 1, 8);
  const transform = transformOf(size);
  const spectra = edges.map(({ before }) =>
    before.map((row) => {
      const spectrum = newSpectrum(size);
      spectrum.re.set(row);
      transform.forward(spectrum.re, spectrum.im);
      return spectrum;
    }),
  );
  const result = columns.map((row) => row.map((column) => column.slice()));
  for (let r = 0; r < inputs; r++) {
    result[r][r][0] += regularisation;
    for (let s = 0; s <= r; s++) {
      const product = newSpectrum(size);
      for (const rows of spectra) addCrossSpectrum(product, rows[r], rows[s]);
      transform.inverse(product.re, product.im);
      for (let k = 0; k < length; k++) {
        result[r][s][k] += product.re[k];
        if (s < r) result[s][r][k] += product.re[(size - k) % size];
      }
    }
  }
  return result;
}

/** Adds a conj(b). */
function addCrossSpectrum(sum: Spectrum, a: Spectrum, b: Spectrum): void {
  for (let p = 0; p < sum.re.length; p++) {
    sum.re[p] += a.re[p] * b.re[p] + a.im[p] * b.im[p];
    sum.im[p] += a.im[p] * b.re[p] - a.re[p] * b.im[p];
  }
}
