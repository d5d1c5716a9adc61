import { describe, expect, it } from 'vitest';
import { curveColumns, joinRows, markRows } from '../../../webview/plots/curveTable';
import type { Curve } from '../../../webview/plots/data';

const curve = (x: number[], y: number[]): Curve => ({ label: 'a', role: 'figure', x, y });
const words = {
  error: (l: string) => `± ${l}`,
  from: (l: string) => `${l} from`,
  to: (l: string) => `${l} to`,
};
const x = { label: 'Length', unit: 'taps' };
const y = { label: 'NMSE', unit: 'dB' };

describe('the table of curves', () => {
  it('joins curves on their x', () => {
    const rows = joinRows([curve([1, 2, 4], [0, 0, 0]), curve([2, 3], [0, 0])]);
    expect(Array.from(rows.x)).toEqual([1, 2, 3, 4]);
    expect([0, 1, 2, 3].map((row) => rows.index(0, row))).toEqual([0, 1, -1, 2]);
    expect([0, 1, 2, 3].map((row) => rows.index(1, row))).toEqual([-1, 0, 1, -1]);
  });

  it('has a column for x, each curve, its error and the ends of its interval', () => {
    const a = { ...curve([1, 2], [-3.14, Number.NaN]), errors: [0.5, 0.5], low: [-4, -4], high: [-2, -2] };
    const { rows, columns } = curveColumns([a], x, y, words);
    expect(rows).toBe(2);
    expect(columns.map(({ label }) => label)).toEqual([
      'Length (taps)',
      'a (dB)',
      '± a (dB)',
      'a (dB) from',
      'a (dB) to',
    ]);
    expect(columns.map(({ value, show }) => show(value(0)))).toEqual(['1', '−3.1', '0.5', '−4.0', '−2.0']);
    expect(columns[1].show(columns[1].value(1))).toBe('–');
  });

  it('lists marks', () => {
    const rows = markRows(
      [
        { kind: 'level', y: -25.33, label: 'limit' },
        { kind: 'place', shape: 'now', x: 64, y: -22, label: 'present' },
        { kind: 'span', from: 3, to: 5, label: 'unknown' },
      ],
      x,
      y,
    );
    expect(rows).toEqual([
      ['limit', '', '−25.3'],
      ['present', '64', '−22.0'],
      ['unknown', '3 – 5', ''],
    ]);
  });
});
