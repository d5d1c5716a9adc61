import { factorCholesky } from '../solvers/cholesky';
import { type ShiftStructure, shiftStructure } from '../solvers/displacement';
import type { JointSums, Layout } from './blockSums';
import { type Columns, fused } from './eliminateRow';
import { crossSums, inputSums } from './jointParts';

/**
 * Columns by which `T = [R; Θ; I]` is known, R the matrix to be solved with, row s of Θ the right-hand side of the s-th
 * delay: with F moving the rows of R and I on by a tap (K places) and those of Θ by a delay,
 * `T - F T Fᵀ = Σ_j plus_j plus_jᵀ - Σ_j minus_j minus_jᵀ` (the rows of R on the right). Rows: n = K·M of R; each delay
 * on the first of K places, so that one shift does for all; n of I.
 */
export interface Generators {
  inputs: number;
  /** n */
  size: number;
  /** Delays from the smallest to the largest, whether candidates or not. */
  steps: number;
  plus: Columns;
  minus: Columns;
  /** Diagonal of the first K rows of R: what pivots are judged against. */
  diagonal: Float64Array;
}

/** Where the parts of a column begin. */
interface Rows {
  inputs: number;
  size: number;
  steps: number;
  unit: number;
  total: number;
}

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
  const unit = size + steps * inputs;
  const rows = { inputs, size, steps, unit, total: unit + size };
  const structure = shiftStructure(inputSums(sums, layout), new Array(inputs).fill(1));
  const columns = firstColumns(sums, structure, rows);
  const share = 1 / Math.sqrt(sums.count);
  const side = (own: readonly Float64Array[], samples: readonly Float64Array[]) =>
    edgeColumn(own, samples[inputs], share, rows);
  const edges = structure.edges.map(({ before, after }, e) => ({
    before: side(before, sums.edges[e].before),
    after: side(after, sums.edges[e].after),
  }));
  const [entry] = crossSums(sums, { ...layout, delays: [delays[0]] });

  return (regularisation) => {
    const reduced = reduceColumns(columns, regularisation, rows);
    if (reduced === null) return null;
    const plus = reduced.columns;
    const minus = plus.map((column) => column.slice().fill(0, 0, inputs));
    for (const { before, after } of edges) {
      plus.push(before.slice());
      minus.push(after.slice());
    }
    // The smallest delay is made of no other: it comes in by a pair of its own that leaves R as it is.
    for (const [side, sign] of [
      [plus, 1],
      [minus, -1],
    ] as const) {
      const column = new Float64Array(rows.total);
      for (let i = inputs; i < size; i++) column[i] = entry[i] / sums.count;
      column[size] = 0.5 * sign;
      side.push(column);
    }
    // The last of the inputs' columns must find enough others beside it.
    while (plus.length < inputs - 1 + fused) {
      plus.push(new Float64Array(rows.total));
      minus.push(new Float64Array(rows.total));
    }
    const still = (list: Float64Array[]) => ({ rows: list, shifts: new Int32Array(list.length) });
    return { inputs, size, steps, plus: still(plus), minus: still(minus), diagonal: reduced.diagonal };
  };
}

/** The first K columns of [R; Θ; I]. */
function firstColumns(sums: JointSums, structure: ShiftStructure, rows: Rows): Float64Array[] {
  const { inputs, size, steps, unit, total } = rows;
  return Array.from({ length: inputs }, (_, s) => {
    const column = new Float64Array(total);
    for (let i = 0; i < size; i++) column[i] = structure.columns[i % inputs][s][Math.floor(i / inputs)];
    for (let step = 0; step < steps; step++) {
      column[size + step * inputs] = sums.correlations[inputs][s][step] / sums.count;
    }
    column[unit + s] = 1;
    return column;
  });
}

/** The samples at one edge, tap by tap and delay by delay, each one late: shift updates begin with the second. */
function edgeColumn(
  own: readonly Float64Array[],
  desired: Float64Array,
  share: number,
  { inputs, size, steps, total }: Rows,
): Float64Array {
  const column = new Float64Array(total);
  own.forEach((row, r) => {
    for (let k = 0; k < row.length; k++) column[(k + 1) * inputs + r] = row[k];
  });
  for (let step = 1; step < steps; step++) column[size + step * inputs] = desired[step - 1] * share;
  return column;
}

/** The regularised first columns times G⁻ᵀ, G the factor of their first block. */
function reduceColumns(columns: readonly Float64Array[], regularisation: number, { inputs, total }: Rows) {
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
      for (let t = 0; t < total; t++) column[t] -= part * reduced[j][t];
    }
    for (let t = 0; t < total; t++) column[t] /= factor[s * inputs + s];
    // What the factor makes zero.
    column.fill(0, 0, s);
    reduced.push(column);
  });
  return { columns: reduced, diagonal };
}
