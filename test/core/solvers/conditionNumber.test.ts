import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { largestEigenvalue } from '../../../core/solvers/conditionNumber';
import { solve } from '../../../core/solvers/solve';
import { denseRows, noiseSystem } from '../../support/systems';

// All eigenvalues by ml-matrix (QR iteration on the dense matrix).
describe('condition number of structured matrices against dense eigenvalues', () => {
  it.each([
    { inputs: 1, length: 256, stretches: 1, pole: 0.5 },
    { inputs: 1, length: 260, stretches: 2, pole: 0.99 },
    { inputs: 3, length: 90, stretches: 1, pole: 0.9 },
    { inputs: 1, length: 256, stretches: 1, pole: 0.9, windowing: 'autocorrelation' as const },
  ])('is within one per cent for %o', async (shape) => {
    const { system } = await noiseSystem(shape, 60);
    const regularisation = 1e-7;
    const solution = solve(system, shape.inputs, regularisation);
    if (!('coefficients' in solution)) throw new Error('not solvable');
    expect(solution.method).toBe(shape.windowing === undefined ? 'schur' : 'levinson');
    const matrix = new Matrix(denseRows(system, regularisation));
    const values = new EigenvalueDecomposition(matrix, { assumeSymmetric: true }).realEigenvalues;
    const want = Math.max(...values) / Math.min(...values);
    expect(Math.abs(solution.conditionNumber / want - 1)).toBeLessThan(0.01);
  });
});

describe('Lanczos steps', () => {
  it('end early only where told so, and on the same value', () => {
    const size = 400;
    let steps = 0;
    // Eigenvalues 1 to 400, evenly spaced: the largest is not easy to tell from its neighbours.
    const apply = (v: Float64Array) => {
      steps++;
      return v.map((value, i) => (i + 1) * value);
    };
    const all = largestEigenvalue(apply, size);
    const allSteps = steps;
    steps = 0;
    const early = largestEigenvalue(apply, size, 1e-2);
    expect(allSteps).toBe(48);
    expect(steps).toBeLessThan(allSteps);
    expect(all).toBeLessThanOrEqual(400 * (1 + 1e-12));
    expect(all).toBeGreaterThan(0.99 * 400);
    expect(early).toBeLessThanOrEqual(all);
    expect(early).toBeGreaterThan(0.95 * 400);
  });
});
