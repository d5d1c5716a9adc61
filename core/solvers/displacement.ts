import type { Edge, NormalSums } from '../statistics/normalSums';
import { factorCholesky } from './cholesky';

/** The normal matrix made free of units, `A = D⁻¹ (Φ/L) D⁻¹`, by what its shift updates need. */
export interface ShiftStructure {
  /** K */
  inputs: number;
  /** M */
  length: number;
  /** `columns[r][s][k]`: element of row (tap k, input r) and column (tap 0, input s). */
  columns: Float64Array[][];
  edges: Edge[];
}

/**
 * A matrix R by its displacement. Unknowns stand tap by tap (k·K + r), F is the shift by one tap (K places):
 * `R - F R Fᵀ = Σ_j plus_j plus_jᵀ - Σ_j minus_j minus_jᵀ`, with K + E columns of each sign for E edges
 * (Kailath & Sayed, *SIAM Review* 37, 1995, from memory). Each column has 2n rows, n = K·M: below those of R stand those
 * that make it the displacement of `[R I; I 0]`.
 */
export interface Generators {
  inputs: number;
  /** n */
  size: number;
  plus: Float64Array[];
  minus: Float64Array[];
  /** Diagonal of the first K rows of R: what pivots are judged against. */
  diagonal: Float64Array;
}

/** @param powers P_r of each input, all above 0 */
export function shiftStructure(sums: NormalSums, powers: readonly number[]): ShiftStructure {
  const { inputs, length, count } = sums;
  const roots = powers.map(Math.sqrt);
  const columns = sums.correlations.map((blocks, r) =>
    blocks.map((column, s) => column.map((value) => value / (count * roots[r] * roots[s]))),
  );
  // Sums that were gathered by transforms are symmetric to the last digit but one; the matrix is symmetric.
  for (let r = 0; r < inputs; r++) {
    for (let s = r + 1; s < inputs; s++) columns[r][s][0] = columns[s][r][0];
  }
  const share = Math.sqrt(count);
  const free = (rows: readonly Float64Array[]) =>
    rows.map((row, r) => row.map((value) => value / (share * roots[r])));
  const edges = sums.edges.map(({ before, after }) => ({ before: free(before), after: free(after) }));
  return { inputs, length, columns, edges };
}

/**
 * Generators of `R = A + ρ I`: the first K columns of R, less the product of their first block with itself moved down,
 * and the samples at the edges. ρ enters the first block only.
 * @returns the order at which the first block breaks down where it is not positive definite
 */
export function generatorsOf(
  { inputs, length, columns, edges }: ShiftStructure,
  regularisation: number,
): Generators | { order: number } {
  const size = inputs * length;
  const block = new Float64Array(inputs * inputs);
  for (let r = 0; r < inputs; r++) {
    for (let s = 0; s <= r; s++) block[r * inputs + s] = columns[r][s][0];
    block[r * inputs + r] += regularisation;
  }
  const diagonal = Float64Array.from({ length: inputs }, (_, r) => block[r * inputs + r]);
  const factored = factorCholesky(block, inputs);
  if ('order' in factored) return factored;

  const plus: Float64Array[] = firstColumns(columns, factored.factor, inputs, length);
  const minus: Float64Array[] = plus.map((column) => Float64Array.from(column));
  for (const column of minus) column.fill(0, 0, inputs);
  for (const { before, after } of edges) {
    plus.push(edgeColumn(before, size));
    minus.push(edgeColumn(after, size));
  }
  return { inputs, size, plus, minus, diagonal };
}

/** The first K columns of R times G⁻ᵀ, G the factor of their first block; those of the unit matrix below. */
function firstColumns(
  columns: Float64Array[][],
  factor: Float64Array,
  inputs: number,
  length: number,
): Float64Array[] {
  const result: Float64Array[] = Array.from({ length: inputs }, () => new Float64Array(2 * inputs * length));
  for (let s = 0; s < inputs; s++) {
    for (let r = s; r < inputs; r++) result[s][r] = factor[r * inputs + s];
  }
  for (let k = 1; k <= length; k++) {
    for (let r = 0; r < inputs; r++) {
      for (let s = 0; s < inputs; s++) {
        let value = k < length ? columns[r][s][k] : Number(s === r);
        for (let j = 0; j < s; j++) value -= result[j][k * inputs + r] * factor[s * inputs + j];
        result[s][k * inputs + r] = value / factor[s * inputs + s];
      }
    }
  }
  return result;
}

/** The samples of one edge tap by tap, one tap late: the shift updates begin with the second tap. */
function edgeColumn(rows: readonly Float64Array[], size: number): Float64Array {
  const inputs = rows.length;
  const column = new Float64Array(2 * size);
  for (let r = 0; r < inputs; r++) {
    for (let k = 0; k < rows[r].length; k++) column[(k + 1) * inputs + r] = rows[r][k];
  }
  return column;
}
