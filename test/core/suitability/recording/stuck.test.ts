import { describe, expect, it } from 'vitest';
import { normals, seededUniform } from '../../../support/random';
import { only, pcm, quantised, resonant, scaled, signal, sluggish, sum, survey } from './signals';

// Truth: where the generator freezes the signal.

const N = 30_000;
const seeds = 20;
const place = (seed: number) => 1000 + Math.floor(27_000 * seededUniform(seed + 50)());
const sine = (seed: number) => signal(N, (n) => Math.sin(0.05 * n + 0.0003 * seed * n + seed));

/** The same with `length` samples from `at` on at this value, or at that of the first of them. */
function frozen(x: Float64Array, at: number, length: number, value = x[at]): Float64Array {
  return x.map((own, n) => (n >= at && n < at + length ? value : own));
}

const moving: [string, (seed: number) => Float64Array, { pcm?: boolean; bits?: number }?][] = [
  ['white noise', (s) => normals(s, N)],
  ['white noise of PCM 16 bit', (s) => pcm(scaled(normals(s, N), 0.1)), { pcm: true, bits: 16 }],
  ['white noise of 5 counts', (s) => quantised(scaled(normals(s, N), 9), 1)],
  ['coloured noise', (s) => resonant(s, N, 0.95, 0.3)],
  ['a random walk', (s) => sluggish(s, N, 0.99)],
  ['a noisy sine in thousandths', (s) => quantised(sum(sine(s), scaled(normals(s, N), 0.02)), 0.001)],
  ['a sine', sine],
];

describe.each(moving)('in %s', (_, make, traits = {}) => {
  it.each([40, 200, 3000])('a stretch of %i samples that stand still is stuck', async (length) => {
    for (let seed = 1; seed <= seeds; seed++) {
      const at = place(seed) - 500;
      const x = frozen(make(seed), at, length);
      if (x[at + length] === x[at] || x[at - 1] === x[at] || x[at] === 0) continue;
      // A sine that comes back to where it stood goes on as if nothing had been.
      if (make === sine && Math.abs(x[at + length] - x[at]) < 0.3) continue;
      const findings = await survey([x], null, traits);
      expect(only(findings, 'stuck'), `seed ${seed}`).toMatchObject({
        severity: 'caution',
        from: at,
        to: at + length,
        values: { count: 1, samples: length, longest: length, value: x[at] },
      });
      expect(findings.length).toBe(1);
    }
  });

  it.each([40, 100])('%i samples of zero are a dropout', async (length) => {
    for (let seed = 1; seed <= seeds; seed++) {
      const at = place(seed);
      const x = frozen(make(seed), at, length, 0);
      if (x[at + length] === 0 || x[at - 1] === 0) continue;
      const findings = await survey([x], 1000, traits);
      expect(only(findings, 'dropout'), `seed ${seed}`).toMatchObject({ from: at, to: at + length });
      expect(findings.length).toBe(1);
    }
  });
});

describe('stuck', () => {
  it('finds short stretches in a finely resolved signal, each of them', async () => {
    for (let seed = 1; seed <= seeds; seed++) {
      let x = pcm(scaled(normals(seed, N), 0.2));
      for (const [at, length] of [
        [1000, 10],
        [65_536 % N, 17],
        [20_000, 12],
      ])
        x = frozen(x, at, length, 0.125);
      const found = only(await survey([x], null, { pcm: true, bits: 16 }), 'stuck');
      expect(found.values).toMatchObject({ count: 3, samples: 39, longest: 17 });
    }
  });

  it('finds a stretch across the ends of blocks', async () => {
    for (const at of [65_536 - 70, 65_536 - 41, 65_536 - 40, 65_536 - 1, 65_536, 65_536 + 1, 65_536 + 63]) {
      const x = frozen(normals(at, 200_000), at, 40);
      expect(only(await survey([x]), 'stuck')).toMatchObject({ from: at, to: at + 40 });
      const long = frozen(normals(at, 300_000), at, 70_000);
      expect(only(await survey([long]), 'stuck')).toMatchObject({ from: at, to: at + 70_000 });
    }
  });

  it('finds a sensor that died before the recording ended', async () => {
    for (let seed = 1; seed <= seeds; seed++) {
      const at = N - 5000 + seed;
      const x = frozen(normals(seed, N), at, N - at);
      expect(only(await survey([x]), 'stuck')).toMatchObject({ from: at, to: N });
    }
  });

  it('finds what falls off to a value that the signal never comes near, as no clipping', async () => {
    for (let seed = 1; seed <= seeds; seed++) {
      const level = quantised(
        sum(
          scaled(normals(seed, N), 0.1),
          signal(N, () => 5),
        ),
        0.001,
      );
      const away = frozen(frozen(level, 3000, 60, 9.999), 9000 + seed, 40, 9.999);
      const codes = (await survey([away], null)).map(({ code }) => code);
      expect(codes).toEqual(['stuck', 'offset']);
      const dropped = frozen(frozen(level, 3000, 60, 0), 9000 + seed, 40, 0);
      const found = await survey([dropped], null);
      expect(found.map(({ code }) => code)).toEqual(['dropout', 'offset']);
      expect(found[0].values).toMatchObject({ count: 2, samples: 100, longest: 60, value: 0 });
    }
  });
});
