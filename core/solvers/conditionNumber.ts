import { addMultiple, inner, norm } from './vectors';

/**
 * A linear map on vectors of one size.
 * @param into where the result may be written, other than the vector; a new array where it is not given
 * @returns the result, in `into` or in an array that the operator makes or gives away
 */
export type Operator = (vector: Float64Array, into?: Float64Array) => Float64Array;

const steps = 48;

/**
 * Condition number (2-norm) of a symmetric positive definite matrix by Lanczos's method with full
 * reorthogonalisation (Golub & Van Loan, *Matrix Computations*, ch. 10, from memory), once on the matrix and once on
 * its inverse. Approaches the true value from below; within a few per cent for the matrices that occur here.
 * Above about 1e15 the inverse is no longer known and the figure is only an order of magnitude.
 */
export function conditionNumber(multiply: Operator, solve: Operator, size: number): number {
  return largestEigenvalue(multiply, size) * largestEigenvalue(solve, size);
}

/**
 * Largest eigenvalue of a symmetric positive definite operator, from below.
 * @param settled ends the steps early where four of them raised the value by no more than this share of it
 */
export function largestEigenvalue(apply: Operator, size: number, settled = 0): number {
  const basis: Float64Array[] = [];
  const diagonal: number[] = [];
  const beside: number[] = [];
  let vector = startVector(size);
  let value = 0;
  for (let j = 0; j < Math.min(steps, size); j++) {
    scale(vector, 1 / norm(vector));
    basis.push(vector);
    const next = apply(vector);
    diagonal.push(inner(vector, next));
    for (let pass = 0; pass < 2; pass++) {
      for (const known of basis) addMultiple(next, known, -inner(known, next));
    }
    const length = norm(next);
    if (!(length > 1e-14 * diagonal[0])) break;
    if (settled > 0 && j % 4 === 3) {
      const raised = largestOfTridiagonal(diagonal, beside);
      if (raised - value <= settled * raised) return raised;
      value = raised;
    }
    beside.push(length);
    vector = next;
  }
  return largestOfTridiagonal(diagonal, beside);
}

/** Sturm counts and halving: the largest eigenvalue of a symmetric tridiagonal matrix. */
function largestOfTridiagonal(diagonal: readonly number[], beside: readonly number[]): number {
  const n = diagonal.length;
  const edge = (i: number) => Math.abs(i > 0 ? beside[i - 1] : 0) + Math.abs(i < n - 1 ? beside[i] : 0);
  let low = Math.max(...diagonal);
  let high = Math.max(...diagonal.map((d, i) => d + edge(i)));
  for (let pass = 0; pass < 60 && high - low > 1e-12 * Math.abs(high); pass++) {
    const middle = 0.5 * (low + high);
    if (allBelow(diagonal, beside, middle)) high = middle;
    else low = middle;
  }
  return high;
}

function allBelow(diagonal: readonly number[], beside: readonly number[], bound: number): boolean {
  let pivot = bound - diagonal[0];
  for (let i = 1; i < diagonal.length; i++) {
    if (!(pivot > 0)) return false;
    pivot = bound - diagonal[i] - (beside[i - 1] * beside[i - 1]) / pivot;
  }
  return pivot > 0;
}

/** A vector with a share of every direction, the same on every machine: a linear congruential sequence. */
export function startVector(size: number): Float64Array {
  const vector = new Float64Array(size);
  let state = 12345;
  for (let k = 0; k < size; k++) {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    vector[k] = state / 4294967296 - 0.5;
  }
  return vector;
}

function scale(vector: Float64Array, factor: number): void {
  for (let k = 0; k < vector.length; k++) vector[k] *= factor;
}
