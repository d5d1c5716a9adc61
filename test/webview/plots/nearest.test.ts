import { describe, expect, it } from 'vitest';
import type { Curve } from '../../../webview/plots/data';
import { nearestIndex, nearestPoint, pointAfterKey } from '../../../webview/plots/nearest';

const curves: Curve[] = [
  { label: 'a', role: 'figure', x: [1, 2, 4, 8], y: [0, 0, Number.NaN, 0] },
  { label: 'b', role: 'figure2', x: [1, 2, 4, 8], y: [5, 5, 5, 5] },
];

describe('the nearest point', () => {
  it('is found by halving', () => {
    const rising = [1, 2, 4, 8];
    expect([-3, 1.4, 1.6, 2.9, 3.1, 99].map((value) => nearestIndex(rising, value))).toEqual([
      0, 0, 1, 1, 2, 3,
    ]);
    expect(nearestIndex([], 1)).toBe(-1);
  });

  it('is the nearest along x, then along y; gaps are no points', () => {
    const pixel = { x: (value: number) => 10 * value, y: (value: number) => 100 - 10 * value };
    expect(nearestPoint(curves, { x: 2.1, pixelX: 21, pixelY: 90 }, pixel)).toEqual({ curve: 0, index: 1 });
    expect(nearestPoint(curves, { x: 2.1, pixelX: 21, pixelY: 60 }, pixel)).toEqual({ curve: 1, index: 1 });
    expect(nearestPoint(curves, { x: 4, pixelX: 40, pixelY: 100 }, pixel)).toEqual({ curve: 1, index: 2 });
    expect(nearestPoint([], { x: 4, pixelX: 40, pixelY: 100 }, pixel)).toBeNull();
  });

  it('moves by keys, over gaps and between curves at the same x', () => {
    expect(pointAfterKey(curves, null, 'ArrowRight', false)).toEqual({ curve: 0, index: 0 });
    expect(pointAfterKey(curves, { curve: 0, index: 1 }, 'ArrowRight', false)).toEqual({
      curve: 0,
      index: 3,
    });
    expect(pointAfterKey(curves, { curve: 0, index: 3 }, 'ArrowLeft', false)).toEqual({ curve: 0, index: 1 });
    expect(pointAfterKey(curves, { curve: 0, index: 3 }, 'ArrowRight', true)).toEqual({ curve: 0, index: 3 });
    expect(pointAfterKey(curves, { curve: 0, index: 3 }, 'ArrowDown', false)).toEqual({ curve: 1, index: 3 });
    expect(pointAfterKey(curves, { curve: 1, index: 2 }, 'Home', false)).toEqual({ curve: 1, index: 0 });
    expect(pointAfterKey(curves, { curve: 0, index: 0 }, 'Tab', false)).toBeNull();
  });
});
