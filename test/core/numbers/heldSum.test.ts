import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type RoundingCost, roundErrorAware, roundingCost } from '../../../core/numbers/errorAwareRounding';
import { holdSum } from '../../../core/numbers/heldSum';
import { wordRange } from '../../../core/numbers/words';
import { normals } from '../../support/random';

/** `decay^|i-j|`: positive definite. */
const cost = (size: number): RoundingCost => ({
  size,
  element: (i, j) => 0.9 ** Math.abs(i - j),
  factor: null,
});

const sum = (values: Float64Array, weights: Float64Array) =>
  values.reduce((total, value, i) => total + weights[i] * value, 0);

describe('holdSum', () => {
  it('reaches every sum that the weights and the word allow', () => {
    fc.assert(
      fc.property(
        fc.array(
          fc.record({
            target: fc.double({ min: -100, max: 100, noNaN: true }),
            weight: fc.constantFrom(-2, -1, 0, 1, 2),
          }),
          { minLength: 1, maxLength: 12 },
        ),
        fc.integer({ min: -60, max: 60 }),
        (entries, off) => {
          const targets = Float64Array.from(entries, ({ target }) => target);
          const weights = Float64Array.from(entries, ({ weight }) => weight);
          const range = wordRange(8);
          const values = roundErrorAware(targets, cost(targets.length), range);
          const total = sum(values, weights) + off;
          const done = holdSum(values, targets, cost(targets.length), range, { weights, total });
          if (done) expect(sum(values, weights)).toBe(total);
          else {
            // Refused for one of the three reasons there are.
            const odd = entries.every(({ weight }) => weight % 2 === 0) && Math.abs(off) % 2 === 1;
            const reach = Array.from(
              weights,
              (w) => Math.abs(w) * (w > 0 === total > 0 ? range.max : -range.min),
            );
            const beyond = Math.abs(total) > reach.reduce((a, b) => a + b, 0) - 4;
            const room = weights.every(
              (w, i) => w === 0 || values[i] === range.min || values[i] === range.max,
            );
            expect(odd || beyond || room || Math.abs(total - sum(values, weights)) === 1).toBe(true);
          }
          for (const value of values) expect(Number.isInteger(value) && Math.abs(value) <= 128).toBe(true);
        },
      ),
      { numRuns: 500 },
    );
  });

  it('costs no more than the best of all integers near by, give or take a fifth', () => {
    // Exhaustive search over four values, three integers each.
    for (let seed = 0; seed < 40; seed++) {
      const targets = normals(seed, 4).map((value) => 5 * value);
      const weights = Float64Array.of(1, 1, 1, 1);
      const total = Math.round(sum(targets, weights));
      const got = roundErrorAware(targets, cost(4), wordRange(8));
      expect(holdSum(got, targets, cost(4), wordRange(8), { weights, total })).toBe(true);
      let best = Number.POSITIVE_INFINITY;
      const base = targets.map(Math.floor);
      for (let code = 0; code < 4 ** 4; code++) {
        const values = base.map((b, i) => b - 1 + (Math.floor(code / 4 ** i) % 4));
        if (sum(values, weights) === total) best = Math.min(best, roundingCost(values, targets, cost(4)));
      }
      expect(roundingCost(got, targets, cost(4))).toBeLessThanOrEqual(1.2 * best + 1e-9);
    }
  });

  it('says no where all weights are even and the sum is odd', () => {
    const targets = Float64Array.of(1.2, 3.4);
    const values = Float64Array.of(1, 3);
    expect(
      holdSum(values, targets, cost(2), wordRange(8), { weights: Float64Array.of(2, 2), total: 7 }),
    ).toBe(false);
  });
});
