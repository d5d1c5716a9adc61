/** `A = G Gᵀ`, G lower triangular. */
export interface CholeskyFactor {
  size: number;
  /** Row-major, size × size; what stands above the diagonal has no meaning. */
  factor: Float64Array;
}

/** Where a factorisation broke down: the matrix is not positive definite to working accuracy. */
export interface CholeskyBreakdown {
  /** Order of the largest leading part that could be factored. */
  order: number;
}

/**
 * Factors a symmetric positive definite matrix in place (Golub & Van Loan, *Matrix Computations*, ch. 4, from memory).
 * size³/6 multiply-adds. Backward stable: the factor is exact for a matrix within about size·1e-16 of the given one.
 * A pivot at or below size·2⁻⁵² of its diagonal element counts as zero.
 * @param matrix row-major, lower triangle filled; overwritten by the factor
 */
export function factorCholesky(matrix: Float64Array, size: number): CholeskyFactor | CholeskyBreakdown {
  const tolerance = size * 2.220446049250313e-16;
  for (let i = 0; i < size; i++) {
    const row = i * size;
    for (let j = 0; j < i; j++) {
      const other = j * size;
      matrix[row + j] = (matrix[row + j] - dot(matrix, row, other, j)) / matrix[other + j];
    }
    const diagonal = matrix[row + i];
    const pivot = diagonal - dot(matrix, row, row, i);
    if (!(pivot > tolerance * diagonal)) return { order: i };
    matrix[row + i] = Math.sqrt(pivot);
  }
  return { size, factor: matrix };
}

/** Solves `G Gᵀ w = b`; b is kept. */
export function solveCholesky({ size, factor }: CholeskyFactor, b: Float64Array): Float64Array {
  const w = b.slice();
  for (let i = 0; i < size; i++) {
    const row = i * size;
    let sum = w[i];
    for (let j = 0; j < i; j++) sum -= factor[row + j] * w[j];
    w[i] = sum / factor[row + i];
  }
  for (let i = size - 1; i >= 0; i--) {
    const row = i * size;
    const value = w[i] / factor[row + i];
    w[i] = value;
    for (let j = 0; j < i; j++) w[j] -= factor[row + j] * value;
  }
  return w;
}

/** Dot product of two stretches of one array in four running sums: less rounding and more speed than one. */
function dot(values: Float64Array, left: number, right: number, count: number): number {
  let a = 0;
  let b = 0;
  let c = 0;
  let d = 0;
  const fours = count - (count % 4);
  let k = 0;
  for (; k < fours; k += 4) {
    a += values[left + k] * values[right + k];
    b += values[left + k + 1] * values[right + k + 1];
    c += values[left + k + 2] * values[right + k + 2];
    d += values[left + k + 3] * values[right + k + 3];
  }
  for (; k < count; k++) a += values[left + k] * values[right + k];
  return a + b + (c + d);
}
