import { describe, expect, it } from 'vitest';
import type { Finding } from '../../../../core/findings/finding';
import { say } from '../../../../core/findings/say';
import { inspectChange } from '../../../../core/suitability/change/inspectChange';
import { normals } from '../../../support/random';
import { convolve, pace, takeOf } from '../../../support/takes';
import { documentOf, noMeans, withNoise } from '../signals';

const path = Array.from({ length: 16 }, (_, k) => Math.cos(k) * Math.exp(-k / 5));
const count = 24000;

async function found(x: Float64Array, d: Float64Array, earlier: Finding[] = []): Promise<Finding[]> {
  const take = takeOf([x], d);
  return (await inspectChange([take], documentOf('identify', 32), noMeans(), pace, earlier)).findings;
}

describe('a response that changes', () => {
  const changing = (x: Float64Array, seed: number, share: (n: number) => number) => {
    const [before, after] = [
      convolve(x, path),
      convolve(
        x,
        path.map((v, k) => (k === 3 ? v + 0.3 : v)),
      ),
    ];
    return withNoise(
      before.map((y, n) => y + share(n) * (after[n] - y)),
      0.05,
      seed,
    );
  };

  it.each([
    ['at once, for an eighth of the time', (n: number) => (n >= 0.5 * count && n < 0.625 * count ? 1 : 0)],
    ['slowly, from beginning to end', (n: number) => n / count],
  ])('is found %s', async (_, share) => {
    for (let seed = 0; seed < 10; seed++) {
      const x = normals(seed, count);
      const findings = await found(x, changing(x, seed + 900, share));
      expect(findings.map((f) => [f.code, f.severity])).toEqual([['non-stationary', 'caution']]);
      expect(say(findings[0])).toContain('response changes');
      if (share(0.55 * count) === 1) {
        expect(Math.abs(findings[0].from! - 0.5 * count)).toBeLessThan(600);
        expect(Math.abs(findings[0].to! - 0.625 * count)).toBeLessThan(600);
      }
    }
  });

  it('is left to the drift where that was found for the take', async () => {
    const x = normals(1, count);
    const d = changing(x, 2, (n) => n / count);
    const drift = { code: 'drift', severity: 'caution', take: 'take', values: {} } as const;
    expect(await found(x, d, [drift])).toEqual([]);
    expect(await found(x, d, [{ ...drift, take: 'another' }])).toHaveLength(1);
  });
});
