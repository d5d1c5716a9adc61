import { execFileSync } from 'node:child_process';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { gatherStatistics } from '../../../core/choice/blockSums';
import { cutFolds } from '../../../core/choice/folds';
import { search } from '../../../core/choice/search';
import { measureMoments } from '../../../core/pair/moments';
import { needs, python } from '../../support/programs';
import { normals } from '../../support/random';
import { convolve, pace, takeOf } from '../../support/takes';

// The whole cross-validation by NumPy's lstsq on explicit data matrices (Debian's python3-numpy). 24 and 20 taps go
// through the dense method, 130 and 2 × 70 through the structured one.

const cases = [
  { inputs: 1, lengths: [1, 24], delays: [-4, 0, 2], noise: 0.03 },
  { inputs: 2, lengths: [3, 20], delays: [-1, 6], noise: 0.03 },
  { inputs: 1, lengths: [7, 20, 130], delays: [-8, -3, 1, 2], noise: 0.03 },
  { inputs: 2, lengths: [20, 70], delays: [0, 5], noise: 0.1 },
  { inputs: 1, lengths: [20, 130], delays: [0, 1], noise: 0.001 },
] as const;

const samples = 3600;
const regularisations = [1e-7, 1e-2];
const path = Float64Array.from({ length: 20 }, (_, k) => Math.cos(1.1 * k) * 0.9 ** k);

function signals(inputs: number, noise: number): { xs: Float64Array[]; d: Float64Array } {
  const xs = Array.from({ length: inputs }, (_, r) => {
    const x = normals(20 + r, samples);
    for (let n = 2; n < samples; n++) x[n] += 1.2 * x[n - 1] - 0.7 * x[n - 2];
    return x;
  });
  const white = normals(30, samples);
  const d = white.map((value) => 3 * noise * value);
  for (const x of xs)
    convolve(x, path).forEach((value, n) => {
      d[n] += value;
    });
  return { xs, d };
}

describe.skipIf(!needs('scipy'))('cross-validation against NumPy', () => {
  it.each(cases)('$inputs input(s), lengths $lengths, noise $noise', async (given) => {
    const { xs, d } = signals(given.inputs, given.noise);
    const grid = { lengths: [...given.lengths], delays: [...given.delays], regularisations };
    const take = takeOf(xs, d);
    const length = grid.lengths[grid.lengths.length - 1];
    const folds = cutFolds([take], { length, delays: grid.delays, measured: null });
    const moments = await measureMoments([take], false, pace);
    const layout = { inputs: xs.length, length, delays: grid.delays };
    const statistics = await gatherStatistics([take], folds, layout, moments, pace);
    const found = await search(statistics, layout, grid, { first: 1, pace });

    const pairs = (part: { intervals: { from: number; to: number }[] }) =>
      part.intervals.map(({ from, to }) => [from, to]);
    const everything = { training: folds.all, blocks: [] };
    const asked = {
      inputs: xs.map((x) => Array.from(x)),
      desired: Array.from(d),
      folds: [everything, ...folds.folds].map((fold) => ({
        training: fold.training.flatMap(pairs),
        blocks: fold.blocks.map(pairs),
      })),
      ...grid,
    };
    const options = { input: JSON.stringify(asked), maxBuffer: 1 << 28 };
    const script = join(__dirname, 'crossValidation.py');
    const wanted: { errors: number[][]; fit: number[]; freedom: number }[] = JSON.parse(
      execFileSync(python, [script], options).toString(),
    );

    // The bounds: relative 1e-9 down to an NMSE of -30 dB, 1e-6 at -60 dB.
    const bound = given.noise < 0.01 ? 1e-6 : 1e-9;
    const agree = (got: number, value: number) => expect(Math.abs(got / value - 1)).toBeLessThan(bound);
    let next = 0;
    let block = 0;
    for (const [f, fold] of [everything, ...folds.folds].entries()) {
      for (let l = 0; l < grid.lengths.length; l++) {
        for (let r = 0; r < regularisations.length; r++) {
          const { errors, fit, freedom } = wanted[next++];
          for (let p = 0; p < grid.delays.length; p++) {
            const place = (l * grid.delays.length + p) * regularisations.length + r;
            if (f === 0) agree(found.fit[place] * moments.desiredPower, fit[p]);
            fold.blocks.forEach((_, b) => {
              const own = found.errors[place * found.blocks + block + b];
              agree(own * moments.desiredPower, errors[b][p]);
            });
          }
          if (f === 0) agree(found.freedom[l * regularisations.length + r], freedom);
        }
      }
      block += fold.blocks.length;
    }
    expect(block).toBe(folds.blocks);
    expect(next).toBe(wanted.length);
  });
});
