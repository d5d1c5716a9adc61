import { execFileSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { blockCirculantInverse } from '../../../core/solvers/blockCirculant';
import { conditionNumber } from '../../../core/solvers/conditionNumber';
import type { NormalSystem } from '../../../core/solvers/normalSystem';
import { type Limits, methodFor, prepare } from '../../../core/solvers/prepare';
import { solve } from '../../../core/solvers/solve';
import { zeroExtended } from '../../../core/solvers/zeroExtended';
import { relativeGap } from '../../support/leastSquaresCases';
import { needs, python } from '../../support/programs';
import { autoregression, normals } from '../../support/random';
import { denseRows, noiseSystem, structureOf, tapsBy } from '../../support/systems';
import { solveTakes, takeOf } from '../../support/takes';

// Conjugate gradients on a matrix with edges, as systems of more than 8,192 unknowns are solved; the limit is lowered.

const lowered: Limits = { unknowns: 100, schur: 1e9 };
const alone: Limits = { unknowns: 100, schur: 0 };

function solved(system: NormalSystem, inputs: number, regularisation: number, limits = alone) {
  const solution = solve(system, inputs, regularisation, limits);
  if (!('coefficients' in solution)) throw new Error(`not solvable: ${JSON.stringify(solution)}`);
  return { ...solution, taps: solution.coefficients.flatMap((row) => Array.from(row)) };
}

/** A tone in little noise, whose ends make the zero-extended matrix a poor likeness. */
function tone(samples: number) {
  const noise = normals(3, samples);
  const x = noise.map((value, n) => 1e-4 * value + Math.sin(0.3 * n));
  return solveTakes([takeOf([x], noise)], { length: 260, delay: 0, windowing: 'covariance' });
}

describe('the zero-extended autocorrelation', () => {
  it('is that of each stretch with the samples before it, all else zero', async () => {
    const length = 40;
    const x = [normals(1, 500), normals(2, 500)];
    const fit = [
      { from: 10, to: 200 },
      { from: 210, to: 470 },
    ];
    const take = takeOf(x, x[0], { fit });
    const { sums, moments, system } = await solveTakes([take], { length, delay: 0, windowing: 'covariance' });
    const got = zeroExtended(structureOf(system), 0.25);
    for (const [r, s] of [0, 1].flatMap((a) => [0, 1].map((b) => [a, b] as const))) {
      const root = sums.count * Math.sqrt(moments.inputPowers[r] * moments.inputPowers[s]);
      const want = Float64Array.from({ length }, (_, k) => {
        let sum = 0;
        for (const { from, to } of fit) {
          // What lies before the first interval serves as history, the gap between the two does not.
          const first = from === 10 ? 0 : from;
          for (let n = first + k; n < to; n++) sum += x[r][n - k] * x[s][n];
        }
        return sum / root + (r === s && k === 0 ? 0.25 : 0);
      });
      expect(relativeGap(got[r][s], want), `${r} ${s}`).toBeLessThan(1e-13);
    }
  });
});

describe('the block circulant preconditioner', () => {
  it('is the inverse of the block circulant matrix nearest to the block Toeplitz one', () => {
    const n = 16;
    const [x, y, z] = [1, 2, 3].map((seed) => normals(seed, n));
    const column = (a: Float64Array, b: Float64Array, own: number) =>
      Float64Array.from({ length: n }, (_, k) => {
        let sum = k === 0 ? own : 0;
        for (let i = 0; i + k < n; i++) sum += (a[i + k] * b[i] + z[i] * z[i + k]) / n;
        return sum;
      });
    const columns = [
      [column(x, x, 1), column(x, y, 0)],
      [column(y, x, 0), column(y, y, 2)],
    ];
    const v = normals(9, 2 * n);
    const w = blockCirculantInverse(columns)(v);
    // By definition (T. Chan 1988), block by block: c_k = ((n - k) t_k + k t_(k-n)) / n.
    const back = v.map((_, at) => {
      const [r, i] = [at < n ? 0 : 1, at % n];
      let sum = 0;
      for (const s of [0, 1]) {
        for (let j = 0; j < n; j++) {
          const k = (i - j + n) % n;
          const c = ((n - k) * columns[r][s][k] + (k === 0 ? 0 : k * columns[s][r][n - k])) / n;
          sum += c * w[s * n + j];
        }
      }
      return sum;
    });
    expect(relativeGap(back, v)).toBeLessThan(1e-13);
  });
});

describe('conjugate gradients on a matrix with edges', () => {
  it.each([
    { inputs: 1, length: 300, stretches: 1, pole: 0.9 },
    { inputs: 1, length: 257, stretches: 4, pole: 0.99 },
    { inputs: 2, length: 150, stretches: 2, pole: 0.5 },
    { inputs: 3, length: 101, stretches: 1, pole: 0.9 },
    { inputs: 3, length: 96, stretches: 1, windowing: 'autocorrelation' as const },
  ])('give the taps and the condition number of Cholesky: %o', async (shape) => {
    const { system } = await noiseSystem(shape, 20);
    expect(methodFor(system, lowered)).toBe('gradients');
    const { taps, method, conditionNumber: got } = solved(system, shape.inputs, 1e-9);
    expect(method).toBe('gradients');
    const cholesky = prepare('cholesky', system, 1e-9);
    if ('order' in cholesky) throw new Error('broke down');
    const want = conditionNumber(cholesky.multiply, cholesky.inverse, system.size);
    expect(Math.abs(got / want - 1)).toBeLessThan(0.05);
    expect(relativeGap(taps, tapsBy('cholesky', system, 1e-9))).toBeLessThan(Math.max(1e-12, 1e-14 * want));
  });

  // numpy.linalg.solve and eigvalsh on the matrix formed element by element (NumPy 1.24, Debian's python3-numpy).
  it.skipIf(!needs('scipy'))('agree with NumPy where the stretch is short against the filter', async () => {
    const x = autoregression(700, 4, 0.9);
    const d = normals(5, 700).map((value, n) => value + x[n]);
    const shape = { length: 300, delay: 0, windowing: 'covariance' as const };
    const { system } = await solveTakes([takeOf([x], d)], shape);
    const script = [
      'import json, sys',
      'import numpy as np',
      'matrix, right = (np.array(a) for a in json.load(sys.stdin))',
      'e = np.linalg.eigvalsh(matrix)',
      'json.dump([np.linalg.solve(matrix, right).tolist(), e[-1] / e[0]], sys.stdout)',
    ].join('\n');
    const input = JSON.stringify([denseRows(system, 0), Array.from(system.right)]);
    const options = { input, maxBuffer: 1 << 28 };
    const [want, condition]: [number[], number] = JSON.parse(
      execFileSync(python, ['-c', script], options).toString(),
    );
    const { taps, method, conditionNumber: got } = solved(system, 1, 0);
    expect(method).toBe('gradients');
    expect(Math.abs(got / condition - 1)).toBeLessThan(0.05);
    const unscaled = want.map((value, i) => value / system.scale[i]);
    expect(relativeGap(taps, unscaled)).toBeLessThan(Math.max(1e-12, 1e-14 * condition));
  });

  it('make room for the Schur algorithm where they do not settle and it is short', async () => {
    const { system } = await tone(600);
    const { taps, method, conditionNumber: condition } = solved(system, 1, 0, lowered);
    expect(method).toBe('schur');
    const gap = relativeGap(taps, tapsBy('cholesky', system, 0));
    expect(gap).toBeLessThan(Math.max(1e-12, 1e-14 * condition));
  });

  it('say after how many steps they gave up where it is not, and what can be solved', async () => {
    const { system } = await tone(600);
    const found = solve(system, 1, 0, alone);
    if (!('smallestRegularisation' in found)) throw new Error('got a solution that does not settle');
    expect(found).toMatchObject({ order: null, steps: 200 });
    const { smallestRegularisation: smallest } = found;
    expect(solved(system, 1, smallest).method).toBe('gradients');
  });

  it('name the order where the zero-extended matrix is singular: that of a sine', async () => {
    const { system } = await noiseSystem({ inputs: 1, length: 300, stretches: 1 }, 2);
    const structure = structureOf(system);
    const columns = [[Float64Array.from({ length: 300 }, (_, k) => Math.cos(0.7 * k))]];
    const matrix = { structure: { ...structure, columns, edges: [] }, dense: new Float64Array(0) };
    expect(prepare('gradients', { ...system, matrix }, 0)).toEqual({ order: 2 });
  });

  it('solve 9,000 taps as the Schur algorithm does', async () => {
    const x = autoregression(40_000, 6, 0.8);
    const d = normals(7, 40_000).map((value, n) => value + x[n]);
    const shape = { length: 9000, delay: 0, windowing: 'covariance' as const };
    const { system, solution } = await solveTakes([takeOf([x], d)], shape);
    if (!('coefficients' in solution)) throw new Error('not solvable');
    expect(solution.method).toBe('gradients');
    const gap = relativeGap(solution.coefficients[0], tapsBy('schur', system, 0));
    expect(gap).toBeLessThan(Math.max(1e-12, 1e-14 * solution.conditionNumber));
  });
});
