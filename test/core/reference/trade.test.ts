import { beforeAll, describe, expect, it } from 'vitest';
import { evaluate } from '../../../core/evaluation/heldOutFigures';
import { runsOver } from '../../../core/evaluation/measuredRuns';
import type { Take } from '../../../core/pair/take';
import { normals } from '../../support/random';
import { convolve, pace, takeOf, tapsOf } from '../../support/takes';

// Facts that every practitioner of the trade expects to see (common practice), each on seeded data.

const none = (inputs: number) => ({ inputs: new Array(inputs).fill(0), desired: 0 });
const add = (a: Float64Array, b: Float64Array, gain = 1) => a.map((value, n) => value + gain * b[n]);

/** NMSE in dB of taps over the held-out part of a take. */
async function heldOutDb(take: Take, coefficients: Float64Array[], delay = 0): Promise<number> {
  const filter = { coefficients, delay, means: none(coefficients.length) };
  const target = {
    values: coefficients,
    scaling: {
      inputFullScale: [1],
      outputFullScale: 1,
      inputCount: coefficients.map(() => 1),
      outputCount: 1,
      inputMeanCounts: coefficients.map(() => 0),
      desiredMeanCounts: 0,
    },
    format: 'float64' as const,
  };
  const runs = runsOver([take], (t) => t.heldOut, filter);
  return (await evaluate(runs, filter, target, 1000, pace)).total.nmseDb;
}

/** Fit MSE of a take solved with no regularisation, over the n that all lengths up to `longest` share. */
async function fitMse(
  x: Float64Array,
  d: Float64Array,
  length: number,
  longest: number,
): Promise<{ mse: number; w: Float64Array }> {
  const take = takeOf([x], d, { fit: [{ from: longest - 1, to: d.length }] });
  const [w] = await tapsOf([take], { length, delay: 0, windowing: 'covariance' });
  let sum = 0;
  const y = convolve(x, w);
  for (let n = longest - 1; n < d.length; n++) sum += (d[n] - y[n]) ** 2;
  return { mse: sum / (d.length - longest + 1), w };
}

const path = [0.2, 0.7, -0.5, 0.3, 0.25, -0.15, 0.08, -0.04];

