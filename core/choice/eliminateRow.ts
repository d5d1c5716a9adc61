import type { Generators } from './generators';
import { sweep } from './sweeps';
import { sweepInverseTwice, sweepTwice } from './sweepTwice';
import { findTurns, liftWeights } from './turns';

/** The fit for one right-hand side, `w = Σ u uᵀ p` over the rows u of L⁻¹ so far. */
export interface FirstFit {
  p: Float64Array;
  w: Float64Array;
  /** Room for a row. */
  row: Float64Array;
}

/**
 * One step of the generalised Schur algorithm: moves the pivot on and turns it against its partners, so that in row
 * `step` only the pivot is left. What the shifts leave at the end of a part is lost. Nothing is to be done in the first K
 * rows. What the pivot holds in the rows of I then is added to the fit.
 * @param tolerance what the pivot's square must exceed, relative to the diagonal
 * @returns false where it does not: the matrix is not positive definite
 */
export function eliminateRow(
  generators: Generators,
  step: number,
  tolerance: number,
  { p, w }: FirstFit,
): boolean {
  const { inputs, size, steps, width, values, weights, diagonal, turns } = generators;
  const pivot = step % inputs;
  const unit = size + steps;
  // Rows of I from there on are zero in every column.
  const count = step - pivot + inputs;
  if (step >= inputs) {
    liftWeights(generators);
    const leading = values[(step - inputs) * width + pivot];
    const row = step * width + inputs;
    const turned = findTurns(generators, pivot, leading, row, tolerance * diagonal[pivot], turns[0]);
    if (Number.isNaN(turned)) return false;
    sweep(generators, pivot, turns[0], 0, step + 1, size, inputs);
    values[step * width + pivot] = turned;
    sweep(generators, pivot, turns[0], size, size, unit, 1);
    sweep(generators, pivot, turns[0], unit, unit, unit + count, inputs);
  }
  const first = unit * width + pivot;
  let product = 0;
  for (let k = 0, t = first; k < count; k++, t += width) product += values[t] * p[k];
  product *= weights[pivot];
  for (let k = 0, t = first; k < count; k++, t += width) w[k] += product * values[t];
  return true;
}

/** Whether {@link eliminateTwoRows} does for these. */
export function takesTwo({ inputs, raising }: Generators): boolean {
  return inputs === 1 && raising === 1;
}

/** The same for two steps from the second on in one pass over the rows, for one input and one edge. */
export function eliminateTwoRows(
  generators: Generators,
  step: number,
  tolerance: number,
  { p, w, row: kept }: FirstFit,
): boolean {
  const { size, steps, width, values, weights, diagonal } = generators;
  const [first, second] = generators.turns;
  const least = tolerance * diagonal[0];
  liftWeights(generators);
  const row = step * width;
  const between = findTurns(generators, 0, values[row - width], row + 1, least, first);
  if (Number.isNaN(between)) return false;
  const weight = weights[0];
  // The partners in the next row after the first step, in the place of this row, which is of no more use.
  const x = values[row];
  values.copyWithin(row + 1, row + width + 1, row + 2 * width);
  second.fill(0);
  sweepTwice(values, first, second, step, step + 1, x, 0);
  if (Number.isNaN(findTurns(generators, 0, between, row + 1, least, second))) return false;
  const unit = size + steps;
  sweepTwice(values, first, second, step + 1, size, x, between);
  sweepTwice(values, first, second, size, unit, 0, 0);
  sweepInverseTwice(values, first, second, unit, step + 2, weight, weights[0], p, w, kept);
  return true;
}
