import { type CholeskyFactor, factorCholesky, solveCholesky } from './cholesky';
import { conditionNumber, type Operator } from './conditionNumber';
import { solveLevinson } from './levinson';
import { multiply, type NormalSystem } from './normalSystem';

export type Method = 'levinson' | 'cholesky';

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
  /** The smallest regularisation of the form 1, 2 or 5 times a power of ten that can be solved. */
  smallestRegularisation: number;
}

/** Above this the taps would have lost all but about four of their digits. */
export const largestConditionNumber = 1e12;

/**
 * Solves `(Φ/L + ρ diag(P_r)) w = θ/L`: Levinson's recursion where the matrix is Toeplitz, Cholesky's method
 * otherwise, and one step of iterative refinement. Relative error of the taps about 1e-16 times the condition number.
 * @param inputs K
 * @param regularisation ρ
 */
export function solve(system: NormalSystem, inputs: number, regularisation: number): Solution | Unsolvable {
  const solver = prepare(system, regularisation);
  if ('order' in solver) {
    return {
      order: solver.order,
      conditionNumber: null,
      smallestRegularisation: smallestRegularisation(system, regularisation),
    };
  }
  const condition = conditionOf(system, regularisation, solver.apply);
  if (!(condition <= largestConditionNumber)) {
    return {
      order: null,
      conditionNumber: condition,
      smallestRegularisation: smallestRegularisation(system, regularisation),
    };
  }
  const w = solver.apply(system.right);
  const residual = multiply(system, regularisation, w);
  for (let i = 0; i < system.size; i++) residual[i] = system.right[i] - residual[i];
  const step = solver.apply(residual);
  const taps = w.map((value, i) => (value + step[i]) / system.scale[i]);
  const length = system.size / inputs;
  return {
    coefficients: Array.from({ length: inputs }, (_, r) => taps.slice(r * length, (r + 1) * length)),
    method: solver.method,
    conditionNumber: condition,
    factor: solver.factor,
  };
}

interface Prepared {
  method: Method;
  apply: Operator;
  factor: CholeskyFactor | null;
}

function prepare(system: NormalSystem, regularisation: number): Prepared | { order: number } {
  const { matrix, size } = system;
  if ('toeplitz' in matrix) {
    const column = matrix.toeplitz.slice();
    column[0] += regularisation;
    const { order } = solveLevinson(column, system.right);
    if (order < size) return { order };
    return { method: 'levinson', apply: (b) => solveLevinson(column, b).solution, factor: null };
  }
  const dense = matrix.dense.slice();
  for (let i = 0; i < size; i++) dense[i * size + i] += regularisation;
  const factor = factorCholesky(dense, size);
  if ('order' in factor) return factor;
  return { method: 'cholesky', apply: (b) => solveCholesky(factor, b), factor };
}

function conditionOf(system: NormalSystem, regularisation: number, solveWith: Operator): number {
  return conditionNumber((v) => multiply(system, regularisation, v), solveWith, system.size);
}

function solvable(system: NormalSystem, regularisation: number): boolean {
  const solver = prepare(system, regularisation);
  return !('order' in solver) && conditionOf(system, regularisation, solver.apply) <= largestConditionNumber;
}

/** By halving over the values 1, 2 and 5 times a power of ten, since what a larger one solves no smaller one spoils. */
function smallestRegularisation(system: NormalSystem, tooSmall: number): number {
  const grid: number[] = [];
  for (let power = -16; power <= 2; power++) {
    for (const digit of [1, 2, 5]) grid.push(Number(`${digit}e${power}`));
  }
  let low = grid.findIndex((value) => value > tooSmall) - 1;
  let high = grid.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (solvable(system, grid[middle])) high = middle;
    else low = middle;
  }
  return grid[high];
}
