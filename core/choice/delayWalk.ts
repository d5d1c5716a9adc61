import type { Layout } from './blockSums';
import type { Generators } from './generators';
import { rowProducts } from './rowProducts';

/** How the taps of each delay from the smallest to the largest, candidates or not, follow from those of the one before. */
export interface DelayWalk {
  /** Columns g of the generators over the taps of the length and one more, the first K·(length + 1) values. */
  columns: readonly Float64Array[];
  /** `[step][j]`: w of a step is that of the one before, moved on by a tap, and `Σ_j shares[step][j] g_j`; none of step 0. */
  shares: readonly Float64Array[];
  /** w of each step, the first K·length values. */
  taps: readonly Float64Array[];
  /** Steps of the candidates. */
  candidates: readonly number[];
}

/** Overwritten by those of the next length. */
interface Walked {
  /** w of each candidate. */
  taps: readonly Float64Array[];
  walk: DelayWalk;
  inverseTrace: number;
}

/**
 * From one delay to the next the right-hand side moves on by a tap, is mended at the edges and gets a new first element.
 * With `R⁻¹ - S R⁻¹ Sᵀ = -Σ_j v_j g_j g_jᵀ` (S the shift by a tap, v_j the weights) the taps do so with what the columns
 * hold in the rows of Θ and with `g_jᵀ` times the first right-hand side, moved on.
 * Error grows by about 1e-16 of the largest tap with each delay.
 * @param entry right-hand side of the smallest delay
 * @param edges of the sums
 * @returns what makes the fits of a length of the generators after its steps and of the taps for the smallest delay
 */
export function newWalker(
  { inputs, delays }: Layout,
  entry: Float64Array,
  edges: number,
): (generators: Generators, length: number, first: Float64Array) => Walked {
  const steps = delays[delays.length - 1] - delays[0] + 1;
  const partners = 2 * (inputs + edges);
  const grid = (rows: number, across: number) => Array.from({ length: rows }, () => new Float64Array(across));
  const columns = grid(Math.max(4, partners), entry.length + inputs);
  const moved = movedOn(entry, inputs, steps);
  // A step more, since two are taken at a time, and a tap more in front, which is zero.
  const room = steps + 1;
  const shares = grid(room, columns.length);
  const rows = grid(room, inputs + entry.length);
  const all = rows.map((row) => row.subarray(inputs));
  const candidates = delays.map((delay) => delay - delays[0]);
  const walk: DelayWalk = { columns, shares, taps: all.slice(0, steps), candidates };
  const taps = candidates.map((step) => all[step]);
  return (generators, length, first) => {
    const unknowns = inputs * length;
    const inverseTrace = readColumns(generators, unknowns, columns);
    rowProducts(columns, moved, unknowns + inputs, shares);
    finishShares(generators, shares);
    all[0].set(first.subarray(0, unknowns));
    for (let s = 1; s < steps; s += 2) {
      for (let now = s; now < s + 2; now++) {
        all[now].fill(0, 0, unknowns);
        for (let j = 4; j < partners; j += 2) addTwo(all[now], columns, shares[now], j, unknowns);
      }
      addFourColumns(rows, columns, shares, s, inputs, unknowns);
    }
    return { taps, walk, inverseTrace };
  };
}

/** The right-hand side without its first tap, moved on by 0, 1, … `steps - 1` taps: views of one row. */
function movedOn(entry: Float64Array, inputs: number, steps: number): Float64Array[] {
  const padded = new Float64Array(inputs * (steps + 1) + entry.length);
  padded.set(entry.subarray(inputs), inputs * (steps + 1));
  return Array.from({ length: steps }, (_, s) => padded.subarray(inputs * (steps - s)));
}

/**
 * Copies the rows of I, those of the pivots moved on.
 * @returns the trace of R⁻¹, whose diagonal each tap continues by `-Σ_j v_j g_j²`
 */
function readColumns(
  { inputs, size, steps, width, values, weights }: Generators,
  unknowns: number,
  columns: readonly Float64Array[],
): number {
  let trace = 0;
  columns.forEach((column, j) => {
    const late = j < inputs ? inputs : 0;
    let sum = 0;
    for (let k = late, t = (size + steps) * width + j; k < unknowns + late; k++, t += width) {
      column[k] = values[t];
      if (k < unknowns) sum += Math.ceil((unknowns - k) / inputs) * values[t] * values[t];
    }
    column.fill(0, unknowns + late, unknowns + inputs);
    trace -= weights[j] * sum;
  });
  return trace;
}

/** From products with the right-hand sides. */
function finishShares(
  { inputs, size, steps, width, values, weights }: Generators,
  shares: readonly Float64Array[],
): void {
  for (let s = 1; s < steps; s++) {
    for (let j = 0; j < shares[s].length; j++) {
      const row = size + s - (j < inputs ? 1 : 0);
      shares[s][j] = -weights[j] * (shares[s][j] + values[row * width + j]);
    }
  }
}

/** `w += shares[j] columns[j] + shares[j + 1] columns[j + 1]`. */
function addTwo(
  w: Float64Array,
  columns: readonly Float64Array[],
  shares: Float64Array,
  j: number,
  count: number,
): void {
  const first = columns[j];
  const second = columns[j + 1];
  const a = shares[j];
  const b = shares[j + 1];
  for (let k = 0; k < count; k++) w[k] += a * first[k] + b * second[k];
}

/** Adds the first four columns, and the taps of the step before, moved on, to those of two steps. */
function addFourColumns(
  rows: readonly Float64Array[],
  columns: readonly Float64Array[],
  shares: readonly Float64Array[],
  step: number,
  inputs: number,
  count: number,
): void {
  const [a, b, c, d] = columns;
  const [before, first, second] = rows.slice(step - 1, step + 2);
  const [a1, b1, c1, d1] = Array.from(shares[step]);
  const [a2, b2, c2, d2] = Array.from(shares[step + 1]);
  for (let k = 0; k < count; k++) {
    const place = k + inputs;
    const e = a[k];
    const f = b[k];
    const g = c[k];
    const h = d[k];
    first[place] += before[k] + (a1 * e + b1 * f + (c1 * g + d1 * h));
    second[place] += first[k] + (a2 * e + b2 * f + (c2 * g + d2 * h));
  }
}
