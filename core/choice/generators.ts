import { factorCholesky } from '../solvers/cholesky';
import { type ShiftStructure, shiftStructure } from '../solvers/displacement';
import type { JointSums, Layout } from './blockSums';
import { inputSums } from './jointParts';
import { loweredAtOnce } from './sweeps';
import type { Turns } from './turns';

/**
 * Columns by which `T = [R; Θ; I]` is known, R the matrix to be solved with: with F moving the rows of R and I on by a
 * tap (K places) and those of Θ by one, `T - F T Fᵀ = Σ_j g_j w_j h_jᵀ` (h the rows of R of g). Row s of Θ is the
 * right-hand side of the s-th delay less that of the smallest moved on by s taps (its first tap not counted): so that
 * the smallest delay, which is made of no other, needs no columns of its own.
 *
 * A row holds all columns side by side: the pivots, one for each input; their partners, one for each edge, of weight
 * above 0, and one for each input and one for each edge, of weight below 0. Rows: n = K·M of R, the delays,
 * n of I.
 */
export interface Generators {
  inputs: number;
  /** Partners of weight above 0. */
  raising: number;
  /** Partners of weight below 0; the last are zero where passes over the rows take more than there are. */
  lowering: number;
  /** n */
  size: number;
  /** Delays from the smallest to the largest, whether candidates or not. */
  steps: number;
  /** Values of a row. */
  width: number;
  values: Float64Array;
  /** One for each column. */
  weights: Float64Array;
  /** Room for the turns of two steps. */
  turns: readonly [Turns, Turns];
  /** Diagonal of the first K rows of R: what pivots are judged against. */
  diagonal: Float64Array;
}

type Rows = Pick<Generators, 'inputs' | 'size' | 'steps'>;

/**
 * What the generators of one set of training samples are made of.
 * @returns the generators at a regularisation; null where the first K rows are not positive definite
 */
export function newGenerators(
  sums: JointSums,
  layout: Layout,
): (regularisation: number) => Generators | null {
  const { inputs, length, delays } = layout;
  const size = inputs * length;
  const steps = delays[delays.length - 1] - delays[0] + 1;
  const rows = { inputs, size, steps };
  const structure = shiftStructure(inputSums(sums, layout), new Array(inputs).fill(1));
  const columns = firstColumns(sums, structure, rows);
  const share = 1 / Math.sqrt(sums.count);
  const side = (key: 'before' | 'after') =>
    structure.edges.map((edge, e) => edgeColumn(edge[key], sums.edges[e][key][inputs], share, rows));
  const [before, after] = [side('before'), side('after')];
  const edges = before.length;
  const partners = inputs + edges;
  const lowering = Math.ceil(partners / loweredAtOnce) * loweredAtOnce;
  const width = partners + lowering;

  return (regularisation) => {
    const reduced = reduceColumns(columns, regularisation, rows);
    if (reduced === null) return null;
    const { diagonal } = reduced;
    const late = reduced.columns.map((column) => column.slice().fill(0, 0, inputs));
    const values = new Float64Array(columns[0].length * width);
    const place = (given: readonly Float64Array[], first: number) =>
      given.forEach((column, j) => {
        for (let t = 0, at = first + j; t < column.length; t++, at += width) values[at] = column[t];
      });
    place([...reduced.columns, ...before], 0);
    place([...late, ...after], partners);
    const weights = new Float64Array(width).fill(1, 0, partners).fill(-1, partners);
    const turns = [new Float64Array(2 * width), new Float64Array(2 * width)] as const;
    return { inputs, raising: edges, lowering, size, steps, width, values, weights, turns, diagonal };
  };
}

/** The first K columns of [R; Θ; I]. */
function firstColumns(
  sums: JointSums,
  structure: ShiftStructure,
  { inputs, size, steps }: Rows,
): Float64Array[] {
  return Array.from({ length: inputs }, (_, s) => {
    const column = new Float64Array(2 * size + steps);
    for (let i = 0; i < size; i++) column[i] = structure.columns[i % inputs][s][Math.floor(i / inputs)];
    for (let step = 0; step < steps; step++) {
      column[size + step] = sums.correlations[inputs][s][step] / sums.count;
    }
    column[size + steps + s] = 1;
    return column;
  });
}

/** The samples at one edge, tap by tap and delay by delay, each one late: shift updates begin with the second. */
function edgeColumn(
  own: readonly Float64Array[],
  desired: Float64Array,
  share: number,
  { inputs, size, steps }: Rows,
): Float64Array {
  const column = new Float64Array(2 * size + steps);
  own.forEach((row, r) => {
    for (let k = 0; k < row.length; k++) column[(k + 1) * inputs + r] = row[k];
  });
  for (let step = 1; step < steps; step++) column[size + step] = desired[step - 1] * share;
  return column;
}

/** The regularised first columns times G⁻ᵀ, G the factor of their first block. */
function reduceColumns(columns: readonly Float64Array[], regularisation: number, { inputs }: Rows) {
  const block = new Float64Array(inputs * inputs);
  for (let r = 0; r < inputs; r++) {
    for (let s = 0; s <= r; s++) block[r * inputs + s] = columns[s][r];
    block[r * inputs + r] += regularisation;
  }
  const diagonal = Float64Array.from({ length: inputs }, (_, r) => block[r * inputs + r]);
  const result = factorCholesky(block, inputs);
  if ('order' in result) return null;
  const { factor } = result;
  const reduced: Float64Array[] = [];
  columns.forEach((given, s) => {
    const column = given.slice();
    column[s] += regularisation;
    for (let j = 0; j < s; j++) {
      const part = factor[s * inputs + j];
      for (let t = 0; t < column.length; t++) column[t] -= part * reduced[j][t];
    }
    for (let t = 0; t < column.length; t++) column[t] /= factor[s * inputs + s];
    // What the factor makes zero.
    column.fill(0, 0, s);
    reduced.push(column);
  });
  return { columns: reduced, diagonal };
}
