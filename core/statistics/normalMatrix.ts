import type { NormalSums } from './normalSums';

/**
 * The normal matrix Φ, K·M square, row-major, unknowns ordered input by input and newest-first; only the lower
 * triangle (column ≤ row) is filled. Built from the first column of each block by the shift updates.
 */
export function normalMatrix(sums: NormalSums): Float64Array {
  const { inputs, length, correlations, edges } = sums;
  const size = inputs * length;
  const matrix = new Float64Array(size * size);
  for (let r = 0; r < inputs; r++) {
    for (let s = 0; s <= r; s++) {
      const at = (k: number, l: number) => (r * length + k) * size + s * length + l;
      for (let k = 0; k < length; k++) matrix[at(k, 0)] = correlations[r][s][k];
      if (s < r) for (let l = 1; l < length; l++) matrix[at(0, l)] = correlations[s][r][l];
      for (let k = 1; k < length; k++) {
        const last = s < r ? length - 1 : k;
        for (let l = 1; l <= last; l++) {
          let value = matrix[at(k - 1, l - 1)];
          for (const { before, after } of edges) {
            value += before[r][k - 1] * before[s][l - 1] - after[r][k - 1] * after[s][l - 1];
          }
          matrix[at(k, l)] = value;
        }
      }
    }
  }
  return matrix;
}
