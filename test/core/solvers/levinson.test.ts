import { execFileSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { largestEigenvalue } from '../../../core/solvers/conditionNumber';
import { gohbergSemencul } from '../../../core/solvers/gohbergSemencul';
import { predictionErrors, solveLevinson } from '../../../core/solvers/levinson';
import { toeplitzOperator } from '../../../core/solvers/toeplitz';
import { relativeGap } from '../../support/leastSquaresCases';
import { needs, python } from '../../support/programs';
import { normals } from '../../support/random';

/** Correlations of a second-order resonance at 0.3 rad, in white noise. */
function resonance(size: number, pole: number, noise: number): Float64Array {
  const column = Float64Array.from({ length: size }, (_, k) => pole ** k * Math.cos(0.3 * k));
  column[0] += noise;
  return column;
}

/** `Σ a b - c` with the rounding of every product and sum carried along (Ogita, Rump & Oishi's Dot2, 2005, from memory). */
function residualOf(column: Float64Array, w: Float64Array, i: number, c: number): number {
  let sum = -c;
  let rest = 0;
  for (let j = 0; j < w.length; j++) {
    const a = column[Math.abs(i - j)];
    const product = a * w[j];
    const next = sum + product;
    const shadow = next - sum;
    rest += sum - (next - shadow) + (product - shadow) + productError(a, w[j], product);
    sum = next;
  }
  return sum + rest;
}

/** What `a * b` lost (Dekker & Veltkamp, 1971, from memory). */
function productError(a: number, b: number, product: number): number {
  const [aHigh, aLow] = halves(a);
  const [bHigh, bLow] = halves(b);
  return aLow * bLow - (product - aHigh * bHigh - aLow * bHigh - aHigh * bLow);
}

function halves(a: number): [number, number] {
  const scaled = 134217729 * a;
  const high = scaled - (scaled - a);
  return [high, a - high];
}

describe('Levinson with a Gohberg–Semencul step', () => {
  it.each([
    [1, 0.9],
    [2, 0.9],
    [3, 0.9],
    [257, 0.9],
    [700, 0.99],
  ])('leaves a residual of rounding alone: %i unknowns, pole %f', (size, pole) => {
    const column = resonance(size, pole, 0.01);
    const b = normals(2, size);
    const { solution, order } = solveLevinson(column, b);
    expect(order).toBe(size);
    const residual = b.map((value, i) => residualOf(column, solution, i, value));
    // In units of 1e-16 of the right-hand side and of the solution times the largest eigenvalue.
    const largest = largestEigenvalue(toeplitzOperator(column), size);
    const scale = Math.hypot(...b) + largest * Math.hypot(...solution);
    expect(Math.hypot(...residual) / scale).toBeLessThan(5e-16);
  });

  it('is worth the step: the inverse alone leaves more', () => {
    const column = resonance(700, 0.9, 0.01);
    const b = normals(3, 700);
    const errors = predictionErrors(column);
    const rough = gohbergSemencul(errors)(b);
    const left = (w: Float64Array) => Math.hypot(...b.map((value, i) => residualOf(column, w, i, value)));
    expect(left(solveLevinson(column, b).solution)).toBeLessThan(0.1 * left(rough));
  });

  it('has the polynomial, reflections and powers of the recursion by definition', () => {
    const size = 40;
    const column = resonance(size, 0.95, 0.1);
    // Durbin's recursion as in any textbook.
    let polynomial = [1];
    let power = column[0];
    const reflections: number[] = [];
    const powers = [power];
    for (let m = 1; m < size; m++) {
      const k = -polynomial.reduce((sum, a, i) => sum + a * column[m - i], 0) / power;
      const longer = [...polynomial, 0];
      polynomial = longer.map((a, i) => a + k * longer[m - i]);
      power *= 1 - k * k;
      reflections.push(k);
      powers.push(power);
    }
    const got = predictionErrors(column);
    expect(relativeGap(got.polynomial, polynomial)).toBeLessThan(1e-12);
    expect(relativeGap(got.reflections, reflections)).toBeLessThan(1e-12);
    expect(relativeGap(got.powers, powers)).toBeLessThan(1e-13);
  });

  it('stops where a sine is exactly predicted', () => {
    const column = Float64Array.from({ length: 12 }, (_, k) => Math.cos(0.7 * k));
    const got = predictionErrors(column);
    expect(got.order).toBe(2);
    expect(got.polynomial.length).toBe(2);
    expect(got.polynomial[1]).toBeCloseTo(-Math.cos(0.7), 14);
    expect(predictionErrors(Float64Array.of(0, 0)).order).toBe(0);
  });

  // SciPy 1.10 (Debian's python3-scipy): solve_toeplitz, the same recursion without refinement.
  it.skipIf(!needs('scipy'))('agrees with SciPy', () => {
    const script = [
      'import json, sys',
      'from scipy.linalg import solve_toeplitz',
      'json.dump([solve_toeplitz(c, b).tolist() for c, b in json.load(sys.stdin)], sys.stdout)',
    ].join('\n');
    const cases = [
      [resonance(500, 0.9, 0.01), normals(4, 500)],
      [resonance(1000, 0.999, 1e-3), normals(5, 1000)],
    ];
    const input = JSON.stringify(cases.map((pair) => pair.map((row) => Array.from(row))));
    const wanted: number[][] = JSON.parse(execFileSync(python, ['-c', script], { input }).toString());
    cases.forEach(([column, b], i) => {
      const size = column.length;
      const errors = predictionErrors(column);
      const condition =
        largestEigenvalue(toeplitzOperator(column), size) * largestEigenvalue(gohbergSemencul(errors), size);
      const gap = relativeGap(solveLevinson(column, b).solution, wanted[i]);
      expect(gap, `case ${i}`).toBeLessThan(Math.max(1e-12, 1e-14 * condition));
    });
  });
});
