import { describe, expect, it } from 'vitest';
import { say } from '../../../../core/findings/say';
import { inspectTiming } from '../../../../core/suitability/timing/inspectTiming';
import { normals } from '../../../support/random';
import { convolve, pace, takeOf } from '../../../support/takes';
import { documentOf, noMeans, resonance, withNoise } from '../signals';

const path = Array.from({ length: 16 }, (_, k) => Math.cos(k) * Math.exp(-k / 5));

describe('causality', () => {
  it('is not called in question by a causal path, whatever the input and the noise', async () => {
    for (let seed = 0; seed < 30; seed++) {
      const white = normals(seed, 12000);
      const x = [white, resonance(white, 0.05, 5), resonance(white, 0.01, 0.7)][seed % 3];
      const d = withNoise(convolve(x, path), [0.01, 0.3, 3][seed % 4 === 3 ? 1 : seed % 3], seed + 500);
      for (const job of ['identify', 'equalise', 'cancel'] as const) {
        const { findings } = await inspectTiming([takeOf([x], d)], documentOf(job, 32), noMeans(), pace);
        expect(findings.map(say), `seed ${seed}`).toEqual([]);
      }
    }
  });

  it('tells the energy before the first tap and a delay that catches it', async () => {
    for (let seed = 0; seed < 10; seed++) {
      const x = normals(seed, 12000);
      // h[-5] = 0.6, h[0] = 1, h[4] = -0.5: before lag 0 lies 0.36 of 1.61.
      const d = withNoise(
        x.map((v, n) => 0.6 * (x[n + 5] ?? 0) + v - 0.5 * (x[n - 4] ?? 0)),
        0.2,
        seed + 50,
      );
      const { findings } = await inspectTiming([takeOf([x], d)], documentOf('equalise', 32), noMeans(), pace);
      expect(findings.map(({ code }) => code)).toEqual(['acausal']);
      const { share, gain, delay, caught } = findings[0].values;
      expect(Math.abs(Number(share) - 36 / 1.61)).toBeLessThan(3);
      // Error without it: 0.36 + 0.04, with it: 0.04.
      expect(Math.abs(Number(gain) - 10)).toBeLessThan(0.7);
      // Eighths of the length are tried: 4 is too few, 8 catches all.
      expect(delay).toBe(8);
      expect(Number(caught)).toBeGreaterThan(97);
    }
  });
});
