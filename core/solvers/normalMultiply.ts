import type { Operator } from './conditionNumber';
import type { ShiftStructure } from './displacement';
import { shiftSumOperator } from './shiftSum';

/**
 * Multiplies by `A + ρ I` without forming it, unknowns input by input: what the shift updates add up to is a block
 * Toeplitz matrix of the first columns and, for each edge, the products of all samples before and after it.
 */
export function normalOperator(
  { inputs, length, columns, edges }: ShiftStructure,
  regularisation: number,
): Operator {
  const toeplitz = columns.map((row, r) =>
    row.map((column, s) => {
      const own = column.slice();
      if (r === s) own[0] += regularisation;
      return own;
    }),
  );
  const late = (rows: readonly Float64Array[]) =>
    rows.map((row) => {
      const moved = new Float64Array(length);
      moved.set(row, 1);
      return moved;
    });
  return shiftSumOperator({
    inputs,
    length,
    toeplitz,
    plus: edges.map(({ before }) => late(before)),
    minus: edges.map(({ after }) => late(after)),
  });
}
