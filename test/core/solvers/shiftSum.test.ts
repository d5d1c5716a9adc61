import { describe, expect, it } from 'vitest';
import { normalOperator } from '../../../core/solvers/normalMultiply';
import { multiply } from '../../../core/solvers/normalSystem';
import { shiftSumOperator } from '../../../core/solvers/shiftSum';
import { relativeGap } from '../../support/leastSquaresCases';
import { normals } from '../../support/random';
import { noiseSystem, structureOf } from '../../support/systems';

describe('products by transforms', () => {
  it('follow the definition: block Toeplitz plus and minus products of shifted columns', () => {
    const inputs = 2;
    const length = 5;
    const part = (seed: number) => [normals(seed, length), normals(seed + 1, length)];
    const columns = [part(1), part(3)];
    columns[0][1][0] = columns[1][0][0];
    const plus = [part(5), part(7)];
    const minus = [part(9), part(11)];
    const v = normals(20, inputs * length);
    // Element by element, each shifted column g moved down by m taps.
    const want = new Float64Array(inputs * length);
    for (let r = 0; r < inputs; r++) {
      for (let k = 0; k < length; k++) {
        for (let s = 0; s < inputs; s++) {
          for (let l = 0; l < length; l++) {
            let element = k >= l ? columns[r][s][k - l] : columns[s][r][l - k];
            for (let m = 0; m <= Math.min(k, l); m++) {
              for (const g of plus) element += g[r][k - m] * g[s][l - m];
              for (const h of minus) element -= h[r][k - m] * h[s][l - m];
            }
            want[r * length + k] += element * v[s * length + l];
          }
        }
      }
    }
    const got = shiftSumOperator({ inputs, length, toeplitz: columns, plus, minus })(v);
    expect(relativeGap(got, want)).toBeLessThan(1e-14);
  });

  it.each([
    { inputs: 2, length: 1, stretches: 2 },
    { inputs: 1, length: 65, stretches: 1 },
    { inputs: 3, length: 40, stretches: 3 },
    { inputs: 2, length: 33, stretches: 2, windowing: 'autocorrelation' as const },
  ])('equal those of the matrix element by element for %o', async (shape) => {
    const { system } = await noiseSystem(shape, 4);
    const v = normals(6, system.size);
    const got = normalOperator(structureOf(system), 0.01)(v);
    expect(relativeGap(got, multiply(system, 0.01, v))).toBeLessThan(1e-14);
  });
});
