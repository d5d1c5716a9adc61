import { describe, expect, it } from 'vitest';
import { linearTicks, logarithmicTicks, niceStep, tickText } from '../../../webview/plots/ticks';

describe('ticks', () => {
  it('steps by 1, 2 or 5 times a power of ten', () => {
    expect(niceStep(60, 6)).toBe(10);
    expect(niceStep(61, 6)).toBe(20);
    expect(niceStep(0.3, 3)).toBeCloseTo(0.1, 12);
    expect(niceStep(0, 5)).toBe(1);
  });

  it('are multiples of the step inside the range, never more than asked for and one', () => {
    expect(linearTicks(-25.3, -3, 5)).toEqual({ values: [-25, -20, -15, -10, -5], step: 5 });
    expect(linearTicks(-0.31, 0.29, 3).values).toEqual([-0.2, 0, 0.2]);
    for (let span = 0.001; span < 1e6; span *= 1.7) {
      const { values, step } = linearTicks(-span / 3, span, 6);
      expect(values.length).toBeGreaterThanOrEqual(2);
      expect(values.length).toBeLessThanOrEqual(7);
      expect([1, 2, 5]).toContain(Number((step / 10 ** Math.floor(Math.log10(step) + 1e-9)).toFixed(6)));
    }
  });

  it('on a logarithmic axis thin out from 1-2-5 over decades to every other decade', () => {
    expect(logarithmicTicks(1, 100, 10)).toEqual([1, 2, 5, 10, 20, 50, 100]);
    expect(logarithmicTicks(1, 100, 4)).toEqual([1, 10, 100]);
    expect(logarithmicTicks(1e-10, 1, 6)).toEqual([1e-10, 1e-8, 1e-6, 1e-4, 0.01, 1]);
    expect(logarithmicTicks(30, 44, 4)).toEqual([30, 35, 40]);
    expect(logarithmicTicks(0, 10, 4)).toEqual([]);
  });

  it('have the digits their step needs, a true minus sign and no minus zero', () => {
    expect(tickText(0.30000000000000004, 0.1)).toBe('0.3');
    expect(tickText(-5, 5)).toBe('−5');
    expect(tickText(1200, 200)).toBe('1,200');
    expect(tickText(-0, 1)).toBe('0');
    expect(tickText(0.00002, 0.00001)).toBe('2e−5');
  });
});
