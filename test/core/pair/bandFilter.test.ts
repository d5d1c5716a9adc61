import { execFileSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { type BandFilter, bandFilter } from '../../../core/pair/bandFilter';
import { bandPass, bandReader } from '../../../core/pair/bandSignals';
import { signalReader } from '../../../core/pair/signals';
import { needs, python } from '../../support/programs';
import { normals } from '../../support/random';
import { takeOf } from '../../support/takes';

const rate = 8000;

function filterOf(from: number, to: number): BandFilter {
  const filter = bandFilter({ from, to }, rate);
  if ('code' in filter) throw new Error(filter.code);
  return filter;
}

/** Gain at a frequency in Hz, the delay taken off. */
function gainAt({ taps, history }: BandFilter, frequency: number): number {
  return taps.reduce(
    (sum, b, j) => sum + b * Math.cos((2 * Math.PI * frequency * (j - history / 2)) / rate),
    0,
  );
}

describe('bandFilter', () => {
  it.each([
    [300, 700],
    [0, 250],
    [1000, 4000],
    [2500, 2600],
  ])('passes %i to %i Hz within 1e-4 and stops the rest to 1e-4', (from, to) => {
    const filter = filterOf(from, to);
    const half = Math.min((to - from) / 8, from > 0 ? from : rate, to < rate / 2 ? rate / 2 - to : rate);
    for (let f = 0; f <= rate / 2; f += 2) {
      const gain = gainAt(filter, f);
      const inside = (from === 0 || f >= from + half) && (to === rate / 2 || f <= to - half);
      const outside = (from > 0 && f <= from - half) || (to < rate / 2 && f >= to + half);
      if (inside) expect(Math.abs(gain - 1), `${f} Hz`).toBeLessThan(1e-4);
      if (outside) expect(Math.abs(gain), `${f} Hz`).toBeLessThan(1e-4);
    }
    for (const edge of [from, to]) {
      if (edge > 0 && edge < rate / 2) expect(gainAt(filter, edge)).toBeCloseTo(0.5, 3);
    }
    expect([...filter.taps].reverse()).toEqual([...filter.taps]);
  });

  it.skipIf(!needs('scipy'))('has the taps of scipy.signal.firwin with a Kaiser window', () => {
    const bands = [
      [300, 700],
      [0, 250],
      [1000, 4000],
    ];
    const designed = bands.map(([from, to]) => filterOf(from, to).taps);
    const script = `import json, sys, scipy.signal as s
for low, high, taps in json.load(sys.stdin):
    zero = 'lowpass' if low == 0 else 'highpass' if high == ${rate / 2} else 'bandpass'
    edges = [f for f in (low, high) if 0 < f < ${rate / 2}]
    print(json.dumps(list(s.firwin(taps, edges, fs=${rate}, window=('kaiser', 0.1102 * (82 - 8.7)), pass_zero=zero, scale=False))))`;
    const input = JSON.stringify(bands.map((band, i) => [...band, designed[i].length]));
    const lines = execFileSync(python, ['-c', script], { input, encoding: 'utf8' }).trim().split('\n');
    designed.forEach((taps, i) => {
      const expected: number[] = JSON.parse(lines[i]);
      taps.forEach((b, j) => {
        expect(Math.abs(b - expected[j])).toBeLessThan(1e-14);
      });
    });
  });

  it('is one tap of 1 for all frequencies', () => {
    expect(filterOf(0, rate / 2)).toEqual({ taps: Float64Array.of(1), history: 0 });
  });

  it('refuses what is beyond half the rate, and what would take too many taps, and says what asks for them', () => {
    expect(bandFilter({ from: 100, to: 4001 }, rate)).toEqual({ code: 'band-beyond-rate', limit: 4000 });
    expect(bandFilter({ from: 100, to: 101 }, rate)).toMatchObject({
      code: 'band-too-narrow',
      what: 'its width',
    });
    expect(bandFilter({ from: 0.5, to: 1000 }, rate)).toMatchObject({
      code: 'band-too-narrow',
      what: 'its lower edge, so close to 0 Hz,',
    });
    expect(bandFilter({ from: 500, to: 3999.5 }, rate)).toMatchObject({
      code: 'band-too-narrow',
      what: 'its upper edge, so close to half the sample rate,',
    });
  });
});

describe('bandPass and bandReader', () => {
  const filter = filterOf(300, 700);
  const x = normals(1, 4000);
  const d = normals(2, 4000);
  const means = { inputs: [0.25], desired: -1 };
  const direct = (row: Float64Array, mean: number, n: number) =>
    filter.taps.reduce((sum, b, j) => sum + b * ((row[n - j] ?? mean) - mean), 0);

  it('filters each row as the sum over its taps says (written out here)', () => {
    const [short, long] = bandPass(filter)([x.subarray(0, filter.history + 3), d]);
    expect(short.length).toBe(3);
    expect(long.length).toBe(4000 - filter.history);
    short.forEach((value, n) => {
      expect(value).toBeCloseTo(direct(x, 0, n + filter.history), 12);
    });
    for (const n of [0, 1, 999, long.length - 1]) {
      expect(long[n]).toBeCloseTo(direct(d, 0, n + filter.history), 12);
    }
  });

  it('keeps the timing of x[n-k] and d[n-delay], history and zeros outside the recording included', async () => {
    for (const delay of [0, 7, -5]) {
      const read = bandReader(signalReader(takeOf([x], d), { means, delay }), filter);
      for (const [from, to, history] of [
        [500, 700, 40],
        [0, 30, 10],
        [3990, 4100, 3],
      ]) {
        const { inputs, desired } = await read(from, to, history);
        expect([inputs[0].length, desired.length]).toEqual([to - from + history, to - from]);
        inputs[0].forEach((value, k) => {
          expect(value).toBeCloseTo(direct(x, 0.25, from - history + k), 12);
        });
        desired.forEach((value, k) => {
          expect(value).toBeCloseTo(direct(d, -1, from + k - delay), 12);
        });
      }
    }
  });
});
