import type { Generators } from './generators';

/**
 * The turns of one step, two numbers for each partner of the pivot x in turn: `x ← x + s y`, then `y ← y - m x`, where x
 * is the one before where the partner's weight is above 0 and the one after where it is below.
 */
export type Turns = Float64Array;

/** Weights below this are brought up again, long before they lose digits. */
const least = 1e-100;

/** 2^50 */
const root = 1125899906842624;

/**
 * Finds the turns that leave nothing but the pivot in a row, and what becomes of the weights: rotations free of square
 * roots (Gentleman, *J. Inst. Maths Applics* 12, 1973) where weights are above 0, then hyperbolic ones in the mixed form
 * (Bojanczyk, Brent, van Dooren & de Hoog, *SIAM J. Sci. Stat. Comput.* 8, 1987), both from memory. `w x xᵀ` summed over
 * the columns stays what it is.
 * @param pivot column
 * @param leading the pivot's value in the row
 * @param row place of the partners' first value in the row
 * @param must what the pivot's square, weight included, must exceed
 * @returns the pivot's value after all turns; NaN where its square does not: the matrix is not positive definite
 */
export function findTurns(
  { inputs, raising, lowering, weights, values }: Generators,
  pivot: number,
  leading: number,
  row: number,
  must: number,
  turns: Turns,
): number {
  let x = leading;
  for (let j = 0; j < raising + lowering; j++) {
    const column = inputs + j;
    const y = values[row + j];
    const s = (y / x) * (weights[column] / weights[pivot]);
    const turned = x + s * y;
    if (!(weights[pivot] * x * turned > must)) return Number.NaN;
    turns[2 * j] = s;
    turns[2 * j + 1] = y / (j < raising ? x : turned);
    weights[pivot] *= x / turned;
    weights[column] *= j < raising ? x / turned : turned / x;
    x = turned;
  }
  return x;
}

/** Brings small weights up again, their columns down: exact, and `w y yᵀ` stays what it is. */
export function liftWeights({ inputs, weights, values, width }: Generators): void {
  for (let column = inputs; column < weights.length; column++) {
    if (Math.abs(weights[column]) >= least) continue;
    for (let t = column; t < values.length; t += width) values[t] /= root * root;
    weights[column] *= root * root * (root * root);
  }
}
