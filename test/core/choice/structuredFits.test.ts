import { describe, expect, it } from 'vitest';
import { gatherStatistics, type JointSums, type Layout } from '../../../core/choice/blockSums';
import { denseFitter } from '../../../core/choice/denseFits';
import { eliminateRow, eliminateTwoRows, takesTwo } from '../../../core/choice/eliminateRow';
import { fitEnergies } from '../../../core/choice/fitEnergies';
import type { Part } from '../../../core/choice/folds';
import { newGenerators } from '../../../core/choice/generators';
import { crossSums, inputSums } from '../../../core/choice/jointParts';
import { outputEnergy } from '../../../core/choice/outputEnergy';
import { structuredFitter } from '../../../core/choice/structuredFits';
import { measureMoments } from '../../../core/pair/moments';
import { pace, takeOf } from '../../support/takes';
import { pathTake } from './refilter';

// Against the dense method, which factors the matrix itself, and against the energy of each filter by itself.

interface Case {
  inputs: number;
  lengths: number[];
  delays: number[];
  /** Stretches of training samples: each has an edge. */
  stretches: [number, number][];
}

const whole: [number, number] = [300, 2000];
const apart: [number, number][] = [
  [300, 900],
  [1200, 2000],
];
const three: [number, number][] = [...apart, [2100, 2400]];
const cases: [string, Case][] = [
  [
    'one input and edge',
    { inputs: 1, lengths: [2, 3, 8, 31, 64], delays: [-2, -1, 0, 1, 2], stretches: [whole] },
  ],
  ['delays apart', { inputs: 1, lengths: [5, 40], delays: [-6, 0, 4], stretches: [whole] }],
  ['delays far apart', { inputs: 1, lengths: [5, 40], delays: [-20, 20], stretches: [whole] }],
  ['one delay', { inputs: 1, lengths: [30], delays: [1], stretches: [whole] }],
  ['two edges', { inputs: 1, lengths: [1, 17, 50], delays: [0, 1, 2, 3], stretches: apart }],
  ['three edges', { inputs: 1, lengths: [9, 64], delays: [0, 1], stretches: three }],
  ['two inputs', { inputs: 2, lengths: [1, 16, 25], delays: [-1, 0, 1], stretches: [whole] }],
  ['three inputs and two edges', { inputs: 3, lengths: [4, 20], delays: [0, 2, 3], stretches: apart }],
];

async function sumsOf({ inputs, lengths, delays, stretches }: Case) {
  const signals = Array.from({ length: inputs }, (_, r) => pathTake(40 + r, 3000, 0.1));
  const take = takeOf(
    signals.map(([x]) => x),
    signals[0][1].map((_, n) => signals.reduce((sum, [, d]) => sum + d[n], 0)),
  );
  const layout: Layout = { inputs, length: lengths[lengths.length - 1], delays };
  const part = (from: number, to: number): Part => ({ take: 0, intervals: [{ from, to }] });
  const training: Part[] = [{ take: 0, intervals: stretches.map(([from, to]) => ({ from, to })) }];
  const block = part(2500, 2900);
  const cuts = { all: [...training, block], folds: [{ training, blocks: [block] }] };
  const moments = await measureMoments([take], true, pace);
  const { folds } = await gatherStatistics([take], cuts, layout, moments, pace);
  return { layout, training: folds[0].training, block: folds[0].blocks[0] };
}

/** Largest difference over the largest value. */
function gap(a: ArrayLike<number>, b: ArrayLike<number>): number {
  let difference = 0;
  let largest = 0;
  for (let k = 0; k < a.length; k++) {
    difference = Math.max(difference, Math.abs(a[k] - b[k]));
    largest = Math.max(largest, Math.abs(b[k]));
  }
  return difference / largest;
}

describe.each(cases)('fits by generators: %s', (_, given) => {
  it('have the taps and the trace of the dense method, at one regularisation after the other', async () => {
    const { layout, training } = await sumsOf(given);
    expect(training.edges.length).toBe(given.stretches.length);
    const [structured, dense] = [structuredFitter(training, layout), denseFitter(training, layout)];
    for (const regularisation of [1e-6, 1e-1]) {
      // What a fitter gives is overwritten by the next length: both go on together.
      const others = dense(regularisation, given.lengths)[Symbol.iterator]();
      let seen = 0;
      for (const { place, taps, inverseTrace } of structured(regularisation, given.lengths)) {
        const other = others.next().value;
        const unknowns = given.lengths[place] * given.inputs;
        expect(place).toBe(seen++);
        expect(inverseTrace / other.inverseTrace).toBeCloseTo(1, 10);
        expect(taps.length).toBe(given.delays.length);
        for (const [d, row] of taps.entries()) {
          expect(gap(row.subarray(0, unknowns), other.taps[d].subarray(0, unknowns))).toBeLessThan(1e-10);
        }
      }
      expect(seen).toBe(given.lengths.length);
    }
  });

  it('have the output energies of each by itself', async () => {
    const { layout, training, block } = await sumsOf(given);
    const sums = inputSums(block, layout);
    const [energiesOf, each] = [fitEnergies(sums), outputEnergy(sums)];
    for (const regularisation of [1e-6, 1e-1]) {
      for (const fits of structuredFitter(training, layout)(regularisation, given.lengths)) {
        const energies = new Float64Array(given.delays.length);
        const expected = new Float64Array(given.delays.length);
        energiesOf(fits, energies);
        each(fits.taps, fits.length, expected);
        expect(gap(energies, expected)).toBeLessThan(1e-12);
      }
    }
  });
});

describe('elimination', () => {
  it.each([
    ['two steps at a time', [whole]],
    ['one step at a time', apart],
  ])(
    'is the same to the last digit whatever power of two is between a column and its weight, %s',
    async (_, stretches) => {
      const { layout, training } = await sumsOf({ inputs: 1, lengths: [33], delays: [0, 1], stretches });
      const [entry] = crossSums(training, layout);
      const finish = (power: number) => {
        const generators = generatorsOf(training, layout);
        const { values, weights, width, inputs } = generators;
        for (let column = inputs; column < width; column++) {
          for (let t = column; t < values.length; t += width) values[t] *= power;
          weights[column] /= power * power;
        }
        const first = { p: entry.slice(), w: new Float64Array(33), row: new Float64Array(33) };
        const two = takesTwo(generators);
        expect(two).toBe(stretches.length === 1);
        for (let step = 0; step < 33; step += two && step > 0 ? 2 : 1) {
          const done = two && step > 0 ? eliminateTwoRows : eliminateRow;
          expect(done(generators, step, 1e-14, first)).toBe(true);
        }
        return { w: first.w, least: Math.min(...weights.map(Math.abs)) };
      };
      const plain = finish(1);
      const scaled = finish(2 ** 170);
      expect(scaled.w).toEqual(plain.w);
      expect(scaled.least).toBeGreaterThan(1e-100);
    },
  );
});

function generatorsOf(training: JointSums, layout: Layout) {
  const generators = newGenerators(training, layout)(1e-3);
  if (generators === null) throw new Error('not positive definite');
  return generators;
}
