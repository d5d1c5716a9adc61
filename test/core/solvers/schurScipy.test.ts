import { execFileSync } from 'node:child_process';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { relativeGap } from '../../support/leastSquaresCases';
import { needs, python } from '../../support/programs';
import { normals } from '../../support/random';
import { convolve, solveTakes, takeOf } from '../../support/takes';

// Large systems against scipy.linalg.lstsq on the explicit data matrix X (SciPy 1.10, Debian's python3-scipy).

const samples = 3000;

/** Noise through a double pole. */
function coloured(seed: number, pole: number): Float64Array {
  const x = normals(seed, samples);
  for (let pass = 0; pass < 2; pass++) for (let n = 1; n < samples; n++) x[n] += pole * x[n - 1];
  return x;
}

describe.skipIf(!needs('scipy'))('generalised Schur algorithm against SciPy', () => {
  it.each([
    // Upper bounds: what a prototype of the same algorithm reached at these condition numbers of X.
    { inputs: 1, length: 384, pole: 0.9, regularisation: 0, conditionOfX: 8e2, reach: 6e-12 },
    { inputs: 1, length: 384, pole: 0.984, regularisation: 0, conditionOfX: 2e4, reach: 5e-8 },
    { inputs: 3, length: 100, pole: 0.9, regularisation: 1e-6, conditionOfX: 5e2, reach: 6e-12 },
  ])('reaches $reach at cond(X) $conditionOfX', async (c) => {
    const x = Array.from({ length: c.inputs }, (_, r) => coloured(r + 1, c.pole));
    const noise = normals(50, samples);
    const clean = x.map((row, r) => convolve(row, [0.5, -0.2, 0.8, 0.1 * r]));
    const d = noise.map((value, n) => clean.reduce((sum, row) => sum + row[n], 0.1 * value));
    const fit = { from: 0, to: samples };
    const shape = { length: c.length, delay: 0, windowing: 'covariance' as const };
    const { solution } = await solveTakes([takeOf(x, d, { fit: [fit] })], shape, c.regularisation);
    if (!('coefficients' in solution)) throw new Error('not solvable');
    expect(solution.method).toBe('schur');
    const condition = Math.sqrt(solution.conditionNumber);
    expect(condition / c.conditionOfX).toBeGreaterThan(0.8);
    expect(condition / c.conditionOfX).toBeLessThan(1.25);

    const asked = [
      {
        ...shape,
        inputs: x.map((row) => Array.from(row)),
        desired: Array.from(d),
        fit: [fit.from, fit.to],
        regularisation: c.regularisation,
      },
    ];
    const options = { input: JSON.stringify(asked), maxBuffer: 1 << 28 };
    const script = join(__dirname, 'scipyReference.py');
    const [wanted]: number[][] = JSON.parse(execFileSync(python, [script], options).toString());
    const got = solution.coefficients.flatMap((row) => Array.from(row));
    const gap = relativeGap(got, wanted);
    expect(gap).toBeLessThan(Math.max(1e-12, 1e-14 * solution.conditionNumber));
    expect(gap).toBeLessThan(c.reach);
  });
});
