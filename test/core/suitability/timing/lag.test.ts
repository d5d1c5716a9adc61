import { describe, expect, it } from 'vitest';
import type { Take } from '../../../../core/pair/take';
import { align } from '../../../../core/suitability/timing/alignment';
import { constantLag, type Lag } from '../../../../core/suitability/timing/lag';
import { normals, seededUniform } from '../../../support/random';
import { pace, takeOf } from '../../../support/takes';
import { later, noMeans, resonance, sound, withNoise } from '../signals';

async function lagOf(take: Take): Promise<Lag | null> {
  const alignment = await align(take, noMeans(), false, pace);
  return alignment === null ? null : constantLag(take, noMeans(), alignment, pace);
}

const seeds = Array.from({ length: 20 }, (_, seed) => seed);
const samples = 12000;

describe('the lag of a pure delay', () => {
  it.each([0, 0.3, 1])('of 37.4 samples is found within 0.1, at noise %f times the signal', async (noise) => {
    for (const seed of seeds) {
      const x = sound(seed, samples);
      const lag = await lagOf(takeOf([x], withNoise(later(x, 37.4), noise, seed + 1000)));
      expect(Math.abs(lag!.samples - 37.4)).toBeLessThan(0.1);
    }
  });

  it('is found with its sign, far off, and with the polarity reversed', async () => {
    const x = sound(1, 40000);
    for (const [wanted, gain] of [
      [-812.6, 1],
      [2345.25, 1],
      [0.5, -2],
      [-17, -0.001],
    ]) {
      const lag = await lagOf(
        takeOf(
          [x],
          withNoise(later(x, wanted), 0.2, 2).map((d) => gain * d),
        ),
      );
      expect(Math.abs(lag!.samples - wanted), `${wanted}`).toBeLessThan(0.1);
    }
  });

  it('is found where the noise is ten decibels above the signal', async () => {
    for (const seed of seeds) {
      const x = sound(seed, 20000);
      const lag = await lagOf(takeOf([x], withNoise(later(x, 37.4), 3.2, seed + 1000)));
      expect(Math.abs(lag!.samples - 37.4)).toBeLessThan(0.1);
    }
  });

  it('is found of an input without high frequencies', async () => {
    const x = resonance(normals(3, 30000), 0.02, 0.7);
    const lag = await lagOf(takeOf([withNoise(x, 0.0005, 4)], withNoise(later(x, 25), 0.0005, 5)));
    expect(Math.abs(lag!.samples - 25)).toBeLessThan(0.1);
  });

  it('is found over several fit intervals without reading the stretch between them', async () => {
    const x = normals(6, 30000);
    const d = later(x, 37.4);
    x.fill(Number.NaN, 12000, 13000);
    d.fill(Number.NaN, 12000, 13000);
    const fit = [
      { from: 0, to: 12000 },
      { from: 13000, to: 29000 },
    ];
    const lag = await lagOf(takeOf([x], d, { fit }));
    expect(Math.abs(lag!.samples - 37.4)).toBeLessThan(0.1);
  });
});

describe('the lag of a path with more than a delay', () => {
  it.each([2, 20])(
    'is that of the delay within three samples for a resonance of quality %i',
    async (quality) => {
      for (const seed of seeds.slice(0, 8)) {
        const x = normals(seed, 30000);
        const d = withNoise(resonance(later(x, 60), 0.1, quality), 0.01, seed + 1000);
        const lag = await lagOf(takeOf([x], d));
        if (lag !== null) expect(Math.abs(lag.samples - 60)).toBeLessThanOrEqual(3);
      }
    },
  );

  it('is that of the first of two arrivals, where the second is weaker', async () => {
    const x = normals(7, 30000);
    const echo = later(x, 95);
    const d = withNoise(
      later(x, 20).map((value, n) => value + 0.8 * echo[n]),
      0.1,
      8,
    );
    expect(Math.abs((await lagOf(takeOf([x], d)))!.samples - 20)).toBeLessThan(0.5);
  });
});

describe('no lag is said', () => {
  it('of unrelated signals', async () => {
    for (let seed = 0; seed < 100; seed++) {
      expect(await lagOf(takeOf([normals(seed, 6000)], normals(seed + 5000, 6000)))).toBeNull();
    }
  });

  it('of unrelated signals with the same resonance', async () => {
    for (let seed = 0; seed < 40; seed++) {
      const shaped = (s: number) => resonance(normals(s, 8000), 0.05, 8);
      expect(await lagOf(takeOf([shaped(seed)], shaped(seed + 5000)))).toBeNull();
    }
  });

  it.each([0, 0.1, 1])('of a repeating input, at noise %f', async (noise) => {
    for (const seed of seeds.slice(0, 10)) {
      const uniform = seededUniform(seed);
      const phases = Array.from({ length: 40 }, () => 2 * Math.PI * uniform());
      const hum = (late: number) =>
        Float64Array.from({ length: 16000 }, (_, n) =>
          phases.reduce(
            (sum, phase, i) => sum + Math.cos((2 * Math.PI * (i + 1) * (n - late)) / 400.5 + phase),
            0,
          ),
        );
      const take = takeOf([withNoise(hum(0), noise, seed + 100)], withNoise(hum(37), noise, seed + 200));
      expect(await lagOf(take)).toBeNull();
    }
  });

  it.each([[[0.0213]], [[0.1]], [[0.0213, 0.071, 0.23]]])(
    'of the sinusoids %j, with noise and without',
    async (frequencies) => {
      for (const noise of [0, 0.01]) {
        const tone = (late: number) =>
          Float64Array.from({ length: 16000 }, (_, n) =>
            frequencies.reduce((sum, f) => sum + Math.cos(2 * Math.PI * f * (n - late)), 0),
          );
        const take = takeOf([withNoise(tone(0), noise, 1)], withNoise(tone(37), noise, 2));
        expect(await lagOf(take)).toBeNull();
      }
    },
  );

  it('of silence, constants and recordings too short to tell', async () => {
    const x = normals(1, 6000);
    expect(await lagOf(takeOf([x], new Float64Array(6000)))).toBeNull();
    expect(await lagOf(takeOf([new Float64Array(6000)], x))).toBeNull();
    expect(await lagOf(takeOf([x], new Float64Array(6000).fill(3)))).toBeNull();
    expect(await lagOf(takeOf([x.slice(0, 50)], x.slice(0, 50)))).toBeNull();
    expect(await lagOf(takeOf([x.slice(0, 1)], x.slice(0, 1)))).toBeNull();
  });
});
