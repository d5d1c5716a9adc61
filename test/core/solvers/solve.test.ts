import { describe, expect, it } from 'vitest';
import { methodFor, prepare } from '../../../core/solvers/prepare';
import { largestConditionNumber, solve } from '../../../core/solvers/solve';
import { normals } from '../../support/random';
import { noiseSystem, structureOf } from '../../support/systems';
import { solveTakes, takeOf } from '../../support/takes';

describe('choice of the solver', () => {
  it.each([
    [{ inputs: 1, length: 300, stretches: 1 }, 'schur'],
    [{ inputs: 3, length: 86, stretches: 2 }, 'schur'],
    [{ inputs: 2, length: 128, stretches: 1, windowing: 'autocorrelation' as const }, 'schur'],
    [{ inputs: 1, length: 255, stretches: 1 }, 'cholesky'],
    [{ inputs: 1, length: 300, stretches: 40 }, 'cholesky'],
    [{ inputs: 1, length: 300, stretches: 2, windowing: 'autocorrelation' as const }, 'levinson'],
  ] as const)('%o: %s', async (shape, method) => {
    const { system, solution } = await noiseSystem(shape, 1);
    expect(methodFor(system)).toBe(method);
    expect('method' in solution && solution.method).toBe(method);
  });

  it('forms the matrix for Cholesky and for those who ask, not for the Schur algorithm', async () => {
    const { system } = await noiseSystem({ inputs: 1, length: 300, stretches: 1 }, 1);
    const structure = structureOf(system);
    let formed = false;
    const watched = {
      ...system,
      matrix: {
        structure,
        get dense() {
          formed = true;
          return new Float64Array(0);
        },
      },
    };
    expect('coefficients' in solve(watched, 1, 0)).toBe(true);
    expect(formed).toBe(false);
  });
});

describe('where the Schur algorithm breaks down', () => {
  it('Cholesky has the last word', async () => {
    const { system } = await noiseSystem({ inputs: 1, length: 300, stretches: 1 }, 1);
    const { matrix } = system;
    if ('toeplitz' in matrix) throw new Error('no covariance windowing');
    // A structure that is not that of the matrix and is indefinite: the first column's later elements outweigh the first.
    const structure = structureOf(system);
    const columns = [[structure.columns[0][0].map((value, k) => (k === 0 ? value : 2))]];
    const broken = { ...system, matrix: { structure: { ...structure, columns }, dense: matrix.dense } };
    expect(prepare('schur', broken, 0)).toEqual({ order: 1 });
    const solution = solve(broken, 1, 0);
    const plain = solve({ ...system, matrix: { dense: matrix.dense } }, 1, 0);
    expect('method' in solution && solution.method).toBe('cholesky');
    expect(solution).toEqual(plain);
  });
});

/** White noise through a low pass of 61 taps: next to nothing above a fifth of the rate. */
function bandLimited(seed: number, samples: number): Float64Array {
  const white = normals(seed, samples);
  return white.map((_, n) => {
    let sum = 0;
    for (let k = 0; k < Math.min(61, n + 1); k++) {
      const t = k - 30;
      const window = 0.42 + 0.5 * Math.cos((Math.PI * t) / 31) + 0.08 * Math.cos((2 * Math.PI * t) / 31);
      sum += window * (t === 0 ? 0.3 : Math.sin(0.3 * Math.PI * t) / (Math.PI * t)) * white[n - k];
    }
    return sum;
  });
}

describe('systems that cannot be solved', () => {
  it('names the smallest regularisation that can: band-limited input, 300 taps', async () => {
    const x = bandLimited(3, 4000);
    const { system, solution } = await solveTakes([takeOf([x], x)], {
      length: 300,
      delay: 2,
      windowing: 'covariance',
    });
    if (!('smallestRegularisation' in solution)) throw new Error('got a solution of a singular system');
    const { smallestRegularisation } = solution;
    const solved = solve(system, 1, smallestRegularisation);
    if (!('coefficients' in solved)) throw new Error('the named regularisation does not solve it');
    expect(solved.method).toBe('schur');
    expect(solved.conditionNumber).toBeLessThanOrEqual(largestConditionNumber);
    // Half or 40 % of it, the next smaller of 1, 2 and 5 times a power of ten, cannot be solved.
    const smaller = smallestRegularisation * (String(smallestRegularisation).startsWith('5') ? 0.4 : 0.5);
    expect('smallestRegularisation' in solve(system, 1, smaller)).toBe(true);
  });

  it('breaks down where two of three inputs are the same, and Cholesky finds it too', async () => {
    const x = normals(8, 3000);
    const z = normals(9, 3000);
    const { system, solution } = await solveTakes([takeOf([x, z, x], x)], {
      length: 100,
      delay: 0,
      windowing: 'covariance',
    });
    expect(prepare('schur', system, 0)).toEqual({ order: 2 });
    // Cholesky goes input by input: the third is the first again.
    expect(solution).toMatchObject({ order: 200, conditionNumber: null });
    const smallest = (solution as { smallestRegularisation: number }).smallestRegularisation;
    expect('coefficients' in solve(system, 3, smallest)).toBe(true);
  });
});
