import { describe, expect, it } from 'vitest';
import { barRow, gripBox, lanesLayout, valuePixel } from '../../../webview/plots/lanesLayout';

describe('the layout of lanes', () => {
  it('has the bar of the fit above the lanes, the others below, nothing overlapping', () => {
    const { lanes, bars, axis, height } = lanesLayout(800, 3, {
      fit: true,
      heldOut: true,
      disturbanceOnly: true,
    });
    const rows = [
      [bars.fit! - barRow / 2, bars.fit! + barRow / 2],
      ...lanes.map((lane) => [lane.top, lane.top + lane.height]),
      [bars.heldOut! - barRow / 2, bars.heldOut! + barRow / 2],
      [bars.disturbanceOnly! - barRow / 2, bars.disturbanceOnly! + barRow / 2],
      [axis, height],
    ];
    for (let i = 1; i < rows.length; i++) expect(rows[i][0]).toBeGreaterThanOrEqual(rows[i - 1][1]);
  });

  it('leaves out rows of kinds that have no intervals', () => {
    const { bars } = lanesLayout(800, 1, { fit: true, heldOut: false, disturbanceOnly: false });
    expect(Object.keys(bars)).toEqual(['fit']);
  });

  it('tells the ends of neighbours that meet apart by where they are taken hold of', () => {
    const end = gripBox({ end: 'to' }, 300);
    const start = gripBox({ end: 'from' }, 300);
    const shared = end.left + end.width - start.left;
    expect(shared).toBeLessThanOrEqual(4);
    expect(end.left).toBeLessThan(300 - 10);
    expect(start.left + start.width).toBeGreaterThan(300 + 10);
  });

  it('puts the highest value on top, and a level signal in the middle', () => {
    const lane = { top: 100, height: 80 };
    expect(valuePixel(lane, { min: -1, max: 1 }, 0)).toBe(140);
    expect(valuePixel(lane, { min: -1, max: 1 }, 1)).toBeGreaterThan(100);
    expect(valuePixel(lane, { min: -1, max: 1 }, 1)).toBeLessThan(110);
    expect(valuePixel(lane, { min: 3, max: 3 }, 3)).toBe(140);
  });
});
