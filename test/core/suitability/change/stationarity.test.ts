import { describe, expect, it } from 'vitest';
import { say } from '../../../../core/findings/say';
import { inspectChange } from '../../../../core/suitability/change/inspectChange';
import { powerChange } from '../../../../core/suitability/change/power';
import { normals, seededUniform } from '../../../support/random';
import { convolve, pace, takeOf } from '../../../support/takes';
import { documentOf, noMeans, resonance, withNoise } from '../signals';

const path = Array.from({ length: 16 }, (_, k) => Math.cos(k) * Math.exp(-k / 5));
const count = 24000;
const fit = [{ from: 0, to: count }];

/** Kinds of inputs that a steady set-up gives, none of them changing on average. */
const steady: Record<string, (seed: number, samples: number) => Float64Array> = {
  'white noise': normals,
  'a resonance': (seed, samples) => resonance(normals(seed, samples), 0.05, 10),
  'low frequencies': (seed, samples) => resonance(normals(seed, samples), 0.005, 0.7),
  'a drive with lines': (seed, samples) => {
    const [a, b] = [seededUniform(seed)(), seededUniform(seed + 1)()];
    return normals(seed + 2, samples).map(
      (v, n) => 0.1 * v + Math.sin(0.06 * (1 + a) * n) + Math.sin(0.2 * (1 + b) * n),
    );
  },
  impacts: (seed, samples) => {
    const uniform = seededUniform(seed);
    return normals(seed + 2, samples).map((v) => (uniform() < 0.01 ? 10 * v : 0.1 * v));
  },
  'random steps': (seed, samples) => {
    const uniform = seededUniform(seed);
    let [level, left] = [0, 0];
    return Float64Array.from({ length: samples }, () => {
      if (left-- <= 0) [level, left] = [uniform() - 0.5, 3 + 38 * uniform()];
      return level;
    });
  },
};

const found = async (x: Float64Array, d: Float64Array) =>
  (await inspectChange([takeOf([x], d, { fit })], documentOf('identify', 32), noMeans(), pace)).findings;

describe('a pair that does not change', () => {
  it.each(Object.keys(steady))('yields no finding: %s', async (kind) => {
    for (let seed = 0; seed < 25; seed++) {
      const x = steady[kind](seed, count);
      const findings = await found(x, withNoise(convolve(x, path), 0.05, seed + 700));
      expect(findings.map(say), `seed ${seed}`).toEqual([]);
    }
  });

  it('yields none where takes are of different working points', async () => {
    const takes = [1, 20, 0.1].map((level, t) => {
      const x = normals(t, count).map((v) => level * v);
      return { ...takeOf([x], withNoise(convolve(x, path), 0.05, t + 50), { fit }), name: `take ${t}` };
    });
    const { findings } = await inspectChange(takes, documentOf('identify', 32), noMeans(), pace);
    expect(findings.map(say)).toEqual([]);
  });

  it('yields none of the response where only the noise changes', async () => {
    for (let seed = 0; seed < 10; seed++) {
      const x = normals(seed, count);
      const noise = normals(seed + 50, count);
      const d = convolve(x, path).map((y, n) => y + (n < count / 3 ? 0.01 : 0.2) * noise[n]);
      expect(await found(x, d)).toEqual([]);
    }
  });
});

describe('a power that changes', () => {
  it('is noted with the part, of the input, which the output follows', async () => {
    for (let seed = 0; seed < 10; seed++) {
      const level = (n: number) => (n >= 0.75 * count && n < 0.875 * count ? 4 : 1);
      const x = normals(seed, count).map((v, n) => level(n) * v);
      const findings = await found(x, withNoise(convolve(x, path), 0.05, seed + 700));
      expect(findings.map((f) => [f.code, f.severity, f.channel])).toEqual([['non-stationary', 'note', '1']]);
      for (const { from, to } of findings) {
        expect(Math.abs(from! - 0.75 * count)).toBeLessThan(200);
        expect(Math.abs(to! - 0.875 * count)).toBeLessThan(200);
      }
    }
  });

  it('is noted of the desired signal where no input changes', async () => {
    const x = normals(1, count);
    const noise = normals(2, count);
    const findings = await found(
      x,
      x.map((v, n) => v + (n < count / 2 ? 0.1 : 2) * noise[n]),
    );
    expect(findings.map((f) => [f.code, f.severity, f.channel])).toEqual([['non-stationary', 'note', '2']]);
  });

  it('is measured as it is, and the ratio of chance is that of chance', async () => {
    const ratios: number[] = [];
    let chance = 0;
    for (let seed = 0; seed < 60; seed++) {
      const x = normals(seed, count);
      const change = await powerChange(
        async (from, to) => ({ inputs: [x.slice(from, to)], desired: x }),
        ({ inputs }) => inputs[0],
        fit,
        pace,
      );
      ratios.push(change!.ratio);
      chance = change!.chance;
    }
    // Powers of 3,000 white samples each scatter by √(2/3000) = 2.6 %; the points ±4 lie at a ratio of 1.23.
    expect(chance).toBeCloseTo(1.23, 1);
    // The range of eight normal values is 2.85 deviations on average (tables of control charts, d2).
    const mean = ratios.reduce((sum, r) => sum + r, 0) / ratios.length;
    expect(mean).toBeGreaterThan(1 + 2.4 * 0.0258);
    expect(mean).toBeLessThan(1 + 3.3 * 0.0258);
    expect(Math.max(...ratios)).toBeLessThan(chance);
  });

  it('of the desired signal says nothing for cancel, where the wanted signal comes and goes', async () => {
    const x = normals(1, count);
    const wanted = normals(2, count);
    const d = withNoise(convolve(x, path), 0.05, 3).map((y, n) => y + (n > count / 2 ? 3 * wanted[n] : 0));
    const take = takeOf([x], d, { fit, disturbanceOnly: [{ from: 0, to: count / 2 }] });
    expect((await inspectChange([take], documentOf('cancel', 32), noMeans(), pace)).findings).toEqual([]);
  });
});

it('says nothing of recordings too short to compare, silent or constant', async () => {
  const one = (samples: number, x: Float64Array) =>
    inspectChange(
      [takeOf([x], x, { fit: [{ from: 0, to: samples }] })],
      documentOf('identify', 32),
      noMeans(),
      pace,
    );
  for (const samples of [1, 40, 500]) expect((await one(samples, normals(1, samples))).findings).toEqual([]);
  expect((await one(9000, new Float64Array(9000))).findings).toEqual([]);
  expect((await one(9000, new Float64Array(9000).fill(2))).findings).toEqual([]);
});
