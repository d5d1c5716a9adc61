import { describe, expect, it } from 'vitest';
import { residualSums } from '../../../core/confidence/residualSums';
import { normal95, tapErrors } from '../../../core/confidence/tapErrors';
import type { Take } from '../../../core/pair/take';
import type { FilterShape } from '../../../core/statistics/gatherSums';
import { estimateOf } from '../../support/estimates';
import { normals } from '../../support/random';
import { convolve, pace, takeOf } from '../../support/takes';

// Against known truth: with no regularisation and a filter no shorter than the path, 95 % bands have to cover it.

const samples = 3000;
const window = 64;

/** An autoregression of the first order, of power 1. */
function coloured(seed: number, pole: number): Float64Array {
  const row = normals(seed, samples);
  const share = Math.sqrt(1 - pole * pole);
  for (let n = 1; n < samples; n++) row[n] = pole * row[n - 1] + share * row[n];
  return row;
}

interface Case {
  name: string;
  shape: FilterShape;
  /** Inputs and the noise of a seed. */
  signals(seed: number): { inputs: Float64Array[]; noise: Float64Array };
  paths: number[][];
  intervals?: Partial<Take>;
}

const path = [0.1, -0.4, 1, 0.5, -0.2, 0.05];
const plain: FilterShape = { length: 8, delay: 0, windowing: 'covariance' };

const cases: Case[] = [
  {
    name: 'white input, white noise',
    shape: plain,
    signals: (seed) => ({ inputs: [normals(seed, samples)], noise: normals(seed + 2, samples) }),
    paths: [path],
  },
  {
    name: 'white input, coloured noise',
    shape: plain,
    signals: (seed) => ({ inputs: [normals(seed, samples)], noise: coloured(seed + 2, 0.9) }),
    paths: [path],
  },
  {
    name: 'coloured input, coloured noise',
    shape: plain,
    signals: (seed) => ({ inputs: [coloured(seed, 0.8)], noise: coloured(seed + 2, 0.9) }),
    paths: [path],
  },
  {
    name: 'coloured input, noise of the opposite colour',
    shape: { ...plain, windowing: 'autocorrelation' },
    signals: (seed) => ({ inputs: [coloured(seed, 0.8)], noise: coloured(seed + 2, -0.8) }),
    paths: [path],
  },
  {
    name: 'two inputs, two takes of different levels, gaps between intervals',
    shape: { ...plain, length: 7, delay: 1 },
    signals: (seed) => ({
      inputs: [coloured(seed, 0.7), normals(seed + 1, samples)],
      noise: coloured(seed + 2, 0.8),
    }),
    paths: [path.slice(1), [0, 0.3, 0.3]],
    intervals: {
      fit: [
        { from: 0, to: 1200 },
        { from: 1300, to: 2900 },
      ],
    },
  },
  {
    name: 'levels of input and noise that rise and fall together',
    shape: plain,
    signals: (seed) => {
      const level = (n: number) => (Math.floor(n / 500) % 2 === 0 ? 0.3 : 3);
      return {
        inputs: [coloured(seed, 0.5).map((v, n) => level(n) * v)],
        noise: coloured(seed + 2, 0.6).map((v, n) => level(n) * v),
      };
    },
    paths: [path],
  },
];

function takesOf(of: Case, seed: number): Take[] {
  const parts = of.name.includes('two takes') ? [1, 10] : [1];
  return parts.map((level, t) => {
    const { inputs, noise } = of.signals(100 * seed + 10 * t);
    const x = inputs.map((row) => row.map((v) => level * v));
    const d = noise.map((v) => 0.5 * level * level * v);
    x.forEach((row, r) => {
      convolve(row, of.paths[r]).forEach((y, n) => {
        d[n] += y;
      });
    });
    // The path counts from the delayed desired signal.
    const shifted = d.map((_, n) => d[n + of.shape.delay] ?? 0);
    return takeOf(x, of.shape.delay === 0 ? d : shifted, of.intervals ?? {});
  });
}

/** Σ_k w[k] e^(-2πifk), f in cycles a sample. */
function response(w: ArrayLike<number>, f: number): { re: number; im: number } {
  let re = 0;
  let im = 0;
  for (let k = 0; k < w.length; k++) {
    re += w[k] * Math.cos(2 * Math.PI * f * k);
    im -= w[k] * Math.sin(2 * Math.PI * f * k);
  }
  return { re, im };
}

describe('95 % bands of the taps', () => {
  it.each(cases)('cover the truth between 92 and 98 %: $name', async (of) => {
    let inside = 0;
    let told = 0;
    let all = 0;
    const waves = { inside: 0, all: 0 };
    for (let seed = 1; seed <= 60; seed++) {
      const takes = takesOf(of, seed);
      const estimate = await estimateOf(takes, of.shape);
      const { length, windowing } = of.shape;
      const sums = await residualSums(takes, windowing, estimate.filter, length + window, pace);
      const errors = await tapErrors(estimate, sums, window, pace);
      if ('withheld' in errors) throw new Error(errors.withheld);
      errors.standardErrors.forEach((row, r) => {
        row.forEach((error, k) => {
          const miss = Math.abs(estimate.filter.coefficients[r][k] - (of.paths[r][k] ?? 0));
          if (miss <= normal95 * error) inside++;
          if (miss <= 0.5 * normal95 * error) told++;
          all++;
        });
        const { points, inputs } = errors.response;
        for (let i = 0; i < points; i += 8) {
          const f = i / (2 * (points - 1));
          const got = response(estimate.filter.coefficients[r], f);
          const true_ = response(of.paths[r], f);
          const miss = { re: got.re - true_.re, im: got.im - true_.im };
          const { real, imaginary } = inputs[r];
          if (Math.abs(miss.re) <= normal95 * Math.sqrt(real[i])) waves.inside++;
          if (Math.abs(miss.im) <= normal95 * Math.sqrt(imaginary[i]) + 1e-12) waves.inside++;
          waves.all += 2;
        }
      });
    }
    expect(inside / all).toBeGreaterThan(0.92);
    expect(inside / all).toBeLessThan(0.98);
    // Half as wide they would cover 67 %: so the errors are not too large either.
    expect(told / all).toBeLessThan(0.75);
    expect(waves.inside / waves.all).toBeGreaterThan(0.92);
    expect(waves.inside / waves.all).toBeLessThan(0.98);
  });
});
