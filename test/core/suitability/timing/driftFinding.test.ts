import { describe, expect, it } from 'vitest';
import { say } from '../../../../core/findings/say';
import { inspectTiming } from '../../../../core/suitability/timing/inspectTiming';
import { normals } from '../../../support/random';
import { convolve, pace } from '../../../support/takes';
import { documentOf, noMeans, resampled, resonance, separateFiles, sound, withNoise } from '../signals';

const path = Array.from({ length: 16 }, (_, k) => Math.cos(k) * Math.exp(-k / 5));

describe('drift', () => {
  it('is a caution with its figures, for the files it lies between', async () => {
    const source = sound(11, 121000);
    const d = resampled(source, 120000, (n) => n / (1 + 35e-6) + 500);
    const take = separateFiles([withNoise(source.slice(500, 120500), 0.2, 12)], withNoise(d, 0.2, 13));
    const { takes, findings } = await inspectTiming([take], documentOf('identify', 64), noMeans(), pace);
    expect(findings.map(({ code, severity }) => [code, severity])).toEqual([['drift', 'caution']]);
    expect(Math.abs(takes[0].driftPpm! - 35)).toBeLessThan(3 * takes[0].driftPpmStandardError!);
    expect(Number(findings[0].values.cost)).toBeCloseTo(4.2, 1);
    expect(say(findings[0])).toMatch(
      /^the clocks of input0.wav, channel 1 and desired.wav, channel 1 differ by 3/,
    );
  });

  it('is not found between separate files of one clock', async () => {
    for (let seed = 0; seed < 20; seed++) {
      const x = resonance(normals(seed, 30000), 0.1, 1);
      const d = withNoise(convolve(x, path), 0.1, seed + 40);
      const { takes, findings } = await inspectTiming(
        [separateFiles([withNoise(x, 0.01, seed + 80)], d)],
        documentOf('identify', 64),
        noMeans(),
        pace,
      );
      expect(findings.map(say)).toEqual([]);
      if (takes[0].driftPpm !== null) {
        expect(Math.abs(takes[0].driftPpm)).toBeLessThan(5 * takes[0].driftPpmStandardError!);
      }
    }
  });
});
