import { describe, expect, it } from 'vitest';
import { evenRows, keptPoints } from '../../../webview/plots/thin';

describe('thinning of points', () => {
  const count = 100_000;
  const y = Float64Array.from({ length: count }, (_, i) => Math.sin(i / 50));
  y[54_321] = 9;
  y[54_325] = -9;
  y.fill(Number.NaN, 70_000, 74_000);
  const kept = keptPoints(count, (i) => (i / count) * 300, [y], 300);

  it('keeps at most five a column, in rising order, the first and the last among them', () => {
    expect(kept.length).toBeLessThanOrEqual(5 * 300);
    expect(kept.every((index, i) => i === 0 || index > kept[i - 1])).toBe(true);
    expect([kept[0], kept[kept.length - 1]]).toEqual([0, count - 1]);
  });

  it('loses no peak and no gap', () => {
    expect(kept).toContain(54_321);
    expect(kept).toContain(54_325);
    const inGap = kept.filter((index) => index >= 70_000 && index < 74_000);
    expect(inGap.length).toBeGreaterThan(0);
  });

  it('keeps the extremes of every series', () => {
    const high = y.slice();
    high[12_345] = 40;
    expect(keptPoints(count, (i) => (i / count) * 300, [y, high], 300)).toContain(12_345);
  });

  it('leaves out points without a place, and few points alone', () => {
    expect(keptPoints(4, (i) => (i === 0 ? Number.NaN : i), [[1, 2, 3, 4]], 300)).toEqual([1, 2, 3]);
  });
});

describe('thinning of rows', () => {
  it('is even and keeps both ends', () => {
    expect(evenRows(3, 500)).toEqual([0, 1, 2]);
    const rows = evenRows(4001, 500);
    expect(rows.length).toBe(500);
    expect([rows[0], rows[499]]).toEqual([0, 4000]);
    expect(new Set(rows).size).toBe(500);
    const steps = rows.slice(1).map((row, i) => row - rows[i]);
    expect(Math.max(...steps) - Math.min(...steps)).toBeLessThanOrEqual(1);
  });
});
