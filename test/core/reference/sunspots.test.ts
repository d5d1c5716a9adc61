import { describe, expect, it } from 'vitest';
import { expectPrinted } from '../../support/printed';
import { solveTakes, takeOf, tapsOf } from '../../support/takes';

// Annual sunspot numbers 1770-1869 (Wolfer numbers; Box & Jenkins, Time Series Analysis, series E; data from memory,
// their mean of 46.93 agrees with the printed 46.9).
const sunspots = Float64Array.from(
  `101 82 66 35 31 7 20 92 154 125 85 68 38 23 10 24 83 132 131 118 90 67 60 47 41 21 16 6 4 7 14 34 45 43 48 42 28 10
  8 2 0 1 5 12 14 35 46 41 30 24 16 7 4 2 8 17 36 50 62 67 71 48 28 8 13 57 122 138 103 86 63 37 24 11 15 40 62 98 124
  96 66 64 54 39 21 7 4 23 55 94 96 77 59 44 47 30 16 7 37 74`.split(/\s+/),
  Number,
);

const predict = (length: number, windowing: 'covariance' | 'autocorrelation') =>
  tapsOf([takeOf([sunspots], sunspots)], { length, delay: -1, windowing }, 0, true);

describe('sunspot numbers (Box & Jenkins, series E)', () => {
  it('has a hundred values with the printed mean', () => {
    expect(sunspots.length).toBe(100);
    expect(sunspots.reduce((sum, value) => sum + value, 0) / 100).toBeCloseTo(46.93, 10);
  });

  it('has the printed autocorrelations', async () => {
    const { sums } = await solveTakes(
      [takeOf([sunspots], sunspots)],
      { length: 4, delay: -1, windowing: 'autocorrelation' },
      0,
      true,
    );
    const r = sums.correlations[0][0];
    expectPrinted(r[1] / r[0], 0.8062, 4);
    expectPrinted(r[2] / r[0], 0.4281, 4);
    expectPrinted(r[3] / r[0], 0.0696, 4);
  });

  it.each([
    // Printed Yule-Walker estimates: 1.32, -0.63.
    [2, 'autocorrelation', [1.3175, -0.6341], 4],
    // Least squares, recomputed with SciPy; the printed maximum-likelihood estimates are 1.42, -0.73.
    [2, 'covariance', [1.40457, -0.71134], 5],
    [3, 'autocorrelation', [1.36853, -0.74015, 0.08047], 5],
    [3, 'covariance', [1.55201, -1.00688, 0.20756], 5],
  ] as const)('predicts one step with %i taps, %s windowing', async (length, windowing, taps, digits) => {
    const [w] = await predict(length, windowing);
    taps.forEach((tap, k) => {
      expectPrinted(w[k], tap, digits);
    });
  });
});
