import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { randomCase, relativeGap, tapsByQr } from '../../support/leastSquaresCases';
import { solveTakes } from '../../support/takes';

describe('taps against dense least squares', () => {
  it('agree for random multi-take, multi-input cases within max(1e-12, 1e-14 κ)', async () => {
    await fc.assert(
      fc.asyncProperty(fc.integer({ min: 1, max: 1e9 }), async (seed) => {
        const c = randomCase(seed);
        const { solution } = await solveTakes(c.takes, c, c.regularisation, c.removeMean);
        if (!('coefficients' in solution)) throw new Error('not solvable');
        const got = solution.coefficients.flatMap((row) => Array.from(row));
        const want = tapsByQr(c);
        const bound = Math.max(1e-12, 1e-14 * solution.conditionNumber);
        expect(relativeGap(got, want)).toBeLessThan(bound);
      }),
      { numRuns: 40 },
    );
  });
});
