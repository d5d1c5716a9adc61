import { execFileSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { hann } from '../../../core/spectra/hann';
import { newWelch } from '../../../core/spectra/welch';
import { needs, python } from '../../support/programs';
import { normals } from '../../support/random';

describe('hann', () => {
  // Harris, Proc. IEEE 66(1), 1978 (from memory): noise bandwidth 1.5 bins, side lobe -31.5 dB, scalloping loss 1.42 dB.
  const size = 256;
  const window = hann(size);
  const response = (bin: number) => {
    let re = 0;
    let im = 0;
    for (let k = 0; k < size; k++) {
      re += window[k] * Math.cos((2 * Math.PI * bin * k) / size);
      im -= window[k] * Math.sin((2 * Math.PI * bin * k) / size);
    }
    return Math.hypot(re, im);
  };

  it('has the noise bandwidth, the side lobe and the scalloping loss of its kind', () => {
    const sum = window.reduce((s, v) => s + v, 0);
    const energy = window.reduce((s, v) => s + v * v, 0);
    expect((size * energy) / (sum * sum)).toBeCloseTo(1.5, 12);
    let sideLobe = 0;
    for (let bin = 2; bin < 20; bin += 0.01) sideLobe = Math.max(sideLobe, response(bin));
    expect(20 * Math.log10(sideLobe / response(0))).toBeCloseTo(-31.5, 1);
    expect(20 * Math.log10(response(0) / response(0.5))).toBeCloseTo(1.42, 2);
  });
});

describe.skipIf(!needs('scipy'))('newWelch against scipy.signal.welch', () => {
  it.each([64, 256])('agrees to 1e-12 with segments of %i, whatever the blocks', (segment) => {
    const signals = [normals(1, 3000), normals(2, 3000), normals(3, 3000)];
    const welch = newWelch(3, segment, 500);
    for (let from = 0; from < 3000; from += 700)
      welch.push(signals.map((s) => s.subarray(from, Math.min(3000, from + 700))));
    const script = `
import json, sys
import numpy as np
from scipy.signal import welch
signals = json.load(sys.stdin)
json.dump([welch(s, 500, "hann", ${segment}, detrend=False)[1].tolist() for s in signals], sys.stdout)`;
    const input = JSON.stringify(signals.map((s) => Array.from(s)));
    const wanted: number[][] = JSON.parse(execFileSync(python, ['-c', script], { input }).toString());
    welch.densities().forEach((density, s) => {
      expect(density.length).toBe(segment / 2 + 1);
      density.forEach((value, f) => {
        expect(Math.abs(value / wanted[s][f] - 1)).toBeLessThan(1e-12);
      });
    });
  });
});
