import { chiSquareTail } from '../figures/chiSquare';
import type { Operator } from '../solvers/conditionNumber';
import { newHermitianSolver } from '../solvers/hermitian';
import type { Estimate } from './estimate';
import { furtherLags } from './furtherLags';
import type { ResidualSums } from './residualSums';
import type { ScoreCovariance } from './scoreCovariance';

/** What taps at further lags of one input could still explain. */
export interface ExtraLags {
  /** Input, from 0. */
  input: number;
  /** `before` the first tap (input that the filter has not seen yet) or `after` the last. */
  side: 'before' | 'after';
  /** How many were looked at. */
  lags: number;
  /** Probability of so much correlation or more where there is nothing. */
  probability: number;
  /** Share of the residual's power that taps there would take, beyond what chance would; 0 where that is less. */
  share: number;
}

/** Lags looked at on either side: what a filter cuts off or begins too late for shows right beside it. */
export const extraLags = 32;

/** Part of its own power by which each further lag counts as weaker, so that lags which hardly differ promise nothing. */
const guard = 1e-3;

/**
 * For one side of every input: the energy of the cross-correlation of residual and input at the lags beside the filter,
 * what the inputs inside it have of that projected out, against a scaled chi-square law of its mean and variance (Box,
 * *Annals of Mathematical Statistics* 25, 1954, from memory). It holds for coloured inputs and residuals and needs no
 * inverse of what is hardly known. Energy there: the filter is too short, or begins too late.
 * @param score of M + `extraLags` lags
 * @param solve v ↦ A⁻¹ v for the normal matrix of all taps; null where that is too dear, and nothing is projected out
 */
export function testExtraLags(
  estimate: Estimate,
  sums: ResidualSums,
  score: ScoreCovariance,
  side: ExtraLags['side'],
  solve: Operator | null,
): ExtraLags[] {
  const { coefficients } = estimate.filter;
  const length = coefficients[0].length;
  const first = side === 'after' ? length : -extraLags;
  const lags = Array.from({ length: extraLags }, (_, i) => first + i);
  const origin = Math.min(0, first);
  const { correlations, count } = sums.total;
  const power = correlations[coefficients.length][coefficients.length][0] / count;
  return coefficients.map((_, input) => {
    const further = furtherLags(estimate, sums, input, lags, origin, length + extraLags, solve);
    const covariance = new Float64Array(extraLags * extraLags);
    further.influences.forEach((rows, i) => {
      const seen = score.apply(score.spectrum(rows));
      further.influences.forEach((other, j) => {
        const form = other.reduce((sum, row, s) => sum + innerProduct(row, seen[s]), 0);
        covariance[i * extraLags + j] = form / count;
      });
    });
    const probability = energyTail(further.cross, covariance);
    const { gain, chance } = gains(further.products, further.cross, covariance);
    // More than all cannot be taken: an input of next to nothing there, whose sums are rounding, tells nothing.
    if (!(gain <= power)) return { input, side, lags: extraLags, probability: 1, share: 0 };
    // Chance goes by what would be left.
    const share = gain / power - (chance / power) * Math.max(0, 1 - gain / power);
    return { input, side, lags: extraLags, probability, share: Math.max(0, share) };
  });
}

/** Probability that a normal vector of this covariance has the energy of the given one or more. */
function energyTail(vector: Float64Array, covariance: Float64Array): number {
  const size = vector.length;
  let trace = 0;
  let squares = 0;
  for (let i = 0; i < size; i++) trace += covariance[i * size + i];
  for (let at = 0; at < covariance.length; at++) squares += covariance[at] * covariance[at];
  if (!(trace > 0)) return 1;
  return chiSquareTail((innerProduct(vector, vector) * trace) / squares, (trace * trace) / squares);
}

/** `cᵀ C⁻¹ c`, and what it comes to by chance, `trace(C⁻¹ V)`; C a little strengthened. */
function gains(
  products: Float64Array,
  cross: Float64Array,
  covariance: Float64Array,
): { gain: number; chance: number } {
  const size = cross.length;
  const solver = newHermitianSolver(size);
  const solve = (right: Float64Array) => {
    solver.re.set(products);
    solver.im.fill(0);
    for (let i = 0; i < size; i++) solver.re[i * size + i] *= 1 + guard;
    solver.rightRe.set(right);
    solver.rightIm.fill(0);
    return solver.solve().explained;
  };
  let chance = 0;
  for (let j = 0; j < size; j++) {
    solve(covariance.subarray(j * size, (j + 1) * size));
    chance += solver.rightRe[j];
  }
  return { gain: solve(cross), chance };
}

function innerProduct(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i] * b[i];
  return sum;
}
