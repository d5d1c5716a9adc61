import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { sayWithPlace } from '../../../../core/findings/say';
import { openBytes, timedText } from '../../../support/textBytes';

// Expectations by own reasoning: what is done to the even times is what must be found. Printed to a resolution r, times
// give the period within r / span of itself; a rounder number that the print still allows lies as far off at most again.

const round = { nearest: Math.round, down: Math.floor, up: Math.ceil };

describe('times that are even but for the print', () => {
  it('are even, whichever way they are rounded', async () => {
    for (const digits of [3, 4, 6, 9]) {
      for (const way of Object.values(round)) {
        const print = (time: number) => (way(time * 10 ** digits) / 10 ** digits).toFixed(digits);
        const { recording, findings } = await openBytes(timedText((n) => n / 2000, print));
        expect(findings).toEqual([]);
        const allowed = (2 * 10 ** -digits) / (999 / (2000 / 3));
        expect(Math.abs(2000 / 3 / recording!.sampleRate! - 1)).toBeLessThanOrEqual(allowed + 1e-12);
      }
    }
  });

  it('give the rate within what the print allows', async () => {
    const property = fc.asyncProperty(
      fc.double({ min: 20, max: 2000, noNaN: true }),
      fc.integer({ min: 2, max: 7 }),
      fc.constantFrom(...Object.keys(round)),
      fc.integer({ min: 50, max: 400 }),
      async (rate, digits, way, rows) => {
        const span = (rows - 1) / rate;
        fc.pre(10 ** -digits < 0.02 * span);
        const print = (n: number) =>
          (round[way as keyof typeof round]((n / rate) * 10 ** digits) / 10 ** digits).toFixed(digits);
        const text = Array.from({ length: rows }, (_, n) => `${print(n)},${(n * 7) % 5}\n`).join('');
        const { recording, findings } = await openBytes(`time,a\n${text}`);
        expect(findings).toEqual([]);
        const allowed = (2 * 10 ** -digits) / span;
        expect(Math.abs(rate / recording!.sampleRate! - 1)).toBeLessThanOrEqual(allowed + 1e-9);
      },
    );
    await fc.assert(property, { numRuns: 300, seed: 1 });
  });

  it('may repeat because they are printed coarsely', async () => {
    const { recording, findings } = await openBytes(
      timedText(
        () => 0,
        (time) => time.toFixed(2),
      ),
    );
    expect(findings).toEqual([]);
    expect(Math.abs(1000 / recording!.sampleRate! - 1)).toBeLessThanOrEqual(0.01 / 0.99);
  });
});

describe('jitter', () => {
  // 60 µs late every other row: steps of 1,060 and 940 µs, 6 hundredths of a sample.
  const late = (n: number) => (n % 2 === 1 ? 60e-6 : 0);

  it('is told in microseconds and samples, and the mean rate is kept', async () => {
    const { recording, findings } = await openBytes(timedText(late));
    expect(findings).toMatchObject([{ code: 'uneven-time', severity: 'caution' }]);
    expect(sayWithPlace(findings[0])).toMatch(/940 µs to 1,060 µs about 1,000 µs, up to 0\.06 of a sample/);
    expect(Math.abs(recording!.sampleRate! / 1000 - 1)).toBeLessThan(61e-6 / 0.999);
  });

  it('is told where the first time is printed as 0', async () => {
    const { findings } = await openBytes(timedText(late, (time) => String(Number(time.toFixed(6)))));
    expect(findings).toMatchObject([{ code: 'uneven-time', severity: 'caution' }]);
  });

  it('is not told below a thousandth of a sample', async () => {
    const { findings } = await openBytes(
      timedText(
        (n) => 1e-6 * 0.4 * (n % 2),
        (time) => time.toFixed(9),
      ),
    );
    expect(findings).toEqual([]);
  });

  it('is not told where it is no more than the last digit', async () => {
    const { findings } = await openBytes(
      timedText(
        (n) => 10e-6 * (n % 2),
        (time) => time.toFixed(5),
      ),
    );
    expect(findings).toEqual([]);
  });
});
