import { execFileSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { effectiveAverages, frequenciesOf, newCrossSpectra } from '../../../core/spectra/crossSpectra';
import { ordinaryCoherence } from '../../../core/suitability/pair/coherence';
import { needs, python } from '../../support/programs';
import { normals } from '../../support/random';
import { convolve } from '../../support/takes';

const rate = 500;
const samples = 5000;

/** Three related signals of very different sizes, as sensors in different units give them. */
function related(): Float64Array[] {
  const x = normals(1, samples);
  const z = normals(2, samples).map((value, n) => 1e7 * (value + 0.5 * x[n]));
  const noise = normals(3, samples);
  const d = convolve(x, [0.5, -0.2, 0.8, 0.1]).map((value, n) => 1e-4 * (value + 0.3 * noise[n]));
  return [x, z, d];
}

function gathered(signals: readonly Float64Array[], segment: number, block: number) {
  const gatherer = newCrossSpectra(signals.length, segment, rate);
  for (let from = 0; from < samples; from += block) {
    gatherer.push(signals.map((s) => s.subarray(from, Math.min(samples, from + block))));
  }
  return gatherer.spectra();
}

describe.skipIf(!needs('scipy'))('newCrossSpectra against scipy.signal.csd and coherence', () => {
  const signals = related();
  const input = JSON.stringify(signals.map((s) => Array.from(s)));

  it.each([
    [64, 5000],
    [256, 5000],
    [256, 37],
    [1024, 700],
  ])('agrees to 1e-9 with segments of %i in blocks of %i', (segment, block) => {
    const script = `
import json, sys
import numpy as np
from scipy.signal import csd, coherence
s = [np.array(row) for row in json.load(sys.stdin)]
how = dict(fs=${rate}, window="hann", nperseg=${segment}, detrend=False)
out = {"csd": [], "coherence": []}
for a in range(3):
    for b in range(a, 3):
        f, p = csd(s[a], s[b], **how)
        out["csd"].append([p.real.tolist(), p.imag.tolist()])
        out["coherence"].append(coherence(s[a], s[b], **how)[1].tolist())
out["frequencies"] = f.tolist()
json.dump(out, sys.stdout)`;
    const wanted = JSON.parse(execFileSync(python, ['-c', script], { input }).toString());
    const spectra = gathered(signals, segment, block);
    expect(Array.from(frequenciesOf(spectra))).toEqual(wanted.frequencies);
    let pair = 0;
    for (let a = 0; a < 3; a++) {
      for (let b = a; b < 3; b++) {
        const [re, im]: number[][] = wanted.csd[pair];
        const own = spectra.between[a][b];
        const largest = Math.max(...re.map((value, f) => Math.hypot(value, im[f])));
        for (let f = 0; f < re.length; f++) {
          expect(Math.hypot(own.re[f] - re[f], own.im[f] - im[f]) / largest).toBeLessThan(1e-9);
        }
        ordinaryCoherence(spectra, a, b).forEach((value, f) => {
          expect(Math.abs(value - wanted.coherence[pair][f])).toBeLessThan(1e-9);
        });
        pair++;
      }
    }
  });
});

describe('newCrossSpectra', () => {
  it('begins anew after a gap and counts only segments within stretches', () => {
    const x = normals(4, 1000);
    const whole = newCrossSpectra(1, 128, rate);
    whole.push([x.subarray(0, 500)]);
    whole.gap();
    whole.push([x.subarray(500, 1000)]);
    expect(whole.averages).toBe(12);
    const first = newCrossSpectra(1, 128, rate);
    first.push([x.subarray(0, 500)]);
    const second = newCrossSpectra(1, 128, rate);
    second.push([x.subarray(500, 1000)]);
    const both = whole.spectra().between[0][0].re;
    const parts = [first, second].map((gatherer) => gatherer.spectra().between[0][0].re);
    both.forEach((value, f) => {
      expect(value).toBeCloseTo(0.5 * (parts[0][f] + parts[1][f]), 12);
    });
    expect(whole.spectra().overlaps).toBe(10);
  });

  it('keeps a small signal exact beside one 1e9 times as large', () => {
    const [small, large] = [normals(5, 4096), normals(6, 4096).map((value) => 1e9 * value)];
    const alone = newCrossSpectra(1, 256, rate);
    alone.push([small]);
    const beside = newCrossSpectra(2, 256, rate);
    beside.push([large, small]);
    const wanted = alone.spectra().between[0][0].re;
    beside.spectra().between[1][1].re.forEach((value, f) => {
      expect(Math.abs(value / wanted[f] - 1)).toBeLessThan(1e-12);
    });
  });

  it('is zero for silence and where there was no whole segment', () => {
    const gatherer = newCrossSpectra(2, 64, rate);
    gatherer.push([new Float64Array(63), new Float64Array(63)]);
    expect(gatherer.spectra().between[0][1].re.every((value) => value === 0)).toBe(true);
    gatherer.push([new Float64Array(300), new Float64Array(300)]);
    expect(gatherer.averages).toBe(10);
    expect(gatherer.spectra().between[1][1].re.every((value) => value === 0)).toBe(true);
  });
});

describe('effectiveAverages', () => {
  it('foretells the variance of a density of white noise (Welch 1967)', () => {
    // The relative variance of an averaged density is 1/n_eff: measured over 400 seeds, and over all frequencies.
    const segment = 64;
    const runs = 400;
    const powers: Float64Array[] = [];
    let expected = 0;
    for (let seed = 0; seed < runs; seed++) {
      const gatherer = newCrossSpectra(1, segment, rate);
      gatherer.push([normals(1000 + seed, 320)]);
      powers.push(gatherer.spectra().between[0][0].re);
      expected = effectiveAverages(gatherer.spectra());
    }
    let variance = 0;
    for (let f = 2; f < segment / 2 - 1; f++) {
      const mean = powers.reduce((sum, p) => sum + p[f], 0) / runs;
      variance += powers.reduce((sum, p) => sum + (p[f] / mean - 1) ** 2, 0) / (runs - 1);
    }
    variance /= segment / 2 - 3;
    // 9 half-overlapped segments: 9 / (1 + 2 (8/9)/36) = 8.576.
    expect(expected).toBeCloseTo(8.576, 3);
    expect(1 / variance / expected).toBeGreaterThan(0.95);
    expect(1 / variance / expected).toBeLessThan(1.05);
  });
});
