import { execFileSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { effectiveAverages, newCrossSpectra } from '../../../../core/spectra/crossSpectra';
import { betaTail, betaUpperPoint } from '../../../../core/statistics/betaDistribution';
import {
  coherenceInterval,
  multipleCoherence,
  ordinaryCoherence,
  significance,
  unexplained,
} from '../../../../core/suitability/pair/coherence';
import { needs, python } from '../../../support/programs';
import { normals } from '../../../support/random';

function spectraOf(signals: readonly Float64Array[], segment: number) {
  const gatherer = newCrossSpectra(signals.length, segment, 1000);
  gatherer.push(signals);
  return gatherer.spectra();
}

function mean(values: Iterable<number>): number {
  const list = Array.from(values);
  return list.reduce((sum, value) => sum + value, 0) / list.length;
}

describe('significance', () => {
  // Carter, Knapp & Nuttall, IEEE Trans. Audio Electroacoust. 21, 1973 (from memory).
  it.each([
    [8, 0.3482],
    [16, 0.181],
    [32, 0.0921],
    [64, 0.0464],
    [100, 0.0298],
  ])('of %i averages is %f', (averages, point) => {
    expect(significance(1, averages)).toBeCloseTo(point, 4);
    expect(significance(1, averages)).toBeCloseTo(1 - 0.05 ** (1 / (averages - 1)), 12);
  });

  it('is exceeded by one unrelated frequency in twenty, for one input and for three', () => {
    for (const inputs of [1, 3]) {
      let above = 0;
      let count = 0;
      for (let seed = 0; seed < 60; seed++) {
        const signals = Array.from({ length: inputs + 1 }, (_, s) => normals(100 * seed + s, 2048));
        const spectra = spectraOf(signals, 128);
        const point = significance(inputs, effectiveAverages(spectra));
        multipleCoherence(spectra).values.forEach((value, f) => {
          if (f < 2 || f > 62) return;
          count++;
          if (value > point) above++;
        });
      }
      // Binomial, neighbouring frequencies related: three standard errors are about 0.013.
      expect(above / count).toBeGreaterThan(0.037);
      expect(above / count).toBeLessThan(0.063);
    }
  });

  it('cannot tell with too few averages', () => {
    expect(significance(2, 2)).toBe(1);
  });
});

describe.skipIf(!needs('scipy'))('betaTail and betaUpperPoint against scipy.stats.beta', () => {
  it('agree to 1e-11 and 1e-12', () => {
    const cases = [1, 2, 3, 8].flatMap((a) =>
      [0.5, 3, 17.37, 951.8].flatMap((b) => [1e-6, 0.01, 0.3, 0.9].map((z) => [a, b, z])),
    );
    const script = `
import json, sys
import warnings
from scipy.stats import beta
warnings.simplefilter("ignore")
json.dump([[beta.sf(z, a, b), beta.isf(0.05, a, b)] for a, b, z in json.load(sys.stdin)], sys.stdout)`;
    const input = JSON.stringify(cases);
    const wanted: number[][] = JSON.parse(execFileSync(python, ['-c', script], { input }).toString());
    cases.forEach(([a, b, z], i) => {
      expect(Math.abs(betaTail(z, a, b) - wanted[i][0])).toBeLessThan(1e-11 * Math.max(wanted[i][0], 1e-30));
      expect(Math.abs(betaUpperPoint(0.05, a, b) - wanted[i][1])).toBeLessThan(1e-12);
    });
  });
});

describe('multipleCoherence', () => {
  it('is S/(1+S) at signal-to-noise ratio S (Bendat & Piersol, Random Data; from memory)', () => {
    for (const ratio of [0.25, 1, 9, 99]) {
      const x = normals(7, 200_000);
      const noise = normals(8, 200_000);
      const d = x.map((value, n) => Math.sqrt(ratio) * value + noise[n]);
      const values = multipleCoherence(spectraOf([x, d], 256)).values.subarray(2, 127);
      expect(mean(values) / (ratio / (1 + ratio))).toBeCloseTo(1, 2);
    }
  });

  it('is the ordinary coherence for one input', () => {
    const x = normals(9, 5000);
    const d = normals(10, 5000).map((value, n) => value + x[n]);
    const spectra = spectraOf([x, d], 128);
    const ordinary = ordinaryCoherence(spectra, 1, 0);
    multipleCoherence(spectra).values.forEach((value, f) => {
      expect(value).toBeCloseTo(ordinary[f], 12);
    });
  });

  it('does not change where inputs are mixed, and leaves out one that depends on the others', () => {
    const [a, b, noise] = [normals(11, 20_000), normals(12, 20_000), normals(13, 20_000)];
    const d = a.map((value, n) => value - 2 * b[n] + noise[n]);
    const apart = multipleCoherence(spectraOf([a, b, d], 128));
    const mixed = a.map((value, n) => 1e6 * (value + 0.9 * b[n]));
    const together = multipleCoherence(spectraOf([mixed, b, a, d], 128));
    // Signal powers 1 + 4, noise 1: 5/6.
    expect(mean(apart.values.subarray(2, 63))).toBeCloseTo(5 / 6, 1);
    apart.values.forEach((value, f) => {
      expect(together.values[f]).toBeCloseTo(value, 7);
      expect(apart.ranks[f]).toBe(2);
      expect(together.ranks[f]).toBe(2);
    });
  });

  it('finds the responses: their random error is sqrt((1-γ²)/(2nγ²)) (Bendat & Piersol; from memory)', () => {
    // γ² = 0.9, n = 100: 0.02357. Segments side by side, so that n is the number of them.
    expect(Math.sqrt((1 - 0.9) / (2 * 100 * 0.9))).toBeCloseTo(0.02357, 5);
    const gains: number[] = [];
    for (let seed = 0; seed < 40; seed++) {
      const gatherer = newCrossSpectra(2, 64, 1000);
      for (let block = 0; block < 100; block++) {
        const x = normals(7000 + 200 * seed + block, 64);
        const noise = normals(90_000 + 200 * seed + block, 64);
        gatherer.gap();
        gatherer.push([x, x.map((value, n) => value + noise[n] / 3)]);
      }
      expect(effectiveAverages(gatherer.spectra())).toBe(100);
      const [{ re, im }] = multipleCoherence(gatherer.spectra()).responses;
      for (let f = 3; f < 30; f += 3) gains.push(Math.hypot(re[f], im[f]));
    }
    const middle = mean(gains);
    const deviation = Math.sqrt(mean(gains.map((gain) => (gain / middle - 1) ** 2)));
    // 360 values: the standard error of their deviation is 4 %.
    expect(Math.abs(deviation / 0.02357 - 1)).toBeLessThan(0.12);
  });

  it('is 0 for silence', () => {
    const { values, ranks } = multipleCoherence(spectraOf([new Float64Array(500), normals(1, 500)], 64));
    expect(values.every((value) => value === 0)).toBe(true);
    expect(ranks.every((rank) => rank === 0)).toBe(true);
  });
});

describe('unexplained', () => {
  it('has no bias however few the averages: residual power of 8 segments and 3 inputs', () => {
    let measured = 0;
    let power = 0;
    for (let seed = 0; seed < 200; seed++) {
      const gatherer = newCrossSpectra(4, 64, 1000);
      for (let block = 0; block < 8; block++) {
        const [a, b, c, noise] = [0, 1, 2, 3].map((s) => normals(40 * (8 * seed + block) + s, 64));
        gatherer.gap();
        gatherer.push([a, b, c, a.map((value, n) => value + b[n] - c[n] + noise[n])]);
      }
      const spectra = gatherer.spectra();
      const { values } = multipleCoherence(spectra);
      const desired = spectra.between[3][3].re;
      for (let f = 2; f < 31; f++) {
        measured += unexplained(values[f], 3, 8) * desired[f];
        power += desired[f];
      }
    }
    // Noise 1 of power 4.
    expect(measured / power).toBeGreaterThan(0.245);
    expect(measured / power).toBeLessThan(0.255);
  });
});

describe('coherenceInterval', () => {
  it('holds the known coherence of a signal-to-noise ratio in at least 90 of 100 seeds', () => {
    for (const [inputs, ratio, samples] of [
      [1, 1, 4000],
      [1, 9, 2000],
      [1, 0.2, 16_000],
      [2, 4, 4000],
    ]) {
      let held = 0;
      for (let seed = 0; seed < 100; seed++) {
        const rows = Array.from({ length: inputs }, (_, r) => normals(10 * seed + r, samples));
        const noise = normals(10 * seed + 9, samples);
        const gain = Math.sqrt(ratio / inputs);
        const d = noise.map((value, n) => value + rows.reduce((sum, x) => sum + gain * x[n], 0));
        const spectra = spectraOf([...rows, d], 128);
        const f = 5 + (seed % 50);
        const value = multipleCoherence(spectra).values[f];
        const { from, to } = coherenceInterval(value, inputs, effectiveAverages(spectra));
        if (from <= ratio / (1 + ratio) && ratio / (1 + ratio) <= to) held++;
      }
      expect(held, `ratio ${ratio}, ${inputs} inputs`).toBeGreaterThanOrEqual(90);
    }
  });

  it('begins at 0 for what is not significant and stays below 1', () => {
    expect(coherenceInterval(0.05, 1, 20).from).toBe(0);
    expect(coherenceInterval(1, 1, 20).to).toBeLessThanOrEqual(1);
    expect(coherenceInterval(0.5, 2, 3)).toEqual({ from: 0, to: 1 });
  });
});
