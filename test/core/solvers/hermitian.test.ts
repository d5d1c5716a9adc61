import { describe, expect, it } from 'vitest';
import { newHermitianSolver } from '../../../core/solvers/hermitian';
import { seededNormal } from '../../support/random';

interface Complex {
  re: number;
  im: number;
}

/** A = B Bᴴ of `size` unknowns in units that differ by 1e6, with every product written out. */
function randomMatrix(size: number, rank: number, seed: number): Complex[][] {
  const next = seededNormal(seed);
  const b = Array.from({ length: size }, (_, i) =>
    Array.from({ length: rank }, () => ({ re: next() * 10 ** (i % 7), im: next() * 10 ** (i % 7) })),
  );
  return b.map((row) =>
    b.map((other) =>
      row.reduce(
        (sum, u, k) => ({
          re: sum.re + u.re * other[k].re + u.im * other[k].im,
          im: sum.im + u.im * other[k].re - u.re * other[k].im,
        }),
        { re: 0, im: 0 },
      ),
    ),
  );
}

function solved(matrix: Complex[][], right: Complex[]) {
  const size = right.length;
  const solver = newHermitianSolver(size);
  matrix.forEach((row, i) => {
    row.forEach(({ re, im }, j) => {
      solver.re[i * size + j] = re;
      solver.im[i * size + j] = im;
    });
  });
  solver.rightRe.set(right.map(({ re }) => re));
  solver.rightIm.set(right.map(({ im }) => im));
  const { explained, rank } = solver.solve();
  const h = right.map((_, i) => ({ re: solver.rightRe[i], im: solver.rightIm[i] }));
  return { explained, rank, h };
}

/** A h */
function times(matrix: Complex[][], h: Complex[]): Complex[] {
  return matrix.map((row) =>
    row.reduce(
      (sum, a, k) => ({
        re: sum.re + a.re * h[k].re - a.im * h[k].im,
        im: sum.im + a.re * h[k].im + a.im * h[k].re,
      }),
      { re: 0, im: 0 },
    ),
  );
}

describe('newHermitianSolver', () => {
  it.each([1, 2, 3, 8])('finds what %i unknowns were multiplied from', (size) => {
    const matrix = randomMatrix(size, size + 4, size);
    const next = seededNormal(100 + size);
    const wanted = Array.from({ length: size }, (_, i) => ({
      re: next() / 10 ** (i % 7),
      im: next() / 10 ** (i % 7),
    }));
    const right = times(matrix, wanted);
    const { h, explained, rank } = solved(matrix, right);
    expect(rank).toBe(size);
    wanted.forEach((value, i) => {
      const scale = 10 ** (i % 7);
      expect(scale * h[i].re).toBeCloseTo(scale * value.re, 9);
      expect(scale * h[i].im).toBeCloseTo(scale * value.im, 9);
    });
    const sum = right.reduce((total, b, i) => total + b.re * wanted[i].re + b.im * wanted[i].im, 0);
    expect(explained / sum).toBeCloseTo(1, 9);
  });

  it('leaves out what depends on what came before, and explains as much', () => {
    const matrix = randomMatrix(4, 2, 9);
    const right = times(matrix, [
      { re: 1, im: 0.5 },
      { re: -0.1, im: 0 },
      { re: 0, im: 0 },
      { re: 0, im: 0 },
    ]);
    const { h, rank } = solved(matrix, right);
    expect(rank).toBe(2);
    expect(h[2]).toEqual({ re: 0, im: 0 });
    times(matrix, h).forEach((value, i) => {
      expect(value.re / 10 ** (i % 7)).toBeCloseTo(right[i].re / 10 ** (i % 7), 8);
    });
  });
});
