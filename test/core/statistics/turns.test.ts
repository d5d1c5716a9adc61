import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cosineOfTurns, sineOfTurns } from '../../../core/statistics/turns';

describe('cosine and sine of turns', () => {
  // Against the engine's own functions, whose last digit may differ.
  it('are those of the engine to a few units of the last place of 1', () => {
    fc.assert(
      fc.property(fc.double({ min: -4, max: 4, noNaN: true }), (turns) => {
        // Whole turns come off exactly; 2π times what is left is wrong by up to 4e-16.
        const angle = 2 * Math.PI * (turns - Math.round(turns));
        expect(Math.abs(cosineOfTurns(turns) - Math.cos(angle))).toBeLessThan(1e-15);
        expect(Math.abs(sineOfTurns(turns) - Math.sin(angle))).toBeLessThan(1e-15);
      }),
      { numRuns: 5000 },
    );
  });

  it('are exact at quarters of a turn, whole turns away too', () => {
    for (const whole of [-3, 0, 7, 2 ** 40]) {
      expect([0, 0.25, 0.5, 0.75].map((q) => cosineOfTurns(whole + q) + 0)).toEqual([1, 0, -1, 0]);
      expect([0, 0.25, 0.5, 0.75].map((q) => sineOfTurns(whole + q) + 0)).toEqual([0, 1, 0, -1]);
    }
  });
});
