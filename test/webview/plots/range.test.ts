import { describe, expect, it } from 'vitest';
import type { Axis, Curve } from '../../../webview/plots/data';
import { horizontalRange, padded, verticalRange } from '../../../webview/plots/range';

const linear: Axis = { label: 'Power', unit: 'dB' };
const logarithmic: Axis = { label: 'Length', unit: 'taps', scale: 'logarithmic' };
const curve: Curve = { label: 'a', role: 'figure', x: [1, 10, 100], y: [0, Number.NaN, 10] };

describe('ranges of axes', () => {
  it('hold every finite value, error bars, levels and places', () => {
    const errors = [2, 0, 3];
    const { min, max } = verticalRange(
      { curves: [{ ...curve, errors }], marks: [{ kind: 'level', y: -20, label: 'limit' }] },
      linear,
    );
    expect(min).toBeLessThan(-20);
    expect(max).toBeGreaterThan(13);
    expect(max).toBeLessThan(16);
  });

  it('are not flattened by a shaded interval that reaches far', () => {
    const low = [-2, Number.NaN, -500];
    const { min } = verticalRange({ curves: [{ ...curve, low, high: [2, 2, 12] }], marks: [] }, linear);
    expect(min).toBeLessThan(-9.9);
    expect(min).toBeGreaterThan(-13);
  });

  it('leave out what a logarithmic axis has no place for', () => {
    const range = horizontalRange({ curves: [{ ...curve, x: [0, 10, 100] }], marks: [] }, logarithmic);
    expect(range).toEqual({ min: 10, max: 100 });
  });

  it('have a width even for one value or none', () => {
    for (const range of [
      padded(null, 0.1),
      padded({ min: 0, max: 0 }, 0.1),
      padded({ min: -5, max: -5 }, 0.1),
      padded({ min: 64, max: 64 }, 0.1, true),
    ]) {
      expect(range.max).toBeGreaterThan(range.min);
    }
  });

  it('hold zero where stems stand on it', () => {
    const { min } = verticalRange(
      { curves: [{ ...curve, y: [3, 4, 5], style: 'stems' }], marks: [] },
      linear,
    );
    expect(min).toBeLessThanOrEqual(0);
  });
});