describe('facts of the trade (common practice)', () => {
  const N = 6000;
  const halves = { fit: [{ from: 0, to: N / 2 }], heldOut: [{ from: N / 2, to: N }] };

  it('a reference that contains the wanted signal cancels part of it', async () => {
    const wanted = normals(1, N);
    const disturbance = normals(2, N);
    const cancelled = async (leak: number) => {
      const x = add(disturbance, wanted, leak);
      const d = add(convolve(disturbance, path), wanted);
      const [w] = await tapsOf([takeOf([x], d)], { length: 16, delay: 0, windowing: 'covariance' });
      // What is left of the wanted signal: the error's share along it.
      const e = add(d, convolve(x, w), -1);
      const inner = (a: Float64Array, b: Float64Array) => a.reduce((sum, value, n) => sum + value * b[n], 0);
      return inner(e, wanted) / inner(wanted, wanted);
    };
    expect(await cancelled(0)).toBeGreaterThan(0.98);
    expect(await cancelled(0.5)).toBeLessThan(0.8);
  });

  it('a single sinusoid identifies the path at its own frequency and nowhere else', async () => {
    const f = 0.11;
    const x = Float64Array.from({ length: 2000 }, (_, n) => Math.sin(2 * Math.PI * f * n));
    const d = convolve(x, path);
    const take = takeOf([x], d, { fit: [{ from: 20, to: 2000 }] });
    // The least regularisation that can be solved picks the shortest of the many solutions.
    const [w] = await tapsOf([take], { length: 8, delay: 0, windowing: 'covariance' }, 1e-9);
    const response = (taps: ArrayLike<number>, at: number) => {
      let re = 0;
      let im = 0;
      for (let k = 0; k < taps.length; k++) {
        re += taps[k] * Math.cos(2 * Math.PI * at * k);
        im -= taps[k] * Math.sin(2 * Math.PI * at * k);
      }
      return { re, im };
    };
    const gap = (at: number) =>
      Math.hypot(response(w, at).re - response(path, at).re, response(w, at).im - response(path, at).im);
    expect(gap(f)).toBeLessThan(1e-6);
    for (const elsewhere of [0, 0.25, 0.35, 0.5]) expect(gap(elsewhere)).toBeGreaterThan(0.1);
  });

  it('a band that the path has nulled is not restored by any equaliser', async () => {
    const training = normals(3, N);
    // Zeros on the unit circle at a quarter of the sample rate.
    const x = add(convolve(training, [1, 0, 1]), normals(4, N), 0.03);
    const take = takeOf([x], training, halves);
    const delay = 24;
    const [w] = await tapsOf([take], { length: 64, delay, windowing: 'covariance' });
    const total = (at: number) => {
      let re = 0;
      let im = 0;
      for (let k = 0; k < w.length; k++) {
        re += w[k] * Math.cos(2 * Math.PI * at * k);
        im -= w[k] * Math.sin(2 * Math.PI * at * k);
      }
      return Math.hypot(re, im) * Math.abs(2 * Math.cos(2 * Math.PI * at));
    };
    expect(total(0.25)).toBeLessThan(0.1);
    expect(total(0.1)).toBeGreaterThan(0.8);
    expect(await heldOutDb(take, [w], delay)).toBeGreaterThan(-20);
  });

  it("an equaliser's error falls when the delay allows for the path and half the filter", async () => {
    const training = normals(5, N);
    // Mixed phase: a zero outside the unit circle needs the future.
    const x = add(convolve(training, [0.5, 1, 0.4]), normals(6, N), 0.01);
    const take = takeOf([x], training, halves);
    const at = async (delay: number) =>
      heldOutDb(take, await tapsOf([take], { length: 32, delay, windowing: 'covariance' }), delay);
    const none = await at(0);
    const half = await at(17);
    expect(half).toBeLessThan(none - 10);
  });

  it('more taps never raise the fit error, over the n common to all lengths', async () => {
    const x = normals(7, 800);
    const d = add(convolve(x, path), normals(8, 800), 0.3);
    let last = Number.POSITIVE_INFINITY;
    for (let M = 1; M <= 40; M++) {
      const { mse } = await fitMse(x, d, M, 40);
      expect(mse).toBeLessThanOrEqual(last * (1 + 1e-12));
      last = mse;
    }
  });

  describe('over 30 seeds', () => {
    const heldOut: Record<number, number[]> = { 8: [], 24: [], 64: [] };
    beforeAll(async () => {
      for (let seed = 0; seed < 30; seed++) {
        const x = normals(100 + seed, 1200);
        const d = add(convolve(x, path), normals(200 + seed, 1200), 0.3);
        const take = takeOf([x], d, { fit: [{ from: 0, to: 600 }], heldOut: [{ from: 600, to: 1200 }] });
        for (const M of [8, 24, 64]) {
          heldOut[M].push(
            await heldOutDb(take, await tapsOf([take], { length: M, delay: 0, windowing: 'covariance' })),
          );
        }
      }
    });
    const mean = (values: number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;

    it('taps beyond the length of the path do not lower the held-out error on average', () => {
      expect(mean(heldOut[24])).toBeGreaterThan(mean(heldOut[8]));
      expect(mean(heldOut[64])).toBeGreaterThan(mean(heldOut[24]));
    });
  });

  it('with enough data the error of a matched length comes down to the noise', async () => {
    const samples = 60000;
    const x = normals(9, samples);
    const clean = convolve(x, path);
    const d = add(clean, normals(10, samples), 0.1);
    const take = takeOf([x], d, { fit: [{ from: 0, to: 40000 }], heldOut: [{ from: 40000, to: samples }] });
    const w = await tapsOf([take], { length: path.length, delay: 0, windowing: 'covariance' });
    const power = clean.reduce((sum, value) => sum + value * value, 0) / samples;
    const noiseDb = 10 * Math.log10(0.01 / (power + 0.01));
    expect(Math.abs((await heldOutDb(take, w)) - noiseDb)).toBeLessThan(0.1);
    path.forEach((tap, k) => {
      expect(Math.abs(w[0][k] - tap)).toBeLessThan((5 * 0.1) / Math.sqrt(40000));
    });
  });
});
