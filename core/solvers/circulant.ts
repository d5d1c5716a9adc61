import { newSpectrum } from '../statistics/blockSpectra';
import { sizeFor, transformOf } from '../statistics/transform';
import type { Operator } from './conditionNumber';

/**
 * The inverse of T. Chan's circulant preconditioner of a symmetric positive definite Toeplitz matrix (*SIAM J. Sci.
 * Stat. Comput.* 9, 1988, from memory): its eigenvalues `Σ_k (1 - |k|/n) t_k cos ωk` are those of the circulant matrix
 * nearest to T, and positive at every ω, being fᵀ T f of the unit vector f of that frequency. They are taken at as many
 * frequencies as the next power of two, with vectors extended by zeros; where n is one it is his matrix exactly.
 * @param column first column of T
 */
export function circulantInverse(column: Float64Array): Operator {
  const n = column.length;
  const size = sizeFor(n);
  const transform = transformOf(size);
  const { re: eigenvalues, im } = newSpectrum(size);
  for (let k = 0; k < n; k++) {
    const value = (1 - k / n) * column[k];
    eigenvalues[k] += value;
    // Lag -k; what lies further apart than the circle is long meets what has come round.
    if (k > 0) eigenvalues[size - k] += value;
  }
  transform.forward(eigenvalues, im);
  const buffer = newSpectrum(size);
  return (v) => {
    buffer.re.fill(0, n);
    buffer.im.fill(0);
    buffer.re.set(v);
    transform.forward(buffer.re, buffer.im);
    for (let p = 0; p < size; p++) {
      buffer.re[p] /= eigenvalues[p];
      buffer.im[p] /= eigenvalues[p];
    }
    transform.inverse(buffer.re, buffer.im);
    return buffer.re.slice(0, n);
  };
}
