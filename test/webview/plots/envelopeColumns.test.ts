import { describe, expect, it } from 'vitest';
import type { Envelope } from '../../../core/protocol/messages';
import {
  columnsInView,
  coverage,
  suits,
  valueAt,
  wantedEnvelope,
} from '../../../webview/plots/envelopeColumns';

/** Low -k and high k for column k. */
function ramp(from: number, step: number, columns: number): Envelope {
  const high = Float64Array.from({ length: columns }, (_, k) => k);
  return { from, step, lanes: [{ lane: 'input:0', low: high.map((value) => -value), high }] };
}

describe('columns of an envelope', () => {
  it('lie at the middle of their samples', () => {
    const { x, high } = columnsInView(ramp(100, 10, 20), 0, { from: 100, to: 300 }, 400);
    expect(x.slice(0, 3).map((place) => Number(place.toFixed(9)))).toEqual([9, 29, 49]);
    expect(high).toEqual(Array.from({ length: 20 }, (_, k) => k));
  });

  it('reach one beyond either edge of the view', () => {
    const { x } = columnsInView(ramp(0, 10, 100), 0, { from: 200, to: 300 }, 100);
    expect(x[0]).toBeLessThan(0);
    expect(x[x.length - 1]).toBeGreaterThan(100);
    expect(x.length).toBeLessThanOrEqual(14);
  });

  it('are joined where several fall on one pixel, extremes kept', () => {
    const envelope = ramp(0, 1, 10_000);
    envelope.lanes[0].high[4321] = 1e6;
    const { x, low, high } = columnsInView(envelope, 0, { from: 0, to: 10_000 }, 100);
    expect(x.length).toBe(100);
    expect(Math.max(...high)).toBe(1e6);
    expect(Math.min(...low)).toBe(-9999);
  });

  it('keep gaps', () => {
    const envelope = ramp(0, 1, 1000);
    envelope.lanes[0].low.fill(Number.NaN, 400, 600);
    envelope.lanes[0].high.fill(Number.NaN, 400, 600);
    const { low } = columnsInView(envelope, 0, { from: 0, to: 1000 }, 50);
    expect(low.filter(Number.isNaN).length).toBe(10);
    expect(valueAt(envelope, 0, 500)).toBeNull();
    expect(valueAt(envelope, 0, 399.9)).toEqual({ low: -399, high: 399 });
    expect(valueAt(envelope, 0, 1000)).toBeNull();
  });
});

describe('what is asked for', () => {
  it('has room on either side, inside the take, and no more columns than are allowed', () => {
    expect(wantedEnvelope({ from: 1000, to: 2000 }, 120_000, 800)).toEqual({
      from: 500,
      to: 2500,
      columns: 1600,
    });
    expect(wantedEnvelope({ from: 0, to: 120_000 }, 120_000, 800)).toEqual({
      from: 0,
      to: 120_000,
      columns: 800,
    });
    expect(wantedEnvelope({ from: 0, to: 100 }, 120_000, 9000).columns).toBe(8192);
  });

  it('is not asked again while it covers the view finely enough', () => {
    const envelope = ramp(500, 1, 2000);
    expect(coverage(envelope)).toEqual({ from: 500, to: 2500 });
    expect(suits(envelope, { from: 700, to: 1700 }, 120_000, 800)).toBe(true);
    expect(suits(envelope, { from: 400, to: 1400 }, 120_000, 800)).toBe(false);
    expect(suits(ramp(0, 50, 2400), { from: 0, to: 120_000 }, 120_000, 800)).toBe(true);
    expect(suits(ramp(0, 50, 2400), { from: 0, to: 12_000 }, 120_000, 800)).toBe(false);
    expect(suits(null, { from: 0, to: 10 }, 10, 800)).toBe(false);
  });
});
