import { normalOperator } from './normalMultiply';
import { multiply, type NormalSystem } from './normalSystem';
import { toeplitzOperator } from './toeplitz';

/**
 * `wᵀ (Φ/L) w`, the mean square of the output that the statistics tell, without forming the matrix where its structure
 * is at hand. Relative error about 1e-15.
 * @param taps w, one row an input
 */
export function quadraticForm(system: NormalSystem, taps: readonly Float64Array[]): number {
  const { matrix, scale } = system;
  const length = taps[0].length;
  const v = new Float64Array(system.size);
  taps.forEach((row, r) => {
    row.forEach((w, k) => {
      v[r * length + k] = w * scale[r * length + k];
    });
  });
  const product =
    'toeplitz' in matrix
      ? toeplitzOperator(matrix.toeplitz)(v)
      : matrix.structure === undefined
        ? multiply(system, 0, v)
        : normalOperator(matrix.structure, 0)(v);
  return v.reduce((sum, value, i) => sum + value * product[i], 0);
}
