import type { Operator } from './conditionNumber';
import { norm } from './vectors';

/** A residual of this share of b or less is as small as rounding leaves it where the system is well conditioned. */
const enough = 1e-15;

/** The same where the step before should have left less than a thousandth of it: what is left is rounding. */
const enoughRounding = 1e-14;

/** A step that does not lower the residual to less than this share is the last: rounding is all that is left. */
const worthwhile = 0.5;

/**
 * Solves `R w = b` by an approximate inverse and iterative refinement (Golub & Van Loan, *Matrix Computations*, ch. 3,
 * from memory): each step lowers the error by about the relative error of the inverse, down to that of the product.
 * @param multiply w ↦ R w
 * @param solve the approximate inverse
 * @param most steps taken at most
 * @returns the solution of the smallest residual, and the 2-norm of that
 */
export function refine(
  multiply: Operator,
  solve: Operator,
  b: Float64Array,
  most: number,
): { solution: Float64Array; residual: number } {
  let solution = solve(b);
  let residual = difference(b, multiply(solution));
  let size = norm(residual);
  const whole = norm(b);
  for (let step = 0; step < most && size > enough * whole; step++) {
    const better = sum(solution, solve(residual));
    const left = difference(b, multiply(better));
    const leftSize = norm(left);
    if (!(leftSize < size)) break;
    // Each step leaves about the share that the approximate inverse left of b.
    const rounding = leftSize <= enoughRounding * whole && leftSize > 1000 * (size / whole) * size;
    const last = rounding || leftSize > worthwhile * size;
    solution = better;
    residual = left;
    size = leftSize;
    if (last) break;
  }
  return { solution, residual: size };
}

function difference(a: Float64Array, b: Float64Array): Float64Array {
  return a.map((value, i) => value - b[i]);
}

function sum(a: Float64Array, b: Float64Array): Float64Array {
  return a.map((value, i) => value + b[i]);
}
