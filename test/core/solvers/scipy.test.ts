import { execFileSync } from 'node:child_process';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { needs, python } from '../../support/programs';
import { normals } from '../../support/random';
import { convolve, solveTakes, takeOf } from '../../support/takes';

// The same systems by SciPy (Debian's python3-scipy): lstsq on the explicit data matrix, solve_toeplitz.

function coloured(seed: number, samples: number, pole: number): Float64Array {
  const x = normals(seed, samples);
  for (let n = 1; n < samples; n++) x[n] += pole * x[n - 1];
  return x;
}

const samples = 3000;
const x = coloured(1, samples, 0.9);
const z = coloured(2, samples, -0.5).map((value) => 20 * value);
const noise = normals(3, samples);
const d = convolve(x, [0.5, -0.2, 0.8, 0.1]).map(
  (value, n) => value + 0.05 * z[Math.max(0, n - 2)] + 0.1 * noise[n],
);

const cases = [
  { inputs: [x], length: 32, delay: 0, regularisation: 0, windowing: 'covariance' },
  { inputs: [x], length: 24, delay: 11, regularisation: 1e-4, windowing: 'covariance' },
  { inputs: [x], length: 16, delay: -5, regularisation: 1e-3, windowing: 'covariance' },
  { inputs: [x, z], length: 20, delay: 3, regularisation: 1e-5, windowing: 'covariance' },
  { inputs: [x], length: 40, delay: 0, regularisation: 0, windowing: 'autocorrelation' },
  { inputs: [x], length: 40, delay: 9, regularisation: 1e-3, windowing: 'autocorrelation' },
  { inputs: [z], length: 12, delay: -4, regularisation: 1e-6, windowing: 'autocorrelation' },
] as const;

describe.skipIf(!needs('scipy'))('taps against SciPy', () => {
  it('agree within max(1e-12, 1e-14 κ)', async () => {
    const fit = { from: 100, to: 2500 };
    const asked = cases.map((c) => ({
      ...c,
      inputs: c.inputs.map((row) => Array.from(row)),
      desired: Array.from(d),
      fit: [fit.from, fit.to],
    }));
    const script = join(__dirname, 'scipyReference.py');
    const options = { input: JSON.stringify(asked), maxBuffer: 1 << 28 };
    const wanted: number[][] = JSON.parse(execFileSync(python, [script], options).toString());
    for (const [i, c] of cases.entries()) {
      const { solution } = await solveTakes([takeOf(c.inputs, d, { fit: [fit] })], c, c.regularisation);
      if (!('coefficients' in solution)) throw new Error('not solvable');
      const got = solution.coefficients.flatMap((row) => Array.from(row));
      const gap = Math.hypot(...got.map((w, k) => w - wanted[i][k])) / Math.hypot(...wanted[i]);
      expect(gap, `case ${i}`).toBeLessThan(Math.max(1e-12, 1e-14 * solution.conditionNumber));
    }
  });
});
