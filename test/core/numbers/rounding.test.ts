import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type RoundingCost, roundErrorAware, roundingCost } from '../../../core/numbers/errorAwareRounding';
import { fits, fittingFractionBits } from '../../../core/numbers/fractionBits';
import { clamp, powerOfTwo, roundHalfUp, wordRange, wrap } from '../../../core/numbers/words';
import { factorCholesky } from '../../../core/solvers/cholesky';
import { normals } from '../../support/random';

/** Cost matrix of a coloured input, a second-order resonance, and its factor. */
function resonantCost(size: number): RoundingCost & { factor: Float64Array } {
  const impulse = new Float64Array(4000);
  for (let n = 0; n < impulse.length; n++) {
    impulse[n] = (n === 0 ? 1 : 0) + 1.8 * (impulse[n - 1] ?? 0) - 0.95 * (impulse[n - 2] ?? 0);
  }
  const r = Array.from({ length: size }, (_, lag) => {
    let sum = 0;
    for (let n = lag; n < impulse.length; n++) sum += impulse[n] * impulse[n - lag];
    return sum;
  });
  const matrix = new Float64Array(size * size);
  for (let i = 0; i < size; i++) for (let j = 0; j <= i; j++) matrix[i * size + j] = r[i - j];
  const factored = factorCholesky(matrix, size);
  if ('order' in factored) throw new Error('not factored');
  return { size, element: (i, j) => r[i - j], factor: factored.factor };
}

describe('roundErrorAware', () => {
  it('never costs more than plain rounding, and stays in the word', () => {
    const size = 12;
    const cost = resonantCost(size);
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -140, max: 140, noNaN: true }), { minLength: size, maxLength: size }),
        (targets) => {
          const steps = Float64Array.from(targets);
          const got = roundErrorAware(steps, cost, wordRange(8));
          const plain = steps.map((value) => clamp(roundHalfUp(value), wordRange(8)));
          expect(roundingCost(got, steps, cost)).toBeLessThanOrEqual(
            roundingCost(plain, steps, cost) * (1 + 1e-12),
          );
          for (const value of got) {
            expect(Number.isInteger(value)).toBe(true);
            expect(value).toBeGreaterThanOrEqual(-128);
            expect(value).toBeLessThanOrEqual(127);
          }
        },
      ),
      { numRuns: 300 },
    );
  });

  it('is worth several decibels on a resonant input', () => {
    const size = 64;
    const cost = resonantCost(size);
    const steps = normals(1, size).map((value) => 30 * value);
    const plain = steps.map(roundHalfUp);
    const gain =
      roundingCost(plain, steps, cost) /
      roundingCost(roundErrorAware(steps, cost, wordRange(8)), steps, cost);
    expect(10 * Math.log10(gain)).toBeGreaterThan(4);
  });

  // Babai, Combinatorica 6, 1986 (from memory): each part of Gᵀδ is at most half its diagonal element.
  it('keeps within the bound of nearest-plane rounding where the word does not clamp', () => {
    const size = 16;
    const cost = resonantCost(size);
    let bound = 0;
    for (let j = 0; j < size; j++) bound += cost.factor[j * size + j] ** 2 / 4;
    for (let seed = 0; seed < 50; seed++) {
      const steps = normals(seed, size).map((value) => 20 * value);
      const got = roundErrorAware(steps, cost, wordRange(16));
      expect(roundingCost(got, steps, cost)).toBeLessThanOrEqual(bound);
    }
  });
});

describe('fraction bits', () => {
  it('are as many as the largest coefficient allows', () => {
    expect(fittingFractionBits([Float64Array.of(0.5, -0.9)], wordRange(16), 40)).toBe(15);
    expect(fittingFractionBits([Float64Array.of(1, -0.9)], wordRange(16), 40)).toBe(14);
    // -1 fits where +1 does not.
    expect(fittingFractionBits([Float64Array.of(-1)], wordRange(16), 40)).toBe(15);
    // Rounding up to 32768 does not fit either.
    expect(fittingFractionBits([Float64Array.of(0.99999)], wordRange(16), 40)).toBe(14);
    expect(fittingFractionBits([Float64Array.of(1e-9)], wordRange(16), 20)).toBe(18);
    expect(fittingFractionBits([Float64Array.of(40000)], wordRange(16), 40)).toBeNull();
  });

  it('agree with fits() at the border', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -200, max: 200, noNaN: true }),
        fc.constantFrom(8, 12, 16, 24, 32),
        (c, word) => {
          const row = [Float64Array.of(c)];
          const bits = fittingFractionBits(row, wordRange(word), 64);
          expect(fits(row, wordRange(word), bits ?? 0)).toBe(bits !== null);
          if (bits !== null && bits < 62) expect(fits(row, wordRange(word), bits + 1)).toBe(false);
        },
      ),
    );
  });
});

describe('words', () => {
  it('wrap as two’s complement does', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -(2 ** 40), max: 2 ** 40 }),
        fc.integer({ min: 2, max: 32 }),
        (value, bits) => {
          expect(BigInt(wrap(value, wordRange(bits)))).toBe(BigInt.asIntN(bits, BigInt(value)));
        },
      ),
    );
    expect(powerOfTwo(-3)).toBe(0.125);
    expect(powerOfTwo(62)).toBe(2 ** 62);
  });

  // Bennett, Bell Syst. Tech. J. 1948 (from memory): 6.02 B + 1.76 dB for a full-scale sine, noise power q²/12.
  it.each([8, 12, 16])(
    'give a full-scale sine of %i bits the signal-to-noise ratio of 6.02 B + 1.76 dB',
    (bits) => {
      const q = 2 / 2 ** bits;
      let signal = 0;
      let noise = 0;
      const count = 200_000;
      for (let n = 0; n < count; n++) {
        const x = (1 - q) * Math.sin(n * Math.sqrt(2));
        const e = roundHalfUp(x / q) * q - x;
        signal += x * x;
        noise += e * e;
      }
      expect(10 * Math.log10(signal / noise)).toBeCloseTo(6.0206 * bits + 1.76, 0);
      expect(noise / count / ((q * q) / 12)).toBeCloseTo(1, 1);
    },
  );
});
