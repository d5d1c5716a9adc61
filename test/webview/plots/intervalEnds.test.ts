import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { endAfterKey, endLimits, endsOf, type Intervals, withEnd } from '../../../webview/plots/intervalEnds';

const intervals: Intervals = {
  fit: [{ from: 4000, to: 70_000 }],
  heldOut: [
    { from: 72_000, to: 100_000 },
    { from: 100_000, to: 118_000 },
  ],
  disturbanceOnly: [],
};
const samples = 120_000;

describe('ends of intervals', () => {
  it('are listed kind by kind', () => {
    expect(endsOf(intervals).map(({ kind, number, end }) => `${kind} ${number} ${end}`)).toEqual([
      'fit 0 from',
      'fit 0 to',
      'heldOut 0 from',
      'heldOut 0 to',
      'heldOut 1 from',
      'heldOut 1 to',
    ]);
  });

  it('stay in the take, apart from each other and off their neighbours', () => {
    expect(endLimits(intervals, { kind: 'fit', number: 0, end: 'from' }, samples)).toEqual({
      min: 0,
      max: 69_999,
    });
    expect(endLimits(intervals, { kind: 'fit', number: 0, end: 'to' }, samples)).toEqual({
      min: 4001,
      max: samples,
    });
    expect(endLimits(intervals, { kind: 'heldOut', number: 0, end: 'to' }, samples).max).toBe(100_000);
    expect(endLimits(intervals, { kind: 'heldOut', number: 1, end: 'from' }, samples).min).toBe(100_000);
  });

  it('lie on whole samples wherever they are dragged', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e6, max: 1e6, noNaN: true }),
        fc.constantFrom(...endsOf(intervals)),
        (sample, end) => {
          const { from, to } = withEnd(intervals, end, sample, samples);
          expect(Number.isInteger(from) && Number.isInteger(to)).toBe(true);
          expect(from).toBeGreaterThanOrEqual(0);
          expect(to).toBeLessThanOrEqual(samples);
          expect(from).toBeLessThan(to);
        },
      ),
    );
    expect(withEnd(intervals, { kind: 'fit', number: 0, end: 'to' }, 71_234.6, samples).to).toBe(71_235);
  });

  it('move by a pixel, by ten with shift, by a sample at least', () => {
    const limits = { min: 0, max: 1000 };
    expect(endAfterKey(500, 'ArrowRight', false, 7.2, limits)).toBe(507);
    expect(endAfterKey(500, 'ArrowLeft', true, 7.2, limits)).toBe(430);
    expect(endAfterKey(500, 'ArrowRight', false, 0.01, limits)).toBe(501);
    expect(endAfterKey(995, 'ArrowRight', true, 7.2, limits)).toBe(1000);
    expect(endAfterKey(500, 'Home', false, 7.2, limits)).toBe(0);
    expect(endAfterKey(500, '+', false, 7.2, limits)).toBeNull();
  });
});
