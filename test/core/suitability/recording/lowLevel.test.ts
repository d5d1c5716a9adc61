import { describe, expect, it } from 'vitest';
import { normals } from '../../../support/random';
import { binary, codesOf, only, pcm, quantised, scaled, signal, steps, survey } from './signals';

// Truth: the range in steps, from which the bits follow: 2^bits values hold it.

const N = 20_000;
const seeds = 20;

describe('low-level', () => {
  it('says how many of the bits of PCM are used', async () => {
    for (let seed = 1; seed <= seeds; seed++) {
      const x = pcm(scaled(normals(seed, N), 5 / 32768));
      const range = 32768 * (x.reduce((a, b) => Math.max(a, b)) - x.reduce((a, b) => Math.min(a, b)));
      const { severity, values } = only(await survey([x], null, { pcm: true, bits: 16 }), 'low-level');
      expect(severity).toBe('caution');
      expect(values).toMatchObject({ steps: range, bits: `${Math.ceil(Math.log2(range + 1))} bits of 16` });
    }
  });

  it('finds 16 bits of low level in a file of 24', async () => {
    for (let seed = 1; seed <= seeds; seed++) {
      const low = pcm(scaled(normals(seed, N), 3 / 32768));
      const found = only(await survey([low], null, { pcm: true, bits: 24 }), 'low-level');
      expect(found.values.bits).toMatch(/^5 bits of 24$/);
      const fine = pcm(scaled(normals(seed, N), 3 / 32768), 24);
      expect(await codesOf([fine], null, { pcm: true, bits: 24 })).toEqual([]);
    }
  });

  it('finds whole numbers of few steps, noisy or slow', async () => {
    for (let seed = 1; seed <= seeds; seed++) {
      const noise = quantised(scaled(normals(seed, N), 2), 1);
      expect(await codesOf([noise])).toEqual(['low-level']);
      const slow = signal(N, (n) => Math.round(15 * Math.sin(0.001 * n + seed)));
      expect(only(await survey([slow]), 'low-level').values).toMatchObject({ steps: 30, bits: '5 bits' });
    }
  });

  it('leaves alone what is made of levels, constant or silent', async () => {
    for (let seed = 1; seed <= seeds; seed++) {
      expect(await codesOf([binary(seed, N, 5, 1)])).toEqual([]);
      expect(await codesOf([steps(seed, N, (u) => Math.floor(10 * u()) - 5, 3, 30)])).toEqual([]);
      expect(await codesOf([signal(N, () => seed - 3)])).toEqual([]);
      expect(await codesOf([signal(N, () => 0)], null, { pcm: true, bits: 16 })).toEqual([]);
    }
  });
});
