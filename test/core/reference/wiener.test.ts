import { describe, expect, it } from 'vitest';
import { factorCholesky, solveCholesky } from '../../../core/solvers/cholesky';
import { largestEigenvalue } from '../../../core/solvers/conditionNumber';
import { solveLevinson } from '../../../core/solvers/levinson';
import { expectPrinted } from '../../support/printed';
import { takeOf, tapsOf } from '../../support/takes';

/** Minimum mean squared error `P - wᵀp`. */
function minimumError(power: number, w: Float64Array, p: Float64Array): number {
  return power - w.reduce((sum, value, k) => sum + value * p[k], 0);
}

// Hayes, Statistical Digital Signal Processing and Modeling, Wiley 1996, ch. 7 (from memory; rows recomputed with SciPy):
// r_s[k] = 0.8^k in unit white noise, d = s, x = s + v.
describe('first-order process in white noise (Hayes 1996, ch. 7, from memory)', () => {
  const solveFor = (M: number) => {
    const p = Float64Array.from({ length: M }, (_, k) => 0.8 ** k);
    const r = p.slice();
    r[0] += 1;
    const { solution } = solveLevinson(r, p);
    return { w: solution, J: minimumError(1, solution, p) };
  };

  it('has the printed two taps and error', () => {
    const { w, J } = solveFor(2);
    expectPrinted(w[0], 0.4047619, 7);
    expectPrinted(w[1], 0.2380952, 7);
    expectPrinted(J, 0.4047619, 7);
  });

  it.each([
    [1, 0.5],
    [2, 0.4047619],
    [4, 0.3768328],
    [8, 0.3750072],
    [16, 0.375],
    [32, 0.375],
  ])('reaches the error of %i taps', (M, J) => {
    expectPrinted(solveFor(M).J, J, 7);
  });

  it('comes down to the causal limit 0.375 and never to the two-sided 0.3', () => {
    expect(solveFor(64).J).toBeCloseTo(0.375, 12);
  });
});

describe('two-tap example (Haykin, Adaptive Filter Theory, ch. 2, from memory)', () => {
  const p = Float64Array.of(0.5272, -0.4458);

  it('has the taps, the error and the eigenvalues of the printed example', () => {
    const factor = factorCholesky(Float64Array.of(1.1, 0, 0.5, 1.1), 2);
    if ('order' in factor) throw new Error('not factored');
    const w = solveCholesky(factor, p);
    expectPrinted(w[0], 0.8363, 4);
    expectPrinted(w[1], -0.7854, 4);
    expect(minimumError(0.9486, w, p)).toBeCloseTo(0.1576, 4);
    const levinson = solveLevinson(Float64Array.of(1.1, 0.5), p).solution;
    expect(Math.abs(levinson[0] - w[0])).toBeLessThan(1e-15);
    const R = (v: Float64Array) => Float64Array.of(1.1 * v[0] + 0.5 * v[1], 0.5 * v[0] + 1.1 * v[1]);
    expect(largestEigenvalue(R, 2)).toBeCloseTo(1.6, 11);
    expect(1 / largestEigenvalue((v) => solveCholesky(factor, v), 2)).toBeCloseTo(0.6, 11);
  });
});

// Widrow & Stearns, Adaptive Signal Processing, Prentice-Hall 1985, ch. 2 (from memory).
describe('quadrature sinusoids (Widrow & Stearns 1985, ch. 2, from memory)', () => {
  it.each([
    [5, 0.6498394, -2.1029245],
    [16, 4.8284271, -5.2262519],
  ])('N = %i', async (N, first, second) => {
    const samples = 40 * N + 1;
    const x = Float64Array.from({ length: samples }, (_, k) => Math.sin((2 * Math.PI * k) / N));
    const d = Float64Array.from({ length: samples }, (_, k) => 2 * Math.cos((2 * Math.PI * k) / N));
    const [w] = await tapsOf([takeOf([x], d)], { length: 2, delay: 0, windowing: 'covariance' });
    expectPrinted(w[0], first, 7);
    expectPrinted(w[1], second, 7);
    expect(w[0]).toBeCloseTo(2 / Math.tan((2 * Math.PI) / N), 10);
    expect(w[1]).toBeCloseTo(-2 / Math.sin((2 * Math.PI) / N), 10);
    for (let n = 1; n < samples; n++)
      expect(Math.abs(d[n] - w[0] * x[n] - w[1] * x[n - 1])).toBeLessThan(1e-12);
  });
});

