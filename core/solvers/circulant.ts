import { sizeFor } from '../statistics/transform';
import type { Operator } from './conditionNumber';
import { symmetricCirculant } from './symmetricCirculant';

/**
 * The inverse of T. Chan's circulant preconditioner of a symmetric positive definite Toeplitz matrix (*SIAM J. Sci.
 * Stat. Comput.* 9, 1988, from memory): its eigenvalues `Σ_k (1 - |k|/n) t_k cos ωk` are those of the circulant matrix
 * nearest to T, and positive at every ω, being fᵀ T f of the unit vector f of that frequency. They are taken at as many
 * frequencies as the next power of two, with vectors extended by zeros; where n is one it is his matrix exactly.
 * @param column first column of T
 */
export function circulantInverse(column: Float64Array): Operator {
  return symmetricCirculant(nearestCirculant(column), column.length, (eigenvalue) => 1 / eigenvalue);
}

/** First column of that circulant matrix itself. */
export function nearestCirculant(column: Float64Array): Float64Array {
  const n = column.length;
  const circle = new Float64Array(sizeFor(n, 8));
  for (let k = 0; k < n; k++) {
    const value = (1 - k / n) * column[k];
    circle[k] += value;
    // Lag -k; what lies further apart than the circle is long meets what has come round.
    if (k > 0) circle[circle.length - k] += value;
  }
  return circle;
}
