import { cosineOfTurns, sineOfTurns } from '../statistics/turns';
import type { Fold } from './fold';
import { inner } from './vectors';

/** Linear conditions on the free taps of one input: `Σ_a columns[j][a] w[a] = values[j]`. */
export interface GainConditions {
  columns: Float64Array[];
  values: number[];
}

/** Columns shorter than this say nothing: the symmetry leaves no gain there whatever the taps. */
const silent = 1e-9;

/**
 * What a gain g at the frequency f asks of the taps: `Σ_k w[k] e^(-j2πfk) = g e^(-j2πfD)`, D being (M-1)/2 for even taps
 * (one real condition) and the filter's delay otherwise (real and imaginary part, or one where both are real).
 * @param turns f over the sample rate, 0 to ½
 * @returns null where the symmetry leaves no gain at this frequency
 */
export function gainConditions(
  fold: Fold,
  turns: number,
  gain: number,
  delay: number,
): GainConditions | null {
  const even = fold.symmetry === 'even';
  const centre = even ? (fold.length - 1) / 2 : delay;
  const parts = [cosineOfTurns, sineOfTurns].map((part) =>
    Float64Array.from({ length: fold.free }, (_, a) =>
      fold.members(a).reduce((sum, { tap, sign }) => sum + sign * part(turns * (tap - centre)), 0),
    ),
  );
  const heard = parts.map((column) => column.some((value) => Math.abs(value) > silent));
  if (!heard[0]) return null;
  return heard[1] && !even ? { columns: parts, values: [gain, 0] } : { columns: [parts[0]], values: [gain] };
}

/**
 * Moves the free taps of all inputs to where they meet the conditions at the least cost: `w - S (CᵀS)⁻¹ (Cᵀw - g)` with
 * `S = A⁻¹ C` (Lagrange multipliers).
 * @param free the minimum without the conditions
 * @param input whose taps the conditions are about
 * @param solveWith `A⁻¹ c` for a column c over the free taps of all inputs, one row an input
 */
export function holdConditions(
  free: readonly Float64Array[],
  input: number,
  { columns, values }: GainConditions,
  solveWith: (column: Float64Array[]) => Float64Array[],
): Float64Array[] {
  const solved = columns.map((column) =>
    solveWith(free.map((row, r) => (r === input ? column : new Float64Array(row.length)))),
  );
  const miss = conditionsOf({ columns, values }, free[input]).map((value, j) => value - values[j]);
  const matrix = columns.map((column) => solved.map((s) => inner(column, s[input])));
  const factors = solveSmall(matrix, miss);
  return free.map((row, r) => row.map((w, a) => factors.reduce((sum, l, j) => sum - l * solved[j][r][a], w)));
}

/** What the taps of the input come to under the conditions: the gain in phase and, where asked for, in quadrature. */
export function conditionsOf({ columns }: GainConditions, taps: Float64Array): number[] {
  return columns.map((column) => inner(column, taps));
}

/** One or two equations with a positive definite matrix. */
function solveSmall(matrix: readonly number[][], right: readonly number[]): number[] {
  if (right.length === 1) return [right[0] / matrix[0][0]];
  const [[a, b], [c, d]] = matrix;
  const determinant = a * d - b * c;
  return [(right[0] * d - b * right[1]) / determinant, (a * right[1] - c * right[0]) / determinant];
}
