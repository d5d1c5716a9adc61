import { describe, expect, it } from 'vitest';
import { normals } from '../../../support/random';
import { codesOf, only, scaled, signal, sum, survey } from './signals';

// Checks of a channel as a whole, and of channels beside each other.

const N = 20_000;
const seeds = 20;
const constant = (value: number) => signal(N, () => value);

describe('offset', () => {
  it('is a note from twice the rms of what varies on', async () => {
    for (let seed = 1; seed <= seeds; seed++) {
      const noise = normals(seed, N);
      const found = only(await survey([sum(noise, constant(-3))]), 'offset');
      expect(found.severity).toBe('note');
      expect(Number(found.values.mean)).toBeCloseTo(-3, 1);
      expect(Number(found.values.varying)).toBeCloseTo(1, 1);
      expect(Number(found.values.ratio)).toBeCloseTo(3, 0);
      expect(await codesOf([sum(noise, constant(2.1))])).toEqual(['offset']);
      expect(await codesOf([sum(noise, constant(-1.9))])).toEqual([]);
      expect(await codesOf([sum(scaled(noise, 1e-3), constant(9.81))])).toEqual(['offset']);
    }
  });

  it('is none of a constant', async () => {
    expect(await codesOf([constant(7)])).toEqual([]);
    expect(await codesOf([constant(0.1)])).toEqual([]);
  });
});

describe('not-finite', () => {
  it('counts what is no number, beside what else is found', async () => {
    for (let seed = 1; seed <= seeds; seed++) {
      const x = normals(seed, N);
      for (const [n, value] of [
        [100 + seed, Number.NaN],
        [5000, Number.POSITIVE_INFINITY],
        [5001, Number.NEGATIVE_INFINITY],
      ])
        x[n] = value;
      const findings = await survey([x]);
      expect(findings.length).toBe(1);
      expect(findings[0]).toMatchObject({
        code: 'not-finite',
        severity: 'caution',
        channel: '1',
        from: 100 + seed,
        values: { count: 3, first: 100 + seed },
      });
    }
  });

  it('stretches of NaN are nothing else', async () => {
    for (const fill of [Number.NaN, Number.POSITIVE_INFINITY]) {
      const x = normals(4, N).fill(fill, 3000, 3400);
      expect(await codesOf([x])).toEqual(['not-finite']);
      expect(await codesOf([constant(fill)])).toEqual(['not-finite']);
    }
  });
});

describe('identical-channels', () => {
  it('names the first of those that are the same', async () => {
    for (let seed = 1; seed <= seeds; seed++) {
      const a = normals(seed, 70_000);
      const b = normals(seed + 100, 70_000);
      const findings = await survey([b, a, b.slice(), a.slice(), a.slice()]);
      expect(
        findings.map(({ code, severity, channel, values }) => [code, severity, channel, values.other]),
      ).toEqual([
        ['identical-channels', 'caution', '3', '1'],
        ['identical-channels', 'caution', '4', '2'],
        ['identical-channels', 'caution', '5', '2'],
      ]);
    }
  });

  it('is none where one sample differs, nor of channels that are constant', async () => {
    for (const at of [0, 65_535, 65_536, 69_999]) {
      const a = normals(at, 70_000);
      const b = a.slice();
      b[at] += 1e-12 + 1e-12 * Math.abs(b[at]);
      expect(await codesOf([a, b])).toEqual([]);
    }
    expect(await codesOf([constant(0), constant(0), constant(5), constant(5)])).toEqual([]);
  });

  it('takes a NaN for the same as a NaN', async () => {
    const a = normals(9, N);
    a[77] = Number.NaN;
    expect(await codesOf([a, a.slice()])).toEqual(['not-finite', 'not-finite', 'identical-channels']);
    const other = a.slice();
    other[77] = 1;
    expect(await codesOf([a, other])).toEqual(['not-finite']);
  });
});
