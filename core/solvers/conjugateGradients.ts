import type { Operator } from './conditionNumber';

/**
 * Solves `R w = b`, R symmetric positive definite, by preconditioned conjugate gradients (Hestenes & Stiefel 1952;
 * Golub & Van Loan, *Matrix Computations*, ch. 11, from memory). As many steps as the preconditioned matrix has clusters
 * of eigenvalues, and then a few for each digit.
 * @param precondition symmetric positive definite, close to R⁻¹
 * @param tolerance residual to reach, as a share of b
 * @param most steps taken at most
 * @returns the last approximation, the steps taken, and whether it reached the tolerance
 */
export function conjugateGradients(
  multiply: Operator,
  precondition: Operator,
  b: Float64Array,
  tolerance: number,
  most: number,
): { solution: Float64Array; steps: number; reached: boolean } {
  const size = b.length;
  const solution = new Float64Array(size);
  const residual = b.slice();
  const direction = new Float64Array(size);
  const moved = new Float64Array(size);
  const conditioned = new Float64Array(size);
  const target = tolerance * tolerance * inner(b, b);
  let left = inner(residual, residual);
  let measure = 0;
  for (let step = 0; left > target; step++) {
    if (step === most) return { solution, steps: step, reached: false };
    const next = precondition(residual, conditioned);
    const nextMeasure = inner(residual, next);
    const share = step === 0 ? 0 : nextMeasure / measure;
    for (let k = 0; k < size; k++) direction[k] = next[k] + share * direction[k];
    measure = nextMeasure;
    const product = multiply(direction, moved);
    left = advance(solution, residual, direction, product, measure / inner(direction, product));
    // Neither above nor below the target: the preconditioner was none.
    if (Number.isNaN(left)) return { solution, steps: step + 1, reached: false };
  }
  return { solution, steps: 0, reached: true };
}

/** Goes `width` along the direction; returns the square of the residual's norm. */
function advance(
  solution: Float64Array,
  residual: Float64Array,
  direction: Float64Array,
  product: Float64Array,
  width: number,
): number {
  let sum = 0;
  for (let k = 0; k < solution.length; k++) {
    solution[k] += width * direction[k];
    const rest = residual[k] - width * product[k];
    residual[k] = rest;
    sum += rest * rest;
  }
  return sum;
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
