import type { Generators } from './displacement';
import { eliminateByTwo } from './doubleSteps';
import { rotate, rotateFour, rotateHyperbolically } from './rotations';

/** Where |reflection| reaches 1 to working accuracy: the matrix is not positive definite. */
export interface SchurBreakdown {
  /** Unknowns of the leading part, in the order of {@link Generators}, that could be eliminated. */
  order: number;
}

/** Generators of the inverse: `R⁻¹ - F R⁻¹ Fᵀ = Σ_j plus_j plus_jᵀ - Σ_j minus_j minus_jᵀ`, n values each. */
export interface InverseGenerators {
  plus: Float64Array[];
  minus: Float64Array[];
}

/** Called with each finished column i of the Cholesky factor: its row t ≥ i stands at `column[t + offset]`. */
export type Emit = (i: number, column: Float64Array, offset: number) => void;

/**
 * Generalised Schur algorithm on `[R I; I 0]` (Kailath & Sayed, *SIAM Review* 37, 1995, from memory): orthogonal
 * rotations gather row i of the generators in one column of each sign, a hyperbolic one leaves only the plus column,
 * which is column i of the Cholesky factor; moved down by F it goes on. After n steps the rows of the unit matrix have
 * become generators of -R⁻¹, so that no factor needs to be kept.
 *
 * About 6 to 8 n² multiplications for each pair of columns, 2n numbers of memory for each column. In the mixed form of the
 * rotations the factor is that of a matrix within about n·1e-16 of R (Chandrasekaran & Sayed, *SIAM J. Matrix Anal.
 * Appl.* 17, 1996, from memory); as an approximate inverse the result is off by about 10 to 100 times 1e-16·κ, so that
 * one to three steps of refinement reach full accuracy up to a condition number κ of about 1e13.
 *
 * A pivot at or below n·2⁻⁵² of the diagonal counts as zero, as in Cholesky's method.
 * @param generators overwritten
 */
export function invertBySchur(generators: Generators): InverseGenerators | SchurBreakdown {
  const { size, inputs, plus, minus } = generators;
  const shifts =
    inputs === 1 && plus.length === 2
      ? eliminateByTwo(generators, toleranceOf(size))
      : eliminate(generators, size + inputs, () => {});
  if (typeof shifts === 'number') return { order: shifts };
  // The Schur complement is -R⁻¹: the signs change places.
  return {
    plus: minus.map((column) => column.slice(size)),
    minus: plus.map((column, j) => column.slice(size - shifts[j], 2 * size - shifts[j])),
  };
}

/**
 * The same algorithm on R alone: emits the columns of its Cholesky factor in half the time.
 * @param generators overwritten
 * @returns null where all went well
 */
export function factorBySchur(generators: Generators, emit: Emit): SchurBreakdown | null {
  const shifts = eliminate(generators, 0, emit);
  return typeof shifts === 'number' ? { order: shifts } : null;
}

/** A pivot at or below this share of its diagonal element counts as zero. */
function toleranceOf(size: number): number {
  return size * 2.220446049250313e-16;
}

/**
 * @param below rows that are not zero below row n - 1 at the start, plus K for each block of rows; 0 leaves them out
 * @returns how far each plus column has moved down, or the order at which it broke down
 */
function eliminate(generators: Generators, below: number, emit: Emit): Int32Array | number {
  const { inputs, size, plus, minus, diagonal } = generators;
  const tolerance = toleranceOf(size);
  const shifts = new Int32Array(plus.length);
  // Moving a column down by F moves no values: row t stands at t - shift. What leaves R at its end is lost.
  const finish = (i: number, j: number) => {
    emit(i, plus[j], -shifts[j]);
    shifts[j] += inputs;
    plus[j].fill(0, size - shifts[j], size - shifts[j] + inputs);
  };
  // The minus columns are zero in the first K rows, and the plus ones triangular.
  for (let j = 0; j < inputs; j++) finish(j, j);

  for (let i = inputs; i < size; i++) {
    const pivot = i % inputs;
    const to = below === 0 ? size : below + i - pivot;
    const x = plus[pivot];
    const dx = -shifts[pivot];
    const least = tolerance * diagonal[pivot];
    // The columns before the pivot have moved on already: they are zero in this row.
    for (let j = pivot + 1; j < plus.length - 1; j++) rotate(x, dx, plus[j], -shifts[j], i, to);
    for (let j = 1; j < minus.length - 1; j++) rotate(minus[0], 0, minus[j], 0, i, to);
    const y = plus.length - 1;
    const h = minus[0];
    const k = minus[minus.length - 1];
    let possible: boolean;
    if (y > pivot) {
      possible = rotateFour(x, dx, plus[y], -shifts[y], h, k, i, to, least);
    } else {
      if (k !== h) rotate(h, 0, k, 0, i, to);
      possible = rotateHyperbolically(x, dx, h, i, to, least);
    }
    if (!possible) return i;
    finish(i, pivot);
  }
  return shifts;
}
