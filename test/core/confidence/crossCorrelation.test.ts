import { describe, expect, it } from 'vitest';
import type { FilterShape } from '../../../core/statistics/gatherSums';
import { residualTestsOf } from '../../support/estimates';
import { autoregression, normals } from '../../support/random';
import { convolve, takeOf } from '../../support/takes';

const samples = 2500;
const shape: FilterShape = { length: 20, delay: 0, windowing: 'covariance' };

/** Longer than the filter. */
const path = Array.from({ length: 40 }, (_, k) => Math.cos(0.7 * k) * 0.9 ** k);

describe('cross-correlation of residual and input', () => {
  it.each(['covariance', 'autocorrelation'] as const)('is zero inside the filter: %s', async (windowing) => {
    const x = autoregression(samples, 8, 0.7);
    const noise = normals(9, samples);
    const d = convolve(x, path).map((y, n) => y + noise[n]);
    const fit = [
      { from: 30, to: 1200 },
      { from: 1300, to: 2400 },
    ];
    const take = takeOf([x], d, { fit });
    const tests = await residualTestsOf([take], { ...shape, windowing }, 'identify', 0);
    expect(tests.inputs[0].inside).toBeLessThan(1e-12);
    expect(tests.inputs[0].fromRegularisation).toBe(0);
    const ridge = await residualTestsOf([take], { ...shape, windowing }, 'identify', 0.01);
    expect(ridge.inputs[0].inside).toBeCloseTo(ridge.inputs[0].fromRegularisation, 12);
  });

  it('has 95 % of the lags beyond within its bounds, for coloured signals too', async () => {
    let inside = 0;
    let all = 0;
    for (let seed = 1; seed <= 120; seed++) {
      const x = autoregression(samples, 50 * seed, 0.8);
      const noise = autoregression(samples, 50 * seed + 1, 0.8);
      const d = convolve(x, [1, 0.5]).map((y, n) => y + noise[n]);
      const { inputs } = await residualTestsOf([takeOf([x], d)], { ...shape, length: 4 });
      // The lags next to the filter are smaller, since its taps took part of them: those further off are compared.
      inputs[0].values.forEach((value, i) => {
        const lag = i + inputs[0].from;
        if (lag > -16 && lag < 20) return;
        if (Math.abs(value) <= inputs[0].bound) inside++;
        all++;
      });
    }
    expect(inside / all).toBeGreaterThan(0.92);
    expect(inside / all).toBeLessThan(0.98);
  });
});