// Haykin, Adaptive Filter Theory, equalisation experiment (eigenvalue rows from memory, minimum error recomputed with SciPy).
describe('equaliser of 11 taps, delay 7 (Haykin)', () => {
  it.each([
    [2.9, 1.0972784, 0.4388129, 0.0481392, 0.3339029, 2.0295261, 6.0782, 0.001375586],
    [3.1, 1.1575794, 0.5596059, 0.0782897, 0.2136087, 2.3761475, 11.1238, 0.001752443],
    [3.3, 1.2274188, 0.672932, 0.1132094, 0.1255585, 2.7262754, 21.7132, 0.002474064],
    [3.5, 1.3032369, 0.7774791, 0.1511184, 0.0655827, 3.0706878, 46.8216, 0.004155531],
  ])('W = %f', (W, r0, r1, r2, smallest, largest, spread, error) => {
    const h = [1, 2, 3].map((n) => 0.5 * (1 + Math.cos((2 * Math.PI * (n - 2)) / W)));
    const r = new Float64Array(11);
    r[0] = h[0] * h[0] + h[1] * h[1] + h[2] * h[2] + 0.001;
    r[1] = h[0] * h[1] + h[1] * h[2];
    r[2] = h[0] * h[2];
    expectPrinted(r[0], r0, 7);
    expectPrinted(r[1], r1, 7);
    expectPrinted(r[2], r2, 7);
    // p[k] = E[d[n-7] x[n-k]] with x[n] = Σ h[m] a[n-m], m = 1..3: h[7-k].
    const p = Float64Array.from({ length: 11 }, (_, k) => h[7 - k - 1] ?? 0);
    const { solution } = solveLevinson(r, p);
    expectPrinted(minimumError(1, solution, p), error, 9);
    const multiply = (v: Float64Array) =>
      v.map((_, i) => v.reduce((sum, value, j) => sum + r[Math.abs(i - j)] * value, 0));
    const top = largestEigenvalue(multiply, 11);
    const bottom = 1 / largestEigenvalue((v) => solveLevinson(r, v).solution, 11);
    expectPrinted(top, largest, 6);
    expectPrinted(bottom, smallest, 6);
    expectPrinted(top / bottom, spread, 3);
    // Grenander & Szegő; Gray, Toeplitz and Circulant Matrices: the eigenvalues lie within the power spectrum.
    const spectrum = Array.from({ length: 2001 }, (_, i) => {
      const f = (Math.PI * i) / 2000;
      return r[0] + 2 * r[1] * Math.cos(f) + 2 * r[2] * Math.cos(2 * f);
    });
    expect(top).toBeLessThanOrEqual(Math.max(...spectrum));
    expect(bottom).toBeGreaterThanOrEqual(Math.min(...spectrum));
  });
});

describe('order recursion (Hayes 1996, ch. 5, from memory)', () => {
  it('has the printed reflection coefficients, polynomial and error powers', () => {
    const { reflections, polynomial, powers, order } = solveLevinson(
      Float64Array.of(1, 0.5, 0.5, 0.25),
      Float64Array.of(1, 0, 0, 0),
    );
    expect(order).toBe(4);
    expect(Array.from(reflections)).toEqual([-1 / 2, -1 / 3, 1 / 8].map((k) => expect.closeTo(k, 14)));
    expect(Array.from(polynomial)).toEqual([1, -3 / 8, -3 / 8, 1 / 8].map((a) => expect.closeTo(a, 14)));
    expect(Array.from(powers)).toEqual([1, 3 / 4, 2 / 3, 21 / 32].map((e) => expect.closeTo(e, 14)));
  });
});
