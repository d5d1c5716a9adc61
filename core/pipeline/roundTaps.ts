import { roundErrorAware } from '../numbers/errorAwareRounding';
import type { Scaling } from '../numbers/scaling';
import { powerOfTwo } from '../numbers/words';
import { factorCholesky } from '../solvers/cholesky';
import { elementsOf, type NormalSystem } from '../solvers/normalSystem';
import type { Fit } from './fitPair';

/** Unknowns up to which a factor is computed for the rounding where the solver has none. */
const mostToFactor = 2048;

/**
 * Error-aware rounding of the firmware's coefficients. With `A` the regularised normal matrix made free of units, one
 * step of coefficient i moves the solution by u_i = √P_r · (q_out / q_in,r) · 2^-F, so that the cost matrix is `U A U`.
 * @param scaled coefficients in output counts per input count, one row an input
 * @returns integers, one row an input
 */
export function roundTaps(
  fit: Fit,
  regularisation: number,
  scaled: readonly Float64Array[],
  scaling: Scaling,
  fractionBits: number,
  word: number,
): Float64Array[] {
  const { size, scale } = fit.system;
  const length = size / scaled.length;
  const step = powerOfTwo(fractionBits);
  const units = new Float64Array(size);
  const targets = new Float64Array(size);
  for (let i = 0; i < size; i++) {
    const r = Math.floor(i / length);
    units[i] = (scale[i] * scaling.outputCount) / (scaling.inputCount[r] * step);
    targets[i] = scaled[r][i - r * length] * step;
  }
  const bare = elementsOf(fit.system, regularisation);
  const factor = fit.solution.factor?.factor ?? factorOf(fit.system, bare);
  const cost = {
    size,
    element: (i: number, j: number) => units[i] * units[j] * bare(i, j),
    factor: factor === null ? null : factor.map((value, at) => value * units[Math.floor(at / size)]),
  };
  const values = roundErrorAware(targets, cost, word);
  return scaled.map((_, r) => values.slice(r * length, (r + 1) * length));
}

function factorOf({ size }: NormalSystem, element: (i: number, j: number) => number): Float64Array | null {
  if (size > mostToFactor) return null;
  const dense = new Float64Array(size * size);
  for (let i = 0; i < size; i++) {
    for (let j = 0; j <= i; j++) dense[i * size + j] = element(i, j);
  }
  const factored = factorCholesky(dense, size);
  return 'order' in factored ? null : factored.factor;
}
