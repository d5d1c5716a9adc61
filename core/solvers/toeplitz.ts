import { sizeFor } from '../statistics/transform';
import type { Operator } from './conditionNumber';
import { shiftSumOperator } from './shiftSum';
import { symmetricCirculant } from './symmetricCirculant';

/** `T v` for a symmetric Toeplitz matrix, by complex transforms of the power of two from 2n - 1 on: for refinement. */
export function toeplitzOperator(column: Float64Array): Operator {
  return shiftSumOperator({ inputs: 1, length: column.length, toeplitz: [[column]], plus: [], minus: [] });
}

/** The same by transforms of half that size: half the time, 1.4 times the rounding. */
export function quickToeplitzOperator(column: Float64Array): Operator {
  const n = column.length;
  const circle = new Float64Array(sizeFor(2 * n - 1, 8));
  circle.set(column);
  for (let k = 1; k < n; k++) circle[circle.length - k] = column[k];
  return symmetricCirculant(circle, n);
}
