import { describe, expect, it } from 'vitest';
import { symmetricCirculant } from '../../../core/solvers/symmetricCirculant';
import { quickToeplitzOperator } from '../../../core/solvers/toeplitz';
import { relativeGap } from '../../support/leastSquaresCases';
import { normals } from '../../support/random';

/** An even column of positive eigenvalues. */
function evenColumn(size: number): Float64Array {
  const half = normals(size, size / 2 + 1);
  return Float64Array.from(
    { length: size },
    (_, k) => half[Math.min(k, size - k)] + (k === 0 ? 3 * size : 0),
  );
}

/** Rows and columns 0 to `length` - 1, element by element. */
function corner(column: Float64Array, v: Float64Array): Float64Array {
  const size = column.length;
  return v.map((_, i) => v.reduce((sum, value, j) => sum + column[(i - j + size) % size] * value, 0));
}

describe('a symmetric circulant matrix by transforms of half its size', () => {
  it.each([
    [8, 8],
    [8, 5],
    [16, 1],
    [64, 33],
    [1024, 700],
  ])('of %i, corner of %i: follows the definition', (size, length) => {
    const column = evenColumn(size);
    const v = normals(3, length);
    expect(relativeGap(symmetricCirculant(column, length)(v), corner(column, v))).toBeLessThan(1e-14);
  });

  it.each([8, 32, 512])('of %i: its inverse undoes it', (size) => {
    const column = evenColumn(size);
    const v = normals(4, size);
    const inverse = symmetricCirculant(column, size, (eigenvalue) => 1 / eigenvalue);
    expect(relativeGap(corner(column, inverse(v)), v)).toBeLessThan(1e-13);
  });

  it('writes where it is told to, and keeps nothing of the vector before', () => {
    const column = evenColumn(16);
    const apply = symmetricCirculant(column, 9);
    const [v, w, into] = [normals(5, 9), normals(6, 9), new Float64Array(9)];
    const alone = symmetricCirculant(column, 9)(w);
    apply(v);
    expect(apply(w, into)).toBe(into);
    expect(into).toEqual(alone);
  });

  it('multiplies by a Toeplitz matrix of any size', () => {
    for (const n of [1, 2, 3, 5, 8, 100, 257]) {
      const t = normals(7, n);
      const v = normals(8, n);
      const want = v.map((_, i) => v.reduce((sum, value, j) => sum + t[Math.abs(i - j)] * value, 0));
      expect(relativeGap(quickToeplitzOperator(t)(v), want), `${n}`).toBeLessThan(1e-13);
    }
  });
});
