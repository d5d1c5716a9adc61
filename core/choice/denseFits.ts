import { factorCholesky } from '../solvers/cholesky';
import { normalMatrix } from '../statistics/normalMatrix';
import type { JointSums, Layout } from './blockSums';
import { crossSums, inputSums } from './jointParts';
import type { NestedFitter } from './nestedFits';

/**
 * Fits of all lengths and delays from one Cholesky factor of the longest: row i of L⁻¹ is what unknown i adds to the fits
 * before it, `w ← w + v_i (v_iᵀ θ)`, since the v_i are orthonormal in the matrix.
 * size³/3 multiply-adds and size² for each delay. Relative error of the taps about 1e-16 times the condition number.
 */
export function denseFitter(sums: JointSums, layout: Layout): NestedFitter {
  const { inputs, length } = layout;
  const size = inputs * length;
  const matrix = matrixByTaps(sums, layout);
  const right = crossSums(sums, layout).map((row) => row.map((value) => value / sums.count));
  return function* (regularisation, lengths) {
    const used = inputs * lengths[lengths.length - 1];
    const factored = leadingPart(matrix, size, used);
    for (let i = 0; i < used; i++) factored[i * used + i] += regularisation;
    const result = factorCholesky(factored, used);
    const order = 'order' in result ? result.order : used;
    const rows = new Float64Array(order * used);
    const taps = right.map(() => new Float64Array(size));
    let inverseTrace = 0;
    let place = 0;
    for (let i = 0; i < order; i++) {
      const row = rows.subarray(i * used, i * used + i + 1);
      inverseRow(row, rows, factored, i, used);
      for (let j = 0; j <= i; j++) inverseTrace += row[j] * row[j];
      for (let d = 0; d < right.length; d++) addProjection(taps[d], row, right[d]);
      if (i + 1 === lengths[place] * inputs) {
        yield { place, length: lengths[place], taps, walk: null, inverseTrace };
        place++;
      }
    }
  };
}

/** Φ/L, row-major, lower triangle, unknowns tap by tap, so that a shorter filter is a leading part. */
function matrixByTaps(sums: JointSums, layout: Layout): Float64Array {
  const { inputs, length } = layout;
  const size = inputs * length;
  const byInput = normalMatrix(inputSums(sums, layout));
  const matrix = new Float64Array(size * size);
  const place = (i: number) => (i % inputs) * length + Math.floor(i / inputs);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j <= i; j++) {
      const a = Math.max(place(i), place(j));
      const b = Math.min(place(i), place(j));
      matrix[i * size + j] = byInput[a * size + b] / sums.count;
    }
  }
  return matrix;
}

/** The first `used` rows and columns. */
function leadingPart(matrix: Float64Array, size: number, used: number): Float64Array {
  const part = new Float64Array(used * used);
  for (let i = 0; i < used; i++) part.set(matrix.subarray(i * size, i * size + used), i * used);
  return part;
}

/** Row i of L⁻¹: `(e_i - Σ_{j<i} L_ij v_j) / L_ii`. */
function inverseRow(
  row: Float64Array,
  rows: Float64Array,
  factor: Float64Array,
  i: number,
  size: number,
): void {
  const divisor = factor[i * size + i];
  for (let j = 0; j < i; j++) {
    const share = factor[i * size + j] / divisor;
    const start = j * size;
    for (let k = 0; k <= j; k++) row[k] -= share * rows[start + k];
  }
  row[i] = 1 / divisor;
}

/** `w += v (vᵀ b)`. */
function addProjection(w: Float64Array, v: Float64Array, b: Float64Array): void {
  let even = 0;
  let odd = 0;
  const pairs = v.length - (v.length % 2);
  for (let k = 0; k < pairs; k += 2) {
    even += v[k] * b[k];
    odd += v[k + 1] * b[k + 1];
  }
  if (pairs < v.length) even += v[pairs] * b[pairs];
  const share = even + odd;
  for (let k = 0; k < v.length; k++) w[k] += share * v[k];
}
