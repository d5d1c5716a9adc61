import { describe, expect, it } from 'vitest';
import { normals } from '../../../support/random';
import { convolve, takeOf, tapsOf } from '../../../support/takes';
import { codes, coloured, inspect } from './paths';

const samples = 40_000;
const path = [0.8, 0.4, -0.3, 0.1];

interface Sensors {
  seed: number;
  level: number;
  inputNoise?: number;
  outputNoise?: number;
}

/** A path excited at a level, with noise on the sensor before it and on the one behind it. */
function recorded({ seed, level, inputNoise = 0, outputNoise = 0.1 }: Sensors) {
  const x = coloured(seed, samples, 0.5).map((value) => level * value);
  const [before, behind] = [normals(seed + 1, samples), normals(seed + 2, samples)];
  return takeOf(
    [x.map((value, n) => value + inputNoise * before[n])],
    convolve(x, path).map((value, n) => value + outputNoise * behind[n]),
  );
}

describe('noisy-input', () => {
  it('is found from takes of different level, with the share that the taps are too small by', async () => {
    const noisy = { inputNoise: 0.5 };
    const takes = [recorded({ seed: 1, level: 1, ...noisy }), recorded({ seed: 11, level: 4, ...noisy })];
    const { findings } = await inspect({ takes, job: 'identify' });
    const found = findings.find(({ code }) => code === 'noisy-input');
    // Noise 0.25 beside a signal of 1/(1-0.5²).
    expect(Math.abs(Number(found?.values.percent) - 15.8)).toBeLessThan(3);
    // And the taps of that take are too small indeed.
    const [taps] = await tapsOf([takes[0]], { length: 4, delay: 0, windowing: 'covariance' });
    expect(taps[0]).toBeLessThan(0.9 * path[0]);
  });

  it('is not found from such takes where the noise is behind the path, in any of 20 pairs', async () => {
    for (let seed = 100; seed < 1100; seed += 50) {
      const takes = [
        recorded({ seed, level: 1, outputNoise: 0.5 }),
        recorded({ seed: seed + 10, level: 4, outputNoise: 0.5 }),
      ];
      expect(codes(await inspect({ takes, job: 'identify' })), `seed ${seed}`).toEqual([]);
    }
  });

  it('is found by a second sensor of the same quantity', async () => {
    const x = coloured(21, samples, 0.5);
    const noise = [0, 1, 2].map((s) => normals(22 + s, samples));
    const first = x.map((value, n) => value + 0.4 * noise[0][n]);
    const second = x.map((value, n) => 3 * value + 0.3 * noise[1][n]);
    const d = convolve(x, path).map((value, n) => value + 0.1 * noise[2][n]);
    const { findings } = await inspect({ takes: [takeOf([first, second], d)], job: 'identify' });
    // Noise 0.16 on power 1.33: 11 %; on the second sensor 0.09 on 12: less than matters.
    const found = findings.filter(({ code }) => code === 'noisy-input');
    expect(found.length).toBe(1);
    expect(found[0].channel).toBe('1');
    expect(Math.abs(Number(found[0].values.percent) - 11)).toBeLessThanOrEqual(3);
  });

  it('is not found for two inputs with paths of their own, related or not', async () => {
    const [a, b, noise] = [normals(31, samples), normals(32, samples), normals(33, samples)];
    for (const mix of [0, 1, 3]) {
      const second = a.map((_, n) => mix * (n > 0 ? a[n - 1] : 0) + b[n]);
      const d = convolve(a, path).map(
        (value, n) => value + 0.5 * second[Math.max(0, n - 3)] + 0.1 * noise[n],
      );
      expect(
        codes(await inspect({ takes: [takeOf([a, second], d)], job: 'identify' })),
        `mix ${mix}`,
      ).toEqual([]);
    }
  });

  it('is a question, with its bound, where the coherence alone suggests it', async () => {
    const take = recorded({ seed: 41, level: 1, inputNoise: 1.2, outputNoise: 0.05 });
    const { findings } = await inspect({ takes: [take], job: 'identify' });
    const found = findings.find(({ code }) => code === 'noisy-input-possible');
    expect(found?.severity).toBe('note');
    // The noise of 1.44 beside the signal's density where it is strong, which is 4 at 0 Hz: 26 %, and more elsewhere.
    expect(found?.values.percent).toBeGreaterThanOrEqual(26);
    expect(found?.values.percent).toBeLessThan(45);
  });

  it('is no question in a clean pair, or for another job', async () => {
    expect(codes(await inspect({ takes: [recorded({ seed: 51, level: 1 })], job: 'identify' }))).toEqual([]);
    const noisy = recorded({ seed: 61, level: 1, inputNoise: 0.7 });
    expect(codes(await inspect({ takes: [noisy], job: 'cancel' }))).toEqual([]);
  });
});
