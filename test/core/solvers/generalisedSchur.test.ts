import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { conditionNumber } from '../../../core/solvers/conditionNumber';
import { generatorsOf } from '../../../core/solvers/displacement';
import { invertBySchur } from '../../../core/solvers/generalisedSchur';
import { prepare } from '../../../core/solvers/prepare';
import { randomCase, relativeGap, tapsByQr } from '../../support/leastSquaresCases';
import { normals } from '../../support/random';
import { denseRows, noiseSystem, structureOf, tapsBy } from '../../support/systems';
import { solveTakes, takeOf } from '../../support/takes';

describe('displacement', () => {
  it.each([
    { inputs: 1, length: 9, stretches: 1 },
    { inputs: 1, length: 6, stretches: 3 },
    { inputs: 3, length: 5, stretches: 2 },
    { inputs: 2, length: 7, stretches: 2, windowing: 'autocorrelation' as const },
  ])('of %o is what the matrix has left after a shift by one tap', async (shape) => {
    const regularisation = 0.25;
    const { system } = await noiseSystem(shape, 3);
    const { inputs, length } = shape;
    const generators = generatorsOf(structureOf(system), regularisation);
    if ('order' in generators) throw new Error('not positive definite');
    // By definition: R - F R Fᵀ with R formed element by element, unknowns tap by tap.
    const rows = denseRows(system, regularisation);
    const place = (i: number) => (i % inputs) * length + Math.floor(i / inputs);
    const size = inputs * length;
    for (let i = 0; i < size; i++) {
      for (let j = 0; j < size; j++) {
        const moved = i < inputs || j < inputs ? 0 : rows[place(i - inputs)][place(j - inputs)];
        const got =
          generators.plus.reduce((sum, g) => sum + g[i] * g[j], 0) -
          generators.minus.reduce((sum, h) => sum + h[i] * h[j], 0);
        expect(Math.abs(got - (rows[place(i)][place(j)] - moved))).toBeLessThan(1e-14);
      }
    }
  });
});

// Independent reference: Householder QR of the explicit data matrix by ml-matrix.
describe('generalised Schur algorithm against least squares by QR', () => {
  it('agrees for random multi-take, multi-input, multi-interval cases within max(1e-12, 1e-14 κ)', async () => {
    await fc.assert(
      fc.asyncProperty(fc.integer({ min: 1, max: 1e9 }), async (seed) => {
        const c = randomCase(seed);
        // One input with autocorrelation windowing is Levinson's.
        if (c.takes[0].inputs.length === 1) c.windowing = 'covariance';
        const { system, solution } = await solveTakes(c.takes, c, c.regularisation, c.removeMean);
        if (!('coefficients' in solution)) throw new Error('not solvable');
        const bound = Math.max(1e-12, 1e-14 * solution.conditionNumber);
        expect(relativeGap(tapsBy('schur', system, c.regularisation), tapsByQr(c))).toBeLessThan(bound);
      }),
      { numRuns: 40 },
    );
  });

  it('agrees where solve chooses it by itself: two inputs of 130 taps, two takes', async () => {
    const c = { ...randomCase(11), length: 130, delay: 3, regularisation: 1e-6, removeMean: true };
    const signals = [0, 1].map((t) => {
      const inputs = [normals(40 + t, 700), normals(50 + t, 700).map((value) => 30 * value)];
      const desired = inputs[0].map((value, n) => value + 0.1 * (inputs[1][n - 9] ?? 0));
      return { inputs, desired };
    });
    const takes = signals.map(({ inputs, desired }) =>
      takeOf(inputs, desired, { fit: [{ from: 5, to: 690 }] }),
    );
    const own = { ...c, takes, signals, windowing: 'covariance' as const };
    const { solution } = await solveTakes(takes, own, own.regularisation, own.removeMean);
    if (!('coefficients' in solution)) throw new Error('not solvable');
    expect(solution.method).toBe('schur');
    const got = solution.coefficients.flatMap((row) => Array.from(row));
    expect(relativeGap(got, tapsByQr(own))).toBeLessThan(Math.max(1e-12, 1e-14 * solution.conditionNumber));
  });
});

