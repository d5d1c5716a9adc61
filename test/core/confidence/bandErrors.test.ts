import { describe, expect, it } from 'vitest';
import { residualSums } from '../../../core/confidence/residualSums';
import { tapErrors } from '../../../core/confidence/tapErrors';
import { bandFilter } from '../../../core/pair/bandFilter';
import type { FilterShape } from '../../../core/statistics/gatherSums';
import { estimateOf } from '../../support/estimates';
import { autoregression } from '../../support/random';
import { convolve, pace, takeOf } from '../../support/takes';

const samples = 3000;
const window = 64;

describe('standard errors of a fit weighted to a band', () => {
  it('are the spread of the taps over many noises', async () => {
    const band = bandFilter({ from: 100, to: 300 }, 1000);
    if ('code' in band) throw new Error(band.code);
    const shape: FilterShape = { length: 4, delay: 0, windowing: 'covariance', band };
    const x = autoregression(samples, 1, 0.5);
    const y = convolve(x, [0.1, -0.4, 1, 0.5]);
    const seeds = 150;
    const taps: Float64Array[] = [];
    const predicted = new Float64Array(4);
    for (let seed = 1; seed <= seeds; seed++) {
      const noise = autoregression(samples, 10 + seed, -0.5);
      const takes = [
        takeOf(
          [x],
          y.map((v, n) => v + noise[n]),
        ),
      ];
      const estimate = await estimateOf(takes, shape);
      const sums = await residualSums(takes, 'covariance', estimate.filter, 4 + window, pace);
      const errors = await tapErrors(estimate, sums, window, pace);
      if ('withheld' in errors) throw new Error(errors.withheld);
      taps.push(estimate.filter.coefficients[0]);
      errors.standardErrors[0].forEach((error, k) => {
        predicted[k] += (error * error) / seeds;
      });
    }
    predicted.forEach((variance, k) => {
      const mean = taps.reduce((sum, row) => sum + row[k] / seeds, 0);
      const spread = taps.reduce((sum, row) => sum + (row[k] - mean) ** 2 / (seeds - 1), 0);
      // Four standard deviations of a variance from so many.
      expect(Math.abs(variance / spread - 1)).toBeLessThan(4 * Math.sqrt(2 / (seeds - 1)));
    });
  });
});
