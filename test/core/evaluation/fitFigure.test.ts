import { describe, expect, it } from 'vitest';
import type { Windowing } from '../../../core/document/pairingDocument';
import { fitFigure, fitFigureFromSums } from '../../../core/evaluation/fitFigure';
import { quadraticForm } from '../../../core/solvers/quadraticForm';
import { normals } from '../../support/random';
import { pace, solveTakes, takeOf } from '../../support/takes';

/** A path of two inputs with so much noise, and an offset. */
function takeWith(noise: number) {
  const x = [normals(1, 3000), normals(2, 3000).map((v) => 100 * v + 7)];
  const v = normals(3, 3000);
  const d = v.map((e, n) => noise * e + (x[0][n - 2] ?? 0) + 0.01 * (x[1][n] ?? 0));
  return takeOf(x, d, {
    fit: [
      { from: 100, to: 1500 },
      { from: 1700, to: 2900 },
    ],
  });
}

describe('the fit error from the statistics', () => {
  it.each([
    ['covariance', 1, 1e-12],
    ['covariance', 1e-3, 1e-8],
    ['autocorrelation', 0.1, 1e-11],
  ] as [Windowing, number, number][])(
    'is that of filtering again: %s, noise %f',
    async (windowing, noise, tolerance) => {
      const take = takeWith(noise);
      for (const length of [5, 200]) {
        const { moments, sums, system, solution } = await solveTakes(
          [take],
          { length, delay: 1, windowing },
          1e-9,
          true,
        );
        if ('smallestRegularisation' in solution) throw new Error('not solved');
        const filter = { coefficients: solution.coefficients, delay: 1, means: moments.means };
        const again = await fitFigure([take], windowing, filter, pace);
        const told = fitFigureFromSums(sums, filter, quadraticForm(system, filter.coefficients));
        expect(told?.samples).toBe(again.samples);
        expect(Math.abs((told?.mse ?? 0) / again.mse - 1)).toBeLessThan(tolerance);
        expect(told?.nmseDb).toBeCloseTo(again.nmseDb, 6);
      }
    },
  );

  it('is withheld where it has lost its digits', async () => {
    const take = takeWith(1e-5);
    const { moments, sums, system, solution } = await solveTakes(
      [take],
      { length: 5, delay: 1, windowing: 'covariance' },
      0,
      false,
    );
    if ('smallestRegularisation' in solution) throw new Error('not solved');
    const filter = { coefficients: solution.coefficients, delay: 1, means: moments.means };
    expect(fitFigureFromSums(sums, filter, quadraticForm(system, filter.coefficients))).toBeNull();
  });
});
