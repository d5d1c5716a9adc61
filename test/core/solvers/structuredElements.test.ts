import { describe, expect, it } from 'vitest';
import { roundErrorAware, roundingCost } from '../../../core/numbers/errorAwareRounding';
import { wordRange } from '../../../core/numbers/words';
import { normalOperator } from '../../../core/solvers/normalMultiply';
import { elementsOf } from '../../../core/solvers/normalSystem';
import {
  nearElements,
  structuredDiagonal,
  structuredElements,
} from '../../../core/solvers/structuredElements';
import { normals } from '../../support/random';
import { solveTakes, takeOf } from '../../support/takes';

async function structured(length: number) {
  const x = [normals(1, 3000), normals(2, 3000)];
  for (let n = 1; n < 3000; n++) x[0][n] += 0.9 * x[0][n - 1];
  const fit = [
    { from: 0, to: 1400 },
    { from: 1500, to: 3000 },
  ];
  const shape = { length, delay: 0, windowing: 'covariance' } as const;
  const { system } = await solveTakes([takeOf(x, normals(3, 3000), { fit })], shape, 0.001);
  if (!('structure' in system.matrix) || system.matrix.structure === undefined) throw new Error('dense');
  return { system, structure: system.matrix.structure };
}

describe('elements of a matrix that is not formed', () => {
  it('are those of the matrix formed by shift updates', async () => {
    const { system, structure } = await structured(40);
    const dense = elementsOf(system, 0.001);
    const element = structuredElements(structure, 0.001);
    const diagonal = structuredDiagonal(structure, 0.001);
    for (let i = 0; i < system.size; i++) {
      for (let j = 0; j <= i; j++) {
        expect(Math.abs(element(i, j) - dense(i, j))).toBeLessThan(1e-13);
        expect(Math.abs(element(j, i) - dense(i, j))).toBeLessThan(1e-13);
      }
      expect(Math.abs(diagonal[i] - dense(i, i))).toBeLessThan(1e-13);
    }
  });

  it('round to what the elements round to', async () => {
    const { system, structure } = await structured(60);
    const element = elementsOf(system, 0.001);
    const products = {
      diagonal: structuredDiagonal(structure, 0.001),
      multiply: normalOperator(structure, 0.001),
      near: element,
    };
    const targets = normals(5, system.size).map((value) => 30 * value);
    const cost = { size: system.size, element, factor: null };
    const byElements = roundErrorAware(targets, cost, wordRange(8));
    const byProducts = roundErrorAware(targets, { ...cost, products }, wordRange(8));
    expect(byProducts).toEqual(byElements);
    const plain = targets.map((value) => Math.floor(value + 0.5));
    expect(roundingCost(byProducts, targets, cost)).toBeLessThan(roundingCost(plain, targets, cost));
  });

  it('are not followed without end where they promise gains without end', () => {
    const size = 50;
    const targets = normals(7, size).map((value) => 30 * value);
    let asked = 0;
    const near = (i: number, j: number) => {
      asked++;
      return (i + j) % 2 === 0 ? 3 : -3;
    };
    // A true gradient of three times the diagonal gives a reason for the first steps.
    const multiply = (v: Float64Array) => v.map((value) => 3 * value);
    const products = { diagonal: new Float64Array(size).fill(1), multiply, near };
    const cost = { size, element: (i: number, j: number) => Number(i === j), factor: null, products };
    roundErrorAware(targets, cost, wordRange(8));
    expect(asked).toBeGreaterThan(0);
    expect(asked).toBeLessThanOrEqual(4 * size * (size - 1));
  });

  it('round nearly as well by near elements, and never worse than plain', async () => {
    const { system, structure } = await structured(60);
    const element = elementsOf(system, 0.001);
    const products = {
      diagonal: structuredDiagonal(structure, 0.001),
      multiply: normalOperator(structure, 0.001),
      near: nearElements(structure),
    };
    const targets = normals(6, system.size).map((value) => 30 * value);
    const cost = { size: system.size, element, factor: null };
    const costOf = (values: Float64Array) => roundingCost(values, targets, cost);
    const plain = costOf(targets.map((value) => Math.floor(value + 0.5)));
    const best = costOf(roundErrorAware(targets, cost, wordRange(8)));
    const near = costOf(roundErrorAware(targets, { ...cost, products }, wordRange(8)));
    expect(near - best).toBeLessThan(0.2 * (plain - best));
    // Elements that mislead lead to no step.
    const misled = { ...products, near: (i: number, j: number) => -1000 * element(i, j) };
    expect(costOf(roundErrorAware(targets, { ...cost, products: misled }, wordRange(8)))).toBeLessThanOrEqual(
      plain,
    );
  });
});
