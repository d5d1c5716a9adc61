import type { Operator } from './conditionNumber';
import { addMultiple } from './vectors';

/**
 * Solves `R w = b`, R symmetric positive definite, by preconditioned conjugate gradients (Hestenes & Stiefel 1952;
 * Golub & Van Loan, *Matrix Computations*, ch. 11, from memory). As many steps as the preconditioned matrix has clusters
 * of eigenvalues, and then a few for each digit.
 * @param precondition symmetric positive definite, close to R⁻¹
 * @param tolerance residual to reach, as a share of b
 * @param most steps taken at most
 * @returns the last approximation, and whether it reached the tolerance
 */
export function conjugateGradients(
  multiply: Operator,
  precondition: Operator,
  b: Float64Array,
  tolerance: number,
  most: number,
): { solution: Float64Array; reached: boolean } {
  const solution = new Float64Array(b.length);
  const residual = b.slice();
  const target = tolerance * tolerance * inner(b, b);
  let direction = precondition(residual);
  let measure = inner(residual, direction);
  for (let step = 0; inner(residual, residual) > target; step++) {
    if (step === most) return { solution, reached: false };
    const moved = multiply(direction);
    const width = measure / inner(direction, moved);
    addMultiple(solution, direction, width);
    addMultiple(residual, moved, -width);
    const next = precondition(residual);
    const nextMeasure = inner(residual, next);
    addMultiple(next, direction, nextMeasure / measure);
    measure = nextMeasure;
    direction = next;
  }
  return { solution, reached: true };
}

function inner(a: Float64Array, b: Float64Array): number {
  let even = 0;
  let odd = 0;
  let k = 0;
  for (; k + 1 < a.length; k += 2) {
    even += a[k] * b[k];
    odd += a[k + 1] * b[k + 1];
  }
  if (k < a.length) even += a[k] * b[k];
  return even + odd;
}
