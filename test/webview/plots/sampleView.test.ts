import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  clampView,
  panView,
  pixelOf,
  sampleAt,
  viewAfterKey,
  viewHolding,
  viewOf,
  wheelFactor,
  zoomView,
} from '../../../webview/plots/sampleView';

const samples = 120_000;
const keys = ['+', '-', '0', 'ArrowLeft', 'ArrowRight', 'PageUp', 'PageDown', 'Home', 'End'];

describe('the view of samples', () => {
  it('stays inside the take whatever is pressed', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 200_000 }),
        fc.array(fc.constantFrom(...keys)),
        (length, pressed) => {
          let view = { from: 0, to: length };
          for (const key of pressed) view = viewAfterKey(view, key, length)!;
          expect(view.from).toBeGreaterThanOrEqual(-1e-6);
          expect(view.to).toBeLessThanOrEqual(length + 1e-6);
          expect(view.to - view.from).toBeGreaterThanOrEqual(Math.min(16, length) - 1e-6);
        },
      ),
    );
  });

  it('keeps the sample under the pointer where it is', () => {
    const view = { from: 10_000, to: 50_000 };
    const at = sampleAt(view, 800, 200);
    expect(at).toBe(20_000);
    expect(pixelOf(zoomView(view, 0.5, at, samples), 800, at)).toBeCloseTo(200, 6);
  });

  it('comes back by zooming out again', () => {
    const view = { from: 10_000, to: 50_000 };
    const back = zoomView(zoomView(view, 0.5, 33_333, samples), 2, 33_333, samples);
    expect(back.from).toBeCloseTo(view.from, 6);
    expect(back.to).toBeCloseTo(view.to, 6);
  });

  it('pans as far as there are samples, its length kept', () => {
    expect(panView({ from: 100, to: 200 }, -500, samples)).toEqual({ from: 0, to: 100 });
    expect(panView({ from: 100, to: 200 }, 1e9, samples)).toEqual({ from: samples - 100, to: samples });
    expect(viewAfterKey({ from: 100, to: 200 }, 'a', samples)).toBeNull();
  });

  it('takes in what it is led to', () => {
    const all = { from: 0, to: samples };
    const led = viewOf({ from: 30_000, to: 30_040 }, all, samples);
    expect(led).toEqual({ from: 29_920, to: 30_120 });
    expect(viewOf({ from: 30_000, to: 30_040 }, led, samples)).toBe(led);
    expect(viewOf({ from: 0, to: 10 }, all, samples).from).toBe(0);
    expect(viewHolding(50, { from: 100, to: 200 }, samples)).toEqual({ from: 45, to: 145 });
    expect(viewHolding(150, { from: 100, to: 200 }, samples)).toEqual({ from: 100, to: 200 });
  });

  it('grows around its middle where it was too small', () => {
    expect(clampView({ from: 100, to: 102 }, samples)).toEqual({ from: 93, to: 109 });
    expect(clampView({ from: -5, to: 5000 }, 100)).toEqual({ from: 0, to: 100 });
  });

  it('zooms in by turning the wheel up, in pixels or lines, at most by e at once', () => {
    expect(wheelFactor(-100, 0)).toBeCloseTo(1 / wheelFactor(100, 0), 12);
    expect(wheelFactor(-100, 0)).toBeLessThan(1);
    expect(wheelFactor(5, 1)).toBeCloseTo(wheelFactor(100, 0), 12);
    expect(wheelFactor(1e6, 0)).toBeCloseTo(Math.E, 12);
  });
});