describe('generalised Schur algorithm against Cholesky', () => {
  it.each([
    { inputs: 1, length: 300, stretches: 1, pole: 0.9 },
    { inputs: 1, length: 512, stretches: 4, pole: 0.5 },
    { inputs: 2, length: 150, stretches: 3, pole: 0.99 },
    { inputs: 3, length: 101, stretches: 1, pole: 0.7 },
    { inputs: 3, length: 96, stretches: 1, windowing: 'autocorrelation' as const },
  ])('gives the same taps and condition number for %o', async (shape) => {
    const { system } = await noiseSystem(shape, 20);
    const regularisation = 1e-9;
    const cholesky = prepare('cholesky', system, regularisation);
    const schur = prepare('schur', system, regularisation);
    if ('order' in cholesky || 'order' in schur) throw new Error('broke down');
    const want = conditionNumber(cholesky.multiply, cholesky.inverse, system.size);
    const got = conditionNumber(schur.multiply, schur.inverse, system.size);
    expect(Math.abs(got / want - 1)).toBeLessThan(1e-4);
    const gap = relativeGap(
      tapsBy('schur', system, regularisation),
      tapsBy('cholesky', system, regularisation),
    );
    expect(gap).toBeLessThan(Math.max(1e-12, 1e-14 * want));
    // The generators alone, without refinement, are an inverse to some hundred times 1e-16 κ.
    const vector = normals(9, system.size);
    expect(relativeGap(schur.inverse(schur.multiply(vector)), vector)).toBeLessThan(1e-13 * want);
  });

  it('has the same factor where it is asked for', async () => {
    for (const windowing of ['covariance', 'autocorrelation'] as const) {
      const { system } = await noiseSystem({ inputs: 1, length: 60, stretches: 2, windowing }, 30);
      const method = windowing === 'covariance' ? 'schur' : 'levinson';
      const own = prepare(method, system, 1e-4);
      const other = prepare('cholesky', system, 1e-4);
      if ('order' in own || 'order' in other) throw new Error('broke down');
      for (let i = 0; i < 60; i++) {
        for (let j = 0; j <= i; j++) {
          const at = i * 60 + j;
          expect(Math.abs((own.factor?.factor[at] ?? 0) - (other.factor?.factor[at] ?? 1))).toBeLessThan(
            1e-14,
          );
        }
      }
    }
  });
});

describe('two steps in one pass', () => {
  it.each([2, 3, 4, 5, 64, 301])('give what one at a time gives: %i taps', async (length) => {
    const { system } = await noiseSystem({ inputs: 1, length, stretches: 1 }, 7);
    const structure = structureOf(system);
    // A second edge of zeros keeps the algorithm from taking two steps at once, and changes nothing else.
    const zeros = [new Float64Array(length - 1)];
    const edges = [...structure.edges, { before: zeros, after: zeros }];
    const [both, single] = [structure, { ...structure, edges }].map((s) => {
      const generators = generatorsOf(s, 0.01);
      const result = 'order' in generators ? generators : invertBySchur(generators);
      if ('order' in result) throw new Error('broke down');
      return result;
    });
    for (const sign of ['plus', 'minus'] as const) {
      for (const j of [0, 1]) {
        const gap = relativeGap(both[sign][j], single[sign][j]);
        expect(gap, `${sign} ${j}`).toBeLessThan(1e-13);
      }
    }
  });
});

describe('breakdown', () => {
  it('names the order: a sum of three sines is exactly predicted from six samples', async () => {
    const x = Float64Array.from(
      { length: 3000 },
      (_, n) => Math.sin(0.3 * n) + Math.sin(1.1 * n + 1) + Math.sin(2.3 * n + 2),
    );
    const { system } = await solveTakes([takeOf([x], x)], {
      length: 20,
      delay: 0,
      windowing: 'covariance',
    });
    const generators = generatorsOf(structureOf(system), 0);
    if ('order' in generators) throw new Error('not positive definite');
    expect(invertBySchur(generators)).toEqual({ order: 6 });
  });

  it('names an odd order too: a sine about a mean is exactly predicted from three samples', async () => {
    const x = Float64Array.from({ length: 3000 }, (_, n) => 0.5 + Math.sin(1.1 * n));
    const { system } = await solveTakes([takeOf([x], x)], {
      length: 20,
      delay: 0,
      windowing: 'covariance',
    });
    const generators = generatorsOf(structureOf(system), 0);
    if ('order' in generators) throw new Error('not positive definite');
    expect(invertBySchur(generators)).toEqual({ order: 3 });
  });

  it('is found at the first tap of an input that is the same as another', async () => {
    const x = normals(5, 2000);
    const { system } = await solveTakes([takeOf([x, x], x)], {
      length: 8,
      delay: 0,
      windowing: 'covariance',
    });
    expect(generatorsOf(structureOf(system), 0)).toEqual({ order: 1 });
    expect(prepare('schur', system, 0)).toEqual({ order: 1 });
    expect('order' in prepare('schur', system, 1e-6)).toBe(false);
  });
});
