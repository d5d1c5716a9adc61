import { describe, expect, it } from 'vitest';
import { circulantInverse } from '../../../core/solvers/circulant';
import { conjugateGradients } from '../../../core/solvers/conjugateGradients';
import { solveLevinson } from '../../../core/solvers/levinson';
import type { NormalSystem } from '../../../core/solvers/normalSystem';
import { solve } from '../../../core/solvers/solve';
import { toeplitzOperator } from '../../../core/solvers/toeplitz';
import { relativeGap } from '../../support/leastSquaresCases';
import { normals } from '../../support/random';

function process(size: number, pole: number, noise: number): Float64Array {
  const column = Float64Array.from({ length: size }, (_, k) => pole ** k * Math.cos(0.3 * k));
  column[0] += noise;
  return column;
}

describe("T. Chan's circulant preconditioner", () => {
  it('is the inverse of the nearest circulant matrix where the size is a power of two', () => {
    const n = 8;
    const column = process(n, 0.8, 0.1);
    // By definition (T. Chan 1988): c_k = ((n - k) t_k + k t_(n-k)) / n.
    const circle = column.map((t, k) => (k === 0 ? t : ((n - k) * t + k * column[n - k]) / n));
    const v = normals(3, n);
    const w = circulantInverse(column)(v);
    const back = v.map((_, i) => w.reduce((sum, value, j) => sum + circle[(i - j + n) % n] * value, 0));
    expect(relativeGap(back, v)).toBeLessThan(1e-14);
  });

  it.each([700, 1024])('is symmetric and positive: %i unknowns', (n) => {
    const apply = circulantInverse(process(n, 0.99, 0));
    const inner = (a: Float64Array, b: Float64Array) => a.reduce((sum, value, k) => sum + value * b[k], 0);
    const a = normals(4, n);
    const b = normals(5, n);
    expect(inner(a, apply(a))).toBeGreaterThan(0);
    expect(Math.abs(inner(a, apply(b)) / inner(b, apply(a)) - 1)).toBeLessThan(1e-11);
  });
});

describe('conjugate gradients', () => {
  it('reach the solution of the recursion in few steps', () => {
    const n = 3000;
    const column = process(n, 0.9, 0.01);
    const b = normals(6, n);
    const multiply = toeplitzOperator(column);
    const { solution, reached } = conjugateGradients(multiply, circulantInverse(column), b, 1e-13, 15);
    expect(reached).toBe(true);
    expect(relativeGap(solution, solveLevinson(column, b).solution)).toBeLessThan(1e-12);
    // Without the preconditioner as many steps are not enough.
    expect(conjugateGradients(multiply, (v) => v.slice(), b, 1e-13, 15).reached).toBe(false);
  });

  it('end at once for a right-hand side of zeros', () => {
    const { solution, reached } = conjugateGradients(
      toeplitzOperator(process(5, 0.5, 1)),
      (v) => v.slice(),
      new Float64Array(5),
      1e-13,
      3,
    );
    expect(reached).toBe(true);
    expect(Array.from(solution)).toEqual([0, 0, 0, 0, 0]);
  });
});

describe('long Toeplitz systems', () => {
  const size = 8500;
  const systemOf = (toeplitz: Float64Array): NormalSystem => ({
    size,
    right: normals(7, size),
    scale: new Float64Array(size).fill(1),
    matrix: { toeplitz },
  });

  it('are solved by conjugate gradients to the accuracy of the recursion', () => {
    const toeplitz = process(size, 0.95, 0.01);
    const solution = solve(systemOf(toeplitz), 1, 1e-6);
    if (!('coefficients' in solution)) throw new Error('not solvable');
    expect(solution.method).toBe('gradients');
    toeplitz[0] += 1e-6;
    const want = solveLevinson(toeplitz, normals(7, size)).solution;
    expect(relativeGap(solution.coefficients[0], want)).toBeLessThan(
      Math.max(1e-12, 1e-14 * solution.conditionNumber),
    );
  });

  it('fall back on the recursion, which names the order: a sine is singular from order 2', () => {
    const sine = Float64Array.from({ length: size }, (_, k) => Math.cos(0.7 * k));
    expect(solve(systemOf(sine), 1, 0)).toMatchObject({ order: 2, conditionNumber: null });
  });
});
