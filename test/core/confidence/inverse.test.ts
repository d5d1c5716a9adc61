import { inverse, Matrix } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { inverseOf } from '../../../core/confidence/inverse';
import { foldSystem, newFold } from '../../../core/solvers/fold';
import { elementsOf, type NormalSystem } from '../../../core/solvers/normalSystem';
import type { FilterShape } from '../../../core/statistics/gatherSums';
import { normals } from '../../support/random';
import { convolve, solveTakes, takeOf } from '../../support/takes';

const samples = 3000;
const x = [convolve(normals(1, samples), [1, 0.9, 0.5]), normals(2, samples)];
const regularisation = 1e-3;

async function systemOf(inputs: number, shape: FilterShape): Promise<NormalSystem> {
  const fit = [
    { from: 0, to: 1000 },
    { from: 1200, to: 2900 },
  ];
  const take = takeOf(x.slice(0, inputs), x[0], { fit });
  return (await solveTakes([take], shape, regularisation)).system;
}

describe('the inverse of a normal matrix', () => {
  it.each([
    ['two inputs, shift structure', 2, { length: 80, delay: -1, windowing: 'covariance' }, false],
    ['Toeplitz', 1, { length: 150, delay: -1, windowing: 'autocorrelation' }, false],
    ['small', 2, { length: 9, delay: -1, windowing: 'covariance' }, false],
    ['without structure', 1, { length: 300, delay: -1, windowing: 'covariance' }, true],
  ] as [string, number, FilterShape, boolean][])(
    '%s: rows and products are those of the dense one (ml-matrix)',
    async (_, inputs, shape, folded) => {
      const whole = await systemOf(inputs, shape);
      const system = folded ? foldSystem(whole, inputs, newFold(shape.length, 'even')) : whole;
      const { size } = system;
      const element = elementsOf(system, regularisation);
      const dense = Matrix.zeros(size, size);
      for (let i = 0; i < size; i++) {
        for (let j = 0; j < size; j++) dense.set(i, j, element(Math.max(i, j), Math.min(i, j)));
      }
      const expected = inverse(dense);
      const largest = expected.max();
      const got = inverseOf(system, regularisation);
      if (got === null) throw new Error('no inverse');
      const seen = new Set<number>();
      for (const { unknown, row } of got.rows()) {
        seen.add(unknown);
        let gap = 0;
        row.forEach((value, j) => {
          gap = Math.max(gap, Math.abs(value - expected.get(unknown, j)));
        });
        expect(gap).toBeLessThan(1e-10 * largest);
      }
      expect(seen.size).toBe(size);
      const v = normals(5, size);
      const product = expected.mmul(Matrix.columnVector(v)).to1DArray();
      got.apply(v).forEach((value, i) => {
        expect(Math.abs(value - product[i])).toBeLessThan(1e-9 * largest);
      });
    },
  );

  it('is null where there is none', async () => {
    const zero: NormalSystem = {
      size: 2,
      right: new Float64Array(2),
      scale: Float64Array.of(1, 1),
      matrix: { dense: new Float64Array(4) },
    };
    expect(inverseOf(zero, 0)).toBeNull();
  });
});
