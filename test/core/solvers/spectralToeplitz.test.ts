import { describe, expect, it } from 'vitest';
import { circulantInverse } from '../../../core/solvers/circulant';
import { solveLevinson } from '../../../core/solvers/levinson';
import { prepare } from '../../../core/solvers/prepare';
import { spectralToeplitz } from '../../../core/solvers/spectralToeplitz';
import { relativeGap } from '../../support/leastSquaresCases';
import { normals } from '../../support/random';

function column(size: number): Float64Array {
  return Float64Array.from({ length: size }, (_, k) => 0.95 ** k * Math.cos(0.3 * k) + (k === 0 ? 0.01 : 0));
}

describe('a Toeplitz matrix on spectra', () => {
  it.each([16, 32, 64, 512])('of %i rows multiplies and conditions as it does on vectors', (size) => {
    const t = column(size);
    const v = normals(2, size);
    const { multiply, precondition, toSpectrum, toVector } = spectralToeplitz(t);
    expect(relativeGap(toVector(toSpectrum(v)), v)).toBeLessThan(1e-15);
    // By definition, element by element.
    const want = v.map((_, i) => v.reduce((sum, value, j) => sum + t[Math.abs(i - j)] * value, 0));
    expect(relativeGap(toVector(multiply(toSpectrum(v))), want)).toBeLessThan(1e-14);
    expect(relativeGap(toVector(precondition(toSpectrum(v))), circulantInverse(t)(v))).toBeLessThan(1e-13);
  });

  it('keeps angles, which conjugate gradients go by', () => {
    const [v, w] = [normals(3, 64), normals(4, 64)];
    const { toSpectrum } = spectralToeplitz(column(64));
    const inner = (a: Float64Array, b: Float64Array) => a.reduce((sum, value, k) => sum + value * b[k], 0);
    const [a, b] = [toSpectrum(v), toSpectrum(w)];
    expect(inner(a, b) / inner(a, a)).toBeCloseTo(inner(v, w) / inner(v, v), 13);
  });

  it('is solved as by the recursion: 2,048 rows', () => {
    const toeplitz = column(2048);
    const right = normals(5, 2048);
    const system = { size: 2048, right, scale: new Float64Array(2048).fill(1), matrix: { toeplitz } };
    const prepared = prepare('gradients', system, 0);
    if ('order' in prepared) throw new Error('broke down');
    expect(relativeGap(prepared.inverse(right), solveLevinson(toeplitz, right).solution)).toBeLessThan(1e-12);
  });
});
