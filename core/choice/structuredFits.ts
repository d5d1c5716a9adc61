import type { JointSums, Layout } from './blockSums';
import { eliminateRow } from './eliminateRow';
import { type Generators, newGenerators } from './generators';
import type { NestedFitter } from './nestedFits';

/**
 * Fits of all lengths and delays by the generalised Schur algorithm on `[R Θᵀ I; Θ 0 0; I 0 0]` (Kailath & Sayed, *SIAM
 * Review* 37, 1995, from memory). After as many steps as a length has unknowns, what is left in the rows of I and the
 * columns of Θ is minus its taps for every delay, so that no factor is kept and nothing is substituted back.
 *
 * About 5 n² multiply-adds for each column, of which each sign has one for each input, one for each stretch of training
 * samples and one more. Relative error of the taps about 10 to 100 times 1e-16 times the condition number.
 */
export function structuredFitter(sums: JointSums, layout: Layout): NestedFitter {
  const { inputs, length, delays } = layout;
  const size = inputs * length;
  const generatorsAt = newGenerators(sums, layout);
  const tolerance = size * 2.220446049250313e-16;
  return function* (regularisation, lengths) {
    const generators = generatorsAt(regularisation);
    if (generators === null) return;
    const { steps, plus, minus, diagonal } = generators;
    const { shifts } = plus;
    const unit = size + steps * inputs;
    const taps = delays.map(() => new Float64Array(size));
    let inverseTrace = 0;
    let place = 0;
    for (let i = 0; i < size; i++) {
      const pivot = i % inputs;
      // Rows of I from here on are zero in every column.
      const to = unit + i - pivot + inputs;
      const possible = i < inputs || eliminateRow(plus, minus, pivot, i, to, tolerance * diagonal[pivot]);
      if (!possible) return;
      const column = plus.rows[pivot];
      // Its rows of I are row i of the inverse of R's factor.
      for (let t = unit - shifts[pivot]; t < to - shifts[pivot]; t++) inverseTrace += column[t] * column[t];
      // Moving on moves no values: row t stands at t - shift. What leaves a part at its end is lost.
      shifts[pivot] += inputs;
      for (const start of [size, unit]) {
        const moved = start - shifts[pivot];
        column.fill(0, moved, moved + inputs);
      }
      if (i + 1 === lengths[place] * inputs) {
        readTaps(generators, unit, i + 1, delays, taps);
        yield { place, length: lengths[place], taps, inverseTrace };
        place++;
      }
    }
  };
}

/** From one delay to the next the taps move on by one, and the generators add what is new. */
function readTaps(
  { inputs, size, steps, plus, minus }: Generators,
  unit: number,
  order: number,
  delays: readonly number[],
  taps: readonly Float64Array[],
): void {
  const row = new Float64Array(order);
  let next = 0;
  for (let step = 0; step < steps; step++) {
    row.copyWithin(inputs, 0);
    row.fill(0, 0, inputs);
    const delayed = size + step * inputs;
    plus.rows.forEach((x, j) => {
      const y = minus.rows[j];
      const shift = plus.shifts[j];
      const a = x[delayed - shift];
      const b = y[delayed];
      const atX = unit - shift;
      for (let t = 0; t < order; t++) row[t] += b * y[t + unit] - a * x[t + atX];
    });
    if (delays[0] + step === delays[next]) taps[next++].set(row);
  }
}
