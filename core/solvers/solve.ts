import type { CholeskyFactor } from './cholesky';
import { largestEigenvalue } from './conditionNumber';
import type { NormalSystem } from './normalSystem';
import { type Limits, type Method, methodFor, prepare, schurIsShort, usualLimits } from './prepare';
import { mostGradientSteps } from './prepareGradients';
import { refine } from './refine';
import { norm } from './vectors';

export type { Method };

export interface Solution {
  /** One row an input, newest-first. */
  coefficients: Float64Array[];
  method: Method;
  /** Of the regularised matrix made free of units (see {@link NormalSystem}). */
  conditionNumber: number;
  /** Lower-triangular factor of that matrix, where the method has one. */
  factor: CholeskyFactor | null;
}

/** A system that cannot be solved as it stands. */
export interface Unsolvable {
  /** Order of the leading part that could be solved, or null where only the condition number is too large. */
  order: number | null;
  conditionNumber: number | null;
  /** Steps after which conjugate gradients were given up, where neither of these is the reason. */
  steps: number | null;
  /** The smallest regularisation of the form 1, 2 or 5 times a power of ten that can be solved. */
  smallestRegularisation: number;
}

/** Above this the taps would have lost all but about four of their digits. */
export const largestConditionNumber = 1e12;

/** Unknowns up to which Cholesky's method is tried where the Schur algorithm fails: a second or two. */
const mostForCholesky = 2048;

/**
 * Residual that refinement must reach, as a share of the largest eigenvalue times the solution: 1e-16 times some
 * hundreds is what products by transforms leave; where the approximate inverse is none it stays near 1.
 */
const largestResidual = 1e-13;

/** Change of four Lanczos steps at which the condition number of a large matrix is known well enough to be shown. */
const settled = 1e-3;

/**
 * Solves `(Φ/L + ρ diag(P_r)) w = θ/L`, with iterative refinement. Where the matrix is Toeplitz by Levinson's recursion
 * algorithm; otherwise by Cholesky's method, which also stands in for the Schur algorithm up to 2,048 unknowns. Above
 * 8,192 unknowns both make room for conjugate gradients, and stand in for them where they do not settle: Levinson's
 * recursion always, the Schur algorithm where it is short.
 * Relative error of the taps about 1e-16 times the condition number.
 * @param inputs K
 * @param regularisation ρ
 */
export function solve(
  system: NormalSystem,
  inputs: number,
  regularisation: number,
  limits: Limits = usualLimits,
): Solution | Unsolvable {
  const first = methodFor(system, limits);
  const found = attemptAll(first, system, regularisation, limits);
  if ('failed' in found) {
    const { order, conditionNumber, steps } = found;
    const smallest = smallestRegularisation(first, system, regularisation, limits);
    return { order, conditionNumber, steps, smallestRegularisation: smallest };
  }
  const { solution, method, conditionNumber, factor } = found;
  const taps = solution.map((value, i) => value / system.scale[i]);
  const length = system.size / inputs;
  return {
    coefficients: Array.from({ length: inputs }, (_, r) => taps.slice(r * length, (r + 1) * length)),
    method,
    conditionNumber,
    factor,
  };
}

function attemptAll(
  method: Method,
  system: NormalSystem,
  regularisation: number,
  limits: Limits,
): Solved | Failed {
  const found = attempt(method, system, regularisation);
  const other = 'failed' in found ? standIn(found.failed, system, limits) : null;
  return other === null ? found : attempt(other, system, regularisation);
}

/** The method that may still solve what another could not. */
function standIn(failed: Failed['failed'], system: NormalSystem, limits: Limits): Method | null {
  if (failed === 'gradients') {
    if ('toeplitz' in system.matrix) return 'levinson';
    return schurIsShort(system, limits) ? 'schur' : null;
  }
  return failed === 'schur' && system.size <= mostForCholesky ? 'cholesky' : null;
}

type Solved = Omit<Solution, 'coefficients'> & { solution: Float64Array };

interface Failed {
  /** The method that failed, or that the matrix is too badly conditioned for any. */
  failed: Method | 'condition';
  order: number | null;
  conditionNumber: number | null;
  steps: number | null;
}

function attempt(method: Method, system: NormalSystem, regularisation: number): Solved | Failed {
  const { size, right } = system;
  const prepared = prepare(method, system, regularisation);
  if ('order' in prepared) {
    return { failed: method, order: prepared.order, conditionNumber: null, steps: null };
  }
  const { multiply, inverse, refinements, factor } = prepared;
  const enough = method === 'cholesky' ? 0 : settled;
  const largest = largestEigenvalue(multiply, size, enough);
  const smallest = prepared.smallestEigenvalue(enough);
  const conditionNumber = smallest > 0 ? largest / smallest : Number.POSITIVE_INFINITY;
  if (!(conditionNumber <= largestConditionNumber)) {
    const failed = method === 'gradients' ? method : 'condition';
    return { failed, order: null, conditionNumber, steps: null };
  }
  const { solution, residual } = refine(multiply, inverse, right, refinements);
  if (method !== 'cholesky' && !(residual <= largestResidual * largest * norm(solution))) {
    const steps = method === 'gradients' ? mostGradientSteps : null;
    return { failed: method, order: null, conditionNumber, steps };
  }
  return { solution, method, conditionNumber, factor };
}

/** By halving over the values 1, 2 and 5 times a power of ten, since what a larger one solves no smaller one spoils. */
function smallestRegularisation(
  method: Method,
  system: NormalSystem,
  tooSmall: number,
  limits: Limits,
): number {
  const grid: number[] = [];
  for (let power = -16; power <= 2; power++) {
    for (const digit of [1, 2, 5]) grid.push(Number(`${digit}e${power}`));
  }
  // Where another method stands in for conjugate gradients they say nothing about what it can solve.
  const last = method === 'gradients' ? (standIn(method, system, limits) ?? method) : method;
  let low = grid.findIndex((value) => value > tooSmall) - 1;
  let high = grid.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ('solution' in attempt(last, system, grid[middle])) high = middle;
    else low = middle;
  }
  return grid[high];
}
